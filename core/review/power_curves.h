// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/review/power_ways.h"

#include <string>
#include <string_view>

namespace evenstroke::power_ways {

/// The ways to the power that lead through the engine's own baseline.
///
/// A reading of a sound engine scatters about its baseline; how far goes into every half-width as an input of its
/// own, without which these ways would look better than a torsion meter.
class PowerCurves
{
public:
    PowerCurves(const Engine& engine, const Baseline& baseline, const Reading& reading, const Conditions& conditions,
                const BaselineScatter& scatter)
        : engine_(engine), baseline_(baseline), reading_(reading), conditions_(conditions), scatter_(scatter)
    {
    }

    Way turbocharger_speed() const;
    Way fuel_index() const;
    Way fuel_consumption() const;

private:
    PowerInputs inputs() const { return {engine_, reading_, conditions_}; }
    double rated() const { return engine_.rated_power.value() / 1000.0; } // kW
    /// How far a sound reading lies off the baseline; a number of value 0 that the reading is less of.
    WorkingInput off_baseline(std::string_view name, const std::string& words, const std::string& unit, double now) const;
    /// Index times speed over load, at the points of this mode; `words` says where the speed comes from.
    BaselineCurve index_times_speed(std::string& words) const;
    /// What the ambient of the reading makes of the specific consumption at reference; nothing where a condition for
    /// it was not read.
    std::optional<double> consumption_at_site() const;

    const Engine& engine_;
    const Baseline& baseline_;
    const Reading& reading_;
    const Conditions& conditions_;
    const BaselineScatter& scatter_;
};

} // namespace evenstroke::power_ways
