// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/trend/limits_ahead.h"

#include "core/trend/drift_results.h"
#include "core/trend/flag_text.h"

#include <algorithm>
#include <cmath>

namespace evenstroke {
namespace {

/// What the engine reads at the usual service load (75 %, common practice): there customary limits given in
/// per cent, or for a deviation in per cent, are converted.
std::optional<double> expected_in_service(const Baseline& baseline, const std::string& quantity_name)
{
    constexpr double service_load = 75.0;
    const BaselineCurve* curve = baseline.curve("", quantity_name);
    return curve ? curve->at(service_load) : std::nullopt;
}

/// One unit of the limit in units of the deviation.
std::optional<double> conversion(const drift::CustomaryLimit& limit, const drift::CatalogueChannel& channel,
                                 const Baseline& baseline)
{
    if (limit.unit == channel.unit)
        return 1.0;
    const auto expected = expected_in_service(baseline, channel.quantity);
    if (!expected || !(*expected > 0.0))
        return std::nullopt;
    if (limit.unit == "% of expected")
        return *expected / 100.0;
    if (limit.unit == "% of absolute")
        return (*expected + 1.0) / 100.0; // bar gauge; 1 bar of air is near enough for a custom
    return channel.form == drift::DeviationForm::percent ? std::optional(100.0 / *expected) : std::nullopt;
}

const AbsoluteLimit* find_own_limit(const Engine& engine, std::string_view quantity_name)
{
    const auto found = std::find_if(engine.limits.begin(), engine.limits.end(),
                                    [&](const AbsoluteLimit& limit) { return limit.quantity == quantity_name; });
    return found == engine.limits.end() ? nullptr : &*found;
}

void enter(std::vector<std::optional<double>>& marks, std::size_t reading, std::size_t readings, double deviation)
{
    marks.resize(readings);
    marks[reading] = deviation;
}

std::string own_limit_text(const Engine& engine, const Quantity& q, bool rising)
{
    const AbsoluteLimit* limit = find_own_limit(engine, q.name);
    const auto mark = !limit ? std::nullopt : rising ? limit->high : limit->low;
    if (!mark)
        return "the engine's own limit";
    return "the engine's own limit of " + two_digits(*mark) + " " + std::string(unit(q.unit).symbol) +
           (limit->source.empty() ? "" : " (" + limit->source + ")");
}

std::string customary_text(double distance, const std::string& symbol)
{
    return "the customary limit (not the maker's), " + two_digits(std::abs(distance)) +
           (symbol.empty() || symbol == "1" ? "" : " " + symbol) + (distance > 0.0 ? " above" : " below") +
           " its earlier level";
}

} // namespace

drift::Marks customary_marks(const Engine& engine, const Baseline& baseline, const drift::CatalogueChannel& channel)
{
    drift::Marks marks;
    const auto* limit = drift::find_customary_limit(channel.quantity, channel.subject, engine.two_stroke());
    const auto factor = limit ? conversion(*limit, channel, baseline) : std::nullopt;
    if (!factor)
        return marks;
    if (limit->rise)
        marks.allowed_rise = *factor * *limit->rise;
    if (limit->fall)
        marks.allowed_fall = *factor * *limit->fall;
    return marks;
}

void add_own_marks(drift::Marks& marks, const Engine& engine, std::string_view quantity_name, std::size_t reading,
                   std::size_t readings, const DeviationForm& form)
{
    const AbsoluteLimit* limit = find_own_limit(engine, quantity_name);
    if (!limit || !(form.scale > 0.0))
        return;
    if (limit->high)
        enter(marks.own_high, reading, readings, form.of(*limit->high));
    if (limit->low)
        enter(marks.own_low, reading, readings, form.of(*limit->low));
}

namespace {

struct Leading
{
    std::size_t channel;
    std::optional<std::size_t> cylinder;
    std::size_t reading, onset;
    QuantityId quantity;
    bool rising, percent;
};

std::optional<TimeToLimit> find_limit_ahead(const Engine& engine, const drift::Input& input, const drift::Output& output,
                                            const Leading& of)
{
    const auto mark = drift::mark_ahead(input, output, of.channel, of.cylinder, of.reading, of.onset, of.rising);
    const auto found =
        mark ? drift::time_to_limit(input, output, of.channel, of.cylinder, of.reading, mark->distance) : std::nullopt;
    if (!found)
        return std::nullopt;
    const Quantity& q = quantity(of.quantity);
    const std::string symbol = of.percent ? "%" : std::string(unit(q.unit).symbol);
    return TimeToLimit{mark->distance,
                       mark->own ? own_limit_text(engine, q, of.rising) : customary_text(mark->distance, symbol),
                       found->months_5, found->months_50, found->months_95};
}

} // namespace

std::optional<TimeToLimit> limit_ahead(const Engine& engine, const drift::Input& input, const drift::Output& output,
                                       const Flag& flag, const drift::Flag& from)
{
    if (!flag.ramp || flag.severity == Level::ask)
        return std::nullopt;
    const auto leading = std::find_if(from.now.changes.begin(), from.now.changes.end(), [&](const auto& change) {
        return drift_quantity(change.quantity) == flag.quantity;
    });
    if (leading == from.now.changes.end())
        return std::nullopt;
    return find_limit_ahead(engine, input, output,
                            {drift::channel_of(input, output, leading->quantity, from.cylinder.has_value()), from.cylinder,
                             from.last_reading, from.now.onset, flag.quantity, leading->size > 0.0,
                             !flag.moved.empty() && flag.moved.front().percent});
}

std::optional<TimeToLimit> limit_ahead_of(const Engine& engine, const drift::Input& input, const drift::Output& output,
                                          std::optional<std::size_t> cylinder, std::size_t reading, std::size_t onset,
                                          const MovedQuantity& moved)
{
    const std::string& name = quantity(moved.quantity).name;
    const std::size_t channels = cylinder ? input.channels.size() : output.engine_quantities.size();
    std::size_t channel = drift::channel_of(input, output, name, cylinder.has_value());
    if (channel >= channels && !cylinder)
        channel = drift::channel_of(input, output, "median " + name, false);
    if (channel >= channels)
        return std::nullopt;
    return find_limit_ahead(engine, input, output,
                            {channel, cylinder, reading, onset, moved.quantity, moved.amount > 0.0, moved.percent});
}

} // namespace evenstroke
