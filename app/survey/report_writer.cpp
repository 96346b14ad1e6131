// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/survey/report_writer.h"

#include "app/survey/report_painter.h"

#include <QPageLayout>
#include <QPageSize>
#include <QPdfWriter>
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

/// One painter from the first page to the last: beginning again would start the file anew.
bool draw_pages(const ReportLayout& layout, QPdfWriter& writer, const ReportProgress& progress)
{
    writer.setPageLayout(page_layout(layout.pages.front()));
    QCPPainter painter;
    painter.begin(&writer);
    painter.setMode(QCPPainter::pmVectorized);
    painter.setMode(QCPPainter::pmNoCaching);
    ReportPainter pages;
    const int total = static_cast<int>(layout.pages.size());
    for (int i = 0; i < total; ++i) {
        const ReportPage& page = layout.pages[static_cast<std::size_t>(i)];
        if (i > 0) {
            writer.setPageLayout(page_layout(page));
            writer.newPage();
        }
        painter.resetTransform();
        painter.scale(dots_per_inch / 72.0, dots_per_inch / 72.0);
        pages.draw(page, painter);
        if (progress && !progress(i + 1, total)) {
            painter.end();
            return false;
        }
    }
    painter.end();
    return true;
}

} // namespace

Result<void> write_survey_pdf(const SurveyReport& report, const QString& path, const ReportProgress& progress)
{
    return write_survey_pdf(lay_out(std::make_shared<const SurveyReport>(report)), path, progress);
}

Result<void> write_survey_pdf(const ReportLayout& layout, const QString& path, const ReportProgress& progress)
{
    QSaveFile file(path);
    if (!file.open(QIODevice::WriteOnly))
        return not_written(path, file.errorString());
    bool whole = false;
    {
        QPdfWriter writer(&file);
        describe(*layout.report, writer);
        whole = draw_pages(layout, writer, progress);
    }
    if (!whole) {
        file.cancelWriting();
        return invalid_input("Writing the report was stopped; nothing was saved.", "Save again when it is wanted.");
    }
    if (!file.commit())
        return not_written(path, file.errorString());
    return BOOST_OUTCOME_V2_NAMESPACE::success();
}

Result<void> write_survey_text(const SurveyReport& report, const QString& path)
{
    QSaveFile file(path);
    if (!file.open(QIODevice::WriteOnly))
        return not_written(path, file.errorString());
    file.write(QByteArray::fromStdString(report_as_text(report)));
    if (!file.commit())
        return not_written(path, file.errorString());
    return BOOST_OUTCOME_V2_NAMESPACE::success();
}

} // namespace evenstroke
