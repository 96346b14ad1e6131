// SPDX-License-Identifier: GPL-3.0-or-later
#include "tests/core/card_ship.h"

#include "tests/core/reading_maker.h"

#include <cmath>

namespace evenstroke::indicator {
namespace {

constexpr double ambient_scatter = 0.02; // of the charge pressure from month to month

struct Traits
{
    double fuel, ratio, start, wall, offset;
};

SimulatedCase at_load(const ShipCase& what, double load, double charge)
{
    SimulatedCase made;
    made.engine = what.two_stroke ? large_two_stroke() : medium_four_stroke();
    made.scavenge = (what.two_stroke ? 3.9 : 3.6) * (0.25 + 0.75 * load) * charge;
    made.fuel_kg = what.two_stroke ? 0.056 * std::pow(load, 2.0 / 3.0) : 3.3e-3 * load;
    if (what.two_stroke)
        made.engine.speed_rpm *= std::cbrt(load);
    made.start = -1.0 + 3.0 * (1.0 - load);
    made.duration = 38.0 + 16.0 * load;
    made.wall_multiplier = what.wall_multiplier;
    made.hohenberg = what.hohenberg;
    made.ratio_error = what.ratio_error;
    made.noise = what.noise;
    made.step = what.step;
    made.cycles = what.cycles;
    made.drift = what.drift;
    made.gain = what.gain;
    return made;
}

std::vector<Traits> draw_traits(const ShipCase& what, Dice& dice)
{
    std::vector<Traits> traits;
    const double offset = between(dice, -1.0, 1.0);
    for (int c = 0; c < what.cylinders; ++c)
        traits.push_back({1.0 + spread(dice, 0.015), spread(dice, 0.005), spread(dice, 0.4), 1.0 + spread(dice, 0.1),
                          offset + spread(dice, 0.03)});
    return traits;
}

SimulatedCase with_traits(SimulatedCase made, const Traits& traits)
{
    made.fuel_kg *= traits.fuel;
    made.ratio_error += traits.ratio;
    made.start += traits.start;
    made.wall_multiplier *= traits.wall;
    made.offset = traits.offset;
    return made;
}

} // namespace

ShipCase any_ship(bool two_stroke, Dice& dice)
{
    ShipCase what;
    what.two_stroke = two_stroke;
    const double load = between(dice, 50.0, 92.0);
    what.loads = {load - between(dice, 3.0, 12.0), load + between(dice, 3.0, 12.0), load};
    what.called_healthy = 2;
    what.ratio_error = between(dice, -0.03, 0.03);
    what.wall_multiplier = between(dice, 0.6, 1.4);
    what.drift = between(dice, -0.3, 0.3);
    what.noise = between(dice, 0.05, 0.5);
    what.cycles = between(dice, 0.0, 1.0) < 0.3 ? 1 : 10;
    return what;
}

SimulatedShip simulate_ship(const ShipCase& what, Dice& dice, const CardFault& fault)
{
    SimulatedShip ship;
    ship.cards = std::make_shared<std::map<CardPlace, RecordedCard>>();
    auto record = std::make_shared<EngineRecord>();
    const std::vector<Traits> traits = draw_traits(what, dice);
    for (std::size_t r = 0; r < what.loads.size(); ++r) {
        const bool in_hand = r + 1 == what.loads.size();
        const double load = 0.01 * what.loads[r], warm = between(dice, 335.0, 352.0);
        const SimulatedCase engine = at_load(what, load, 1.0 + what.month_scatter * spread(dice, ambient_scatter));
        const double said_charge = 1.0 + spread(dice, 0.005), zero = spread(dice, 0.3);
        test::ReadingMaker maker(TimePoint{std::chrono::days(365 + 30 * static_cast<int>(r))});
        maker.number("speed", engine.engine.speed_rpm).number("barometric_pressure", 1010.0);
        maker.number("scavenge_pressure", engine.scavenge * said_charge - 1.01);
        maker.number("scavenge_temperature", warm - 273.15 - 30.0 + spread(dice, 4.0));
        double fuel = 0.0;
        for (int c = 1; c <= what.cylinders; ++c) {
            SimulatedCase made = with_traits(engine, traits[static_cast<std::size_t>(c - 1)]);
            made.closing_kelvin = warm;
            made.fuel_kg *= 1.0 + what.month_scatter * spread(dice, 0.007);
            made.start += what.month_scatter * spread(dice, 0.15);
            made.closing_slip = what.month_scatter * spread(dice, 0.003);
            made.offset += spread(dice, 0.02) + what.shift_per_month * static_cast<double>(r);
            made.zero = zero;
            if (in_hand)
                ship.sound.emplace(c, made);
            if (in_hand && fault)
                fault(made, c);
            fuel += made.fuel_kg;
            const SimulatedCard card = simulate(made, dice);
            if (r == 0 && c == 1)
                record->engine = card.engine;
            const CardPlace place{r, c};
            ship.cases.emplace(place, made);
            ship.truths.emplace(place, card.truth);
            ship.cards->emplace(place, RecordedCard{card.trace, false});
            ship.shelf.places.push_back(place);
        }
        const double cycles = engine.engine.speed_rpm * 60.0 / (what.two_stroke ? 1.0 : 2.0);
        maker.number("fuel_consumption", fuel * cycles * (1.0 + spread(dice, 0.01)));
        record->readings.push_back(maker.done());
        ReadingJudgement judged;
        judged.reading = r;
        judged.load_percent = what.loads[r] * (1.0 + spread(dice, 0.01));
        ship.judgement.readings.push_back(judged);
        if (r < what.called_healthy)
            ship.shelf.called_healthy.push_back(r);
    }
    record->engine.cylinders = what.cylinders;
    ship.judgement.record = record;
    ship.shelf.load = [cards = ship.cards](const CardPlace& place) -> Result<RecordedCard> { return cards->at(place); };
    return ship;
}

SimulatedCard without_indicator(SimulatedCase what)
{
    what.offset = what.zero = what.noise = what.drift = what.shock = what.fuel_variation = what.passage_hz = 0.0;
    what.gain = 1.0;
    what.spikes = what.missing = 0;
    what.cycles = 1;
    Dice none(1);
    return simulate(what, none);
}

} // namespace evenstroke::indicator
