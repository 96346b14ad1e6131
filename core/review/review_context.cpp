// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/review/review_context.h"

#include "core/trend/usual_level.h"

#include <algorithm>
#include <cmath>

namespace evenstroke::reviewing {
namespace {

constexpr double strength_of_a_note = 3.0; // as the trends' own levels take it

bool fits(const Flag& flag, Place place)
{
    return flag.subject.kind == Place::Kind::cylinder ? flag.subject == place : place.kind != Place::Kind::cylinder;
}

} // namespace

bool speaks_of(const Flag& flag, QuantityId quantity)
{
    if (flag.quantity == quantity)
        return true;
    return std::any_of(flag.moved.begin(), flag.moved.end(), [&](const MovedQuantity& moved) {
        return moved.quantity == quantity && std::abs(moved.strength) >= strength_of_a_note;
    });
}

ReviewContext::ReviewContext(const Judgement& from, std::size_t reading_index)
    : judgement(from), index(reading_index), engine(from.record->engine), reading(from.record->readings[reading_index]),
      judged(from.readings[reading_index]), baseline(engine), conditions(find_conditions(engine, reading)),
      derived(derive(engine, baseline, reading)), generating_set(is_generating_set(engine, from.record->readings))
{
    find_standing();
    find_reason_to_hold();
}

void ReviewContext::find_standing()
{
    const bool last = index + 1 == judgement.readings.size();
    for (const Flag& flag : judgement.flags) {
        const bool carried = flag.reading <= index && !flag.carrying.empty() && index <= flag.carrying.back();
        const bool passed = std::find(flag.carrying.begin(), flag.carrying.end(), index) != flag.carrying.end();
        const bool now = last ? flag.level_now >= Level::note : carried && (passed || !flag.absolute_limit);
        if (now)
            standing.push_back(&flag);
    }
}

void ReviewContext::find_reason_to_hold()
{
    if (!engine.baseline.empty()) {
        if (!conditions.load_percent)
            outside = "no load was typed";
        else if (!baseline.has_mode(conditions.mode))
            outside = "the baseline does not have this mode";
        else if (!baseline.covers(conditions.mode, *conditions.load_percent))
            outside = "outside the baseline";
    }
    held = judged.steadiness == Steadiness::unsteady ? "unsteady" : outside;
    if (held.empty() && judged.poor) // away from the baseline everything scatters
        held = "unsteady";
}

Level ReviewContext::level_of(const Flag& flag) const
{
    const bool rose = flag.raised_at && *flag.raised_at <= index && flag.level_now > flag.severity;
    return rose ? flag.level_now : flag.severity;
}

const TrendPoint* ReviewContext::point(QuantityId quantity, Place place) const
{
    const Trend* trend = judgement.find_trend(quantity, place);
    if (!trend)
        return nullptr;
    const auto found = std::find_if(trend->points.begin(), trend->points.end(),
                                    [&](const TrendPoint& one) { return one.reading == index; });
    return found == trend->points.end() ? nullptr : &*found;
}

Level ReviewContext::level(QuantityId quantity, Place place) const
{
    const Trend* trend = judgement.find_trend(quantity, place);
    Level level = trend ? trend->level : Level::no_data;
    if (trend && index + 1 < judgement.readings.size() && level != Level::no_data) {
        const TrendPoint* here = point(quantity, place);
        const auto usable = std::count_if(trend->points.begin(), trend->points.end(), [&](const TrendPoint& one) {
            return here && one.reading <= index && one.stretch == here->stretch && !one.unsteady && !one.doubtful;
        });
        level = usable < trend->needed ? Level::learning : Level::quiet;
    }
    for (const Flag* flag : standing) {
        if (!fits(*flag, place) || !speaks_of(*flag, quantity))
            continue;
        level = std::max(level, flag->quantity == quantity ? level_of(*flag) : Level::note);
    }
    if (held.empty())
        return level;
    // A limit of the maker speaks whatever the reading is worth.
    const bool limit = std::any_of(standing.begin(), standing.end(), [&](const Flag* flag) {
        return flag->absolute_limit && fits(*flag, place) && flag->quantity == quantity;
    });
    return limit ? level : Level::no_data;
}

ReviewContext::AgainstUsual ReviewContext::against_usual(QuantityId quantity, Place place) const
{
    const auto usual = usual_level(judgement, index, quantity, place);
    if (!usual)
        return {};
    return {usual->from_usual(), usual->value > usual->high ? "high" : usual->value < usual->low ? "low" : "usual"};
}

std::vector<const JudgedValue*> ReviewContext::values(std::string_view name) const
{
    std::vector<const JudgedValue*> found;
    for (const JudgedValue& value : judged.values)
        if (quantity(value.quantity).name == name)
            found.push_back(&value);
    return found;
}

bool ReviewContext::ever_read(std::string_view name) const
{
    const auto& readings = judgement.record->readings;
    return std::any_of(readings.begin(), readings.end(), [&](const Reading& one) {
        return std::any_of(one.values.begin(), one.values.end(), [&](const Value& value) {
            return value.number && quantity(value.quantity).name == name;
        });
    });
}

} // namespace evenstroke::reviewing
