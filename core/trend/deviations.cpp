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

Correction linear(const Engine& engine, const Quantity& q, double own, const Conditions& conditions)
{
    Correction c;
    const CorrectionCoefficients* coefficients = correction_coefficients(engine, q);
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
    const double zero = q.correction_form == CorrectionForm::temperature ||
                                q.correction_form == CorrectionForm::coolant_difference
                            ? zero_celsius
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

/// Half-widths at 95 % of what a reading was taken under.
struct ConditionUncertainty
{
    double air, coolant, load;
    ConditionUncertainty(const Engine& engine, const Conditions& conditions)
        : air(usual_uncertainty("inlet_air_temperature", engine, 0.0).value_or(0.0)),
          coolant(usual_uncertainty("cooler_coolant_inlet_temperature", engine, 0.0).value_or(0.0)),
          load(usual_uncertainty("load_percent", engine, conditions.load_percent.value_or(0.0)).value_or(0.0))
    {
    }
};

/// What one quantity should read at a reading; the same for all cylinders.
struct Expectation
{
    std::optional<double> value;
    bool in_baseline = false;
    double load_effect = 0.0; ///< how far the value moves with the uncertainty of the load
};

Expectation find_expectation(const Baseline& baseline, const Quantity& q, const Conditions& conditions,
                             double load_uncertainty)
{
    Expectation expectation;
    expectation.in_baseline = baseline.has(q.name);
    const BaselineCurve* curve = baseline.curve(conditions.mode, q.name);
    if (!curve || !conditions.load_percent)
        return expectation;
    const double load = *conditions.load_percent;
    expectation.value = curve->at(load);
    const auto below = curve->at(load - 1.0), above = curve->at(load + 1.0);
    expectation.load_effect = below && above ? (*above - *below) / 2.0 * load_uncertainty : 0.0;
    return expectation;
}

DeviationBudget budget_of(const Engine& engine, const Quantity& q, double own, const Correction& correction,
                          const ConditionUncertainty& of, double load_effect)
{
    DeviationBudget budget;
    if (const auto instrument = instrument_uncertainty(engine, q, own))
        budget.instrument = correction.scale * *instrument;
    budget.inlet_air = correction.per_inlet_air * of.air;
    budget.cooler_coolant = correction.per_coolant * of.coolant;
    budget.load = -load_effect;
    return budget;
}

/// What the engine does, and not a condition that it is corrected for.
bool is_performance(const Quantity& q)
{
    return (q.group == "cylinder" || q.group == "turbocharger" || q.group == "cooler") &&
           q.name != "cooler_coolant_inlet_temperature";
}

/// Apart is formed from deviations; from corrected values where the engine has no baseline for the quantity.
void set_apart(std::vector<JudgedValue>& values, const std::vector<std::optional<double>>& comparable)
{
    std::map<QuantityId, std::vector<std::size_t>> rows;
    for (std::size_t index = 0; index < values.size(); ++index)
        if (comparable[index] && values[index].place.kind == Place::Kind::cylinder)
            rows[values[index].quantity].push_back(index);
    std::vector<double> others;
    for (const auto& [id, row] : rows) {
        for (std::size_t index : row) {
            others.clear();
            for (std::size_t other : row)
                if (other != index)
                    others.push_back(*comparable[other]);
            if (!others.empty())
                values[index].apart = *comparable[index] - drift::median_in_place(others);
        }
    }
}

} // namespace

const CorrectionCoefficients* correction_coefficients(const Engine& engine, const Quantity& q)
{
    auto found = engine.correction.find(q.name);
    if (found == engine.correction.end() && !q.correction_like.empty())
        found = engine.correction.find(q.correction_like);
    return found == engine.correction.end() ? nullptr : &found->second;
}

std::optional<double> DeviationBudget::half_width() const
{
    if (!instrument)
        return std::nullopt;
    return std::sqrt(square(*instrument) + square(inlet_air) + square(cooler_coolant) + square(load));
}

DeviationBudget deviation_budget(const Engine& engine, const Baseline& baseline, const Quantity& q, double own,
                                 const Conditions& conditions, bool compared)
{
    const ConditionUncertainty uncertainty(engine, conditions);
    const Expectation expectation = find_expectation(baseline, q, conditions, uncertainty.load);
    return budget_of(engine, q, own, find_correction(engine, q, own, conditions), uncertainty,
                     compared ? expectation.load_effect : 0.0);
}

Correction find_correction(const Engine& engine, const Quantity& q, double own, const Conditions& conditions)
{
    switch (q.correction_form) {
    case CorrectionForm::pressure:
    case CorrectionForm::temperature:
    case CorrectionForm::coolant_difference: // no value of its own: only with the engine's own coefficients
        if (q.name == "maximum_pressure" && engine.maximum_pressure_controlled)
            return {};
        return linear(engine, q, own, conditions);
    case CorrectionForm::turbocharger_speed: return similarity(engine, own, conditions);
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
    values.reserve(reading.values.size());
    std::vector<std::optional<double>> comparable; // of each value: deviation, or what takes its place
    const ConditionUncertainty uncertainty(engine, conditions);
    std::optional<QuantityId> expected_of; // values of one quantity mostly stand together
    Expectation expectation;
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
        if (expected_of != q.id)
            expectation = find_expectation(baseline, q, conditions, uncertainty.load);
        expected_of = q.id;
        if (typed.place.kind != Place::Kind::ship)
            value.expected = expectation.value;
        const double best = correction.scale * own->value + correction.shift;
        if (correction.known() && (is_performance(q) || expectation.in_baseline))
            value.corrected = best;
        if (value.corrected && value.expected)
            value.deviation = *value.corrected - *value.expected;
        comparable.emplace_back();
        // Where a condition is missing the deviation is not known, and nor is what lies apart in it.
        if (!value.missing_input.empty())
            comparable.back() = std::nullopt;
        else if (value.expected)
            comparable.back() = best - *value.expected;
        else if (!expectation.in_baseline && is_performance(q))
            comparable.back() = best;
        value.uncertainty = budget_of(engine, q, value.raw, correction, uncertainty,
                                      value.expected ? expectation.load_effect : 0.0).half_width();
        values.push_back(std::move(value));
    }
    set_apart(values, comparable);
    std::stable_sort(values.begin(), values.end(), [](const JudgedValue& a, const JudgedValue& b) {
        return std::tie(a.quantity, a.place) < std::tie(b.quantity, b.place);
    });
    return values;
}

} // namespace evenstroke
