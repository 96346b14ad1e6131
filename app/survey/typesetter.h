// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "app/survey/report_layout.h"

namespace evenstroke {

/// Puts text and lines on pages from top to bottom and begins a new page where one is full.
class Typesetter
{
public:
    static constexpr double left = 51.0, right = 43.0; ///< margins: 18 mm for the binding, 15 mm
    static constexpr double top = 62.0, bottom = 48.0; ///< with the running head and foot

    const TextMeasure& measure() const { return measure_; }
    std::vector<ReportPage> take_pages() { return std::move(pages_); }

    void new_page(bool landscape);
    std::size_t pages() const { return pages_.size(); } ///< begun so far: the number of the page in hand
    bool at_page_top() const { return y_ <= top + 0.5; }
    bool landscape() const { return !pages_.empty() && pages_.back().landscape; }
    double width() const { return sheet_size(landscape()).width() - left - right; }
    static double width_of(bool landscape) { return sheet_size(landscape).width() - left - right; }
    double room() const { return sheet_size(landscape()).height() - bottom - y_; }
    double y() const { return y_; }
    void move_down(double by) { y_ += by; }
    /// A new page like this one unless so much height is left.
    void need(double height);

    /// One line of text with its top at `y` below the cursor; the cursor stays.
    void text(double x, double below, const QString& words, ReportFont font, bool muted = false);
    void text_right(double right_edge, double below, const QString& words, ReportFont font, bool muted = false);
    void rule(double x1, double x2, double below, double line_width, bool strong);
    void item(PageItem page_item) { pages_.back().items.push_back(std::move(page_item)); }

    /// Wrapped text at the cursor, which moves below it. Long text goes on on the next page.
    void paragraph(const QString& words, ReportFont font, double x, double wide, bool muted = false);

private:
    TextMeasure measure_;
    std::vector<ReportPage> pages_;
    double y_ = top;
};

/// Width a table needs without cutting any column; the widths it has are worked out from it.
double natural_width(const report::Table& table, const TextMeasure& measure);
/// Of the table's head and first group of rows: what stands above it goes to the next page with them.
double least_height(const report::Table& table, const Typesetter& setter);
void set_table(const report::Table& table, Typesetter& setter);
void set_strips(const report::Strips& strips, Typesetter& setter);

} // namespace evenstroke
