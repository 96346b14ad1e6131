// SPDX-License-Identifier: GPL-3.0-or-later
// How a session writes: drafts at every change, closing, corrections.
#include "app/entry/entry_session.h"

#include "app/desk/number_text.h"
#include "app/desk/workplace.h"
#include "app/entry/reading_name.h"
#include "app/entry/unreadable_texts.h"
#include "storage/preference_store.h"

namespace evenstroke {
namespace {

using storage::Owner;

/// From so many changed values on, the whole draft is written in one transaction.
constexpr std::size_t written_one_by_one = 4;

Value value_or_empty(const std::vector<Value>& values, const LogBox& box)
{
    for (const Value& value : values)
        if (box_of(value) == box)
            return value;
    return without_value(box, MissingReason::none);
}

} // namespace

void EntrySession::remember(const LogBox& box, EntrySheet::Owner owner)
{
    if (state_ != State::writing && state_ != State::correcting)
        return;
    (owner == EntrySheet::Owner::ship ? waiting_ship_ : waiting_reading_).insert(box);
    write_soon_.start();
}

/// Texts that cannot be read wait in the history beside their draft: no value, and yet typed.
void EntrySession::keep_unreadable(const std::string& reading_id, const std::map<LogBox, QString>& texts)
{
    if ((state_ != State::writing && state_ != State::correcting) || !workplace_.history() ||
        workplace_.read_only())
        return;
    storage::PreferenceStore preferences(*workplace_.history());
    const auto kept = preferences.set_choice(
        to_std(engine_id_), unreadable_choice(reading_id),
        texts.empty() ? std::nullopt : std::optional(to_std(write_unreadable(texts))));
    if (!kept)
        failed(kept.error());
}

storage::Signature EntrySession::signed_by() const
{
    storage::Signature by = signature_;
    const auto taken_by = find_quantity("recorded_by", Place::Kind::engine);
    const Value* name = taken_by ? sheet_.reading().find(*taken_by, Place::engine()) : nullptr;
    if (by.who.empty() && name)
        by.who = name->words.empty() ? name->typed : name->words;
    if (by.who.empty())
        by.who = to_std(tr("not named"));
    return by;
}

bool EntrySession::flush()
{
    write_soon_.stop();
    if (!waits())
        return true;
    if (!workplace_.history() || workplace_.read_only())
        return false;
    const bool written = state_ == State::correcting ? write_corrections() : make_drafts() && write_drafts();
    if (!written)
        return false;
    problem_.reset();
    saved_at_ = QDateTime::currentDateTime();
    emit changed();
    return true;
}

/// The history holds no empty drafts: they are made with their first value.
bool EntrySession::make_drafts()
{
    const StampedTime time = sheet_.reading().taken_at;
    if (sheet_.reading().id.empty()) {
        const Owner owner = Owner::engine(to_std(engine_id_));
        const auto draft =
            store().make_draft(owner, free_name(store().list(owner), time, {}), time, signed_by());
        if (!draft)
            return failed(draft.error());
        if (!sheet_.unreadable().empty()) { // they waited on a sheet that had no place in the history yet
            keep_unreadable({}, {});
            keep_unreadable(draft.value().id, sheet_.unreadable());
        }
        sheet_.set_head(draft.value().id, draft.value().name, time);
    }
    if (ship_reading_id_.empty() && !waiting_ship_.empty()) {
        const Owner owner = Owner::vessel(to_std(vessel_id_));
        const auto draft =
            store().make_draft(owner, free_name(store().list(owner), time, {}), time, signed_by());
        if (!draft)
            return failed(draft.error());
        ship_reading_id_ = draft.value().id;
        ship_taken_at_ = time.utc;
    }
    return true;
}

bool EntrySession::write_drafts()
{
    const auto write = [this](const std::string& id, const Reading& whole, std::set<LogBox>& waiting) {
        if (waiting.size() > written_one_by_one) {
            const auto saved = store().save_draft(whole);
            if (!saved)
                return failed(saved.error());
        } else {
            for (const LogBox& box : waiting) {
                const auto saved = store().save_value(id, value_or_empty(whole.values, box));
                if (!saved)
                    return failed(saved.error());
            }
        }
        waiting.clear();
        return true;
    };
    if (!waiting_ship_.empty()) {
        auto ship = store().reading(ship_reading_id_);
        if (!ship)
            return failed(ship.error());
        ship.value().values = sheet_.ship_values();
        if (!write(ship_reading_id_, ship.value(), waiting_ship_))
            return false;
    }
    return write(sheet_.reading().id, sheet_.reading(), waiting_reading_);
}

bool EntrySession::write_corrections()
{
    if (signature_.who.empty() || signature_.why.empty())
        return failed(
            invalid_input(to_std(tr("The correction is not kept yet: it needs a name and a reason.")),
                          to_std(tr("Write both above the sheet, or take the change back with Ctrl+Z."))));
    const std::string id = sheet_.reading().id;
    if (waiting_time_) {
        const auto redated = store().correct_time(id, sheet_.reading().taken_at, signature_);
        if (!redated)
            return failed(redated.error());
        waiting_time_ = false;
    }
    while (!waiting_reading_.empty()) {
        const LogBox box = *waiting_reading_.begin();
        if (!write_correction(box))
            return false;
        waiting_reading_.erase(box);
    }
    const auto reading = store().reading(id);
    if (reading)
        stored_ = reading.value();
    workplace_.changed();
    return true;
}

bool EntrySession::write_correction(const LogBox& box)
{
    const std::string id = sheet_.reading().id;
    const Value now = value_or_empty(sheet_.reading().values, box),
                before = value_or_empty(stored_.values, box);
    Value with_old_answer = now;
    with_old_answer.confirmed = before.confirmed;
    if (!same_value(with_old_answer, before)) {
        const auto corrected = store().correct(id, now, signature_);
        if (!corrected)
            return failed(corrected.error());
    }
    if (now.confirmed == before.confirmed)
        return true;
    const auto confirmed =
        store().set_confirmed(id, {box.quantity, box.place, box.phase}, now.confirmed, signature_);
    return confirmed ? true : failed(confirmed.error());
}

std::optional<Problem> EntrySession::withdraw()
{
    if (signature_.who.empty() || signature_.why.empty())
        return invalid_input(to_std(tr("The reading is not withdrawn: that needs a name and a reason.")),
                             to_std(tr("Write both above the sheet, then withdraw it.")));
    waiting_reading_.clear();
    waiting_time_ = false;
    if (const auto gone = store().withdraw(sheet_.reading().id, signature_); !gone)
        return gone.error();
    workplace_.changed();
    begin_new();
    return std::nullopt;
}

std::optional<Problem> EntrySession::bring_back(const QString& reading_id, const storage::Signature& by)
{
    if (const auto back = store().restore(to_std(reading_id), by); !back)
        return back.error();
    workplace_.changed();
    emit changed();
    return std::nullopt;
}

std::optional<Problem> EntrySession::close(const QString& why)
{
    if (!flush() && problem_)
        return problem_;
    if (const auto stands_in_the_way = find_problem_with_closing(sheet_.reading()))
        return stands_in_the_way;
    const storage::Signature by = signed_by();
    if (!ship_reading_id_.empty() && !sheet_.ship_values().empty()) {
        const auto ship = store().reading(ship_reading_id_);
        if (ship && !ship.value().closed)
            if (const auto closed = store().close(ship_reading_id_, by); !closed)
                return closed.error();
    }
    storage::Signature with_reason = by;
    if (!why.isEmpty())
        with_reason.why = to_std(why);
    if (const auto closed = store().close(sheet_.reading().id, with_reason); !closed)
        return closed.error();
    state_ = State::closed;
    undo_.clear();
    workplace_.changed();
    emit changed();
    return std::nullopt;
}

std::optional<Problem> EntrySession::discard()
{
    waiting_reading_.clear();
    waiting_ship_.clear();
    keep_unreadable(sheet_.reading().id, {});
    if (!sheet_.reading().id.empty()) {
        const auto gone = store().discard_draft(sheet_.reading().id, signed_by());
        if (!gone)
            return gone.error();
    }
    begin_new();
    return std::nullopt;
}

} // namespace evenstroke
