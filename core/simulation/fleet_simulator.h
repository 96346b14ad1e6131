// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/trend/drift.h"

#include <cstddef>
#include <cstdint>
#include <map>
#include <optional>
#include <string>
#include <vector>

/// Invented engines whose truth is known: for calibrating and checking the drift scan, and for telling an engineer what
/// silence means on an engine like his.
///
/// All figures are invented: noise as in the catalogue, of which 15 % of the variance lasts with 0.6 a month,
/// 5 % of the values have 2.5 times the spread, and a slow walk of 0.03 noise units per root month; lasting
/// offsets between cylinders that change with work on them; irregular dates, readings and values not taken,
/// readings at a load that did not stand still, typing errors, and work that nobody wrote down.
namespace evenstroke::simulation {

enum class Fault {
    none,
    slow_ring_wear,
    fast_ring_wear,
    fuel_pump_wear,
    fuel_nozzle,
    exhaust_valve,
    exhaust_sensor_drift,
    jacket_sensor_step,
    turbocharger_fouling,
    air_cooler_fouling,
};
const char* fault_name(Fault fault);
inline constexpr Fault all_faults[] = {
    Fault::slow_ring_wear,     Fault::fast_ring_wear,       Fault::fuel_pump_wear,
    Fault::fuel_nozzle,        Fault::exhaust_valve,        Fault::exhaust_sensor_drift,
    Fault::jacket_sensor_step, Fault::turbocharger_fouling, Fault::air_cooler_fouling};

struct Recipe
{
    Fault fault = Fault::none;
    std::size_t readings = 54;
    std::size_t fewest_cylinders = 5, most_cylinders = 9;
    double unrecorded_share = 0.10;      ///< of the work on cylinders
    double months_between_work = 27;     ///< on one cylinder, on average
    double noise_factor = 1.0;           ///< this ship's noise over the catalogue's
    std::size_t readings_since_work = 9; ///< on the faulty cylinder, at least, when the fault begins
    double size_spread = 0.3;            ///< each component of a fault is times exp(N(0, this))
    double typing_errors = 1.0;          ///< times the usual rate; 0 for none
    double unsteady_share = 0.04;
    bool integer_thermometers = false;            ///< cooling water read in whole degrees
    double coolant_factor = 1.0;                  ///< noise and offsets of cooling water over the catalogue's
    std::vector<std::string> cylinder_quantities; ///< empty: the seven counted ones of the catalogue
    std::vector<std::string> engine_quantities;   ///< empty: the counted ones
    double months_between_readings = 1.0;         ///< on average
    std::map<std::string, double> cylinder_noise, engine_noise; ///< one sigma of this engine; empty: the catalogue's
};

struct TypingError
{
    drift::Verdict kind;
    std::size_t reading;
    std::string quantity;               ///< the typed one; empty for exchanged cylinders
    std::vector<std::size_t> cylinders; ///< empty: a whole row, or the engine
    double size = 0.0;                  ///< in noise units, of a single value
};

struct UnrecordedWork
{
    std::size_t cylinder, reading; ///< the first reading after it
};

struct SimulatedEngine
{
    drift::Input input;
    Fault fault = Fault::none;
    std::optional<std::size_t> cylinder; ///< of the fault; none: the engine
    std::size_t onset = 0;               ///< first reading with the fault in it
    std::map<std::string, double> growth; ///< of the fault by quantity: a month (ramp) or once (step), deviation's unit
    std::vector<UnrecordedWork> unrecorded;
    std::vector<std::size_t> unsteady;
    std::vector<TypingError> errors;
};

SimulatedEngine simulate_engine(const Recipe& recipe, std::uint64_t seed);

} // namespace evenstroke::simulation
