// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/card/card_wall.h"

#include "core/heat/card_gas_film.h"

namespace evenstroke::indicator {
namespace {

constexpr double pascals_a_bar = 1e5;

Result<MeanGasFilm> film_of(const Engine& engine, const SliderCrank& gear, const CardAtReading& card)
{
    if (!engine.compression_ratio)
        return Problem{Problem::Kind::not_found, "The gas side of the wall is not known from the card, because the engine has no compression ratio.",
                       "Enter it with the engine's particulars."};
    if (!card.conditions.speed)
        return Problem{Problem::Kind::not_found, "The gas side of the wall is not known from the card, because no speed was read.",
                       "Read the speed with the card."};
    TraceFrame frame;
    frame.two_stroke = engine.two_stroke();
    frame.closes = engine.cylinder_closes_deg;
    frame.opens = engine.cylinder_opens_deg;
    const auto cleaned = clean(card.trace, frame);
    if (!cleaned)
        return cleaned.error();
    std::vector<double> angle, pressure;
    for (const double degrees : cleaned.value().angle)
        angle.push_back(crank_degrees(degrees).value());
    for (const double bar : cleaned.value().mean)
        pressure.push_back(bar * pascals_a_bar);
    ClosedPart part;
    if (engine.cylinder_closes_deg)
        part.closes = crank_degrees(*engine.cylinder_closes_deg);
    if (engine.cylinder_opens_deg)
        part.opens = crank_degrees(*engine.cylinder_opens_deg);
    part.temperature_at_closing = card.conditions.charge_temperature;
    return card_gas_film(GasFilm::woschni, gear, *engine.compression_ratio, *card.conditions.speed, angle, pressure, part);
}

} // namespace

Result<GasSideChange> gas_side_change(const Engine& engine, const CardAtReading& now, const CardAtReading& healthy)
{
    const auto gear = SliderCrank::make(engine.bore, engine.stroke, engine.rod_length);
    if (!gear)
        return gear.error();
    const auto film_now = film_of(engine, gear.value(), now), film_healthy = film_of(engine, gear.value(), healthy);
    if (!film_now)
        return film_now.error();
    if (!film_healthy)
        return film_healthy.error();
    return GasSideChange{film_now.value().film.value() / film_healthy.value().film.value(),
                         film_now.value().gas.value() / film_healthy.value().gas.value(),
                         std::min(film_now.value().angle_covered, film_healthy.value().angle_covered)};
}

} // namespace evenstroke::indicator
