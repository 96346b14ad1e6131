// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/cards/card_shelf.h"

#include "storage/card_store.h"
#include "storage/healthy_cards.h"
#include "storage/history.h"

#include <algorithm>
#include <map>

namespace evenstroke {

std::vector<std::size_t> CardsStored::readings() const
{
    std::vector<std::size_t> all;
    for (const Entry& entry : cards)
        if (all.empty() || all.back() != entry.place.reading)
            all.push_back(entry.place.reading);
    return all;
}

const CardsStored::Entry* CardsStored::find(const indicator::CardPlace& place) const
{
    const auto found = std::find_if(cards.begin(), cards.end(), [&](const Entry& entry) { return entry.place == place; });
    return found == cards.end() ? nullptr : &*found;
}

const CardsStored::Withdrawn* CardsStored::find_withdrawn(const indicator::CardPlace& place) const
{
    const auto found = std::find_if(withdrawn.rbegin(), withdrawn.rend(), [&](const Withdrawn& entry) { return entry.card.place == place; });
    return found == withdrawn.rend() ? nullptr : &*found;
}

Result<CardsStored> find_cards(storage::History& history, const Judgement& judgement)
{
    const auto entries = storage::CardStore(history).list(judgement.record->engine.id);
    if (!entries)
        return entries.error();
    std::map<std::string, std::size_t> places;
    for (std::size_t i = 0; i < judgement.record->readings.size(); ++i)
        places.emplace(judgement.record->readings[i].id, i);
    CardsStored stored;
    for (const storage::CardEntry& entry : entries.value())
        if (const auto reading = places.find(entry.reading_id); reading != places.end())
            stored.cards.push_back({entry.id, {reading->second, entry.cylinder}});
    std::stable_sort(stored.cards.begin(), stored.cards.end(),
                     [](const CardsStored::Entry& a, const CardsStored::Entry& b) { return a.place < b.place; });
    const auto withdrawn = storage::CardStore(history).withdrawn(judgement.record->engine.id);
    if (!withdrawn)
        return withdrawn.error();
    for (const storage::WithdrawnCard& entry : withdrawn.value())
        if (const auto reading = places.find(entry.card.reading_id); reading != places.end())
            stored.withdrawn.push_back({{entry.card.id, {reading->second, entry.card.cylinder}}, entry.at, entry.who, entry.why});
    const auto healthy = storage::HealthyCardStore(history).list(judgement.record->engine.id);
    if (!healthy)
        return healthy.error();
    for (const storage::HealthyCards& said : healthy.value())
        if (const auto reading = places.find(said.reading_id); reading != places.end())
            stored.called_healthy.push_back(reading->second);
    return stored;
}

indicator::CardShelf make_shelf(storage::History& history, const CardsStored& stored)
{
    indicator::CardShelf shelf;
    shelf.called_healthy = stored.called_healthy;
    std::map<indicator::CardPlace, std::string> ids;
    for (const CardsStored::Entry& entry : stored.cards) {
        shelf.places.push_back(entry.place);
        ids.emplace(entry.place, entry.id);
    }
    shelf.load = [&history, ids = std::move(ids)](const indicator::CardPlace& place) -> Result<indicator::RecordedCard> {
        auto trace = storage::CardStore(history).load(ids.at(place));
        if (!trace)
            return trace.error();
        storage::CardTrace& kept = trace.value();
        return indicator::RecordedCard{{std::move(kept.cycle), std::move(kept.crank_angle_deg), std::move(kept.pressure_bar)}, kept.gauge};
    };
    return shelf;
}

std::shared_ptr<const indicator::CardReview> review_newest_cards(storage::History& history, const Judgement& judgement, TimePoint from,
                                                                 TimePoint to)
{
    const auto stored = find_cards(history, judgement);
    if (!stored)
        return nullptr;
    std::map<std::size_t, std::size_t> counts; // cards by reading
    std::size_t most = 0;
    for (const CardsStored::Entry& card : stored.value().cards) {
        const TimePoint taken = judgement.record->readings[card.place.reading].taken_at.utc;
        if (taken >= std::chrono::floor<std::chrono::days>(from) && taken < std::chrono::floor<std::chrono::days>(to) + std::chrono::days(1))
            most = std::max(most, ++counts[card.place.reading]);
    }
    // A single card taken later does not stand for the engine.
    const auto newest = std::find_if(counts.rbegin(), counts.rend(), [&](const auto& reading) { return 2 * reading.second >= most; });
    if (newest == counts.rend())
        return nullptr;
    return std::make_shared<const indicator::CardReview>(review_cards(judgement, newest->first, make_shelf(history, stored.value())));
}

} // namespace evenstroke
