// SPDX-License-Identifier: GPL-3.0-or-later
// The evaluated indicator cards of the newest reading of the period that has any.
#include "core/survey/rounding.h"
#include "core/survey/survey_context.h"

#include <array>
#include <cmath>

namespace evenstroke::report {
namespace {

using indicator::CardResult;
using indicator::Comparison;
using indicator::ReviewedCard;

struct Shown
{
    CardResult result;
    const char* title;
    int decimals;
};
constexpr std::array shown{
    Shown{CardResult::mean_indicated_pressure, "Mean indicated, bar", 2}, Shown{CardResult::maximum_pressure, "Maximum, bar abs", 1},
    Shown{CardResult::compression_pressure, "Compression, bar abs", 1},   Shown{CardResult::start_of_combustion, "Start of combustion, °", 1},
    Shown{CardResult::ca50, "Half the heat at, °", 1},
};

/// "16.42 ± 0.08, −0.35 *": the value, and how far it is from the healthy card's.
std::string result_words(const ReviewedCard& card, const Shown& column)
{
    const auto index = static_cast<std::size_t>(column.result);
    const auto& now = card.card->results[index];
    if (!now)
        return "not known";
    std::string words = rounded_text(now->value, column.decimals);
    if (now->half_width)
        words += " ± " + rounded_text(*now->half_width, column.decimals);
    if (!card.comparison || !card.comparison->differences[index])
        return words;
    const indicator::Estimate& difference = *card.comparison->differences[index];
    words += "; " + rounded_text(difference.value, column.decimals, Sign::always);
    return difference.is_clear() ? words + " *" : words;
}

std::string healthy_words(const Context& context, const indicator::CardReview& review)
{
    const ReviewedCard* compared = nullptr;
    for (const ReviewedCard& card : review.cards)
        if (card.comparison)
            compared = &card;
    if (!compared)
        return review.no_healthy.empty() ? "No healthy card at this load to compare with." : review.no_healthy;
    std::string from;
    for (const Comparison::From& one : compared->comparison->from)
        from += (from.empty() ? "" : " and ") + date_text(context.record.readings[one.reading].taken_at.utc) + " at "
                + rounded_text(one.load_percent, 0) + " % load";
    return "After the semicolon: difference from the healthy card of " + from
           + (review.provisional ? ", the earliest that is stored; nobody has called it healthy" : "") + "; * beyond its half-width at 95 %: among many results one in twenty is so by chance.";
}

Table results_table(const Context& context, const indicator::CardReview& review)
{
    const Reading& reading = context.record.readings[review.reading];
    Table table{"Cards of " + reading.name + ", " + date_text(reading.taken_at.utc) + ", " + load_words(review.load_percent) + " load",
                {{"Cylinder", Column::Kind::words}}, {}, 1,
                "Half-widths at 95 %, without the gain of the transducer. Dead centre and zero are taken out. " + healthy_words(context, review)};
    for (const Shown& column : shown)
        table.columns.push_back({column.title, Column::Kind::words});
    for (const ReviewedCard& card : review.cards) {
        Row row{{context.engine.cylinder_name(card.cylinder)}, true};
        for (const Shown& column : shown)
            row.cells.push_back(card.card ? result_words(card, column) : "not evaluated");
        table.rows.push_back(std::move(row));
    }
    return table;
}

Table remarks_table(const Context& context, const indicator::CardReview& review)
{
    Table table{"Remarks on these cards", {{"Cylinder", Column::Kind::words}, {"Remark", Column::Kind::remark}}, {}, 1, ""};
    for (const indicator::Remark& remark : review.remarks)
        table.rows.push_back({{"all", remark.text}, true});
    for (const ReviewedCard& card : review.cards) {
        const std::string name = context.engine.cylinder_name(card.cylinder);
        if (card.problem)
            table.rows.push_back({{name, card.problem->text()}, true});
        for (const indicator::Remark& remark : card.remarks)
            table.rows.push_back({{name, remark.text}, &remark == card.remarks.data()});
    }
    return table;
}

bool differs(const ReviewedCard& card)
{
    if (card.comparison)
        for (const indicator::PartDifference& part : card.comparison->parts)
            if (part.clear && part.part != indicator::CyclePart::gas_exchange)
                return true;
    return false;
}

/// The difference over the closed part, with what the uncertainty explains on both sides of zero.
Plot difference_plot(const Context& context, const ReviewedCard& card)
{
    constexpr double from = -120.0, to = 140.0; // degrees
    constexpr std::size_t every = 4;            // half-degree steps: 2° between points on paper
    Plot plot;
    plot.across = Plot::Across::angle;
    plot.title = "Cylinder " + context.engine.cylinder_name(card.cylinder);
    plot.value_title = "bar from the healthy card";
    plot.from = from;
    plot.to = to;
    PlotLine difference, above, below;
    difference.in_question = true;
    above.label = below.label = "half-width at 95 %";
    for (PlotLine* line : {&difference, &above, &below})
        line->without_marks = true;
    const Comparison& with = *card.comparison;
    for (std::size_t i = 0; i < with.angle.size(); i += every)
        if (with.angle[i] >= from && with.angle[i] <= to) {
            difference.points.push_back({with.angle[i], with.difference[i], PlotPoint::Mark::filled});
            above.points.push_back({with.angle[i], with.half_width[i], PlotPoint::Mark::filled});
            below.points.push_back({with.angle[i], -with.half_width[i], PlotPoint::Mark::filled});
        }
    plot.lines = {std::move(above), std::move(below), std::move(difference)};
    return plot;
}

} // namespace

void add_cards(const Context& context, Section& section)
{
    if (!context.details.cards || context.details.cards->cards.empty())
        return;
    const indicator::CardReview& review = *context.details.cards;
    section.blocks.push_back(results_table(context, review));
    Table remarks = remarks_table(context, review);
    if (remarks.rows.empty())
        section.blocks.push_back(Paragraph{"Nothing speaks against these cards.", {}});
    else
        section.blocks.push_back(std::move(remarks));
    std::string as_healthy;
    bool any = false;
    for (const ReviewedCard& card : review.cards) {
        any = any || differs(card);
        if (card.comparison && !differs(card))
            as_healthy += (as_healthy.empty() ? "" : ", ") + context.engine.cylinder_name(card.cylinder);
    }
    if (any)
        section.blocks.push_back(Heading{"Cylinders whose card differs from the healthy one"});
    for (const ReviewedCard& card : review.cards)
        if (differs(card))
            section.blocks.push_back(difference_plot(context, card));
    if (!as_healthy.empty())
        section.blocks.push_back(Paragraph{"No part of the cycle differs clearly from the healthy card (three standard deviations): cylinder " + as_healthy + ".", {}});
}

} // namespace evenstroke::report
