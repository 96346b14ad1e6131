// SPDX-License-Identifier: GPL-3.0-or-later
#include "tests/core/fleet_faults.h"

#include "tests/core/fleet_fault_table.h"
#include "core/simulation/fleet_noise.h"

#include "core/explanation/fault_catalogue.h"
#include "core/trend/deviations.h"

#include <algorithm>
#include <cmath>
#include <map>

namespace evenstroke::simulation {
namespace {

/// Expected corrected value over load, sigma of a cylinder's lasting offset (noise units), digits typed.
struct Shape
{
    const char* quantity;
    double at_no_load, per_percent;
    int decimals;
};
constexpr Shape shapes[] = {{"maximum_pressure", 40, 1.5, 1},
                            {"compression_pressure", 25, 1.25, 1},
                            {"mean_indicated_pressure", 4, 0.18, 2},
                            {"exhaust_temperature", 290, 0.45, 0},
                            {"fuel_index", 22, 0.6, 1},
                            {"jacket_outlet_temperature", 82, 0, 1},
                            {"piston_coolant_outlet_temperature", 57, 0, 1},
                            {"angle_of_maximum_pressure", 13, 0, 1},
                            {"angle_of_half_heat_release", 17, 0, 1},
                            {"expansion_pressure", 30, 0.6, 1},
                            {"scavenge_box_temperature", 48, 0, 0},
                            {"scavenge_pressure", -0.2, 0.035, 2},
                            {"turbocharger_speed", 4200, 75, 0},
                            {"exhaust_before_turbine", 330, 0.8, 0},
                            {"exhaust_after_turbine", 240, 0.2, 0},
                            {"cooler_pressure_drop", 3, 0.17, 1},
                            {"specific_fuel_consumption", 175, 0, 1},
                            {"scavenge_temperature", 9, 0, 1}, // over the coolant
                            {"air_filter_pressure_drop", 6, 0, 1},
                            {"exhaust_back_pressure", 18, 0, 0},
                            {"crankcase_pressure", 1.5, 0, 1},
                            {"compressor_efficiency", 0.83, 0, 3}};

const Shape& shape_of(std::string_view name)
{
    return *std::find_if(std::begin(shapes), std::end(shapes), [&](const Shape& one) { return name == one.quantity; });
}

/// Where the baseline would not speak of a quantity.
bool in_baseline(std::string_view name)
{
    return shape_of(name).per_percent != 0.0 || name == "specific_fuel_consumption";
}

double rounded(double value, int decimals)
{
    const double step = std::pow(10.0, -decimals);
    return std::round(value / step) * step;
}

class Trial
{
public:
    Trial(const FaultRecipe& recipe, std::uint64_t seed) : recipe_(recipe), dice_(seed), record_(std::make_shared<EngineRecord>()) {}

    FaultTrial run()
    {
        describe();
        choose();
        for (std::size_t i = 0; i < readings_; ++i)
            read(i);
        FaultTrial trial = trial_;
        trial.record = record_;
        return trial;
    }

private:
    Engine& engine() { return record_->engine; }

    void describe()
    {
        const Fault* fault = find_fault(recipe_.fault);
        const std::string kind = fault ? fault->engine_kind : "any";
        const bool four = kind == "four_stroke" || (kind == "any" && recipe_.fault != "heavy_running" && dice_.chance(0.25));
        engine().name = "main engine";
        engine().kind = four ? EngineKind::four_stroke : EngineKind::two_stroke;
        engine().cylinders = static_cast<int>(5 + dice_.below(5));
        engine().bore = millimetres(600.0);
        engine().stroke = millimetres(2400.0);
        engine().rod_length = millimetres(2500.0);
        engine().rated_power = kilowatts(12000.0);
        engine().rated_speed = per_minute(105.0);
        engine().correction = {{"scavenge_pressure", {2.7e-3, -2.0e-3, "invented"}},
                               {"compression_pressure", {2.8e-3, -1.4e-3, "invented"}},
                               {"maximum_pressure", {2.1e-3, -0.7e-3, "invented"}},
                               {"exhaust_temperature", {-2.3e-3, -0.5e-3, "invented"}}};
        for (const double load : {40.0, 60.0, 80.0, 100.0}) {
            BaselinePoint point{load, "", {}};
            for (const Shape& shape : shapes)
                if (in_baseline(shape.quantity))
                    point.values[shape.quantity] = shape.at_no_load + shape.per_percent * load;
            engine().baseline.push_back(std::move(point));
        }
        noise_factor_ = dice_.uniform(0.7, 1.1);
        fit_out();
    }

    void fit_out()
    {
        trial_.cards = recipe_.cards.value_or(recipe_.fault == "indicator_dead_centre" || dice_.chance(0.5));
        for (const char* name : {"mean_indicated_pressure", "angle_of_maximum_pressure", "angle_of_half_heat_release",
                                 "expansion_pressure"})
            fitted_[name] = trial_.cards;
        for (const char* name : {"air_filter_pressure_drop", "exhaust_back_pressure", "compressor_efficiency",
                                 "scavenge_box_temperature", "crankcase_pressure"})
            fitted_[name] = recipe_.gauges.value_or(dice_.chance(0.65));
        fitted_["specific_fuel_consumption"] = dice_.chance(0.85);
        if (engine().two_stroke())
            fitted_["crankcase_pressure"] = false;
        else
            fitted_["scavenge_box_temperature"] = fitted_["piston_coolant_outlet_temperature"] = false;
    }

    bool fitted(const std::string& name) const
    {
        const auto found = fitted_.find(name);
        return found == fitted_.end() || found->second;
    }

    void choose()
    {
        const Fault* fault = find_fault(recipe_.fault);
        trial_.fault = recipe_.fault;
        trial_.onset = 12 + dice_.below(13);
        const bool creeping = fault && (fault->course == Fault::Course::creeping || (fault->course == Fault::Course::any && dice_.chance(0.4)));
        trial_.ramp = creeping;
        readings_ = trial_.onset + (creeping ? std::max<std::size_t>(recipe_.fewest_after, 6) + dice_.below(10) : recipe_.fewest_after + dice_.below(11));
        if (fault && !fault->of_engine)
            trial_.subject = Place::cylinder(1 + static_cast<int>(dice_.below(static_cast<std::size_t>(engine().cylinders))));
        draw_sizes(fault);
        double month = 640.0;
        for (std::size_t i = 0; i < readings_; ++i) {
            month += dice_.uniform(0.6, 1.4);
            months_.push_back(month);
        }
        for (int j = 0; j < engine().cylinders; ++j)
            for (const Shape& shape : shapes)
                offset_[shape.quantity].push_back(dice_.normal());
    }

    void draw_sizes(const Fault* fault)
    {
        if (!fault)
            return;
        const double sign = fault->either_sign && dice_.chance(0.5) ? -1.0 : 1.0;
        // Spread of the whole, so that sizes reach beyond the range in words, and of each part.
        const double whole = sign * recipe_.size * std::exp(0.15 * dice_.normal());
        for (const FaultPart& part : fault_parts)
            if (part.fault == recipe_.fault)
                size_[std::string(part.quantity)] = whole * dice_.uniform(part.low, part.high) * std::exp(0.1 * dice_.normal());
        if (recipe_.fault == "indicator_zero" || recipe_.fault == "indicator_gain")
            for (const FaultPart& part : fault_parts)
                if (part.fault == recipe_.fault)
                    size_[std::string(part.quantity)] = whole * part.low; // an instrument keeps its proportions
        for (const FaultQuantity& of : fault_quantities())
            if (size_.count(of.name) == 0)
                aside_[of.name] = 0.2 * of.noise * dice_.normal(); // what should not move does so a little
    }

    double grown(std::size_t reading) const
    {
        if (recipe_.fault.empty() || reading < trial_.onset)
            return 0.0;
        if (!trial_.ramp)
            return 1.0;
        const double from = months_[trial_.onset - 1];
        return (months_[reading] - from) / (months_.back() - from);
    }

    double effect(const std::string& name, std::size_t reading, bool with_asides = true) const
    {
        const auto found = size_.find(name);
        if (found != size_.end())
            return grown(reading) * found->second;
        const auto aside = aside_.find(name);
        return with_asides && aside != aside_.end() ? grown(reading) * aside->second : 0.0;
    }

    double gap(std::size_t reading) const { return reading == 0 ? 1.0 : months_[reading] - months_[reading - 1]; }

    /// One sigma in the quantity's own unit at this load.
    static double own_sigma(const FaultQuantity& of, double expected)
    {
        switch (of.form) {
        case FaultQuantity::Form::percent: return of.noise * expected / 100.0;
        case FaultQuantity::Form::percent_absolute: return of.noise * (expected + 1.0) / 100.0;
        case FaultQuantity::Form::difference:
        case FaultQuantity::Form::speed_at_power: break;
        }
        return of.noise;
    }

    void read(std::size_t i)
    {
        Reading reading;
        reading.name = "r" + std::to_string(i + 1);
        reading.taken_at.utc = TimePoint(std::chrono::seconds(static_cast<long long>(months_[i] * 30.4375 * 86400.0)));
        load_ = std::clamp(dice_.uniform(65.0, 90.0), 45.0, 100.0);
        air_ = dice_.uniform(18.0, 34.0);
        conditions_ = Conditions{};
        conditions_.inlet_air = air_;
        conditions_.cooler_coolant = dice_.uniform(20.0, 32.0);
        conditions_.barometer = 1.0;
        typed_load_ = load_ * (1.0 + effect("figure of power", i, false) / 100.0);
        number(reading, "load_percent", Place::engine(), typed_load_, 1);
        number(reading, "shaft_power", Place::engine(), 120.0 * typed_load_, 0);
        number(reading, "inlet_air_temperature", Place::engine(), air_ + effect("figure of air", i, false), 1);
        number(reading, "cooler_coolant_inlet_temperature", Place::engine(), *conditions_.cooler_coolant, 1);
        number(reading, "barometric_pressure", {Place::Kind::ship, 0}, 1000.0, 0);
        number(reading, "fuel_lower_heating_value", Place::engine(), 42.7, 1);
        for (const FaultQuantity& of : fault_quantities())
            if (of.per == FaultQuantity::Per::cylinder)
                read_cylinders(reading, of, i);
            else
                read_engine(reading, of, i);
        record_->readings.push_back(std::move(reading));
    }

    void read_cylinders(Reading& reading, const FaultQuantity& of, std::size_t i)
    {
        const auto* shape = std::find_if(std::begin(shapes), std::end(shapes), [&](const Shape& one) { return of.name == one.quantity; });
        if (shape == std::end(shapes) || !fitted(of.name))
            return;
        const double expected = shape->at_no_load + shape->per_percent * load_, sigma = own_sigma(of, expected);
        const double to_own = sigma / of.noise; // own unit for one in the unit of comparison
        const bool of_all = trial_.subject.kind != Place::Kind::cylinder;
        // The error of power and correction is common to all cylinders and does not average out.
        const double common = 0.7 * noise_factor_ * noise(of.name, 0, i);
        for (int j = 1; j <= engine().cylinders; ++j) {
            double value = expected + sigma * (common + 0.9 * noise_factor_ * noise(of.name, j, i) + lasting_offset(of.name, j, i));
            if (of_all || trial_.subject.number == j)
                value += to_own * effect(of.name, i);
            write(reading, of.name, Place::cylinder(j), value, shape->decimals);
        }
    }

    double lasting_offset(const std::string& name, int cylinder, std::size_t i)
    {
        const double own = offset_[name][static_cast<std::size_t>(cylinder) - 1];
        if (recipe_.unrecorded_work && cylinder == 2 && i + 12 >= readings_)
            return 0.4 * own + offset_[name][0]; // new parts, a new level
        return own;
    }

    void read_engine(Reading& reading, const FaultQuantity& of, std::size_t i)
    {
        if (of.name == "speed_at_power") {
            const double percent = effect(of.name, i) + of.noise * noise_factor_ * noise(of.name, 0, i);
            const double nominal = engine().two_stroke() ? 105.0 * std::cbrt(load_ / 100.0) : 105.0;
            number(reading, "speed", Place::engine(), nominal * (1.0 + percent / 100.0), 1);
            return;
        }
        const auto* shape = std::find_if(std::begin(shapes), std::end(shapes), [&](const Shape& one) { return of.name == one.quantity; });
        if (shape == std::end(shapes) || !fitted(of.name))
            return;
        const double expected = shape->at_no_load + shape->per_percent * load_, sigma = own_sigma(of, expected);
        const double value = expected + sigma * noise_factor_ * noise(of.name, 0, i) + sigma / of.noise * effect(of.name, i);
        if (of.name == "scavenge_pressure") {
            scavenge_ = value;
            const double gauge = (expected + 1.0) * effect("gauge of scavenge_pressure", i, false) / 100.0;
            write(reading, of.name, Place::engine(), value + gauge, shape->decimals);
        } else if (of.name == "specific_fuel_consumption") {
            const double fuel = value * 120.0 * load_ / 1000.0 * (1.0 + effect("figure of fuel", i, false) / 100.0);
            number(reading, "fuel_consumption", Place::engine(), fuel, 0);
        } else if (of.name == "scavenge_temperature") {
            number(reading, of.name, Place::engine(), *conditions_.cooler_coolant + value, 1);
        } else if (of.name == "compressor_efficiency") {
            // The scavenge pressure as it truly was, before any gauge.
            const double ratio = std::pow(raw_of("scavenge_pressure", scavenge_) + 1.0, 0.286);
            const double kelvin = air_ + 273.15;
            number(reading, "compressor_outlet_temperature", Place::turbocharger(1), air_ + kelvin * (ratio - 1.0) / value, 0);
        } else {
            const auto id = find_quantity(of.name);
            const Place place = quantity(*id).per == Place::Kind::turbocharger ? Place::turbocharger(1)
                                : quantity(*id).per == Place::Kind::cooler     ? Place::cooler(1)
                                                                               : Place::engine();
            write(reading, of.name, place, value, shape->decimals);
        }
    }

    double noise(const std::string& name, int place, std::size_t i)
    {
        return noise_[{name, place}].next(dice_, gap(i), dice_.normal(), 1.0);
    }

    /// As it would be read under these conditions.
    double raw_of(const std::string& name, double corrected) const
    {
        const auto id = find_quantity(name);
        const Correction correction = find_correction(record_->engine, quantity(*id), corrected, conditions_);
        return (corrected - correction.shift) / correction.scale;
    }

    void write(Reading& reading, const std::string& name, Place place, double corrected, int decimals)
    {
        if (!dice_.chance(0.03))
            number(reading, name, place, raw_of(name, corrected), decimals);
    }

    static void number(Reading& reading, std::string_view name, Place place, double own, int decimals)
    {
        Value value;
        value.quantity = *find_quantity(name, place.kind);
        value.place = place;
        value.unit = quantity(value.quantity).unit;
        value.kind = quantity(value.quantity).kind;
        value.number = rounded(own, decimals);
        value.value_si = unit(value.unit).to_si(*value.number);
        reading.values.push_back(std::move(value));
    }

    const FaultRecipe& recipe_;
    Dice dice_;
    std::shared_ptr<EngineRecord> record_;
    FaultTrial trial_;
    std::size_t readings_ = 0;
    double noise_factor_ = 1.0, load_ = 75.0, typed_load_ = 75.0, air_ = 25.0, scavenge_ = 2.0;
    Conditions conditions_;
    std::vector<double> months_;
    std::map<std::string, bool> fitted_;
    std::map<std::string, double> size_, aside_;
    std::map<std::string, std::vector<double>> offset_;
    std::map<std::pair<std::string, int>, NoiseSource> noise_;
};

} // namespace

const std::vector<std::string>& simulated_faults()
{
    static const std::vector<std::string> names = [] {
        std::vector<std::string> found;
        for (const FaultPart& part : fault_parts)
            if (found.empty() || found.back() != part.fault)
                found.emplace_back(part.fault);
        return found;
    }();
    return names;
}

FaultTrial simulate_fault(const FaultRecipe& recipe, std::uint64_t seed)
{
    return Trial(recipe, seed).run();
}

} // namespace evenstroke::simulation
