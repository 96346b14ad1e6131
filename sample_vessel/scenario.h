// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "sample_vessel/calendar.h"
#include "sample_vessel/engine_design.h"

#include <map>
#include <string>
#include <vector>

/// The invented story of the vessel: what she is, what was done to her engines, what goes wrong.
///
/// Two faults develop and nothing else is wrong. Main engine, cylinder 4: the rings begin to let gas past
/// in December 2025 (compression and maximum pressure fall, the exhaust and the scavenge space grow
/// warmer). Auxiliary engine 1, cylinder 2: the fuel nozzle wears from March 2026 (exhaust warmer, maximum
/// and mean indicated pressure down, compression as before). Auxiliary engine 2 is sound.
namespace evenstroke::sample {

/// Work done, as the event list has it. `change` is what it did to the cylinder's lasting differences
/// where the story wants a certain size; other work shifts them a little by chance.
struct Work
{
    int engine = 0;
    std::string date;
    int cylinder = 0; ///< 0: the whole engine or no cylinder
    std::string kind, note, done_by, part;
    std::map<std::string, double> change;
};

/// A fault that grows evenly with time.
struct Fault
{
    int engine = 0, cylinder = 0;
    std::string cause, onset;                ///< the last sound day
    std::map<std::string, double> per_month; ///< quantity's unit; mean indicated pressure in %
};

enum class Slip { decimal_slip, digits_swapped, unit_slip, cylinders_swapped };

struct TypingError
{
    int engine = 0;
    std::string reading, quantity; ///< quantity empty: all of the two cylinders
    int cylinder = 0, other_cylinder = 0;
    Slip slip = Slip::decimal_slip;
};

struct MonthOf
{
    int engine = 0;
    std::string reading;
};

struct OutOfOrder
{
    int engine = 0;
    std::string reading, quantity;
    int cylinder = 0;
    std::string reason; ///< "out_of_order", "not_read"
};

/// A delivery of fuel; all three engines burn it from this day on.
struct FuelBatch
{
    std::string from, kind;
    bool distillate = false;
    double heating_value_mj_kg = 0.0, density_15 = 0.0, sulphur_percent = 0.0, viscosity_at_engine = 0.0,
           temperature_c = 0.0;
};

struct Scenario
{
    std::string vessel, imo, flag, class_society, class_number;
    std::vector<EngineDesign> engines;
    /// Lasting difference of each cylinder from the mean, by engine and quantity (mean indicated pressure in
    /// %).
    std::vector<std::map<std::string, std::vector<double>>> differences;
    std::vector<Work> work;
    std::vector<Fault> faults;
    std::vector<TypingError> typing_errors;
    std::vector<MonthOf> missed, unsteady;
    std::vector<MonthOf> cards; ///< readings of which the indicator cards were kept
    std::vector<OutOfOrder> out_of_order;
    std::vector<FuelBatch> fuel;
    std::string yard_from, yard_to; ///< no readings in the docking yard
    std::string rough_month;        ///< one reading in a fresh breeze: usable with care
    double scatter = 1.0;           ///< 0: no chance anywhere in the engine values
    bool engine_wide_change = true; ///< hull growth, dirt of turbocharger and cooler
};

Scenario sample_scenario();
/// The same ship and dates with sound, equal cylinders, no scatter, no dirt and no slips: what is written
/// is the baseline seen through the surroundings, rounded. For checking the model against itself.
Scenario plain_scenario();

std::string verdict_of(Slip slip);

} // namespace evenstroke::sample
