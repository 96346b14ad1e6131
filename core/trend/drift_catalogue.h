// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <optional>
#include <span>
#include <string>
#include <string_view>
#include <vector>

/// Which quantities are watched for drift, how they scatter, and what faults do to them, as data:
/// resources/catalogue/drift_channels.csv, drift_signatures.csv,
/// drift_correlations.csv and drift_limits.csv.
namespace evenstroke::drift {

enum class DeviationForm { difference, percent };
enum class Subject { cylinder, engine, cylinder_median };

struct CatalogueChannel
{
    std::string quantity;       ///< name in the quantity catalogue, or of a derived quantity
    std::string typed_quantity; ///< the typed value a doubt names where `quantity` is derived; else the same
    Subject subject;            ///< cylinder_median: the median over the cylinders, watched at engine level
    double noise;               ///< prior one sigma, in `unit`
    double offset_spread;       ///< prior one sigma between cylinders; 0 at engine level
    DeviationForm form;         ///< percent: 100 (corrected / expected - 1)
    std::string unit;           ///< of the deviation
    /// Median of typed over expected outside which a whole row must be in another unit; 0 and 1e9: not looked
    /// for.
    double row_ratio_low, row_ratio_high;
    bool evidence; ///< false: trended with its band, and no part of the evidence
    bool counted; ///< among those the thresholds were calibrated for; others raise them a little
};

/// What one fault moves, in noise units. A quantity that is not named is not expected to move.
struct Signature
{
    std::string name;  ///< "blow_by"
    std::string title; ///< "blow-by (rings or exhaust valve)"
    Subject subject;   ///< cylinder or engine
    double weight;     ///< how much likelier beforehand than a quantity that moves by itself, > 0
    struct Move
    {
        std::string quantity;
        bool median; ///< engine level: the median over the cylinders
        double amount;
    };
    std::vector<Move> moves;
};

/// How far the trade lets a quantity go from its own level before something is done: custom, no maker's figure.
struct CustomaryLimit
{
    std::string quantity;
    Subject subject;
    std::string engine_kind;          ///< "two_stroke", "four_stroke" or "any"
    std::optional<double> rise, fall; ///< in `unit`
    std::string unit;                 ///< a unit, "% of expected", or "% of absolute" (of the expected absolute pressure)
};

std::span<const CustomaryLimit> customary_limits();
/// The limit for this kind of engine, or null.
const CustomaryLimit* find_customary_limit(std::string_view quantity, Subject subject, bool two_stroke);
std::span<const CatalogueChannel> channel_catalogue();
const CatalogueChannel* find_channel(std::string_view quantity, Subject subject);
std::span<const Signature> signature_catalogue();
const Signature* find_signature(std::string_view name);
/// Correlation of the noise of two quantities of one cylinder; 1 for the same, 0 where none is listed.
double noise_correlation(std::string_view quantity, std::string_view other);

} // namespace evenstroke::drift
