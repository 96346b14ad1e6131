// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/survey/report_layout.h"

#include "app/survey/typesetter.h"

#include <QCoreApplication>

#include <algorithm>

namespace evenstroke {
namespace {

using namespace report;

constexpr double plot_height = 150.0, small_plot_height = 132.0;
constexpr double strip_label = 108.0; ///< width of the names of quantities beside the strips
constexpr double strip_row = 42.0;

QString words_of(const std::string& text) { return QString::fromUtf8(text.data(), static_cast<qsizetype>(text.size())); }

/// Sets one section, block by block.
class SectionSetter
{
public:
    SectionSetter(const Section& section, Typesetter& setter) : section_(section), setter_(setter) {}

    void set()
    {
        const bool landscape = wants_landscape();
        if (section_.new_page || setter_.landscape() != landscape)
            setter_.new_page(landscape);
        else if (!setter_.at_page_top())
            setter_.move_down(8.0);
        setter_.need(line_height(ReportFont::heading) + 60.0);
        setter_.text(Typesetter::left, 0.0, words_of(section_.title), section_.new_page || setter_.at_page_top() ? ReportFont::title : ReportFont::heading);
        setter_.move_down((setter_.at_page_top() ? line_height(ReportFont::title) : line_height(ReportFont::heading)) + 6.0);
        for (at_ = 0; at_ < section_.blocks.size(); ++at_)
            std::visit([&](const auto& block) { put(block); }, section_.blocks[at_]);
    }

private:
    bool wants_landscape() const
    {
        return std::any_of(section_.blocks.begin(), section_.blocks.end(), [&](const Block& block) {
            if (const Strips* strips = std::get_if<Strips>(&block))
                return strips->columns.size() > 8;
            const Table* table = std::get_if<Table>(&block);
            return table && natural_width(*table, setter_.measure()) > Typesetter::width_of(false);
        });
    }

    void put(const Paragraph& paragraph)
    {
        if (paragraph.style == Paragraph::Style::boxed)
            return put_boxed(paragraph);
        const bool strong = paragraph.style == Paragraph::Style::strong;
        setter_.paragraph(words_of(paragraph.text), strong ? ReportFont::bold : ReportFont::body, Typesetter::left,
                          std::min(setter_.width(), 520.0), paragraph.style == Paragraph::Style::muted);
        setter_.move_down(5.0);
    }

    void put_boxed(const Paragraph& paragraph)
    {
        constexpr double padding = 7.0;
        const double wide = std::min(setter_.width(), 520.0);
        const QStringList lines = setter_.measure().wrapped(words_of(paragraph.text), wide - 2.0 * padding, ReportFont::body);
        const double height = static_cast<double>(lines.size()) * line_height(ReportFont::body) + 2.0 * padding;
        setter_.move_down(3.0);
        setter_.need(height + 6.0);
        setter_.item(BoxItem{QRectF(Typesetter::left, setter_.y(), wide, height)});
        double down = padding;
        for (const QString& line : lines) {
            setter_.text(Typesetter::left + padding, down, line, ReportFont::body);
            down += line_height(ReportFont::body);
        }
        setter_.move_down(height + 8.0);
    }

    void put(const Heading& heading)
    {
        setter_.move_down(setter_.at_page_top() ? 0.0 : 6.0);
        setter_.need(90.0);
        setter_.paragraph(words_of(heading.text), ReportFont::heading, Typesetter::left, setter_.width());
        setter_.move_down(4.0);
    }

    void put(const FieldList& list)
    {
        if (list.short_ones)
            return put_beside(list);
        double name_width = 0.0;
        for (const auto& field : list.fields)
            name_width = std::max(name_width, setter_.measure().width(words_of(field.name), ReportFont::body));
        name_width = std::min(name_width, 190.0) + 14.0;
        for (const auto& field : list.fields) {
            setter_.need(line_height(ReportFont::body) + 2.0);
            setter_.text(Typesetter::left, 0.0, words_of(field.name), ReportFont::body, true);
            setter_.paragraph(words_of(field.value), ReportFont::body, Typesetter::left + name_width, std::min(setter_.width(), 520.0) - name_width);
            setter_.move_down(2.0);
        }
        setter_.move_down(5.0);
    }

    /// The first half of the fields left, the other half right of it.
    void put_beside(const FieldList& list)
    {
        const std::size_t rows = (list.fields.size() + 1) / 2;
        const double half = std::min(setter_.width(), 520.0) / 2.0;
        double name_widths[2] = {0.0, 0.0};
        for (std::size_t i = 0; i < list.fields.size(); ++i)
            name_widths[i / rows] = std::max(name_widths[i / rows], setter_.measure().width(words_of(list.fields[i].name), ReportFont::body) + 12.0);
        for (std::size_t row = 0; row < rows; ++row) {
            qsizetype lines = 1;
            setter_.need(2.0 * line_height(ReportFont::body));
            for (const std::size_t i : {row, row + rows}) {
                if (i >= list.fields.size())
                    continue;
                const double name_width = name_widths[i / rows];
                const double x = Typesetter::left + (i == row ? 0.0 : half + 8.0);
                const QStringList value = setter_.measure().wrapped(words_of(list.fields[i].value), half - name_width - 8.0, ReportFont::body);
                setter_.text(x, 0.0, words_of(list.fields[i].name), ReportFont::body, true);
                for (qsizetype line = 0; line < value.size(); ++line)
                    setter_.text(x + name_width, static_cast<double>(line) * line_height(ReportFont::body), value[line], ReportFont::body);
                lines = std::max(lines, value.size());
            }
            setter_.move_down(static_cast<double>(lines) * line_height(ReportFont::body) + 2.0);
        }
        setter_.move_down(5.0);
    }

    void put(const Table& table) { set_table(table, setter_); }

    /// Plots over load stand two beside each other.
    void put(const Plot& plot)
    {
        if (plot.across == Plot::Across::time) {
            setter_.need(plot_height);
            setter_.item(PlotItem{QRectF(Typesetter::left, setter_.y(), std::min(setter_.width(), 560.0), plot_height), &plot});
            setter_.move_down(plot_height + 10.0);
            return;
        }
        const Plot* second = at_ + 1 < section_.blocks.size() ? std::get_if<Plot>(&section_.blocks[at_ + 1]) : nullptr;
        const double wide = (std::min(setter_.width(), 560.0) - 16.0) / 2.0;
        setter_.need(small_plot_height);
        setter_.item(PlotItem{QRectF(Typesetter::left, setter_.y(), wide, small_plot_height), &plot});
        if (second && second->across == Plot::Across::load) {
            setter_.item(PlotItem{QRectF(Typesetter::left + wide + 16.0, setter_.y(), wide, small_plot_height), second});
            ++at_;
        }
        setter_.move_down(small_plot_height + 8.0);
    }

    void put(const Strips& strips)
    {
        const double wide = (setter_.width() - strip_label) / static_cast<double>(std::max<std::size_t>(1, strips.columns.size()));
        strip_head(strips, wide);
        for (const Strips::Row& row : strips.rows) {
            if (strip_row > setter_.room()) {
                setter_.new_page(setter_.landscape());
                strip_head(strips, wide);
            }
            strip_line(strips, row, wide);
        }
        setter_.move_down(6.0);
    }

    void strip_head(const Strips& strips, double wide)
    {
        for (std::size_t c = 0; c < strips.columns.size(); ++c)
            setter_.text_right(Typesetter::left + strip_label + wide * static_cast<double>(c + 1) - 6.0, 0.0,
                               words_of(strips.columns[c]), ReportFont::bold);
        setter_.text(Typesetter::left, 0.0, QStringLiteral("Cylinder"), ReportFont::bold);
        setter_.move_down(line_height(ReportFont::bold) + 1.0);
    }

    void strip_line(const Strips& strips, const Strips::Row& row, double wide)
    {
        setter_.rule(Typesetter::left, Typesetter::left + setter_.width(), 0.0, 0.3, false);
        double down = 3.0;
        for (const QString& line : setter_.measure().wrapped(words_of(row.title), strip_label - 8.0, ReportFont::body)) {
            setter_.text(Typesetter::left, down, line, ReportFont::body);
            down += line_height(ReportFont::body);
        }
        setter_.text(Typesetter::left, down, words_of(row.unit), ReportFont::body, true);
        for (std::size_t c = 0; c < row.cells.size(); ++c) {
            const double x = Typesetter::left + strip_label + wide * static_cast<double>(c);
            setter_.item(StripItem{QRectF(x, setter_.y() + 4.0, wide - 6.0, 22.0), &strips, &row.cells[c]});
            setter_.text_right(x + wide - 6.0, 28.0, words_of(row.cells[c].newest), row.cells[c].level >= Level::note ? ReportFont::bold : ReportFont::body);
            const QString remark = words_of(row.cells[c].remark);
            const double room = wide - 8.0 - setter_.measure().width(words_of(row.cells[c].newest), ReportFont::body);
            setter_.text(x, 28.0, setter_.measure().width(remark, ReportFont::body) <= room ? remark : remark.section(QLatin1Char(' '), 1), ReportFont::body, true);
        }
        setter_.move_down(strip_row);
    }

    void put(const SignOff& sign)
    {
        setter_.need(40.0 + 24.0 * static_cast<double>(sign.fields.size()));
        setter_.paragraph(words_of(sign.role), ReportFont::heading, Typesetter::left, setter_.width());
        setter_.move_down(2.0);
        setter_.paragraph(words_of(sign.statement), ReportFont::body, Typesetter::left, setter_.width());
        for (const auto& field : sign.fields) {
            setter_.move_down(12.0);
            setter_.text(Typesetter::left, 0.0, words_of(field.name), ReportFont::body, true);
            setter_.text(Typesetter::left + 90.0, 0.0, words_of(field.value), ReportFont::body);
            setter_.rule(Typesetter::left + 88.0, Typesetter::left + 360.0, line_height(ReportFont::body) + 1.0, 0.5, true);
            setter_.move_down(line_height(ReportFont::body));
        }
        setter_.move_down(16.0);
    }

    const Section& section_;
    Typesetter& setter_;
    std::size_t at_ = 0;
};

void add_running_head(const SurveyReport& report, ReportPage& page, std::size_t number, std::size_t of, const TextMeasure& measure)
{
    const QSizeF sheet = sheet_size(page.landscape);
    const double left = Typesetter::left, right = sheet.width() - Typesetter::right;
    const auto right_text = [&](double baseline, const QString& words) {
        page.items.push_back(TextItem{right - measure.width(words, ReportFont::body), baseline, ReportFont::body, true, words});
    };
    const QString period = words_of(date_text(report.period.from)) + QStringLiteral(" to ") + words_of(date_text(report.period.to));
    const QString what = words_of(report.ship) + QStringLiteral(", ") + words_of(report.engine) + QStringLiteral(", ") + period;
    page.items.push_back(TextItem{left, 40.0, ReportFont::body, true, what});
    right_text(40.0, QStringLiteral("report ") + words_of(report.number));
    page.items.push_back(RuleItem{left, 45.0, right, 45.0, 0.5, false});
    page.items.push_back(TextItem{left, sheet.height() - 26.0, ReportFont::body, true,
                                  QStringLiteral("Evidence for the survey; takes no survey's place.")});
    right_text(sheet.height() - 26.0, QStringLiteral("page %1 of %2").arg(number).arg(of));
}

} // namespace

ReportLayout lay_out(std::shared_ptr<const SurveyReport> report)
{
    Typesetter setter;
    setter.new_page(false);
    for (const Section& section : report->sections)
        SectionSetter(section, setter).set();
    const TextMeasure measure;
    ReportLayout layout{report, setter.take_pages()};
    std::size_t number = 0;
    for (ReportPage& page : layout.pages)
        add_running_head(*report, page, ++number, layout.pages.size(), measure);
    return layout;
}

} // namespace evenstroke
