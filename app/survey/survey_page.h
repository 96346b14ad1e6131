// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "app/desk/page.h"
#include "app/survey/report_maker.h"
#include "app/survey/report_writer.h"

#include <QTimer>

#include <memory>

class QPushButton;

namespace Ui {
class SurveyPage;
}

namespace evenstroke {

/// The report for a class survey: period, depth, preview, print and save.
class SurveyPage : public Page
{
    Q_OBJECT

public:
    explicit SurveyPage(Workplace& workplace, QWidget* parent = nullptr);
    ~SurveyPage() override;
    QString name() const override { return QStringLiteral("survey"); }
    QString title() const override { return tr("Survey"); }
    QString sentence() const override;
    void refresh() override;
    QString foot_text() const override;
    QWidget* first_focus() override;
    bool can_print() const override { return maker_.layout() != nullptr; }
    void print(QPrinter& printer) override;

    const ReportMaker& maker() const { return maker_; }
    /// The day that periods end on; tests set it.
    void set_today(TimePoint today);
    /// Saves without asking for a name; false while there is nothing to save.
    bool save_pdf(const QString& path);
    bool saving() const { return writing_ != nullptr; }

signals:
    void saved(); ///< the file is there, or `problem` is shown

private:
    void connect_choices();
    void choose(const char* what, const QString& value);
    QString chosen(const char* what, const QString& otherwise) const;
    void show_choices();
    void remember_fields();
    std::optional<ReportPeriod> period() const;
    ReportDetails details() const;
    void make_anew();
    void show_page_number();
    void ask_save();
    void ask_save_text();
    void ask_print();
    void write_next_page();
    void stop_saving();
    void say(const QString& words);
    QString suggested_path(const QString& ending) const;

    std::unique_ptr<Ui::SurveyPage> ui_;
    ReportMaker maker_;
    std::unique_ptr<PdfWriting> writing_;
    QTimer page_timer_, typing_timer_;
    QString writing_path_, shown_engine_;
    TimePoint today_{};
};

} // namespace evenstroke
