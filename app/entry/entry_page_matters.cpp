// SPDX-License-Identifier: GPL-3.0-or-later
// What is open on the entry page: the lines under the sheet, the way to a doubt, and closing.
#include "app/desk/number_text.h"
#include "app/desk/workplace.h"
#include "app/entry/ear.h"
#include "app/entry/entry_page.h"
#include "app/entry/log_sheet_view.h"
#include "app/entry/signature_dialog.h"
#include "ui_entry_page.h"

#include <QScrollBar>
#include <QShortcut>

#include <algorithm>

namespace evenstroke {
namespace {

/// Height of the lines under the sheet, px: a few while typing, more once closing is asked for.
constexpr int notes_while_typing = 92, notes_at_closing = 220;
/// More lines than these are no help at the foot; the marks in the boxes show the rest.
constexpr std::size_t single_values_listed = 12;

} // namespace

// ------------------------------------------------------------------------------------ under the sheet

void EntryPage::show_notes()
{
    std::vector<NoteLines::Line> lines;
    const auto problem_line = [&](const std::optional<Problem>& problem) {
        if (problem)
            lines.push_back({to_qstring(problem->text()), true, {}});
    };
    if (session_.state() == EntrySession::State::read_only)
        lines.push_back({tr("This history can only be read: nothing can be typed here. Open a copy that may be "
                            "written, or let this program write to the file and its folder."),
                         true,
                         {}});
    if (!notice_.isEmpty())
        lines.push_back({notice_, false, {}});
    problem_line(session_.problem());
    problem_line(time_problem_);
    problem_line(close_problem_);
    add_closing_line(lines);
    add_paste_line(lines);
    add_matter_lines(lines);
    ui_->notes->show_lines(lines);
    ui_->notes_area->setMaximumHeight(closing_wanted_ ? notes_at_closing : notes_while_typing);
    ui_->notes_area->setVisible(!lines.empty());
}

void EntryPage::add_paste_line(std::vector<NoteLines::Line>& lines)
{
    if (!paste_plan_)
        return;
    NoteLines::Line line{refusal_text(*paste_plan_), true, {}};
    if (!paste_plan_->values.empty())
        line.actions.push_back({tr("Paste the %1 that can be read").arg(paste_plan_->values.size()),
                                [this] { take_paste_that_can_be_read(); }});
    line.actions.push_back({tr("Leave it"), [this] {
                                paste_plan_.reset();
                                show_notes();
                            }});
    lines.push_back(std::move(line));
}

void EntryPage::add_closing_line(std::vector<NoteLines::Line>& lines)
{
    if (asked_at_closing_.empty())
        return;
    const OpenMatter first = asked_at_closing_.front();
    NoteLines::Line line{tr("Before closing: %1. Each is named below.").arg(open_in_short(asked_at_closing_)), true, {}};
    if (first.time || !first.boxes.empty())
        line.actions.push_back({tr("Go there"), [this, first] { go_to_matter(first); }});
    line.actions.push_back({tr("Close all the same"), [this] { close_reading(); }});
    lines.push_back(std::move(line));
}

void EntryPage::add_matter_lines(std::vector<NoteLines::Line>& lines)
{
    if (closing_wanted_)
        for (const OpenMatter& matter : find_lacking_matters(model_, opinions_))
            lines.push_back({matter.sentence, false, {{tr("Go there"), [this, matter] { go_to_matter(matter); }}}});
    std::size_t single = 0;
    for (const OpenMatter& matter : find_open_matters(model_, opinions_)) {
        if (matter.one_box && ++single > single_values_listed)
            continue;
        NoteLines::Line line{matter.sentence, matter.impossible, {}};
        if (matter.time || !matter.boxes.empty())
            line.actions.push_back({tr("Go there"), [this, matter] { go_to_matter(matter); }});
        lines.push_back(std::move(line));
    }
    if (single > single_values_listed)
        lines.push_back({tr("%1 more single values are in doubt; Ctrl+N goes from one to the next.")
                             .arg(single - single_values_listed),
                         false,
                         {}});
}

void EntryPage::say(const QString& notice)
{
    notice_ = notice;
    show_notes();
}

// ------------------------------------------------------------------------------------- the way there

void EntryPage::connect_keys()
{
    const auto key = [this](const QKeySequence& sequence, auto action) {
        auto* shortcut = new QShortcut(sequence, this, nullptr, nullptr, Qt::WidgetWithChildrenShortcut);
        shortcut->setAutoRepeat(false); // a key held down must not answer the question it raised
        connect(shortcut, &QShortcut::activated, this, [this, action] {
            if (ui_->stack->currentWidget() == ui_->sheet_page)
                (this->*action)();
        });
    };
    key(QKeySequence(Qt::CTRL | Qt::Key_Return), &EntryPage::close_reading);
    key(QKeySequence(Qt::CTRL | Qt::Key_Enter), &EntryPage::close_reading);
    key(QKeySequence(Qt::CTRL | Qt::Key_N), &EntryPage::go_to_doubt);
    key(QKeySequence(Qt::CTRL | Qt::Key_D), &EntryPage::go_to_date);
}

void EntryPage::go_to_date()
{
    ui_->grid->finish_editing();
    ui_->date_field->setFocus(Qt::ShortcutFocusReason);
    ui_->date_field->selectAll();
}

void EntryPage::leave_sheet(bool forward)
{
    if (!forward) {
        ui_->offset_field->setFocus(Qt::BacktabFocusReason);
        ui_->offset_field->selectAll();
    } else if (ui_->close_button->isVisible()) {
        ui_->close_button->setFocus(Qt::TabFocusReason);
    } else {
        ui_->readings_button->setFocus(Qt::TabFocusReason);
    }
}

void EntryPage::go_to_matter(const OpenMatter& matter)
{
    if (matter.time) {
        go_to_date();
    } else if (!matter.boxes.empty()) {
        ui_->grid->finish_editing();
        ui_->grid->go_to(matter.boxes.front());
        ui_->grid->setFocus();
    }
}

std::optional<LogBox> EntryPage::newest_doubt(bool with_remedy) const
{
    const auto here = ui_->grid->current_box();
    for (auto box = typed_lately_.rbegin(); box != typed_lately_.rend(); ++box) {
        const ValueOpinion* opinion = with_remedy ? opinions_.of(*box) : nullptr;
        if (*box != here && (!with_remedy || (opinion && opinion->suggestion)) && !open_sentence(model_, opinions_, *box).isEmpty())
            return *box;
    }
    return std::nullopt;
}

void EntryPage::show_newest()
{
    const auto box = newest_doubt(false);
    ui_->ear->show_newest(box ? open_sentence(model_, opinions_, *box) : QString());
}

void EntryPage::go_to_doubt()
{
    ui_->grid->finish_editing();
    judge_now();
    const auto here = ui_->grid->current_box();
    const std::vector<LogBox> boxes = doubted_boxes(model_, find_open_matters(model_, opinions_));
    const bool in_one = here && std::find(boxes.begin(), boxes.end(), *here) != boxes.end();
    // A slip that has a likely remedy comes before what only contradicts it.
    auto target = in_one ? std::nullopt : newest_doubt(true);
    if (!target && !in_one)
        target = newest_doubt(false);
    if (!target && !boxes.empty()) {
        const auto at = here ? std::find(boxes.begin(), boxes.end(), *here) : boxes.end();
        target = at == boxes.end() || at + 1 == boxes.end() ? boxes.front() : *(at + 1);
    }
    if (!target) {
        say(tr("No value is in doubt."));
        return;
    }
    ui_->grid->go_to(*target);
    ui_->grid->setFocus();
}

// -------------------------------------------------------------------------------------------- closing

/// Nothing is open, or it was said already and closing is wanted all the same.
bool EntryPage::may_close()
{
    if (!asked_at_closing_.empty())
        return true;
    judge_now();
    asked_at_closing_ = find_open_matters(model_, opinions_);
    for (OpenMatter& lacking : find_lacking_matters(model_, opinions_))
        asked_at_closing_.push_back(std::move(lacking));
    if (asked_at_closing_.empty())
        return true;
    ui_->notes_area->verticalScrollBar()->setValue(0);
    return false;
}

/// What is closed in spite of a doubt is kept as confirmed, and said on the closed page.
void EntryPage::keep_doubts()
{
    kept_doubtful_.clear();
    std::vector<OpenMatter> doubts;
    for (const OpenMatter& matter : asked_at_closing_)
        if (matter.lacking == 0 && !matter.quick)
            doubts.push_back(matter); // what is empty, the closed page says anyway
    for (const OpenMatter& matter : doubts)
        kept_doubtful_ << matter.sentence;
    std::vector<Value> confirmed;
    for (const LogBox& box : doubted_boxes(model_, doubts)) {
        const Value* value = session_.sheet().value(box);
        if (!value || !value->number || value->confirmed || session_.sheet().lent(box))
            continue;
        confirmed.push_back(*value);
        confirmed.back().confirmed = true;
    }
    if (confirmed.empty())
        return;
    session_.undo().beginMacro(tr("keep %1 doubted values").arg(confirmed.size()));
    for (const Value& value : confirmed)
        model_.put(value, {});
    session_.undo().endMacro();
}

void EntryPage::close_reading()
{
    if (session_.state() != EntrySession::State::writing)
        return;
    ui_->grid->finish_editing();
    closing_wanted_ = true;
    if (!model_.unreadable().empty()) {
        go_to_unreadable();
        return;
    }
    read_time_fields();
    if (time_problem_) {
        go_to_date();
        return;
    }
    close_problem_ = find_problem_with_closing(session_.sheet().reading());
    if (close_problem_ || !may_close()) {
        show_notes();
        return;
    }
    keep_doubts();
    const QString open = open_in_short(asked_at_closing_);
    asked_at_closing_.clear();
    close_problem_ = session_.close(open.isEmpty() ? QString() : tr("closed all the same with %1").arg(open));
    if (close_problem_) {
        show_notes();
        return;
    }
    show_state();
    ui_->closed_page->first_focus()->setFocus();
}

void EntryPage::ask_bring_back(const QString& reading_id)
{
    SignatureDialog dialog(tr("Bring a withdrawn reading back"),
                           tr("The reading counts again in baselines of comparison, trends and reports. The history "
                              "keeps who brought it back and why."),
                           tr("Bring it back"), session_.signature(), this);
    if (dialog.exec() != QDialog::Accepted)
        return;
    close_problem_ = session_.bring_back(reading_id, dialog.signature());
    show_notes();
}

void EntryPage::withdraw_reading()
{
    close_problem_ = session_.withdraw();
    emit sentence_changed();
    show_notes();
}

} // namespace evenstroke
