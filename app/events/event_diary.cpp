// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/events/event_diary.h"

#include "app/desk/number_text.h"
#include "app/settings/person.h"
#include "storage/event_store.h"
#include "storage/history.h"

#include <QUndoCommand>

#include <algorithm>

namespace evenstroke {

/// One change of the diary: from nothing to an event, from one state to another, or from an event to nothing.
class EventCommand : public QUndoCommand
{
public:
    EventCommand(EventDiary& diary, std::optional<Event> before, std::optional<Event> after, QString why)
        : diary_(diary), before_(std::move(before)), after_(std::move(after)), why_(std::move(why))
    {
        if (before_)
            id_ = to_qstring(before_->id);
    }

    void redo() override { move_to(before_, after_, why_); }
    void undo() override { move_to(after_, before_, EventDiary::tr("undone")); }

private:
    void move_to(const std::optional<Event>& from, const std::optional<Event>& to, const QString& why)
    {
        bool written = false;
        if (!from && to) {
            QString fresh;
            written = diary_.write_add(*to, id_, why, &fresh);
            if (written)
                id_ = fresh;
        } else if (from && !to) {
            written = diary_.write_remove(id_, why);
        } else if (to) {
            Event event = *to;
            event.id = diary_.newest_id(id_).toStdString();
            written = diary_.write_change(event, why);
        }
        if (!written)
            setObsolete(true); // nothing was changed, so there is nothing to take back
    }

    EventDiary& diary_;
    std::optional<Event> before_, after_;
    QString why_, id_;
};

EventDiary::EventDiary(QObject* parent) : QObject(parent) {}

void EventDiary::open(storage::History* history, const QString& engine_id)
{
    if (history != history_ || engine_id != engine_id_) {
        undo_.clear();
        renamed_.clear();
    }
    history_ = history;
    engine_id_ = engine_id;
    reload();
}

void EventDiary::reload()
{
    events_.clear();
    problem_.reset();
    if (!history_ || engine_id_.isEmpty())
        return;
    auto loaded = storage::EventStore(*history_).load(engine_id_.toStdString());
    if (!loaded.has_value()) {
        problem_ = loaded.error();
        return;
    }
    events_ = std::move(loaded.value());
    std::reverse(events_.begin(), events_.end());
}

const Event* EventDiary::find(const QString& id) const
{
    const std::string wanted = newest_id(id).toStdString();
    const auto found = std::find_if(events_.begin(), events_.end(), [&](const Event& event) { return event.id == wanted; });
    return found == events_.end() ? nullptr : &*found;
}

std::optional<Event> EventDiary::stored(const QString& id) const
{
    const Event* found = find(id);
    return found ? std::optional<Event>(*found) : std::nullopt;
}

QString EventDiary::newest_id(const QString& id) const
{
    QString newest = id;
    while (renamed_.contains(newest))
        newest = renamed_.value(newest);
    return newest;
}

void EventDiary::add(const Event& event)
{
    undo_.push(new EventCommand(*this, std::nullopt, event, {}));
}

void EventDiary::change(const Event& event, const QString& why)
{
    if (const auto before = stored(to_qstring(event.id)))
        undo_.push(new EventCommand(*this, before, event, why));
}

void EventDiary::remove(const QString& id, const QString& why)
{
    if (const auto before = stored(id))
        undo_.push(new EventCommand(*this, before, std::nullopt, why));
}

bool EventDiary::note(const std::optional<Problem>& problem)
{
    reload();
    if (problem)
        problem_ = problem;
    else
        emit history_written();
    emit changed();
    return !problem;
}

bool EventDiary::write_add(const Event& event, const QString& old_id, const QString& why, QString* new_id)
{
    Event fresh = event;
    fresh.id.clear();
    const auto added = storage::EventStore(*history_).add(engine_id_.toStdString(), fresh, signature(why));
    if (!added.has_value())
        return note(added.error());
    *new_id = last_added_ = to_qstring(added.value());
    if (!old_id.isEmpty())
        renamed_.insert(newest_id(old_id), *new_id);
    return note(std::nullopt);
}

bool EventDiary::write_change(const Event& event, const QString& why)
{
    const auto written = storage::EventStore(*history_).change(event, signature(why));
    return note(written.has_value() ? std::nullopt : std::optional<Problem>(written.error()));
}

bool EventDiary::write_remove(const QString& id, const QString& why)
{
    const auto written = storage::EventStore(*history_).remove(newest_id(id).toStdString(), signature(why));
    return note(written.has_value() ? std::nullopt : std::optional<Problem>(written.error()));
}

} // namespace evenstroke
