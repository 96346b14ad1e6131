// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/cards/card_run.h"

#include "storage/history.h"

#include <algorithm>

namespace evenstroke {

namespace {

using Found = std::shared_ptr<const CardsInHand>;

Result<Found> review(const QString& path, const std::shared_ptr<const Judgement>& judgement, std::size_t reading,
                     const CardsStored& stored, const indicator::CardProgress& tell)
{
    storage::HistorySettings settings;
    settings.automatic_backups = false; // the window's own connection has seen to them
    settings.check_whole = false;
    const auto history = storage::History::open(path, storage::OpenMode::read_only, settings);
    if (!history)
        return history.error();
    const indicator::CardShelf shelf = make_shelf(*history.value(), stored);
    auto found = std::make_shared<CardsInHand>();
    found->judgement = judgement;
    found->review = review_cards(*judgement, reading, shelf, tell);
    for (const indicator::ReviewedCard& card : found->review.cards)
        if (card.card)
            found->envelopes.emplace(card.cylinder, std::make_shared<const CycleEnvelope>(card.card));
    return Found(std::move(found));
}

} // namespace

const indicator::ReviewedCard* CardsInHand::find(int cylinder) const
{
    const auto found = std::find_if(review.cards.begin(), review.cards.end(),
                                    [cylinder](const indicator::ReviewedCard& card) { return card.cylinder == cylinder; });
    return found == review.cards.end() ? nullptr : &*found;
}

void CardRun::start(const QString& history_path, const std::shared_ptr<const Judgement>& judgement, std::size_t reading,
                    const CardsStored& stored)
{
    found_.reset();
    problem_.reset();
    begin([this, history_path, judgement, reading, stored](const Told& tell) -> Delivery {
        const auto answer = review(history_path, judgement, reading, stored, tell);
        return [this, answer] {
            found_ = answer.has_value() ? answer.value() : nullptr;
            problem_ = answer.has_value() ? std::nullopt : std::optional<Problem>(answer.error());
            emit finished();
        };
    });
}

} // namespace evenstroke
