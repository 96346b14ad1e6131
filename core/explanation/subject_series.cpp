// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/explanation/subject_series.h"

#include "core/reading/steadiness.h"
#include "core/trend/common_mode.h"
#include "core/trend/deviations.h"
#include "core/trend/drift_input.h"
#include "core/trend/robust.h"
#include "core/trend/work_marks.h"

#include <algorithm>
#include <cmath>
#include <map>

namespace evenstroke {
namespace {

using Values = std::vector<std::optional<double>>;
using Form = FaultQuantity::Form;

/// One in the unit of the deviation for one in the quantity's own unit.
std::optional<double> scale_of(Form form, const TrendPoint& point)
{
    if (form == Form::difference)
        return 1.0;
    // Without a baseline the value itself is near enough for a percentage.
    const double whole = point.expected.value_or(point.corrected.value_or(point.raw)) +
                         (form == Form::percent_absolute ? 1.0 : 0.0); // bar gauge and a bar of air
    return std::abs(whole) > 0.0 ? std::optional(100.0 / std::abs(whole)) : std::nullopt;
}

/// A value of which the differences over time mean something.
std::optional<double> comparable(const FaultQuantity& from, const TrendPoint& point)
{
    std::optional<double> value = point.deviation;
    if (!value && point.expected)
        value = point.raw - *point.expected; // an engine without coefficients to correct with
    if (!value && !from.needs_baseline) {
        value = point.corrected.value_or(point.raw);
    }
    const auto scale = scale_of(from.form, point);
    return value && scale && std::isfinite(*value) ? std::optional(*value * *scale) : std::nullopt;
}

/// Revolutions over those of a propeller at this power, in per cent of an arbitrary one.
std::optional<double> speed_at_power(const TrendPoint& point, std::optional<double> load)
{
    if (point.deviation && point.expected && *point.expected > 0.0)
        return 100.0 * *point.deviation / *point.expected;
    if (!load || !(*load > 0.0) || !(point.raw > 0.0))
        return std::nullopt;
    return 100.0 * std::log(point.raw / std::cbrt(*load));
}

/// Robust sigma of one value from differences between neighbours in time, mixed with the table's.
/// @param differences between usable neighbours of one stretch, all places together
double learned_noise(double table, std::vector<double> differences, double weight_of_table)
{
    const double count = static_cast<double>(differences.size());
    if (differences.empty())
        return table;
    for (double& one : differences)
        one = std::abs(one) / std::sqrt(2.0);
    const double sigma = drift::median_to_sigma * drift::median_in_place(differences);
    // The median of n differences tells about as much as half of them would.
    return std::sqrt((weight_of_table * table * table + 0.5 * count * sigma * sigma) / (weight_of_table + 0.5 * count));
}

void add_differences(std::vector<double>& to, const Values& values, std::size_t start)
{
    std::optional<double> before;
    for (std::size_t i = start; i < values.size(); ++i)
        if (values[i]) {
            if (before)
                to.push_back(*values[i] - *before);
            before = values[i];
        }
}

/// Cylinders in which several quantities at once are far from the usual at the last reading: no misreading.
std::set<int> doubted_as_a_whole(const Judgement& judgement)
{
    std::map<int, std::set<QuantityId>> doubted;
    for (const Doubt& doubt : judgement.doubts)
        if (doubt.verdict == Doubt::Verdict::implausible && doubt.reading + 1 == judgement.readings.size() &&
            doubt.quantity && doubt.place && doubt.place->kind == Place::Kind::cylinder)
            doubted[doubt.place->number].insert(*doubt.quantity);
    std::set<int> whole;
    for (const auto& [cylinder, quantities] : doubted)
        if (quantities.size() >= 2)
            whole.insert(cylinder);
    return whole;
}

} // namespace

SeriesMaker::SeriesMaker(const Judgement& judgement)
    : judgement_(judgement), readings_(judgement.readings.size()),
      cylinders_(static_cast<std::size_t>(judgement.record->engine.cylinders)),
      trusted_all_(doubted_as_a_whole(judgement))
{
    for (const Reading& reading : judgement.record->readings)
        months_.push_back(months_of(reading.taken_at.utc));
    for (const FaultQuantity& quantity_of : fault_quantities()) {
        Row row;
        row.cylinders.assign(cylinders_, Values(readings_));
        row.whole.assign(cylinders_, Values(readings_));
        row.engine.assign(readings_, std::nullopt);
        row.cylinder_starts.assign(cylinders_, {0});
        if (!quantity_of.read_as.empty() && quantity_of.per == FaultQuantity::Per::cylinder)
            gather(quantity_of, row);
        else if (!quantity_of.read_as.empty())
            gather_engine(quantity_of, row);
        rows_.push_back(std::move(row));
    }
    find_starts();
    for (std::size_t k = 0; k < rows_.size(); ++k)
        if (fault_quantities()[k].per == FaultQuantity::Per::cylinder)
            take_out_what_all_share(fault_quantities()[k], rows_[k]);
}

/// The usual difference of one cylinder from the middle of the others at each reading, a stretch at a time.
std::vector<double> SeriesMaker::own_offsets(const Row& row, std::size_t cylinder) const
{
    std::vector<double> offsets(readings_, 0.0);
    const auto& starts = row.cylinder_starts[cylinder];
    for (std::size_t s = 0; s < starts.size(); ++s) {
        const std::size_t end = s + 1 < starts.size() ? starts[s + 1] : readings_;
        std::vector<double> differences;
        for (std::size_t i = starts[s]; i < end; ++i) {
            std::vector<double> others;
            for (std::size_t j = 0; j < cylinders_; ++j)
                if (j != cylinder && row.whole[j][i])
                    others.push_back(*row.whole[j][i]);
            if (row.whole[cylinder][i] && !others.empty())
                differences.push_back(*row.whole[cylinder][i] - drift::median_in_place(others));
        }
        const double usual = drift::median(std::move(differences)).value_or(0.0);
        std::fill(offsets.begin() + static_cast<std::ptrdiff_t>(starts[s]), offsets.begin() + static_cast<std::ptrdiff_t>(end), usual);
    }
    return offsets;
}

/// Better than the middle of the others alone: that jumps by their lasting differences when one of them was not read
/// or took a new level.
void SeriesMaker::take_out_what_all_share(const FaultQuantity& from, Row& row) const
{
    if (cylinders_ <= drift::others_needed)
        return; // what the trend says stays
    std::vector<std::vector<double>> offsets;
    for (std::size_t j = 0; j < cylinders_; ++j)
        offsets.push_back(own_offsets(row, j));
    for (std::size_t i = 0; i < readings_; ++i) {
        drift::MaybeValues values(cylinders_);
        std::vector<double> own(cylinders_);
        for (std::size_t j = 0; j < cylinders_; ++j) {
            values[j] = row.whole[j][i];
            own[j] = offsets[j][i];
        }
        const auto shared = drift::common_mode(values, own, from.noise);
        for (std::size_t j = 0; j < cylinders_; ++j)
            if (values[j] && shared[j])
                row.cylinders[j][i] = *values[j] - *shared[j];
    }
}

bool SeriesMaker::takes_part(std::size_t reading, const Trend& trend, const TrendPoint& point) const
{
    if (point.unsteady || reading >= readings_)
        return false;
    return !point.doubtful || (reading + 1 == readings_ && trend.place.kind == Place::Kind::cylinder &&
                               trusted_all_.count(trend.place.number) != 0);
}

void SeriesMaker::gather(const FaultQuantity& from, Row& row) const
{
    const Engine& engine = judgement_.record->engine;
    for (const Trend& trend : judgement_.trends) {
        const Quantity& q = quantity(trend.quantity);
        if (q.name != from.read_as || trend.place.kind != Place::Kind::cylinder || trend.points.empty())
            continue;
        const std::size_t j = static_cast<std::size_t>(trend.place.number) - 1;
        if (j >= cylinders_)
            continue;
        for (const TrendPoint& point : trend.points) {
            if (!takes_part(point.reading, trend, point))
                continue;
            row.whole[j][point.reading] = comparable(from, point);
            const auto scale = scale_of(from.form, point);
            if (point.apart && scale)
                row.cylinders[j][point.reading] = *point.apart * *scale;
        }
        const TrendPoint& last = trend.points.back();
        if (const auto half_width = instrument_uncertainty(engine, q, last.raw))
            row.floor = 0.5 * *half_width * scale_of(from.form, last).value_or(1.0);
    }
}

void SeriesMaker::gather_engine(const FaultQuantity& from, Row& row) const
{
    const Engine& engine = judgement_.record->engine;
    if (from.form == Form::speed_at_power && is_generating_set(engine, judgement_.record->readings))
        return;
    std::vector<double> sum(readings_, 0.0), count(readings_, 0.0);
    for (const Trend& trend : judgement_.trends) {
        const Quantity& q = quantity(trend.quantity);
        if (q.name != from.read_as || trend.place.kind == Place::Kind::cylinder)
            continue;
        for (const TrendPoint& point : trend.points) {
            if (!takes_part(point.reading, trend, point))
                continue;
            const auto value = from.form == Form::speed_at_power
                                   ? speed_at_power(point, judgement_.readings[point.reading].load_percent)
                                   : comparable(from, point);
            if (!value)
                continue;
            if (trend.place == Place::engine())
                row.engine[point.reading] = value;
            sum[point.reading] += *value;
            count[point.reading] += 1.0;
        }
        if (!trend.points.empty())
            if (const auto half_width = instrument_uncertainty(engine, q, trend.points.back().raw))
                row.floor = 0.5 * *half_width * scale_of(from.form, trend.points.back()).value_or(1.0);
    }
    for (std::size_t i = 0; i < readings_; ++i)
        if (!row.engine[i] && count[i] > 0.0)
            row.engine[i] = sum[i] / count[i];
}

void SeriesMaker::find_starts()
{
    drift::Input marks; // the same reading of the events as the drift method has
    marks.cylinders = cylinders_;
    marks.months = months_;
    const auto quantities = fault_quantities();
    for (const FaultQuantity& quantity_of : quantities) {
        marks.channels.emplace_back().quantity = quantity_of.read_as;
        drift::EngineChannel& channel = marks.engine_channels.emplace_back();
        channel.quantity = quantity_of.read_as;
        channel.in_scan = find_derived(quantity_of.read_as) == nullptr;
    }
    mark_recorded_work(*judgement_.record, marks);
    for (std::size_t i = 0; i < readings_; ++i)
        for (std::size_t k = 0; k < quantities.size(); ++k) {
            const auto& of_cylinders = marks.channels[k].segment_starts;
            for (std::size_t j = 0; j < cylinders_; ++j) {
                const std::size_t cell = i * cylinders_ + j;
                if (marks.cylinder_work[cell] || (!of_cylinders.empty() && of_cylinders[cell]))
                    if (i > 0)
                        rows_[k].cylinder_starts[j].push_back(i);
            }
            const auto& of_engine = marks.engine_channels[k].segment_starts;
            if (marks.engine_work[i] || (!of_engine.empty() && of_engine[i]))
                rows_[k].engine_start = i;
        }
}

SubjectSeries SeriesMaker::cylinder(int number) const
{
    SubjectSeries series{Place::cylinder(number), months_, {}};
    const std::size_t j = static_cast<std::size_t>(number) - 1;
    const double others = static_cast<double>(std::max<std::size_t>(cylinders_, 4) - 1);
    for (std::size_t k = 0; k < rows_.size(); ++k) {
        const FaultQuantity& of = fault_quantities()[k];
        const Row& row = rows_[k];
        QuantitySeries one;
        one.gauge_of_engine = of.per != FaultQuantity::Per::cylinder;
        std::vector<double> differences;
        if (of.per == FaultQuantity::Per::both) {
            one.values = row.engine;
            one.start = row.engine_start;
            add_differences(differences, row.engine, 0);
            one.noise = learned_noise(of.noise, std::move(differences), 8.0);
        } else if (of.per == FaultQuantity::Per::cylinder) {
            one.values = row.cylinders[j];
            one.start = row.cylinder_starts[j].back();
            for (std::size_t other = 0; other < cylinders_; ++other)
                add_differences(differences, row.cylinders[other], row.cylinder_starts[other].back());
            // What the others share scatters too.
            one.noise = learned_noise(of.noise * std::sqrt(1.0 + 1.1 / others), std::move(differences), 30.0);
        } else {
            one.values.assign(readings_, std::nullopt);
        }
        one.noise = std::max(one.noise, row.floor);
        series.quantities.push_back(std::move(one));
    }
    return series;
}

/// Each cylinder without its lasting difference, so that a missing one does not move the middle.
Values SeriesMaker::middle_of_cylinders(const Row& row, const std::set<int>& left_out) const
{
    std::vector<std::vector<double>> offsets;
    for (std::size_t j = 0; j < cylinders_; ++j)
        offsets.push_back(own_offsets(row, j));
    Values middle(readings_);
    for (std::size_t i = 0; i < readings_; ++i) {
        std::vector<double> values;
        for (std::size_t j = 0; j < cylinders_; ++j)
            if (row.whole[j][i] && left_out.count(static_cast<int>(j) + 1) == 0)
                values.push_back(*row.whole[j][i] - offsets[j][i]);
        middle[i] = drift::median(std::move(values));
    }
    return middle;
}

SubjectSeries SeriesMaker::engine(const std::set<int>& left_out) const
{
    SubjectSeries series{Place::engine(), months_, {}};
    for (std::size_t k = 0; k < rows_.size(); ++k) {
        const FaultQuantity& of = fault_quantities()[k];
        const Row& row = rows_[k];
        QuantitySeries one;
        one.values = row.engine;
        one.start = row.engine_start;
        if (of.per == FaultQuantity::Per::cylinder)
            one.values = middle_of_cylinders(row, left_out);
        std::vector<double> differences;
        add_differences(differences, one.values, one.start);
        one.noise = std::max(learned_noise(of.noise, std::move(differences), 8.0), row.floor);
        series.quantities.push_back(std::move(one));
    }
    return series;
}

} // namespace evenstroke
