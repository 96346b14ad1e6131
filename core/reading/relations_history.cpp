// SPDX-License-Identifier: GPL-3.0-or-later
// Relations of a reading with the clock and with the readings before it.
#include "core/reading/relations_detail.h"

#include <algorithm>

namespace evenstroke::relations_detail {
namespace {

/// Fewer common boxes than this can agree by chance, more than half of them cannot. Invented.
constexpr int boxes_needed = 8;
/// Counters are read to the hour.
constexpr double counter_room_hours = 1.0;

void check_time(const Reading& reading, const ReadingContext& context, std::vector<Relation>& found)
{
    const TimePoint taken = reading.taken_at.utc;
    if (context.now && taken > *context.now)
        found.push_back({"time_in_future",
                         "The reading's time, " + utc_text(taken) +
                             ", is still to come. Check date, hour and the "
                             "ship's offset from UTC.",
                         {},
                         false});
    if (context.earlier.empty())
        return;
    const TimePoint before = context.earlier.back().taken_at.utc;
    if (taken < before)
        found.push_back({"time_before_previous",
                         "The reading's time, " + utc_text(taken) + ", lies before the last one's, " +
                             utc_text(before) + ". Check date, hour and the ship's offset from UTC.",
                         {},
                         false});
}

bool counter_changed_between(const ReadingContext& context, TimePoint from, TimePoint to)
{
    return std::any_of(context.events.begin(), context.events.end(), [&](const Event& event) {
        // An event dated to the day counts for the whole day.
        const auto end = event.date.utc + (event.date_only ? std::chrono::hours(24) : std::chrono::hours(0));
        return event.kind == "counter_changed" && end >= from && event.date.utc <= to;
    });
}

void check_running_hours(const Numbers& numbers, const ReadingContext& context, std::vector<Relation>& found)
{
    const QuantityId hours_id = id_of("engine_running_hours", Place::Kind::engine);
    const auto hours = numbers.at(hours_id, Place::engine());
    if (!hours)
        return;
    for (auto earlier = context.earlier.rbegin(); earlier != context.earlier.rend(); ++earlier) {
        const auto before = Numbers(*earlier).at(hours_id, Place::engine());
        if (!before)
            continue;
        const TimePoint then = earlier->taken_at.utc, now = numbers.reading().taken_at.utc;
        if (counter_changed_between(context, then, now))
            return;
        const double passed =
            std::chrono::duration_cast<std::chrono::duration<double, std::ratio<3600>>>(now - then).count();
        const std::string since = " since " + short_date(then);
        if (*hours < *before)
            found.push_back({"running_hours_fell",
                             "Running hours went down from " + plain_number(*before, 0) + " to " +
                                 plain_number(*hours, 0) + since +
                                 ". If the counter was changed, enter that as an event; else read it again.",
                             {{hours_id, Place::engine()}},
                             false});
        else if (passed >= 0.0 && *hours - *before > passed + counter_room_hours)
            found.push_back({"running_hours_too_many",
                             "Running hours grew by " + plain_number(*hours - *before, 0) + " h" + since +
                                 ", but only " + plain_number(passed, 0) +
                                 " h have passed. Read the counter again, or enter its change as an event.",
                             {{hours_id, Place::engine()}},
                             true});
        return;
    }
}

/// Weather and settings may well stay as they were; a copied sheet agrees in most of its boxes.
void check_copied(const Numbers& numbers, const ReadingContext& context, std::vector<Relation>& found)
{
    if (context.earlier.empty())
        return;
    const Reading& last = context.earlier.back();
    int common = 0, equal = 0;
    for (const Value& value : numbers.reading().values) {
        // What the ship shares is carried over to every engine by the program itself.
        if (value.phase != Phase::reading || !value.value_si || value.place.kind == Place::Kind::ship)
            continue;
        const Value* before = last.find(value.quantity, value.place);
        if (!before || !before->value_si)
            continue;
        ++common;
        equal += *before->value_si == *value.value_si ? 1 : 0;
    }
    if (common < boxes_needed || 2 * equal <= common)
        return;
    found.push_back({"copied_from_previous",
                     std::to_string(equal) + " of " + std::to_string(common) +
                         " values are the same to the last digit as on " + short_date(last.taken_at.utc) +
                         ". Was last time's sheet copied?",
                     {},
                     false});
}

} // namespace

void check_against_earlier(const Numbers& numbers, const ReadingContext& context,
                           std::vector<Relation>& found)
{
    check_time(numbers.reading(), context, found);
    check_running_hours(numbers, context, found);
    check_copied(numbers, context, found);
}

} // namespace evenstroke::relations_detail
