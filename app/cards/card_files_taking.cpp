// SPDX-License-Identifier: GPL-3.0-or-later
// What the page says of the files in hand, and how they get into the reading.
#include "app/cards/card_files_page.h"

#include "app/board/board_page.h"
#include "app/cards/trace_words.h"
#include "app/desk/number_text.h"
#include "app/desk/reading_in_hand.h"
#include "app/desk/theme.h"
#include "app/desk/workplace.h"
#include "app/entry/signature_dialog.h"
#include "app/settings/person.h"
#include "core/explanation/cautions.h"
#include "storage/reading_store.h"
#include "ui_card_files_page.h"

#include <QComboBox>
#include <QFileInfo>
#include <QStyle>

#include <algorithm>

namespace evenstroke {
namespace {

enum TraceTableColumn { file_column, cylinder_column, samples_column, words_column };

} // namespace

void CardFilesPage::say(const QString& words, bool caution)
{
    ui_->outcome->setText(words);
    ui_->outcome->setVisible(!words.isEmpty());
    if (ui_->outcome->property("caution").toBool() == caution)
        return;
    ui_->outcome->setProperty("caution", caution);
    ui_->outcome->style()->unpolish(ui_->outcome);
    ui_->outcome->style()->polish(ui_->outcome);
}

QString CardFilesPage::outcome() const
{
    return ui_->outcome->text();
}

void CardFilesPage::show_all()
{
    const bool any = !files_.empty(), ready = engine() != nullptr;
    QString hint;
    if (!ready)
        hint = empty_words(workplace());
    else if (!any) {
        hint = tr("Choose the files that the indicating instrument wrote, or drop them here: one a cylinder, "
                  "or one with a column a "
                  "cylinder. Any text in columns will do. Nothing is stored before you have seen what the "
                  "cards say.");
        if (const Caution* const cocks = find_caution("indicator_cocks"))
            hint += QStringLiteral("\n\n") + to_qstring(cocks->short_text);
    }
    ui_->hint->setText(hint);
    ui_->hint->setVisible(!hint.isEmpty());
    ui_->choose_button->setEnabled(ready);
    ui_->choose_button->setText(any ? tr("choose more (Ctrl+O)") : tr("choose files (Ctrl+O)"));
    for (QWidget* part :
         std::initializer_list<QWidget*>{ui_->forget_button, ui_->guess_button, ui_->lines_title,
                                         ui_->columns, ui_->boxes, ui_->traces, ui_->in_hand})
        part->setVisible(any && ready);
    if (any)
        ui_->lines_title->setText((remembered_ ? tr("%1, laid out as this engine's files were the last time:")
                                               : tr("%1, as it looks; say what each column holds:"))
                                      .arg(QFileInfo(files_.front().path).fileName()));
    ui_->paper_button->setVisible(ready);
    ui_->paper->setVisible(ready && ui_->paper_button->isChecked());
    show_unit_words();
    ui_->problem->setText(problem_words());
    ui_->problem->setVisible(!ui_->problem->text().isEmpty());
    show_traces();
    show_into();
}

/// The header's word for the unit, for the engineer to confirm.
void CardFilesPage::show_unit_words()
{
    const bool names = !files_.empty() && engine() && proposed_.unit && !first_lines_.empty();
    const bool differs = names && (!layout_.unit || contradicts(*proposed_.unit, layout_));
    ui_->unit_words->setVisible(differs);
    ui_->unit_button->setVisible(differs);
    if (!differs)
        return;
    const QString words = unit_in_words(*proposed_.unit);
    ui_->unit_words->setText(tr("The file's header speaks of %1.").arg(words));
    ui_->unit_button->setText(tr("it is %1").arg(words));
}

void CardFilesPage::show_traces()
{
    const int row_before = std::max(0, ui_->traces->currentRow());
    const Engine* const of = engine();
    ui_->traces->setRowCount(of ? static_cast<int>(traces_.size()) : 0);
    for (int row = 0; of && row < ui_->traces->rowCount(); ++row) {
        const FileTrace& trace = traces_[static_cast<std::size_t>(row)];
        const QString file = QFileInfo(files_[trace.file].path).fileName();
        const bool several = layout_.pressures.size() > 1 && trace.column > 0;
        const QString words[] = {several ? tr("column %1 of %2").arg(trace.column).arg(file) : file,
                                 QString(), trace_size_text(trace), trace_results_text(trace)};
        for (int column = 0; column < ui_->traces->columnCount(); ++column) {
            auto* item = new QTableWidgetItem(words[column]);
            item->setToolTip(words[column]);
            ui_->traces->setItem(row, column, item);
        }
        auto* choice = new QComboBox(ui_->traces);
        choice->addItem(tr("which?"));
        for (int number = 1; number <= of->cylinders; ++number)
            choice->addItem(to_qstring(of->cylinder_name(number)));
        choice->setCurrentIndex(trace.cylinder.value_or(0));
        choice->setAccessibleName(tr("Cylinder of %1").arg(words[file_column]));
        choice->setEnabled(trace.trace != nullptr);
        connect(choice, &QComboBox::activated, this, [this, row](int index) {
            set_cylinder(static_cast<std::size_t>(row), index > 0 ? std::optional(index) : std::nullopt);
        });
        ui_->traces->setCellWidget(row, cylinder_column, choice);
    }
    ui_->traces->setColumnWidth(file_column, 190);
    ui_->traces->setColumnWidth(cylinder_column, 80);
    ui_->traces->setColumnWidth(samples_column, 120);
    ui_->traces->setCurrentCell(std::min(row_before, ui_->traces->rowCount() - 1), file_column);
    show_trace_in_hand();
}

void CardFilesPage::show_trace_in_hand()
{
    const int row = ui_->traces->currentRow();
    const FileTrace* const trace = row >= 0 && row < static_cast<int>(traces_.size())
                                       ? &traces_[static_cast<std::size_t>(row)]
                                       : nullptr;
    ui_->preview->setVisible(trace && trace->trace);
    ui_->preview->show_trace(trace);
    ui_->sentences->setVisible(trace != nullptr);
    ui_->sentences->setText(trace ? trace_sentences(*trace) : QString());
    const Engine* const of = engine();
    QString words = busy() ? tr("The files are being read.") : QString();
    if (trace && of)
        words = !trace->trace     ? QFileInfo(files_[trace->file].path).fileName()
                : trace->cylinder ? place_title(*of, Place::cylinder(*trace->cylinder))
                                  : tr("Of which cylinder is this card?");
    ui_->in_hand->setText(words);
}

/// Which cards go into which reading, and what keeps the others out.
void CardFilesPage::show_into()
{
    const Reading* const reading = reading_in_hand_here();
    const auto of_cylinders = static_cast<int>(std::count_if(traces_.begin(), traces_.end(), can_be_taken));
    const auto left = static_cast<int>(traces_.size()) - of_cylinders;
    const auto taken = static_cast<int>(std::count_if(
        traces_.begin(), traces_.end(), [this](const FileTrace& trace) { return is_wanted(trace); }));
    const QString twice = engine() ? cylinders_twice(traces_, *engine()) : QString();
    QStringList lines;
    if (!traces_.empty() && !reading)
        lines << tr("The engine has no closed reading to which cards could belong. Enter it first.");
    if (!twice.isEmpty())
        lines << twice;
    if (left > 0)
        lines << tr(
            "%n card(s) are left out: they cannot be read, or nobody has said of which cylinder they are.",
            nullptr, left);
    show_doubtful(lines);
    if (workplace().read_only())
        lines << tr("This history can only be read.");
    ui_->into->setText(lines.join(QStringLiteral("\n")));
    ui_->into->setVisible(!lines.isEmpty());
    const bool may = reading && taken > 0 && twice.isEmpty() && !workplace().read_only() && !run_.busy();
    ui_->take_button->setVisible(taken > 0);
    ui_->take_button->setEnabled(may);
    ui_->take_button->setText(reading ? tr("take %n card(s) into the reading of %1 (Ctrl+Enter)", nullptr, taken)
                                            .arg(day_text(reading->taken_at.utc))
                                      : tr("take in"));
    ui_->paper->set_can_put(reading && !workplace().read_only());
}

/// What speaks against taking a card in; empty where nothing does.
QString CardFilesPage::doubt_of(const FileTrace& trace) const
{
    const QString doubt = trace_doubt(trace);
    const Reading* const here = reading_in_hand_here();
    const auto is_here = [&](const storage::CardEntry& card) { return card.reading_id == here->id && card.cylinder == trace.cylinder; };
    if (!doubt.isEmpty() || trace.same.empty() || !here || std::any_of(trace.same.begin(), trace.same.end(), is_here))
        return doubt;
    const storage::CardEntry& first = trace.same.front();
    const auto& readings = judgement_->record->readings;
    const auto other = std::find_if(readings.begin(), readings.end(), [&](const Reading& one) { return one.id == first.reading_id; });
    const QString day = other == readings.end() ? tr("another reading") : tr("the reading of %1").arg(day_text(other->taken_at.utc));
    return tr("the same samples stand already as the card of %1 in %2")
        .arg(place_title(*engine(), Place::cylinder(first.cylinder), false), day);
}

bool CardFilesPage::is_wanted(const FileTrace& trace) const
{
    return can_be_taken(trace) && (all_the_same_ || doubt_of(trace).isEmpty());
}

/// Cards that only a second step takes in, and what speaks against each.
void CardFilesPage::show_doubtful(QStringList& lines)
{
    int doubtful = 0;
    for (const FileTrace& trace : traces_) {
        const QString doubt = can_be_taken(trace) && engine() ? doubt_of(trace) : QString();
        if (doubt.isEmpty())
            continue;
        ++doubtful;
        lines << tr("The card of %1 is doubtful: %2.")
                     .arg(place_title(*engine(), Place::cylinder(*trace.cylinder), false), doubt);
    }
    if (doubtful > 0)
        lines << (all_the_same_
                      ? tr("%n doubtful card(s) go in all the same, as you said.", nullptr, doubtful)
                      : tr("%n doubtful card(s) stay out unless you say that they go in all the same.",
                           nullptr, doubtful));
    ui_->doubtful_button->setVisible(doubtful > 0 && !all_the_same_ && !workplace().read_only());
}

std::vector<storage::NewCard> CardFilesPage::cards_to_take() const
{
    std::vector<storage::NewCard> cards;
    for (const FileTrace& trace : traces_)
        if (is_wanted(trace))
            cards.push_back({*trace.cylinder, trace.trace.get()});
    return cards;
}

/// What needs no name and no reason: the reading has another card of a cylinder, or has them all. True: it is
/// said.
bool CardFilesPage::says_already()
{
    const Reading* const reading = reading_in_hand_here();
    if (!reading || !workplace().history())
        return true;
    const auto would = storage::CardStore(*workplace().history()).foresee(reading->id, cards_to_take());
    if (!would) {
        say(to_qstring(would.error().text()), true);
        return true;
    }
    if (would.value().added > 0)
        return false;
    say(tr("Nothing is new: %n card(s) were there already.", nullptr, would.value().same) + QLatin1Char(' ') +
        tr("The reading of %1 has %n card(s) in all.", nullptr, would.value().in_all)
            .arg(day_text(reading->taken_at.utc)));
    return true;
}

std::optional<storage::Signature> CardFilesPage::ask_signature(const QString& title, const QString& words,
                                                               const QString& action)
{
    SignatureDialog dialog(title, words, action, {to_std(person_name()), {}}, this);
    if (dialog.exec() != QDialog::Accepted)
        return std::nullopt;
    set_person_name(to_qstring(dialog.signature().who));
    return dialog.signature();
}

void CardFilesPage::ask_and_take()
{
    if (says_already())
        return;
    if (const auto by =
            ask_signature(tr("Take cards in"),
                          tr("The cards are kept with the reading for good. The history keeps who brought "
                             "them in and why."),
                          tr("Take in")))
        take_in(*by);
}

bool CardFilesPage::take_in(const storage::Signature& by)
{
    const Reading* const reading = reading_in_hand_here();
    if (!reading || !workplace().history())
        return false;
    const auto cards = cards_to_take();
    if (cards.empty())
        return false;
    const auto added = storage::CardStore(*workplace().history()).add_all(reading->id, cards, by);
    if (!added) {
        say(to_qstring(added.error().text()), true);
        return false;
    }
    const QString day = day_text(reading->taken_at.utc);
    const auto kept =
        storage::save_trace_layout(*workplace().history(), to_std(workplace().selection().engine), layout_);
    const int fresh = added.value().added, same = added.value().same;
    QString words = fresh > 0 ? tr("%n card(s) are taken in.", nullptr, fresh)
                              : tr("Nothing is new: %n card(s) were there already.", nullptr, same);
    if (fresh > 0 && same > 0)
        words += QLatin1Char(' ') + tr("%n were there already.", nullptr, same);
    words += QLatin1Char(' ') +
             tr("The reading of %1 has %n card(s) in all.", nullptr, added.value().in_all).arg(day);
    if (!kept)
        words += QLatin1Char(' ') + to_qstring(kept.error().text());
    forget_files();
    say(words);
    workplace().changed();
    return true;
}

/// Empty where the cylinder's mean indicated pressure is not read yet, or is of a card.
QString CardFilesPage::read_value_stays(int cylinder) const
{
    const Reading* const reading = reading_in_hand_here();
    const auto quantity_id = find_quantity("mean_indicated_pressure", Place::Kind::cylinder);
    const Value* const value =
        reading && quantity_id ? reading->find(*quantity_id, Place::cylinder(cylinder)) : nullptr;
    if (!value || value->missing != MissingReason::none || value->origin == Origin::card)
        return {};
    return tr("The reading of %1 has a mean indicated pressure of %2 that somebody read, and it stays.")
        .arg(day_text(reading->taken_at.utc), place_title(*engine(), value->place, false));
}

void CardFilesPage::ask_and_put(int cylinder, double mean_indicated_bar)
{
    if (const QString stays = read_value_stays(cylinder); !stays.isEmpty())
        return say(stays, true);
    if (const auto by = ask_signature(tr("Put into the reading"),
                                      tr("The mean indicated pressure of a paper card becomes a value of the "
                                         "reading, marked as from a card. "
                                         "A value that was read stays."),
                                      tr("Put in")))
        put_paper_card(cylinder, mean_indicated_bar, *by);
}

bool CardFilesPage::put_paper_card(int cylinder, double mean_indicated_bar, const storage::Signature& by)
{
    const Reading* const reading = reading_in_hand_here();
    const auto quantity_id = find_quantity("mean_indicated_pressure", Place::Kind::cylinder);
    if (!reading || !workplace().history() || !quantity_id)
        return false;
    const storage::ValueFromCard value{*quantity_id,
                                       Place::cylinder(cylinder),
                                       mean_indicated_bar,
                                       {find_unit("bar").value().id, PressureKind::none}};
    const auto accepted =
        storage::ReadingStore(*workplace().history()).accept_card_values(reading->id, {value}, by);
    if (!accepted) {
        say(to_qstring(accepted.error().text()), true);
        return false;
    }
    const QString where = place_title(*engine(), value.place, false), day = day_text(reading->taken_at.utc);
    if (!accepted.value().left_alone.empty()) {
        say(tr("The reading of %1 has a mean indicated pressure of %2 that somebody read, and it stays.")
                .arg(day, where),
            true);
        return false;
    }
    say(accepted.value().same > 0
            ? tr("The reading of %1 has it already.").arg(day)
            : tr("%1 bar is the mean indicated pressure of %2 in the reading of %3 now.")
                  .arg(number_text(mean_indicated_bar, 2), where, day));
    workplace().changed();
    return true;
}

} // namespace evenstroke
