// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/review/power_ways.h"

#include "core/engine/power.h"
#include "core/reading/typed_number.h"
#include "core/review/power_curves.h"

#include <algorithm>
#include <cmath>

namespace evenstroke::power_ways {
namespace {

using Numbers = std::span<const double>;
using Index = std::optional<std::size_t>;

constexpr int indicator = 1; ///< one instrument for all cylinders

class Ways
{
public:
    Ways(const Engine& engine, const Baseline& baseline, const Reading& reading, const Conditions& conditions,
         const BaselineScatter& scatter)
        : engine_(engine), reading_(reading), conditions_(conditions), source_(words_of(reading, "power_source")),
          curves_(engine, baseline, reading, conditions, scatter)
    {
    }

    std::vector<Way> all()
    {
        const bool set = generating_set();
        if (set)
            ways_.push_back(switchboard());
        ways_.push_back(shaft_power());
        ways_.push_back(torque());
        ways_.push_back(indicated());
        ways_.push_back(curves_.turbocharger_speed());
        ways_.push_back(curves_.fuel_index());
        ways_.push_back(curves_.fuel_consumption());
        ways_.push_back(typed_load());
        give_shaft_power_its_source();
        mark_repeats();
        return std::move(ways_);
    }

private:
    PowerInputs inputs() const { return {engine_, reading_, conditions_}; }
    bool read(std::string_view name) const { return engine_mean(reading_, name, conditions_).has_value(); }
    Way* find(std::string_view name)
    {
        const auto found =
            std::find_if(ways_.begin(), ways_.end(), [&](const Way& way) { return way.estimate.name == name; });
        return found == ways_.end() ? nullptr : &*found;
    }

    /// What the switchboard shows is the engine's own power only where the engine drives nothing else.
    bool generating_set() const
    {
        if (engine_.two_stroke() || (engine_.load_limits && !engine_.load_limits->constant_speed))
            return false;
        return read("generator_power") || (engine_.load_limits && engine_.load_limits->constant_speed);
    }

    Way switchboard() const
    {
        Way way = begin("switchboard", "Switchboard", "P = P_el / η_gen", {"generator_power"});
        way.estimate.workings.source = "definition of the generator's efficiency";
        PowerInputs of = inputs();
        const Index electrical = of.mean("generator_power", "P_el");
        if (!electrical)
            return without(std::move(way), "no electrical power was read");
        const bool entered = engine_.generator_efficiency.has_value();
        const std::size_t efficiency =
            of.given({"Generator efficiency", "η_gen", Place::engine(),
                      engine_.generator_efficiency.value_or(usual_generator_efficiency), "",
                      entered ? entered_generator_half_width : usual_generator_half_width, 0.0, {},
                      entered ? "entered with the engine; half-width common practice" : "common practice"});
        if (!entered)
            way.estimate.workings.remarks.push_back("No generator efficiency is entered with the engine: 0.95 is taken "
                                                    "(common practice, no source).");
        return finish(std::move(way), of, [=](Numbers x) { return std::optional(x[*electrical] / x[efficiency]); });
    }

    Way shaft_power() const
    {
        const bool meter = source_ == "torsion_meter";
        Way way = begin(meter ? "torsion_meter" : "shaft_power", meter ? "Torsion meter" : "Shaft power as noted",
                        "P = P_shaft", {"shaft_power"});
        way.estimate.workings.source = "as read";
        if (!source_.empty() && !meter)
            return without(std::move(way), "no torsion meter was read");
        PowerInputs of = inputs();
        const Index power = of.mean("shaft_power", "P_shaft");
        if (!power)
            return without(std::move(way), "no shaft power was read");
        if (!meter)
            way.estimate.remark = "where it comes from was not noted";
        return finish(std::move(way), of, [=](Numbers x) { return std::optional(x[*power]); });
    }

    Way torque() const
    {
        Way way = begin("shaft_torque", "Torque and speed", "P = 2 π n M / 60", {"shaft_torque", "speed"});
        way.estimate.workings.source = "definition";
        PowerInputs of = inputs();
        const Index torque = of.mean("shaft_torque", "M"), speed = of.mean("speed", "n");
        if (!torque || !speed)
            return without(std::move(way), torque ? "no speed was read" : "no shaft torque was read");
        return finish(std::move(way), of, [=](Numbers x) -> std::optional<double> {
            const auto power = shaft_power_from_torque(Torque::from_value(1000.0 * x[*torque]), per_minute(x[*speed]));
            return power.has_value() ? std::optional(power.value().value() / 1000.0) : std::nullopt;
        });
    }

    /// kW of one cylinder from its mean pressure in bar and the speed.
    std::optional<double> of_cylinder(double bar, double speed) const
    {
        const auto swept = swept_volume(engine_.bore, engine_.stroke);
        if (!swept.has_value())
            return std::nullopt;
        const auto power = indicated_power(engine_.kind, bar_difference(bar), swept.value(), per_minute(speed));
        return power.has_value() ? std::optional(power.value().value() / 1000.0) : std::nullopt;
    }

    /// The sum over all cylinders, in kW; `missing` says why there is none.
    std::optional<Formula> indicated_sum(PowerInputs& of, Index speed, std::string& missing) const
    {
        std::vector<std::pair<std::size_t, bool>> cylinders; // the bool: a power was typed, not a mean pressure
        for (int i = 1; i <= engine_.cylinders; ++i) {
            const std::string number = engine_.cylinder_name(i);
            const Index pressure =
                speed ? of.at("mean_indicated_pressure", "p_i" + number, Place::cylinder(i), indicator) : std::nullopt;
            const Index power =
                pressure ? std::nullopt : of.at("indicated_power", "P_i" + number, Place::cylinder(i), indicator);
            if (!pressure && !power) {
                missing = speed ? "no mean indicated pressure was read of cylinder " + number : "no speed was read";
                return std::nullopt;
            }
            cylinders.emplace_back(pressure ? *pressure : *power, power.has_value());
        }
        if (cylinders.empty())
            return std::nullopt;
        return [this, speed, cylinders](Numbers x) -> std::optional<double> {
            double sum = 0.0;
            for (const auto& [index, is_power] : cylinders) {
                const auto power = is_power ? std::optional(x[index]) : of_cylinder(x[index], x[*speed]);
                if (!power)
                    return std::nullopt;
                sum += *power;
            }
            return sum;
        };
    }

    /// One efficiency is entered, most likely that of the rating. Friction as a mean pressure hardly changes with the
    /// load (common practice), and then the efficiency at part load is lower: 1 / (1 + (1/η - 1) p_rated / p).
    double efficiency_half_width(double gas_kw, double speed) const
    {
        const double entered = *engine_.mechanical_efficiency;
        const double rated_kw = engine_.rated_power.value() / 1000.0, rated_speed = engine_.rated_speed.value() * 60.0;
        if (!(gas_kw > 0.0 && speed > 0.0 && rated_kw > 0.0 && rated_speed > 0.0))
            return mechanical_efficiency_half_width;
        const double torque = (gas_kw * entered / rated_kw) / (speed / rated_speed); // of the rating's
        const double by_friction = 1.0 / (1.0 + (1.0 / entered - 1.0) / torque);
        return std::max(mechanical_efficiency_half_width, entered - by_friction);
    }

    Way indicated() const
    {
        Way way = begin("indicated", "Indicated power", "P = η_m Σ P_i",
                        {"mean_indicated_pressure", "indicated_power"});
        way.of_cylinders = true;
        way.estimate.workings.source = "definition; P_i = p_i V_s n, half of it for a four-stroke engine";
        PowerInputs of = inputs();
        std::string missing;
        const Index speed = of.mean("speed", "n");
        const auto sum = indicated_sum(of, speed, missing);
        if (!sum)
            return without(std::move(way), missing);
        if (const auto all = of.solve(*sum))
            way.estimate.workings.steps.push_back({"Sum of the indicated powers", all->value, "kW"});
        if (engine_.mechanical_efficiency) {
            const double sum_now = way.estimate.workings.steps.empty() ? 0.0 : way.estimate.workings.steps.back().value;
            const double unknown = efficiency_half_width(sum_now, speed ? of.value(*speed) : 0.0);
            const std::size_t efficiency = of.given({"Mechanical efficiency", "η_m", Place::engine(),
                                                     *engine_.mechanical_efficiency, "", unknown, 0.0, {},
                                                     "entered with the engine; half-width common practice"});
            if (unknown > mechanical_efficiency_half_width)
                way.estimate.workings.remarks.push_back(
                    "The mechanical efficiency is entered as one number. If the friction pressure is the same at every load, it is "
                    "lower at this load by what its half-width says.");
            return finish(std::move(way), of, [sum = *sum, efficiency](Numbers x) -> std::optional<double> {
                const auto gas = sum(x);
                return gas ? std::optional(*gas * x[efficiency]) : std::nullopt;
            });
        }
        if (!engine_.two_stroke() || !speed)
            return without(std::move(way), "no mechanical efficiency is entered with the engine");
        return by_friction(std::move(way), of, *sum, *speed);
    }

    Way by_friction(Way way, PowerInputs& of, const Formula& sum, std::size_t speed) const
    {
        way.estimate.workings.formula = "P = Σ (p_i - p_f) V_s n";
        way.estimate.workings.validity = "two-stroke engines";
        way.estimate.remark = "estimated: the usual friction pressure is taken";
        way.estimate.workings.remarks.push_back("No mechanical efficiency is entered with the engine: a friction pressure of "
                                                "1 bar is taken (common practice, no source).");
        const std::size_t friction = of.given({"Friction pressure", "p_f", Place::engine(),
                                               in_bar(usual_friction_pressure()), "bar", friction_half_width, 0.0, {},
                                               "common practice, no source"});
        return finish(std::move(way), of, [=, this](Numbers x) -> std::optional<double> {
            const auto gas = sum(x);
            const auto swept = swept_volume(engine_.bore, engine_.stroke);
            if (!gas || !swept.has_value())
                return std::nullopt;
            const auto power =
                shaft_power_from_indicated(engine_.kind, kilowatts(*gas), swept.value(), engine_.cylinders,
                                           per_minute(x[speed]), bar_difference(x[friction]));
            return power.has_value() ? std::optional(power.value().value() / 1000.0) : std::nullopt;
        });
    }

    Way typed_load() const
    {
        Way way = begin("typed", "Load as typed", "P = L P_rated / 100", {"load_percent"});
        way.estimate.workings.source = "definition";
        PowerInputs of = inputs();
        const Index load = of.mean("load_percent", "L");
        const double rated = engine_.rated_power.value() / 1000.0;
        if (!load)
            return without(std::move(way), "no load was typed");
        if (!(rated > 0.0))
            return without(std::move(way), "no rated power is entered with the engine");
        const std::size_t full =
            of.given({"Rated power", "P_rated", Place::engine(), rated, "kW", 0.0, 0.0, {}, "entered with the engine"});
        return finish(std::move(way), of, [=](Numbers x) { return std::optional(x[*load] / 100.0 * x[full]); });
    }

    /// A shaft power that was reckoned from something else is that way, and no torsion meter.
    void give_shaft_power_its_source()
    {
        Way* way = source_.empty() || source_ == "torsion_meter" ? nullptr : find(source_);
        if (!way || !read("shaft_power") || (source_ == "typed" && read("load_percent")))
            return;
        const std::optional<double> own = way->estimate.power;
        const std::string name = way->estimate.name, words = way->estimate.words;
        const std::vector<std::string> rests_on = way->rests_on;
        Way typed = begin(name, words, "P = P_shaft", rests_on);
        typed.rests_on.push_back("shaft_power");
        typed.of_cylinders = way->of_cylinders;
        typed.estimate.workings.source = "as noted by the engineer";
        PowerInputs of = inputs();
        const Index power = of.mean("shaft_power", "P_shaft");
        typed.estimate.remark = "the shaft power as noted";
        if (own)
            typed.estimate.workings.remarks.push_back("Worked out by the program from the same reading it is " +
                                                      plain_number(*own, 0) + " kW.");
        *way = finish(std::move(typed), of, [power](Numbers x) { return std::optional(x[*power]); });
    }

    void mark_repeats()
    {
        Way* meter = find("torsion_meter") ? find("torsion_meter") : find("shaft_power");
        Way* torque = find("shaft_torque");
        if (meter->estimate.power && torque->estimate.power)
            repeat(*torque, *meter, "the same meter: counted as ");
        Way* load = find("typed");
        if (!load->estimate.power || source_ == "typed")
            return;
        Way* of = find(source_ == "torsion_meter" && !meter->estimate.power ? "shaft_torque" : source_);
        constexpr double same = 0.01; // a load reckoned from a power and rounded to a per cent
        const auto& shaft = meter->estimate.power;
        if (!of && source_.empty() && shaft && std::abs(*load->estimate.power - *shaft) <= same * *shaft)
            of = meter;
        if (of && of->estimate.power)
            repeat(*load, *of, "comes from there: counted as ");
        else if (source_.empty())
            load->estimate.remark = "where it comes from was not noted";
    }

    static void repeat(Way& way, const Way& of, const std::string& why)
    {
        way.repeats = true;
        way.repeats_of = of.estimate.words;
        way.estimate.remark = why + of.estimate.words;
    }

    const Engine& engine_;
    const Reading& reading_;
    const Conditions& conditions_;
    std::string source_;
    PowerCurves curves_;
    std::vector<Way> ways_;
};

} // namespace

Way begin(std::string name, std::string words, std::string formula, std::vector<std::string> rests_on)
{
    Way way;
    way.estimate.name = std::move(name);
    way.estimate.words = std::move(words);
    way.estimate.workings.title = "Shaft power: " + way.estimate.words;
    way.estimate.workings.unit = "kW";
    way.estimate.workings.decimals = 0;
    way.estimate.workings.formula = std::move(formula);
    way.rests_on = std::move(rests_on);
    return way;
}

Way without(Way way, const std::string& missing)
{
    way.estimate.missing = missing;
    std::string sentence = missing.empty() ? "the values for it are not there" : missing;
    sentence[0] = static_cast<char>(sentence[0] >= 'a' && sentence[0] <= 'z' ? sentence[0] - 'a' + 'A' : sentence[0]);
    way.estimate.workings.missing = sentence + ".";
    return way;
}

Way finish(Way way, PowerInputs& of, const Formula& formula)
{
    const auto solved = of.solve(formula);
    way.estimate.workings.inputs = of.words();
    if (!solved || !(solved->value > 0.0))
        return without(std::move(way), "the values read give no power");
    way.estimate.power = way.estimate.workings.value = solved->value;
    way.estimate.half_width = way.estimate.workings.half_width = solved->half_width;
    return way;
}

std::vector<Way> find_ways(const Engine& engine, const Baseline& baseline, const Reading& reading,
                           const Conditions& conditions, const BaselineScatter& scatter)
{
    return Ways(engine, baseline, reading, conditions, scatter).all();
}

} // namespace evenstroke::power_ways
