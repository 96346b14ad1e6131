// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/card/card_review.h"

#include <string>
#include <vector>

namespace evenstroke {

namespace storage {
class History;
}

/// Which cards are stored with an engine, and which of them somebody called healthy.
struct CardsStored
{
    struct Entry
    {
        std::string id;
        indicator::CardPlace place;
        friend bool operator==(const Entry&, const Entry&) = default;
    };
    /// A card that was taken out of use.
    struct Withdrawn
    {
        Entry card;
        TimePoint at{};
        std::string who, why;
        friend bool operator==(const Withdrawn&, const Withdrawn&) = default;
    };
    std::vector<Entry> cards;                ///< by reading, then cylinder
    std::vector<Withdrawn> withdrawn;        ///< the same, then as they were withdrawn
    std::vector<std::size_t> called_healthy; ///< readings

    /// Readings that have cards, each once, by time.
    std::vector<std::size_t> readings() const;
    const Entry* find(const indicator::CardPlace& place) const;
    /// The card withdrawn last at a place.
    const Withdrawn* find_withdrawn(const indicator::CardPlace& place) const;
    friend bool operator==(const CardsStored&, const CardsStored&) = default;
};
Result<CardsStored> find_cards(storage::History& history, const Judgement& judgement);

/// The shelf of these cards; it loads through the history, which must outlive it.
indicator::CardShelf make_shelf(storage::History& history, const CardsStored& stored);

/// The cards of the newest reading from the day of `from` to that of `to` that has any, reviewed for a report; null where
/// there are none.
std::shared_ptr<const indicator::CardReview> review_newest_cards(storage::History& history, const Judgement& judgement, TimePoint from,
                                                                 TimePoint to);

} // namespace evenstroke
