// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/trend/scan.h"

#include <algorithm>
#include <cmath>

namespace evenstroke::drift {

RunningSums::Sums RunningSums::Sums::operator-(const Sums& earlier) const
{
    return {count - earlier.count, value - earlier.value, time - earlier.time,
            time_squared - earlier.time_squared, value_time - earlier.value_time};
}

namespace {

RunningSums::Sums with(RunningSums::Sums sums, double time, std::optional<double> value)
{
    if (value) {
        sums.count += 1.0;
        sums.value += *value;
        sums.time += time;
        sums.time_squared += time * time;
        sums.value_time += *value * time;
    }
    return sums;
}

} // namespace

void RunningSums::add(double time, std::optional<double> value)
{
    values_.push_back(value);
    cumulated_.push_back(with(cumulated_.back(), time, value));
}

void RunningSums::replace(std::size_t reading, double time, double value)
{
    const double change = value - values_[reading].value_or(0.0);
    values_[reading] = value;
    for (std::size_t i = reading + 1; i < cumulated_.size(); ++i) {
        cumulated_[i].value += change;
        cumulated_[i].value_time += change * time;
    }
}

RunningSums::Sums RunningSums::between(std::size_t first, std::size_t last) const
{
    return cumulated_[last + 1] - cumulated_[first];
}

namespace {

/// Sums of one fit: over the segment, and of the shape where it is not 0.
std::optional<Fit> fit(const RunningSums::Sums& all, double shape_sum, double shape_squares,
                       double shape_values, double noise)
{
    const double shape_squared = shape_squares - shape_sum * shape_sum / all.count;
    // Readings of one day make a ramp flat; the bound only has to keep rounding away.
    if (!(shape_squared > 1e-9 * (1.0 + shape_squares)))
        return std::nullopt;
    return Fit{shape_squared, (shape_values - shape_sum * all.value / all.count) / noise};
}

std::optional<Fit> ramp(const RunningSums::Sums& all, const RunningSums::Sums& after, double noise,
                        double from)
{
    return fit(all, after.time - after.count * from,
               after.time_squared - from * (2.0 * after.time - after.count * from),
               after.value_time - from * after.value, noise);
}

bool enough(const RunningSums& sums, const RunningSums::Sums& all, const RunningSums::Sums& after,
            std::size_t last)
{
    return sums.has(last) && all.count - after.count >= static_cast<double>(readings_before_onset) &&
           after.count >= static_cast<double>(readings_after_onset);
}

} // namespace

std::optional<Fit> fit_step(const RunningSums& sums, std::size_t first, std::size_t onset, std::size_t last,
                            double noise)
{
    const RunningSums::Sums all = sums.between(first, last), after = sums.between(onset, last);
    if (!enough(sums, all, after, last))
        return std::nullopt;
    return fit(all, after.count, after.count, after.value, noise);
}

std::optional<Fit> fit_ramp(const RunningSums& sums, std::size_t first, std::size_t onset, std::size_t last,
                            double noise, double from)
{
    const RunningSums::Sums all = sums.between(first, last), after = sums.between(onset, last);
    if (!enough(sums, all, after, last))
        return std::nullopt;
    return ramp(all, after, noise, from);
}

void ScanResult::consider(double new_strength, double prior, std::size_t new_candidate, std::size_t new_onset,
                          Shape new_shape)
{
    possible = true;
    const double weighed = new_strength * new_strength + prior;
    if (weighed <= evidence * evidence)
        return;
    evidence = std::sqrt(weighed);
    strength = std::abs(new_strength);
    candidate = new_candidate;
    direction = new_strength < 0.0 ? -1 : 1;
    shape = new_shape;
    onset = new_onset;
}

namespace {

/// Fits all series at one onset after the other; the sums over the whole segments stay the same.
class RowFitter
{
public:
    RowFitter(std::span<const ScanSeries> series, std::size_t last) : series_(series), last_(last)
    {
        for (const ScanSeries& one : series) {
            const RunningSums::Sums all = one.sums->between(one.first, last);
            all_.push_back(all);
            constexpr double needed = static_cast<double>(readings_before_onset + readings_after_onset);
            possible_ = possible_ || (one.sums->has(last) && all.count >= needed);
        }
        for (FitRow* row : {&steps, &ramps})
            row->entries.resize(series.size());
    }

    bool possible() const { return possible_; }

    /// @param from time of the reading before the onset
    void fit(std::size_t onset, double from)
    {
        steps.taken = ramps.taken = 0;
        for (std::size_t k = 0; k < series_.size(); ++k) {
            const ScanSeries& one = series_[k];
            steps.entries[k].taken = ramps.entries[k].taken = false;
            if (onset <= one.first || !one.sums->has(last_))
                continue;
            const RunningSums::Sums after = one.sums->before(last_ + 1) - one.sums->before(onset);
            const RunningSums::Sums& all = all_[k];
            if (all.count - after.count < static_cast<double>(readings_before_onset) ||
                after.count < static_cast<double>(readings_after_onset))
                continue;
            enter(steps, k, drift::fit(all, after.count, after.count, after.value, one.noise));
            enter(ramps, k, ramp(all, after, one.noise, from));
        }
    }

    FitRow steps, ramps;

private:
    static void enter(FitRow& row, std::size_t k, const std::optional<Fit>& found)
    {
        if (!found)
            return;
        const double root = std::sqrt(found->shape_squared);
        row.entries[k] = {true, root, found->projection / root};
        ++row.taken;
    }

    std::span<const ScanSeries> series_;
    std::size_t last_;
    std::vector<RunningSums::Sums> all_;
    bool possible_ = false;
};

/// @param any_change u' C^-1 u of these fits. No signature can exceed its root (Cauchy-Schwarz), so most
/// onsets need no look at them.
void weigh_candidates(const FitRow& fits, const SignatureMatcher& matcher, double any_change,
                      std::size_t onset, Shape shape, ScanResult& result)
{
    for (std::size_t k = 0; k < fits.entries.size(); ++k)
        if (fits.entries[k].taken)
            result.consider(fits.entries[k].strength, 0.0, k, onset, shape);
    for (std::size_t signature = 0; signature < matcher.count(); ++signature) {
        const double prior = matcher.prior(signature);
        const double to_beat = result.evidence * result.evidence - prior;
        if (any_change <= to_beat)
            continue;
        if (const double strength = matcher.strength(signature, fits, to_beat); strength > 0.0) // one direction only
            result.consider(strength, prior, fits.entries.size() + signature, onset, shape);
    }
}

} // namespace

ScanResult scan(std::span<const ScanSeries> series, const SignatureMatcher& matcher,
                std::span<const double> months, std::size_t reading)
{
    ScanResult result;
    RowFitter fitter(series, reading);
    if (!fitter.possible())
        return result;
    std::size_t first = reading;
    for (const ScanSeries& one : series)
        first = std::min(first, one.first);
    const std::size_t earliest =
        std::max(first + readings_before_onset, reading > onset_window ? reading - onset_window : 0);
    for (std::size_t onset = earliest; onset < reading; ++onset) {
        fitter.fit(onset, months[onset - 1]);
        if (fitter.steps.taken == 0)
            continue;
        const double any_step = matcher.any_change(fitter.steps);
        weigh_candidates(fitter.steps, matcher, any_step, onset, Shape::step, result);
        if (any_step > result.any_change) {
            result.any_change = any_step;
            result.any_change_onset = onset;
        }
        weigh_candidates(fitter.ramps, matcher, matcher.any_change(fitter.ramps), onset, Shape::ramp, result);
    }
    return result;
}

} // namespace evenstroke::drift
