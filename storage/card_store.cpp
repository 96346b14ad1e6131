// SPDX-License-Identifier: GPL-3.0-or-later
#include "storage/card_store.h"

#include "storage/audit_writer.h"
#include "storage/card_packing.h"
#include "storage/card_rows.h"
#include "storage/content_hash.h"
#include "storage/reading_change.h"
#include "storage/transaction.h"

#include "core/plain_text.h"

#include <QUuid>

#include <set>

namespace evenstroke::storage {
namespace {

const std::string not_saved = "the card was not saved";

Problem another_card(const std::string& reading_name, int cylinder)
{
    return invalid_input("The reading " + evenstroke::quoted(reading_name) + " has another card of cylinder " +
                             std::to_string(cylinder) + ".",
                         "Leave this one out, or choose the reading it was taken with.");
}

Problem withdrawn_before(const std::string& reading_name, int cylinder)
{
    return invalid_input("This card of cylinder " + std::to_string(cylinder) + " was withdrawn from the reading " +
                             evenstroke::quoted(reading_name) + ".",
                         "Leave it out, or bring it back on the page Cards.");
}

Problem two_of(int cylinder)
{
    return invalid_input("Two of the cards are of cylinder " + std::to_string(cylinder) + ".",
                         "Say which cylinder each is of.");
}

Result<int> cards_of(History& history, qint64 reading_key)
{
    Query count(history.database(), "SELECT count(*) FROM card WHERE reading_key = ?", "the cards were not counted");
    BOOST_OUTCOME_TRYV(count.run(reading_key));
    if (!count.next())
        return count.problem();
    return count.small(0);
}

} // namespace

bool holds(const QByteArray& packed, const CardTrace& trace)
{
    const auto known = unpack_card(packed);
    return known && known->cycle == trace.cycle && known->gauge == trace.gauge &&
           known->crank_angle_deg == trace.crank_angle_deg && known->pressure_bar == trace.pressure_bar;
}

std::string packed_card_hash(const std::string& id, int cylinder, const QByteArray& packed)
{
    ContentHash content;
    content.add(id)
        .add(qint64{cylinder})
        .add(std::string_view(packed.constData(), static_cast<std::size_t>(packed.size())));
    return content.hex();
}

Result<AddedCard> add_card(History& history, qint64 reading_key, int cylinder, const CardTrace& trace,
                           AuditWriter& audit)
{
    const QByteArray packed = pack_card(trace);
    Query there(history.database(), "SELECT id, trace FROM card WHERE reading_key = ? AND cylinder = ?",
                not_saved);
    BOOST_OUTCOME_TRYV(there.run(reading_key, cylinder));
    if (there.next())
        return AddedCard{there.text(0), holds(there.bytes(1), trace) ? AddedCard::Outcome::same
                                                                     : AddedCard::Outcome::differs};
    BOOST_OUTCOME_TRYV(there.finished());
    const auto withdrawn = find_withdrawn(history, reading_key, cylinder, trace);
    if (!withdrawn)
        return withdrawn.error();
    if (!withdrawn.value().empty())
        return AddedCard{withdrawn.value(), AddedCard::Outcome::withdrawn};
    const std::string id = from_qt(QUuid::createUuid().toString(QUuid::WithoutBraces));
    Query add(history.database(),
              "INSERT INTO card (id, reading_key, cylinder, samples, trace) VALUES (?, ?, ?, ?, ?)",
              not_saved);
    BOOST_OUTCOME_TRYV(
        add.run(id, reading_key, cylinder, static_cast<qint64>(trace.crank_angle_deg.size()), packed));
    BOOST_OUTCOME_TRYV(audit.add({"added", "card", id, "cylinder " + std::to_string(cylinder),
                                  packed_card_hash(id, cylinder, packed)}));
    return AddedCard{id, AddedCard::Outcome::added};
}

Result<std::vector<CardEntry>> CardStore::list(const std::string& engine_id) const
{
    Query rows(history_.database(),
               "SELECT c.id, r.id, c.cylinder, c.samples FROM card c JOIN reading r USING (reading_key) JOIN "
               "engine e USING (engine_key) "
               "WHERE e.id = ? ORDER BY r.taken_at, c.cylinder",
               "the list of cards was not read");
    BOOST_OUTCOME_TRYV(rows.run(engine_id));
    std::vector<CardEntry> found;
    while (rows.next())
        found.push_back({rows.text(0), rows.text(1), rows.small(2), rows.small(3)});
    BOOST_OUTCOME_TRYV(rows.finished());
    return found;
}

Result<CardTrace> CardStore::load(const std::string& card_id) const
{
    Query row(history_.database(), "SELECT trace FROM card WHERE id = ?", "the card was not read");
    BOOST_OUTCOME_TRYV(row.run(card_id));
    if (!row.next()) {
        BOOST_OUTCOME_TRYV(row.finished());
        return Problem{Problem::Kind::not_found, "The card is not in this history.",
                       "Look at the list again; another window may have changed it."};
    }
    auto trace = unpack_card(row.bytes(0));
    if (!trace)
        return Problem{Problem::Kind::damaged_file, "The card's trace cannot be read from the history.",
                       "Take the card's file in again into a sound copy of the history."};
    return std::move(*trace);
}

Result<std::vector<CardEntry>> CardStore::find_same(const std::string& engine_id, const QByteArray& packed) const
{
    Query rows(history_.database(),
               "SELECT c.id, r.id, c.cylinder, c.samples FROM card c JOIN reading r USING (reading_key) JOIN engine e USING "
               "(engine_key) WHERE e.id = ? AND length(c.trace) = ? AND c.trace = ? ORDER BY r.taken_at, c.cylinder",
               "the cards of the engine were not compared");
    BOOST_OUTCOME_TRYV(rows.run(engine_id, static_cast<qint64>(packed.size()), packed));
    std::vector<CardEntry> same;
    while (rows.next())
        same.push_back({rows.text(0), rows.text(1), rows.small(2), rows.small(3)});
    BOOST_OUTCOME_TRYV(rows.finished());
    return same;
}

Result<std::string> CardStore::add(const std::string& reading_id, int cylinder, const CardTrace& trace,
                                   const Signature& by)
{
    Transaction transaction(history_, not_saved);
    BOOST_OUTCOME_TRYV(transaction.begin());
    const auto reading = load_reading_row(history_, reading_id);
    if (!reading)
        return reading.error();
    AuditWriter audit(history_, by);
    const auto added = add_card(history_, reading.value().key, cylinder, trace, audit);
    if (!added)
        return added.error();
    if (added.value().outcome == AddedCard::Outcome::differs)
        return invalid_input("The reading has another card of cylinder " + std::to_string(cylinder) + ".",
                             "Keep the card to the reading it was taken with.");
    if (added.value().outcome == AddedCard::Outcome::withdrawn)
        return withdrawn_before(reading.value().name, cylinder);
    BOOST_OUTCOME_TRYV(transaction.commit());
    return added.value().id;
}

Result<AddedCards> CardStore::foresee(const std::string& reading_id, const std::vector<NewCard>& cards) const
{
    const auto reading = load_reading_row(history_, reading_id);
    if (!reading)
        return reading.error();
    AddedCards all;
    std::set<int> cylinders;
    for (const NewCard& card : cards) {
        if (!cylinders.insert(card.cylinder).second)
            return two_of(card.cylinder);
        Query there(history_.database(), "SELECT trace FROM card WHERE reading_key = ? AND cylinder = ?",
                    "the card was not read");
        BOOST_OUTCOME_TRYV(there.run(reading.value().key, card.cylinder));
        const bool any = there.next();
        if (any && !holds(there.bytes(0), *card.trace))
            return another_card(reading.value().name, card.cylinder);
        if (!any) {
            BOOST_OUTCOME_TRYV(there.finished());
            const auto withdrawn = find_withdrawn(history_, reading.value().key, card.cylinder, *card.trace);
            if (!withdrawn)
                return withdrawn.error();
            if (!withdrawn.value().empty())
                return withdrawn_before(reading.value().name, card.cylinder);
        }
        ++(any ? all.same : all.added);
    }
    const auto before = cards_of(history_, reading.value().key);
    if (!before)
        return before.error();
    all.in_all = before.value() + all.added;
    return all;
}

Result<AddedCards> CardStore::add_all(const std::string& reading_id, const std::vector<NewCard>& cards,
                                      const Signature& by)
{
    BOOST_OUTCOME_TRYV(check_signature(by, false));
    Transaction transaction(history_, "the cards were not saved");
    BOOST_OUTCOME_TRYV(transaction.begin());
    const auto reading = load_reading_row(history_, reading_id);
    if (!reading)
        return reading.error();
    AuditWriter audit(history_, by);
    AddedCards all;
    std::set<int> cylinders;
    for (const NewCard& card : cards) {
        if (!cylinders.insert(card.cylinder).second)
            return two_of(card.cylinder);
        const auto added = add_card(history_, reading.value().key, card.cylinder, *card.trace, audit);
        if (!added)
            return added.error();
        if (added.value().outcome == AddedCard::Outcome::differs)
            return another_card(reading.value().name, card.cylinder);
        if (added.value().outcome == AddedCard::Outcome::withdrawn)
            return withdrawn_before(reading.value().name, card.cylinder);
        ++(added.value().outcome == AddedCard::Outcome::added ? all.added : all.same);
    }
    const auto in_all = cards_of(history_, reading.value().key);
    if (!in_all)
        return in_all.error();
    all.in_all = in_all.value();
    if (all.added > 0) {
        Query owner(history_.database(), "SELECT vessel_key, coalesce(engine_key, 0) FROM reading WHERE reading_key = ?",
                    not_saved);
        BOOST_OUTCOME_TRYV(owner.run(reading.value().key));
        if (!owner.next())
            return owner.problem();
        BOOST_OUTCOME_TRYV(count_change(history_, {owner.integer(0), owner.integer(1)}));
    }
    BOOST_OUTCOME_TRYV(transaction.commit());
    return all;
}

} // namespace evenstroke::storage
