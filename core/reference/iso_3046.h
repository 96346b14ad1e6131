// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/problem.h"
#include "core/reference/applied_correction.h"
#include "core/units/quantity_types.h"

#include <optional>

/// Adjustment of a declared power and fuel consumption between two ambients, ISO 3046-1, clause 10 (form and
/// exponents from memory; the form agrees with the worked examples of Mathur and Sharma, Internal Combustion
/// Engine, chapter 27):
///
///     k     = [(p_x - a φ_x p_sx) / (p_r - a φ_r p_sr)]^m (T_r / T_x)^n (T_cr / T_cx)^s
///     alpha = k - 0.7 (1 - k) (1 / η_m - 1)        P_x = alpha P_r
///     beta  = k / alpha                            b_x = beta b_r
///
/// x: site, r: reference. It answers for the same effect as the linear correction: for one value at most one
/// of them (applied_correction.h). Where the maker states that no power adjustment is needed, only beta is
/// used. An engine whose turbocharger is at its limit takes the maker's substitute reference in place of r.
namespace evenstroke {

/// Kinds of engine that have exponents of their own.
enum class AspirationClass {
    charge_air_cooled, ///< turbocharged with charge-air cooler, low and medium speed: m 0.7, n 1.2, s 1, a 0
    turbocharged,      ///< without charge-air cooler: m 0.7, n 2, s 0, a 0
    naturally_aspirated, ///< limited by excess air: m 1, n 0.75, s 0, a 1
};

struct Iso3046Exponents
{
    double a, m, n, s;
};
Iso3046Exponents iso_3046_exponents(AspirationClass aspiration);

/// One of the two ambients. Coolant and steam are only needed where the class of engine uses them.
struct Iso3046Ambient
{
    AbsolutePressure barometer{};
    Temperature inlet_air{};
    std::optional<Temperature> coolant;           ///< into the charge-air cooler
    std::optional<AbsolutePressure> water_vapour; ///< φ p_s, see vapour_pressure in humid_air.h
};

struct Iso3046Adjustment
{
    double k = 1.0, alpha = 1.0, beta = 1.0;
};

/// Where the maker states no mechanical efficiency (ISO 3046-1, from memory).
inline constexpr double iso_3046_mechanical_efficiency = 0.80;

/// Validity 0.6 <= k <= 1.1 (common practice); outside, the adjustment is not known.
/// @param mechanical_efficiency above 0, at most 1
/// @par Problems not_found: coolant or steam missing where the class needs it, or k outside the validity.
///      invalid_input: a pressure or temperature that is not positive and finite, an efficiency outside its
///      range
Result<Iso3046Adjustment> adjust_iso_3046(AspirationClass aspiration, const Iso3046Ambient& site,
                                          const Iso3046Ambient& reference,
                                          double mechanical_efficiency = iso_3046_mechanical_efficiency);

/// A consumption measured at site, at reference ambient: b / beta.
Corrected<SpecificConsumption> correct_iso_3046(SpecificConsumption measured,
                                                const Iso3046Adjustment& adjustment);

} // namespace evenstroke
