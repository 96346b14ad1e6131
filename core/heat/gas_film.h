// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/problem.h"
#include "core/units/heat_types.h"

#include <span>
#include <string_view>

/// Film coefficients on the gas side of the cylinder wall, the same all over the wall.
///
/// The formulae differ by a factor of 1.7 at one and the same state. That spread is the honest uncertainty of
/// a single value: fit one multiplier on the baseline, and use ratios to it afterwards.
///
/// Validity of all of them: gas 0.5 to 300 bar abs and 200 to 3500 K, mean piston speed 1 to 25 m/s, bore up
/// to 2 m (the states of running diesel engines; common practice, no source). Outside it the film is not
/// known.
namespace evenstroke {

enum class GasFilm {
    woschni,            ///< 1967, in bar
    woschni_kilopascal, ///< textbook form, in kPa, with another exponent of the temperature
    hohenberg,          ///< 1979
    eichelberg,         ///< 1939
};
inline constexpr GasFilm every_gas_film[] = {GasFilm::woschni, GasFilm::woschni_kilopascal,
                                             GasFilm::hohenberg, GasFilm::eichelberg};

/// What a page says of a formula.
struct GasFilmDescription
{
    std::string_view name;     ///< "Woschni 1967"
    std::string_view equation; ///< with its units
    std::string_view source;   ///< and what of it is from memory
};
const GasFilmDescription& describe(GasFilm film);

/// State of the gas and of the engine that the formulae take.
struct GasState
{
    AbsolutePressure pressure{};
    Temperature temperature{}; ///< mean over the cylinder
};

/// Woschni 1967, SAE 670931: h = 130 D^-0.2 p^0.8 T^-0.53 w^0.8 in W/(m² K), m, bar, K, m/s. The constant is
/// also met as 129.8.
/// @param gas_velocity w, 0.5 to 150 m/s, see woschni_gas_velocity
/// @par Problems not_found: outside the validity, with the value that is
Result<HeatTransferCoefficient> woschni_film(Length bore, const GasState& gas, Velocity gas_velocity);

/// The textbook form (Heywood, Internal Combustion Engine Fundamentals, chapter 12, from memory):
/// h = 3.26 D^-0.2 p^0.8 T^-0.55 w^0.8 in W/(m² K), m, kPa, K, m/s. About 13 % lower at 900 K.
Result<HeatTransferCoefficient> woschni_kilopascal_film(Length bore, const GasState& gas,
                                                        Velocity gas_velocity);

/// Hohenberg 1979, SAE 790825: h = 130 V^-0.06 p^0.8 T^-0.4 (c_m + 1.4)^0.8 in W/(m² K), m³, bar, K, m/s.
/// @param volume of the gas at this instant, up to 10 m³
Result<HeatTransferCoefficient> hohenberg_film(Volume volume, const GasState& gas,
                                               Velocity mean_piston_speed);

/// Eichelberg 1939: h = 2.1 c_m^(1/3) (p T)^(1/2) in kcal/(m² h K), m/s, kgf/cm², K. Developed on slow
/// two-stroke engines. The constant is from memory; after conversion 7.67e-3 is met as well as 7.80e-3 (Pa).
Result<HeatTransferCoefficient> eichelberg_film(const GasState& gas, Velocity mean_piston_speed);

/// Part of the cycle for Woschni's gas velocity.
enum class CyclePart { gas_exchange, compression, combustion_and_expansion };

/// What Woschni's combustion term needs: the charge at some instant between closing and combustion, such as
/// the closing, and the pressure that the cylinder would have without combustion.
struct WoschniCharge
{
    AbsolutePressure pressure{}; ///< p_1
    Temperature temperature{};   ///< T_1
    Volume volume{};             ///< V_1
    Volume swept_volume{};       ///< V_s
};

/// Woschni's gas velocity: w = C1 c_m + C2 V_s T_1 / (p_1 V_1) (p - p_mot), with C1 6.18 in the gas exchange
/// and 2.28 else, C2 3.24e-3 m/(s K) from combustion on (direct injection) and 0 before; no swirl. A pressure
/// below the motored one adds nothing.
/// @param charge, pressure, motored_pressure used from combustion on only
/// @par Problems not_found: outside the validity; invalid_input: charge not above 0
Result<Velocity> woschni_gas_velocity(CyclePart part, Velocity mean_piston_speed,
                                      const WoschniCharge& charge = {}, AbsolutePressure pressure = {},
                                      AbsolutePressure motored_pressure = {});

/// Film and gas temperature that give the same mean heat as the film and temperature over the crank angle:
/// h = ∫h dθ / Δθ, T = ∫h T dθ / ∫h dθ.
struct MeanGasFilm
{
    HeatTransferCoefficient film{};
    Temperature gas{};
    double angle_covered = 0.0; ///< radians; a card's closed part covers less than the cycle
};

/// By the trapezoidal rule over a card. The wall's own temperature is taken as constant over the cycle.
/// @param angle [rad], rising  @param film [W/(m² K)], above 0  @param temperature [K], above 0
/// @par Problems invalid_input: fewer than 2 samples, different numbers of them, the first unusable sample
Result<MeanGasFilm> mean_gas_film(std::span<const double> angle, std::span<const double> film,
                                  std::span<const double> temperature);

} // namespace evenstroke
