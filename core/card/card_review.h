// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/card/comparison.h"
#include "core/trend/judgement.h"

#include <functional>
#include <memory>

/// The cards of one reading beside each other and beside the healthy ones: what can be trusted, what differs, where in
/// the cycle, on which cylinder.
namespace evenstroke::indicator {

/// A cylinder's card as it is stored.
struct RecordedCard
{
    Trace trace;
    bool gauge = false; ///< pressures above the barometer; else absolute
};

/// Where a card stands in the record: index of the reading, number of the cylinder.
struct CardPlace
{
    std::size_t reading = 0;
    int cylinder = 0;
    friend auto operator<=>(const CardPlace&, const CardPlace&) = default;
};

/// What is stored, and how it is fetched. `load` is asked for one card at a time, from the calling thread.
struct CardShelf
{
    std::vector<CardPlace> places;                                   ///< all cards of the engine, by reading
    std::vector<std::size_t> called_healthy;                         ///< readings whose cards somebody called healthy
    std::function<Result<RecordedCard>(const CardPlace&)> load;
};

/// A result of a card as a value of the reading, beside the one read by hand.
struct CardValue
{
    CardResult result{};
    QuantityId quantity = 0;      ///< mean indicated, maximum, compression, expansion pressure, angle of the maximum
    double number = 0.0;          ///< in the unit that the catalogue gives the quantity, of its kind (gauge over the barometer)
    std::optional<double> half_width;
    std::optional<double> hand_read; ///< in the same unit; empty: not read
    double taken_off = 0.0;       ///< what the card's own result is above `number`: the barometer of a gauge pressure, bar
};

struct ReviewedCard
{
    int cylinder = 0;
    std::shared_ptr<const Evaluation> card; ///< null: `problem` says why
    std::optional<Problem> problem;
    std::optional<Comparison> comparison;   ///< with the healthy card; empty: there is none at this load
    std::vector<Remark> remarks;            ///< the card's own, then what only shows against the healthy card or the others
    std::vector<CardValue> values;          ///< what could go into the reading
};

struct CardReview
{
    std::size_t reading = 0;
    std::optional<double> load_percent;
    std::vector<ReviewedCard> cards;              ///< by cylinder
    std::vector<Remark> remarks;                  ///< of all cylinders together: gain, moved pickup, exchanged cards
    std::optional<Estimate> installation_offset;  ///< degrees, median of the healthy cards; empty: no healthy cards
    bool provisional = false; ///< nobody called cards healthy: the earliest at nearly this load stand for them
    std::string no_healthy;   ///< why nothing is compared, in words; empty where something is
};

/// Told how many of how many cards are done; false stops.
using CardProgress = std::function<bool(int done, int of)>;

/// Evaluates all cards of a reading and the healthy ones they are compared with.
/// @return the review; `cards` empty where the reading has none or the work was stopped
CardReview review_cards(const Judgement& judgement, std::size_t reading, const CardShelf& shelf, const CardProgress& progress = {});

} // namespace evenstroke::indicator
