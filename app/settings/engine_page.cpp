// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/settings/engine_page.h"

#include "app/desk/number_text.h"
#include "app/desk/theme.h"
#include "app/desk/workplace.h"
#include "app/settings/engine_fields.h"
#include "app/settings/person.h"
#include "app/settings/quantity_delegate.h"
#include "storage/vessel_store.h"
#include "ui_engine_page.h"

#include <QPushButton>
#include <QShortcut>

namespace evenstroke {
namespace {

enum Section { particulars, baseline_section, coefficients, limits, instruments, load_and_walls };

QLabel* small_label(const QString& words, QWidget* parent)
{
    auto* label = new QLabel(words, parent);
    label->setProperty("muted", true);
    label->setProperty("small", true);
    return label;
}

} // namespace

EnginePage::EnginePage(Workplace& place, QWidget* parent)
    : Page(place, parent), ui_(std::make_unique<Ui::EnginePage>()), draft_(this), baseline_(draft_, this),
      coefficients_(draft_, coefficients_table(), this), limits_(draft_, limits_table(), this), instruments_(draft_, instruments_table(), this),
      load_limits_(draft_, load_limits_table(), this), walls_(draft_, walls_table(), this)
{
    ui_->setupUi(this);
    make_fields();
    connect_sections();
    connect_baseline();
    keep_room_for_bold(*this);
    set_up_table(*ui_->coefficients_table, coefficients_, *ui_->coefficients_remove_button);
    set_up_table(*ui_->limits_table, limits_, *ui_->limits_remove_button);
    set_up_table(*ui_->instruments_table, instruments_, *ui_->instruments_remove_button);
    set_up_table(*ui_->load_limits_table, load_limits_, *ui_->load_limit_clear_button);
    set_up_table(*ui_->walls_table, walls_, *ui_->wall_remove_button);
    connect_saving();
    open_section(particulars);
    say({});
}

EnginePage::~EnginePage()
{
    // The draft takes back its steps as it goes, when the boxes that would show them are gone already.
    disconnect(&draft_, nullptr, this, nullptr);
    // A field that loses the focus while the window goes says what was typed to a page that is half gone.
    for (QWidget* child : findChildren<QWidget*>())
        child->blockSignals(true);
}

/// Boxes in two columns, ship and reference conditions beside the engine.
void EnginePage::make_fields()
{
    auto* across = new QHBoxLayout(ui_->particulars);
    across->setContentsMargins(0, 0, 0, 0);
    across->setSpacing(40);
    std::map<QString, QGridLayout*> groups;
    QVBoxLayout* columns[2] = {new QVBoxLayout, new QVBoxLayout};
    for (QVBoxLayout* column : columns) {
        column->setSpacing(6);
        across->addLayout(column);
    }
    across->addStretch(1);
    const auto& fields = engine_fields();
    for (std::size_t i = 0; i < fields.size(); ++i) {
        QGridLayout*& grid = groups[fields[i].group];
        if (!grid) {
            QVBoxLayout* column = columns[fields[i].group == tr("Engine") ? 1 : 0];
            auto* heading = new QLabel(fields[i].group, ui_->particulars);
            heading->setFont(type(TypeSize::body, true));
            column->addWidget(heading);
            grid = new QGridLayout;
            grid->setHorizontalSpacing(10);
            grid->setVerticalSpacing(4);
            column->addLayout(grid);
            column->addSpacing(10);
        }
        const int row = grid->rowCount();
        const bool must = !fields[i].needed_as.isEmpty();
        grid->addWidget(small_label(must ? tr("%1 *").arg(fields[i].title) : fields[i].title, ui_->particulars), row, 0);
        Box box;
        if (fields[i].choices.isEmpty()) {
            box.line = new QLineEdit(ui_->particulars);
            box.line->setAccessibleName(fields[i].title);
            if (must)
                box.line->setAccessibleDescription(tr("needed"));
            connect(box.line, &QLineEdit::editingFinished, this, [this, i] { take_field(i, boxes_[i].line->text()); });
            grid->addWidget(box.line, row, 1);
        } else {
            box.choice = new QComboBox(ui_->particulars);
            box.choice->addItems(fields[i].choices);
            box.choice->setAccessibleName(fields[i].title);
            connect(box.choice, &QComboBox::activated, this, [this, i] { take_field(i, boxes_[i].choice->currentText()); });
            grid->addWidget(box.choice, row, 1);
        }
        grid->addWidget(small_label(fields[i].unit, ui_->particulars), row, 2);
        grid->setColumnMinimumWidth(0, 150);
        grid->setColumnMinimumWidth(1, 220);
        grid->setColumnMinimumWidth(2, 36);
        boxes_.push_back(box);
    }
    for (QVBoxLayout* column : columns)
        column->addStretch(1);
}

std::vector<QPushButton*> EnginePage::section_buttons() const
{
    return {ui_->particulars_button, ui_->baseline_button,    ui_->coefficients_button,
            ui_->limits_button,      ui_->instruments_button, ui_->load_button};
}

void EnginePage::connect_sections()
{
    const auto buttons = section_buttons();
    for (int i = 0; i < static_cast<int>(buttons.size()); ++i) {
        connect(buttons[static_cast<std::size_t>(i)], &QPushButton::clicked, this, [this, i] { open_section(i); });
        connect(new QShortcut(QKeySequence(Qt::CTRL | static_cast<Qt::Key>(Qt::Key_1 + i)), this, nullptr, nullptr, Qt::WidgetWithChildrenShortcut),
                &QShortcut::activated, this, [this, i] { open_section(i); });
    }
    connect(ui_->new_engine_button, &QPushButton::clicked, this, [this] { begin_new(false); });
    connect(ui_->new_ship_button, &QPushButton::clicked, this, [this] { begin_new(true); });
}

void EnginePage::open_section(int index)
{
    const auto buttons = section_buttons();
    for (int i = 0; i < static_cast<int>(buttons.size()); ++i)
        buttons[static_cast<std::size_t>(i)]->setChecked(i == index);
    ui_->stack->setCurrentIndex(index);
    if (index == baseline_section)
        show_plot();
}

void EnginePage::set_up_table(QTableView& view, EngineTable& model, QPushButton& remove)
{
    view.setModel(&model);
    view.verticalHeader()->hide();
    view.verticalHeader()->setDefaultSectionSize(24);
    view.horizontalHeader()->setHighlightSections(false);
    view.horizontalHeader()->setStretchLastSection(true);
    view.setEditTriggers(QAbstractItemView::AllEditTriggers);
    view.setTabKeyNavigation(true);
    for (std::size_t column = 0; column < model.columns().size(); ++column)
        view.setColumnWidth(static_cast<int>(column), model.columns()[column].names_quantity || !model.columns()[column].editable ? 250 : 150);
    if (model.columns().front().names_quantity)
        view.setItemDelegateForColumn(0, new QuantityDelegate(&view));
    connect(&model, &EngineTable::refused, this, &EnginePage::say);
    connect(&remove, &QPushButton::clicked, this, [&view, &model] { model.remove_row(view.currentIndex().row()); });
}

void EnginePage::connect_saving()
{
    connect(&draft_, &EngineDraft::changed, this, [this] {
        warned_ = false;
        show_state();
    });
    connect(ui_->save_button, &QPushButton::clicked, this, &EnginePage::save);
    connect(ui_->why_field, &QLineEdit::returnPressed, this, &EnginePage::save);
    connect(ui_->undo_button, &QPushButton::clicked, &draft_.undo(), &QUndoStack::undo);
    connect(ui_->redo_button, &QPushButton::clicked, &draft_.undo(), &QUndoStack::redo);
    connect(new QShortcut(QKeySequence::Undo, this, nullptr, nullptr, Qt::WidgetWithChildrenShortcut), &QShortcut::activated, &draft_.undo(), &QUndoStack::undo);
    connect(new QShortcut(QKeySequence::Redo, this, nullptr, nullptr, Qt::WidgetWithChildrenShortcut), &QShortcut::activated, &draft_.undo(), &QUndoStack::redo);
}

QString EnginePage::sentence() const
{
    return draft_.is_new() ? tr("A new engine, not saved yet.") : tr("{engine} of {vessel} as it is described.");
}

QString EnginePage::foot_text() const { return tr("Ctrl+1 to Ctrl+6: particulars, baseline, corrections, limits, instruments, load and walls"); }
QString EnginePage::draft_text() const { return draft_.dirty() ? tr("engine: changes not saved") : QString(); }
QWidget* EnginePage::first_focus() { return ui_->particulars_button; }

bool EnginePage::may_leave()
{
    if (!draft_.dirty() || warned_)
        return true;
    warned_ = true;
    say(tr("The changes are not saved yet. Save or undo them; leave once more to keep them waiting here."));
    return false;
}

void EnginePage::refresh()
{
    ui_->person_field->setText(person_name());
    storage::History* history = workplace().history();
    const QString engine_id = workplace().selection().engine;
    const bool waiting = draft_.dirty() && (engine_id == shown_engine_ || draft_.is_new());
    if (history && !waiting) {
        shown_engine_ = engine_id;
        if (engine_id.isEmpty()) {
            draft_.begin(new_engine_state({}));
        } else if (const auto loaded = load_engine_state(*history, engine_id); loaded.has_value()) {
            draft_.begin(loaded.value());
        } else {
            say(to_qstring(loaded.error().text()));
        }
    }
    show_state();
}

void EnginePage::begin_new(bool new_ship)
{
    if (draft_.dirty() && !warned_) {
        may_leave();
        return;
    }
    const Vessel vessel = new_ship ? Vessel{} : draft_.state().vessel;
    draft_.begin(new_engine_state(vessel));
    open_section(particulars);
    boxes_[new_ship ? 0 : 5].line->setFocus();
    say(tr("Fill in the boxes marked with a star and save. The rest can follow."));
    emit sentence_changed();
}

void EnginePage::take_field(std::size_t index, const QString& text)
{
    const EngineField& field = engine_fields()[index];
    if (text.trimmed() == field.show(draft_.state()))
        return;
    EngineDraft::State state = draft_.state();
    if (text.trimmed().isEmpty() && !field.needed_as.isEmpty() && field.show(state).isEmpty())
        return; // left empty on the way to another box; saving asks for it
    if (const auto problem = field.set(state, text)) {
        say(to_qstring(problem->text()));
        return show_state();
    }
    say({});
    draft_.change(state, field.title);
}

void EnginePage::show_state()
{
    const auto& fields = engine_fields();
    for (std::size_t i = 0; i < boxes_.size(); ++i) {
        const QString text = fields[i].show(draft_.state());
        if (boxes_[i].line && boxes_[i].line->text() != text) {
            boxes_[i].line->setText(text);
            boxes_[i].line->setCursorPosition(0); // a long text shows its beginning
        }
        if (boxes_[i].choice)
            boxes_[i].choice->setCurrentText(text);
    }
    ui_->baseline_source_field->setText(to_qstring(draft_.state().engine.baseline_source));
    ui_->baseline_question->setVisible(draft_.state().engine.baseline_source.ends_with("source not given"));
    ui_->undo_button->setEnabled(draft_.undo().canUndo());
    ui_->redo_button->setEnabled(draft_.undo().canRedo());
    ui_->save_button->setEnabled(draft_.dirty() && workplace().is_open() && !workplace().read_only());
    ui_->trial->setVisible(trial_.has_value());
    show_plot();
    show_revision();
    emit foot_changed();
}

void EnginePage::show_revision()
{
    QString words = draft_.is_new() ? tr("not saved yet") : QString();
    if (!draft_.is_new() && workplace().history()) {
        const auto revisions = storage::VesselStore(*workplace().history()).revisions(draft_.state().engine.id);
        if (revisions.has_value() && !revisions.value().empty()) {
            const storage::EngineRevision* newest = &revisions.value().front();
            for (const storage::EngineRevision& revision : revisions.value())
                newest = revision.revision > newest->revision ? &revision : newest;
            words = tr("revision %1, %2").arg(newest->revision).arg(day_text(newest->at));
            ui_->revision->setToolTip(tr("%1: %2").arg(to_qstring(newest->by.who), to_qstring(newest->by.why)));
        }
    }
    ui_->revision->setText(words);
}

bool EnginePage::save()
{
    if (!workplace().history())
        return false;
    set_person_name(ui_->person_field->text());
    if (!draft_.is_new() && ui_->why_field->text().trimmed().isEmpty()) {
        ui_->why_field->setFocus();
        say(tr("A revision keeps its reason. Write under \u201cWhy changed\u201d what led to it, then save again."));
        return false;
    }
    const auto saved = draft_.save(*workplace().history(), signature(ui_->why_field->text()));
    if (!saved.has_value()) {
        say(to_qstring(saved.error().text()));
        return false;
    }
    ui_->why_field->clear();
    say({});
    shown_engine_ = to_qstring(draft_.state().engine.id);
    workplace().changed();
    Selection selection = workplace().selection();
    if (selection.engine != shown_engine_) {
        selection = Selection{};
        selection.vessel = to_qstring(draft_.state().vessel.id);
        selection.engine = shown_engine_;
        workplace().select(selection);
    }
    show_state();
    emit sentence_changed();
    return true;
}

void EnginePage::say(const QString& words)
{
    ui_->problem->setText(words);
    ui_->problem->setVisible(!words.isEmpty());
}

} // namespace evenstroke
