// SPDX-License-Identifier: GPL-3.0-or-later
#include "sample_vessel/cylinder_state.h"

#include <algorithm>

namespace evenstroke::sample {
namespace {

/// One standard deviation of one careful monthly reading; `shared` moves all cylinders alike (a little
/// more or less load than written down, air measured in the wrong corner). Invented, somewhat below the
/// prior noise of the drift method. `after_work` is how far work moves a cylinder's lasting difference.
struct Spread
{
    double own, shared, after_work;
    bool percent = false;
    double usual = 0.0; ///< level of a quantity the baseline does not hold
};

Spread spread_of(const std::string& quantity, bool two_stroke)
{
    if (quantity == "mean_indicated_pressure")
        return {1.25, 0.5, 0.6, true, 0.0};
    if (quantity == "maximum_pressure")
        return {1.25, 0.8, 0.9, false, 0.0};
    if (quantity == "compression_pressure")
        return {1.0, 0.6, 0.6, false, 0.0};
    if (quantity == "exhaust_temperature")
        return {5.0, 4.0, 3.0, false, 0.0};
    if (quantity == "fuel_index")
        return {0.65, 0.4, 0.3, false, 0.0};
    if (quantity == "jacket_outlet_temperature")
        return {0.85, 0.5, 0.4, false, two_stroke ? 82.5 : 84.0};
    if (quantity == "piston_coolant_outlet_temperature")
        return {0.85, 0.5, 0.4, false, 57.0};
    return {1.0, 0.8, 0.5, false, 43.0}; // scavenge_box_temperature
}

bool opens_all_quantities(const std::string& kind)
{
    return kind == "overhaul" || kind == "fuel_valves" || kind == "exhaust_valve" || kind == "fuel_pump";
}

/// Lasting difference of the cylinder as it stands after all work up to this reading.
double lasting_difference(const EngineMoment& moment, const std::string& quantity, int cylinder,
                          double after_work)
{
    const Scenario& scenario = *moment.scenario;
    const int number = moment.engine->number;
    double difference = scenario.differences[static_cast<std::size_t>(number)].at(
        quantity)[static_cast<std::size_t>(cylinder - 1)];
    int count = 0;
    for (const Work& work : scenario.work) {
        const bool concerns = work.engine == number &&
                              (work.cylinder == cylinder || (work.cylinder == 0 && work.kind == "overhaul"));
        if (!concerns || std::chrono::sys_seconds(day(work.date)) > moment.time.utc)
            continue;
        ++count;
        const auto wanted = work.change.find(quantity);
        if (wanted != work.change.end())
            difference += wanted->second;
        else if (opens_all_quantities(work.kind))
            difference +=
                after_work * moment.chance->normal({"after work " + quantity, number, cylinder, count});
    }
    return difference;
}

double fault_effect(const EngineMoment& moment, const std::string& quantity, int cylinder)
{
    double effect = 0.0;
    for (const Fault& fault : moment.scenario->faults) {
        const auto slope = fault.per_month.find(quantity);
        if (fault.engine == moment.engine->number && fault.cylinder == cylinder &&
            slope != fault.per_month.end())
            effect += slope->second * std::max(0.0, months_between(day(fault.onset), moment.time.utc));
    }
    return effect;
}

/// Standard deviate of a cylinder value. Pressures read from one card err together a little:
/// mean indicated with maximum 0.3, maximum with compression 0.4.
double deviate(const EngineMoment& moment, const std::string& quantity, int cylinder)
{
    const auto scatter = [&](const std::string& what) {
        return moment.chance->scatter({what, moment.engine->number, cylinder, moment.month});
    };
    double value = scatter(quantity);
    if (quantity == "maximum_pressure")
        value =
            0.866 * value + 0.3 * scatter("mean_indicated_pressure") + 0.4 * scatter("compression_pressure");
    return moment.unsteady ? 3.6 * value : value;
}

/// Slow dirt between two cleanings and washes, as a share of the value; small, nothing to be flagged.
double dirt(const EngineMoment& moment, const std::string& quantity)
{
    if (!moment.scenario->engine_wide_change)
        return 0.0;
    const double since_wash = std::min(8.0, months_since_work(moment, "turbocharger_wash", 3.0));
    if (quantity == "turbocharger_speed")
        return -0.0006 * since_wash;
    if (quantity == "scavenge_pressure")
        return -0.0010 * since_wash;
    if (quantity == "exhaust_before_turbine" || quantity == "exhaust_after_turbine")
        return 0.0008 * since_wash;
    if (quantity == "cooler_pressure_drop")
        return 0.0015 * months_since_work(moment, "cooler_cleaning", 10.0);
    return 0.0;
}

/// Scatter of an engine value, in its unit or as a share.
double engine_spread(const std::string& quantity, double value)
{
    if (quantity == "scavenge_pressure")
        return 0.022;
    if (quantity == "turbocharger_speed")
        return 0.0045 * value;
    if (quantity == "exhaust_before_turbine" || quantity == "exhaust_after_turbine")
        return 5.0;
    if (quantity == "scavenge_temperature")
        return 1.0;
    if (quantity == "specific_fuel_consumption")
        return 0.006 * value;
    if (quantity == "cooler_pressure_drop")
        return 0.025 * value;
    if (quantity == "speed")
        return 0.002 * value;
    return 0.4; // fuel_index
}

} // namespace

double months_since_work(const EngineMoment& moment, const std::string& kind, double before_first_reading)
{
    double months = before_first_reading + months_between(first_day(0), moment.time.utc);
    for (const Work& work : moment.scenario->work) {
        const double since = months_between(day(work.date), moment.time.utc);
        if (work.engine == moment.engine->number && work.kind == kind && since >= 0.0)
            months = std::min(months, since);
    }
    return months;
}

double light_running(const EngineMoment& moment)
{
    if (!moment.scenario->engine_wide_change || !moment.engine->two_stroke)
        return 0.0;
    return 0.015 - 0.025 * std::min(30.0, months_since_work(moment, "hull_cleaned", 6.0)) / 24.0;
}

double cylinder_value(const EngineMoment& moment, const std::string& quantity, int cylinder)
{
    const Spread spread = spread_of(quantity, moment.engine->two_stroke);
    const bool on_curve = spread.usual == 0.0;
    double value = on_curve ? expected(*moment.engine, quantity, moment.load_percent)
                            : spread.usual + 0.03 * (moment.load_percent - 75.0);
    // More turns at the same power: less work in each stroke. The rack feels it too.
    if (quantity == "mean_indicated_pressure" || quantity == "fuel_index")
        value /= 1.0 + light_running(moment);
    const double shared =
        moment.chance->scatter({"shared " + quantity, moment.engine->number, 0, moment.month});
    const double apart =
        lasting_difference(moment, quantity, cylinder, spread.after_work) +
        fault_effect(moment, quantity, cylinder) +
        moment.scatter * (spread.shared * shared + spread.own * deviate(moment, quantity, cylinder));
    return spread.percent ? value * (1.0 + apart / 100.0) : value + apart;
}

double engine_value(const EngineMoment& moment, const std::string& quantity)
{
    double value = expected(*moment.engine, quantity, moment.load_percent) * (1.0 + dirt(moment, quantity));
    if (quantity == "speed")
        value *= 1.0 + light_running(moment);
    if (quantity == "fuel_index")
        value /= 1.0 + light_running(moment);
    return value + engine_spread(quantity, value) *
                       moment.chance->scatter({"engine " + quantity, moment.engine->number, 0, moment.month});
}

} // namespace evenstroke::sample
