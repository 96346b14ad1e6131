// SPDX-License-Identifier: GPL-3.0-or-later
// Evaluated cards in the report. Numbers invented: what stands on the page, not whether it is right.
#include "core/survey/survey_report.h"

#include "tests/core/survey_fixture.h"

#include <gtest/gtest.h>

#include <functional>

namespace evenstroke {
namespace {

using namespace survey_fixture;
using indicator::CardResult;

constexpr auto mean_indicated = static_cast<std::size_t>(CardResult::mean_indicated_pressure);

indicator::ReviewedCard card_of(int cylinder, double difference, bool clear)
{
    auto evaluated = std::make_shared<indicator::Evaluation>();
    evaluated->results[mean_indicated] = indicator::Estimate{16.42, 0.08};
    indicator::Comparison with;
    for (double angle = -180.0; angle < 180.0; angle += 0.5) {
        with.angle.push_back(angle);
        with.now.push_back(50.0 + difference);
        with.healthy.push_back(50.0);
        with.difference.push_back(difference);
        with.half_width.push_back(0.4);
    }
    with.differences[mean_indicated] = indicator::Estimate{difference, 0.1};
    with.parts.push_back({indicator::CyclePart::combustion, 0.0, 40.0, difference, 0.3, difference, 12.0, clear});
    with.from.push_back({0, 84.0, 1.0});
    indicator::ReviewedCard card;
    card.cylinder = cylinder;
    card.card = evaluated;
    card.comparison = with;
    return card;
}

/// Two cards of the newest reading: one as healthy, one apart with a remark.
std::string text_with(const std::function<void(indicator::CardReview&)>& change = {})
{
    const Judgement judgement = make_judgement();
    auto review = std::make_shared<indicator::CardReview>();
    review->reading = judgement.record->readings.size() - 1;
    review->load_percent = 84.0;
    review->cards = {card_of(1, 0.02, false), card_of(2, -0.55, true)};
    review->cards.back().remarks.push_back({"charge_leak", "Charge leaks, so this test says.", -20.0});
    if (change)
        change(*review);
    ReportDetails details = make_details();
    details.cards = review;
    return report_as_text(make_survey_report(judgement, year_to_march(), details));
}

bool contains(const std::string& text, const std::string& part) { return text.find(part) != std::string::npos; }

TEST(SurveyCards, ResultsStandWithTheirHalfWidthsAndTheirDistanceFromTheHealthyCard)
{
    const std::string text = text_with();
    EXPECT_TRUE(contains(text, "16.42 ± 0.08; +0.02")) << "within the uncertainty: no star";
    EXPECT_TRUE(contains(text, "16.42 ± 0.08; −0.55 *"));
    EXPECT_TRUE(contains(text, "difference from the healthy card of"));
    EXPECT_TRUE(contains(text, "without the gain of the transducer"));
    EXPECT_TRUE(contains(text, "not known")) << "what was not found is not invented";
}

TEST(SurveyCards, OnlyCylindersThatDifferAreDrawn)
{
    const std::string text = text_with();
    EXPECT_TRUE(contains(text, "Cylinder 2 (bar from the healthy card)"));
    EXPECT_FALSE(contains(text, "Cylinder 1 (bar from the healthy card)"));
    EXPECT_TRUE(contains(text, "No part of the cycle differs clearly from the healthy card (three standard deviations): cylinder 1."));
    EXPECT_TRUE(contains(text, "Charge leaks, so this test says."));
}

TEST(SurveyCards, WhatStandsInTheWayOfAComparisonIsSaid)
{
    const std::string none = text_with([](indicator::CardReview& review) {
        for (indicator::ReviewedCard& card : review.cards)
            card.comparison.reset();
        review.no_healthy = "No card at this load was called healthy.";
    });
    EXPECT_TRUE(contains(none, "No card at this load was called healthy."));
    const std::string provisional = text_with([](indicator::CardReview& review) { review.provisional = true; });
    EXPECT_TRUE(contains(provisional, "nobody has called it healthy"));
    const std::string refused = text_with([](indicator::CardReview& review) {
        review.cards.front().card = nullptr;
        review.cards.front().comparison.reset();
        review.cards.front().problem = Problem{Problem::Kind::invalid_input, "All pressures are the same.", "Take the card again."};
    });
    EXPECT_TRUE(contains(refused, "All pressures are the same."));
    EXPECT_TRUE(contains(refused, "not evaluated"));
}

} // namespace
} // namespace evenstroke
