// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/engine/engine.h"

#include <map>
#include <optional>
#include <string>
#include <string_view>
#include <vector>

namespace evenstroke {

/// One quantity of the healthy engine over load, within one mode.
///
/// Piecewise cubic that keeps the shape: between two points it never leaves their values, and a local
/// extreme stands only at a point. Beyond the ends it holds the end value for up to 5 % of load and is
/// not known further out; a single point is known within 5 % of its load.
/// @par Source F. N. Fritsch, J. Butland, "A method for constructing local monotone piecewise cubic
///      interpolants", SIAM J. Sci. Stat. Comput. 5 (1984) 300-304; end slopes by the three-point formula,
///      limited so that the shape is kept.
class BaselineCurve
{
public:
    /// How far beyond the ends, in per cent of rated power, the end value is still used.
    static constexpr double reach_percent = 5.0;

    BaselineCurve() = default;
    /// @param loads strictly increasing, per cent; @param values the same number, the quantity's own unit
    BaselineCurve(std::vector<double> loads, std::vector<double> values);

    bool empty() const { return loads_.empty(); }
    /// Loads of the first and the last point. @pre not empty
    double first_load() const { return loads_.front(); }
    double last_load() const { return loads_.back(); }
    /// Nothing outside the reach.
    std::optional<double> at(double load_percent) const;
    /// The load at which the curve takes this value; between the points to the last digit. Beyond the ends,
    /// where the end value is held and tells nothing of the load, the curve goes on along its end slope, within
    /// the reach. Nothing where no load has this value, or more than one.
    std::optional<double> load_at(double value) const;

private:
    double between(std::size_t interval, double load_percent) const;
    std::vector<double> loads_, values_, slopes_;
};

/// All curves of one engine, by mode and quantity name. Never interpolates across a change of mode.
class Baseline
{
public:
    Baseline() = default;
    explicit Baseline(const Engine& engine);

    bool has(std::string_view quantity) const;
    bool has_mode(std::string_view mode) const;
    /// The curve, or null where this mode has none for the quantity.
    const BaselineCurve* curve(std::string_view mode, std::string_view quantity) const;
    /// Whether the load lies within the reach of this mode's points.
    bool covers(std::string_view mode, double load_percent) const;

private:
    std::map<std::string, std::map<std::string, BaselineCurve, std::less<>>, std::less<>> curves_;
    std::map<std::string, std::pair<double, double>, std::less<>> span_;
};

} // namespace evenstroke
