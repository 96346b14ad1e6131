// SPDX-License-Identifier: GPL-3.0-or-later
#include "sample_vessel/voyage.h"

#include "sample_vessel/decimal_text.h"

#include <algorithm>
#include <array>
#include <cmath>
#include <numbers>

namespace evenstroke::sample {
namespace {

struct Waypoint
{
    double latitude, longitude, course, depth;
};

/// Deep open water on an invented round between a cool north, the tropics and a mild south.
constexpr std::array<Waypoint, 11> waypoints{{
    {47.6, -9.4, 205, 4300},
    {36.4, -14.8, 200, 4100},
    {21.3, -20.6, 190, 3300},
    {4.2, -15.1, 170, 4600},
    {-9.6, -14.9, 230, 3600},
    {-27.4, 7.9, 215, 4700},
    {-34.1, -46.3, 20, 3900},
    {-12.5, -30.4, 10, 4900},
    {9.8, -34.2, 320, 4200},
    {27.9, -58.7, 60, 5300},
    {43.2, -38.9, 75, 4700},
}};

/// The ship is somewhere else on her round every month.
const Waypoint& waypoint_of(int month)
{
    return waypoints[static_cast<std::size_t>((month * 4 + month / 12) % static_cast<int>(waypoints.size()))];
}

double day_of_year(Day when)
{
    const std::chrono::year_month_day date(when);
    return static_cast<double>((when - Day(date.year() / 1 / 1)).count());
}

/// Climate in one line: warm at the equator, colder with the square of latitude, warmest in late August
/// in the north and in late February in the south. Invented figures of a credible size.
double usual_sea_temperature(double latitude, Day when)
{
    const double phase = 2.0 * std::numbers::pi * (day_of_year(when) - 238.0) / 365.25;
    return 28.3 - 0.0067 * latitude * latitude + 0.085 * latitude * std::cos(phase);
}

/// Day of the month on which the first round is taken: irregular, and never in the yard.
Day round_day(const Scenario& scenario, const Chance& chance, int month)
{
    const double spread = chance.even({"day", 0, 0, month});
    const Day picked = first_day(month) + std::chrono::days(3 + static_cast<int>(spread * 20.0));
    const bool in_yard = picked >= day(scenario.yard_from) && picked <= day(scenario.yard_to);
    return in_yard ? day(scenario.yard_to) + std::chrono::days(3) : picked;
}

/// The second auxiliary engine is read when it runs: some days later, or earlier late in the month.
Day second_day(const Scenario& scenario, const Chance& chance, int month)
{
    const Day first = round_day(scenario, chance, month);
    const int shift = 2 + static_cast<int>(chance.even({"second day", 0, 0, month}) * 4.0);
    const bool yard_month = month_name(month) == scenario.yard_from.substr(0, 7);
    const bool later = yard_month || (first - first_day(month)).count() < 18;
    return later ? first + std::chrono::days(shift) : first - std::chrono::days(shift);
}

void set_weather(ShipDay& ship, const Scenario& scenario, const Chance& chance)
{
    const int place = ship.second ? 1 : 0;
    const Day when = std::chrono::floor<std::chrono::days>(ship.time.utc);
    const bool rough = month_name(ship.month) == scenario.rough_month && !ship.second;
    const double wind = 5.0 + 8.5 * chance.even({"wind", 0, place, ship.month});
    ship.wind_kn = rough ? 20.0 : rounded(wind, 0);
    ship.sea_state = rough ? 5.0 : (wind < 7.0 ? 2.0 : wind < 11.0 ? 3.0 : 4.0);
    ship.wind_off_bow =
        10.0 * rounded(-17.0 + 35.0 * chance.even({"wind direction", 0, place, ship.month}), 0);
    ship.sea_water_c = std::clamp(usual_sea_temperature(ship.latitude, when) +
                                      0.7 * chance.normal({"sea", 0, place, ship.month}),
                                  4.0, 31.0);
    ship.outside_air_c = ship.sea_water_c - 0.8 + 1.2 * chance.normal({"air", 0, place, ship.month});
    ship.barometer_mbar = 1014.0 + 5.0 * chance.normal({"barometer", 0, place, ship.month});
    ship.humidity_percent =
        std::clamp(76.0 + 6.0 * chance.normal({"humidity", 0, place, ship.month}), 55.0, 94.0);
}

void set_draught(ShipDay& ship, const Chance& chance)
{
    const bool laden = (ship.month + ship.month / 7) % 3 != 1;
    const double trim = 0.2 * chance.even({"draught", 0, 0, ship.month});
    ship.draught_forward = rounded((laden ? 9.6 : 5.4) + trim, 1);
    ship.draught_aft = rounded((laden ? 9.9 : 7.1) + trim, 1);
}

} // namespace

ShipDay ship_day(const Scenario& scenario, const Chance& chance, int month, bool second)
{
    ShipDay ship;
    ship.month = month;
    ship.second = second;
    ship.name = month_name(month) + (second ? "-b" : "");
    const int place = second ? 1 : 0;
    const Waypoint& waypoint = waypoint_of(month);
    ship.latitude = rounded(waypoint.latitude + 2.5 * (chance.even({"latitude", 0, place, month}) - 0.5), 2);
    ship.longitude =
        rounded(waypoint.longitude + 2.5 * (chance.even({"longitude", 0, place, month}) - 0.5), 2);
    ship.course = std::fmod(
        waypoint.course + rounded(8.0 * (chance.even({"course", 0, place, month}) - 0.5), 0), 360.0);
    ship.water_depth =
        rounded(waypoint.depth / 10.0 + 40.0 * chance.even({"depth", 0, place, month}), 0) * 10.0;
    ship.time.offset_minutes = 60 * static_cast<int>(std::lround(ship.longitude / 15.0));
    const Day when = second ? second_day(scenario, chance, month) : round_day(scenario, chance, month);
    const int minutes = 9 * 60 + 5 * static_cast<int>(chance.even({"hour", 0, place, month}) * 18.0);
    ship.time.utc = when + std::chrono::minutes(minutes - ship.time.offset_minutes);
    set_weather(ship, scenario, chance);
    set_draught(ship, chance);
    return ship;
}

ShipTime reading_time(const ShipDay& day, const Chance& chance, int engine)
{
    ShipTime time = day.time;
    const int spread = static_cast<int>(chance.even({"reading hour", engine, 0, day.month}) * 12.0) * 5;
    time.utc += std::chrono::minutes(engine == 1 ? 180 + spread : 10 + spread / 4 / 5 * 5);
    return time;
}

Surroundings surroundings_of(const ShipDay& day, const Chance& chance, int engine)
{
    Surroundings around;
    around.barometer_mbar = rounded(day.barometer_mbar, 0);
    around.humidity_percent = rounded(day.humidity_percent, 0);
    const double warmed = day.outside_air_c + (engine == 0 ? 7.0 : 9.0);
    around.inlet_air_c =
        rounded(std::max(14.0, warmed) + 0.9 * chance.normal({"inlet air", engine, 0, day.month}), 1);
    // The fresh-water circuit is kept at 24 °C while the sea is cold and floats over the sea when it is warm.
    const double coolant = std::max(24.0, day.sea_water_c + 4.4) + (engine == 0 ? 0.0 : 0.7);
    around.coolant_c = rounded(coolant + 0.4 * chance.normal({"coolant", engine, 0, day.month}), 1);
    return around;
}

double load_of(const Chance& chance, int engine, int month)
{
    constexpr std::array<double, 12> voyage_loads{82, 74, 66, 78, 59, 85, 70, 63, 87, 76, 57, 80};
    constexpr std::array<double, 7> grid_loads{72, 64, 78, 69, 60, 75, 82};
    const double wanted = engine == 0 ? voyage_loads[static_cast<std::size_t>((month * 5 + month / 12) % 12)]
                                      : grid_loads[static_cast<std::size_t>((month * 3 + engine * 2) % 7)];
    return std::clamp(wanted + 4.0 * (chance.even({"load", engine, 0, month}) - 0.5), 55.0, 90.0);
}

} // namespace evenstroke::sample
