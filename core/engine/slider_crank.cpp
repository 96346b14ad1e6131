// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/engine/slider_crank.h"

#include "core/plain_text.h"

#include <optional>
#include <string>

namespace evenstroke {
namespace {

constexpr double pi = 3.14159265358979323846;
constexpr double largest_ratio = 50.0;
constexpr double earliest_closing = 270.0; // degrees from firing dead centre

std::optional<Problem> find_size_problem(Length size, double largest, const std::string& name)
{
    const double metres = size.value();
    if (metres == 0.0) {
        return Problem{Problem::Kind::not_found, "The " + name + " of the engine is not known.",
                       "Enter the " + name + " on the engine's page."};
    }
    if (!(metres > 0.0 && metres <= largest)) {
        return invalid_input("A " + name + " of " + short_number_text(metres * 1000.0) +
                                 " mm is not above 0 and at most " + short_number_text(largest * 1000.0) +
                                 " mm.",
                             "Check the " + name + " on the engine's page and its unit.");
    }
    return std::nullopt;
}

std::optional<Problem> find_angle_problem(PlaneAngle angle)
{
    if (std::isfinite(angle.value())) {
        return std::nullopt;
    }
    return invalid_input("A crank angle of the card is no number.", "Check the angles of the card.");
}

} // namespace

Result<SliderCrank> SliderCrank::make(Length bore, Length stroke, Length rod_length)
{
    if (auto problem = find_size_problem(bore, 2.0, "bore")) {
        return *std::move(problem);
    }
    if (auto problem = find_size_problem(stroke, 5.0, "stroke")) {
        return *std::move(problem);
    }
    if (auto problem = find_size_problem(rod_length, 10.0, "rod length")) {
        return *std::move(problem);
    }
    if (!(rod_length.value() > 0.5 * stroke.value())) {
        return invalid_input("A connecting rod of " + short_number_text(rod_length.value() * 1000.0) +
                                 " mm is not longer than half of the stroke, " +
                                 short_number_text(stroke.value() * 500.0) + " mm.",
                             "Check stroke and rod length on the engine's page.");
    }
    const double diameter = bore.value();
    return SliderCrank(pi / 4.0 * diameter * diameter, 0.5 * stroke.value(), rod_length.value());
}

Result<PistonPosition> SliderCrank::at(PlaneAngle crank_angle) const
{
    if (auto problem = find_angle_problem(crank_angle)) {
        return *std::move(problem);
    }
    const CrankMotion here = motion(crank_angle.value());
    return PistonPosition{here.position * si::metres, here.slope * si::metres / si::radians,
                          here.curvature * si::metres / si::radians / si::radians,
                          std::atan2(here.sine_of_rod, here.cosine_of_rod) * si::radians};
}

Result<Volume> SliderCrank::clearance_volume(double compression_ratio) const
{
    if (!(compression_ratio > 1.0 && compression_ratio <= largest_ratio)) {
        return invalid_input("A compression ratio of " + short_number_text(compression_ratio) +
                                 " is not above 1 and at most " + short_number_text(largest_ratio) + ".",
                             "Check the compression ratio on the engine's page.");
    }
    return swept_volume() / (compression_ratio - 1.0);
}

Result<Volume> SliderCrank::volume_at(PlaneAngle crank_angle, double compression_ratio) const
{
    if (auto problem = find_angle_problem(crank_angle)) {
        return *std::move(problem);
    }
    const Result<Volume> clearance = clearance_volume(compression_ratio);
    if (!clearance) {
        return clearance.error();
    }
    return Volume::from_value(volume(crank_angle.value(), clearance.value().value()));
}

Result<double> SliderCrank::effective_compression_ratio(PlaneAngle closes, double compression_ratio) const
{
    if (!(std::abs(in_degrees(closes)) <= earliest_closing)) {
        return invalid_input("The cylinder closes at " + short_number_text(in_degrees(closes)) +
                                 "°, which is not within 270° of firing dead centre.",
                             "Check the angle at which the cylinder closes on the engine's page.");
    }
    const Result<Volume> closed = volume_at(closes, compression_ratio);
    if (!closed) {
        return closed.error();
    }
    return closed.value().value() / clearance_volume(compression_ratio).value().value();
}

Result<Velocity> SliderCrank::mean_piston_speed(Frequency speed) const
{
    if (!(speed.value() >= 0.0 && std::isfinite(speed.value()))) {
        return invalid_input("A speed of " + short_number_text(speed.value() * 60.0) + " r/min cannot be.",
                             "Check the speed of the engine.");
    }
    return Velocity::from_value(4.0 * radius_ * speed.value());
}

} // namespace evenstroke
