// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/trend/engine_series.h"

#include "core/trend/robust.h"

#include <numbers>
#include <utility>

namespace evenstroke::drift {

namespace {

constexpr std::size_t load_needs_values = 10, season_needs_values = 15;
constexpr double season_needs_months = 18.0;
constexpr std::size_t values_before_onset = 8, values_after_onset = 3;

} // namespace

EngineSeries::EngineSeries(std::string quantity, bool is_median, double noise, bool in_scan)
    : quantity_(std::move(quantity)), median_(is_median), in_scan_(in_scan), prior_(noise), noise_(noise)
{
}

void EngineSeries::open_segment()
{
    first_ = values_.size();
    products_ = {};
}

void EngineSeries::add_sorted(double difference)
{
    differences_.insert(std::upper_bound(differences_.begin(), differences_.end(), difference), difference);
}

void EngineSeries::learn_noise(double value)
{
    constexpr double prior_weight = 8.0;
    const bool new_segment = first_ == values_.size();
    if (last_unclipped_ && !new_segment)
        add_sorted(std::abs(value - *last_unclipped_));
    last_unclipped_ = value;
    if (differences_.empty())
        return;
    const double count = static_cast<double>(differences_.size());
    const double sigma = median_to_sigma * median_of_sorted(differences_);
    noise_ =
        std::sqrt((prior_weight * prior_ * prior_ + count * sigma * sigma / 2.0) / (prior_weight + count));
}

double EngineSeries::clip(double value) const
{
    constexpr std::size_t memory = 5, needed = 3;
    std::vector<double> last;
    for (std::size_t i = values_.size(); i > first_ && last.size() < memory; --i)
        if (values_[i - 1])
            last.push_back(*values_[i - 1]);
    return last.size() < needed ? value : pull_in(value, median_in_place(last), 3.0 * noise_);
}

EngineSeries::PerColumn EngineSeries::columns_at(std::size_t reading) const
{
    const double year = 2.0 * std::numbers::pi * months_[reading] / 12.0;
    return {1.0, (loads_[reading] - 75.0) / 25.0, std::cos(year), std::sin(year)};
}

void EngineSeries::add(double month, double load_percent, std::optional<double> value)
{
    months_.push_back(month);
    loads_.push_back(load_percent);
    Sums sums = cumulated_.back();
    if (value) {
        learn_noise(*value);
        value = clip(*value);
        const PerColumn column = columns_at(months_.size() - 1);
        for (std::size_t c = 0; c < columns; ++c) {
            sums.column[c] += column[c];
            sums.column_time[c] += column[c] * month;
            sums.column_value[c] += column[c] * *value;
            for (std::size_t d = 0; d <= c; ++d)
                products_[c][d] += column[c] * column[d];
        }
        sums.time_squared += month * month;
        sums.value_time += *value * month;
    }
    values_.push_back(value);
    cumulated_.push_back(sums);
}

EngineSeries::Sums EngineSeries::between(std::size_t first, std::size_t last) const
{
    Sums sums = cumulated_[last + 1];
    const Sums& before = cumulated_[first];
    for (std::size_t c = 0; c < columns; ++c) {
        sums.column[c] -= before.column[c];
        sums.column_time[c] -= before.column_time[c];
        sums.column_value[c] -= before.column_value[c];
    }
    sums.time_squared -= before.time_squared;
    sums.value_time -= before.value_time;
    return sums;
}

std::size_t EngineSeries::usable() const
{
    return values_.empty()
               ? 0
               : static_cast<std::size_t>(cumulated_.back().column[0] - cumulated_[first_].column[0] + 0.5);
}

std::size_t EngineSeries::columns_that_count() const
{
    const std::size_t count = usable();
    if (count < load_needs_values)
        return 1;
    const bool season =
        count >= season_needs_values && months_.back() - months_[first_] >= season_needs_months;
    return season ? columns : 2;
}

void EngineSeries::prepare()
{
    segment_ = between(first_, values_.size() - 1);
    triangle_ = {};
    const std::size_t used = columns_that_count();
    for (std::size_t c = 0; c < used; ++c) {
        PerColumn& row = triangle_[c];
        double pivot = products_[c][c];
        for (std::size_t d = 0; d < c; ++d) {
            double sum = products_[c][d];
            for (std::size_t e = 0; e < d; ++e)
                sum -= row[e] * triangle_[d][e];
            row[d] = sum * triangle_[d][d];
            pivot -= row[d] * row[d];
        }
        // A column that the ones before it explain (a load that never changed) is left out.
        if (pivot > 1e-6 * (1e-6 + products_[c][c]))
            row[c] = 1.0 / std::sqrt(pivot);
        else
            row = {};
    }
    reduced_values_ = reduce(segment_.column_value);
}

EngineSeries::PerColumn EngineSeries::reduce(PerColumn moments) const
{
    for (std::size_t c = 0; c < columns; ++c) {
        for (std::size_t d = 0; d < c; ++d)
            moments[c] -= triangle_[c][d] * moments[d];
        moments[c] *= triangle_[c][c];
    }
    return moments;
}

std::optional<Fit> EngineSeries::fit(std::size_t onset, Shape shape) const
{
    const std::size_t last = values_.size() - 1;
    if (!values_[last] || onset <= first_)
        return std::nullopt;
    const Sums after = between(onset, last);
    const double count_after = after.column[0], count = segment_.column[0];
    if (count - count_after < static_cast<double>(values_before_onset) ||
        count_after < static_cast<double>(values_after_onset))
        return std::nullopt;
    PerColumn moments = after.column;
    double squares = count_after, values = after.column_value[0];
    if (shape == Shape::ramp) {
        const double from = months_[onset - 1];
        squares = after.time_squared - from * (2.0 * after.column_time[0] - from * count_after);
        values = after.value_time - from * after.column_value[0];
        for (std::size_t c = 0; c < columns; ++c)
            moments[c] = after.column_time[c] - from * after.column[c];
    }
    const PerColumn reduced = reduce(moments);
    double shape_squared = squares, projection = values;
    for (std::size_t c = 0; c < columns; ++c) {
        shape_squared -= reduced[c] * reduced[c];
        projection -= reduced[c] * reduced_values_[c];
    }
    if (!(shape_squared > 1e-6 * (1.0 + squares)))
        return std::nullopt;
    return Fit{shape_squared, projection / noise_};
}

std::optional<double> EngineSeries::residual(std::size_t reading) const
{
    if (!values_[reading])
        return std::nullopt;
    const PerColumn reduced = reduce(columns_at(reading));
    double left = *values_[reading];
    for (std::size_t c = 0; c < columns; ++c)
        left -= reduced[c] * reduced_values_[c];
    return left;
}

} // namespace evenstroke::drift
