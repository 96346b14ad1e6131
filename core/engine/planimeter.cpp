// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/engine/planimeter.h"

#include "core/plain_text.h"

#include <cmath>
#include <optional>
#include <string>

namespace evenstroke {
namespace {

constexpr double highest_mean = 200e5; // Pa

std::optional<Problem> find_spring_problem(IndicatorSpring spring)
{
    if (spring.value() == 0.0) {
        return Problem{Problem::Kind::not_found, "The indicator spring is not known.",
                       "Enter the scale that is stamped on the spring."};
    }
    if (!(spring.value() > 0.0 && std::isfinite(spring.value()))) {
        return invalid_input("An indicator spring of " + short_number_text(spring.value() / 1e8) +
                                 " bar/mm cannot be.",
                             "Check the scale that is stamped on the spring.");
    }
    return std::nullopt;
}

Result<PressureDifference> bounded(double mean)
{
    if (!(std::abs(mean) <= highest_mean)) {
        return invalid_input("A mean indicated pressure of " + short_number_text(mean / 1e5) +
                                 " bar is not within 200 bar.",
                             "Check area, length and spring of the card and their units.");
    }
    return mean * si::pascals;
}

} // namespace

Result<PressureDifference> planimeter_pressure(Area area, Length card_length, IndicatorSpring spring)
{
    if (auto problem = find_spring_problem(spring)) {
        return *std::move(problem);
    }
    if (card_length.value() == 0.0) {
        return Problem{Problem::Kind::not_found, "The length of the card is not known.",
                       "Measure the length of the card."};
    }
    if (!(card_length.value() >= 0.01 && card_length.value() <= 0.5)) {
        return invalid_input("A card " + short_number_text(card_length.value() * 1000.0) +
                                 " mm long is not from 10 to 500 mm.",
                             "Check the length of the card and its unit.");
    }
    if (!(std::abs(area.value()) <= 0.1)) {
        return invalid_input("An area of the card of " + short_number_text(area.value() * 1e6) +
                                 " mm² is not within 100000 mm².",
                             "Check the planimeter's reading and its unit.");
    }
    return bounded(area.value() / card_length.value() * spring.value());
}

Result<PressureDifference> mid_ordinate_pressure(std::span<const Length> heights, IndicatorSpring spring)
{
    if (auto problem = find_spring_problem(spring)) {
        return *std::move(problem);
    }
    if (heights.size() < 5) {
        return invalid_input(
            "The card has " + std::to_string(heights.size()) + " heights, and a mean needs 5 or more.",
            "Divide the card into ten equal parts and read the height in the middle of each.");
    }
    double sum = 0.0;
    for (std::size_t i = 0; i < heights.size(); ++i) {
        if (!std::isfinite(heights[i].value())) {
            return invalid_input("Height " + std::to_string(i + 1) + " of the card is no number.",
                                 "Read this height again.");
        }
        sum += heights[i].value();
    }
    return bounded(sum / static_cast<double>(heights.size()) * spring.value());
}

} // namespace evenstroke
