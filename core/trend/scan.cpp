// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/trend/scan.h"

#include <algorithm>
#include <array>
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

/// A shape's sums: over the readings where it is not 0.
struct ShapeSums
{
    double sum, squares, values;
};

ShapeSums step_sums(const RunningSums::Sums& after) { return {after.count, after.count, after.value}; }

ShapeSums ramp_sums(const RunningSums::Sums& after, double from)
{
    return {after.time - after.count * from, after.time_squared - from * (2.0 * after.time - after.count * from),
            after.value_time - from * after.value};
}

Fit fit_shape(const RunningSums::Sums& all, const ShapeSums& shape, double noise)
{
    return {shape.squares - shape.sum * shape.sum / all.count, (shape.values - shape.sum * all.value / all.count) / noise};
}

/// Readings of one day make a ramp flat; the bound only has to keep rounding away.
bool is_flat(double shape_squared, double squares) { return !(shape_squared > 1e-9 * (1.0 + squares)); }

std::optional<Fit> unless_flat(const RunningSums::Sums& all, const ShapeSums& shape, double noise)
{
    const Fit found = fit_shape(all, shape, noise);
    return is_flat(found.shape_squared, shape.squares) ? std::nullopt : std::optional(found);
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
    return unless_flat(all, step_sums(after), noise);
}

std::optional<Fit> fit_ramp(const RunningSums& sums, std::size_t first, std::size_t onset, std::size_t last,
                            double noise, double from)
{
    const RunningSums::Sums all = sums.between(first, last), after = sums.between(onset, last);
    if (!enough(sums, all, after, last))
        return std::nullopt;
    return unless_flat(all, ramp_sums(after, from), noise);
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

/// Fits of all series at all onsets in the window; the sums over the whole segments stay the same.
class OnsetFits
{
public:
    OnsetFits(std::span<const ScanSeries> series, std::size_t last) : series_(series), last_(last)
    {
        first_onset_ = last;
        for (const ScanSeries& one : series) {
            const RunningSums::Sums all = one.sums->between(one.first, last);
            all_.push_back(all);
            constexpr double needed = static_cast<double>(readings_before_onset + readings_after_onset);
            possible_ = possible_ || (one.sums->has(last) && all.count >= needed);
            first_onset_ = std::min(first_onset_, one.first);
        }
        first_onset_ = std::max(first_onset_ + readings_before_onset, last > onset_window ? last - onset_window : 0);
        onsets_ = last > first_onset_ ? last - first_onset_ : 0;
    }

    bool possible() const { return possible_; }
    std::size_t onsets() const { return onsets_; }
    std::size_t first_onset() const { return first_onset_; }

    void fit_all(std::span<const double> months)
    {
        entries_.resize(2 * onsets_ * series_.size());
        alike_.fill(true);
        for (std::size_t k = 0; k < series_.size(); ++k)
            fit(k, months);
    }
    /// @param i  of the onset, from the first on
    FitRow row(std::size_t i, Shape shape) const
    {
        const std::size_t at = place(i, shape);
        return {std::span(entries_.data() + at * series_.size(), series_.size()), alike_[at]};
    }

private:
    static std::size_t place(std::size_t i, Shape shape) { return 2 * i + (shape == Shape::step ? 0 : 1); }

    /// Over all onsets at once, number by number, which a processor does several of together.
    void fit(std::size_t k, std::span<const double> months)
    {
        const ScanSeries& one = series_[k];
        std::array<double, onset_window> root[2]{}, strength[2]{}; // of step and ramp
        std::array<bool, onset_window> taken[2]{};
        if (one.sums->has(last_)) {
            const RunningSums::Sums& all = all_[k];
            const RunningSums::Sums& end = one.sums->before(last_ + 1);
            for (std::size_t i = 0; i < onsets_; ++i) {
                const std::size_t onset = first_onset_ + i;
                const RunningSums::Sums after = end - one.sums->before(onset);
                const ShapeSums shapes[2] = {step_sums(after), ramp_sums(after, months[onset - 1])};
                const bool enough = onset > one.first && all.count - after.count >= static_cast<double>(readings_before_onset) &&
                                    after.count >= static_cast<double>(readings_after_onset);
                for (std::size_t s = 0; s < 2; ++s) {
                    const Fit found = fit_shape(all, shapes[s], one.noise);
                    taken[s][i] = enough && !is_flat(found.shape_squared, shapes[s].squares);
                    root[s][i] = std::sqrt(found.shape_squared);
                    strength[s][i] = found.projection / root[s][i];
                }
            }
        }
        for (std::size_t s = 0; s < 2; ++s)
            for (std::size_t i = 0; i < onsets_; ++i) {
                FitEntry* const row = entries_.data() + (2 * i + s) * series_.size();
                if (taken[s][i])
                    row[k] = {true, root[s][i], strength[s][i]};
                alike_[2 * i + s] = alike_[2 * i + s] && taken[s][i] && root[s][i] == row[0].root;
            }
    }

    std::span<const ScanSeries> series_;
    std::size_t last_, first_onset_ = 0, onsets_ = 0;
    std::vector<RunningSums::Sums> all_;
    std::vector<FitEntry> entries_; ///< by onset, then shape, then quantity
    std::array<bool, 2 * onset_window> alike_{};
    bool possible_ = false;
};

/// What is tried at one onset with one shape. A chi-square of any change below what is to be beaten leaves no room for a
/// signature (Cauchy-Schwarz).
void weigh(const FitRow& fits, const SignatureMatcher& matcher, double any_change, std::size_t onset, Shape shape,
           ScanResult& result)
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
    OnsetFits fits(series, reading);
    if (!fits.possible())
        return result;
    fits.fit_all(months);
    for (std::size_t i = 0; i < fits.onsets(); ++i)
        for (const Shape shape : {Shape::step, Shape::ramp}) {
            const std::size_t onset = fits.first_onset() + i;
            const FitRow row = fits.row(i, shape);
            const double any_change = matcher.any_change(row);
            weigh(row, matcher, any_change, onset, shape, result);
            if (shape == Shape::step && any_change > result.any_change) {
                result.any_change = any_change;
                result.any_change_onset = onset;
            }
        }
    return result;
}

} // namespace evenstroke::drift
