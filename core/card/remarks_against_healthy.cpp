// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/card/remarks_review.h"

#include "core/card/result_catalogue.h"
#include "core/plain_text.h"
#include "core/trend/conditions.h"

#include <algorithm>
#include <cmath>

namespace evenstroke::indicator {
namespace {

// What is said needs both: three standard deviations and more, and a size that real cylinders do not show from month to
// month with nothing wrong (common practice, no source; measured on simulated ships, see card_review_statistics_test.cpp).
constexpr double sure = 3.0, likely = 2.0; // standard deviations

std::string shown(double number, double places = 100.0) { return short_number_text(std::round(number * places) / places); }

/// Evidence on one cylinder.
class Evidence
{
public:
    Evidence(const Engine& engine, const Reading& reading, const std::vector<CardInReview>& cards, std::size_t card)
        : engine_(engine), reading_(reading), cards_(cards), apart_(cards), at_(card)
    {
    }
    std::vector<Remark> remarks();

private:
    void look_at_compression();
    void look_at_passage();
    void look_at_combustion();
    void look_at_fuel();
    void look_at_transducer();
    std::string temperatures() const;
    std::optional<Shift> of(CardResult result) const { return apart_.of(at_, result); }
    double healthy(CardResult result) const
    {
        const auto& value = cards_[at_].comparison->healthy_results[static_cast<std::size_t>(result)];
        return value ? value->value : 0.0;
    }
    bool low(CardResult result, double deviations) const
    {
        const auto shift = of(result);
        return shift && shift->value < -deviations * shift->spread;
    }
    void say(std::string_view code, const std::vector<std::string>& words, std::optional<double> angle = {})
    {
        found_.push_back(make_remark(code, words, angle));
    }

    const Engine& engine_;
    const Reading& reading_;
    const std::vector<CardInReview>& cards_;
    Apart apart_;
    std::size_t at_;
    std::vector<Remark> found_;
    bool lags_ = false, drifts_ = false;
};

/// "scavenge space 62 °C, the others 48 °C; exhaust …": what tells rings from valve; empty where neither was read.
std::string Evidence::temperatures() const
{
    const evenstroke::Conditions conditions = find_conditions(engine_, reading_);
    std::string text;
    const auto add = [&](const char* name, const char* title) {
        const auto id = find_quantity(name, Place::Kind::cylinder);
        std::optional<double> mine;
        std::vector<double> others;
        for (int c = 1; id && c <= engine_.cylinders; ++c)
            if (const Value* value = reading_.find(*id, Place::cylinder(c)))
                if (const auto own = own_value(*value, conditions); own && !own->outside_hard) {
                    if (c == cards_[at_].cylinder)
                        mine = own->value;
                    else
                        others.push_back(own->value);
                }
        if (!mine || others.empty())
            return;
        const auto middle = others.begin() + static_cast<std::ptrdiff_t>(others.size() / 2);
        std::nth_element(others.begin(), middle, others.end());
        text += (text.empty() ? "" : ", ") + std::string(title) + " " + shown(*mine, 1.0) + " °C with " + shown(*middle, 1.0) +
                " °C on the others";
    };
    add("scavenge_box_temperature", "scavenge space");
    add("exhaust_temperature", "exhaust");
    return text.empty() ? std::string() : " Read with it: " + text + ".";
}

void Evidence::look_at_compression()
{
    constexpr double worth_share = 0.006, plain_share = 0.02, risen = 0.3, unchanged = 0.45;
    const auto compression = of(CardResult::compression_pressure);
    const auto wall = apart_.wall(at_);
    const double usual = healthy(CardResult::compression_pressure);
    if (!compression || !wall || !(usual > 0.0))
        return;
    const bool leaks = wall->value > risen && wall->value > sure * wall->spread;
    if (leaks && compression->value < -likely * compression->spread && compression->value < -worth_share * usual) {
        say("charge_leak", {shown(-compression->value, 10.0), shown(wall->value, 10.0), temperatures()});
        return;
    }
    if (!compression->beyond(sure, plain_share * usual))
        return;
    // A wall loss that is not known to have stayed leaves the leak open.
    const bool stayed = std::abs(wall->value) + wall->spread < unchanged;
    if (compression->value > 0.0 && stayed)
        say("more_charge", {shown(compression->value, 10.0)});
    else if (compression->value < 0.0 && stayed)
        say("less_charge", {shown(-compression->value, 10.0)});
    else if (compression->value < 0.0 && wall->value > -likely * wall->spread)
        say("compression_low", {shown(-compression->value, 10.0), temperatures()});
}

void Evidence::look_at_passage()
{
    const double limit = engine_.two_stroke() ? 0.15 : 0.25; // degrees
    const auto offset = apart_.offset(at_);
    if (!offset || offset->value < limit || offset->value < sure * offset->spread)
        return;
    // A leak draws dead centre early and other faults leave it: as late as this only the passage is.
    constexpr double plainly = 2.0;
    if (offset->value > plainly * limit || low(CardResult::pressure_rise, likely) || low(CardResult::maximum_pressure, likely)) {
        lags_ = true;
        say("trace_lags", {shown(offset->value)});
    }
}

void Evidence::look_at_combustion()
{
    constexpr double least_start = 0.9, least_half = 0.5, least_length = 5.0; // degrees
    const auto start = of(CardResult::start_of_combustion), first = of(CardResult::ca10), half = of(CardResult::ca50),
               last = of(CardResult::ca90);
    if (start && first && half && start->beyond(sure, least_start) && first->beyond(sure, 0.7 * least_start) &&
        start->value * first->value > 0.0 && half->value * first->value > 0.0) {
        say(first->value > 0.0 ? "later_than_healthy" : "earlier_than_healthy",
            {shown(std::abs(start->value), 10.0), shown(std::abs(half->value), 10.0)},
            (*cards_[at_].now)[CardResult::start_of_combustion]->value);
    }
    if (!first || !last || !half)
        return;
    const Shift length{last->value - first->value, std::hypot(last->spread, first->spread)};
    const Shift slower{half->value - first->value, std::hypot(half->spread, first->spread)};
    if (length.value > least_length && length.value > sure * length.spread && slower.value > least_half)
        say("longer_than_healthy", {shown(length.value, 1.0)}, (*cards_[at_].now)[CardResult::ca90]->value);
}

void Evidence::look_at_fuel()
{
    constexpr double worth_share = 0.04;
    const auto work = of(CardResult::mean_indicated_pressure), expansion = of(CardResult::expansion_pressure);
    const double usual = healthy(CardResult::mean_indicated_pressure);
    if (drifts_ || !work || !expansion || !(usual > 0.0) || !work->beyond(sure, worth_share * usual))
        return;
    if (work->value * expansion->value > 0.0 && std::abs(expansion->value) > likely * expansion->spread)
        say(work->value > 0.0 ? "more_fuel" : "less_fuel",
            {shown(100.0 * std::abs(work->value) / usual, 10.0), shown(std::abs(expansion->value), 10.0)});
}

/// The transducer heated by the flame: after the expansion the pressure is low where only the receivers set it, and the
/// maximum is not.
void Evidence::look_at_transducer()
{
    constexpr double worth_bar = 0.12;
    const auto exchange = apart_.part(at_, CyclePart::gas_exchange), late = apart_.part(at_, CyclePart::expansion);
    if (!exchange || !late || !exchange->beyond(sure + 0.5, worth_bar) || exchange->value * late->value < 0.0 ||
        std::abs(late->value) < std::abs(exchange->value))
        return;
    if (const auto maximum = of(CardResult::maximum_pressure); maximum && maximum->beyond(sure, 1.0))
        return;
    drifts_ = true;
    const auto work = of(CardResult::mean_indicated_pressure);
    say("drift_against_healthy", {shown(std::abs(late->value)), shown(std::abs(exchange->value)), exchange->value < 0.0 ? "below" : "above",
                                  exchange->value < 0.0 ? "low" : "high", work ? shown(std::abs(work->value)) : "some"},
        cards_[at_].now->opens);
}

std::vector<Remark> Evidence::remarks()
{
    const CardInReview& card = cards_[at_];
    if (!card.now || !card.comparison)
        return found_;
    if (card.comparison->dead_centre_assumed) {
        say("compared_widely", {});
        return found_;
    }
    look_at_passage();
    if (lags_) // the rest of the card is late and smoothed
        return found_;
    look_at_compression();
    look_at_transducer();
    look_at_combustion();
    look_at_fuel();
    return found_;
}

} // namespace

std::vector<Remark> remarks_against_healthy(const Engine& engine, const Reading& reading, const std::vector<CardInReview>& cards,
                                            std::size_t card)
{
    return Evidence(engine, reading, cards, card).remarks();
}

} // namespace evenstroke::indicator
