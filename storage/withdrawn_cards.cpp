// SPDX-License-Identifier: GPL-3.0-or-later
// Cards that are taken out of use, and brought back.
#include "storage/card_rows.h"
#include "storage/reading_change.h"

#include "core/plain_text.h"

namespace evenstroke::storage {
namespace {

const std::string not_withdrawn = "the card was not withdrawn";
const std::string not_restored = "the card was not brought back";

struct CardRow
{
    std::string id, reading_id;
    int cylinder = 0;
    QByteArray trace;
};

/// @param table  card or withdrawn_card
Result<CardRow> find_card_row(History& history, const char* table, const std::string& card_id, const std::string& undone)
{
    Query row(history.database(),
              QStringLiteral("SELECT c.id, r.id, c.cylinder, c.trace FROM %1 c JOIN reading r USING (reading_key) WHERE c.id = ?")
                  .arg(QLatin1String(table)),
              undone);
    BOOST_OUTCOME_TRYV(row.run(card_id));
    if (row.next())
        return CardRow{row.text(0), row.text(1), row.small(2), row.bytes(3)};
    BOOST_OUTCOME_TRYV(row.finished());
    return Problem{Problem::Kind::not_found, "The card is not among those of this history, so " + undone + ".",
                   "Look at the cards again; another window may have changed them."};
}

/// Begins the change of the reading that a card is of; answers the card as it stands within the transaction, since another
/// window may have been quicker.
Result<CardRow> begin(History& history, ReadingChange& change, const char* table, const std::string& card_id, const std::string& undone)
{
    const auto card = find_card_row(history, table, card_id, undone);
    if (!card)
        return card.error();
    BOOST_OUTCOME_TRYV(change.begin_unless_withdrawn(card.value().reading_id));
    return find_card_row(history, table, card_id, undone);
}

/// The values that cards of a cylinder gave a reading.
std::vector<ValueRow> values_of_card(ReadingChange& change, const History::Names& names, int cylinder)
{
    std::vector<ValueRow> found;
    for (const ValueRow& row : change.values()) {
        const auto value = row.origin == static_cast<int>(Origin::card) ? value_of(names, row) : std::nullopt;
        if (value && value->place == Place::cylinder(cylinder) && value->missing == MissingReason::none)
            found.push_back(row);
    }
    return found;
}

Done take_out(History& history, ReadingChange& change, const ValueRow& value, const Signature& by)
{
    if (change.is_draft())
        return change.remove_value(value);
    ValueRow none = value;
    none.typed.clear();
    none.words.clear();
    none.value_si.reset();
    none.unit_key = 0;
    none.confirmed = false;
    none.missing = static_cast<int>(MissingReason::not_read);
    none.origin = static_cast<int>(Origin::read);
    BOOST_OUTCOME_TRYV(keep_correction(history, change.reading().key, value, none, by));
    return change.add_value(none);
}

Done finish(History& history, ReadingChange& change, bool values_changed, const char* action, const CardRow& card, const Signature& by)
{
    AuditWriter audit(history, by);
    const std::string detail = "cylinder " + std::to_string(card.cylinder) + " of " + change.reading().name;
    BOOST_OUTCOME_TRYV(audit.add({action, "card", card.id, detail, packed_card_hash(card.id, card.cylinder, card.trace)}));
    if (values_changed)
        return change.finish("corrected as its card is withdrawn", detail, by);
    BOOST_OUTCOME_TRYV(count_change(history, change.owner()));
    return change.finish();
}

} // namespace

Result<std::string> find_withdrawn(History& history, qint64 reading_key, int cylinder, const CardTrace& trace)
{
    Query rows(history.database(), "SELECT id, trace FROM withdrawn_card WHERE reading_key = ? AND cylinder = ?",
               "the withdrawn cards were not read");
    BOOST_OUTCOME_TRYV(rows.run(reading_key, cylinder));
    while (rows.next())
        if (holds(rows.bytes(1), trace))
            return rows.text(0);
    BOOST_OUTCOME_TRYV(rows.finished());
    return std::string();
}

Done throw_cards_away(History& history, qint64 reading_key, AuditWriter& audit)
{
    const std::string undone = "the cards were not thrown away";
    for (const char* const table : {"card", "withdrawn_card"}) {
        const QString name = QLatin1String(table);
        Query ids(history.database(), QStringLiteral("SELECT id, cylinder FROM %1 WHERE reading_key = ?").arg(name), undone);
        BOOST_OUTCOME_TRYV(ids.run(reading_key));
        while (ids.next()) {
            BOOST_OUTCOME_TRYV(audit.add({"thrown away", "card", ids.text(0), "cylinder " + ids.text(1), ""}));
        }
        BOOST_OUTCOME_TRYV(ids.finished());
        Query remove(history.database(), QStringLiteral("DELETE FROM %1 WHERE reading_key = ?").arg(name), undone);
        BOOST_OUTCOME_TRYV(remove.run(reading_key));
    }
    return done();
}

Result<int> CardStore::withdraw(const std::string& card_id, const Signature& by)
{
    BOOST_OUTCOME_TRYV(check_signature(by, true));
    ReadingChange change(history_, not_withdrawn);
    const auto card = begin(history_, change, "card", card_id, not_withdrawn);
    if (!card)
        return card.error();
    const auto values = values_of_card(change, history_.names(), card.value().cylinder);
    for (const ValueRow& value : values) {
        BOOST_OUTCOME_TRYV(take_out(history_, change, value, by));
    }
    Query note(history_.database(),
               "INSERT INTO withdrawn_card (id, reading_key, cylinder, samples, trace, withdrawn_at, who, why) "
               "SELECT id, reading_key, cylinder, samples, trace, ?, ?, ? FROM card WHERE id = ?",
               not_withdrawn);
    BOOST_OUTCOME_TRYV(note.run(seconds_of(history_.now()), by.who, by.why, card_id));
    Query remove(history_.database(), "DELETE FROM card WHERE id = ?", not_withdrawn);
    BOOST_OUTCOME_TRYV(remove.run(card_id));
    BOOST_OUTCOME_TRYV(finish(history_, change, !values.empty() && !change.is_draft(), "withdrawn", card.value(), by));
    return static_cast<int>(values.size());
}

Done CardStore::restore(const std::string& card_id, const Signature& by)
{
    BOOST_OUTCOME_TRYV(check_signature(by, true));
    ReadingChange change(history_, not_restored);
    const auto card = begin(history_, change, "withdrawn_card", card_id, not_restored);
    if (!card)
        return card.error();
    Query there(history_.database(), "SELECT 1 FROM card WHERE reading_key = ? AND cylinder = ?", not_restored);
    BOOST_OUTCOME_TRYV(there.run(change.reading().key, card.value().cylinder));
    if (there.next())
        return invalid_input("The reading " + evenstroke::quoted(change.reading().name) + " has another card of cylinder " +
                                 std::to_string(card.value().cylinder) + " by now.",
                             "Withdraw that one first.");
    BOOST_OUTCOME_TRYV(there.finished());
    Query copy(history_.database(),
               "INSERT INTO card (id, reading_key, cylinder, samples, trace) "
               "SELECT id, reading_key, cylinder, samples, trace FROM withdrawn_card WHERE id = ?",
               not_restored);
    BOOST_OUTCOME_TRYV(copy.run(card_id));
    Query remove(history_.database(), "DELETE FROM withdrawn_card WHERE id = ?", not_restored);
    BOOST_OUTCOME_TRYV(remove.run(card_id));
    return finish(history_, change, false, "brought back", card.value(), by);
}

Result<std::vector<WithdrawnCard>> CardStore::withdrawn(const std::string& engine_id) const
{
    Query rows(history_.database(),
               "SELECT w.id, r.id, w.cylinder, w.samples, w.withdrawn_at, w.who, w.why FROM withdrawn_card w JOIN reading r "
               "USING (reading_key) JOIN engine e USING (engine_key) WHERE e.id = ? "
               "ORDER BY r.taken_at, w.cylinder, w.withdrawn_key",
               "the withdrawn cards were not read");
    BOOST_OUTCOME_TRYV(rows.run(engine_id));
    std::vector<WithdrawnCard> found;
    while (rows.next())
        found.push_back({{rows.text(0), rows.text(1), rows.small(2), rows.small(3)}, time_of(rows.integer(4)), rows.text(5), rows.text(6)});
    BOOST_OUTCOME_TRYV(rows.finished());
    return found;
}

} // namespace evenstroke::storage
