// SPDX-License-Identifier: GPL-3.0-or-later
#include "sample_vessel/reading_maker.h"

#include "sample_vessel/decimal_text.h"
#include "sample_vessel/engine_values.h"
#include "sample_vessel/typing_slips.h"

#include <algorithm>
#include <cmath>

namespace evenstroke::sample {
namespace {

bool listed(const std::vector<MonthOf>& months, int engine, const std::string& reading)
{
    return std::any_of(months.begin(), months.end(),
                       [&](const MonthOf& one) { return one.engine == engine && one.reading == reading; });
}

const FuelBatch& batch_in_use(const Scenario& scenario, Day when)
{
    const FuelBatch* in_use = &scenario.fuel.front();
    for (const FuelBatch& batch : scenario.fuel)
        if (day(batch.from) <= when)
            in_use = &batch;
    return *in_use;
}

/// The torsion meter shows whole kilowatts, and so does the switchboard behind the generator.
double power_as_shown(const EngineMoment& moment)
{
    const double meter =
        1.0 + 0.004 * moment.chance->normal({"power meter", moment.engine->number, 0, moment.month});
    return rounded(moment.engine->rated_power_kw * moment.load_percent / 100.0 * meter, 0);
}

SheetInputs inputs_of(const Scenario& scenario, const Chance& weather, const Chance& chance, int engine,
                      int month)
{
    const ShipDay ship = ship_day(scenario, weather, month, engine == 2);
    SheetInputs in;
    in.moment = {&scenario,
                 &scenario.engines[static_cast<std::size_t>(engine)],
                 &chance,
                 month,
                 reading_time(ship, weather, engine),
                 load_of(weather, engine, month),
                 listed(scenario.unsteady, engine, month_name(month))};
    in.around = surroundings_of(ship, weather, engine);
    in.typed_power_kw = power_as_shown(in.moment);
    in.fuel = batch_in_use(scenario, std::chrono::floor<std::chrono::days>(in.moment.time.utc));
    in.rough = month_name(month) == scenario.rough_month;
    in.quick_lines = in.moment.unsteady || weather.even({"quick lines", engine, 0, month}) > 0.08;
    return in;
}

Sheet engine_sheet(const SheetInputs& in)
{
    Sheet sheet;
    sheet.name = month_name(in.moment.month);
    sheet.time = in.moment.time;
    write_heading(sheet, in);
    write_control(sheet, in);
    write_cylinders(sheet, in);
    write_air_side(sheet, in);
    write_cooling_and_oil(sheet, in);
    write_fuel(sheet, in);
    write_quick_lines(sheet, in);
    return sheet;
}

void add_human_touch(Sheet& sheet, const Scenario& scenario, int engine)
{
    for (const OutOfOrder& gap : scenario.out_of_order)
        if (gap.engine == engine && gap.reading == sheet.name)
            sheet.mark_missing(gap.quantity, gap.cylinder, gap.reason);
    for (const TypingError& error : scenario.typing_errors)
        if (error.engine == engine && error.reading == sheet.name)
            make_slip(sheet, error);
}

/// Speed from the turns of the propeller and its slip; the log reads a little differently from the fix.
void write_speeds(Sheet& sheet, const Scenario& scenario, const Chance& weather, const Chance& chance,
                  const ShipDay& ship)
{
    const EngineDesign& engine = scenario.engines.front();
    const EngineMoment moment{
        &scenario, &engine, &chance, ship.month, ship.time, load_of(weather, 0, ship.month), false};
    const double turns = expected(engine, "speed", moment.load_percent) * (1.0 + light_running(moment));
    const double slip = 0.055 - 1.6 * (light_running(moment) - 0.015) + 0.0015 * ship.wind_kn;
    const double through_water =
        engine.propeller_pitch_m.value_or(0.0) * turns * 60.0 / 1852.0 * (1.0 - slip);
    const double current = 0.6 * weather.normal({"current", 0, ship.second ? 1 : 0, ship.month});
    sheet.number("speed_over_ground", through_water + current, {"kn", 1});
    sheet.number("speed_through_water",
                 through_water + 0.1 * weather.normal({"log", 0, ship.second ? 1 : 0, ship.month}),
                 {"kn", 1});
}

Sheet ship_sheet(const Scenario& scenario, const Chance& weather, const Chance& chance, const ShipDay& ship)
{
    Sheet sheet;
    sheet.name = ship.name;
    sheet.time = ship.time;
    sheet.number("latitude", ship.latitude, {"deg", 2});
    sheet.number("longitude", ship.longitude, {"deg", 2});
    sheet.number("course", ship.course, {"deg", 0});
    write_speeds(sheet, scenario, weather, chance, ship);
    sheet.number("draught_forward", ship.draught_forward, {"m", 1});
    sheet.number("draught_aft", ship.draught_aft, {"m", 1});
    sheet.number("water_depth", ship.water_depth, {"m", 0});
    sheet.number("wind_speed", ship.wind_kn, {"kn", 0});
    sheet.number("wind_direction_relative", ship.wind_off_bow, {"deg", 0});
    sheet.number("sea_state", ship.sea_state, {"", 0});
    sheet.number("sea_water_temperature", ship.sea_water_c, {"°C", 1});
    sheet.number("barometric_pressure", ship.barometer_mbar, {"hPa", 0});
    sheet.number("relative_humidity", ship.humidity_percent, {"%", 0});
    return sheet;
}

void sort_by_time(std::vector<Sheet>& sheets)
{
    std::sort(sheets.begin(), sheets.end(),
              [](const Sheet& a, const Sheet& b) { return a.time.utc < b.time.utc; });
}

} // namespace

double running_hours(int engine, Day when)
{
    constexpr double counter[] = {41230.0, 18410.0, 17120.0}, hours_a_day[] = {14.9, 10.2, 9.6};
    const auto index = static_cast<std::size_t>(engine);
    return rounded(counter[index] + hours_a_day[index] * static_cast<double>((when - first_day(0)).count()),
                   0);
}

std::vector<Sheet> engine_sheets(const Scenario& scenario, std::uint64_t seed, int engine)
{
    const Chance weather(seed), chance(seed, scenario.scatter);
    std::vector<Sheet> sheets;
    for (int month = 0; month < month_count; ++month) {
        if (listed(scenario.missed, engine, month_name(month)))
            continue;
        sheets.push_back(engine_sheet(inputs_of(scenario, weather, chance, engine, month)));
        add_human_touch(sheets.back(), scenario, engine);
    }
    sort_by_time(sheets);
    return sheets;
}

SheetInputs true_inputs(const Scenario& scenario, const Chance& weather, const Chance& chance, int engine,
                        const std::string& reading)
{
    SheetInputs in = inputs_of(scenario, weather, chance, engine, month_number(reading));
    in.moment.scatter = 0.0;
    return in;
}

std::vector<Sheet> ship_sheets(const Scenario& scenario, std::uint64_t seed)
{
    const Chance weather(seed), chance(seed, scenario.scatter);
    std::vector<Sheet> sheets;
    for (int month = 0; month < month_count; ++month) {
        const std::string name = month_name(month);
        if (!listed(scenario.missed, 0, name) || !listed(scenario.missed, 1, name))
            sheets.push_back(
                ship_sheet(scenario, weather, chance, ship_day(scenario, weather, month, false)));
        if (!listed(scenario.missed, 2, name))
            sheets.push_back(ship_sheet(scenario, weather, chance, ship_day(scenario, weather, month, true)));
    }
    sort_by_time(sheets);
    return sheets;
}

} // namespace evenstroke::sample
