// SPDX-License-Identifier: GPL-3.0-or-later
#include "storage/healthy_cards.h"

#include "core/plain_text.h"
#include "storage/content_hash.h"
#include "storage/healthy_card_rows.h"
#include "storage/reading_change.h"

#include <QUuid>

namespace evenstroke::storage {
namespace {

const std::string not_saved = "what was said of the cards was not saved";
const std::string not_read = "what was said of cards was not read";

/// Whether the last word on a reading's cards calls them healthy.
Result<bool> are_healthy(History& history, qint64 reading_key)
{
    Query last(history.database(),
               "SELECT healthy FROM healthy_cards WHERE reading_key = ? ORDER BY saying_key DESC LIMIT 1",
               not_read);
    BOOST_OUTCOME_TRYV(last.run(reading_key));
    const bool healthy = last.next() && last.small(0) != 0;
    BOOST_OUTCOME_TRYV(last.finished());
    return healthy;
}

Result<int> count_cards(History& history, qint64 reading_key)
{
    Query count(history.database(), "SELECT count(*) FROM card WHERE reading_key = ?", not_read);
    BOOST_OUTCOME_TRYV(count.run(reading_key));
    if (!count.next())
        return count.problem();
    return count.small(0);
}

Done find_saying_problem(History& history, const ReadingRow& reading, bool healthy)
{
    const auto is = are_healthy(history, reading.key);
    const auto cards = count_cards(history, reading.key);
    if (!is || !cards)
        return is ? cards.error() : is.error();
    if (healthy && cards.value() == 0)
        return invalid_input("The reading " + evenstroke::quoted(reading.name) + " has no card.",
                             "Bring its cards in first.");
    if (is.value() == healthy)
        return invalid_input("The cards of " + evenstroke::quoted(reading.name) +
                                 (healthy ? " are called healthy already." : " are not called healthy."),
                             "Leave it as it is.");
    return done();
}

Done write_saying(History& history, qint64 reading_key, const HealthySaying& saying)
{
    Query add(
        history.database(),
        "INSERT INTO healthy_cards (id, reading_key, healthy, words, said_at, who) VALUES (?, ?, ?, ?, ?, ?)",
        not_saved);
    return add.run(saying.id, reading_key, saying.healthy ? 1 : 0, saying.words, seconds_of(saying.at),
                   saying.who);
}

} // namespace

std::string healthy_saying_hash(const HealthySaying& saying)
{
    ContentHash content;
    content.add(saying.id).add(saying.reading_id).add(qint64{saying.healthy}).add(saying.words);
    content.add(seconds_of(saying.at)).add(saying.who);
    return content.hex();
}

Result<std::vector<HealthySaying>> load_healthy_sayings(History& history)
{
    Query rows(
        history.database(),
        "SELECT h.id, r.id, h.healthy, h.words, h.who, h.said_at FROM healthy_cards h JOIN reading r USING "
        "(reading_key) ORDER BY h.saying_key",
        not_read);
    BOOST_OUTCOME_TRYV(rows.run());
    std::vector<HealthySaying> sayings;
    while (rows.next())
        sayings.push_back({rows.text(0), rows.text(1), rows.small(2) != 0, rows.text(3), rows.text(4),
                           time_of(rows.integer(5))});
    BOOST_OUTCOME_TRYV(rows.finished());
    return sayings;
}

Result<std::vector<HealthyCards>> HealthyCardStore::list(const std::string& engine_id) const
{
    Query rows(
        history_.database(),
        "SELECT r.id, h.who, h.words, h.said_at FROM healthy_cards h JOIN reading r USING (reading_key) "
        "JOIN engine e USING (engine_key) WHERE e.id = ? AND r.state = 1 AND h.healthy = 1 AND NOT EXISTS "
        "(SELECT 1 FROM healthy_cards later WHERE later.reading_key = h.reading_key AND later.saying_key > "
        "h.saying_key) ORDER BY r.taken_at, r.reading_key",
        not_read);
    BOOST_OUTCOME_TRYV(rows.run(engine_id));
    std::vector<HealthyCards> found;
    while (rows.next())
        found.push_back({rows.text(0), rows.text(1), rows.text(2), time_of(rows.integer(3))});
    BOOST_OUTCOME_TRYV(rows.finished());
    return found;
}

Done HealthyCardStore::say(const std::string& reading_id, bool healthy, const std::string& words,
                           const Signature& by)
{
    const std::string_view given = trimmed(words).empty() ? trimmed(by.why) : trimmed(words);
    const Signature signed_by{std::string(trimmed(by.who)), std::string(given)};
    BOOST_OUTCOME_TRYV(check_signature(signed_by, !healthy));
    ReadingChange change(history_, not_saved);
    BOOST_OUTCOME_TRYV(change.begin(reading_id, ReadingState::closed));
    BOOST_OUTCOME_TRYV(find_saying_problem(history_, change.reading(), healthy));
    const HealthySaying saying{from_qt(QUuid::createUuid().toString(QUuid::WithoutBraces)),
                               reading_id,
                               healthy,
                               signed_by.why,
                               signed_by.who,
                               std::chrono::floor<std::chrono::seconds>(history_.now())};
    BOOST_OUTCOME_TRYV(write_saying(history_, change.reading().key, saying));
    AuditWriter audit(history_, signed_by);
    const std::string detail = change.reading().name + (saying.words.empty() ? "" : ": " + saying.words);
    BOOST_OUTCOME_TRYV(audit.add({healthy ? "cards called healthy" : "cards no longer called healthy",
                                  "word on cards", saying.id, detail, healthy_saying_hash(saying)}));
    BOOST_OUTCOME_TRYV(count_change(history_, change.owner()));
    return change.finish();
}

} // namespace evenstroke::storage
