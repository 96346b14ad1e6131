// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/reference/linear_correction.h"

#include "core/plain_text.h"

#include <cmath>

namespace evenstroke {
namespace {

Problem not_read(const std::string& what)
{
    return {Problem::Kind::not_found,
            "The " + what + " of this reading is not known, so the value stays as measured.",
            "Enter the " + what + " to have it corrected."};
}

Problem cannot_be(const std::string& what)
{
    return invalid_input(what + ", so it was not corrected.", "Check the value and its unit.");
}

Result<LinearFactor> factor_of(const AmbientDifference& difference,
                               const CorrectionCoefficients& coefficients)
{
    if (!difference.inlet_air && coefficients.per_inlet_air != 0.0) {
        return not_read("inlet air temperature");
    }
    if (!difference.coolant && coefficients.per_coolant != 0.0) {
        return not_read("coolant temperature into the air cooler");
    }
    const LinearFactor factor = linear_factor(coefficients.per_inlet_air, coefficients.per_coolant,
                                              difference.inlet_air.value_or(TemperatureDifference()).value(),
                                              difference.coolant.value_or(TemperatureDifference()).value());
    if (!(factor.factor > 0.0 && std::isfinite(factor.factor))) {
        return invalid_input(
            "The correction factor for this reading would be " + short_number_text(factor.factor) +
                ", which is not above 0.",
            "Check the engine's correction coefficients and the temperatures of air and coolant.");
    }
    return factor;
}

/// Corrects a number counted from absolute zero (pascal over vacuum, kelvin).
Result<Corrected<double>> correct_number(double over_zero, const std::string& value_in_words,
                                         const AmbientDifference& difference,
                                         const CorrectionCoefficients& coefficients)
{
    if (!(over_zero > 0.0 && std::isfinite(over_zero))) {
        return cannot_be(value_in_words + " is not above absolute zero");
    }
    const Result<LinearFactor> factor = factor_of(difference, coefficients);
    if (!factor) {
        return factor.error();
    }
    return Corrected<double>{over_zero * factor.value().factor, AppliedCorrection::linear,
                             factor.value().extrapolated};
}

} // namespace

AmbientDifference ambient_difference(std::optional<Temperature> inlet_air, std::optional<Temperature> coolant,
                                     const ReferenceConditions& reference)
{
    AmbientDifference difference;
    if (inlet_air) {
        difference.inlet_air = *inlet_air - reference.inlet_air;
    }
    if (coolant) {
        difference.coolant = *coolant - reference.cooler_coolant;
    }
    return difference;
}

Result<Corrected<GaugePressure>> correct_linearly(GaugePressure measured, AbsolutePressure barometer,
                                                  const AmbientDifference& difference,
                                                  const CorrectionCoefficients& coefficients)
{
    const Result<Corrected<double>> corrected =
        correct_number(to_absolute(measured, barometer).value(),
                       short_number_text(in_bar(measured)) + " bar gauge over a barometer of " +
                           short_number_text(in_bar(barometer)) + " bar",
                       difference, coefficients);
    if (!corrected) {
        return corrected.error();
    }
    const auto absolute_pressure = AbsolutePressure::from_value(corrected.value().value);
    return Corrected<GaugePressure>{to_gauge(absolute_pressure, barometer), corrected.value().applied,
                                    corrected.value().extrapolated};
}

Result<Corrected<AbsolutePressure>> correct_linearly(AbsolutePressure measured,
                                                     const AmbientDifference& difference,
                                                     const CorrectionCoefficients& coefficients)
{
    const Result<Corrected<double>> corrected = correct_number(
        measured.value(), short_number_text(in_bar(measured)) + " bar abs", difference, coefficients);
    if (!corrected) {
        return corrected.error();
    }
    return Corrected<AbsolutePressure>{AbsolutePressure::from_value(corrected.value().value),
                                       corrected.value().applied, corrected.value().extrapolated};
}

Result<Corrected<Temperature>> correct_linearly(Temperature measured, const AmbientDifference& difference,
                                                const CorrectionCoefficients& coefficients)
{
    const Result<Corrected<double>> corrected = correct_number(
        measured.value(), short_number_text(in_celsius(measured)) + " °C", difference, coefficients);
    if (!corrected) {
        return corrected.error();
    }
    return Corrected<Temperature>{Temperature::from_value(corrected.value().value), corrected.value().applied,
                                  corrected.value().extrapolated};
}

Result<Corrected<SpecificConsumption>> correct_linearly(SpecificConsumption measured,
                                                        const AmbientDifference& difference,
                                                        const CorrectionCoefficients& coefficients)
{
    const Result<Corrected<double>> corrected =
        correct_number(measured.value(), short_number_text(in_grams_per_kilowatt_hour(measured)) + " g/kWh",
                       difference, coefficients);
    if (!corrected) {
        return corrected.error();
    }
    return Corrected<SpecificConsumption>{SpecificConsumption::from_value(corrected.value().value),
                                          corrected.value().applied, corrected.value().extrapolated};
}

Result<Corrected<Frequency>> correct_turbocharger_speed(Frequency measured, Temperature inlet_air,
                                                        Temperature reference_inlet_air)
{
    if (!(measured.value() >= 0.0 && std::isfinite(measured.value()))) {
        return cannot_be("A turbocharger speed of " + short_number_text(measured.value() * 60.0) +
                         " r/min cannot be");
    }
    for (const Temperature& temperature : {inlet_air, reference_inlet_air}) {
        if (!(temperature.value() > 0.0 && std::isfinite(temperature.value()))) {
            return cannot_be("The inlet air temperature of " + short_number_text(in_celsius(temperature)) +
                             " °C for the turbocharger speed is not above absolute zero");
        }
    }
    const double ratio = reference_inlet_air.value() / inlet_air.value();
    const double difference = std::fabs(inlet_air.value() - reference_inlet_air.value());
    return Corrected<Frequency>{measured * std::sqrt(ratio), AppliedCorrection::similarity,
                                difference > linear_inlet_air_range};
}

} // namespace evenstroke
