// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/events/events_page.h"

#include "app/desk/number_text.h"
#include "app/desk/theme.h"
#include "app/desk/workplace.h"
#include "app/settings/person.h"
#include "core/explanation/event_effect.h"
#include "ui_events_page.h"

#include <QClipboard>
#include <QGuiApplication>
#include <QPushButton>
#include <QShortcut>

namespace evenstroke {
namespace {

constexpr int kinds_across = 4;

/// As the field for the date holds it.
QString date_of(const Event& event) { return to_qstring(event.date_only ? date_text(event.date.utc) : utc_text(event.date.utc)); }

void fill_quantities(QComboBox& box)
{
    box.addItem(EventsPage::tr("not said"), QString());
    for (const Quantity& of : all_quantities())
        if (of.type == ValueType::number && !of.derived() && box.findData(to_qstring(of.name)) < 0)
            box.addItem(to_qstring(of.title), to_qstring(of.name));
}

bool reads_a_quantity(const Event& event)
{
    const EventKind* kind = find_event_kind(event.kind);
    return kind && kind->concerns == "instrument";
}

bool of_the_ship(const Event& event)
{
    const EventKind* kind = find_event_kind(event.kind);
    return kind && kind->concerns == "ship";
}

} // namespace

EventsPage::EventsPage(Workplace& place, QWidget* parent)
    : Page(place, parent), ui_(std::make_unique<Ui::EventsPage>()), diary_(this), model_(this), today_(time_now())
{
    ui_->setupUi(this);
    ui_->diary->setModel(&model_);
    ui_->diary->verticalHeader()->hide();
    ui_->diary->verticalHeader()->setDefaultSectionSize(24);
    ui_->diary->horizontalHeader()->setHighlightSections(false);
    ui_->diary->setTabKeyNavigation(false);
    fill_quantities(*ui_->quantity_field);
    make_kind_buttons();
    keep_room_for_bold(*this);
    for (QPushButton* button : kind_buttons_) // in smaller type than the others; bold while chosen
        button->setMinimumWidth(QFontMetrics(type(TypeSize::label, true)).horizontalAdvance(button->text()) + 2);
    connect_fields();
    connect_diary();
}

EventsPage::~EventsPage()
{
    // A field that loses the focus while the window goes says what was typed to a page that is half gone.
    for (QWidget* child : findChildren<QWidget*>())
        child->blockSignals(true);
}

void EventsPage::make_kind_buttons()
{
    auto* grid = new QGridLayout(ui_->kinds);
    grid->setContentsMargins(0, 0, 0, 0);
    grid->setHorizontalSpacing(16);
    grid->setVerticalSpacing(0);
    const auto kinds = all_event_kinds();
    const int down = (static_cast<int>(kinds.size()) + kinds_across - 1) / kinds_across;
    for (int i = 0; i < static_cast<int>(kinds.size()); ++i) {
        const QChar key = QLatin1Char(kinds[static_cast<std::size_t>(i)].key);
        auto* button = new QPushButton(QStringLiteral("%1  %2").arg(key).arg(to_qstring(kinds[static_cast<std::size_t>(i)].title)), ui_->kinds);
        button->setProperty("worded", true);
        button->setFocusPolicy(Qt::NoFocus);
        button->setCheckable(true);
        button->setFont(type(TypeSize::label));
        connect(button, &QPushButton::clicked, this, [this, key] {
            ui_->typing->setFocus();
            take_key(key);
        });
        grid->addWidget(button, i % down, i / down, Qt::AlignLeft);
        kind_buttons_.push_back(button);
    }
    grid->setColumnStretch(kinds_across, 1);
}

void EventsPage::connect_fields()
{
    connect(ui_->typing, &KeyBox::key_typed, this, &EventsPage::take_key);
    connect(ui_->typing, &KeyBox::accepted, this, &EventsPage::accept);
    connect(ui_->typing, &KeyBox::cancelled, this, &EventsPage::begin_new);
    connect(ui_->typing, &KeyBox::left_downwards, this, [this] { ui_->diary->setFocus(); });
    connect(ui_->typing, &KeyBox::day_moved, this, [this](int days) {
        typing_.move_day(days);
        show_line();
        ui_->date_field->setText(to_qstring(date_text(typing_.day())));
    });
    for (QLineEdit* field : {ui_->date_field, ui_->hours_field, ui_->note_field, ui_->done_by_field, ui_->why_field})
        connect(field, &QLineEdit::returnPressed, this, &EventsPage::save);
    connect(ui_->person_field, &QLineEdit::editingFinished, this, [this] { set_person_name(ui_->person_field->text()); });
    connect(ui_->save_button, &QPushButton::clicked, this, &EventsPage::save);
    connect(ui_->remove_button, &QPushButton::clicked, this, &EventsPage::remove);
    connect(ui_->undo_button, &QPushButton::clicked, &diary_.undo(), &QUndoStack::undo);
    connect(ui_->added_undo_button, &QPushButton::clicked, &diary_.undo(), &QUndoStack::undo);
    ui_->added_line->hide();
    connect(ui_->redo_button, &QPushButton::clicked, &diary_.undo(), &QUndoStack::redo);
    connect(new QShortcut(QKeySequence::Undo, this, nullptr, nullptr, Qt::WidgetWithChildrenShortcut), &QShortcut::activated, &diary_.undo(), &QUndoStack::undo);
    connect(new QShortcut(QKeySequence::Redo, this, nullptr, nullptr, Qt::WidgetWithChildrenShortcut), &QShortcut::activated, &diary_.undo(), &QUndoStack::redo);
    connect(new QShortcut(QKeySequence::Delete, ui_->diary, nullptr, nullptr, Qt::WidgetShortcut), &QShortcut::activated, this, &EventsPage::remove);
}

void EventsPage::connect_diary()
{
    connect(&diary_, &EventDiary::changed, this, [this] {
        say(diary_.problem() ? to_qstring(diary_.problem()->text()) : QString());
        show_diary();
    });
    connect(&diary_, &EventDiary::history_written, this, [this] { workplace().changed(); });
    connect(&diary_.undo(), &QUndoStack::indexChanged, this, [this] {
        ui_->undo_button->setEnabled(diary_.undo().canUndo());
        ui_->redo_button->setEnabled(diary_.undo().canRedo());
        ui_->added_line->hide();
    });
    connect(ui_->diary->selectionModel(), &QItemSelectionModel::currentRowChanged, this, [this] {
        if (ui_->diary->currentIndex().isValid())
            typing_.clear();
        show_in_hand();
    });
}

QString EventsPage::sentence() const { return tr("The diary of {engine} of {vessel}."); }

QString EventsPage::foot_text() const
{
    return tr("%n event(s) · nothing is erased: what is removed stays in the audit trail", nullptr, model_.rowCount());
}

bool EventsPage::takes_letters() const { return ui_->typing->hasFocus(); }
QWidget* EventsPage::first_focus() { return ui_->typing; }

void EventsPage::set_today(TimePoint today)
{
    today_ = today;
    typing_.set_day(today);
    show_line();
}

void EventsPage::refresh()
{
    const QString engine_id = workplace().selection().engine;
    diary_.open(workplace().history(), engine_id);
    const auto judgement = workplace().judgement();
    if (judgement && judgement->record)
        engine_ = judgement->record->engine;
    typing_.set_engine(engine_);
    if (engine_id != shown_engine_)
        ui_->added_line->hide();
    if (engine_id != shown_engine_ || typing_.empty()) {
        shown_engine_ = engine_id;
        typing_.set_day(today_);
    }
    ui_->person_field->setText(person_name());
    if (workplace().read_only())
        say(tr("This history is open for reading only. Open it for writing to change the diary."));
    for (QWidget* part : std::initializer_list<QWidget*>{ui_->typing, ui_->save_button, ui_->remove_button})
        part->setEnabled(!workplace().read_only());
    ui_->undo_button->setEnabled(diary_.undo().canUndo());
    ui_->redo_button->setEnabled(diary_.undo().canRedo());
    show_diary();
    show_questions();
}

void EventsPage::show_diary()
{
    const auto judgement = workplace().judgement();
    static const std::vector<Reading> none;
    model_.show(engine_, diary_.events(), judgement && judgement->record ? judgement->record->readings : none);
    ui_->empty->setVisible(model_.rowCount() == 0);
    ui_->diary->setVisible(model_.rowCount() > 0);
    static constexpr int widths[] = {100, 110, 120, 190, 120};
    for (int column = 0; column < EventModel::note; ++column)
        ui_->diary->setColumnWidth(column, widths[column]);
    ui_->diary->horizontalHeader()->setStretchLastSection(true);
    if (const int row = model_.row_of(diary_.last_added()); row >= 0)
        ui_->diary->scrollTo(model_.index(row, 0));
    show_line();
    show_in_hand();
    emit foot_changed();
}

void EventsPage::take_key(QChar key)
{
    ui_->diary->setCurrentIndex({});
    ui_->added_line->hide();
    typing_.take(key);
    say(typing_.complaint());
    show_line();
    show_in_hand();
}

void EventsPage::show_line()
{
    ui_->typing->show_line(typing_.line(today_), tr("F 4 Enter: fuel valves of cylinder 4, today"));
    for (std::size_t i = 0; i < kind_buttons_.size(); ++i)
        kind_buttons_[i]->setChecked(typing_.kind() == &all_event_kinds()[i]);
}

std::optional<Event> EventsPage::in_hand() const
{
    if (typing()) {
        auto event = typing_.event();
        return event.has_value() ? std::optional<Event>(event.value()) : std::nullopt;
    }
    const Event* selected = model_.event(ui_->diary->currentIndex().row());
    return selected ? std::optional<Event>(*selected) : std::nullopt;
}

/// What an event does to the comparison, and on which side of it a reading of the same day stands.
QString EventsPage::effect_words(const Event& event) const
{
    const QString effect = to_qstring(event_effect_sentence(event, engine_));
    const auto judgement = workplace().judgement();
    const QString same_day = judgement ? to_qstring(same_day_sentence(event, *judgement->record)) : QString();
    return same_day.isEmpty() ? effect : effect + u' ' + same_day;
}

void EventsPage::show_in_hand()
{
    const auto event = in_hand();
    const bool row = event && !typing();
    ui_->in_hand->setText(typing() ? tr("The event being typed") : row ? tr("The event in hand") : tr("No event in hand"));
    ui_->effect->setText(event ? effect_words(*event) : QString());
    ui_->effect->setVisible(event.has_value());
    const QString reminder = event ? to_qstring(record_book_reminder(*event)) : QString();
    ui_->reminder->setText(reminder);
    ui_->reminder->setVisible(!reminder.isEmpty());
    ui_->quantity_field->setEnabled(event && reads_a_quantity(*event));
    ui_->hours_field->setEnabled(!event || !of_the_ship(*event)); // a ship has no running hours
    ui_->why_field->setEnabled(row);
    ui_->remove_button->setEnabled(row && !workplace().read_only());
    ui_->save_button->setEnabled(event.has_value() && !workplace().read_only());
    ui_->date_field->setText(event ? date_of(*event) : QString());
    if (typing())
        return;
    ui_->hours_field->setText(row && event->running_hours ? number_text(*event->running_hours, 0) : QString());
    ui_->note_field->setText(row ? to_qstring(event->note) : QString());
    ui_->done_by_field->setText(row ? to_qstring(event->done_by) : QString());
    ui_->why_field->clear();
    ui_->quantity_field->setCurrentIndex(std::max(0, ui_->quantity_field->findData(row ? to_qstring(event->part) : QString())));
}

Result<Event> EventsPage::with_fields(Event event) const
{
    const QString written = ui_->date_field->text().trimmed();
    const auto day = parse_date(written.toStdString());
    if (!day.has_value())
        return day.error();
    if (written != date_of(event)) {
        event.date = day.value();
        event.date_only = !written.contains(u'T', Qt::CaseInsensitive);
    }
    event.running_hours.reset();
    if (const QString hours = ui_->hours_field->text().trimmed(); !hours.isEmpty() && ui_->hours_field->isEnabled()) {
        const auto number = parse_number(hours.toStdString());
        if (!number.has_value())
            return number.error();
        event.running_hours = number.value();
    }
    event.note = ui_->note_field->text().trimmed().toStdString();
    event.done_by = ui_->done_by_field->text().trimmed().toStdString();
    if (reads_a_quantity(event))
        event.part = ui_->quantity_field->currentData().toString().toStdString();
    return event;
}

/// Enter in the key line: today's event with what stands in the fields.
void EventsPage::accept()
{
    if (!typing_.complaint().isEmpty())
        return say(typing_.complaint());
    const auto typed = typing_.event();
    if (!typed.has_value())
        return say(to_qstring(typed.error().text()));
    save();
}

void EventsPage::save()
{
    const auto event = in_hand();
    if (!event)
        return say(tr("No event is in hand. Type the letter of a kind, or choose a line of the diary."));
    set_person_name(ui_->person_field->text());
    const auto whole = with_fields(*event);
    if (!whole.has_value())
        return say(to_qstring(whole.error().text()));
    const QString why = ui_->why_field->text();
    if (!typing_.complaint().isEmpty())
        return say(typing_.complaint());
    const bool fresh = typing();
    if (fresh) {
        typing_.clear();
        diary_.add(whole.value());
    } else {
        diary_.change(whole.value(), why);
    }
    if (diary_.problem())
        return;
    begin_new();
    if (fresh)
        say_added(whole.value());
}

/// "Added: Fuel valves changed, cylinder 4, 14 Mar 2031. From here on ..." and its undo.
void EventsPage::say_added(const Event& event)
{
    QStringList parts;
    for (const int column : {EventModel::what, EventModel::part, EventModel::date})
        parts.append(model_.text_of(event, column));
    ui_->added->setText(tr("Added: %1. %2").arg(parts.join(QStringLiteral(", ")), effect_words(event)));
    ui_->added_line->show();
}

void EventsPage::begin_new()
{
    typing_.clear();
    typing_.set_day(today_);
    ui_->diary->setCurrentIndex({});
    show_line();
    show_in_hand();
    ui_->typing->setFocus();
}

void EventsPage::remove()
{
    const Event* event = model_.event(ui_->diary->currentIndex().row());
    if (!event)
        return;
    if (ui_->why_field->text().trimmed().isEmpty()) {
        ui_->why_field->setFocus();
        return say(tr("A reason is kept with every removal. Write it under \u201cWhy changed\u201d, then remove again."));
    }
    diary_.remove(to_qstring(event->id), ui_->why_field->text());
}

void EventsPage::say(const QString& words)
{
    ui_->problem->setText(words);
    ui_->problem->setVisible(!words.isEmpty());
}

void EventsPage::copy()
{
    QStringList lines;
    for (int row = 0; row < model_.rowCount(); ++row) {
        QStringList cells;
        for (int column = 0; column < EventModel::columns; ++column)
            cells.append(model_.index(row, column).data().toString());
        lines.append(cells.join(QLatin1Char('\t')));
    }
    QGuiApplication::clipboard()->setText(lines.join(QLatin1Char('\n')));
}

} // namespace evenstroke
