// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/trend/drift.h"
#include "core/trend/drift_catalogue.h"

#include <cmath>
#include <cstddef>
#include <optional>
#include <span>
#include <string>
#include <utility>
#include <vector>

/// Likelihood-ratio scan for a change of unknown onset: for every onset in a window, a step and a ramp, in
/// every quantity and every fault signature, the standardised size of the change that fits best. The level
/// before is free, so lasting differences between cylinders need no calibration.
namespace evenstroke::drift {

inline constexpr std::size_t readings_before_onset = 6; ///< values that fix the old level
inline constexpr std::size_t readings_after_onset = 2;  ///< values that show the change
inline constexpr std::size_t onset_window = 35;         ///< readings back from now, about three years

/// Running sums over the values of one place, so that any segment and onset costs the same few operations.
class RunningSums
{
public:
    struct Sums
    {
        double count = 0.0, value = 0.0, time = 0.0, time_squared = 0.0, value_time = 0.0;
        Sums operator-(const Sums& earlier) const;
    };

    /// Adds the next reading; nothing where the value is missing or left out.
    void add(double time, std::optional<double> value);
    /// Changes a value that was added, and all sums after it.
    void replace(std::size_t reading, double time, double value);
    /// Sums over readings `first` .. `last`; both must have been added.
    Sums between(std::size_t first, std::size_t last) const;
    /// Sums over the readings before this one.
    const Sums& before(std::size_t reading) const { return cumulated_[reading]; }
    bool has(std::size_t reading) const { return values_[reading].has_value(); }
    const std::vector<std::optional<double>>& values() const { return values_; }

private:
    std::vector<std::optional<double>> values_;
    std::vector<Sums> cumulated_{Sums{}}; ///< [i]: over the readings before i
};

/// A shape fitted to one place: `strength` is normal with mean 0 and sigma 1 when nothing happens and the
/// onset is given.
struct Fit
{
    double shape_squared = 0.0; ///< gg: sum of squares of the centred shape
    double projection = 0.0;    ///< gy: shape times values, over the noise
    double strength() const { return projection / std::sqrt(shape_squared); }
    double size(double noise) const { return projection * noise / shape_squared; }
};
/// @return nothing with too few values before or after the onset, none at `last`, or a shape that is flat
std::optional<Fit> fit_step(const RunningSums& sums, std::size_t first, std::size_t onset, std::size_t last,
                            double noise);
/// @param from time of the reading before the onset, where the ramp is still 0
std::optional<Fit> fit_ramp(const RunningSums& sums, std::size_t first, std::size_t onset, std::size_t last,
                            double noise, double from);

/// One quantity's fit at one onset and shape; all zero where there is none.
struct FitEntry
{
    bool taken = false;
    double root = 0.0;     ///< square root of gg
    double strength = 0.0; ///< u = gy / root
};
/// Those of all quantities, in the order of the channels.
struct FitRow
{
    explicit FitRow(std::span<const FitEntry> fits);
    FitRow(std::span<const FitEntry> fits, bool are_alike) : entries(fits), alike(are_alike) {}
    std::span<const FitEntry> entries;
    bool alike = true; ///< all are taken with one root, as where every quantity was read every time
};

/// Fault signatures and correlations for the quantities of one engine.
class SignatureMatcher
{
public:
    /// @param quantities names in the order of the channels
    explicit SignatureMatcher(std::span<const std::string> quantities);

    std::size_t count() const { return signatures_.size(); }
    double prior(std::size_t index) const { return signatures_[index].prior; }
    const Signature& signature(std::size_t index) const { return *signatures_[index].source; }
    /// Quantities of the signature, as channel indices.
    const std::vector<std::size_t>& channels(std::size_t index) const { return signatures_[index].named; }
    /// z: strength of a signature; 0 where fewer than two of its quantities take part, or they moved the
    /// other way.
    /// @param worth_more square that a strength has to exceed to be of interest; below it 0 may be the answer
    double strength(std::size_t index, const FitRow& fits, double worth_more = 0.0) const;
    /// u' C^-1 u: chi-square of "every quantity took a new level of its own".
    double any_change(const FitRow& fits) const;

private:
    /// One term of a quadratic form; each pair stands once.
    struct Term
    {
        std::size_t row, column;
        double weight;
    };
    struct Prepared
    {
        const Signature* source;
        std::vector<std::pair<std::size_t, double>> weights; ///< C^-1 d where it is not 0
        std::vector<Term> variance;                          ///< w C w
        std::vector<std::size_t> named;                      ///< channels that the signature names
        double prior = 0.0;                                  ///< twice the log of its weight
        double alike_deviation = 0.0;                        ///< square root of w C w where all roots are 1
    };
    Prepared prepare(const Signature& signature, std::span<const std::string> quantities,
                     const std::vector<double>& inverse) const;

    std::vector<Prepared> signatures_;
    std::vector<Term> inverse_terms_;
};

/// One place's values with the segment and noise that count.
struct ScanSeries
{
    const RunningSums* sums;
    std::size_t first; ///< of the segment
    double noise;
};

struct ScanResult
{
    bool possible = false;     ///< at least one onset could be tried
    double evidence = 0.0;     ///< S: the largest candidate, with its prior weight
    double strength = 0.0;     ///< the same without, in standard deviations
    std::size_t candidate = 0; ///< channel index, or channels + signature index
    int direction = 1;
    Shape shape = Shape::step;
    std::size_t onset = 0;
    double any_change = 0.0; ///< F
    std::size_t any_change_onset = 0;

    /// Keeps the candidate if it is the largest so far.
    /// @param prior twice the log of how much likelier it is beforehand than an ordinary one
    void consider(double new_strength, double prior, std::size_t new_candidate, std::size_t new_onset,
                  Shape new_shape);
};
ScanResult scan(std::span<const ScanSeries> series, const SignatureMatcher& matcher,
                std::span<const double> months, std::size_t reading);

} // namespace evenstroke::drift
