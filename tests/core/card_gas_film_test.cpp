// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/heat/card_gas_film.h"
#include "tests/core/refusal.h"

#include <cmath>
#include <gtest/gtest.h>
#include <vector>

namespace evenstroke {
namespace {

using Kind = Problem::Kind;
constexpr double ratio = 19.0, closing = -105.3, opening = 118.7; // invented; the ends lie between samples

SliderCrank slow_two_stroke()
{
    return SliderCrank::make(0.6 * si::metres, 2.4 * si::metres, 2.46 * si::metres).value();
}

struct Card
{
    std::vector<double> angle, pressure;
};

/// Compression and expansion along p V^n = constant from 3.5 bar abs at closing, no combustion.
Card motored(double exponent)
{
    const SliderCrank gear = slow_two_stroke();
    const double clearance = gear.clearance_volume(ratio).value().value();
    const double closed = gear.volume(crank_degrees(closing).value(), clearance);
    Card card;
    for (int i = -1800; i <= 1800; ++i) {
        card.angle.push_back(crank_degrees(0.1 * i).value());
        card.pressure.push_back(3.5e5 *
                                std::pow(closed / gear.volume(card.angle.back(), clearance), exponent));
    }
    return card;
}

ClosedPart closed_part()
{
    ClosedPart part;
    part.closes = crank_degrees(closing);
    part.opens = crank_degrees(opening);
    part.temperature_at_closing = celsius(80.0);
    return part;
}

Result<MeanGasFilm> film_of(GasFilm formula, const Card& card, const ClosedPart& part)
{
    return card_gas_film(formula, slow_two_stroke(), ratio, per_minute(105.0), card.angle, card.pressure,
                         part);
}

TEST(CardGasFilm, AnIsothermalCardKeepsTheTemperatureOfItsClosing)
{
    // p V constant: T stays T_1 whatever the film. Rounding, and the straight line at the closing (1e-6).
    for (const GasFilm formula : every_gas_film) {
        const MeanGasFilm mean = film_of(formula, motored(1.0), closed_part()).value();
        EXPECT_NEAR(in_celsius(mean.gas), 80.0, 1e-3);
        EXPECT_NEAR(mean.angle_covered, crank_degrees(opening - closing).value(), 1e-12);
        EXPECT_GT(mean.film.value(), 0.0);
    }
}

TEST(CardGasFilm, AgreesWithTheIntegralOfTheFormula)
{
    // Eichelberg along the same card by Simpson's rule, worked out here sample by sample.
    const SliderCrank gear = slow_two_stroke();
    const double clearance = gear.clearance_volume(ratio).value().value();
    const double first = crank_degrees(closing).value(), last = crank_degrees(opening).value();
    const double closed = gear.volume(first, clearance);
    double films = 0.0, heats = 0.0;
    const int steps = 4000;
    for (int i = 0; i <= steps; ++i) {
        const double weight = i == 0 || i == steps ? 1.0 : i % 2 == 1 ? 4.0 : 2.0;
        const double v = closed / gear.volume(first + (last - first) * i / steps, clearance);
        const double kelvin = 353.15 * std::pow(v, 0.35);
        const double film =
            2.1 * 4186.8 / 3600.0 * std::cbrt(8.4) * std::sqrt(3.5e5 * std::pow(v, 1.35) / 98066.5 * kelvin);
        films += weight * film;
        heats += weight * film * kelvin;
    }
    const MeanGasFilm mean = film_of(GasFilm::eichelberg, motored(1.35), closed_part()).value();
    // Trapezoids of 0.1° lose some 1e-6 of the peak.
    EXPECT_NEAR(mean.gas.value() / (heats / films), 1.0, 1e-5);
    EXPECT_NEAR(mean.film.value() / (films * (last - first) / steps / 3.0 / (last - first)), 1.0, 1e-5);
}

TEST(CardGasFilm, WoschniHasNoCombustionTermOnAMotoredCard)
{
    ClosedPart never = closed_part();
    never.combustion_starts = crank_degrees(180.0);
    const Card card = motored(1.35);
    const double with = film_of(GasFilm::woschni, card, closed_part()).value().film.value();
    const double without = film_of(GasFilm::woschni, card, never).value().film.value();
    EXPECT_NEAR(with / without, 1.0, 1e-4); // the pressure at closing is read off a straight line
}

TEST(CardGasFilm, NamesWhatIsMissingOrImpossible)
{
    const Card card = motored(1.35);
    ClosedPart part = closed_part();
    part.closes.reset();
    expect_problem(film_of(GasFilm::woschni, card, part), Kind::not_found, "cylinder closes is not known");
    part = closed_part();
    part.opens.reset();
    expect_problem(film_of(GasFilm::woschni, card, part), Kind::not_found, "cylinder opens is not known");
    part = closed_part();
    part.temperature_at_closing.reset();
    expect_problem(film_of(GasFilm::woschni, card, part), Kind::not_found, "gas temperature when");
    part = closed_part();
    part.closes = crank_degrees(20.0);
    expect_problem(film_of(GasFilm::woschni, card, part), Kind::invalid_input, "closes at 20°");
    part = closed_part();
    part.motored_exponent = 3.0;
    expect_problem(film_of(GasFilm::woschni, card, part), Kind::invalid_input,
                   "exponent of compression of 3");
    Card spoilt = card;
    spoilt.pressure[4] = -2e5;
    expect_problem(film_of(GasFilm::woschni, spoilt, closed_part()), Kind::invalid_input,
                   "Sample 5 of the card");
    Card half;
    half.angle.assign(card.angle.begin(), card.angle.begin() + 1800);
    half.pressure.assign(card.pressure.begin(), card.pressure.begin() + 1800);
    expect_problem(film_of(GasFilm::woschni, half, closed_part()), Kind::not_found, "does not reach");
    expect_problem(card_gas_film(GasFilm::eichelberg, slow_two_stroke(), ratio, per_minute(0.0), card.angle,
                                 card.pressure, closed_part()),
                   Kind::not_found, "mean piston speed of 0 m/s");
}

} // namespace
} // namespace evenstroke
