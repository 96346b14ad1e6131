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
    enum class Outcome { added, same, differs } outcome = Outcome::added;
};
/// Adds a card to a reading that is there, within the caller's transaction.
Result<AddedCard> add_card(History& history, qint64 reading_key, int cylinder, const CardTrace& trace,
                           AuditWriter& audit);

} // namespace evenstroke::storage
