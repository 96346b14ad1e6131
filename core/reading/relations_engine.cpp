// SPDX-License-Identifier: GPL-3.0-or-later
// Relations between engine values: air, water, exhaust, power and fuel.
#include "core/reading/relations_detail.h"

#include <algorithm>
#include <cmath>

namespace evenstroke::relations_detail {
namespace {

/// Instruments may differ by so much before a temperature below the coolant's becomes impossible. Common
/// practice.
constexpr double cooler_instrument_room = 5.0;
/// Below this the compressor hardly heats its air. Common practice, bar over the barometer.
constexpr double compressor_at_work_bar = 0.3;
/// Common practice, no source.
constexpr double load_against_power = 0.03, indicated_against_shaft = 0.05;
/// Common practice for diesel engines, g/kWh at the heating value beside it.
constexpr double consumption_low = 150.0, consumption_high = 260.0, usual_heating_value = 42.7;
/// Rounding must not put a value that stands on a limit beyond it.
constexpr double rounding_room = 1e-9;

/// The value at this place, else the one that stands for the whole engine.
std::optional<std::pair<Place, double>> beside(const Numbers& numbers, QuantityId quantity, Place place)
{
    if (const auto own = numbers.at(quantity, place))
        return std::pair(place, *own);
    if (const auto common = numbers.at(quantity, Place::engine()))
        return std::pair(Place::engine(), *common);
    return std::nullopt;
}

std::string at_words(Place place)
{
    return place.kind == Place::Kind::engine ? std::string() : " (" + place_text(place) + ")";
}

/// A turbine takes work out of the gas: first law.
void check_turbine(const Numbers& numbers, std::vector<Relation>& found)
{
    const QuantityId before_id = id_of("exhaust_before_turbine", Place::Kind::turbocharger);
    const QuantityId after_id = id_of("exhaust_after_turbine", Place::Kind::turbocharger);
    for (const auto& [place, after] : numbers.all(after_id)) {
        const auto before = beside(numbers, before_id, place);
        if (!before || after < before->second)
            continue;
        found.push_back({"turbine_not_cooling",
                         "Exhaust after turbine, " + with_own_unit(after_id, after) + at_words(place) +
                             ", is not below the " + with_own_unit(before_id, before->second) +
                             " before it. The turbine takes heat out: look whether the two changed boxes.",
                         {{before_id, before->first}, {after_id, place}},
                         false});
    }
}

/// A cooler cannot cool below its coolant: second law, with room for instruments.
void check_cooler(const Numbers& numbers, std::vector<Relation>& found)
{
    const QuantityId scavenge_id = id_of("scavenge_temperature", Place::Kind::engine);
    const QuantityId coolant_id = id_of("cooler_coolant_inlet_temperature", Place::Kind::cooler);
    const auto scavenge = numbers.at(scavenge_id, Place::engine());
    const auto coolants = numbers.all(coolant_id);
    if (!scavenge || coolants.empty())
        return;
    const auto coldest = *std::min_element(coolants.begin(), coolants.end(),
                                           [](const auto& a, const auto& b) { return a.second < b.second; });
    if (*scavenge >= coldest.second)
        return;
    const bool impossible = *scavenge < coldest.second - cooler_instrument_room;
    found.push_back(
        {"scavenge_below_coolant",
         "Scavenge temperature " + with_own_unit(scavenge_id, *scavenge) + " is below the coolant's " +
             with_own_unit(coolant_id, coldest.second) + " at the cooler inlet" +
             (impossible ? ", more than two thermometers can differ. No cooler can do that: read both again."
                         : ". A cooler cannot cool below its coolant: read both again."),
         {{scavenge_id, Place::engine()}, {coolant_id, coldest.first}},
         impossible});
}

void check_jacket(const Engine& engine, const Numbers& numbers, std::vector<Relation>& found)
{
    const QuantityId inlet_id = id_of("jacket_inlet_temperature", Place::Kind::engine);
    const QuantityId outlet_id = id_of("jacket_outlet_temperature", Place::Kind::cylinder);
    const auto inlet = numbers.at(inlet_id, Place::engine());
    const auto load = numbers.engine("load_percent");
    if (!inlet || (load && *load <= 0.0))
        return;
    std::vector<int> cold;
    double outlet_seen = 0.0;
    for (const auto& [place, outlet] : numbers.all(outlet_id)) {
        if (place.kind != Place::Kind::cylinder || outlet > *inlet)
            continue;
        cold.push_back(place.number);
        outlet_seen = outlet;
    }
    if (cold.empty())
        return;
    Relation relation{"jacket_not_warming",
                      cylinders_words(engine, cold) + ": jacket water comes out " +
                          (cold.size() == 1 ? "at " + with_own_unit(outlet_id, outlet_seen) + ", " : "") +
                          "no warmer than it goes in (" + with_own_unit(inlet_id, *inlet) +
                          "). Under load it must: look whether inlet and outlet changed boxes.",
                      {{inlet_id, Place::engine()}},
                      false};
    for (const int cylinder : cold)
        relation.concerned.push_back({outlet_id, Place::cylinder(cylinder)});
    found.push_back(std::move(relation));
}

void check_compressor(const Numbers& numbers, std::vector<Relation>& found)
{
    const QuantityId outlet_id = id_of("compressor_outlet_temperature", Place::Kind::turbocharger);
    const QuantityId inlet_id = id_of("inlet_air_temperature", Place::Kind::engine);
    const auto inlet = numbers.at(inlet_id, Place::engine());
    const auto scavenge = numbers.engine("scavenge_pressure");
    if (!inlet || !scavenge || *scavenge <= compressor_at_work_bar)
        return;
    for (const auto& [place, outlet] : numbers.all(outlet_id)) {
        if (outlet > *inlet)
            continue;
        found.push_back({"compressor_not_warming",
                         "Air after compressor, " + with_own_unit(outlet_id, outlet) + at_words(place) +
                             ", is not warmer than the " + with_own_unit(inlet_id, *inlet) +
                             " it takes in. Compressing heats it: look whether the two changed boxes.",
                         {{outlet_id, place}, {inlet_id, Place::engine()}},
                         false});
    }
}

void check_load(const Engine& engine, const Numbers& numbers, std::vector<Relation>& found)
{
    const auto load = numbers.engine("load_percent");
    const auto shaft = numbers.engine("shaft_power");
    const double rated = engine.rated_power.value() / 1000.0;
    if (!load || !shaft || rated <= 0.0 || *shaft <= 0.0)
        return;
    const double from_load = *load / 100.0 * rated;
    if (std::abs(from_load - *shaft) <= load_against_power * *shaft * (1.0 + rounding_room))
        return;
    found.push_back({"load_against_power",
                     "Load " + plain_number(*load, 1) + " % of " + plain_number(rated, 0) + " kW is " +
                         plain_number(from_load, 0) + " kW, but shaft power says " + plain_number(*shaft, 0) +
                         " kW. More than 3 % apart: one of the two is off.",
                     {{id_of("load_percent", Place::Kind::engine), Place::engine()},
                      {id_of("shaft_power", Place::Kind::engine), Place::engine()}},
                     false});
}

/// Indicated power of the engine in kW and the row it came from; only where every cylinder was read.
std::optional<std::pair<double, QuantityId>> indicated_sum(const Engine& engine, const Numbers& numbers)
{
    const auto count = static_cast<std::size_t>(engine.cylinders);
    const QuantityId power_id = id_of("indicated_power", Place::Kind::cylinder);
    const auto sum_of = [](const auto& cells) {
        double sum = 0.0;
        for (const auto& cell : cells)
            sum += cell.second;
        return sum;
    };
    const auto powers = numbers.all(power_id);
    if (count > 0 && powers.size() == count)
        return std::pair(sum_of(powers), power_id);
    // P_i = p_mi * swept volume * working cycles a second
    const QuantityId pressure_id = id_of("mean_indicated_pressure", Place::Kind::cylinder);
    const auto pressures = numbers.all(pressure_id);
    const auto speed = numbers.engine("speed");
    const double bore = engine.bore.value(), stroke = engine.stroke.value();
    if (count == 0 || pressures.size() != count || !speed || bore <= 0.0 || stroke <= 0.0)
        return std::nullopt;
    const double swept = 3.14159265358979323846 / 4.0 * bore * bore * stroke;
    const double cycles = *speed / 60.0 / (engine.two_stroke() ? 1.0 : 2.0);
    return std::pair(sum_of(pressures) * 1e5 * swept * cycles / 1000.0, pressure_id);
}

void check_indicated(const Engine& engine, const Numbers& numbers, std::vector<Relation>& found)
{
    const auto shaft = numbers.engine("shaft_power");
    const auto indicated = indicated_sum(engine, numbers);
    if (!shaft || !indicated || !engine.mechanical_efficiency || *shaft <= 0.0)
        return;
    const double from_cylinders = indicated->first * *engine.mechanical_efficiency;
    if (std::abs(from_cylinders - *shaft) <= indicated_against_shaft * *shaft * (1.0 + rounding_room))
        return;
    Relation relation{
        "indicated_against_shaft",
        "The cylinders together give " + plain_number(indicated->first, 0) + " kW, at " +
            plain_number(100.0 * *engine.mechanical_efficiency, 0) + " % mechanical efficiency " +
            plain_number(from_cylinders, 0) + " kW, but shaft power says " + plain_number(*shaft, 0) +
            " kW. More than 5 % apart: look at unit and dead centre of the indicator, and at the torsion "
            "meter's zero.",
        {{id_of("shaft_power", Place::Kind::engine), Place::engine()}},
        false};
    for (const auto& [place, value] : numbers.all(indicated->second))
        relation.concerned.push_back({indicated->second, place});
    found.push_back(std::move(relation));
}

/// Fuel over work against the band of the trade, scaled to the heating value, and against the first law.
void check_consumption(const Engine& engine, const Numbers& numbers, std::vector<Relation>& found)
{
    const auto fuel = numbers.engine("fuel_consumption");
    const auto power = power_kw(engine, numbers);
    const auto noted_value = numbers.engine("fuel_lower_heating_value");
    if (!fuel || !power || *power <= 0.0 || (noted_value && *noted_value <= 0.0))
        return;
    const double heating_value = noted_value.value_or(usual_heating_value);
    const double specific = 1000.0 * *fuel / *power; // g/kWh
    const double scale = usual_heating_value / heating_value;
    const double all_heat = 3600.0 / heating_value; // g/kWh at which all heat would be work
    const double room = 1.0 + rounding_room;
    if (specific * room >= consumption_low * scale && specific <= consumption_high * scale * room)
        return;
    const bool impossible = specific * room < all_heat;
    std::string sentence = "Fuel consumption " + plain_number(*fuel, 0) + " kg/h at " +
                           plain_number(*power, 0) + " kW is " + plain_number(specific, 0) + " g/kWh, ";
    sentence +=
        impossible
            ? "less than the " + plain_number(all_heat, 0) +
                  " g/kWh at which all heat would become work. No engine can do that: look at the unit "
                  "and at the measuring time."
            : "outside the usual " + plain_number(consumption_low * scale, 0) + " to " +
                  plain_number(consumption_high * scale, 0) +
                  " g/kWh. Look at the unit, the measuring time and the power.";
    if (!noted_value)
        sentence += " (Heating value not noted; reckoned with 42.7 MJ/kg.)";
    Relation relation{"fuel_against_power",
                      std::move(sentence),
                      {{id_of("fuel_consumption", Place::Kind::engine), Place::engine()}},
                      impossible};
    const char* power_name = numbers.engine("shaft_power") ? "shaft_power" : "load_percent";
    relation.concerned.push_back({id_of(power_name, Place::Kind::engine), Place::engine()});
    found.push_back(std::move(relation));
}

} // namespace

void check_air_and_water(const Engine& engine, const Numbers& numbers, std::vector<Relation>& found)
{
    check_turbine(numbers, found);
    check_compressor(numbers, found);
    check_cooler(numbers, found);
    check_jacket(engine, numbers, found);
}

void check_power_and_fuel(const Engine& engine, const Numbers& numbers, std::vector<Relation>& found)
{
    check_load(engine, numbers, found);
    check_indicated(engine, numbers, found);
    check_consumption(engine, numbers, found);
}

} // namespace evenstroke::relations_detail
