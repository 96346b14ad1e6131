// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/engine/engine.h"

#include <optional>
#include <span>
#include <string>
#include <string_view>
#include <vector>

/// What faults do to readings, as data that can be edited without touching the program:
/// resources/catalogue/fault_signatures.csv, fault_finer_levels.csv, fault_words.csv, fault_noise.csv and
/// fault_pairs.csv.
///
/// No size in there comes from a published table: they are common practice, computed from a plain cycle, or
/// estimates, as the files say line by line.
namespace evenstroke {

/// One column of the signatures: a quantity and its usual scatter from month to month.
struct FaultQuantity
{
    enum class Per { cylinder, engine, both }; ///< both: of the engine, and evidence about a cylinder too
    enum class Form { difference, percent, percent_absolute, speed_at_power };
    std::string name;    ///< "scavenge_temperature"
    std::string read_as; ///< the trend it is taken from, "cooler_temperature_difference"; empty: worked out of others
    Per per = Per::cylinder;
    double noise = 1.0; ///< one sigma, in `unit`
    std::string unit;
    Form form = Form::difference;
    bool needs_baseline = true; ///< false: it hardly moves with the load, so its own usual level is enough
    int after_work = 0;         ///< the way in which an overhaul or a cleaning moves it: 1 up, -1 down, 0 not known
};

enum class Urgency { remember, plan, soon, now, emergency };
std::string urgency_word(Urgency urgency);
/// "compare at the next reading", "put it on the job list", ...
std::string urgency_sentence(Urgency urgency);

struct Fault
{
    enum class Group { measurement, engine, cylinder };
    /// Which test looks for it; `alarm_only`: never raised from readings.
    enum class Test { signature, unit, swap, single_value, work, alarm_only };
    enum class Course { any, sudden, creeping };
    std::string id;
    bool variant = false; ///< a second pattern of a fault listed before
    Group group = Group::cylinder;
    bool of_engine = false; ///< all cylinders or the engine as a whole; else one cylinder
    std::string engine_kind; ///< "two_stroke", "four_stroke" or "any"
    bool either_sign = false;
    Test test = Test::signature;
    Urgency urgency = Urgency::plan;
    int commonness = 1; ///< 2 frequent, 1 occasional, 0 rare (estimates)
    Course course = Course::any;
    std::string only_if_read;   ///< a quantity without which an engine cannot have this fault; empty: every engine
    std::string reference_size; ///< in words, of the levels below
    /// One a fault quantity: expected change in noise units at the reference size, from -3 ("3 or more") to 3.
    /// 0 is a statement (should not move), nothing is none.
    std::vector<std::optional<double>> levels;
    /// The same, with the level itself where "3 or more" or a rounded one stands above and more is known.
    std::vector<std::optional<double>> full_levels;
    std::string title, sets_apart, check_next;

    bool possible_on(const Engine& engine) const;
};

/// The cheapest observation that would tell two faults apart.
struct TellingObservation
{
    std::string words;    ///< empty: none is known
    std::string quantity; ///< fault quantity that it is about; empty: nothing that a reading holds
};

std::span<const FaultQuantity> fault_quantities();
/// Index of a column; none where there is no such quantity.
std::optional<std::size_t> find_fault_quantity(std::string_view name);
std::span<const Fault> all_faults();
const Fault* find_fault(std::string_view id);
/// The cheapest observation that would tell two causes apart; empty where the catalogue has none.
TellingObservation telling_observation(std::string_view one, std::string_view other);

} // namespace evenstroke
