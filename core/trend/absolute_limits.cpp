// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/trend/absolute_limits.h"

#include "core/explanation/cautions.h"
#include "core/trend/flag_text.h"

#include <algorithm>
#include <map>

namespace evenstroke {
namespace {

constexpr std::size_t quiet_readings = 6;

bool waits_for_an_answer(const Judgement& judgement, std::size_t reading, const JudgedValue& value)
{
    const Quantity& q = quantity(value.quantity);
    if ((q.hard.low && value.raw < *q.hard.low) || (q.hard.high && value.raw > *q.hard.high))
        return true;
    return std::any_of(judgement.doubts.begin(), judgement.doubts.end(), [&](const Doubt& doubt) {
        return doubt.reading == reading && doubt.verdict != Doubt::Verdict::implausible &&
               doubt.verdict != Doubt::Verdict::unsteady && doubt.verdict != Doubt::Verdict::copied &&
               (!doubt.quantity || *doubt.quantity == value.quantity) && (!doubt.place || *doubt.place == value.place);
    });
}

Flag limit_flag(const Judgement& judgement, std::size_t reading, const JudgedValue& value, const AbsoluteLimit& limit)
{
    const Engine& engine = judgement.record->engine;
    const bool above = limit.high && value.raw > *limit.high;
    const double mark = above ? *limit.high : *limit.low;
    const Quantity& q = quantity(value.quantity);
    Flag flag;
    flag.reading = reading;
    flag.subject = value.place.kind == Place::Kind::cylinder ? value.place : Place::engine();
    flag.quantity = value.quantity;
    flag.severity = Level::act;
    flag.absolute_limit = true;
    flag.since = judgement.record->readings[reading].taken_at.utc;
    flag.carrying = {reading};
    flag.sentence = limit_sentence(engine, value.place, q, value.raw, mark, above, limit.source);
    flag.first_sentence = flag.sentence;
    flag.first_quantity = flag.quantity;
    flag.next_check = "Read it again at once. Stay inside the maker's limits: reduce load if in doubt.";
    flag.cautions = cautions_for({}, q.name, engine.two_stroke());
    return flag;
}

bool beyond(const AbsoluteLimit& limit, double raw)
{
    return (limit.high && raw > *limit.high) || (limit.low && raw < *limit.low);
}

} // namespace

void add_absolute_limit_flags(Judgement& judgement)
{
    const auto& limits = judgement.record->engine.limits;
    std::map<std::pair<QuantityId, Place>, std::size_t> open; // place -> index of its flag
    for (std::size_t i = 0; i < judgement.readings.size() && !limits.empty(); ++i) {
        for (const JudgedValue& value : judgement.readings[i].values) {
            const auto limit = std::find_if(limits.begin(), limits.end(), [&](const AbsoluteLimit& l) {
                return l.quantity == quantity(value.quantity).name;
            });
            if (limit == limits.end() || !beyond(*limit, value.raw) || waits_for_an_answer(judgement, i, value))
                continue;
            const auto key = std::make_pair(value.quantity, value.place);
            const auto found = open.find(key);
            if (found != open.end() && i - judgement.flags[found->second].carrying.back() <= quiet_readings) {
                judgement.flags[found->second].carrying.push_back(i);
                continue;
            }
            open[key] = judgement.flags.size();
            judgement.flags.push_back(limit_flag(judgement, i, value, *limit));
        }
    }
    for (Flag& flag : judgement.flags)
        if (flag.absolute_limit && flag.carrying.back() + 1 == judgement.readings.size())
            flag.level_now = Level::act;
    std::stable_sort(judgement.flags.begin(), judgement.flags.end(),
                     [](const Flag& a, const Flag& b) { return a.reading < b.reading; });
}

} // namespace evenstroke
