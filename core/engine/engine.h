// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/engine/load_diagram.h"
#include "core/heat/wall_description.h"
#include "core/reading/quantity_catalogue.h"
#include "core/reference/iso_3046.h"
#include "core/units/quantity_types.h"

#include <map>
#include <optional>
#include <string>
#include <vector>

/// One engine as its engine.json describes it. Numbers that come from the user keep their `source`.
namespace evenstroke {

enum class EngineKind { two_stroke, four_stroke };

struct Vessel
{
    std::string id;
    std::string name, imo, flag, class_society, class_number;
};

struct ReferenceConditions
{
    Temperature inlet_air = celsius(25.0);
    Temperature cooler_coolant = celsius(25.0);
    AbsolutePressure barometer = bar_absolute(1.0);
    std::string source;
    std::optional<double> relative_humidity; ///< 0 to 1; only engines without charge-air cooler need it
};

/// What brings the specific consumption to reference ambient: one of them, never two.
enum class ConsumptionCorrection {
    linear,   ///< by the engine's own coefficients; none where it has none for the consumption
    iso_3046, ///< by the factor beta of ISO 3046-1
};

/// Relative change of a quantity per kelvin of inlet air and of charge-air coolant.
struct CorrectionCoefficients
{
    double per_inlet_air = 0.0, per_coolant = 0.0; ///< 1/K
    std::string source;
};

/// An absolute mark of the maker or the alarm system for one quantity.
struct AbsoluteLimit
{
    std::string quantity;
    std::optional<double> low, high; ///< in the quantity's own unit
    std::string source;
};

struct Instrument
{
    std::string quantity, serial, calibrated;
    std::optional<double> uncertainty; ///< half-width at 95 %, in the quantity's own unit
    std::string source;
};

/// The healthy engine at one load; values in the quantity's own unit, derived ones as in the glossary.
struct BaselinePoint
{
    double load_percent = 0.0;
    std::string mode; ///< empty: the ordinary mode
    std::map<std::string, double> values;
};

struct Engine
{
    std::string id;
    std::string name;
    EngineKind kind = EngineKind::two_stroke;
    int cylinders = 0;
    std::vector<std::string> cylinder_names; ///< empty, or one a cylinder
    Length bore{}, stroke{}, rod_length{};
    Power rated_power{};
    Frequency rated_speed{};
    bool maximum_pressure_controlled = false;
    std::vector<int> firing_order;
    ReferenceConditions reference;
    std::map<std::string, CorrectionCoefficients> correction; ///< by quantity name
    std::vector<AbsoluteLimit> limits;
    std::vector<Instrument> instruments;
    std::vector<BaselinePoint> baseline; ///< in file order; loads strictly increase within a mode
    std::string baseline_source;
    std::optional<double> compression_ratio, cylinder_closes_deg, cylinder_opens_deg, mechanical_efficiency;
    double expansion_angle_deg = 40.0;
    std::optional<Length> propeller_pitch;
    std::optional<LoadLimits> load_limits;
    std::vector<WallDescription> walls;
    std::optional<Mass> moving_mass;                  ///< of one cylinder: what goes up and down, see crank_forces.h
    std::optional<double> generator_efficiency;       ///< of the generator it drives, 0 to 1
    ConsumptionCorrection consumption_correction = ConsumptionCorrection::linear;
    AspirationClass aspiration = AspirationClass::charge_air_cooled;

    bool two_stroke() const { return kind == EngineKind::two_stroke; }
    /// "4", or the maker's own mark such as "A3".
    std::string cylinder_name(int number) const;
    /// Number of the cylinder written so, by number or by name.
    std::optional<int> find_cylinder(std::string_view text) const;
};

/// What cannot be about an engine, in words; nothing where all is possible.
/// Refuses 0 cylinders, sizes that are not positive, a rod shorter than the crank, a compression ratio of
/// 1 or less, loads of a baseline that do not increase within a mode.
std::optional<Problem> find_problem(const Engine& engine);

} // namespace evenstroke
