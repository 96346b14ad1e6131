// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/reading/workings_page.h"

#include "app/board/board_page.h"
#include "app/desk/number_text.h"
#include "app/desk/reading_in_hand.h"
#include "app/desk/sentence_choices.h"
#include "app/desk/workplace.h"
#include "app/reading/workings_sheet.h"
#include "core/workings/find_workings.h"

#include <QPushButton>

#include <algorithm>

namespace evenstroke {

WorkingsPage::WorkingsPage(Workplace& place, QWidget* parent)
    : SheetPage(place, parent), earlier_button_(add_action(tr("reading before (Page Up)"))),
      later_button_(add_action(tr("reading after (Page Down)")))
{
    connect(earlier_button_, &QPushButton::clicked, this, [this] { walk_readings(-1); });
    connect(later_button_, &QPushButton::clicked, this, [this] { walk_readings(1); });
}

QString WorkingsPage::sentence() const
{
    const Selection& selection = workplace().selection();
    if (!selection.estimate.isEmpty())
        return tr("Power of {engine} of {vessel}, reading of {reading}, and how it was worked out.");
    if (selection.place.kind == Place::Kind::engine)
        return tr("{quantity} of {engine} of {vessel}, reading of {reading}, and how it was worked out.");
    return tr("{quantity} of {place}, {engine} of {vessel}, reading of {reading}, and how it was worked out.");
}

std::optional<Workings> WorkingsPage::wanted(std::size_t reading) const
{
    const Selection& selection = workplace().selection();
    if (!selection.estimate.isEmpty()) {
        const PowerAgreement power = review_reading(*judgement_, reading).power;
        const auto found = std::find_if(power.estimates.begin(), power.estimates.end(), [&](const PowerEstimate& estimate) {
            return to_qstring(estimate.name) == selection.estimate;
        });
        return found == power.estimates.end() ? std::nullopt : std::optional(found->workings);
    }
    return selection.quantity ? find_workings(*judgement_, reading, *selection.quantity, selection.place) : std::nullopt;
}

void WorkingsPage::refresh()
{
    judgement_ = workplace().judgement();
    workings_.reset();
    reading_ = judgement_ ? reading_in_hand(*judgement_, workplace().selection()) : std::nullopt;
    if (!reading_) {
        show_instead(empty_words(workplace()));
        return;
    }
    if (!workplace().selection().quantity && workplace().selection().estimate.isEmpty())
        workplace().step_to(settled(workplace().selection(), *judgement_));
    workings_ = wanted(*reading_);
    if (!workings_) {
        show_instead(tr("This value was not read on that day and is not worked out. Choose another reading (key M) or "
                        "quantity (key Q), or go back (Esc)."));
        return;
    }
    show_sheet();
    earlier_button_->setEnabled(*reading_ > 0);
    later_button_->setEnabled(*reading_ + 1 < judgement_->readings.size());
}

SheetHeading WorkingsPage::heading() const
{
    const Engine& engine = judgement_->record->engine;
    QString title = to_qstring(workings_->title);
    if (workings_->place.kind != Place::Kind::engine)
        title = tr("%1, %2").arg(title, place_title(engine, workings_->place, false));
    QString name = to_qstring(engine.name);
    if (!name.isEmpty())
        name[0] = name[0].toUpper();
    return {title, tr("%1 of %2, reading of %3")
                       .arg(name, to_qstring(judgement_->record->vessel.name),
                            reading_words(*judgement_, *reading_))};
}

QString WorkingsPage::plain_text() const
{
    if (!workings_)
        return {};
    const SheetHeading words = heading();
    return to_qstring(workings_text(*workings_, to_std(words.title + QStringLiteral(", ") + words.where)));
}

void WorkingsPage::fill(QTextDocument& document, const Theme& colours) const
{
    fill_sheet(document, *workings_, heading(), colours);
}

void WorkingsPage::walk_readings(int step)
{
    if (judgement_)
        workplace().step_to(with_reading_step(workplace().selection(), *judgement_, step));
}

bool WorkingsPage::take_key(int key)
{
    switch (key) {
    case Qt::Key_W: go_back(); return true;
    case Qt::Key_PageUp:
    case Qt::Key_Left: walk_readings(-1); return true;
    case Qt::Key_PageDown:
    case Qt::Key_Right: walk_readings(1); return true;
    default: return false;
    }
}

} // namespace evenstroke
