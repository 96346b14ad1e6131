// SPDX-License-Identifier: GPL-3.0-or-later
#include "storage/vessel_store.h"

#include "core/plain_text.h"
#include "storage/engine_json.h"
#include "storage/engine_rows.h"
#include "storage/sql.h"

namespace evenstroke::storage {
namespace {

const std::string not_read = "the list of ships and engines was not read";
const char* const vessel_columns = "SELECT id, name, imo, flag, class_society, class_number FROM vessel ";
const char* const entry_columns =
    "SELECT e.id, e.name, v.id, v.name, e.input_revision FROM engine e JOIN vessel v USING (vessel_key) ";

Vessel vessel_of(const Query& row)
{
    return {row.text(0), row.text(1), row.text(2), row.text(3), row.text(4), row.text(5)};
}

Result<std::vector<EngineEntry>> entries(History& history, const char* condition, const std::string& value)
{
    Query rows(history.database(),
               QString::fromLatin1(entry_columns) + QString::fromLatin1(condition) +
                   QStringLiteral(" ORDER BY v.name, e.name"),
               not_read);
    BOOST_OUTCOME_TRYV(rows.run(value));
    std::vector<EngineEntry> found;
    while (rows.next())
        found.push_back({rows.text(0), rows.text(1), rows.text(2), rows.text(3), rows.integer(4)});
    BOOST_OUTCOME_TRYV(rows.finished());
    return found;
}

/// "one", "two" and 3 more
std::string listed(const std::vector<std::string>& names)
{
    constexpr std::size_t most = 8;
    std::string text;
    for (std::size_t i = 0; i < std::min(names.size(), most); ++i)
        text += (i == 0 ? "" : ", ") + evenstroke::quoted(names[i]);
    return names.size() > most ? text + " and " + std::to_string(names.size() - most) + " more" : text;
}

} // namespace

Result<std::vector<Vessel>> VesselStore::vessels() const
{
    Query rows(history_.database(), QString::fromLatin1(vessel_columns) + QStringLiteral("ORDER BY name"),
               not_read);
    BOOST_OUTCOME_TRYV(rows.run());
    std::vector<Vessel> found;
    while (rows.next())
        found.push_back(vessel_of(rows));
    BOOST_OUTCOME_TRYV(rows.finished());
    return found;
}

Result<Vessel> VesselStore::vessel(const std::string& vessel_id) const
{
    Query row(history_.database(), QString::fromLatin1(vessel_columns) + QStringLiteral("WHERE id = ?"),
              not_read);
    BOOST_OUTCOME_TRYV(row.run(vessel_id));
    if (row.next())
        return vessel_of(row);
    BOOST_OUTCOME_TRYV(row.finished());
    return Problem{Problem::Kind::not_found, "The vessel is not in this history.",
                   "Look at the list again; another window may have changed it."};
}

Result<std::vector<EngineEntry>> VesselStore::engines() const
{
    return entries(history_, "WHERE ? = ''", "");
}

Result<std::vector<EngineEntry>> VesselStore::engines_of(const std::string& vessel_id) const
{
    return entries(history_, "WHERE v.id = ?", vessel_id);
}

Result<Vessel> VesselStore::find_vessel(const std::string& vessel_name) const
{
    const auto all = vessels();
    if (!all)
        return all.error();
    std::vector<std::string> names;
    for (const Vessel& vessel : all.value()) {
        if (vessel.name == vessel_name)
            return vessel;
        names.push_back(vessel.name);
    }
    return Problem{Problem::Kind::not_found,
                   "There is no vessel " + evenstroke::quoted(vessel_name) + " in this history.",
                   names.empty() ? "Take in her files first." : "Choose one of " + listed(names) + "."};
}

Result<EngineEntry> VesselStore::find_engine(const std::string& engine_name,
                                             const std::optional<std::string>& vessel_name) const
{
    if (vessel_name) {
        const auto vessel = find_vessel(*vessel_name);
        if (!vessel)
            return vessel.error();
    }
    const auto all = engines();
    if (!all)
        return all.error();
    std::vector<EngineEntry> found;
    std::vector<std::string> others, candidates;
    for (const EngineEntry& entry : all.value()) {
        if (vessel_name && entry.vessel_name != *vessel_name)
            continue;
        others.push_back(entry.name + " of " + entry.vessel_name);
        if (entry.name != engine_name)
            continue;
        found.push_back(entry);
        candidates.push_back(entry.vessel_name);
    }
    if (found.size() == 1)
        return found.front();
    if (found.empty())
        return Problem{Problem::Kind::not_found,
                       "There is no engine " + evenstroke::quoted(engine_name) + " in this history.",
                       others.empty() ? "Take in its files first." : "Choose one of " + listed(others) + "."};
    return invalid_input("The engine name " + evenstroke::quoted(engine_name) +
                             " stands for several engines.",
                         "Name the vessel too: " + listed(candidates) + ".");
}

Result<StoredEngine> VesselStore::engine(const std::string& engine_id) const
{
    Query row(
        history_.database(),
        "SELECT v.id, v.name, v.imo, v.flag, v.class_society, v.class_number, e.name, e.document, e.revision "
        "FROM engine e JOIN vessel v USING (vessel_key) WHERE e.id = ?",
        "the engine was not read");
    BOOST_OUTCOME_TRYV(row.run(engine_id));
    if (!row.next()) {
        BOOST_OUTCOME_TRYV(row.finished());
        return Problem{Problem::Kind::not_found, "The engine is not in this history.",
                       "Look at the list again; another window may have changed it."};
    }
    auto document = read_engine_document(row.text(7), "The document of " + row.text(6));
    if (!document)
        return document.error();
    StoredEngine stored{std::move(document.value().engine), vessel_of(row), row.text(7), row.small(8),
                        std::move(document.value().unknown_keys)};
    stored.engine.id = engine_id;
    stored.engine.name = row.text(6);
    return stored;
}

Result<std::vector<EngineRevision>> VesselStore::revisions(const std::string& engine_id) const
{
    Query rows(history_.database(),
               "SELECT r.revision, r.document, r.at, r.who, r.why FROM engine_revision r JOIN engine e USING "
               "(engine_key) "
               "WHERE e.id = ? ORDER BY r.revision",
               "the engine's revisions were not read");
    BOOST_OUTCOME_TRYV(rows.run(engine_id));
    std::vector<EngineRevision> found;
    while (rows.next())
        found.push_back(
            {rows.small(0), rows.text(1), time_of(rows.integer(2)), {rows.text(3), rows.text(4)}});
    BOOST_OUTCOME_TRYV(rows.finished());
    return found;
}

} // namespace evenstroke::storage
