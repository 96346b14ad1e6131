// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/card/combustion.h"
#include "core/card/curve.h"
#include "core/card/trace.h"
#include "core/engine/engine.h"

#include <array>
#include <cmath>
#include <optional>
#include <string>
#include <string_view>
#include <vector>

/// One cylinder's indicator diagram, evaluated: what it says, how sure that is, and what is the matter with it.
///
/// No clock, no files, no shared state: cards may be evaluated in as many threads as there are. Everything is worked out
/// anew from trace, engine and conditions; stored results carry `method_version`.
namespace evenstroke::indicator {

/// Raise it when results change.
inline constexpr int method_version = 2;

/// What was read beside the card. Empty: not known.
struct Conditions
{
    std::optional<Frequency> speed;
    std::optional<AbsolutePressure> scavenge_pressure;
    std::optional<Temperature> charge_temperature; ///< of the gas when the cylinder closes
    std::optional<Energy> fuel_heat;               ///< burnt in one cycle of this cylinder
    std::optional<PlaneAngle> known_offset;        ///< of the installation, from its healthy cards
    std::optional<PlaneAngle> known_offset_spread; ///< its standard deviation; with it the card's own is weighed against it
    bool barometer_assumed = false;                ///< a gauge record was made absolute with a usual barometer
};

/// The results, in the order of the catalogue card_results.csv. Angles and pressures are true values: the card's
/// offset and zero are taken out.
enum class CardResult : std::size_t {
    mean_indicated_pressure, ///< bar; four-stroke: over both revolutions
    maximum_pressure,        ///< bar abs, mean of the cycles' own
    maximum_pressure_angle,  ///< degrees
    compression_pressure,    ///< bar abs at dead centre, as it would be without combustion
    expansion_pressure,      ///< bar abs at the engine's expansion angle
    start_of_combustion,     ///< degrees; not the start of injection
    pressure_rise,           ///< bar a degree, the steepest
    ca10, ca50, ca90,        ///< degrees at which these per cent of the heat are released
    offset,                  ///< recorded minus true angle, degrees
    zero,                    ///< recorded minus true pressure, bar
    trapped_mass,            ///< kg
    dead_centre_temperature, ///< K
    maximum_temperature,     ///< K
    count
};
inline constexpr std::size_t result_count = static_cast<std::size_t>(CardResult::count);

/// What pages and files call a result.
struct CardResultDescription
{
    std::string key, title, unit; ///< "maximum_pressure_bar_abs", "Maximum pressure", "bar abs"
};
const CardResultDescription& describe(CardResult result);

struct Estimate
{
    double value = 0.0;
    std::optional<double> half_width; ///< at 95 %, without the transducer's own gain

    /// Of a difference: whether it is farther from 0 than its half-width; not where that is not known.
    bool is_clear() const { return half_width && std::abs(value) > *half_width; }
};
using Estimates = std::array<std::optional<Estimate>, result_count>;

/// Something that the engineer should know before trusting or comparing the card.
struct Remark
{
    std::string code, text;
    std::optional<double> angle; ///< place on the curve, true degrees
};

/// How dead centre and zero were found.
enum class CalibrationMethod {
    energy_balance,  ///< from the compression
    unfired_cycle,   ///< the same over a whole cycle without combustion
    angle_only,      ///< zero held at the charge pressure, wall loss as the formula says
    power_line,      ///< a straight line of ln p over ln V, where the balance lacks an input
    offset_assumed,  ///< the installation's offset, or none
};

/// Forces of the crank gear from the true card, see core/engine/crank_forces.h.
struct CardForces
{
    double largest_guide = 0.0;                  ///< kN, either way; on the guide, or the liner of a trunk piston
    double mean_moment = 0.0, largest_moment = 0.0; ///< kNm, of this cylinder on the shaft
    bool gas_force_only = true;                  ///< no moving mass is entered
};

/// One value and its scatter from cycle to cycle.
struct CycleSpread
{
    double mean_indicated = 0.0, maximum = 0.0; ///< standard deviations, bar
};

/// Where a card's uncertainty comes from. Two cards of one cylinder are off alike in some of it: see comparison.h.
struct Carried
{
    UnknownCovariance covariance{};
    Unknowns believed{}; ///< standard deviations of what was believed of the unknowns before the card; 0: nothing was
    std::array<Unknowns, result_count> slopes{}; ///< of each result by each unknown
    /// One standard deviation, in the result's unit: of reading and model; by the film formula; by a heated transducer.
    std::array<double, result_count> own{}, walls{}, heated{};
};

struct Evaluation
{
    int version = method_version;
    std::size_t cycles = 0;
    Estimates results;
    std::vector<Remark> remarks;

    CleanTrace trace;
    CalibrationMethod method = CalibrationMethod::offset_assumed;
    Unknowns unknowns{};                ///< as taken for the results
    std::optional<Carried> carried;     ///< empty: dead centre was not found by a fit
    std::optional<Estimate> own_offset; ///< degrees, from this card alone, whatever the installation's is
    double own_offset_noise = 0.0;      ///< of its spread what the engine's other cards do not share, degrees
    std::optional<double> closes, opens; ///< of the cylinder, true degrees
    double expansion_angle = 40.0;      ///< of the engine, true degrees
    std::optional<double> wall_multiplier; ///< with the entered compression ratio; far from 1 where that is not true
    std::optional<double> compared_wall;   ///< the same at the installation's offset: what a healthy card's is compared with
    double compared_wall_spread = 0.0;     ///< from the card's noise, one standard deviation
    double misfit = 0.0;                ///< of the compression against the line, near 1 where it fits
    double window_from = 0.0, window_to = 0.0; ///< of the fit, true degrees
    std::vector<double> line_angle, line_pressure; ///< the unfired line: true degrees, bar abs, from closing to 25°
    std::optional<HeatRelease> heat;
    std::optional<CycleSpread> spread;
    std::optional<Peak> firing_peak;    ///< true, where the largest pressure is that of compression
    std::optional<double> compression_exponent, expansion_exponent, opening_pressure; ///< opening: bar abs
    std::optional<double> heat_over_fuel;
    std::optional<CardForces> forces; ///< empty: incomplete card, or the pressure below the piston is not known

    /// As recorded, nothing taken out: for comparison with other instruments.
    double plain_mean_indicated = 0.0, plain_maximum = 0.0;

    const std::optional<Estimate>& operator[](CardResult result) const
    {
        return results[static_cast<std::size_t>(result)];
    }
};

/// @par Problems invalid_input: as `clean` says of the trace, SliderCrank of the engine, and pressures that are a tenth
///      or ten times of what the scavenge pressure asks for; not_found: bore, stroke or rod are not known
Result<Evaluation> evaluate(const Engine& engine, const Conditions& conditions, const Trace& trace);

} // namespace evenstroke::indicator
