// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/survey/typesetter.h"

#include <algorithm>

namespace evenstroke {
namespace {

using namespace report;

constexpr double label_width = 108.0;  ///< of the names of quantities beside the strips
constexpr double between = 6.0;        ///< two columns
constexpr double strip_height = 22.0;
constexpr double number_below = 28.0;  ///< the newest value, from the top of the row
constexpr double row_height = 42.0;    ///< strip and number; more where a remark stands below

QString words_of(const std::string& text) { return QString::fromUtf8(text.data(), static_cast<qsizetype>(text.size())); }

ReportFont font_of(const Strips::Cell& cell) { return cell.level >= Level::note ? ReportFont::bold : ReportFont::body; }

/// A level stands beside the number where there is room, else on lines of its own: never over it.
QStringList lines_below(const Strips::Cell& cell, double wide, const TextMeasure& measure)
{
    const QString remark = words_of(cell.remark);
    const double beside = wide - measure.width(words_of(cell.newest), font_of(cell)) - between;
    if (remark.isEmpty() || measure.width(remark, font_of(cell)) <= beside)
        return {};
    return measure.wrapped(remark, wide, font_of(cell));
}

class StripSetter
{
public:
    StripSetter(const Strips& strips, Typesetter& setter)
        : strips_(strips), setter_(setter),
          column_((setter.width() - label_width) / static_cast<double>(std::max<std::size_t>(1, strips.columns.size())))
    {
    }

    void set()
    {
        head();
        for (const Strips::Row& row : strips_.rows) {
            const double height = height_of(row);
            if (height > setter_.room()) {
                setter_.new_page(setter_.landscape());
                head();
            }
            line(row);
            setter_.move_down(height);
        }
        setter_.move_down(6.0);
    }

private:
    double inner() const { return column_ - between; }
    double left_of(std::size_t column) const { return Typesetter::left + label_width + column_ * static_cast<double>(column); }

    double height_of(const Strips::Row& row) const
    {
        qsizetype most = 0;
        for (const Strips::Cell& cell : row.cells)
            most = std::max(most, lines_below(cell, inner(), setter_.measure()).size());
        return row_height + static_cast<double>(most) * line_height(ReportFont::body);
    }

    void head()
    {
        for (std::size_t c = 0; c < strips_.columns.size(); ++c)
            setter_.text_right(left_of(c) + inner(), 0.0, words_of(strips_.columns[c]), ReportFont::bold);
        setter_.text(Typesetter::left, 0.0, QStringLiteral("Cylinder"), ReportFont::bold);
        setter_.move_down(line_height(ReportFont::bold) + 1.0);
    }

    void line(const Strips::Row& row)
    {
        setter_.rule(Typesetter::left, Typesetter::left + setter_.width(), 0.0, 0.3, false);
        double down = 3.0;
        for (const QString& words : setter_.measure().wrapped(words_of(row.title), label_width - 8.0, ReportFont::body)) {
            setter_.text(Typesetter::left, down, words, ReportFont::body);
            down += line_height(ReportFont::body);
        }
        setter_.text(Typesetter::left, down, words_of(row.unit), ReportFont::body, true);
        for (std::size_t c = 0; c < row.cells.size(); ++c)
            cell(row.cells[c], left_of(c));
    }

    void cell(const Strips::Cell& one, double x)
    {
        setter_.item(StripItem{QRectF(x, setter_.y() + 4.0, inner(), strip_height), &strips_, &one});
        setter_.text_right(x + inner(), number_below, words_of(one.newest), font_of(one));
        const QStringList below = lines_below(one, inner(), setter_.measure());
        if (below.isEmpty())
            setter_.text(x, number_below, words_of(one.remark), font_of(one), one.level < Level::note);
        double down = number_below;
        for (const QString& words : below) {
            down += line_height(ReportFont::body);
            setter_.text_right(x + inner(), down, words, font_of(one), one.level < Level::note);
        }
    }

    const Strips& strips_;
    Typesetter& setter_;
    double column_;
};

} // namespace

void set_strips(const Strips& strips, Typesetter& setter) { StripSetter(strips, setter).set(); }

} // namespace evenstroke
