// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/card/apart.h"

/// What only shows beside the healthy card or the other cylinders.
namespace evenstroke::indicator {

/// Of one cylinder: leak, charge, passage, timing, length, fuel, drift of the transducer.
/// @param reading for what was read beside the card
std::vector<Remark> remarks_against_healthy(const Engine& engine, const Reading& reading, const std::vector<CardInReview>& cards,
                                            std::size_t card);

/// Of all together: pickup, gain.
std::vector<Remark> remarks_of_all(const Engine& engine, const std::vector<CardInReview>& cards);
/// The pickup moved since the healthy cards, degrees; nothing where it did not or cannot be told.
std::optional<double> moved_pickup(const Engine& engine, const std::vector<CardInReview>& cards);

/// A recorded card and where it stands.
struct PlacedCard
{
    CardPlace place;
    const Trace* trace = nullptr;
};
/// Cards that hold the same samples, and cylinders whose cards fit each other's healthy cards better than their own.
/// @param recorded all that were loaded, those of the reading among them
std::vector<Remark> remarks_on_foreign_cards(const Judgement& judgement, std::size_t reading,
                                             const std::vector<CardInReview>& cards, const std::vector<PlacedCard>& recorded);

} // namespace evenstroke::indicator
