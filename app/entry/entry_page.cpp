// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/entry/entry_page.h"

#include "app/desk/number_text.h"
#include "app/desk/workplace.h"
#include "app/entry/ear.h"
#include "app/entry/log_sheet_view.h"
#include "app/entry/note_lines.h"
#include "app/entry/row_number.h"
#include "app/entry/typed_time.h"
#include "core/reading/typed_number.h"
#include "ui_entry_page.h"

#include <QApplication>
#include <QMenu>

#include <algorithm>

namespace evenstroke {

EntryPage::EntryPage(Workplace& workplace, QWidget* parent)
    : Page(workplace, parent), ui_(std::make_unique<Ui::EntryPage>()), session_(workplace),
      model_(session_.sheet(), session_.undo())
{
    ui_->setupUi(this);
    ui_->grid->set_sheet_model(&model_);
    judge_soon_.setSingleShot(true);
    judge_soon_.setInterval(0);
    connect(&judge_soon_, &QTimer::timeout, this, &EntryPage::judge_now);
    connect_sheet();
    connect_actions();
    connect_keys();
    connect(&workplace, &Workplace::judgement_ready, this, [this](const QString& engine_id) {
        if (engine_id == session_.engine_id())
            judge_soon_.start();
    });
}

/// The window may go while a box is being typed in: what stands there is kept.
EntryPage::~EntryPage()
{
    disconnect(&session_, nullptr, this, nullptr);
    ui_->grid->finish_editing();
    session_.flush();
    // A field that loses the focus while the window goes says what was typed to a page that is half gone.
    for (QWidget* child : findChildren<QWidget*>())
        child->blockSignals(true);
}

LogSheetView& EntryPage::view()
{
    return *ui_->grid;
}

Ear& EntryPage::ear()
{
    return *ui_->ear;
}

const NoteLines& EntryPage::notes() const
{
    return *ui_->notes;
}

void EntryPage::connect_sheet()
{
    connect(&session_, &EntrySession::reloaded, this, [this] {
        paste_plan_.reset();
        time_problem_.reset();
        close_problem_.reset();
        asked_at_closing_.clear();
        closing_wanted_ = false;
        typed_lately_.clear();
        notice_.clear();
        opinions_.forget();
        judge_soon_.start();
        show_state();
        ui_->grid->go_to(next_section(model_, {}, true));
    });
    connect(&session_, &EntrySession::changed, this, [this] {
        show_state();
        emit foot_changed();
    });
    connect(&session_.sheet(), &EntrySheet::value_put, this, [this](const LogBox& box) {
        close_problem_.reset();
        asked_at_closing_.clear();
        notice_.clear();
        typed_lately_.erase(std::remove(typed_lately_.begin(), typed_lately_.end(), box), typed_lately_.end());
        typed_lately_.push_back(box);
        judge_soon_.start();
    });
    connect(&session_.sheet(), &EntrySheet::row_unit_changed, this, [this] {
        show_previous();
        show_box();
        judge_soon_.start();
    });
    connect(&model_, &LogSheetModel::folding_changed, this, &EntryPage::show_words);
    connect(&model_, &LogSheetModel::refused, this, [this] { show_box(); });
    connect(ui_->grid, &LogSheetView::current_box_changed, this, [this] {
        show_box();
        show_newest();
    });
    connect(ui_->grid, &LogSheetView::left_sheet, this, &EntryPage::leave_sheet);
    connect(ui_->grid, &LogSheetView::typing, this, [this](const QString& text) {
        if (const auto box = ui_->grid->current_box())
            ui_->ear->show_box(model_, *box, opinions_, text);
    });
    connect(ui_->grid, &LogSheetView::paste_refused, this, [this](const PastePlan& plan) {
        paste_plan_ = plan;
        show_notes();
    });
    connect(ui_->grid, &LogSheetView::pasted, this, [this] {
        paste_plan_.reset();
        show_notes();
    });
    connect(ui_->grid, &LogSheetView::unit_wanted, this, &EntryPage::choose_unit);
    connect(ui_->grid, &LogSheetView::suggestion_wanted, this, &EntryPage::take_suggestion);
    connect(ui_->grid, &LogSheetView::second_wanted, this, &EntryPage::take_second);
    connect(ui_->grid, &LogSheetView::confirm_wanted, this, &EntryPage::confirm_boxes);
}

void EntryPage::connect_actions()
{
    connect(ui_->ear, &Ear::take_suggestion, this, &EntryPage::take_suggestion);
    connect(ui_->ear, &Ear::take_second, this, &EntryPage::take_second);
    connect(ui_->ear, &Ear::confirm, this, &EntryPage::confirm_boxes);
    connect(ui_->ear, &Ear::newest_wanted, this, &EntryPage::go_to_doubt);
    for (QLineEdit* field : {ui_->date_field, ui_->clock_field, ui_->offset_field})
        connect(field, &QLineEdit::editingFinished, this, &EntryPage::read_time_fields);
    for (QLineEdit* field : {ui_->date_field, ui_->clock_field, ui_->offset_field})
        connect(field, &QLineEdit::returnPressed, this, [this] {
            if (!time_problem_)
                ui_->grid->setFocus(); // from the date to the first box without the mouse
        });
    for (QLineEdit* field : {ui_->who_field, ui_->why_field})
        connect(field, &QLineEdit::editingFinished, this, &EntryPage::read_signature);
    connect(ui_->close_button, &QPushButton::clicked, this, [this] { close_reading(); });
    connect(ui_->copy_button, &QPushButton::clicked, this, [this] { copy_all(); });
    connect(ui_->fold_button, &QPushButton::clicked, this, [this] { model_.show_all(!model_.shows_all()); });
    connect(ui_->walk_button, &QPushButton::clicked, this, [this] {
        set_walk_order(ui_->grid->walk_order() == WalkOrder::along_cylinders ? WalkOrder::along_quantities
                                                                             : WalkOrder::along_cylinders);
    });
    const auto menu_button = [this](QPushButton* button, auto fill) {
        connect(button, &QPushButton::clicked, this, [this, button, fill] {
            QMenu menu(this);
            (this->*fill)(menu);
            menu.exec(button->mapToGlobal(QPoint(0, button->height())));
        });
    };
    menu_button(ui_->readings_button, &EntryPage::fill_readings_menu);
    menu_button(ui_->layout_button, &EntryPage::fill_layout_menu);
    menu_button(ui_->blank_button, &EntryPage::ask_blank_sheet);
    connect(ui_->closed_page, &ClosedView::board_wanted, this,
            [this] { workplace().open_page(QStringLiteral("board")); });
    connect(ui_->closed_page, &ClosedView::another_wanted, this, [this] { session_.begin_new(); });
    connect(ui_->closed_page, &ClosedView::correction_wanted, this, &EntryPage::correct);
    connect(ui_->closed_page, &ClosedView::engine_wanted, this, [this](const QString& engine_id) {
        Selection selection = workplace().selection();
        selection.engine = engine_id;
        workplace().select(selection);
        refresh();
    });
}

// --------------------------------------------------------------------------------------- what is shown

QString EntryPage::sentence() const
{
    return session_.state() == EntrySession::State::correcting
               ? tr("Correcting a reading of {engine} of {vessel}")
               : tr("Entering a reading of {engine} of {vessel}");
}

void EntryPage::refresh()
{
    const QString path = workplace().is_open() ? workplace().path() : QString();
    if (path != shown_history_)
        session_.forget();
    shown_history_ = path;
    if (workplace().history() && !workplace().selection().engine.isEmpty()) {
        if (workplace().selection().engine != session_.engine_id())
            ui_->grid->finish_editing(); // what is being typed belongs to the engine that was looked at
        recall_walk_order();
        session_.show_engine(workplace().selection().vessel, workplace().selection().engine);
    }
    judge_soon_.start();
    show_state();
}

void EntryPage::show_state()
{
    const EntrySession::State state = session_.state();
    if (state == EntrySession::State::nothing) {
        ui_->stack->setCurrentWidget(ui_->empty_page);
        const bool open = workplace().is_open();
        ui_->empty_title->setText(session_.problem() ? to_qstring(session_.problem()->what_happened)
                                  : open             ? tr("There is no engine yet to take a reading of.")
                                                     : tr("No history is open."));
        ui_->empty_words->setText(
            session_.problem() ? to_qstring(session_.problem()->what_to_do)
            : open ? tr("Describe the engine on the Engine page, or take in a folder that holds one; "
                        "then its log sheet stands here.")
                   : tr("Open or begin a history first; then the log sheet of its engine stands here."));
        return;
    }
    if (state == EntrySession::State::closed) {
        ui_->stack->setCurrentWidget(ui_->closed_page);
        show_closed();
        return;
    }
    ui_->stack->setCurrentWidget(ui_->sheet_page);
    show_head();
    show_words();
    show_box();
    show_notes();
}

void EntryPage::show_closed()
{
    ui_->closed_page->show_reading(
        session_, workplace(), kept_doubtful_,
        workplace().judging(session_.engine_id()) ? nullptr : workplace().judgement(session_.engine_id()));
}

void EntryPage::show_head()
{
    const bool writing = session_.state() == EntrySession::State::writing;
    const bool correcting = session_.state() == EntrySession::State::correcting;
    const TimeText time = time_text(session_.taken_at());
    if (!time_problem_) {
        ui_->date_field->setText(time.date);
        ui_->clock_field->setText(time.clock);
        ui_->offset_field->setText(time.offset);
    }
    for (QLineEdit* field : {ui_->date_field, ui_->clock_field, ui_->offset_field})
        field->setReadOnly(!writing && !correcting);
    ui_->state_label->setText(writing ? session_.sheet().reading().id.empty() ? tr("not begun") : tr("draft")
                              : correcting ? tr("closed")
                                           : tr("for reading only"));
    ui_->close_button->setVisible(writing);
    ui_->correction->setVisible(correcting);
    ui_->grid->setEnabled(writing || correcting);
}

void EntryPage::show_words()
{
    const bool along = ui_->grid->walk_order() == WalkOrder::along_cylinders;
    ui_->walk_button->setText(along ? tr("Enter goes from cylinder to cylinder, Tab to the next quantity")
                                    : tr("Enter goes from quantity to quantity, Tab to the next cylinder"));
    ui_->fold_button->setVisible(model_.folded_rows() > 0 || model_.shows_all());
    ui_->fold_button->setText(model_.shows_all() ? tr("Fold away rows never filled")
                                                 : tr("Show %1 more rows").arg(model_.folded_rows()));
    const EngineLayout layout = session_.sheet().layout();
    const auto count = [](int number, const QString& one, const QString& many) {
        return number > 1 ? many.arg(number) : one;
    };
    ui_->layout_button->setText(
        tr("%1, %2").arg(count(layout.turbochargers, tr("1 turbocharger"), tr("%1 turbochargers")),
                         count(layout.coolers, tr("1 cooler"), tr("%1 coolers"))));
}

void EntryPage::show_box()
{
    const auto box = ui_->grid->current_box();
    if (box)
        ui_->ear->show_box(model_, *box, opinions_);
    else
        ui_->ear->show_nothing();
}

const EntryOpinions& EntryPage::judge_now()
{
    judge_soon_.stop();
    const EntrySession::State state = session_.state();
    if (state == EntrySession::State::closed) {
        show_closed();
    } else if (state != EntrySession::State::nothing && workplace().history()) {
        opinions_.ask(session_.sheet(), workplace().judgement(session_.engine_id()),
                      workplace().history()->now());
        model_.set_marks(opinions_.marks());
        show_previous();
        if (!ui_->grid->is_editing())
            show_box();
        show_newest();
        ui_->ear->show_whole(session_.sheet(), opinions_);
        show_notes();
    }
    return opinions_;
}

/// Last time's numbers beside the lone boxes.
void EntryPage::show_previous()
{
    std::map<QuantityId, QString> previous;
    const auto barometer = barometer_of(session_.sheet().whole());
    for (const LogSection& section : session_.sheet().sections())
        for (const LogRow& row : section.rows)
            if (const ValueOpinion* opinion =
                    row.boxes.size() == 1 ? opinions_.of(row.boxes.front()) : nullptr) {
                const QString number = row_number(row.quantity, opinion->previous,
                                                  session_.sheet().row_unit(row.quantity), barometer);
                if (!number.isEmpty())
                    previous[row.quantity] = number;
            }
    model_.set_previous(std::move(previous));
}

// -------------------------------------------------------------------------------------- the frame asks

QString EntryPage::foot_text() const
{
    if (takes_letters())
        return tr("Alt and a page's letter leaves this page · shaded: usual for this engine at this load · line: "
                  "expected · ring: last time");
    return tr("shaded: usual for this engine at this load · line: expected · ring: last time");
}

QString EntryPage::draft_text() const
{
    if (session_.state() == EntrySession::State::correcting && session_.waits())
        return tr("correction waits");
    if (session_.problem() && session_.waits())
        return tr("not saved");
    if (!session_.saved_at().isValid())
        return {};
    return session_.state() == EntrySession::State::writing
               ? tr("draft saved %1").arg(session_.saved_at().toString(QStringLiteral("HH:mm")))
               : tr("saved %1").arg(session_.saved_at().toString(QStringLiteral("HH:mm")));
}

bool EntryPage::takes_letters() const
{
    return ui_->stack->currentWidget() == ui_->sheet_page &&
           (ui_->grid->hasFocus() || ui_->grid->is_editing());
}

QWidget* EntryPage::first_focus()
{
    if (ui_->stack->currentWidget() == ui_->closed_page)
        return ui_->closed_page->first_focus();
    if (ui_->stack->currentWidget() != ui_->sheet_page)
        return this;
    return ui_->grid->isEnabled() ? static_cast<QWidget*>(ui_->grid) : ui_->readings_button;
}

bool EntryPage::may_leave()
{
    ui_->grid->finish_editing(); // a text that cannot be read waits in its box
    if (session_.state() == EntrySession::State::nothing ||
        session_.state() == EntrySession::State::read_only)
        return true;
    if (session_.flush())
        return true;
    show_notes();
    return false;
}

void EntryPage::go_to_unreadable()
{
    if (model_.unreadable().empty())
        return;
    const auto& [box, text] = *model_.unreadable().begin();
    ui_->grid->go_to(box);
    close_problem_ = invalid_input(
        to_std(tr("%1 holds “%2”, which cannot be read.").arg(model_.box_name(box), text)),
        to_std(tr("Put it right, or empty the box with Delete.")));
    show_notes();
}

void EntryPage::hideEvent(QHideEvent* event)
{
    ui_->grid->finish_editing();
    session_.flush();
    Page::hideEvent(event);
}

} // namespace evenstroke
