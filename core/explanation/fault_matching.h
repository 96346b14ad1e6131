// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/explanation/fault_catalogue.h"

#include <functional>
#include <optional>
#include <span>
#include <vector>

/// How well a pattern of changes agrees with each fault of the catalogue. Plain numbers: no history, no words.
namespace evenstroke {

/// The change of one quantity against its own usual level, in noise units.
struct Change
{
    double amount = 0.0;
    double error = 1.0; ///< one standard deviation of `amount`; below 1 where several readings are averaged
};
/// One a fault quantity; nothing where it was not read or cannot be compared.
using ChangeVector = std::vector<std::optional<Change>>;

/// Changes count up to here; "3" in a signature means 3 or more.
inline constexpr double largest_level = 3.0;

struct PlainMatch
{
    double size = 0.0;      ///< of the fault over its reference size, at most 1.5 either way
    double explained = 0.0; ///< share of the observed pattern; at most 1, negative where it makes matters worse
    double coverage = 0.0;  ///< how much of the signature was observed, 0 to 1
};
/// Least squares with one free size, and every movement that the signature does not speak of counted at 0.8.
/// @param changes only their amounts count, cut at `largest_level`
/// @return nothing where no observed quantity is expected to move
std::optional<PlainMatch> match_plainly(const Fault& fault, const ChangeVector& changes);

struct FaultMatch
{
    const Fault* fault = nullptr;
    double size = 0.0;      ///< as in PlainMatch, weighted with the errors
    /// The same from the levels in full and changes that are not cut at "3 or more": what the words about each
    /// quantity are held against. At most 3.5 either way.
    double full_size = 0.0;
    double explained = 0.0; ///< 0 to 1: share of what scatter alone does not explain
    double coverage = 0.0;
    double log_weight = 0.0; ///< logarithm of its probability against "nothing happened", common faults favoured
};
/// All faults that were asked for, the most probable first.
///
/// For each fault the size is averaged over a range, each quantity's share in the pattern may be off by a third
/// and what a signature leaves open may move freely; so a vague signature pays for being vague. Ranks true causes
/// better than the share explained alone: tests/bench/bench_explanation.cpp shows both.
std::vector<FaultMatch> match_faults(std::span<const Fault* const> faults, const ChangeVector& changes);

/// The same logarithm for one fault, its commonness left out.
double log_likelihood(const Fault& fault, const ChangeVector& changes);
/// Logarithm of how often a fault is met, as the catalogue's words have it.
double log_commonness(const Fault& fault);
/// Logarithm of the sum of exponentials; not for an empty span.
double log_sum(std::span<const double> logarithms);

/// Logarithm of the probability of the pattern if every quantity may have moved by itself, against "nothing
/// happened": what a fault on the list has to beat.
double log_weight_of_no_pattern(const ChangeVector& changes);

/// Strongest standardised sum of changes along a signature or of one quantity by itself; what gates a claim.
double strongest_sign(std::span<const Fault* const> faults, const ChangeVector& changes);

/// Takes away what a fault of this size does.
ChangeVector without_fault(const Fault& fault, double size, const ChangeVector& changes);

} // namespace evenstroke
