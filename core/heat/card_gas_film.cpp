// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/heat/card_gas_film.h"

#include "core/plain_text.h"

#include <cmath>
#include <stdexcept>
#include <string>
#include <vector>

namespace evenstroke {
namespace {

Problem missing(const std::string& what)
{
    return {Problem::Kind::not_found, "The " + what + " is not known.", "Enter the " + what + "."};
}

std::optional<Problem> find_problem(const ClosedPart& part)
{
    if (!part.closes) {
        return missing("angle at which the cylinder closes");
    }
    if (!part.opens) {
        return missing("angle at which the cylinder opens");
    }
    if (!part.temperature_at_closing) {
        return missing("gas temperature when the cylinder closes");
    }
    const double closes = in_degrees(*part.closes), opens = in_degrees(*part.opens);
    if (!(closes >= -180.0 && closes < 0.0 && opens > 0.0 && opens <= 180.0)) {
        return invalid_input("The cylinder closes at " + short_number_text(closes) + "° and opens at " +
                                 short_number_text(opens) +
                                 "°, which is not within 180° before and after firing dead centre.",
                             "Check the two angles on the engine's page.");
    }
    if (!(part.motored_exponent >= 1.2 && part.motored_exponent <= 1.45)) {
        return invalid_input("An exponent of compression of " + short_number_text(part.motored_exponent) +
                                 " is not from 1.2 to 1.45.",
                             "Check the exponent.");
    }
    return std::nullopt;
}

std::optional<Problem> find_problem(std::span<const double> angle, std::span<const double> pressure,
                                    const ClosedPart& part)
{
    if (angle.size() != pressure.size() || angle.size() < 2) {
        return invalid_input("The card has " + std::to_string(angle.size()) + " angles and " +
                                 std::to_string(pressure.size()) + " pressures.",
                             "Give each sample of the card its angle and its pressure.");
    }
    for (std::size_t i = 0; i < angle.size(); ++i) {
        const bool rising = i == 0 ? std::isfinite(angle[i]) : angle[i] > angle[i - 1];
        if (!rising || !std::isfinite(angle[i]) || !(pressure[i] > 0.0 && std::isfinite(pressure[i]))) {
            return invalid_input("Sample " + std::to_string(i + 1) + " of the card has " +
                                     short_number_text(pressure[i] / 1e5) + " bar abs at " +
                                     short_number_text(in_degrees(angle[i] * si::radians)) +
                                     "°; pressures are above 0 and angles rise.",
                                 "Check the card around this sample.");
        }
    }
    if (angle.front() > part.closes->value() || angle.back() < part.opens->value()) {
        return Problem{Problem::Kind::not_found,
                       "The card does not reach from where the cylinder closes to where it opens.",
                       "Take a card of the whole cycle."};
    }
    return std::nullopt;
}

/// Works out film and gas of the samples in the closed part.
class ClosedCylinder
{
public:
    ClosedCylinder(GasFilm formula, const SliderCrank& gear, double clearance, Velocity piston,
                   const ClosedPart& part)
        : formula_(formula), gear_(gear), clearance_(clearance), piston_(piston), part_(part)
    {
    }

    /// The first sample is the closing.
    Result<HeatTransferCoefficient> add(double angle, double pressure)
    {
        const double volume = gear_.volume(angle, clearance_);
        if (angles.empty()) {
            charge_ = {AbsolutePressure::from_value(pressure), *part_.temperature_at_closing,
                       Volume::from_value(volume), gear_.swept_volume()};
        }
        const double gas_kelvin = charge_.temperature.value() * pressure * volume /
                                  (charge_.pressure.value() * charge_.volume.value());
        const GasState gas{AbsolutePressure::from_value(pressure), Temperature::from_value(gas_kelvin)};
        const Result<HeatTransferCoefficient> film = film_of(gas, volume, angle);
        if (film) {
            angles.push_back(angle);
            temperatures.push_back(gas_kelvin);
            films.push_back(film.value().value());
        }
        return film;
    }

    std::vector<double> angles, temperatures, films; // rad, K, W/(m² K)

private:
    Result<HeatTransferCoefficient> film_of(const GasState& gas, double volume, double angle) const
    {
        if (formula_ == GasFilm::hohenberg) {
            return hohenberg_film(Volume::from_value(volume), gas, piston_);
        }
        if (formula_ == GasFilm::eichelberg) {
            return eichelberg_film(gas, piston_);
        }
        const bool burning = angle >= part_.combustion_starts.value();
        const double motored =
            charge_.pressure.value() * std::pow(charge_.volume.value() / volume, part_.motored_exponent);
        const Result<Velocity> velocity =
            woschni_gas_velocity(burning ? CyclePart::combustion_and_expansion : CyclePart::compression,
                                 piston_, charge_, gas.pressure, AbsolutePressure::from_value(motored));
        if (!velocity) {
            return velocity.error();
        }
        const Length bore = std::sqrt(gear_.area() * 4.0 / 3.14159265358979323846) * si::metres;
        return formula_ == GasFilm::woschni ? woschni_film(bore, gas, velocity.value())
                                            : woschni_kilopascal_film(bore, gas, velocity.value());
    }

    GasFilm formula_;
    const SliderCrank& gear_;
    double clearance_; // m³
    Velocity piston_;
    const ClosedPart& part_;
    WoschniCharge charge_;
};

/// Pressure at an angle between samples i - 1 and i, by the straight line.
double between(std::span<const double> angle, std::span<const double> pressure, std::size_t i, double at)
{
    const double share = (at - angle[i - 1]) / (angle[i] - angle[i - 1]);
    return pressure[i - 1] + share * (pressure[i] - pressure[i - 1]);
}

} // namespace

Result<MeanGasFilm> card_gas_film(GasFilm formula, const SliderCrank& gear, double compression_ratio,
                                  Frequency speed, std::span<const double> angle,
                                  std::span<const double> pressure, const ClosedPart& part)
{
    if (auto problem = find_problem(part)) {
        return *std::move(problem);
    }
    if (auto problem = find_problem(angle, pressure, part)) {
        return *std::move(problem);
    }
    const Result<Volume> clearance = gear.clearance_volume(compression_ratio);
    if (!clearance) {
        return clearance.error();
    }
    const Result<Velocity> piston = gear.mean_piston_speed(speed);
    if (!piston) {
        return piston.error();
    }
    const double closes = part.closes->value(), opens = part.opens->value();
    ClosedCylinder cylinder(formula, gear, clearance.value().value(), piston.value(), part);
    for (std::size_t i = 0; i < angle.size(); ++i) {
        const bool closing = angle[i] >= closes && cylinder.angles.empty();
        if (closing && angle[i] > closes) { // the ends lie between samples, as a rule
            if (const auto film = cylinder.add(closes, between(angle, pressure, i, closes)); !film) {
                return film.error();
            }
        }
        const bool opening = angle[i] >= opens;
        if (opening || angle[i] >= closes) {
            const double at = opening ? opens : angle[i];
            const double there = opening && i > 0 ? between(angle, pressure, i, opens) : pressure[i];
            if (const auto film = cylinder.add(at, there); !film) {
                return film.error();
            }
        }
        if (opening) {
            break;
        }
    }
    return mean_gas_film(cylinder.angles, cylinder.films, cylinder.temperatures);
}

} // namespace evenstroke
