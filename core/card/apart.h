// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/card/card_review.h"
#include "core/card/healthy_cards.h"

#include <cmath>

namespace evenstroke::indicator {

/// A card of the reading with all that its remarks are weighed from.
struct CardInReview
{
    int cylinder = 0;
    const Evaluation* now = nullptr;           ///< null: not evaluated
    const Comparison* comparison = nullptr;    ///< null: nothing to compare with
    std::vector<const Evaluation*> healthy;    ///< in the order of `Comparison::from`
    std::optional<KnownOffset> known;          ///< dead centre of the installation for this cylinder
};

/// How far something moved against the healthy card, and one standard deviation of that.
struct Shift
{
    double value = 0.0, spread = 0.0;
    bool beyond(double deviations, double least) const
    {
        return std::abs(value) > least && std::abs(value) > deviations * spread;
    }
};

/// What moved on one cylinder and not on the others: load, charge pressure and transducer move all alike.
class Apart
{
public:
    explicit Apart(const std::vector<CardInReview>& cards) : cards_(cards) {}

    /// Against the median of the others where at least two others are compared, else against the healthy card alone.
    std::optional<Shift> of(std::size_t card, CardResult result) const;
    std::optional<Shift> wall(std::size_t card) const;
    std::optional<Shift> exponent(std::size_t card) const; ///< of the compression
    /// Dead centre as this card has it against the installation's, others likewise.
    std::optional<Shift> offset(std::size_t card) const;
    /// Mean difference over a part of the cycle; its own spread only.
    std::optional<Shift> part(std::size_t card, CyclePart part) const;

    /// The median move of all cards, its spread from how they scatter; nothing from fewer than three.
    std::optional<Shift> all(CardResult result) const;
    std::optional<Shift> all_offsets() const;

private:
    template <typename Own> std::optional<Shift> against_others(std::size_t card, Own own) const;
    template <typename Own> std::optional<Shift> of_all(Own own) const;

    const std::vector<CardInReview>& cards_;
};

} // namespace evenstroke::indicator
