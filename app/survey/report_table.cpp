// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/survey/typesetter.h"

#include <algorithm>
#include <numeric>

namespace evenstroke {
namespace {

using namespace report;

constexpr double gap = 9.0;            ///< between two columns
constexpr double remark_least = 72.0;  ///< a remark wraps, but not narrower than this

QString words_of(const std::string& text) { return QString::fromUtf8(text.data(), static_cast<qsizetype>(text.size())); }

/// A table with its cells as drawn and the widths they need.
struct Set
{
    std::vector<QString> titles;
    std::vector<std::vector<QString>> cells;
    std::vector<double> needs;
};

Set prepare(const Table& table, const TextMeasure& measure)
{
    Set set;
    set.needs.assign(table.columns.size(), 0.0);
    for (const Column& column : table.columns)
        set.titles.push_back(words_of(column.title));
    for (const Row& row : table.rows) {
        auto& cells = set.cells.emplace_back();
        for (std::size_t c = 0; c < table.columns.size(); ++c) {
            cells.push_back(c < row.cells.size() ? words_of(row.cells[c]) : QString());
            if (table.columns[c].kind != Column::Kind::remark)
                set.needs[c] = std::max(set.needs[c], measure.width(cells.back(), ReportFont::body));
        }
    }
    for (std::size_t c = 0; c < table.columns.size(); ++c) {
        const bool remark = table.columns[c].kind == Column::Kind::remark;
        set.needs[c] = std::max({set.needs[c], measure.widest_word(set.titles[c], ReportFont::bold), remark ? remark_least : 0.0});
    }
    return set;
}

double sum_of(const std::vector<double>& needs, const std::vector<std::size_t>& columns)
{
    double sum = gap * static_cast<double>(columns.empty() ? 0 : columns.size() - 1);
    for (const std::size_t c : columns)
        sum += needs[c];
    return sum;
}

/// Columns that go on one page together; the key columns stand in each part.
std::vector<std::vector<std::size_t>> cut(const Table& table, const Set& set, double width)
{
    std::vector<std::size_t> keys(static_cast<std::size_t>(std::max(0, table.key_columns)));
    std::iota(keys.begin(), keys.end(), std::size_t{0});
    std::vector<std::vector<std::size_t>> parts{keys};
    for (std::size_t c = keys.size(); c < table.columns.size(); ++c) {
        parts.back().push_back(c);
        if (sum_of(set.needs, parts.back()) > width && parts.back().size() > keys.size() + 1) {
            parts.back().pop_back();
            parts.push_back(keys);
            parts.back().push_back(c);
        }
    }
    return parts;
}

/// Draws one part of a table; knows where each of its columns stands.
class TablePart
{
public:
    TablePart(const Table& table, const Set& set, std::vector<std::size_t> columns, Typesetter& setter)
        : table_(table), set_(set), columns_(std::move(columns)), setter_(setter)
    {
        place_columns();
        for (std::size_t i = 0; i < columns_.size(); ++i) {
            titles_.push_back(setter_.measure().wrapped(set_.titles[columns_[i]], widths_[i] + 1.0, ReportFont::bold));
            title_lines_ = std::max(title_lines_, titles_.back().size());
        }
    }

    /// So that a head never stands alone at the foot of a page.
    double least_height() const
    {
        double rows = group_height(0) + 2.0;
        if (const std::size_t second = group_end(0); second < table_.rows.size() && group_end(second) == table_.rows.size())
            rows += group_height(second) + 2.0; // of two, neither is left alone
        return head_height(true) + std::max(3.0 * line_height(ReportFont::body), rows);
    }

    void draw(bool first_part)
    {
        setter_.need(least_height());
        head(!first_part);
        for (std::size_t r = 0; r < table_.rows.size();) {
            const std::size_t end = group_end(r);
            group(r, end);
            r = end;
        }
        setter_.rule(Typesetter::left, right_edge(), 1.0, 0.5, true);
        setter_.move_down(3.0);
    }

private:
    bool remark(std::size_t i) const { return table_.columns[columns_[i]].kind == Column::Kind::remark; }
    bool number(std::size_t i) const { return table_.columns[columns_[i]].kind == Column::Kind::number; }
    double right_edge() const { return widths_.empty() ? Typesetter::left : lefts_.back() + widths_.back(); }

    void place_columns()
    {
        double spare = setter_.width() - sum_of(set_.needs, columns_);
        const auto remarks = static_cast<double>(std::count_if(columns_.begin(), columns_.end(), [&](std::size_t c) { return table_.columns[c].kind == Column::Kind::remark; }));
        double x = Typesetter::left;
        for (std::size_t i = 0; i < columns_.size(); ++i) {
            double wide = set_.needs[columns_[i]];
            if (remark(i))
                wide += std::max(0.0, spare) / remarks;
            else if (spare > 0.0 && remarks == 0.0)
                wide += std::min(spare / static_cast<double>(columns_.size()), 14.0);
            lefts_.push_back(x);
            widths_.push_back(wide);
            x += wide + gap;
        }
    }

    double head_height(bool with_caption) const
    {
        return (with_caption && !table_.caption.empty() ? line_height(ReportFont::bold) + 3.0 : 0.0)
               + static_cast<double>(title_lines_) * line_height(ReportFont::bold) + 4.0;
    }

    void head(bool continued)
    {
        if (!table_.caption.empty()) {
            const QString caption = words_of(table_.caption) + (continued ? QStringLiteral(" (continued)") : QString());
            setter_.paragraph(caption, ReportFont::bold, Typesetter::left, setter_.width());
            setter_.move_down(3.0);
        }
        for (std::size_t i = 0; i < columns_.size(); ++i) {
            const double down = static_cast<double>(title_lines_ - titles_[i].size()) * line_height(ReportFont::body);
            draw_lines(i, titles_[i], down, true);
        }
        setter_.move_down(static_cast<double>(title_lines_) * line_height(ReportFont::bold) + 1.5);
        setter_.rule(Typesetter::left, right_edge(), 0.0, 0.75, true);
        setter_.move_down(1.5);
    }

    void draw_lines(std::size_t i, const QStringList& lines, double down, bool muted)
    {
        for (const QString& line : lines) {
            if (number(i))
                setter_.text_right(lefts_[i] + widths_[i], down, line, ReportFont::body, muted);
            else
                setter_.text(lefts_[i], down, line, ReportFont::body, muted);
            down += line_height(ReportFont::body);
        }
    }

    QStringList cell_lines(std::size_t row, std::size_t i) const
    {
        const QString& words = set_.cells[row][columns_[i]];
        return remark(i) ? setter_.measure().wrapped(words, widths_[i], ReportFont::body) : QStringList{words};
    }

    std::size_t group_end(std::size_t begin) const
    {
        std::size_t end = begin + 1;
        while (end < table_.rows.size() && !table_.rows[end].starts_group)
            ++end;
        return end;
    }

    double group_height(std::size_t begin) const
    {
        double height = 0.0;
        for (std::size_t r = begin; r < group_end(begin); ++r) {
            qsizetype most = 1;
            for (std::size_t i = 0; i < columns_.size(); ++i)
                most = std::max(most, cell_lines(r, i).size());
            height += static_cast<double>(most) * line_height(ReportFont::body);
        }
        return height;
    }

    /// What has to fit besides a group that ends at `end`: a last single row, which would stand alone on the next page.
    double height_of_last_single(std::size_t end) const
    {
        return end + 1 == table_.rows.size() ? group_height(end) + 2.0 : 0.0;
    }

    /// Rows from `begin` to `end` stay on one page if they fit on any.
    void group(std::size_t begin, std::size_t end)
    {
        std::vector<std::vector<QStringList>> wrapped;
        std::vector<double> heights;
        double height = 0.0;
        for (std::size_t r = begin; r < end; ++r) {
            auto& row = wrapped.emplace_back();
            qsizetype most = 1;
            for (std::size_t i = 0; i < columns_.size(); ++i) {
                row.push_back(cell_lines(r, i));
                most = std::max(most, row.back().size());
            }
            heights.push_back(static_cast<double>(most) * line_height(ReportFont::body));
            height += heights.back();
        }
        if (height + height_of_last_single(end) + 2.0 > setter_.room() && !setter_.at_page_top() && (begin > 0 || height + 2.0 > setter_.room())) {
            setter_.rule(Typesetter::left, right_edge(), 1.0, 0.5, true);
            setter_.new_page(setter_.landscape());
            head(true);
        } else if (begin > 0) {
            setter_.rule(Typesetter::left, right_edge(), 1.0, 0.3, false);
            setter_.move_down(2.0);
        }
        for (std::size_t r = 0; r < wrapped.size(); ++r) {
            if (heights[r] > setter_.room())
                setter_.need(heights[r]);
            for (std::size_t i = 0; i < columns_.size(); ++i)
                draw_lines(i, wrapped[r][i], 0.0, false);
            setter_.move_down(heights[r]);
        }
    }

    const Table& table_;
    const Set& set_;
    std::vector<std::size_t> columns_;
    Typesetter& setter_;
    std::vector<double> lefts_, widths_;
    std::vector<QStringList> titles_;
    qsizetype title_lines_ = 1;
};

} // namespace

double natural_width(const Table& table, const TextMeasure& measure)
{
    const Set set = prepare(table, measure);
    std::vector<std::size_t> all(table.columns.size());
    std::iota(all.begin(), all.end(), std::size_t{0});
    return sum_of(set.needs, all);
}

double least_height(const Table& table, const Typesetter& setter)
{
    const Set set = prepare(table, setter.measure());
    Typesetter nowhere;
    nowhere.new_page(setter.landscape());
    return TablePart(table, set, std::move(cut(table, set, setter.width()).front()), nowhere).least_height();
}

void set_table(const Table& table, Typesetter& setter)
{
    const Set set = prepare(table, setter.measure());
    bool first = true;
    for (std::vector<std::size_t>& part : cut(table, set, setter.width())) {
        setter.move_down(first ? 0.0 : 6.0);
        TablePart(table, set, std::move(part), setter).draw(first);
        first = false;
    }
    if (!table.note.empty())
        setter.paragraph(words_of(table.note), ReportFont::body, Typesetter::left, setter.width(), true);
    setter.move_down(8.0);
}

} // namespace evenstroke
