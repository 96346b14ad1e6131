// SPDX-License-Identifier: GPL-3.0-or-later
// What can be done on the entry page beside typing.
#include "app/desk/number_text.h"
#include "app/desk/workplace.h"
#include "app/entry/blank_sheet.h"
#include "app/entry/ear.h"
#include "app/entry/entry_commands.h"
#include "app/entry/entry_page.h"
#include "app/entry/log_sheet_view.h"
#include "app/entry/typed_time.h"
#include "storage/preference_store.h"
#include "ui_entry_page.h"

#include <QClipboard>
#include <QDir>
#include <QFileDialog>
#include <QGuiApplication>
#include <QLocale>
#include <QMenu>
#include <QPrintDialog>
#include <QPrinter>

namespace evenstroke {
namespace {

constexpr char walk_choice[] = "entry.walk", along_quantities[] = "quantities",
               along_cylinders[] = "cylinders";
constexpr std::size_t closed_offered = 12;

} // namespace

void EntryPage::correct(const QString& reading_id)
{
    ui_->grid->finish_editing();
    session_.correct(reading_id);
    ui_->why_field->clear();
    emit sentence_changed();
    (ui_->who_field->text().trimmed().isEmpty() ? ui_->who_field : ui_->why_field)->setFocus();
}

void EntryPage::take_offered(bool second)
{
    const auto box = ui_->grid->current_box();
    const QString offered = second ? ui_->ear->second_suggestion() : ui_->ear->suggestion();
    if (!box || offered.isEmpty())
        return;
    const Value* value = session_.sheet().value(*box);
    const WrittenUnit written = value ? WrittenUnit{value->unit, value->kind} : session_.sheet().row_unit(box->quantity);
    const auto read = read_box(*box, to_std(offered), written);
    if (read)
        model_.put(read.value(), tr("take %1 for %2").arg(offered, model_.box_name(*box)));
    judge_now();
}

/// "I read it again: it is so": for every selected box that has a value.
void EntryPage::confirm_boxes()
{
    QModelIndexList selected = ui_->grid->selectionModel()->selectedIndexes();
    if (selected.isEmpty())
        selected << ui_->grid->currentIndex();
    std::vector<Value> confirmed;
    for (const QModelIndex& index : selected) {
        const auto box = model_.box(index);
        const Value* value = box ? session_.sheet().value(*box) : nullptr;
        if (!value || !value->number || value->confirmed || session_.sheet().lent(*box))
            continue;
        confirmed.push_back(*value);
        confirmed.back().confirmed = true;
    }
    if (confirmed.empty())
        return;
    session_.undo().beginMacro(confirmed.size() == 1
                                   ? tr("confirm %1").arg(model_.box_name(box_of(confirmed.front())))
                                   : tr("confirm %1 values").arg(confirmed.size()));
    for (const Value& value : confirmed)
        model_.put(value, {});
    session_.undo().endMacro();
    judge_now();
}

void EntryPage::take_paste_that_can_be_read()
{
    if (!paste_plan_)
        return;
    const PastePlan plan = *paste_plan_;
    paste_plan_.reset();
    apply_paste(model_, plan);
    judge_now();
}

void EntryPage::copy_all()
{
    QGuiApplication::clipboard()->setText(
        whole_block(session_.sheet(), QLocale::system().decimalPoint().at(0)));
    say(tr("The whole reading is copied. It can be pasted into a spreadsheet, or into an empty sheet here."));
}

void EntryPage::copy()
{
    if (ui_->grid->hasFocus())
        ui_->grid->copy();
    else
        copy_all();
}

// --------------------------------------------------------------------------------------------- choices

void EntryPage::set_walk_order(WalkOrder order)
{
    ui_->grid->set_walk_order(order);
    if (workplace().history() && !workplace().read_only()) {
        storage::PreferenceStore preferences(*workplace().history());
        static_cast<void>(preferences.set_choice(
            {}, walk_choice,
            std::string(order == WalkOrder::along_cylinders ? along_cylinders : along_quantities)));
    }
    show_words();
    ui_->grid->setFocus();
}

void EntryPage::recall_walk_order()
{
    const auto remembered = storage::PreferenceStore(*workplace().history()).choice({}, walk_choice);
    if (remembered && remembered.value())
        ui_->grid->set_walk_order(*remembered.value() == along_quantities ? WalkOrder::along_quantities
                                                                          : WalkOrder::along_cylinders);
}

void EntryPage::choose_unit(int row)
{
    const LogRow* in_row = model_.row(row);
    if (!in_row || quantity(in_row->quantity).type != ValueType::number)
        return;
    const QuantityId id = in_row->quantity;
    const WrittenUnit now = session_.sheet().row_unit(id);
    QMenu menu(this);
    for (const WrittenUnit& written : possible_units(id)) {
        const QString words = to_qstring(row_unit_text(id, written));
        if (words.isEmpty())
            continue;
        QAction* action =
            menu.addAction(words, this, [this, id, written] { session_.set_row_unit(id, written); });
        action->setCheckable(true);
        action->setChecked(written.id == now.id && written.kind == now.kind);
    }
    const int y = ui_->grid->rowViewportPosition(row) + ui_->grid->rowHeight(row);
    menu.exec(ui_->grid->viewport()->mapToGlobal(QPoint(0, y)));
}

void EntryPage::fill_readings_menu(QMenu& menu)
{
    const auto label = [](const storage::ReadingEntry& entry) {
        return day_text(entry.taken_at.utc) + QStringLiteral("  ") + to_qstring(entry.name);
    };
    for (const storage::ReadingEntry& draft : session_.other_drafts())
        menu.addAction(tr("Go on with the draft of %1").arg(label(draft)), this,
                       [this, id = draft.id] { session_.open_draft(to_qstring(id)); });
    if (!session_.sheet().reading().id.empty())
        menu.addAction(tr("Begin another reading"), this, [this] { session_.begin_new(); });
    if (session_.state() == EntrySession::State::writing && !session_.sheet().reading().id.empty())
        menu.addAction(tr("Throw this draft away"), this, [this] {
            close_problem_ = session_.discard();
            show_notes();
        });
    if (session_.state() == EntrySession::State::correcting)
        menu.addAction(tr("Withdraw this reading, with the reason given above"), this, &EntryPage::withdraw_reading);
    menu.addSeparator();
    const auto closed = session_.closed_readings(closed_offered);
    for (const storage::ReadingEntry& entry : closed)
        menu.addAction(tr("Correct %1").arg(label(entry)), this,
                       [this, id = entry.id] { correct(to_qstring(id)); });
    for (const storage::ReadingEntry& entry : session_.withdrawn_readings(closed_offered))
        menu.addAction(tr("Bring back %1, which was withdrawn…").arg(label(entry)), this,
                       [this, id = entry.id] { ask_bring_back(to_qstring(id)); });
    if (closed.empty())
        menu.addAction(tr("No closed reading of this engine yet"))->setEnabled(false);
}

void EntryPage::fill_layout_menu(QMenu& menu)
{
    const EngineLayout now = session_.sheet().layout();
    const auto add = [&](int count, bool turbochargers) {
        EngineLayout wanted = now;
        (turbochargers ? wanted.turbochargers : wanted.coolers) = count < 2 ? 0 : count;
        const QString words = turbochargers
                                  ? (count < 2 ? tr("1 turbocharger") : tr("%1 turbochargers").arg(count))
                                  : (count < 2 ? tr("1 cooler") : tr("%1 coolers").arg(count));
        QAction* action = menu.addAction(words, this, [this, wanted] {
            if (ui_->grid->finish_editing())
                session_.set_layout(wanted);
        });
        action->setCheckable(true);
        action->setChecked(wanted == now);
    };
    for (int count = 1; count <= 4; ++count)
        add(count, true);
    menu.addSeparator();
    for (int count = 1; count <= 4; ++count)
        add(count, false);
}

void EntryPage::set_time(const QString& date, const QString& clock, const QString& offset)
{
    ui_->date_field->setText(date);
    ui_->clock_field->setText(clock);
    ui_->offset_field->setText(offset);
    read_time_fields();
}

void EntryPage::read_time_fields()
{
    const auto time =
        read_time({ui_->date_field->text(), ui_->clock_field->text(), ui_->offset_field->text()});
    if (!time) {
        time_problem_ = time.error();
        show_notes();
        return;
    }
    time_problem_.reset();
    session_.set_taken_at(time.value());
    show_head();
    judge_soon_.start();
}

void EntryPage::read_signature()
{
    session_.set_signature(ui_->who_field->text(), ui_->why_field->text());
}

// ------------------------------------------------------------------------------------- the blank sheet

bool EntryPage::can_print() const
{
    return session_.state() != EntrySession::State::nothing;
}

void EntryPage::print(QPrinter& printer)
{
    printer.setPageSize(QPageSize(QPageSize::A4));
    printer.setPageOrientation(QPageLayout::Portrait);
    const auto judgement = workplace().judgement(session_.engine_id());
    const VesselChoice* vessel = workplace().find_vessel(session_.vessel_id());
    BlankSheet sheet;
    sheet.vessel = vessel ? vessel->name : QString();
    sheet.engine = &session_.sheet().engine();
    sheet.rows = model_.shown_sections();
    sheet.row_unit = [this](QuantityId id) { return session_.sheet().row_unit(id); };
    if (judgement && judgement->record && !judgement->record->readings.empty())
        sheet.last = &judgement->record->readings.back();
    print_blank_sheet(sheet, printer);
}

bool EntryPage::save_blank_sheet(const QString& path)
{
    QPrinter printer(QPrinter::HighResolution);
    printer.setOutputFormat(QPrinter::PdfFormat);
    printer.setOutputFileName(path);
    print(printer);
    return printer.printerState() != QPrinter::Error;
}

void EntryPage::ask_blank_sheet(QMenu& menu)
{
    menu.addAction(tr("Print it…"), this, [this] {
        QPrinter printer(QPrinter::HighResolution);
        QPrintDialog dialog(&printer, this);
        if (dialog.exec() == QDialog::Accepted)
            print(printer);
    });
    menu.addAction(tr("Save it as PDF…"), this, [this] {
        const QString path = QFileDialog::getSaveFileName(this, tr("Save the blank sheet"),
                                                          tr("log sheet.pdf"), tr("PDF (*.pdf)"));
        if (path.isEmpty())
            return;
        if (save_blank_sheet(path)) {
            say(tr("The blank sheet is saved as %1.").arg(QDir::toNativeSeparators(path)));
        } else {
            close_problem_ =
                invalid_input(to_std(tr("The sheet could not be written to %1.").arg(path)),
                              to_std(tr("Choose another folder, or look whether the disk is full.")));
            show_notes();
        }
    });
}

} // namespace evenstroke
