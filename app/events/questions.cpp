// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/desk/number_text.h"
#include "app/desk/theme.h"
#include "app/desk/workplace.h"
#include "app/events/events_page.h"
#include "ui_events_page.h"

#include <QLabel>
#include <QPushButton>

/// Questions of the judging, answered in the diary: work that nobody wrote down looks like a change of the engine.
namespace evenstroke {
namespace {

/// Between the last reading before the change and the first one after it.
TimePoint likely_day(const EngineRecord& record, const Flag& flag)
{
    for (const Reading& reading : record.readings)
        if (reading.taken_at.utc > flag.since)
            return flag.since + (reading.taken_at.utc - flag.since) / 2;
    return flag.since;
}

bool answered(const std::vector<Event>& events, const Flag& flag)
{
    for (const Event& event : events)
        if (event.kind == "note" && event.place == flag.subject && event.part == "no work was done" && event.date.utc >= flag.since)
            return true;
    return false;
}

} // namespace

void EventsPage::show_questions()
{
    qDeleteAll(ui_->questions->findChildren<QWidget*>(QString(), Qt::FindDirectChildrenOnly));
    const auto judgement = workplace().judgement();
    bool any = false;
    for (const Flag& flag : judgement ? judgement->flags : std::vector<Flag>{}) {
        if (flag.level_now != Level::ask || answered(diary_.events(), flag))
            continue;
        if (!any) {
            auto* heading = new QLabel(tr("Questions"), ui_->questions);
            heading->setProperty("muted", true);
            ui_->question_lines->addWidget(heading);
        }
        any = true;
        auto* words = new QLabel(tr("Was work done on %1 about %2? %3")
                                     .arg(place_title(engine_, flag.subject, false), day_text(likely_day(*judgement->record, flag)), to_qstring(flag.sentence)),
                                 ui_->questions);
        words->setWordWrap(true);
        ui_->question_lines->addWidget(words);
        auto* yes = new QPushButton(tr("Yes: enter it with that day"), ui_->questions);
        auto* no = new QPushButton(tr("No work was done"), ui_->questions);
        for (QPushButton* button : {yes, no}) {
            button->setProperty("worded", true);
            ui_->question_lines->addWidget(button, 0, Qt::AlignLeft);
        }
        connect(yes, &QPushButton::clicked, this, [this, flag] { answer_with_work(flag); });
        connect(no, &QPushButton::clicked, this, [this, flag] { answer_without_work(flag); });
    }
    ui_->questions->setVisible(any);
}

/// The day and the cylinder are known; the letter for what was done is left to the engineer.
void EventsPage::answer_with_work(const Flag& flag)
{
    const auto judgement = workplace().judgement();
    if (!judgement)
        return;
    begin_new();
    typing_.take(QLatin1Char('O'));
    if (flag.subject.kind == Place::Kind::cylinder)
        for (const char digit : std::to_string(flag.subject.number))
            typing_.take(QLatin1Char(digit));
    typing_.set_day(likely_day(*judgement->record, flag));
    show_line();
    show_in_hand();
    say(tr("Another letter changes what was done, the arrow keys change the day; Enter saves."));
}

void EventsPage::answer_without_work(const Flag& flag)
{
    const auto judgement = workplace().judgement();
    if (!judgement)
        return;
    Event event;
    event.date = {std::chrono::floor<std::chrono::days>(likely_day(*judgement->record, flag)), 0};
    event.place = flag.subject;
    event.kind = "note";
    event.part = "no work was done";
    event.note = tr("Asked about a change of %1; no work was done.").arg(to_qstring(quantity(flag.quantity).title).toLower()).toStdString();
    diary_.add(event);
    show_questions();
}

} // namespace evenstroke
