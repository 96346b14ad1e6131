// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/trend/deviations.h"

#include "core/reference/linear_correction.h"
#include "core/trend/robust.h"

#include <algorithm>
#include <cmath>
#include <map>
#include <tuple>

namespace evenstroke {
namespace {

constexpr double zero_celsius = 273.15;

const CorrectionCoefficients* find_coefficients(const Engine& engine, const Quantity& q)
{
    auto found = engine.correction.find(q.name);
    if (found == engine.correction.end() && !q.correction_like.empty())
        found = engine.correction.find(q.correction_like);
    return found == engine.correction.end() ? nullptr : &found->second;
}

Correction linear(const Engine& engine, const Quantity& q, double own, const Conditions& conditions)
{
    Correction c;
    const CorrectionCoefficients* coefficients = find_coefficients(engine, q);
    if (!coefficients) {
        c.applied = Applied::not_correctable;
        return c;
    }
    if (!conditions.inlet_air && coefficients->per_inlet_air != 0.0)
        c.missing_input = "inlet air temperature";
    else if (!conditions.cooler_coolant && coefficients->per_coolant != 0.0)
        c.missing_input = "coolant temperature into the air cooler";
    if (!c.missing_input.empty())
        return c;
    const double reference_air = in_celsius(engine.reference.inlet_air);
    const double reference_coolant = in_celsius(engine.reference.cooler_coolant);
    const LinearFactor factor = linear_factor(coefficients->per_inlet_air, coefficients->per_coolant,
                                              conditions.inlet_air.value_or(reference_air) - reference_air,
                                              conditions.cooler_coolant.value_or(reference_coolant) - reference_coolant);
    const double zero = q.correction_form == CorrectionForm::temperature ? zero_celsius
                        : q.kind == PressureKind::gauge
                            ? unit(q.unit).from_si(conditions.barometer_or_one_bar() * 1e5)
                            : 0.0;
    c.scale = factor.factor;
    c.shift = zero * (factor.factor - 1.0);
    c.applied = factor.extrapolated ? Applied::extrapolated : Applied::linear;
    c.per_inlet_air = (own + zero) * coefficients->per_inlet_air;
    c.per_coolant = (own + zero) * coefficients->per_coolant;
    return c;
}

Correction similarity(const Engine& engine, double own, const Conditions& conditions)
{
    Correction c;
    if (!conditions.inlet_air) {
        c.missing_input = "inlet air temperature";
        return c;
    }
    const double kelvin = *conditions.inlet_air + zero_celsius;
    c.scale = std::sqrt(engine.reference.inlet_air.value() / kelvin);
    c.applied = Applied::similarity;
    c.per_inlet_air = -0.5 * own * c.scale / kelvin;
    return c;
}

double square(double x) { return x * x; }

std::optional<double> usual_uncertainty(std::string_view name, const Engine& engine, double own)
{
    const auto id = find_quantity(name);
    return id ? instrument_uncertainty(engine, quantity(*id), own) : std::nullopt;
}

/// How far the expected value moves with the uncertainty of the load.
double load_part(const Engine& engine, const BaselineCurve& curve, double load)
{
    const auto below = curve.at(load - 1.0), above = curve.at(load + 1.0);
    const double uncertainty = usual_uncertainty("load_percent", engine, load).value_or(0.0);
    return below && above ? (*above - *below) / 2.0 * uncertainty : 0.0;
}

std::optional<double> deviation_uncertainty(const Engine& engine, const Quantity& q, const JudgedValue& value,
                                            const Correction& correction, double load_effect)
{
    const auto instrument = instrument_uncertainty(engine, q, value.raw);
    if (!instrument)
        return std::nullopt;
    const double air = usual_uncertainty("inlet_air_temperature", engine, 0.0).value_or(0.0);
    const double coolant = usual_uncertainty("cooler_coolant_inlet_temperature", engine, 0.0).value_or(0.0);
    return std::sqrt(square(correction.scale * *instrument) + square(correction.per_inlet_air * air) +
                     square(correction.per_coolant * coolant) + square(load_effect));
}

bool is_performance(const Quantity& q)
{
    return q.group == "cylinder" || q.group == "turbocharger" || q.group == "cooler";
}

/// Apart is formed from deviations; from corrected values where the engine has no baseline for the quantity.
void set_apart(std::vector<JudgedValue>& values, const std::map<std::size_t, double>& comparable)
{
    std::map<QuantityId, std::vector<std::size_t>> rows;
    for (const auto& [index, amount] : comparable)
        if (values[index].place.kind == Place::Kind::cylinder)
            rows[values[index].quantity].push_back(index);
    std::vector<double> others;
    for (const auto& [id, row] : rows) {
        for (std::size_t index : row) {
            others.clear();
            for (std::size_t other : row)
                if (other != index)
                    others.push_back(comparable.at(other));
            if (!others.empty())
                values[index].apart = comparable.at(index) - *drift::median(others);
        }
    }
}

} // namespace

Correction find_correction(const Engine& engine, const Quantity& q, double own, const Conditions& conditions)
{
    switch (q.correction_form) {
    case CorrectionForm::pressure:
    case CorrectionForm::temperature:
        if (q.name == "maximum_pressure" && engine.maximum_pressure_controlled)
            return {};
        return linear(engine, q, own, conditions);
    case CorrectionForm::turbocharger_speed: return similarity(engine, own, conditions);
    case CorrectionForm::coolant_difference:
    case CorrectionForm::none: break;
    }
    return {};
}

std::optional<double> instrument_uncertainty(const Engine& engine, const Quantity& q, double own)
{
    for (const Instrument& instrument : engine.instruments)
        if (instrument.quantity == q.name && instrument.uncertainty)
            return *instrument.uncertainty;
    if (q.uncertainty_absolute)
        return q.uncertainty_absolute;
    if (q.uncertainty_percent)
        return std::abs(own) * *q.uncertainty_percent / 100.0;
    return std::nullopt;
}

std::vector<JudgedValue> judge_values(const Engine& engine, const Baseline& baseline, const Reading& reading,
                                      const Conditions& conditions)
{
    std::vector<JudgedValue> values;
    std::map<std::size_t, double> comparable; // index in values -> deviation, or what takes its place
    for (std::size_t i = 0; i < reading.values.size(); ++i) {
        const Value& typed = reading.values[i];
        const auto own = typed.phase == Phase::reading ? own_value(typed, conditions) : std::nullopt;
        if (!own)
            continue;
        const Quantity& q = quantity(typed.quantity);
        JudgedValue value;
        value.quantity = q.id;
        value.place = typed.place;
        value.value_index = i;
        value.raw = own->value;
        const Correction correction = find_correction(engine, q, own->value, conditions);
        value.applied = correction.applied;
        value.missing_input = correction.missing_input;
        const BaselineCurve* curve = baseline.curve(conditions.mode, q.name);
        if (curve && conditions.load_percent && typed.place.kind != Place::Kind::ship)
            value.expected = curve->at(*conditions.load_percent);
        const double best = correction.scale * own->value + correction.shift;
        if (correction.known() && (is_performance(q) || baseline.has(q.name)))
            value.corrected = best;
        if (value.corrected && value.expected)
            value.deviation = *value.corrected - *value.expected;
        if (value.expected)
            comparable[values.size()] = best - *value.expected;
        else if (!baseline.has(q.name) && is_performance(q))
            comparable[values.size()] = best;
        const double load_effect = value.expected ? load_part(engine, *curve, *conditions.load_percent) : 0.0;
        value.uncertainty = deviation_uncertainty(engine, q, value, correction, load_effect);
        values.push_back(std::move(value));
    }
    set_apart(values, comparable);
    std::stable_sort(values.begin(), values.end(), [](const JudgedValue& a, const JudgedValue& b) {
        return std::tie(a.quantity, a.place) < std::tie(b.quantity, b.place);
    });
    return values;
}

std::optional<SpecificConsumptionNow> specific_consumption(const Engine& engine, const Reading& reading,
                                                           const Conditions& conditions)
{
    const auto fuel = engine_mean(reading, "fuel_consumption", conditions);
    auto power = conditions.shaft_power;
    if (!power && conditions.load_percent)
        power = *conditions.load_percent / 100.0 * engine.rated_power.value() / 1000.0;
    if (!fuel || !power || !(*power > 0.0))
        return std::nullopt;
    const double heat = conditions.heating_value.value_or(reference_heating_value) / reference_heating_value;
    const double per_flow = 1000.0 / *power * heat;
    return SpecificConsumptionNow{per_flow * *fuel, per_flow};
}

} // namespace evenstroke
