// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "storage/audit_writer.h"
#include "storage/card_store.h"

namespace evenstroke::storage {

std::string packed_card_hash(const std::string& id, int cylinder, const QByteArray& packed);

/// Reads a card's file for somebody who names the file and line himself.
/// @param line  where it cannot be read; 0: the file as a whole
Result<CardTrace> read_card_file(const QString& path, qint64& line);

/// What became of a card that was to be added.
struct AddedCard
{
    std::string id;
    enum class Outcome {
        added,
        same,      ///< the reading has it already
        differs,   ///< the reading has another one of the cylinder
        withdrawn, ///< the same card was withdrawn from this reading and cylinder before
    } outcome = Outcome::added;
};
/// Whether packed samples are those of a trace; another version of the packing may make other bytes of them.
bool holds(const QByteArray& packed, const CardTrace& trace);
/// The id of a withdrawn card of this reading and cylinder with the same samples; empty where there is none.
Result<std::string> find_withdrawn(History& history, qint64 reading_key, int cylinder, const CardTrace& trace);
/// Removes the cards of a draft that is thrown away, and says so in the trail.
Done throw_cards_away(History& history, qint64 reading_key, AuditWriter& audit);
/// Adds a card to a reading that is there, within the caller's transaction.
Result<AddedCard> add_card(History& history, qint64 reading_key, int cylinder, const CardTrace& trace,
                           AuditWriter& audit);

} // namespace evenstroke::storage
