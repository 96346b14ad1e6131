// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/card/card_review.h"

#include "core/card/card_values.h"
#include "core/card/hand_readings.h"
#include "core/card/reading_conditions.h"
#include "core/card/remarks_review.h"
#include "core/trend/conditions.h"

#include <algorithm>
#include <cmath>
#include <map>
#include <set>

namespace evenstroke::indicator {
namespace {

using Answer = Result<std::shared_ptr<const Evaluation>>;

/// One review from the first card to the last.
class Reviewer
{
public:
    Reviewer(const Judgement& judgement, std::size_t reading, const CardShelf& shelf, const CardProgress& progress)
        : judgement_(judgement), engine_(judgement.record->engine), reading_(reading), shelf_(shelf), progress_(progress)
    {
    }
    CardReview run();

private:
    bool choose();
    bool fetch();
    bool evaluate_alone();
    bool evaluate_with_offset();
    void follow_pickup();
    void compare_all();
    void remark();
    std::vector<CardInReview> in_review() const;
    std::optional<KnownOffset> known_offset(const CardPlace& place) const;
    bool tell() { return !progress_ || progress_(done_, of_); }
    Conditions conditions_of(std::size_t reading) const;
    Answer evaluated(const CardPlace& place, const std::optional<KnownOffset>& offset) const;
    std::vector<HealthyCard> healthy_of(int cylinder) const;

    const Judgement& judgement_;
    const Engine& engine_;
    std::size_t reading_;
    const CardShelf& shelf_;
    const CardProgress& progress_;
    CardReview review_;
    std::vector<int> cylinders_;
    std::map<int, HealthyChoice> choices_;
    std::set<CardPlace> compared_, wanted_; // healthy and in hand; these and the further healthy ones
    std::map<CardPlace, Result<RecordedCard>> recorded_;
    std::map<CardPlace, Answer> evaluations_;
    InstallationOffset offset_;
    std::optional<double> pickup_moved_; // degrees since the healthy cards
    int done_ = 0, of_ = 0;
};

bool Reviewer::choose()
{
    for (const CardPlace& place : shelf_.places)
        if (place.reading == reading_)
            cylinders_.push_back(place.cylinder);
    std::sort(cylinders_.begin(), cylinders_.end());
    cylinders_.erase(std::unique(cylinders_.begin(), cylinders_.end()), cylinders_.end());
    for (const int cylinder : cylinders_) {
        HealthyChoice choice = choose_healthy(judgement_, reading_, cylinder, shelf_);
        compared_.insert({reading_, cylinder});
        for (const std::size_t healthy : choice.readings)
            compared_.insert({healthy, cylinder});
        for (const std::size_t other : choice.others)
            wanted_.insert({other, cylinder});
        if (!choice.readings.empty() && choice.provisional)
            review_.provisional = true;
        if (choice.readings.empty() && review_.no_healthy.empty())
            review_.no_healthy = choice.none;
        choices_.emplace(cylinder, std::move(choice));
    }
    wanted_.insert(compared_.begin(), compared_.end());
    if (std::any_of(choices_.begin(), choices_.end(), [](const auto& c) { return !c.second.readings.empty(); }))
        review_.no_healthy.clear();
    of_ = static_cast<int>(wanted_.size() + compared_.size());
    return !cylinders_.empty();
}

bool Reviewer::fetch()
{
    for (const CardPlace& place : wanted_) {
        if (!tell())
            return false;
        auto card = shelf_.load(place);
        if (card && card.value().gauge) {
            const auto read = find_conditions(engine_, judgement_.record->readings[place.reading]);
            for (double& pressure : card.value().trace.pressure)
                pressure += read.barometer.value_or(usual_barometer);
        }
        recorded_.emplace(place, std::move(card));
    }
    return true;
}

Conditions Reviewer::conditions_of(std::size_t reading) const
{
    Conditions conditions = conditions_at(engine_, judgement_.record->readings[reading]);
    conditions.barometer_assumed = false; // of the card, below
    return conditions;
}

Answer Reviewer::evaluated(const CardPlace& place, const std::optional<KnownOffset>& offset) const
{
    const Result<RecordedCard>& card = recorded_.at(place);
    if (!card)
        return card.error();
    Conditions conditions = conditions_of(place.reading);
    conditions.barometer_assumed =
        card.value().gauge && !find_conditions(engine_, judgement_.record->readings[place.reading]).barometer;
    if (offset) {
        conditions.known_offset = crank_degrees(offset->value);
        conditions.known_offset_spread = crank_degrees(offset->spread);
    }
    auto found = evaluate(engine_, conditions, card.value().trace);
    if (!found)
        return found.error();
    return std::make_shared<const Evaluation>(std::move(found.value()));
}

bool Reviewer::evaluate_alone()
{
    for (const CardPlace& place : wanted_) {
        const Answer& answer = evaluations_.emplace(place, evaluated(place, std::nullopt)).first->second;
        if (answer && place.reading != reading_)
            offset_.add(place.cylinder, *answer.value());
        ++done_;
        if (!tell())
            return false;
    }
    review_.installation_offset = offset_.of_engine();
    return true;
}

std::optional<KnownOffset> Reviewer::known_offset(const CardPlace& place) const
{
    auto known = offset_.of_cylinder(place.cylinder);
    if (known && pickup_moved_ && place.reading == reading_) {
        constexpr double moved_spread = 0.04; // degrees: how well a few cards tell by how much (common practice, no source)
        known->value += *pickup_moved_;
        known->spread = std::hypot(known->spread, moved_spread);
    }
    return known;
}

/// A pickup that moved since the healthy cards has moved for all cylinders alike.
void Reviewer::follow_pickup()
{
    pickup_moved_ = moved_pickup(engine_, in_review());
}

bool Reviewer::evaluate_with_offset()
{
    follow_pickup();
    for (const CardPlace& place : compared_) {
        if (const auto known = known_offset(place); known && evaluations_.at(place))
            evaluations_.at(place) = evaluated(place, known);
        ++done_;
        if (!tell())
            return false;
    }
    return true;
}

std::vector<HealthyCard> Reviewer::healthy_of(int cylinder) const
{
    std::vector<HealthyCard> healthy;
    for (const std::size_t reading : choices_.at(cylinder).readings) {
        const Answer& answer = evaluations_.at({reading, cylinder});
        if (!answer)
            continue;
        HealthyCard card;
        card.reading = reading;
        card.load_percent = *judgement_.readings[reading].load_percent;
        if (const auto scavenge = conditions_of(reading).scavenge_pressure)
            card.scavenge_pressure = in_bar(*scavenge);
        card.card = answer.value();
        healthy.push_back(std::move(card));
    }
    return healthy;
}

void Reviewer::compare_all()
{
    const auto scavenge = conditions_of(reading_).scavenge_pressure;
    const Reading& reading = judgement_.record->readings[reading_];
    for (const int cylinder : cylinders_) {
        ReviewedCard reviewed;
        reviewed.cylinder = cylinder;
        const Answer& answer = evaluations_.at({reading_, cylinder});
        if (!answer) {
            reviewed.problem = answer.error();
        } else {
            reviewed.card = answer.value();
            reviewed.remarks = reviewed.card->remarks;
            reviewed.values = card_values(engine_, reading, cylinder, *reviewed.card);
            if (review_.load_percent)
                reviewed.comparison = compare(*reviewed.card, *review_.load_percent,
                                              scavenge ? std::optional(in_bar(*scavenge)) : std::nullopt, healthy_of(cylinder));
        }
        review_.cards.push_back(std::move(reviewed));
    }
}

/// Dead centre is looked at against the healthy cards as they are, whether or not the pickup moved.
std::vector<CardInReview> Reviewer::in_review() const
{
    std::vector<CardInReview> cards;
    for (std::size_t i = 0; i < cylinders_.size(); ++i) {
        CardInReview card;
        card.cylinder = cylinders_[i];
        const Answer& answer = evaluations_.at({reading_, card.cylinder});
        card.now = answer ? answer.value().get() : nullptr;
        card.known = offset_.of_cylinder(card.cylinder);
        if (i < review_.cards.size() && review_.cards[i].comparison) {
            card.comparison = &*review_.cards[i].comparison;
            for (const Comparison::From& from : card.comparison->from)
                card.healthy.push_back(evaluations_.at({from.reading, card.cylinder}).value().get());
        }
        cards.push_back(std::move(card));
    }
    return cards;
}

void Reviewer::remark()
{
    const std::vector<CardInReview> cards = in_review();
    const Reading& reading = judgement_.record->readings[reading_];
    for (std::size_t i = 0; i < cards.size(); ++i)
        for (Remark& said : remarks_against_healthy(engine_, reading, cards, i))
            review_.cards[i].remarks.push_back(std::move(said));
    review_.remarks = remarks_of_all(engine_, cards);
    if (auto said = remark_on_hand_readings(review_.cards))
        review_.remarks.push_back(*std::move(said));
    std::vector<PlacedCard> recorded;
    for (const auto& [place, card] : recorded_)
        if (card)
            recorded.push_back({place, &card.value().trace});
    for (Remark& said : remarks_on_foreign_cards(judgement_, reading_, cards, recorded))
        review_.remarks.push_back(std::move(said));
}

CardReview Reviewer::run()
{
    review_.reading = reading_;
    review_.load_percent = judgement_.readings[reading_].load_percent;
    if (!choose())
        return review_;
    if (!fetch() || !evaluate_alone() || !evaluate_with_offset())
        return CardReview{reading_, review_.load_percent, {}, {}, {}, false, {}};
    compare_all();
    remark();
    return review_;
}

} // namespace

CardReview review_cards(const Judgement& judgement, std::size_t reading, const CardShelf& shelf, const CardProgress& progress)
{
    if (!judgement.record || reading >= judgement.readings.size() || reading >= judgement.record->readings.size())
        return {};
    return Reviewer(judgement, reading, shelf, progress).run();
}

} // namespace evenstroke::indicator
