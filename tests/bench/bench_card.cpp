// SPDX-License-Identifier: GPL-3.0-or-later
// How long a card takes: evaluated whole (aim: at most 4 ms), its file read (aim: at most a tenth of that), and twenty
// cycles in tenths of a degree (aim: at most 40 ms); the review of twelve cylinders with their healthy cards at two loads
// (aim: at most 150 ms). Processor time of one thread; nothing fails on it.
//
// bench_card [part of a row's name, for that row alone]
#include "core/card/evaluation.h"
#include "storage/card_store.h"
#include "tests/bench/processor_time.h"
#include "tests/core/card_ship.h"

#include <cmath>
#include <cstdio>
#include <string>
#include <string_view>
#include <vector>

using namespace evenstroke;
using namespace evenstroke::indicator;

namespace {

struct BenchCard
{
    const char* name;
    bool two_stroke;
    double step;
    int cycles;
};

void measure(const BenchCard& row)
{
    Dice dice(1);
    SimulatedCase what = healthy_case(row.two_stroke, dice);
    what.step = row.step;
    what.cycles = row.cycles;
    const SimulatedCard card = simulate(what, dice);
    // Instruments write thousandths of a bar and of a degree at most; sixteen digits are the worst that a file may hold.
    const auto thousandths = [](std::vector<double> numbers) {
        for (double& number : numbers)
            number = std::round(number * 1e3) / 1e3;
        return numbers;
    };
    const std::string text =
        storage::card_text({card.trace.cycle, thousandths(card.trace.angle), thousandths(card.trace.pressure), false});
    const std::string all_digits = storage::card_text({card.trace.cycle, card.trace.angle, card.trace.pressure, false});
    bool good = true;
    const auto read = [&](const std::string& file) {
        return best_of(7, [&] { good = storage::read_card_text(file, "card").has_value() && good; });
    };
    const double reading = read(text), reading_all = read(all_digits);
    const double evaluating =
        best_of(7, [&] { good = evaluate(card.engine, card.conditions, card.trace).has_value() && good; });
    std::printf("%-40s %6zu samples: evaluated %6.2f ms, file read %6.3f ms (%4.1f %%), with all digits %6.3f ms (%4.1f %%)%s\n",
                row.name, card.trace.angle.size(), evaluating, reading, 100.0 * reading / evaluating, reading_all,
                100.0 * reading_all / evaluating, good ? "" : " REFUSED");
}

void measure_review(bool two_stroke)
{
    Dice dice(1);
    ShipCase what;
    what.two_stroke = two_stroke;
    what.cylinders = 12;
    what.loads = {70.0, 90.0, 80.0};
    what.called_healthy = 2;
    what.cycles = 1;
    const SimulatedShip ship = simulate_ship(what, dice);
    std::size_t compared = 0;
    const double reviewing = best_of(5, [&] {
        compared = 0;
        for (const ReviewedCard& card : review_cards(ship.judgement, ship.in_hand(), ship.shelf).cards)
            compared += card.comparison ? 1 : 0;
    });
    std::printf("%-44s %7zu cards: reviewed %8.2f ms\n",
                two_stroke ? "two-stroke, twelve cylinders and healthy cards" : "four-stroke, twelve cylinders and healthy cards",
                compared, reviewing);
}

} // namespace

int main(int count, char** arguments)
{
    const BenchCard rows[] = {{"two-stroke, one cycle, 0.5 degree", true, 0.5, 1},
                        {"four-stroke, one cycle, 0.5 degree", false, 0.5, 1},
                        {"two-stroke, one cycle, 0.1 degree", true, 0.1, 1},
                        {"four-stroke, one cycle, 0.1 degree", false, 0.1, 1},
                        {"two-stroke, twenty cycles, 0.5 degree", true, 0.5, 20},
                        {"two-stroke, twenty cycles, 0.1 degree", true, 0.1, 20},
                        {"four-stroke, twenty cycles, 0.1 degree", false, 0.1, 20}};
    for (const BenchCard& row : rows)
        if (count < 2 || std::string_view(row.name).find(arguments[1]) != std::string_view::npos)
            measure(row);
    if (count > 1)
        return 0;
    measure_review(true);
    measure_review(false);
    return 0;
}
