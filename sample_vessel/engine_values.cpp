// SPDX-License-Identifier: GPL-3.0-or-later
#include "sample_vessel/engine_values.h"

#include "sample_vessel/decimal_text.h"
#include "sample_vessel/reading_maker.h"

#include <array>
#include <cmath>

namespace evenstroke::sample {
namespace {

constexpr double generator_efficiency = 0.95;         // common practice, no source
constexpr double mm_water_per_mbar = 10.0 / 0.980665; // conventional millimetre of water, 9.80665 Pa
constexpr double bar_per_kgf_cm2 = 0.980665;          // exact

/// A value without a curve: a usual level and its scatter.
double about(const SheetInputs& in, const char* what, double level, double spread)
{
    const EngineMoment& moment = in.moment;
    return level + spread * moment.chance->scatter({what, moment.engine->number, 0, moment.month});
}

double load_over_75(const SheetInputs& in)
{
    return in.moment.load_percent - 75.0;
}

const Coefficients& coefficients(const SheetInputs& in, const std::string& quantity)
{
    const auto& own = in.moment.engine->correction;
    const auto found = own.find(quantity);
    return found != own.end() ? found->second : own.at("exhaust_temperature");
}

/// Hours since the cylinder was last opened.
double hours_since_overhaul(const EngineMoment& moment, int cylinder)
{
    const Day today = std::chrono::floor<std::chrono::days>(moment.time.utc);
    const int engine = moment.engine->number;
    // Before the first reading: opened one after the other in the years before (invented).
    double since = running_hours(engine, today) - running_hours(engine, first_day(0)) +
                   (engine == 0 ? 1900.0 : 800.0) * (1.0 + 0.7 * cylinder);
    for (const Work& work : moment.scenario->work) {
        const bool opened = work.engine == engine && work.kind == "overhaul" &&
                            (work.cylinder == cylinder || work.cylinder == 0);
        if (opened && day(work.date) < today)
            since = running_hours(engine, today) - running_hours(engine, day(work.date));
    }
    return since;
}

} // namespace

double cylinder_as_read(const SheetInputs& in, const std::string& quantity, int cylinder)
{
    const double value = cylinder_value(in.moment, quantity, cylinder);
    if (quantity == "maximum_pressure" || quantity == "compression_pressure")
        return pressure_as_read(value, coefficients(in, quantity), in.around);
    if (quantity == "exhaust_temperature")
        return temperature_as_read(value, coefficients(in, quantity), in.around);
    if (quantity == "scavenge_box_temperature")
        return scavenge_temperature_as_read(value, in.around);
    return value;
}

double as_read(const SheetInputs& in, const std::string& quantity)
{
    const double value = engine_value(in.moment, quantity);
    if (quantity == "scavenge_pressure")
        return pressure_as_read(value, coefficients(in, quantity), in.around);
    if (quantity == "exhaust_before_turbine" || quantity == "exhaust_after_turbine")
        return temperature_as_read(value, coefficients(in, quantity), in.around);
    if (quantity == "turbocharger_speed")
        return turbocharger_speed_as_read(value, in.around);
    if (quantity == "scavenge_temperature")
        return scavenge_temperature_as_read(value, in.around);
    return value;
}

void write_heading(Sheet& sheet, const SheetInputs& in)
{
    const EngineMoment& moment = in.moment;
    const Day today = std::chrono::floor<std::chrono::days>(moment.time.utc);
    sheet.number("engine_running_hours", running_hours(moment.engine->number, today), {"h", 0});
    sheet.words("recorded_by", moment.engine->two_stroke ? "chief engineer" : "second engineer");
    if (moment.unsteady)
        sheet.words("reading_remark", moment.engine->two_stroke ? "swell from astern, governor hunting"
                                                                : "cargo pumps started during the walk");
    else if (in.rough && moment.engine->two_stroke)
        sheet.words("reading_remark", "fresh breeze on the bow, waited for a lull");
    for (const OutOfOrder& gap : moment.scenario->out_of_order)
        if (gap.engine == moment.engine->number && gap.reading == sheet.name && gap.reason == "out_of_order")
            sheet.words("reading_remark", "one thermometer out of order, spare ordered");
}

void write_control(Sheet& sheet, const SheetInputs& in)
{
    const EngineDesign& engine = *in.moment.engine;
    sheet.number("speed", as_read(in, "speed"), {"r/min", 1});
    sheet.number("load_percent", 100.0 * in.typed_power_kw / engine.rated_power_kw, {"%", 1});
    if (engine.two_stroke) {
        sheet.number("shaft_power", in.typed_power_kw, {"kW", 0});
        sheet.words("power_source", "torsion_meter");
    } else {
        sheet.words("power_source", "switchboard");
    }
    const double settled =
        60.0 +
        10.0 * std::floor(7.0 * in.moment.chance->even({"settled", engine.number, 0, in.moment.month}));
    sheet.number("settled_minutes", settled, {"min", 0});
    if (!engine.two_stroke) {
        sheet.number("generator_power", in.typed_power_kw * generator_efficiency, {"kW", 0});
        sheet.number("power_factor", about(in, "power_factor", 0.82, 0.02), {"", 2});
    }
    sheet.number("fuel_index", as_read(in, "fuel_index"), {"%", 1});
    if (engine.two_stroke)
        sheet.words("auxiliary_blower_running", "no");
    sheet.words("exhaust_treatment_state", "none");
    sheet.words("cylinders_cut_out", "none");
    sheet.number("inlet_air_temperature", in.around.inlet_air_c, {"°C", 1});
}

void write_cylinders(Sheet& sheet, const SheetInputs& in)
{
    struct Column
    {
        const char* quantity;
        Writing writing;
        bool two_stroke_only;
    };
    constexpr std::array<Column, 8> columns{{
        {"maximum_pressure", {"bar", 1}, false},
        {"compression_pressure", {"bar", 1}, false},
        {"mean_indicated_pressure", {"bar", 2}, false},
        {"exhaust_temperature", {"°C", 0}, false},
        {"fuel_index", {"%", 1}, false},
        {"jacket_outlet_temperature", {"°C", 1}, false},
        {"piston_coolant_outlet_temperature", {"°C", 1}, true},
        {"scavenge_box_temperature", {"°C", 0}, true},
    }};
    const EngineDesign& engine = *in.moment.engine;
    for (int cylinder = 1; cylinder <= engine.cylinders; ++cylinder)
        sheet.number("cylinder_running_hours", hours_since_overhaul(in.moment, cylinder), {"h", 0}, cylinder);
    for (const Column& column : columns)
        for (int cylinder = 1; cylinder <= engine.cylinders; ++cylinder)
            if (engine.two_stroke || !column.two_stroke_only)
                sheet.number(column.quantity, cylinder_as_read(in, column.quantity, cylinder), column.writing,
                             cylinder);
}

void write_air_side(Sheet& sheet, const SheetInputs& in)
{
    const bool two_stroke = in.moment.engine->two_stroke;
    const double scavenge = as_read(in, "scavenge_pressure"), drop = as_read(in, "cooler_pressure_drop");
    const double barometer = in.around.barometer_mbar / 1000.0;
    const double flow = std::pow((scavenge + 1.0) / 3.0, 2.0);
    const double filter = about(in, "filter", two_stroke ? 5.6 : 7.2, 0.2) * flow;
    const double ratio = (scavenge + barometer + drop / 1000.0) / (barometer - filter / 1000.0);
    const double efficiency = about(in, "compressor", two_stroke ? 0.84 : 0.80, 0.004);
    const double inlet_k = in.around.inlet_air_c + 273.15;
    sheet.number("turbocharger_speed", as_read(in, "turbocharger_speed"), {"r/min", 0});
    sheet.number("exhaust_before_turbine", as_read(in, "exhaust_before_turbine"), {"°C", 0});
    sheet.number("exhaust_after_turbine", as_read(in, "exhaust_after_turbine"), {"°C", 0});
    sheet.number("exhaust_receiver_pressure", 0.925 * (scavenge + barometer) - barometer, {"bar", 2});
    sheet.number("exhaust_back_pressure", about(in, "back pressure", 11.0, 0.6) * flow * mm_water_per_mbar,
                 {"mmH2O", 0});
    sheet.number("air_filter_pressure_drop", filter * mm_water_per_mbar, {"mmH2O", 0});
    sheet.number("compressor_outlet_temperature",
                 in.around.inlet_air_c + inlet_k * (std::pow(ratio, 0.286) - 1.0) / efficiency, {"°C", 0});
    sheet.number("turbocharger_oil_outlet_temperature",
                 about(in, "turbocharger oil", 66.0 + 0.15 * load_over_75(in), 1.2), {"°C", 0});
    const double air = as_read(in, "scavenge_temperature");
    if (two_stroke)
        sheet.number("scavenge_pressure", scavenge, {"bar", 2});
    else
        sheet.number("scavenge_pressure", scavenge / bar_per_kgf_cm2, {"kgf/cm2", 2});
    sheet.number("scavenge_temperature", air, {"°C", 1});
    sheet.number("cooler_air_outlet_temperature", about(in, "after cooler", air - 0.8, 0.3), {"°C", 1});
    sheet.number("cooler_pressure_drop", drop * mm_water_per_mbar, {"mmH2O", 0});
    sheet.number("cooler_coolant_inlet_temperature", in.around.coolant_c, {"°C", 1});
    sheet.number("cooler_coolant_outlet_temperature",
                 in.around.coolant_c + about(in, "coolant rise", 9.5 + 0.12 * load_over_75(in), 0.5),
                 {"°C", 1});
}

void write_cooling_and_oil(Sheet& sheet, const SheetInputs& in)
{
    const bool two_stroke = in.moment.engine->two_stroke;
    sheet.number("jacket_inlet_temperature", about(in, "jacket in", two_stroke ? 72.0 : 75.0, 0.8),
                 {"°C", 1});
    sheet.number("jacket_inlet_pressure", about(in, "jacket pressure", 3.4, 0.06), {"kgf/cm2", 1});
    if (two_stroke) {
        sheet.number("piston_coolant_inlet_temperature", about(in, "piston in", 45.0, 0.7), {"°C", 1});
        sheet.number("piston_coolant_inlet_pressure", about(in, "piston pressure", 2.9, 0.05),
                     {"kgf/cm2", 1});
    }
    sheet.number("lube_oil_inlet_pressure", about(in, "oil pressure", two_stroke ? 2.8 : 4.6, 0.06),
                 {"kgf/cm2", 1});
    const double oil = about(in, "oil in", two_stroke ? 44.5 : 62.0, 0.7);
    sheet.number("lube_oil_inlet_temperature", oil, {"°C", 1});
    sheet.number("lube_oil_outlet_temperature",
                 oil + about(in, "oil rise", (two_stroke ? 8.0 : 11.0) + 0.05 * load_over_75(in), 0.4),
                 {"°C", 1});
    if (two_stroke) {
        sheet.number("thrust_bearing_temperature", about(in, "thrust", 53.0 + 0.08 * load_over_75(in), 0.8),
                     {"°C", 0});
        sheet.number("oil_mist_level", about(in, "mist", 4.0, 0.7), {"%", 0});
    } else {
        sheet.number("crankcase_pressure", about(in, "crankcase", 14.0, 1.2), {"mmH2O", 0});
    }
}

void write_fuel(Sheet& sheet, const SheetInputs& in)
{
    const EngineDesign& engine = *in.moment.engine;
    const double specific =
        consumption_as_read(engine_value(in.moment, "specific_fuel_consumption"),
                            engine.mechanical_efficiency, in.fuel.heating_value_mj_kg, in.around);
    sheet.number("fuel_consumption", specific * in.typed_power_kw / 1000.0, {"kg/h", 1});
    sheet.number("fuel_meter_interval", engine.two_stroke ? 60.0 : 45.0, {"min", 0});
    sheet.words("fuel_kind", in.fuel.kind);
    sheet.number("fuel_lower_heating_value", in.fuel.heating_value_mj_kg, {"MJ/kg", 2});
    sheet.number("fuel_density_15", in.fuel.density_15, {"kg/m3", 1});
    sheet.number("fuel_temperature", about(in, "fuel temperature", in.fuel.temperature_c, 1.0), {"°C", 0});
    sheet.number("fuel_viscosity", about(in, "fuel viscosity", in.fuel.viscosity_at_engine, 0.25),
                 {"cSt", 1});
    sheet.number("fuel_sulphur", in.fuel.sulphur_percent, {"%", 2});
    sheet.number("fuel_inlet_pressure", about(in, "fuel pressure", 7.6, 0.12), {"kgf/cm2", 1});
}

} // namespace evenstroke::sample
