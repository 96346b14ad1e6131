// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/survey/report_layout.h"

#include "app/survey/event_labels.h"
#include "app/survey/typesetter.h"

#include <QCoreApplication>

#include <algorithm>

namespace evenstroke {
namespace {

using namespace report;

constexpr double plot_height = 150.0, small_plot_height = 132.0;
constexpr double signature_line = 22.0; ///< room for a pen
constexpr double free_enough = 0.45;  ///< of a page's height: then a section goes on there instead of on a new page

QString words_of(const std::string& text) { return QString::fromUtf8(text.data(), static_cast<qsizetype>(text.size())); }

/// The sections' titles and first pages. While the pages are laid out the numbers are not known: a letter of the
/// private use area holds the place of each.
class PageNumbers
{
public:
    explicit PageNumbers(const SurveyReport& report) : first_pages_(report.sections.size(), 0)
    {
        for (const Section& section : report.sections)
            titles_.push_back(section.title);
    }
    void begins(std::size_t section, std::size_t page) { first_pages_[section] = page; }
    std::string with_places_held(const std::string& text) const
    {
        return with_page_references(text, [&](const std::string& title) {
            const auto found = std::find(titles_.begin(), titles_.end(), title);
            if (found == titles_.end())
                return std::string();
            return QStringLiteral(", page\u00a0").append(QChar(first_letter + static_cast<ushort>(found - titles_.begin()))).toStdString();
        });
    }
    void fill_in(QString& text) const
    {
        for (qsizetype i = 0; i < text.size(); ++i)
            if (const int section = text[i].unicode() - first_letter; section >= 0 && section < static_cast<int>(first_pages_.size()))
                text.replace(i, 1, QString::number(first_pages_[static_cast<std::size_t>(section)]));
    }

private:
    static constexpr ushort first_letter = 0xE000;
    std::vector<std::string> titles_;
    std::vector<std::size_t> first_pages_;
};

/// Sets one section, block by block.
class SectionSetter
{
public:
    /// @param next the section after it, or null: a short one need not stand up before one that lies
    SectionSetter(const Section& section, const Section* next, Typesetter& setter, const PageNumbers& numbers)
        : section_(section), next_(next), setter_(setter), numbers_(numbers)
    {
    }
    std::size_t first_page() const { return first_page_; }

    void set()
    {
        const bool landscape = wants_landscape();
        const bool fresh = section_.new_page && !goes_on_here();
        if (fresh || setter_.landscape() != landscape)
            setter_.new_page(landscape);
        else if (!setter_.at_page_top())
            setter_.move_down(8.0);
        setter_.need(line_height(ReportFont::heading) + std::max(60.0, signatures_height()));
        first_page_ = setter_.pages();
        setter_.text(Typesetter::left, 0.0, words_of(section_.title), fresh || setter_.at_page_top() ? ReportFont::title : ReportFont::heading);
        setter_.move_down((setter_.at_page_top() ? line_height(ReportFont::title) : line_height(ReportFont::heading)) + 6.0);
        for (at_ = 0; at_ < section_.blocks.size(); ++at_)
            std::visit([&](const auto& block) { put(block); }, section_.blocks[at_]);
    }

private:
    bool goes_on_here() const
    {
        const double whole = sheet_size(setter_.landscape()).height() - Typesetter::top - Typesetter::bottom;
        return setter_.at_page_top() || setter_.room() > free_enough * whole;
    }

    bool needs_landscape(const Section& section) const
    {
        return std::any_of(section.blocks.begin(), section.blocks.end(), [&](const Block& block) {
            if (const Strips* strips = std::get_if<Strips>(&block))
                return strips->columns.size() > 8;
            const Table* table = std::get_if<Table>(&block);
            return table && natural_width(*table, setter_.measure()) > Typesetter::width_of(false);
        });
    }

    /// Words and a few rows only: as well set on a lying page.
    bool is_short() const
    {
        std::size_t rows = 0;
        for (const Block& block : section_.blocks) {
            if (std::holds_alternative<Plot>(block) || std::holds_alternative<Strips>(block) || std::holds_alternative<SignOff>(block))
                return false;
            const Table* table = std::get_if<Table>(&block);
            rows += table ? table->rows.size() : 1;
        }
        return rows <= 25;
    }

    /// Wide tables and many strips need it; a short section goes with the page that is there or that follows.
    bool wants_landscape() const
    {
        if (needs_landscape(section_))
            return true;
        if (!is_short() || setter_.at_page_top())
            return false;
        return goes_on_here() ? setter_.landscape() : section_.new_page && next_ && needs_landscape(*next_);
    }

    void put(const Paragraph& paragraph)
    {
        if (paragraph.style == Paragraph::Style::boxed)
            return put_boxed(paragraph);
        const bool strong = paragraph.style == Paragraph::Style::strong;
        setter_.paragraph(words_of(numbers_.with_places_held(paragraph.text)), strong ? ReportFont::bold : ReportFont::body, Typesetter::left,
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
        setter_.need(std::max(90.0, line_height(ReportFont::heading) + 4.0 + least_height_below()));
        setter_.paragraph(words_of(heading.text), ReportFont::heading, Typesetter::left, setter_.width());
        setter_.move_down(4.0);
    }

    /// Of the table or plot that a heading stands over, and stays with.
    double least_height_below() const
    {
        if (at_ + 1 >= section_.blocks.size())
            return 0.0;
        const Block& below = section_.blocks[at_ + 1];
        if (const Table* table = std::get_if<Table>(&below))
            return least_height(*table, setter_);
        const Plot* plot = std::get_if<Plot>(&below);
        return !plot ? 0.0 : plot->across == Plot::Across::time ? plot_height : small_plot_height;
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

    /// Plots over load or angle stand beside each other, two on a standing page and three on a lying one.
    void put(const Plot& plot)
    {
        if (plot.across == Plot::Across::time) {
            const double wide = std::min(setter_.width(), 560.0);
            const QString key = label_events(plot, wide, setter_.measure()).key;
            const auto lines = key.isEmpty() ? 0 : setter_.measure().wrapped(key, wide, ReportFont::body).size();
            setter_.need(plot_height + static_cast<double>(lines) * line_height(ReportFont::body));
            setter_.item(PlotItem{QRectF(Typesetter::left, setter_.y(), wide, plot_height), &plot});
            setter_.move_down(plot_height);
            if (lines > 0)
                setter_.paragraph(key, ReportFont::body, Typesetter::left, wide, true);
            setter_.move_down(10.0);
            return;
        }
        constexpr double between = 16.0;
        const int beside = setter_.landscape() ? 3 : 2;
        const double wide = (setter_.width() - between * (beside - 1)) / beside;
        setter_.need(small_plot_height);
        for (int column = 0; column < beside; ++column) {
            const Plot* next = at_ < section_.blocks.size() ? std::get_if<Plot>(&section_.blocks[at_]) : nullptr;
            if (!next || next->across != plot.across)
                break;
            setter_.item(PlotItem{QRectF(Typesetter::left + (wide + between) * column, setter_.y(), wide, small_plot_height), next});
            ++at_;
        }
        --at_; // the caller goes on to the block after
        setter_.move_down(small_plot_height + 8.0);
    }

    void put(const Strips& strips) { set_strips(strips, setter_); }

    static double signature_height(const SignOff& sign)
    {
        return line_height(ReportFont::heading) + line_height(ReportFont::body) + signature_line * static_cast<double>(sign.fields.size()) + 16.0;
    }

    /// All signatures of a section stand on one page: two beside each other, then the next two or one.
    double signatures_height() const
    {
        std::vector<double> heights;
        for (const Block& block : section_.blocks)
            if (const SignOff* sign = std::get_if<SignOff>(&block))
                heights.push_back(signature_height(*sign));
        double height = 0.0;
        for (std::size_t i = 0; i < heights.size(); i += 2)
            height += i + 1 < heights.size() ? std::max(heights[i], heights[i + 1]) : heights[i];
        return height;
    }

    void put(const SignOff& sign)
    {
        const double half = (std::min(setter_.width(), 520.0) - 24.0) / 2.0;
        const SignOff* second = at_ + 1 < section_.blocks.size() ? std::get_if<SignOff>(&section_.blocks[at_ + 1]) : nullptr;
        const double height = std::max(signature_height(sign), second ? signature_height(*second) : 0.0);
        setter_.need(height);
        sign_at(sign, Typesetter::left, second ? half : 2.0 * half + 24.0);
        if (second) {
            sign_at(*second, Typesetter::left + half + 24.0, half);
            ++at_;
        }
        setter_.move_down(height);
    }

    void sign_at(const SignOff& sign, double x, double wide)
    {
        constexpr double name_width = 64.0;
        setter_.text(x, 0.0, words_of(sign.role), ReportFont::heading);
        double down = line_height(ReportFont::heading);
        setter_.text(x, down, words_of(sign.statement), ReportFont::body);
        down += line_height(ReportFont::body);
        for (const auto& field : sign.fields) {
            down += signature_line;
            setter_.text(x, down - line_height(ReportFont::body), words_of(field.name), ReportFont::body, true);
            setter_.text(x + name_width, down - line_height(ReportFont::body), words_of(field.value), ReportFont::body);
            setter_.item(RuleItem{x + name_width - 2.0, setter_.y() + down + 1.0, x + wide, setter_.y() + down + 1.0, 0.5, true});
        }
    }

    const Section& section_;
    const Section* next_;
    Typesetter& setter_;
    const PageNumbers& numbers_;
    std::size_t at_ = 0, first_page_ = 0;
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
    PageNumbers numbers(*report);
    for (std::size_t i = 0; i < report->sections.size(); ++i) {
        SectionSetter section(report->sections[i], i + 1 < report->sections.size() ? &report->sections[i + 1] : nullptr, setter, numbers);
        section.set();
        numbers.begins(i, section.first_page());
    }
    const TextMeasure measure;
    ReportLayout layout{report, setter.take_pages()};
    std::size_t number = 0;
    for (ReportPage& page : layout.pages)
        for (PageItem& item : page.items)
            if (TextItem* text = std::get_if<TextItem>(&item))
                numbers.fill_in(text->text);
    for (ReportPage& page : layout.pages)
        add_running_head(*report, page, ++number, layout.pages.size(), measure);
    return layout;
}

} // namespace evenstroke
