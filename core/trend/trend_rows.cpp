// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/trend/trend_rows.h"

#include "core/trend/drift_catalogue.h"
#include "core/trend/drift_results.h"
#include "core/trend/robust.h"

#include <algorithm>
#include <cmath>
#include <map>

namespace evenstroke {
namespace {

constexpr std::size_t level_window = 12; ///< values that the band's middle is learned from
constexpr double band_in_noise = 2.0;    ///< about 95 of 100 sound values

bool is_trended(const Quantity& q) { return q.group != "ship_weather" && q.group != "heading"; }

TrendPoint make_point(std::size_t reading, const JudgedValue& value)
{
    TrendPoint point;
    point.reading = reading;
    point.raw = value.raw;
    point.corrected = value.corrected;
    point.expected = value.expected;
    point.deviation = value.deviation;
    point.apart = value.apart;
    point.uncertainty = value.uncertainty;
    point.doubtful = value.doubtful;
    return point;
}

using TrendMap = std::map<std::pair<QuantityId, Place>, Trend>;

TrendMap gather(const Judgement& judgement)
{
    TrendMap trends;
    for (const ReadingJudgement& reading : judgement.readings)
        for (const JudgedValue& value : reading.values) {
            if (!is_trended(quantity(value.quantity)))
                continue;
            Trend& trend = trends[{value.quantity, value.place}];
            trend.points.push_back(make_point(reading.reading, value));
        }
    return trends;
}

/// A derived quantity is doubted where a value that it rests on is.
bool rests_on_doubted(const Judgement& judgement, std::size_t reading, const DerivedQuantity& quantity_of, Place place)
{
    const auto& values = judgement.readings[reading].values;
    return std::any_of(values.begin(), values.end(), [&](const JudgedValue& value) {
        const bool elsewhere = value.place.kind == Place::Kind::cylinder && value.place != place;
        return value.doubtful && !elsewhere &&
               std::find(quantity_of.inputs.begin(), quantity_of.inputs.end(), quantity(value.quantity).name) !=
                   quantity_of.inputs.end();
    });
}

TrendPoint derived_point(std::size_t reading, const DerivedValue& row)
{
    TrendPoint point;
    point.reading = reading;
    point.raw = row.value;
    if (has_correction(*find_derived(row.quantity)))
        point.corrected = row.compared;
    point.expected = row.expected;
    if (row.compared && row.expected)
        point.deviation = *row.compared - *row.expected;
    return point;
}

/// Apart of the cylinders of one reading, as judge_values sets typed ones apart.
void set_apart(std::vector<std::pair<Trend*, std::optional<double>>>& row)
{
    for (const auto& [trend, own] : row) {
        std::vector<double> others;
        for (const auto& [other, compared] : row)
            if (other != trend && compared)
                others.push_back(*compared);
        if (own && !others.empty())
            trend->points.back().apart = *own - drift::median_in_place(others);
    }
    row.clear();
}

void add_derived(TrendMap& trends, const Judgement& judgement, const std::vector<PreparedReading>& prepared)
{
    std::vector<std::pair<Trend*, std::optional<double>>> row_of_cylinders;
    for (std::size_t i = 0; i < prepared.size(); ++i) {
        const auto& values = judgement.readings[i].values;
        const bool any_doubt = std::any_of(values.begin(), values.end(), [](const JudgedValue& value) { return value.doubtful; });
        QuantityId id = -1;
        for (const DerivedValue& row : prepared[i].derived) {
            if (row.id != id)
                set_apart(row_of_cylinders);
            id = row.id;
            Trend& trend = trends[{row.id, row.place}];
            trend.points.push_back(derived_point(i, row));
            trend.points.back().doubtful = any_doubt && rests_on_doubted(judgement, i, *find_derived(row.quantity), row.place);
            if (row.place.kind == Place::Kind::cylinder)
                row_of_cylinders.emplace_back(&trend, trend.points.back().deviation ? trend.points.back().deviation : row.compared);
        }
        set_apart(row_of_cylinders);
    }
}

/// What the drift method knows of one trend's cells.
struct CellsOfTrend
{
    std::vector<const drift::CellResult*> at; ///< one a reading
    bool percent = false;
};

CellsOfTrend find_cells(const Trend& trend, const drift::Input& input, const drift::Output& output)
{
    CellsOfTrend found;
    const std::size_t readings = input.readings();
    if (trend.place.kind == Place::Kind::cylinder) {
        for (std::size_t k = 0; k < input.channels.size(); ++k) {
            if (drift_quantity(input.channels[k].quantity) != trend.quantity)
                continue;
            const std::size_t j = static_cast<std::size_t>(trend.place.number) - 1;
            for (std::size_t i = 0; i < readings; ++i)
                found.at.push_back(&output.cells[k][i * input.cylinders + j]);
            const auto* channel = drift::find_channel(input.channels[k].quantity, drift::Subject::cylinder);
            found.percent = channel && channel->form == drift::DeviationForm::percent;
        }
        return found;
    }
    // Of several turbochargers the engine's mean is judged: of a derived one, that alone.
    const bool part_of_mean = quantity(trend.quantity).derived() && trend.place != Place::engine();
    for (std::size_t k = 0; k < input.engine_channels.size() && !part_of_mean; ++k) {
        if (input.engine_channels[k].quantity != quantity(trend.quantity).name)
            continue;
        for (std::size_t i = 0; i < readings; ++i)
            found.at.push_back(&output.engine_cells[k][i]);
        const auto* channel = drift::find_channel(input.engine_channels[k].quantity, drift::Subject::engine);
        found.percent = channel && channel->form == drift::DeviationForm::percent;
    }
    return found;
}

/// The first reading of a standing flag's change on this trend: the band stays at the level before it. Of a cylinder that
/// holds for all its quantities: what follows a fault slowly must not become usual on the way (a compression ratio beside
/// the compression pressure that it is made of).
std::optional<std::size_t> standing_onset(const Judgement& judgement, const Trend& trend)
{
    const bool of_cylinder = trend.place.kind == Place::Kind::cylinder;
    const Place subject = of_cylinder ? trend.place : Place::engine();
    std::optional<std::size_t> of_another;
    for (const Flag* flag : judgement.standing_flags()) {
        if (flag->subject != subject || flag->absolute_limit || flag->severity == Level::ask || flag->carrying.empty())
            continue;
        for (const MovedQuantity& moved : flag->moved)
            if (moved.quantity == trend.quantity)
                return flag->carrying.front();
        if (of_cylinder && !of_another)
            of_another = flag->carrying.front();
    }
    return of_another;
}

/// A quantity of the engine that is judged although no baseline speaks of it (the difference over the coolant
/// hardly depends on the load) is compared with its own usual level.
bool judged_by_own_level(const Trend& trend, const CellsOfTrend& cells)
{
    return trend.place.kind != Place::Kind::cylinder && !cells.at.empty()
           && std::none_of(trend.points.begin(), trend.points.end(), [](const TrendPoint& point) { return point.expected; });
}

void compare_with_own_level(Trend& trend, double level)
{
    trend.own_level = true;
    for (TrendPoint& point : trend.points) {
        point.expected = level;
        point.deviation = point.corrected.value_or(point.raw) - level;
    }
}

void set_band(Trend& trend, const CellsOfTrend& cells, std::optional<std::size_t> onset)
{
    const bool own_level = judged_by_own_level(trend, cells);
    std::vector<double> level;
    // A change that began before the present stretch is shown against the level before it.
    std::size_t first = trend.current_start.value_or(0);
    if (onset && *onset <= first)
        first = 0;
    for (const TrendPoint& point : trend.points) {
        if (point.reading < first)
            continue;
        if (point.unsteady || point.doubtful || (onset && point.reading >= *onset))
            continue;
        const auto value = trend.place.kind == Place::Kind::cylinder ? point.apart
                           : own_level ? std::optional(point.corrected.value_or(point.raw)) : point.deviation;
        if (value)
            level.push_back(*value);
    }
    if (level.size() > level_window)
        level.erase(level.begin(), level.end() - static_cast<std::ptrdiff_t>(level_window));
    const std::size_t count = level.size();
    auto middle = drift::median(std::move(level));
    if (!middle || count < 2 || cells.at.empty())
        return;
    if (own_level) {
        compare_with_own_level(trend, *middle);
        middle = 0.0;
    }
    double noise = cells.at.back()->noise;
    if (cells.percent) {
        const auto& expected = trend.points.back().expected;
        noise *= std::abs(expected.value_or(trend.points.back().raw)) / 100.0;
    }
    if (!(noise > 0.0))
        return;
    trend.noise = noise;
    trend.usual_low = *middle - band_in_noise * noise;
    trend.usual_high = *middle + band_in_noise * noise;
}

void apply_cells(Trend& trend, const CellsOfTrend& cells, const Judgement& judgement)
{
    std::optional<std::size_t> start;
    int stretch = 0;
    for (TrendPoint& point : trend.points) {
        const ReadingJudgement& reading = judgement.readings[point.reading];
        point.unsteady = reading.poor || reading.steadiness == Steadiness::unsteady;
        if (point.reading >= cells.at.size())
            continue;
        const drift::CellResult& cell = *cells.at[point.reading];
        point.doubtful = point.doubtful || cell.doubtful;
        if (start && *start != cell.segment_start)
            ++stretch;
        start = cell.segment_start;
        point.stretch = stretch;
    }
    if (cells.at.empty())
        return;
    trend.current_start = cells.at.back()->segment_start;
    trend.learned = static_cast<int>(cells.at.back()->usable);
}

void mark_doubtful_values(Judgement& judgement)
{
    for (const Doubt& doubt : judgement.doubts) {
        if (doubt.verdict == Doubt::Verdict::unsteady || doubt.verdict == Doubt::Verdict::copied)
            continue;
        for (JudgedValue& value : judgement.readings[doubt.reading].values) {
            const bool quantity_fits = !doubt.quantity || *doubt.quantity == value.quantity;
            const bool place_fits = !doubt.place || *doubt.place == value.place;
            if (quantity_fits && place_fits && (doubt.quantity || value.place.kind == Place::Kind::cylinder))
                value.doubtful = true;
        }
    }
}

} // namespace

void add_trends(Judgement& judgement, const std::vector<PreparedReading>& prepared,
                const drift::Input& input, const drift::Output& output)
{
    mark_doubtful_values(judgement);
    TrendMap trends = gather(judgement);
    add_derived(trends, judgement, prepared);
    for (auto& [key, trend] : trends) {
        trend.quantity = key.first;
        trend.place = key.second;
        const CellsOfTrend cells = find_cells(trend, input, output);
        apply_cells(trend, cells, judgement);
        set_band(trend, cells, standing_onset(judgement, trend));
        trend.level = cells.at.empty()                  ? Level::no_data
                      : trend.learned < trend.needed    ? Level::learning
                                                        : Level::quiet;
        judgement.trends.push_back(std::move(trend));
    }
}

void set_levels(Judgement& judgement, const drift::Input& input, const drift::Output& output)
{
    const auto raise = [&](QuantityId id, Place subject, Level level) {
        for (Trend& trend : judgement.trends) {
            const bool fits = subject.kind == Place::Kind::cylinder ? trend.place == subject
                                                                    : trend.place.kind != Place::Kind::cylinder;
            if (trend.quantity == id && fits)
                trend.level = std::max(trend.level, level);
        }
    };
    for (const Flag* flag : judgement.standing_flags()) {
        raise(flag->quantity, flag->subject, flag->level_now);
        if (flag->severity == Level::ask)
            continue;
        for (const MovedQuantity& moved : flag->moved)
            if (moved.quantity != flag->quantity && std::abs(moved.strength) >= 3.0)
                raise(moved.quantity, flag->subject, Level::note);
    }
    const std::size_t readings = input.readings();
    for (std::size_t j = 0; readings > 0 && j < input.cylinders && !output.cylinders.empty(); ++j) {
        const drift::SubjectResult& last = output.cylinders[(readings - 1) * input.cylinders + j];
        if (last.level == drift::Level::note && !last.is_signature && !last.candidate.empty())
            raise(drift_quantity(last.candidate), Place::cylinder(static_cast<int>(j) + 1), Level::note);
    }
    for (const Trend& trend : judgement.trends)
        judgement.level = std::max(judgement.level, trend.level);
    for (const Flag* flag : judgement.standing_flags())
        judgement.level = std::max(judgement.level, flag->level_now);
}

} // namespace evenstroke
