// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/problem.h"
#include "core/units/quantity_types.h"

#include <optional>

/// What a bunker delivery note says about a fuel, turned into what the engine needs to know.
namespace evenstroke {

/// mm²/s, the cSt of older papers.
inline KinematicViscosity square_millimetres_per_second(double viscosity)
{
    return KinematicViscosity::from_value(viscosity * 1e-6);
}
inline double in_square_millimetres_per_second(KinematicViscosity viscosity) { return viscosity.value() * 1e6; }
inline double in_megajoules_per_kilogram(SpecificEnergy energy) { return energy.value() / 1e6; }

enum class PetroleumGroup { residual, distillate };

/// Shares by mass, 0 to 1. Water is reported by volume; for a density within 4 % of 1000 kg/m³ it may stand
/// here as it is.
struct FuelAnalysis
{
    std::optional<Density> density_15;
    std::optional<Ratio> water, ash, sulphur;
    Ratio methyl_ester{}; ///< of fatty acids, zero where the fuel has none
};

/// Lower (net) and upper (gross) heating value, from density and analysis:
///
///     Q = (c0 + c1 ρ - c2 ρ²)(1 - w - a - s) + 9.420 s [- 2.449 w, net only]       MJ/kg
///
///     residual, net    46.704   3.167e-3   8.802e-6          distillate, net    46.423   3.170e-3   8.792e-6
///     residual, gross  52.190   0          8.802e-6          distillate, gross  51.916   0          8.792e-6
///
/// @par Source annex of ISO 8217 (residual and gross constants from memory); the distillate, net form is that
///      of BS 2869:1983. Some public pages print the middle term with the wrong sign.
/// @par Validity conventional petroleum fuels of 600 to 1200 kg/m³ at 15 °C; at most 10 % methyl ester; water,
///      ash and sulphur together at most 10 % (common practice, no source). Other fuels: the supplier's value.
/// @par Problems not_found: an input is missing (named). invalid_input: outside the validity
Result<SpecificEnergy> net_heating_value(PetroleumGroup group, const FuelAnalysis& analysis);
Result<SpecificEnergy> gross_heating_value(PetroleumGroup group, const FuelAnalysis& analysis);

/// Calculated carbon aromaticity index, a figure for the slowness of ignition; bare number near 850.
///
///     CCAI = ρ15 - 81 - 141 lg lg(ν + 0.85) - 483 lg((t + 273)/323)      kg/m³, mm²/s at t °C
///
/// @par Source ISO 8217, as viscometer manuals quote it; 273 and 323 are the formula's own, not 273.15.
/// @par Validity residual fuels of 600 to 1200 kg/m³ and 10 to 700 mm²/s, the viscosity given at 15 to 150 °C
///      (temperatures: common practice)
/// @par Problems as net_heating_value
Result<double> ignition_index(std::optional<Density> density_15, std::optional<KinematicViscosity> viscosity,
                              std::optional<Temperature> viscosity_at);

/// Viscosity over temperature through two known points: lg lg(ν + 0.7) = A - B lg T, T in kelvin.
///
/// @par Source ASTM D341, two-point form, as public texts quote it
/// @par Validity 2 to 1e6 mm²/s and -20 to 200 °C (below 2 mm²/s the standard has further terms; the upper ends
///      are common practice), a homogeneous liquid between its cloud point and the beginning of boiling, which
///      nobody can see from the numbers
class ViscosityLine
{
public:
    struct Point
    {
        std::optional<KinematicViscosity> viscosity;
        std::optional<Temperature> at;
    };
    /// @par Problems not_found: an input is missing (named). invalid_input: outside the validity, the same
    ///      temperature twice, or a fuel that would be thicker when hotter
    static Result<ViscosityLine> through(const Point& first, const Point& second);

    /// @par Problems invalid_input: temperature or viscosity outside the validity
    Result<KinematicViscosity> viscosity_at(Temperature temperature) const;
    /// The heater temperature for an injection viscosity. @par Problems as viscosity_at
    Result<Temperature> temperature_for(KinematicViscosity viscosity) const;

private:
    ViscosityLine(double a, double b) : a_(a), b_(b) {}
    double a_, b_;
};

} // namespace evenstroke
