// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/cards/card_words.h"

#include "app/desk/number_text.h"
#include "app/desk/reading_in_hand.h"

#include <QCoreApplication>

#include <algorithm>
#include <cmath>

namespace evenstroke {

namespace {

using indicator::CalibrationMethod;
using indicator::CardResult;
using indicator::CyclePart;
using indicator::Evaluation;
using indicator::ReviewedCard;

QString tr_(const char* text) { return QCoreApplication::translate("evenstroke", text); }

QString degrees(double value, int decimals = 1) { return number_text(value, decimals) + u'°'; }

QString estimate_text(const std::optional<indicator::Estimate>& estimate, int decimals)
{
    return estimate ? with_uncertainty(estimate->value, estimate->half_width, decimals) : tr_("not known");
}

int decimals_of(CardResult result)
{
    switch (result) {
    case CardResult::trapped_mass: return 3;
    case CardResult::mean_indicated_pressure:
    case CardResult::pressure_rise:
    case CardResult::offset:
    case CardResult::zero: return 2;
    case CardResult::dead_centre_temperature:
    case CardResult::maximum_temperature: return 0;
    default: return 1;
    }
}

/// The catalogue's titles, shorter where a column would cut them.
QString short_title(CardResult result)
{
    switch (result) {
    case CardResult::maximum_pressure_angle: return tr_("Angle of maximum");
    case CardResult::pressure_rise: return tr_("Steepest rise");
    case CardResult::ca10: return tr_("10 % of the heat at");
    case CardResult::ca50: return tr_("50 % of the heat at");
    case CardResult::ca90: return tr_("90 % of the heat at");
    case CardResult::mean_indicated_pressure: return tr_("Mean indicated");
    case CardResult::maximum_pressure: return tr_("Maximum");
    case CardResult::compression_pressure: return tr_("Compression");
    case CardResult::expansion_pressure: return tr_("Expansion");
    case CardResult::offset: return tr_("Dead centre late by");
    case CardResult::zero: return tr_("Zero high by");
    case CardResult::dead_centre_temperature: return tr_("Gas at dead centre");
    case CardResult::maximum_temperature: return tr_("Gas at its hottest");
    default: return to_qstring(describe(result).title);
    }
}

/// What a clear difference in a part of the cycle speaks for; what tells it apart stands in the remarks.
QString part_meaning(CyclePart part, bool above)
{
    switch (part) {
    case CyclePart::compression: return above ? tr_("more charge, or a smaller clearance") : tr_("less charge, or a leak of charge");
    case CyclePart::combustion: return above ? tr_("earlier, faster or more combustion") : tr_("later, slower or less combustion");
    case CyclePart::expansion: return above ? tr_("later or longer burning, or more fuel") : tr_("less fuel, a leak, or the transducer's drift");
    case CyclePart::gas_exchange: break;
    }
    return tr_("charge pressure, exhaust side, or the transducer's drift");
}

/// The mean over the part where that is clear, else the largest.
bool by_mean(const indicator::PartDifference& part) { return std::abs(part.mean) > part.mean_half_width; }
double shown_difference(const indicator::PartDifference& part) { return by_mean(part) ? part.mean : part.largest; }

QString part_words(const indicator::PartDifference& part)
{
    return by_mean(part) ? tr_("on average %1 ± %2 bar").arg(signed_text(part.mean, 1), number_text(part.mean_half_width, 1))
                         : tr_("%1 bar near %2°").arg(signed_text(part.largest, 1), number_text(part.largest_at, 0));
}

} // namespace

QString part_name(CyclePart part)
{
    switch (part) {
    case CyclePart::compression: return tr_("compression");
    case CyclePart::combustion: return tr_("combustion");
    case CyclePart::expansion: return tr_("expansion");
    case CyclePart::gas_exchange: break;
    }
    return tr_("gas exchange");
}

QString no_healthy_words(const CardsInHand& cards)
{
    const QString why = to_qstring(cards.review.no_healthy);
    return (why.isEmpty() ? tr_("There is no healthy card at this load.") : why) + u' '
           + tr_("Cards taken while the engine was known to be sound are called healthy with key J on their reading; from then on every "
                 "card is compared with them.");
}

QString healthy_words(const CardsInHand& cards, const indicator::Comparison& comparison)
{
    QStringList from;
    for (const indicator::Comparison::From& one : comparison.from)
        from.append(tr_("%1 at %2 % load").arg(reading_title(*cards.judgement, one.reading), number_text(one.load_percent, 0)));
    const QString all = from.join(tr_(" and "));
    return cards.review.provisional ? tr_("the earliest card, %1, which nobody has called healthy yet").arg(all)
                                    : tr_("the healthy card of %1").arg(all);
}

QString difference_sentence(const CardsInHand& cards, const ReviewedCard& card)
{
    if (!card.comparison)
        return no_healthy_words(cards);
    QStringList apart;
    for (const indicator::PartDifference& part : card.comparison->parts)
        if (part.clear)
            apart.append(tr_("%1 %2 (%3)").arg(part_name(part.part), part_words(part), part_meaning(part.part, shown_difference(part) > 0.0)));
    const QString with = healthy_words(cards, *card.comparison);
    QString words = apart.isEmpty() ? tr_("No part of the cycle differs clearly (three standard deviations) from %1; results in bold are beyond their ± (95 of 100).").arg(with)
                                    : tr_("Different from %1: %2.").arg(with, apart.join(QStringLiteral("; ")));
    if (card.comparison->dead_centre_assumed)
        words += u' ' + tr_("Dead centre of one of the two is not known: the uncertainty is wide.");
    words += u' ' + (card.comparison->charge_pressure_taken ? tr_("The healthy card is brought to this reading's charge pressure.")
                                                            : tr_("The charge pressure was not read: part of the difference may come from it."));
    return words;
}

QString fit_sentence(const Evaluation& card)
{
    const QString offset = tr_("dead centre %1°").arg(estimate_text(card[CardResult::offset], 2));
    const QString zero = tr_("zero %1 bar").arg(estimate_text(card[CardResult::zero], 2));
    const QString wall = card.wall_multiplier ? tr_(", wall loss %1 times the usual").arg(number_text(*card.wall_multiplier, 1)) : QString();
    switch (card.method) {
    case CalibrationMethod::energy_balance:
        return tr_("The compression from %1 to %2 fits within %3 times its scatter: %4 late, %5 high%6.")
            .arg(degrees(card.window_from, 0), degrees(card.window_to), number_text(card.misfit, 1), offset, zero, wall);
    case CalibrationMethod::unfired_cycle:
        return tr_("Without combustion the whole cycle tells dead centre: %1 late, %2 high%3.").arg(offset, zero, wall);
    case CalibrationMethod::angle_only:
        return tr_("Only the angle was fitted, the zero held at the charge pressure: %1 late, %2 high.").arg(offset, zero);
    case CalibrationMethod::power_line:
        return tr_("A straight line of logarithms stands in for the energy balance, which lacks an input: %1 late, %2 high.").arg(offset, zero);
    case CalibrationMethod::offset_assumed: break;
    }
    return tr_("The compression does not tell dead centre; %1 is taken with 1° either way, %2.").arg(offset, zero);
}

QString spread_sentence(const Evaluation& card)
{
    if (!card.spread)
        return tr_("One cycle. Several at steady load would tell the scatter from cycle to cycle.");
    return tr_("%1 cycles; from cycle to cycle the mean indicated pressure scatters by %2 bar and the maximum by %3 bar (one standard deviation).")
        .arg(card.cycles).arg(number_text(card.spread->mean_indicated, 2), number_text(card.spread->maximum, 1));
}

QString exponent_sentence(const Evaluation& card)
{
    QStringList exponents;
    if (card.compression_exponent)
        exponents.append(tr_("compression %1 (usual 1.28 to 1.42)").arg(number_text(*card.compression_exponent, 3)));
    if (card.expansion_exponent)
        exponents.append(tr_("expansion %1 (usual 1.15 to 1.40)").arg(number_text(*card.expansion_exponent, 3)));
    QString words = exponents.isEmpty() ? tr_("The exponents are not known.")
                                        : tr_("Polytropic exponents: %1; usual values are common practice.").arg(exponents.join(QStringLiteral(", ")));
    if (card.forces)
        words += u' ' + tr_("The cylinder turns the shaft with %1 kNm on average and %2 at most, and presses sideways with up to %3 kN%4.")
                            .arg(whole_text(card.forces->mean_moment), whole_text(card.forces->largest_moment), whole_text(card.forces->largest_guide),
                                 card.forces->gas_force_only ? tr_(" (gas force only: no moving mass is entered)") : QString());
    return words;
}

QString heat_sentence(const Evaluation& card)
{
    QString words = tr_("%1 kJ released; 10, 50 and 90 % of it at %2, %3 and %4°.")
                        .arg(number_text(1e-3 * card.heat->total, 1), estimate_text(card[CardResult::ca10], 1),
                             estimate_text(card[CardResult::ca50], 1), estimate_text(card[CardResult::ca90], 1));
    if (card.heat_over_fuel)
        words += u' ' + tr_("That is %1 % of the heat of the fuel burnt.").arg(number_text(100.0 * *card.heat_over_fuel, 0));
    return words;
}

QString temperature_sentence(const Evaluation& card)
{
    return tr_("At dead centre %1 K, highest %2 K, mean while closed %3 K.")
        .arg(estimate_text(card[CardResult::dead_centre_temperature], 0), estimate_text(card[CardResult::maximum_temperature], 0),
             number_text(card.heat->mean_kelvin, 0));
}

QString trust_headline(const CardsInHand& cards, const ReviewedCard& card)
{
    const QString name = place_title(cards.engine(), Place::cylinder(card.cylinder));
    if (!card.card)
        return tr_("%1: this card cannot be evaluated.").arg(name);
    if (card.remarks.empty())
        return tr_("%1: nothing speaks against this card.").arg(name);
    return QCoreApplication::translate("evenstroke", "%1: %n remark(s).", nullptr, static_cast<int>(card.remarks.size())).arg(name);
}

QString trust_html(const CardsInHand& cards, const ReviewedCard& card)
{
    QString html;
    for (const indicator::Remark& remark : cards.review.remarks)
        html += QStringLiteral("<p><b>%1</b> %2</p>").arg(tr_("All cylinders:").toHtmlEscaped(), to_qstring(remark.text).toHtmlEscaped());
    if (card.problem)
        return html + QStringLiteral("<p>%1</p>").arg(to_qstring(card.problem->text()).toHtmlEscaped());
    int number = 0;
    for (const indicator::Remark& remark : card.remarks) {
        ++number;
        const QString mark = remark.angle ? QStringLiteral("<a href=\"remark:%1\">%1</a>").arg(number) : QString::number(number);
        html += QStringLiteral("<p><b>%1</b>&nbsp; %2</p>").arg(mark, to_qstring(remark.text).toHtmlEscaped());
    }
    return html + QStringLiteral("<p class=\"muted\">%1 %2</p>").arg(fit_sentence(*card.card).toHtmlEscaped(), spread_sentence(*card.card).toHtmlEscaped());
}

QString trust_text(const CardsInHand& cards, const ReviewedCard& card)
{
    QStringList lines{trust_headline(cards, card)};
    for (const indicator::Remark& remark : cards.review.remarks)
        lines.append(tr_("All cylinders:") + u' ' + to_qstring(remark.text));
    if (card.problem)
        return (lines << to_qstring(card.problem->text())).join(u'\n');
    int number = 0;
    for (const indicator::Remark& remark : card.remarks)
        lines.append(QStringLiteral("%1. %2").arg(++number).arg(to_qstring(remark.text)));
    return (lines << fit_sentence(*card.card) << spread_sentence(*card.card)).join(u'\n');
}

std::vector<CardRow> card_rows(const ReviewedCard& card)
{
    std::vector<CardRow> rows;
    if (!card.card)
        return rows;
    const auto hand_read = [&](CardResult result) -> QString {
        for (const indicator::CardValue& value : card.values)
            if (value.result == result && value.hand_read)
                return number_text(*value.hand_read + value.taken_off, evenstroke::decimals_of(value.quantity));
        return {};
    };
    for (std::size_t i = 0; i < indicator::result_count; ++i) {
        const auto result = static_cast<CardResult>(i);
        const int decimals = decimals_of(result);
        CardRow row;
        row.title = tr_("%1, %2").arg(short_title(result), to_qstring(describe(result).unit).replace(QStringLiteral("deg"), QStringLiteral("°")));
        row.now = estimate_text(card.card->results[i], decimals);
        row.hand_read = hand_read(result);
        if (card.comparison) {
            const auto& difference = card.comparison->differences[i];
            if (card.comparison->healthy_results[i])
                row.healthy = number_text(card.comparison->healthy_results[i]->value, decimals);
            if (difference) {
                row.difference = signed_text(difference->value, decimals);
                if (difference->half_width)
                    row.difference += QStringLiteral(" ± ") + number_text(*difference->half_width, decimals);
                row.clear = difference->is_clear();
            }
        }
        rows.push_back(row);
    }
    return rows;
}

QString cylinder_words(const CardsInHand& cards, int cylinder)
{
    const ReviewedCard* card = cards.find(cylinder);
    if (!card)
        return tr_("no card");
    if (!card->card)
        return tr_("not evaluated");
    if (!card->comparison)
        return tr_("not compared");
    const indicator::PartDifference* most = nullptr;
    for (const indicator::PartDifference& part : card->comparison->parts)
        if (part.clear && part.part != CyclePart::gas_exchange && (!most || std::abs(shown_difference(part)) > std::abs(shown_difference(*most))))
            most = &part;
    return most ? tr_("%1 %2").arg(part_name(most->part), signed_text(shown_difference(*most), 1)) : tr_("as healthy");
}

QString withdrawn_words(const Judgement& judgement, const CardsStored::Withdrawn& withdrawn)
{
    return tr_("The card of %1 was withdrawn on %2 by %3: %4")
        .arg(place_title(judgement.record->engine, Place::cylinder(withdrawn.card.place.cylinder), false), day_text(withdrawn.at),
             to_qstring(withdrawn.who), to_qstring(withdrawn.why));
}

std::optional<int> worst_cylinder(const CardsInHand& cards)
{
    for (const Flag* flag : cards.judgement->standing_flags()) // what a flag speaks of is looked at first
        if (flag->subject.kind == Place::Kind::cylinder && cards.find(flag->subject.number))
            return flag->subject.number;
    std::optional<int> worst;
    double most = 0.0;
    for (const ReviewedCard& card : cards.review.cards) {
        double trouble = 0.5 * static_cast<double>(card.remarks.size());
        if (card.comparison)
            for (const indicator::PartDifference& part : card.comparison->parts)
                if (part.clear && part.mean_half_width > 0.0 && part.part != CyclePart::gas_exchange)
                    trouble = std::max(trouble, std::abs(part.mean) / part.mean_half_width);
        if (trouble > most) {
            most = trouble;
            worst = card.cylinder;
        }
    }
    return worst;
}

} // namespace evenstroke
