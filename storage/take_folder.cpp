// SPDX-License-Identifier: GPL-3.0-or-later
#include "storage/take_folder.h"

#include "storage/audit_writer.h"
#include "storage/engine_rows.h"
#include "storage/event_rows.h"
#include "storage/events_csv.h"
#include "storage/reading_merge.h"
#include "storage/subject_hash.h"
#include "storage/transaction.h"
#include "storage/vessel_store.h"

#include "core/plain_text.h"

#include <QDir>
#include <QFile>
#include <QUuid>

#include <algorithm>

namespace evenstroke::storage {
namespace {

const std::string not_taken = "nothing was taken in";

bool is_about_the_data(const Problem& problem)
{
    return problem.kind == Problem::Kind::invalid_input;
}

} // namespace

Refusals FolderTaking::refusals_of(const std::string& shown, const char* file)
{
    return Refusals(shown + "/" + file, report_.refused);
}

void FolderTaking::remark_columns(const std::string& file, const std::vector<std::string>& columns)
{
    for (const std::string& column : columns)
        report_.remarks.push_back(file + ": the column " + evenstroke::quoted(column) + " was not read");
}

/// Whether the folder is to be left out because of what was refused so far.
bool FolderTaking::is_refused()
{
    const TakeCounts rows = report_.rows();
    if (rows.refused == 0 || options_.keep_good || meter_.stopped())
        return false;
    report_.remarks.push_back("nothing of the folder was taken: " + std::to_string(rows.refused) +
                              (rows.refused == 1 ? " row" : " rows") + " refused, " +
                              std::to_string(rows.fresh + rows.same) + " good");
    return true;
}

std::optional<EngineDocument> FolderTaking::read_document(const EngineFolder& folder)
{
    Refusals refusals = refusals_of(folder.shown, "engine.json");
    if (!folder.has_document) {
        refusals.add(0, "", "There is no engine.json beside readings.csv.",
                     "Write the engine's particulars into engine.json.");
        return std::nullopt;
    }
    QFile file(QDir(folder.path).filePath(QStringLiteral("engine.json")));
    if (!file.open(QIODevice::ReadOnly)) {
        refusals.add(0, "", "The file cannot be opened.", "Check that you have the right to read it.");
        return std::nullopt;
    }
    const QByteArray content = file.read((4 << 20) + 1); // the reader refuses more than 4 MB
    meter_.add(content.size());
    std::vector<DocumentProblem> problems;
    auto document = read_engine_document(
        std::string_view(content.constData(), static_cast<std::size_t>(content.size())), problems);
    if (document)
        problems = find_document_problems(*document);
    for (const DocumentProblem& problem : problems)
        refusals.add(problem.line, problem.value, problem.reason, problem.expected);
    if (!problems.empty())
        return std::nullopt;
    report_.vessel_name = document->vessel.name;
    report_.engine_name = document->engine.name;
    for (const std::string& key : document->unknown_keys)
        report_.remarks.push_back("engine.json: the key " + evenstroke::quoted(key) +
                                  " was kept and not used");
    for (const std::string& remark : document->remarks)
        report_.remarks.push_back("engine.json, " + remark);
    return document;
}

Done FolderTaking::take_engine(const EngineFolder& folder)
{
    for (const std::string& name : folder.ignored)
        report_.remarks.push_back(folder.shown + "/" + name + " was ignored");
    const auto document = read_document(folder);
    if (!document)
        return done();
    Transaction transaction(history_, not_taken);
    BOOST_OUTCOME_TRYV(transaction.begin());
    const auto taken = take_document(history_, *document, writers_.audit);
    if (!taken) {
        if (!is_about_the_data(taken.error()))
            return taken.error();
        refusals_of(folder.shown, "engine.json").add(0, "", taken.error());
        return done();
    }
    report_.engine_id = taken.value().saved.engine_id;
    BOOST_OUTCOME_TRYV(take_files(folder, *document));
    if (is_refused() || meter_.stopped())
        return done();
    report_.remarks.insert(report_.remarks.end(), taken.value().remarks.begin(), taken.value().remarks.end());
    vessel_ = document->vessel;
    vessel_.id = taken.value().saved.vessel_id;
    report_.taken = true;
    return transaction.commit();
}

Done FolderTaking::take_files(const EngineFolder& folder, const EngineDocument& document)
{
    // The engine in force may be a newer revision than the file's; readings are read with the file's own.
    const auto owner = owner_keys(history_, Owner::engine(report_.engine_id));
    if (!owner)
        return owner.error();
    const QDir here(folder.path);
    if (here.exists(QStringLiteral("readings.csv"))) {
        BOOST_OUTCOME_TRYV(take_readings(here.filePath(QStringLiteral("readings.csv")), folder.shown,
                                         &document.engine, owner.value()));
    } else {
        report_.remarks.push_back(folder.shown + " has no readings.csv");
    }
    if (here.exists(QStringLiteral("events.csv"))) {
        BOOST_OUTCOME_TRYV(take_events(here.filePath(QStringLiteral("events.csv")), folder.shown,
                                       document.engine, owner.value()));
    }
    if (here.exists(QStringLiteral("cards"))) {
        BOOST_OUTCOME_TRYV(
            take_cards(here.filePath(QStringLiteral("cards")), folder.shown, document.engine, owner.value()));
    }
    return done();
}

Done FolderTaking::take_readings(const QString& path, const std::string& shown, const Engine* engine,
                                 const OwnerKeys& owner)
{
    const char* const name = engine ? "readings.csv" : "ship_readings.csv";
    Refusals refusals = refusals_of(shown, name);
    const auto first_refused = static_cast<std::ptrdiff_t>(report_.refused.size());
    BOOST_OUTCOME_TRYV(history_.names().make_ready());
    ReadReadings read = read_readings_file(path, engine, history_.names(), refusals, meter_);
    remark_columns(name, read.unread_columns);
    ReadingMerge merge(history_, owner);
    BOOST_OUTCOME_TRYV(merge.compare(read, refusals));
    // Contradictions show only when all is read; people follow the file from top to bottom.
    std::stable_sort(report_.refused.begin() + first_refused, report_.refused.end(),
                     [](const RefusedRow& a, const RefusedRow& b) { return a.line < b.line; });
    report_.values += merge.counts();
    report_.values.refused += refusals.count();
    if ((refusals.count() > 0 && !options_.keep_good) || meter_.stopped()) {
        for (const ReadReading& reading : read.readings)
            unwritten_readings_.insert(reading.name);
        return done(); // taken back as a whole, so it need not be written
    }
    return merge.write(writers_, meter_);
}

Done FolderTaking::take_events(const QString& path, const std::string& shown, const Engine& engine,
                               const OwnerKeys& owner)
{
    Refusals refusals = refusals_of(shown, "events.csv");
    ReadEvents read = read_events_file(path, engine, refusals, meter_);
    remark_columns("events.csv", read.unread_columns);
    report_.events.refused += refusals.count();
    auto known = load_events(history_, owner.engine);
    if (!known)
        return known.error();
    for (Event& event : read.events) {
        if (std::any_of(known.value().begin(), known.value().end(),
                        [&](const Event& other) { return same_event(event, other); })) {
            ++report_.events.same;
            continue;
        }
        ++report_.events.fresh;
        event.id = from_qt(QUuid::createUuid().toString(QUuid::WithoutBraces));
        BOOST_OUTCOME_TRYV(insert_event(history_, owner.engine, event));
        BOOST_OUTCOME_TRYV(writers_.audit.add({"taken in", "event", event.id,
                                               event.kind + " of " + date_text(event.date.utc),
                                               event_hash(event, report_.engine_id)}));
        BOOST_OUTCOME_TRYV(count_event(history_, owner.vessel, owner.engine, event));
        known.value().push_back(event);
    }
    return done();
}

Done FolderTaking::take_ship(const ShipFolder& folder, const std::vector<Vessel>& vessels)
{
    Refusals refusals = refusals_of(folder.shown, "ship_readings.csv");
    if (vessels.size() != 1) {
        if (vessels.empty())
            refusals.add(0, "", "No engine beside the file was taken, so its ship is not known.",
                         "Set the engines' folders right and take all in again.");
        else
            refusals.add(0, "",
                         "The engines beside the file belong to " + evenstroke::quoted(vessels[0].name) +
                             " and to " + evenstroke::quoted(vessels[1].name) + ".",
                         "Give every ship a folder of her own.");
        report_.values.refused += refusals.count();
        return done();
    }
    report_.vessel_name = vessels.front().name;
    Transaction transaction(history_, not_taken);
    BOOST_OUTCOME_TRYV(transaction.begin());
    const auto owner = owner_keys(history_, Owner::vessel(vessels.front().id));
    if (!owner)
        return owner.error();
    BOOST_OUTCOME_TRYV(take_readings(QDir(folder.path).filePath(QStringLiteral("ship_readings.csv")),
                                     folder.shown, nullptr, owner.value()));
    if (is_refused() || meter_.stopped())
        return done();
    report_.taken = true;
    return transaction.commit();
}

} // namespace evenstroke::storage
