// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/desk/number_text.h"
#include "app/desk/suggested_file.h"
#include "app/desk/workplace.h"
#include "app/survey/survey_page.h"
#include "ui_survey_page.h"

#include <QDir>
#include <QFileDialog>
#include <QFileInfo>
#include <QPrintDialog>
#include <QPrinter>

/// Saving and printing: page by page, so that the window stays alive and can stop it.
namespace evenstroke {

QString SurveyPage::suggested_path(const QString& ending) const
{
    const auto layout = maker_.layout();
    return suggested_file(layout ? QStringList{to_qstring(layout->report->ship), to_qstring(layout->report->engine),
                                               to_qstring(date_text(layout->report->period.to))}
                                 : QStringList{tr("report")},
                          ending);
}

void SurveyPage::ask_save()
{
    const QString path = QFileDialog::getSaveFileName(this, tr("Save the report"), suggested_path(QStringLiteral(".pdf")), tr("Reports (*.pdf)"));
    if (!path.isEmpty())
        save_pdf(path);
}

void SurveyPage::ask_save_text()
{
    const QString path = QFileDialog::getSaveFileName(this, tr("Save the report as text"), suggested_path(QStringLiteral(".txt")), tr("Text with tabs (*.txt)"));
    if (path.isEmpty() || !maker_.layout())
        return;
    const auto written = write_survey_text(*maker_.layout()->report, path);
    say(written.has_value() ? QString() : to_qstring(written.error().text()));
    ui_->saved->setText(written.has_value() ? tr("Saved as %1.").arg(QDir::toNativeSeparators(path)) : QString());
}

void SurveyPage::ask_print()
{
    QPrinter printer(QPrinter::HighResolution);
    QPrintDialog dialog(&printer, this);
    if (dialog.exec() == QDialog::Accepted)
        print(printer);
}

void SurveyPage::print(QPrinter& printer)
{
    if (const auto layout = maker_.layout())
        print_report(*layout, printer);
}

bool SurveyPage::save_pdf(const QString& path)
{
    if (!maker_.layout() || saving())
        return false;
    say({});
    ui_->saved->clear();
    writing_path_ = path;
    writing_ = std::make_unique<PdfWriting>(maker_.layout(), path);
    if (const auto begun = writing_->begin(); !begun.has_value()) {
        writing_.reset();
        say(to_qstring(begun.error().text()));
        emit saved();
        return false;
    }
    ui_->work_bar->setRange(0, writing_->pages());
    ui_->work->show();
    show_page_number();
    page_timer_.start(0);
    return true;
}

void SurveyPage::write_next_page()
{
    if (writing_->step()) {
        ui_->work_bar->setValue(writing_->pages_done());
        return;
    }
    page_timer_.stop();
    const auto finished = writing_->finish();
    writing_.reset();
    ui_->work->hide();
    say(finished.has_value() ? QString() : to_qstring(finished.error().text()));
    if (finished.has_value())
        ui_->saved->setText(tr("Saved as %1, %2 kB.").arg(QDir::toNativeSeparators(writing_path_),
                                                          whole_text(static_cast<double>(QFileInfo(writing_path_).size()) / 1000.0)));
    show_page_number();
    emit saved();
}

void SurveyPage::stop_saving()
{
    page_timer_.stop();
    writing_.reset();
    ui_->work->hide();
    ui_->saved->setText(tr("Stopped; nothing was saved."));
    show_page_number();
    emit saved();
}

void SurveyPage::say(const QString& words)
{
    ui_->problem->setText(words);
    ui_->problem->setVisible(!words.isEmpty());
}

} // namespace evenstroke
