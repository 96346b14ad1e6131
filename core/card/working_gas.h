// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

/// The gas in the cylinder: dry air mixed with what a fuel CH_1.86 leaves when it burns in just enough air.
///
/// Heat capacities are the NASA polynomials as the public GRI-Mech 3.0 file has them (argon: monatomic). The gas
/// is real: p = ρRT (1 + Bρ) with B of air, a smooth fit to published virials (from memory). As an ideal gas the
/// dead centre found from the compression lies 0.1° off.
/// Valid from 200 to 3200 K; beyond it the values at the ends are used.
/// All numbers in SI units, plain: the functions stand inside loops over the samples of a card.
namespace evenstroke::indicator {

inline constexpr double stoichiometric_air = 14.587026; ///< kg of air a kg of CH_1.86

/// One mixture, by the mass share of burnt gas (0 to 1).
class WorkingGas
{
public:
    explicit WorkingGas(double burnt_share);

    double gas_constant() const { return gas_constant_; }    ///< J/(kg K)
    double heat_capacity(double kelvin) const;               ///< c_v of the thin gas, J/(kg K)
    double energy(double kelvin) const;                      ///< u of the thin gas, J/kg, 0 at 298.15 K

private:
    double burnt_, gas_constant_;
};

/// Second virial coefficient of air and its first two derivatives: m³/kg, m³/(kg K), m³/(kg K²).
struct Virial
{
    double value, slope, curvature;
};
Virial virial(double kelvin);

/// The gas at one moment.
struct GasMoment
{
    double temperature; ///< K
    double exponent;    ///< k = -(∂ln p/∂ln V) without heat
    double stiffness;   ///< G = V (∂p/∂U) at constant volume
};

/// @param pressure Pa  @param volume m³  @param mass kg, all above 0
GasMoment gas_moment(const WorkingGas& gas, double pressure, double volume, double mass);
/// T from p, V and m alone.
double gas_temperature(const WorkingGas& gas, double pressure, double volume, double mass);
/// Internal energy of the dense gas, J/kg.
double gas_energy(const WorkingGas& gas, double kelvin, double density);

} // namespace evenstroke::indicator
