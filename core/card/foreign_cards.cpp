// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/card/remarks_review.h"

#include "core/card/result_catalogue.h"

#include "core/trend/robust.h"

#include <algorithm>
#include <cmath>

namespace evenstroke::indicator {
namespace {

/// What tells cylinders apart for good, and by how much it changes from reading to reading with nothing wrong (one standard
/// deviation beside the card's own uncertainty; common practice, no source).
struct Feature
{
    CardResult result;
    double relative, absolute;
};
constexpr Feature features[] = {{CardResult::mean_indicated_pressure, 0.010, 0.0},
                                {CardResult::compression_pressure, 0.0045, 0.0},
                                {CardResult::maximum_pressure, 0.0, 0.8},
                                {CardResult::ca10, 0.0, 0.22}};

struct Fit
{
    double value = 0.0;
    bool known = false;
};

/// How badly the card of one cylinder fits the healthy one of another: squares in standard deviations, what all cylinders
/// moved by taken out.
class Matcher
{
public:
    explicit Matcher(const std::vector<CardInReview>& cards) : cards_(cards)
    {
        for (const Feature& feature : features) {
            const auto i = static_cast<std::size_t>(feature.result);
            std::vector<double> moves;
            for (const CardInReview& card : cards)
                if (card.comparison && card.comparison->differences[i])
                    moves.push_back(card.comparison->differences[i]->value);
            common_.push_back(moves.size() < 3 ? std::nullopt : std::optional(drift::median_in_place(moves)));
        }
    }
    Fit misfit(std::size_t card, std::size_t healthy) const
    {
        Fit fit;
        const CardInReview &mine = cards_[card], &other = cards_[healthy];
        if (!mine.comparison || !other.comparison || !mine.now || mine.comparison->dead_centre_assumed)
            return fit;
        for (std::size_t f = 0; f < std::size(features); ++f) {
            const auto i = static_cast<std::size_t>(features[f].result);
            const auto& now = mine.now->results[i];
            const auto &then = other.comparison->healthy_results[i], &difference = mine.comparison->differences[i];
            if (!now || !then || !difference || !common_[f])
                continue;
            const double common = mine.comparison->common_half_width[i];
            const double own = 0.5 * std::sqrt(std::max(0.0, *difference->half_width * *difference->half_width - common * common));
            const double month = std::hypot(features[f].relative * then->value, features[f].absolute);
            const double away = now->value - then->value - *common_[f];
            fit.value += away * away / (own * own + month * month);
            fit.known = true;
        }
        return fit;
    }

private:
    const std::vector<CardInReview>& cards_;
    std::vector<std::optional<double>> common_;
};

bool same_samples(const Trace& a, const Trace& b)
{
    const auto equal = [](double x, double y) { return x == y || (std::isnan(x) && std::isnan(y)); };
    return a.pressure.size() == b.pressure.size() && a.pressure.size() > 100 &&
           std::equal(a.pressure.begin(), a.pressure.end(), b.pressure.begin(), equal);
}

std::string cylinder_words(const Engine& engine, int cylinder) { return "cylinder " + engine.cylinder_name(cylinder); }

/// Two cylinders whose cards fit each other's healthy cards clearly better than their own.
void find_exchanged(const Engine& engine, const std::vector<CardInReview>& cards, std::vector<Remark>& remarks)
{
    // By simulation (card_review_statistics_test.cpp): more doubts the lower they are.
    const double clearly = 16.0 + 4.0 * std::log(std::max(1.0, static_cast<double>(cards.size() * (cards.size() - 1)) / 30.0));
    constexpr double each_gains = 3.0; // a fault on one of them makes only that card fit badly
    constexpr double fits = 16.0; // both cards on each other's healthy ones, eight features
    const Matcher matcher(cards);
    struct Pair
    {
        std::size_t a, b;
        double gain;
    };
    std::optional<Pair> best;
    for (std::size_t a = 0; a < cards.size(); ++a)
        for (std::size_t b = a + 1; b < cards.size(); ++b) {
            const Fit aa = matcher.misfit(a, a), bb = matcher.misfit(b, b), ab = matcher.misfit(a, b), ba = matcher.misfit(b, a);
            if (!aa.known || !bb.known || !ab.known || !ba.known || ab.value + ba.value > fits)
                continue;
            const double gain = aa.value + bb.value - ab.value - ba.value;
            const bool each = aa.value - ab.value > each_gains && bb.value - ba.value > each_gains;
            if (each && gain > clearly && (!best || gain > best->gain))
                best = Pair{a, b, gain};
        }
    if (best)
        remarks.push_back(make_remark("cards_exchanged", {cylinder_words(engine, cards[best->a].cylinder),
                                                          engine.cylinder_name(cards[best->b].cylinder)}));
}

} // namespace

std::vector<Remark> remarks_on_foreign_cards(const Judgement& judgement, std::size_t reading,
                                             const std::vector<CardInReview>& cards, const std::vector<PlacedCard>& recorded)
{
    const Engine& engine = judgement.record->engine;
    std::vector<Remark> remarks;
    for (std::size_t i = 0; i < recorded.size(); ++i)
        for (std::size_t j = i + 1; j < recorded.size(); ++j) {
            PlacedCard mine = recorded[i], other = recorded[j];
            if (mine.place.reading != reading)
                std::swap(mine, other);
            if (mine.place.reading != reading || !same_samples(*mine.trace, *other.trace))
                continue;
            const std::string where = other.place.reading == reading
                                          ? "this reading"
                                          : short_date(judgement.record->readings[other.place.reading].taken_at.utc);
            remarks.push_back(make_remark("same_card_twice", {cylinder_words(engine, mine.place.cylinder),
                                                              cylinder_words(engine, other.place.cylinder), where}));
        }
    if (remarks.empty())
        find_exchanged(engine, cards, remarks);
    return remarks;
}

} // namespace evenstroke::indicator
