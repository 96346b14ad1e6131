// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "app/survey/report_layout.h"
#include "core/problem.h"

#include <QString>

#include <memory>

class QPrinter;

namespace evenstroke {

/// Writes the report as PDF/A-1b: fonts embedded, no transparency, black and grey, vector plots, text that can
/// be searched. Written beside the path and moved there when whole; what stood there before is replaced.
/// Needs a QApplication (any platform, offscreen too) and the window's thread.
/// @par Problems storage: the folder or the disk refused; invalid_input: stopped by `progress`
Result<void> write_survey_pdf(const SurveyReport& report, const QString& path, const ReportProgress& progress = {});

/// The same from a layout made before, perhaps on another thread.
Result<void> write_survey_pdf(const ReportLayout& layout, const QString& path, const ReportProgress& progress = {});

/// The same as text with tabs, for those who want to count with it. @par Problems storage
Result<void> write_survey_text(const SurveyReport& report, const QString& path);

/// The PDF page by page, so that a window stays alive between two pages. Dropping it before `finish` leaves
/// nothing behind.
class PdfWriting
{
public:
    PdfWriting(std::shared_ptr<const ReportLayout> layout, const QString& path);
    ~PdfWriting();

    /// Opens the file. @par Problems storage
    Result<void> begin();
    int pages_done() const { return pages_done_; }
    int pages() const { return static_cast<int>(layout_->pages.size()); }
    /// Draws the next page; false when there was none left.
    bool step();
    /// Closes the file and puts it in its place. @par Problems storage
    Result<void> finish();

private:
    struct Parts;
    std::shared_ptr<const ReportLayout> layout_;
    QString path_;
    int pages_done_ = 0;
    std::unique_ptr<Parts> parts_;
};

/// All pages on paper; what the printer's driver allows of the page range is left to it.
void print_report(const ReportLayout& layout, QPrinter& printer);

} // namespace evenstroke
