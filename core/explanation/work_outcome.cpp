// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/explanation/work_outcome.h"

#include "core/explanation/event_effect.h"
#include "core/reading/typed_number.h"
#include "core/sentence_words.h"
#include "core/trend/drift_input.h"
#include "core/trend/flag_text.h"
#include "core/trend/robust.h"

#include <algorithm>
#include <cmath>
#include <optional>
#include <vector>

namespace evenstroke {
namespace {

/// Of the change before the work: a repeated reading scatters, and half mended is worth no such word. Common practice, no source.
constexpr double still_there = 0.6;
constexpr std::size_t level_of = 12, last_before = 3; ///< readings

std::string work_words(const Event& event, const Engine& engine)
{
    return event_words(event, event.place.kind == Place::Kind::cylinder ? " of " + place_words(engine, event.place) : "");
}

struct Outcome
{
    double before = 0.0, after = 0.0; ///< from the level before the change
    std::size_t readings = 0;         ///< since the work
};

std::optional<double> middle_of(std::vector<double> values)
{
    return values.empty() ? std::nullopt : std::optional(drift::median_in_place(values));
}

std::optional<Outcome> outcome_of(const Trend& trend, const Flag& flag, std::size_t first_after)
{
    const std::size_t onset = flag.carrying.front();
    const auto at_flag = std::find_if(trend.points.begin(), trend.points.end(),
                                      [&](const TrendPoint& one) { return one.reading == flag.reading; });
    if (at_flag == trend.points.end())
        return std::nullopt;
    std::vector<double> level, before, after;
    double surely = 0.0; // the widest of the ± since
    for (const TrendPoint& point : trend.points) {
        if (!point.apart || point.unsteady || point.doubtful)
            continue;
        if (point.reading >= first_after) {
            after.push_back(*point.apart);
            surely = std::max(surely, point.uncertainty.value_or(0.0));
        } else if (point.reading >= onset) {
            before.push_back(*point.apart);
        } else if (point.stretch == at_flag->stretch) {
            level.push_back(*point.apart);
        }
    }
    if (static_cast<int>(after.size()) >= trend.needed)
        return std::nullopt; // its usual level is learned anew by now
    Outcome outcome;
    outcome.readings = after.size();
    level.erase(level.begin(), level.end() - static_cast<std::ptrdiff_t>(std::min(level.size(), level_of)));
    before.erase(before.begin(), before.end() - static_cast<std::ptrdiff_t>(std::min(before.size(), last_before)));
    const auto usual = middle_of(std::move(level)), then = middle_of(std::move(before)), now = middle_of(std::move(after));
    if (!usual || !then || !now)
        return std::nullopt;
    outcome.before = *then - *usual;
    outcome.after = *now - *usual;
    const bool same = outcome.before * outcome.after > 0.0 && std::abs(outcome.after) >= still_there * std::abs(outcome.before);
    return same && std::abs(outcome.after) > surely ? std::optional(outcome) : std::nullopt;
}

std::string outcome_sentence(const Judgement& judgement, const Flag& flag, const Event& work, const Outcome& outcome)
{
    const Engine& engine = judgement.record->engine;
    const Quantity& q = quantity(flag.quantity);
    const std::string symbol = unit_behind(q.unit), in = symbol.empty() ? "" : " " + symbol;
    return subject_text(engine, flag.subject) + " " + lower_first(q.title) + " reads as before (" + event_words(work) + "): " +
           two_digits(std::abs(outcome.after)) + in + (outcome.after < 0.0 ? " below" : " above") + " its earlier level, " +
           two_digits(std::abs(outcome.before)) + " before the work (" + std::to_string(outcome.readings) +
           (outcome.readings == 1 ? " reading" : " readings") + " since). Look again before that counts as usual.";
}

/// The first work at the flag's cylinder after it was raised that a reading has followed.
const Event* work_that_closed(const EngineRecord& record, const Flag& flag)
{
    for (const Event& event : record.events) {
        const std::size_t first_after = first_reading_after(record, event);
        if (event.place == flag.subject && starts_anew(event) && first_after > flag.reading && first_after < record.readings.size())
            return &event;
    }
    return nullptr;
}

} // namespace

std::string work_not_read_yet(const Judgement& judgement)
{
    if (!judgement.record || judgement.record->readings.empty())
        return {};
    const EngineRecord& record = *judgement.record;
    std::vector<std::string> works;
    for (const Event& event : record.events)
        if (starts_anew(event) && first_reading_after(record, event) >= record.readings.size())
            works.push_back(work_words(event, record.engine));
    return works.empty() ? std::string()
                         : "Entered since the newest reading: " + and_list(works) + ". What stands here is from before " +
                               (works.size() == 1 ? "it." : "that.");
}

std::string work_without_effect(const Judgement& judgement, const Flag& flag)
{
    if (!judgement.record || flag.subject.kind != Place::Kind::cylinder || flag.absolute_limit || flag.severity < Level::watch ||
        flag.carrying.empty())
        return {};
    const Event* work = work_that_closed(*judgement.record, flag);
    const Trend* trend = judgement.find_trend(flag.quantity, flag.subject);
    const auto outcome = work && trend ? outcome_of(*trend, flag, first_reading_after(*judgement.record, *work)) : std::nullopt;
    return outcome ? outcome_sentence(judgement, flag, *work, *outcome) : std::string();
}

std::string work_without_effect(const Judgement& judgement, Place subject)
{
    std::string text;
    for (const Flag& flag : judgement.flags)
        if (subject.kind != Place::Kind::cylinder || flag.subject == subject)
            if (const std::string sentence = work_without_effect(judgement, flag); !sentence.empty())
                text += (text.empty() ? "" : " ") + sentence;
    return text;
}

} // namespace evenstroke
