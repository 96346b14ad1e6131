// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/heat/gas_film.h"

#include "core/plain_text.h"

#include <algorithm>
#include <cmath>
#include <optional>
#include <stdexcept>
#include <string>

namespace evenstroke {
namespace {

constexpr double kilogram_force_per_square_centimetre = 98066.5; // Pa, NIST SP 811
constexpr double kilocalorie_per_hour = 4186.8 / 3600.0; // W, international table calorie, NIST SP 811

/// A value that lies outside what the formulae are good for.
std::optional<Problem> find_outside(double value, double lowest, double highest, const std::string& what,
                                    const std::string& unit)
{
    if (value >= lowest && value <= highest) {
        return std::nullopt;
    }
    return Problem{Problem::Kind::not_found,
                   "The gas film is not known at a " + what + " of " + short_number_text(value) + " " + unit +
                       "; it is worked out from " + short_number_text(lowest) + " to " +
                       short_number_text(highest) + " " + unit + ".",
                   "Check the " + what + " and its unit."};
}

std::optional<Problem> find_outside(const GasState& gas)
{
    if (auto problem = find_outside(in_bar(gas.pressure), 0.5, 300.0, "gas pressure", "bar abs")) {
        return problem;
    }
    return find_outside(gas.temperature.value(), 200.0, 3500.0, "gas temperature", "K");
}

std::optional<Problem> find_outside(Velocity mean_piston_speed)
{
    return find_outside(mean_piston_speed.value(), 1.0, 25.0, "mean piston speed", "m/s");
}

std::optional<Problem> find_outside_of_woschni(Length bore, const GasState& gas, Velocity gas_velocity)
{
    if (auto problem = find_outside(bore.value(), 0.01, 2.0, "bore", "m")) {
        return problem;
    }
    if (auto problem = find_outside(gas)) {
        return problem;
    }
    return find_outside(gas_velocity.value(), 0.5, 150.0, "gas velocity", "m/s");
}

} // namespace

const GasFilmDescription& describe(GasFilm film)
{
    static constexpr GasFilmDescription woschni{
        "Woschni 1967", "h = 130 D^-0.2 p^0.8 T^-0.53 w^0.8, m, bar, K, m/s",
        "G. Woschni, SAE 670931 (1967), as quoted in public; the constant is also met as 129.8"};
    static constexpr GasFilmDescription woschni_kilopascal{
        "Woschni, textbook form", "h = 3.26 D^-0.2 p^0.8 T^-0.55 w^0.8, m, kPa, K, m/s",
        "J. B. Heywood, Internal Combustion Engine Fundamentals (chapter from memory: 12)"};
    static constexpr GasFilmDescription hohenberg{
        "Hohenberg 1979", "h = 130 V^-0.06 p^0.8 T^-0.4 (c_m + 1.4)^0.8, m³, bar, K, m/s",
        "G. F. Hohenberg, SAE 790825 (1979), as quoted in public"};
    static constexpr GasFilmDescription eichelberg{
        "Eichelberg 1939", "h = 2.1 c_m^(1/3) (p T)^(1/2) kcal/(m² h K), m/s, kgf/cm², K",
        "G. Eichelberg (1939), constant from memory; slow two-stroke engines"};
    switch (film) {
    case GasFilm::woschni:
        return woschni;
    case GasFilm::woschni_kilopascal:
        return woschni_kilopascal;
    case GasFilm::hohenberg:
        return hohenberg;
    case GasFilm::eichelberg:
        return eichelberg;
    }
    throw std::logic_error("gas film without description");
}

Result<HeatTransferCoefficient> woschni_film(Length bore, const GasState& gas, Velocity gas_velocity)
{
    if (auto problem = find_outside_of_woschni(bore, gas, gas_velocity)) {
        return *std::move(problem);
    }
    return film_coefficient(130.0 * std::pow(bore.value(), -0.2) * std::pow(in_bar(gas.pressure), 0.8) *
                            std::pow(gas.temperature.value(), -0.53) * std::pow(gas_velocity.value(), 0.8));
}

Result<HeatTransferCoefficient> woschni_kilopascal_film(Length bore, const GasState& gas,
                                                        Velocity gas_velocity)
{
    if (auto problem = find_outside_of_woschni(bore, gas, gas_velocity)) {
        return *std::move(problem);
    }
    return film_coefficient(3.26 * std::pow(bore.value(), -0.2) *
                            std::pow(gas.pressure.value() / 1000.0, 0.8) *
                            std::pow(gas.temperature.value(), -0.55) * std::pow(gas_velocity.value(), 0.8));
}

Result<HeatTransferCoefficient> hohenberg_film(Volume volume, const GasState& gas, Velocity mean_piston_speed)
{
    if (auto problem = find_outside(volume.value(), 1e-6, 10.0, "gas volume", "m³")) {
        return *std::move(problem);
    }
    if (auto problem = find_outside(gas)) {
        return *std::move(problem);
    }
    if (auto problem = find_outside(mean_piston_speed)) {
        return *std::move(problem);
    }
    return film_coefficient(130.0 * std::pow(volume.value(), -0.06) * std::pow(in_bar(gas.pressure), 0.8) *
                            std::pow(gas.temperature.value(), -0.4) *
                            std::pow(mean_piston_speed.value() + 1.4, 0.8));
}

Result<HeatTransferCoefficient> eichelberg_film(const GasState& gas, Velocity mean_piston_speed)
{
    if (auto problem = find_outside(gas)) {
        return *std::move(problem);
    }
    if (auto problem = find_outside(mean_piston_speed)) {
        return *std::move(problem);
    }
    const double pressure = gas.pressure.value() / kilogram_force_per_square_centimetre;
    return film_coefficient(2.1 * kilocalorie_per_hour * std::cbrt(mean_piston_speed.value()) *
                            std::sqrt(pressure * gas.temperature.value()));
}

Result<Velocity> woschni_gas_velocity(CyclePart part, Velocity mean_piston_speed, const WoschniCharge& charge,
                                      AbsolutePressure pressure, AbsolutePressure motored_pressure)
{
    if (auto problem = find_outside(mean_piston_speed)) {
        return *std::move(problem);
    }
    const double piston = mean_piston_speed.value();
    if (part != CyclePart::combustion_and_expansion) {
        return Velocity::from_value((part == CyclePart::gas_exchange ? 6.18 : 2.28) * piston);
    }
    const double product = charge.pressure.value() * charge.volume.value();
    if (!(product > 0.0 && charge.volume.value() > 0.0 && charge.temperature.value() > 0.0 &&
          charge.swept_volume.value() > 0.0 && std::isfinite(product))) {
        return invalid_input(
            "The charge when the cylinder closes is not known: " +
                short_number_text(in_bar(charge.pressure)) + " bar abs, " +
                short_number_text(charge.temperature.value()) + " K, " +
                short_number_text(charge.volume.value()) + " m³.",
            "Enter pressure, temperature and volume of the charge at closing, and the swept volume.");
    }
    for (const auto& [value, what] :
         {std::pair{pressure, "gas pressure"}, {motored_pressure, "motored pressure"}}) {
        if (auto problem = find_outside(in_bar(value), 0.5, 300.0, what, "bar abs")) {
            return *std::move(problem);
        }
    }
    const double rise = std::max(0.0, pressure.value() - motored_pressure.value());
    return Velocity::from_value(2.28 * piston + 3.24e-3 * charge.swept_volume.value() *
                                                    charge.temperature.value() / product * rise);
}

Result<MeanGasFilm> mean_gas_film(std::span<const double> angle, std::span<const double> film,
                                  std::span<const double> temperature)
{
    if (angle.size() < 2 || film.size() != angle.size() || temperature.size() != angle.size()) {
        return invalid_input(
            "The mean gas film needs 2 or more angles with a film and a temperature each, and has " +
                std::to_string(angle.size()) + ", " + std::to_string(film.size()) + " and " +
                std::to_string(temperature.size()) + ".",
            "Give each sample of the card all three.");
    }
    double films = 0.0, heats = 0.0;
    for (std::size_t i = 0; i < angle.size(); ++i) {
        const bool possible = std::isfinite(angle[i]) && film[i] > 0.0 && std::isfinite(film[i]) &&
                              temperature[i] > 0.0 && std::isfinite(temperature[i]);
        if (!possible || (i > 0 && !(angle[i] > angle[i - 1]))) {
            return invalid_input("Sample " + std::to_string(i + 1) + " of the card has a film of " +
                                     short_number_text(film[i]) + " W/(m² K) and a gas of " +
                                     short_number_text(temperature[i]) +
                                     " K; both are above 0, at an angle above that of the sample before.",
                                 "Check the card around this sample.");
        }
        if (i > 0) {
            const double half = 0.5 * (angle[i] - angle[i - 1]);
            films += half * (film[i] + film[i - 1]);
            heats += half * (film[i] * temperature[i] + film[i - 1] * temperature[i - 1]);
        }
    }
    const double covered = angle.back() - angle.front();
    return MeanGasFilm{film_coefficient(films / covered), Temperature::from_value(heats / films), covered};
}

} // namespace evenstroke
