// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/problem.h"
#include "core/units/quantity_types.h"

#include <cmath>
#include <optional>
#include <string>
#include <string_view>

/// What every formula asks of its inputs before it works: that they are there, and that they can be.
namespace evenstroke {

/// A number, and above zero.
inline bool is_positive(double value) { return value > 0.0 && std::isfinite(value); }

/// "3.5 bar abs", "-5 °C": a number in the trade's unit, as a sentence holds it.
std::string shown(Ratio ratio); ///< bare
std::string shown(Length length);
std::string shown(Volume volume);
std::string shown(Mass mass);
std::string shown(Velocity velocity); ///< knots
std::string shown(Frequency speed);   ///< revolutions a minute
std::string shown(Power power);
std::string shown(Torque torque);
std::string shown(MassFlow flow);
std::string shown(Density density);
std::string shown(KinematicViscosity viscosity);
std::string shown(Temperature temperature);
std::string shown(PressureDifference pressure);
std::string shown(AbsolutePressure pressure);

/// "The torque is not known, because the speed is missing. Enter the speed."
/// @param result and @param input with their article
Problem missing_input(std::string_view result, std::string_view input);

/// Asks one input after the other and keeps the first that stands in the way of the result.
class InputCheck
{
public:
    /// @param result what is worked out, with its article: "the torque"
    explicit InputCheck(std::string_view result) : result_(result) {}

    /// There, finite, and above zero (a temperature or an absolute pressure: above the absolute one).
    template <typename Quantity>
    InputCheck& above_zero(const std::optional<Quantity>& input, std::string_view name)
    {
        return check(input, name, input && input->value() > 0.0, "which is not above zero");
    }
    template <typename Quantity>
    InputCheck& not_negative(const std::optional<Quantity>& input, std::string_view name)
    {
        return check(input, name, input && input->value() >= 0.0, "which cannot be negative");
    }
    template <typename Quantity> InputCheck& finite(const std::optional<Quantity>& input, std::string_view name)
    {
        return check(input, name, input.has_value(), "");
    }

    bool passed() const { return !problem_; }
    /// @pre not passed()
    const Problem& problem() const { return *problem_; }

private:
    template <typename Quantity>
    InputCheck& check(const std::optional<Quantity>& input, std::string_view name, bool possible, std::string_view why)
    {
        if (problem_)
            return *this;
        if (!input)
            problem_ = missing_input(result_, name);
        else if (!std::isfinite(input->value()))
            problem_ = impossible(name, "no number", {});
        else if (!possible)
            problem_ = impossible(name, shown(*input), why);
        return *this;
    }
    Problem impossible(std::string_view name, const std::string& value, std::string_view why) const;

    std::string_view result_;
    std::optional<Problem> problem_;
};

} // namespace evenstroke
