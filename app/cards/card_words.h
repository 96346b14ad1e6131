// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "app/cards/card_run.h"

#include <QString>
#include <QStringList>

/// What the page Cards says in words. Every number comes from the core.
namespace evenstroke {

QString part_name(indicator::CyclePart part);
/// Why there is no healthy card to compare with, and how to get one.
QString no_healthy_words(const CardsInHand& cards);
/// What a card is compared with: "the healthy card of 14 Mar 2031 at 84 % load".
QString healthy_words(const CardsInHand& cards, const indicator::Comparison& comparison);
/// The parts of the cycle that clearly differ, each with its mean difference, and what that speaks for.
QString difference_sentence(const CardsInHand& cards, const indicator::ReviewedCard& card);

QString fit_sentence(const indicator::Evaluation& card);      ///< what the compression says of dead centre and zero
QString spread_sentence(const indicator::Evaluation& card);   ///< from cycle to cycle
QString exponent_sentence(const indicator::Evaluation& card); ///< polytropic exponents, and what the crank gear gets
QString heat_sentence(const indicator::Evaluation& card);
QString temperature_sentence(const indicator::Evaluation& card);

/// One line: whether this card can be trusted.
QString trust_headline(const CardsInHand& cards, const indicator::ReviewedCard& card);
/// Remarks and fit of a card, as a sheet of the screen or of paper. Remarks are links "remark:1".
QString trust_html(const CardsInHand& cards, const indicator::ReviewedCard& card);
QString trust_text(const CardsInHand& cards, const indicator::ReviewedCard& card);

/// One result of the card in words.
struct CardRow
{
    QString title, now, healthy, difference, hand_read;
    bool clear = false; ///< differs beyond the uncertainty
};
std::vector<CardRow> card_rows(const indicator::ReviewedCard& card);

/// Short words under a cylinder's small picture: the largest clear difference, or what stands in the way.
QString cylinder_words(const CardsInHand& cards, int cylinder);
/// Why a cylinder has no card any more: "The card of cylinder 4 was withdrawn on 14 Mar 2031 by A. First: choked cock".
QString withdrawn_words(const Judgement& judgement, const CardsStored::Withdrawn& withdrawn);
/// The cylinder that most asks to be looked at: one that a flag speaks of, else by its card; nothing where none does.
std::optional<int> worst_cylinder(const CardsInHand& cards);

} // namespace evenstroke
