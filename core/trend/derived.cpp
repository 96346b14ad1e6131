// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/trend/derived.h"

#include "core/airside/charge_air_cooler.h"
#include "core/airside/turbocharger.h"
#include "core/engine/power.h"
#include "core/engine/propeller.h"
#include "core/reference/humid_air.h"
#include "core/reference/linear_correction.h"
#include "core/trend/derived_inputs.h"
#include "core/trend/deviations.h"

#include <algorithm>
#include <cmath>
#include <set>
#include <type_traits>

namespace evenstroke {
namespace {

using Numbers = std::span<const double>;

constexpr double bar_of_millibar = 1e-3;
constexpr int indicator = 1; ///< one instrument for all cylinders

template <typename Measured> std::optional<double> number(const Result<Measured>& result, double per_si = 1.0)
{
    if (!result.has_value())
        return std::nullopt;
    if constexpr (std::is_same_v<Measured, double>)
        return result.value() * per_si;
    else
        return result.value().value() * per_si;
}

/// A pitch other than the built one, or a gear, makes the slip unknown.
bool fixed_direct_propeller(const Engine& engine, const Reading& reading, const Conditions& conditions)
{
    const auto setting = engine_mean(reading, "propeller_pitch", conditions); // % of the built pitch
    return engine.two_stroke() && engine.propeller_pitch && (!setting || std::abs(*setting - 100.0) < 0.5);
}

bool blower_running(const Reading& reading)
{
    return std::any_of(reading.values.begin(), reading.values.end(), [](const Value& value) {
        return quantity(value.quantity).name == "auxiliary_blower_running" && value.phase == Phase::reading &&
               (value.words == "yes" || (value.words.empty() && value.typed == "yes"));
    });
}

class Deriving
{
public:
    Deriving(const Engine& engine, const Baseline& baseline, const Reading& reading)
        : engine_(engine), baseline_(baseline), reading_(reading), conditions_(find_conditions(engine, reading))
    {
        if (const auto swept = swept_volume(engine.bore, engine.stroke); swept.has_value())
            swept_ = swept.value();
    }

    std::vector<DerivedValue> all()
    {
        add_indicated_power();
        add_shaft();
        add_consumption();
        if (!blower_running(reading_)) {
            add_turbochargers("compressor_pressure_ratio", false, false);
            add_turbochargers("compressor_efficiency", true, false);
            add_turbochargers("turbocharger_efficiency", false, true);
        }
        add_cooler();
        add_condensate();
        add_compression_ratio();
        add_slip();
        return std::move(rows_);
    }

private:
    DerivedInputs inputs() const { return {engine_, reading_, conditions_}; }

    std::optional<double> expected(std::string_view name) const
    {
        const BaselineCurve* curve = baseline_.curve(conditions_.mode, name);
        return curve && conditions_.load_percent ? curve->at(*conditions_.load_percent) : std::nullopt;
    }

    /// Adds the row where the formula knows a value; null where it does not.
    DerivedValue* add(std::string_view name, std::string_view unit, Place place, const DerivedInputs& of,
                      const Formula& formula)
    {
        const auto solved = of.solve(formula);
        if (!solved)
            return nullptr;
        DerivedValue row{name, unit, place, solved->value, {}, expected(name), {}, solved->half_width};
        if (row.expected)
            row.deviation = row.value - *row.expected;
        rows_.push_back(row);
        return &rows_.back();
    }

    /// The ambient moves this quantity: what was not corrected is not compared.
    static void set_corrected(DerivedValue& row, std::optional<double> corrected)
    {
        row.corrected = corrected;
        row.deviation.reset();
        if (corrected && row.expected)
            row.deviation = *corrected - *row.expected;
    }

    std::optional<double> indicated_kw(double bar, double speed) const
    {
        return number(indicated_power(engine_.kind, bar_difference(bar), swept_, per_minute(speed)), 1e-3);
    }

    /// Mean pressure or power of every cylinder among `of`; nothing where one is missing.
    std::optional<Formula> indicated_sum(DerivedInputs& of) const
    {
        const InputIndex speed = of.mean("speed");
        std::vector<std::pair<std::size_t, bool>> cylinders; // the bool: a power was typed, not a mean pressure
        for (int i = 1; i <= engine_.cylinders; ++i) {
            const InputIndex pressure = speed ? of.at("mean_indicated_pressure", Place::cylinder(i), indicator) : std::nullopt;
            const InputIndex power = pressure ? std::nullopt : of.at("indicated_power", Place::cylinder(i), indicator);
            if (!pressure && !power)
                return std::nullopt;
            cylinders.emplace_back(pressure ? *pressure : *power, power.has_value());
        }
        return [this, speed, cylinders](Numbers x) -> std::optional<double> {
            double sum = 0.0;
            for (const auto& [index, is_power] : cylinders) {
                const auto kilowatt = is_power ? std::optional(x[index]) : indicated_kw(x[index], x[*speed]);
                if (!kilowatt)
                    return std::nullopt;
                sum += *kilowatt;
            }
            return sum;
        };
    }

    void add_indicated_power()
    {
        for (int i = 1; i <= engine_.cylinders; ++i) {
            DerivedInputs of = inputs();
            const InputIndex pressure = of.at("mean_indicated_pressure", Place::cylinder(i));
            const InputIndex speed = of.mean("speed");
            if (pressure && speed)
                add("indicated_power", "kW", Place::cylinder(i), of,
                    [&](Numbers x) { return indicated_kw(x[*pressure], x[*speed]); });
        }
        DerivedInputs of = inputs();
        if (const auto sum = indicated_sum(of))
            if (DerivedValue* row = add("indicated_power", "kW", Place::engine(), of, *sum)) {
                row->expected.reset(); // a baseline's is that of one cylinder
                row->deviation.reset();
            }
    }

    /// Shaft power in kW as read, or torque times speed.
    static std::optional<Formula> shaft_power(DerivedInputs& of)
    {
        if (const InputIndex power = of.mean("shaft_power"))
            return [power](Numbers x) { return std::optional(x[*power]); };
        const InputIndex torque = of.mean("shaft_torque"), speed = of.mean("speed");
        if (!torque || !speed)
            return std::nullopt;
        return [torque, speed](Numbers x) {
            return number(shaft_power_from_torque(Torque::from_value(1000.0 * x[*torque]), per_minute(x[*speed])), 1e-3);
        };
    }

    void add_shaft()
    {
        DerivedInputs of = inputs();
        const auto power = shaft_power(of);
        if (!power)
            return;
        if (const InputIndex speed = of.mean("speed"))
            add("mean_effective_pressure", "bar", Place::engine(), of, [&](Numbers x) -> std::optional<double> {
                const auto kilowatt = (*power)(x);
                return kilowatt ? number(mean_effective_pressure(engine_.kind, kilowatts(*kilowatt), swept_,
                                                                 engine_.cylinders, per_minute(x[*speed])),
                                         1e-5)
                                : std::nullopt;
            });
        if (const auto indicated = indicated_sum(of))
            add("mechanical_efficiency", "1", Place::engine(), of, [&](Numbers x) -> std::optional<double> {
                const auto shaft = (*power)(x), gas = (*indicated)(x);
                return shaft && gas ? number(mechanical_efficiency(kilowatts(*shaft), kilowatts(*gas))) : std::nullopt;
            });
    }

    void add_consumption()
    {
        DerivedInputs of = inputs();
        const InputIndex fuel = of.mean("fuel_consumption"), heat = of.mean("fuel_lower_heating_value");
        Conditions with_power = conditions_;
        auto power = shaft_power(of);
        if (power && !with_power.shaft_power) {
            const auto solved = of.solve(*power);
            with_power.shaft_power = solved ? std::optional(solved->value) : std::nullopt;
        }
        if (const InputIndex load = power ? std::nullopt : of.mean("load_percent"))
            power = [this, load](Numbers x) { return std::optional(x[*load] / 1e5 * engine_.rated_power.value()); };
        const auto now = specific_consumption(engine_, reading_, with_power);
        if (!now || !fuel || !power)
            return;
        // The heating value counts for the corrected consumption, whose uncertainty is given.
        DerivedValue* row = add("specific_fuel_consumption", "g/kWh", Place::engine(), of, [&](Numbers x) {
            const auto kilowatt = (*power)(x);
            const double at_usual = heat ? x[*heat] / reference_heating_value : 1.0;
            return kilowatt && *kilowatt > 0.0 ? std::optional(1000.0 * x[*fuel] / *kilowatt * at_usual) : std::nullopt;
        });
        if (!row)
            return;
        row->value = now->value * reference_heating_value / conditions_.heating_value.value_or(reference_heating_value);
        set_corrected(*row, heat ? at_reference_ambient(now->value) : std::nullopt);
    }

    /// Nothing where the engine has coefficients and a condition for them was not read.
    std::optional<double> at_reference_ambient(double consumption) const
    {
        const auto found = engine_.correction.find("specific_fuel_consumption");
        if (found == engine_.correction.end())
            return consumption;
        const auto temperature = [](std::optional<double> degrees) {
            return degrees ? std::optional(celsius(*degrees)) : std::nullopt;
        };
        const auto corrected = correct_linearly(
            grams_per_kilowatt_hour(consumption),
            ambient_difference(temperature(conditions_.inlet_air), temperature(conditions_.cooler_coolant), engine_.reference),
            found->second);
        return corrected.has_value() ? std::optional(in_grams_per_kilowatt_hour(corrected.value().value)) : std::nullopt;
    }

    /// Numbers of the turbochargers (coolers) that anything was read of; the engine where none has a number.
    std::vector<Place> places(Place::Kind kind) const
    {
        std::set<Place> found;
        for (const Value& value : reading_.values)
            if (value.place.kind == kind)
                found.insert(value.place);
        return found.empty() ? std::vector{Place::engine()} : std::vector<Place>(found.begin(), found.end());
    }

    static Formula mean_of(std::vector<Formula> parts)
    {
        return [parts = std::move(parts)](Numbers x) -> std::optional<double> {
            double sum = 0.0;
            for (const Formula& part : parts) {
                const auto value = part(x);
                if (!value)
                    return std::nullopt;
                sum += *value;
            }
            return sum / static_cast<double>(parts.size());
        };
    }

    /// Pressure ratio of one compressor.
    static std::optional<Formula> compressor_ratio(DerivedInputs& of, Place place)
    {
        const InputIndex scavenge = of.mean("scavenge_pressure");
        const InputIndex filter = of.at("air_filter_pressure_drop", place);
        const InputIndex drop = of.at_or_mean("cooler_pressure_drop",
                                              place.number > 0 ? Place::cooler(place.number) : Place::engine());
        if (!scavenge)
            return std::nullopt;
        return [=, barometer = of.barometer()](Numbers x) {
            const double lost = filter ? x[*filter] * bar_of_millibar : 0.0;
            const double behind = drop ? x[*drop] * bar_of_millibar : 0.0;
            return number(compressor_pressure_ratio(bar_absolute(x[barometer] - lost),
                                                    bar_absolute(x[*scavenge] + x[barometer] + behind)));
        };
    }

    static std::optional<Formula> compressor_formula(DerivedInputs& of, Place place, const Formula& ratio)
    {
        const InputIndex inlet = of.at_or_mean("inlet_air_temperature", place);
        const InputIndex outlet = of.at("compressor_outlet_temperature", place);
        if (!inlet || !outlet)
            return std::nullopt;
        return [=](Numbers x) -> std::optional<double> {
            const auto now = ratio(x);
            return now ? number(compressor_efficiency(celsius(x[*inlet]), celsius(x[*outlet]), Ratio(*now))) : std::nullopt;
        };
    }

    static std::optional<Formula> turbocharger_formula(DerivedInputs& of, Place place, const Formula& ratio)
    {
        const InputIndex inlet = of.at_or_mean("inlet_air_temperature", place);
        const InputIndex before = of.at("exhaust_before_turbine", place);
        const InputIndex receiver = of.mean("exhaust_receiver_pressure");
        const InputIndex back = of.at("exhaust_back_pressure", place);
        if (!inlet || !before || !receiver || !back)
            return std::nullopt;
        return [=, barometer = of.barometer()](Numbers x) -> std::optional<double> {
            const auto now = ratio(x);
            if (!now)
                return std::nullopt;
            return number(turbocharger_efficiency({celsius(x[*inlet]), Ratio(*now), celsius(x[*before]),
                                                   bar_absolute(x[*receiver] + x[barometer]),
                                                   bar_absolute(x[*back] * bar_of_millibar + x[barometer])},
                                                  air_over_gas_heat_flow().value()));
        };
    }

    void add_turbochargers(std::string_view name, bool compressor, bool whole)
    {
        DerivedInputs of = inputs();
        std::vector<Formula> parts;
        for (const Place& place : places(Place::Kind::turbocharger)) {
            auto part = compressor_ratio(of, place);
            if (part && compressor)
                part = compressor_formula(of, place, *part);
            else if (part && whole)
                part = turbocharger_formula(of, place, *part);
            if (part)
                parts.push_back(*part);
        }
        if (!parts.empty())
            add(name, "1", Place::engine(), of, mean_of(std::move(parts)));
    }

    void add_cooler()
    {
        DerivedInputs of = inputs();
        std::vector<Formula> parts;
        for (const Place& place : places(Place::Kind::cooler)) {
            const InputIndex in = of.at_or_mean("compressor_outlet_temperature",
                                                place.number > 0 ? Place::turbocharger(place.number) : place);
            InputIndex out = of.at("cooler_air_outlet_temperature", place);
            if (!out)
                out = of.mean("scavenge_temperature");
            const InputIndex coolant = of.at_or_mean("cooler_coolant_inlet_temperature", place);
            if (in && out && coolant)
                parts.push_back([=](Numbers x) {
                    return number(cooler_effectiveness({celsius(x[*in]), celsius(x[*out]), celsius(x[*coolant]), {}}));
                });
        }
        if (!parts.empty())
            add("cooler_effectiveness", "1", Place::engine(), of, mean_of(std::move(parts)));
        DerivedInputs scavenge_and_coolant = inputs();
        const InputIndex air = scavenge_and_coolant.mean("scavenge_temperature");
        const InputIndex coolant = scavenge_and_coolant.mean("cooler_coolant_inlet_temperature");
        if (air && coolant)
            if (DerivedValue* row = add("cooler_temperature_difference", "K", Place::engine(), scavenge_and_coolant,
                                        [&](Numbers x) { return std::optional(x[*air] - x[*coolant]); }))
                set_corrected(*row, row->value); // a difference over the coolant is its own correction
    }

    void add_condensate()
    {
        DerivedInputs of = inputs();
        const InputIndex inlet = of.mean("inlet_air_temperature"), humidity = of.mean("relative_humidity");
        const InputIndex air = of.mean("scavenge_temperature"), pressure = of.mean("scavenge_pressure");
        if (!inlet || !humidity || !air || !pressure)
            return;
        const std::size_t barometer = of.barometer();
        DerivedValue* row = add("charge_air_condensate", "g/kg", Place::engine(), of, [&](Numbers x) -> std::optional<double> {
            // A hygrometer at 100 % is not asked for more when the effect of its slip is worked out.
            const double share = std::min(x[*humidity] / 100.0, 1.0);
            const auto water = charge_air_water(celsius(x[*inlet]), Ratio(share), bar_absolute(x[barometer]), celsius(x[*air]),
                                                bar_absolute(x[*pressure] + x[barometer]));
            return water.has_value() ? std::optional(1000.0 * water.value().condensate.value()) : std::nullopt;
        });
        if (row && !(row->value > 0.0))
            row->uncertainty.reset();
    }

    void add_compression_ratio()
    {
        for (int i = 1; i <= engine_.cylinders; ++i) {
            DerivedInputs of = inputs();
            const InputIndex compression = of.at("compression_pressure", Place::cylinder(i));
            const InputIndex scavenge = of.mean("scavenge_pressure");
            if (!compression || !scavenge)
                continue;
            const std::size_t barometer = of.barometer();
            DerivedValue* row = add("compression_pressure_ratio", "1", Place::cylinder(i), of, [&](Numbers x) {
                return number(compressor_pressure_ratio(bar_absolute(x[*scavenge] + x[barometer]),
                                                        bar_absolute(x[*compression] + x[barometer])));
            });
            if (row)
                set_corrected(*row, corrected_ratio(of.value(*compression), of.value(*scavenge)));
        }
    }

    std::optional<double> corrected_ratio(double compression, double scavenge) const
    {
        const auto absolute = [this](std::string_view name, double own) -> std::optional<double> {
            const Correction correction = find_correction(engine_, quantity(*find_quantity(name)), own, conditions_);
            if (!correction.known())
                return std::nullopt;
            return correction.scale * own + correction.shift + conditions_.barometer_or_one_bar();
        };
        const auto high = absolute("compression_pressure", compression), low = absolute("scavenge_pressure", scavenge);
        return high && low && *low > 0.0 ? std::optional(*high / *low) : std::nullopt;
    }

    void add_slip()
    {
        DerivedInputs of = inputs();
        const InputIndex ship = of.mean("speed_through_water"), shaft = of.mean("speed");
        if (!ship || !shaft || !fixed_direct_propeller(engine_, reading_, conditions_))
            return;
        add("apparent_slip", "%", Place::engine(), of, [&](Numbers x) {
            return number(apparent_slip(knots(x[*ship]), engine_.propeller_pitch, per_minute(x[*shaft])), 100.0);
        });
    }

    const Engine& engine_;
    const Baseline& baseline_;
    const Reading& reading_;
    Conditions conditions_;
    std::optional<Volume> swept_;
    std::vector<DerivedValue> rows_;
};

} // namespace

std::vector<DerivedValue> derive(const Engine& engine, const Baseline& baseline, const Reading& reading)
{
    return Deriving(engine, baseline, reading).all();
}

} // namespace evenstroke
