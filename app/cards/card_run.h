// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "app/cards/card_shelf.h"
#include "app/cards/cycle_envelope.h"
#include "app/desk/worker_run.h"

#include <QString>

#include <map>

namespace evenstroke {

/// The cards of one reading, evaluated, and ready to be drawn.
struct CardsInHand
{
    std::shared_ptr<const Judgement> judgement;
    indicator::CardReview review;
    std::map<int, std::shared_ptr<const CycleEnvelope>> envelopes; ///< by cylinder

    const indicator::ReviewedCard* find(int cylinder) const;
    const Engine& engine() const { return judgement->record->engine; }
};

/// Evaluates the cards of a reading and the healthy ones on the worker thread.
class CardRun : public WorkerRun
{
    Q_OBJECT

public:
    using WorkerRun::WorkerRun;
    void start(const QString& history_path, const std::shared_ptr<const Judgement>& judgement, std::size_t reading,
               const CardsStored& stored);
    const std::shared_ptr<const CardsInHand>& found() const { return found_; }
    const std::optional<Problem>& problem() const { return problem_; }

signals:
    void finished();

private:
    std::shared_ptr<const CardsInHand> found_;
    std::optional<Problem> problem_;
};

} // namespace evenstroke
