// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/survey/report_writer.h"

#include "app/survey/report_painter.h"

#include <QPageLayout>
#include <QPageSize>
#include <QPdfWriter>
#include <QPrinter>
#include <QSaveFile>

#include <qcustomplot.h>

namespace evenstroke {
namespace {

/// Fine enough for hairlines; sizes are given in points and scaled.
constexpr int dots_per_inch = 1200;

Problem not_written(const QString& path, const QString& reason)
{
    return {Problem::Kind::storage, QStringLiteral("The report could not be written to %1: %2.").arg(path, reason).toStdString(),
            "Choose another folder, or make room on the disk, and save again."};
}

QPageLayout page_layout(const ReportPage& page)
{
    return {QPageSize(QPageSize::A4), page.landscape ? QPageLayout::Landscape : QPageLayout::Portrait, QMarginsF()};
}

void describe(const SurveyReport& report, QPdfWriter& writer)
{
    writer.setPdfVersion(QPagedPaintDevice::PdfVersion_A1b);
    writer.setResolution(dots_per_inch);
    writer.setTitle(QString::fromStdString("Report " + report.number + ", " + report.ship + ", " + report.engine));
    writer.setCreator(QString::fromStdString("Evenstroke " + report.details.program_version));
}

Result<void> all_well() { return BOOST_OUTCOME_V2_NAMESPACE::success(); }

} // namespace

/// One painter from the first page to the last: beginning again would start the file anew.
struct PdfWriting::Parts
{
    explicit Parts(const QString& path) : file(path), writer(&file) {}
    ~Parts()
    {
        if (painter.isActive())
            painter.end();
    }

    QSaveFile file;
    QPdfWriter writer;
    ReportPainter pages;
    QCPPainter painter;
};

PdfWriting::PdfWriting(std::shared_ptr<const ReportLayout> layout, const QString& path)
    : layout_(std::move(layout)), path_(path), parts_(std::make_unique<Parts>(path))
{
}

PdfWriting::~PdfWriting() = default;

Result<void> PdfWriting::begin()
{
    if (!parts_->file.open(QIODevice::WriteOnly))
        return not_written(path_, parts_->file.errorString());
    describe(*layout_->report, parts_->writer);
    parts_->writer.setPageLayout(page_layout(layout_->pages.front()));
    parts_->painter.begin(&parts_->writer);
    parts_->painter.setMode(QCPPainter::pmVectorized);
    parts_->painter.setMode(QCPPainter::pmNoCaching);
    return all_well();
}

bool PdfWriting::step()
{
    if (pages_done_ >= pages())
        return false;
    const ReportPage& page = layout_->pages[static_cast<std::size_t>(pages_done_)];
    if (pages_done_ > 0) {
        parts_->writer.setPageLayout(page_layout(page));
        parts_->writer.newPage();
    }
    parts_->painter.resetTransform();
    parts_->painter.scale(dots_per_inch / 72.0, dots_per_inch / 72.0);
    parts_->pages.draw(page, parts_->painter);
    ++pages_done_;
    return true;
}

Result<void> PdfWriting::finish()
{
    parts_->painter.end();
    if (!parts_->file.commit())
        return not_written(path_, parts_->file.errorString());
    return all_well();
}

Result<void> write_survey_pdf(const SurveyReport& report, const QString& path, const ReportProgress& progress)
{
    return write_survey_pdf(lay_out(std::make_shared<const SurveyReport>(report)), path, progress);
}

Result<void> write_survey_pdf(const ReportLayout& layout, const QString& path, const ReportProgress& progress)
{
    PdfWriting writing(std::make_shared<const ReportLayout>(layout), path);
    if (auto begun = writing.begin(); !begun.has_value())
        return begun.error();
    while (writing.step())
        if (progress && !progress(writing.pages_done(), writing.pages()))
            return invalid_input("Writing the report was stopped; nothing was saved.", "Save again when it is wanted.");
    return writing.finish();
}

Result<void> write_survey_text(const SurveyReport& report, const QString& path)
{
    QSaveFile file(path);
    if (!file.open(QIODevice::WriteOnly))
        return not_written(path, file.errorString());
    file.write(QByteArray::fromStdString(report_as_text(report)));
    if (!file.commit())
        return not_written(path, file.errorString());
    return all_well();
}

void print_report(const ReportLayout& layout, QPrinter& printer)
{
    printer.setFullPage(true);
    QCPPainter painter;
    ReportPainter pages;
    const int last = printer.toPage() > 0 ? std::min(printer.toPage(), static_cast<int>(layout.pages.size())) : static_cast<int>(layout.pages.size());
    for (int number = std::max(1, printer.fromPage()); number <= last; ++number) {
        const ReportPage& page = layout.pages[static_cast<std::size_t>(number - 1)];
        printer.setPageOrientation(page.landscape ? QPageLayout::Landscape : QPageLayout::Portrait);
        if (!painter.isActive()) {
            painter.begin(&printer);
            painter.setMode(QCPPainter::pmVectorized);
            painter.setMode(QCPPainter::pmNoCaching);
        } else {
            printer.newPage();
        }
        painter.resetTransform();
        painter.scale(printer.logicalDpiX() / 72.0, printer.logicalDpiY() / 72.0);
        pages.draw(page, painter);
    }
}

} // namespace evenstroke
