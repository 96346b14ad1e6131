// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/survey/survey_page.h"

#include "app/desk/number_text.h"
#include "app/desk/workplace.h"
#include "storage/preference_store.h"
#include "ui_survey_page.h"

#include <QDir>
#include <QFileDialog>
#include <QFileInfo>
#include <QPrintDialog>
#include <QPrinter>
#include <QStandardPaths>

#include <array>

namespace evenstroke {
namespace {

/// Choices kept with the engine in the history: they belong to the ship, not to one computer.
constexpr char period_choice[] = "survey/period", depth_choice[] = "survey/depth";
constexpr int milliseconds_after_typing = 400;

struct RememberedField
{
    QLineEdit* field;
    const char* name;
};

std::array<RememberedField, 8> remembered(const Ui::SurveyPage& ui)
{
    return {{{ui.from_field, "survey/from"}, {ui.to_field, "survey/to"}, {ui.kind_field, "survey/kind"},
             {ui.number_field, "survey/number"}, {ui.owner_field, "survey/owner"}, {ui.chief_field, "survey/chief"},
             {ui.licence_field, "survey/licence"}, {ui.superintendent_field, "survey/superintendent"}}};
}

std::string text_of(const QLineEdit* field) { return field->text().trimmed().toStdString(); }

} // namespace

SurveyPage::SurveyPage(Workplace& place, QWidget* parent)
    : Page(place, parent), ui_(std::make_unique<Ui::SurveyPage>()), maker_(this), today_(time_now())
{
    ui_->setupUi(this);
    ui_->work->hide();
    say({});
    connect_choices();
    typing_timer_.setSingleShot(true);
    typing_timer_.setInterval(milliseconds_after_typing);
    connect(&typing_timer_, &QTimer::timeout, this, &SurveyPage::make_anew);
    connect(&maker_, &ReportMaker::ready, this, [this] {
        say(maker_.problem() ? to_qstring(maker_.problem()->text()) : QString());
        ui_->preview->show_layout(maker_.layout());
        show_page_number();
    });
    connect(ui_->preview, &PagePreview::page_turned, this, &SurveyPage::show_page_number);
    connect(ui_->before_button, &QPushButton::clicked, this, [this] { ui_->preview->turn_to(ui_->preview->page() - 1); });
    connect(ui_->after_button, &QPushButton::clicked, this, [this] { ui_->preview->turn_to(ui_->preview->page() + 1); });
    connect(ui_->save_button, &QPushButton::clicked, this, &SurveyPage::ask_save);
    connect(ui_->text_button, &QPushButton::clicked, this, &SurveyPage::ask_save_text);
    connect(ui_->print_button, &QPushButton::clicked, this, &SurveyPage::ask_print);
    connect(ui_->stop_button, &QPushButton::clicked, this, &SurveyPage::stop_saving);
    connect(&page_timer_, &QTimer::timeout, this, &SurveyPage::write_next_page);
}

SurveyPage::~SurveyPage()
{
    // A field that loses the focus while the window goes says what was typed to a page that is half gone.
    for (QWidget* child : findChildren<QWidget*>())
        child->blockSignals(true);
}

void SurveyPage::connect_choices()
{
    const auto choice = [this](QPushButton* button, const char* what, const char* value) {
        connect(button, &QPushButton::clicked, this, [this, what, value] { choose(what, QString::fromLatin1(value)); });
    };
    choice(ui_->year_button, period_choice, "year");
    choice(ui_->five_years_button, period_choice, "five_years");
    choice(ui_->free_button, period_choice, "free");
    choice(ui_->brief_button, depth_choice, "brief");
    choice(ui_->usual_button, depth_choice, "usual");
    choice(ui_->full_button, depth_choice, "full");
    for (const RememberedField& one : remembered(*ui_))
        connect(one.field, &QLineEdit::textEdited, this, [this] { typing_timer_.start(); });
}

QString SurveyPage::sentence() const { return tr("Report for the survey of {engine} of {vessel}."); }
QWidget* SurveyPage::first_focus() { return ui_->preview; }

QString SurveyPage::foot_text() const
{
    return tr("PgUp and PgDn turn the pages, plus and minus enlarge");
}

void SurveyPage::set_today(TimePoint today)
{
    today_ = today;
    shown_engine_.clear();
}

QString SurveyPage::chosen(const char* what, const QString& otherwise) const
{
    if (!workplace().history())
        return otherwise;
    const auto kept = storage::PreferenceStore(*workplace().history()).choice(workplace().selection().engine.toStdString(), what);
    return kept.has_value() && kept.value() ? to_qstring(*kept.value()) : otherwise;
}

void SurveyPage::choose(const char* what, const QString& value)
{
    if (workplace().history() && !workplace().read_only()) {
        const auto kept = storage::PreferenceStore(*workplace().history())
                              .set_choice(workplace().selection().engine.toStdString(), what, value.toStdString());
        if (!kept.has_value())
            say(to_qstring(kept.error().text()));
    }
    show_choices();
    make_anew();
}

void SurveyPage::show_choices()
{
    const QString period_kind = chosen(period_choice, QStringLiteral("year"));
    ui_->year_button->setChecked(period_kind == QLatin1String("year"));
    ui_->five_years_button->setChecked(period_kind == QLatin1String("five_years"));
    ui_->free_button->setChecked(period_kind == QLatin1String("free"));
    const QString depth = chosen(depth_choice, QStringLiteral("usual"));
    ui_->brief_button->setChecked(depth == QLatin1String("brief"));
    ui_->usual_button->setChecked(depth == QLatin1String("usual"));
    ui_->full_button->setChecked(depth == QLatin1String("full"));
    const bool free = ui_->free_button->isChecked();
    ui_->from_field->setEnabled(free);
    ui_->to_field->setEnabled(free);
    if (!free) {
        const ReportPeriod shown = last_months(today_, ui_->five_years_button->isChecked() ? 60 : 12);
        ui_->from_field->setText(to_qstring(date_text(shown.from)));
        ui_->to_field->setText(to_qstring(date_text(shown.to)));
    }
}

void SurveyPage::refresh()
{
    const QString engine = workplace().selection().engine;
    if (engine != shown_engine_) {
        shown_engine_ = engine;
        for (const RememberedField& one : remembered(*ui_))
            one.field->setText(chosen(one.name, {}));
        ui_->preview->show_layout(nullptr);
    }
    show_choices();
    make_anew();
}

void SurveyPage::remember_fields()
{
    if (!workplace().history() || workplace().read_only())
        return;
    storage::PreferenceStore store(*workplace().history());
    for (const RememberedField& one : remembered(*ui_))
        if (one.field->isEnabled() && text_of(one.field) != chosen(one.name, {}).toStdString())
            (void)store.set_choice(shown_engine_.toStdString(), one.name, text_of(one.field));
}

std::optional<ReportPeriod> SurveyPage::period() const
{
    const auto from = parse_date(text_of(ui_->from_field)), to = parse_date(text_of(ui_->to_field));
    if (!from.has_value() || !to.has_value() || to.value().utc < from.value().utc)
        return std::nullopt;
    return ReportPeriod{from.value().utc, to.value().utc};
}

ReportDetails SurveyPage::details() const
{
    ReportDetails details;
    details.depth = ui_->brief_button->isChecked() ? ReportDepth::brief : ui_->usual_button->isChecked() ? ReportDepth::usual : ReportDepth::full;
    details.date = today_;
    details.program_version = EVENSTROKE_VERSION;
    details.survey_kind = text_of(ui_->kind_field);
    details.number = text_of(ui_->number_field);
    details.owner = text_of(ui_->owner_field);
    details.chief_engineer = text_of(ui_->chief_field);
    details.chief_licence = text_of(ui_->licence_field);
    details.superintendent = text_of(ui_->superintendent_field);
    return details;
}

void SurveyPage::make_anew()
{
    typing_timer_.stop();
    if (!workplace().is_open() || shown_engine_.isEmpty())
        return;
    remember_fields();
    const auto wanted = period();
    if (!wanted) {
        maker_.forget();
        return say(tr("The period needs two days, the earlier one first. Write them as 2031-03-14."));
    }
    ui_->about->setText(tr("being made"));
    maker_.make({workplace().path(), shown_engine_, *wanted, details()});
}

void SurveyPage::show_page_number()
{
    const int pages = ui_->preview->pages(), page = ui_->preview->page();
    ui_->page_label->setText(pages > 0 ? tr("page %1 of %2").arg(page + 1).arg(pages) : QString());
    ui_->before_button->setEnabled(page > 0);
    ui_->after_button->setEnabled(page + 1 < pages);
    for (QPushButton* button : {ui_->save_button, ui_->print_button, ui_->text_button})
        button->setEnabled(pages > 0 && !saving());
    if (const auto layout = maker_.layout()) {
        const ReportSummary& summary = layout->report->summary;
        ui_->about->setText(tr("%1 readings asked for, %2 taken, %3 usable").arg(summary.asked).arg(summary.taken).arg(summary.usable));
    }
}

} // namespace evenstroke
