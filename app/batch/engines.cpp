// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/batch/engines.h"

#include "app/batch/long_work.h"
#include "storage/engine_record.h"

namespace evenstroke::batch {

Result<std::unique_ptr<storage::History>> open_history(const QCommandLineParser& parser, storage::OpenMode mode)
{
    auto opened = storage::History::open(parser.value(QStringLiteral("history")), mode);
    if (!opened.has_value() && opened.error().kind == Problem::Kind::not_found) {
        Problem problem = opened.error();
        problem.kind = Problem::Kind::storage; // a file that is not there, rather than data that are refused
        return problem;
    }
    return opened;
}

namespace {

std::string not_held(const std::string& vessel, const std::string& engine)
{
    if (engine.empty())
        return "The history holds no engine of a vessel \"" + vessel + "\".";
    return "The history holds no engine \"" + engine + "\"" +
           (vessel.empty() ? "." : " of a vessel \"" + vessel + "\".");
}

} // namespace

Result<std::vector<storage::EngineEntry>> chosen_engines(storage::History& history, const QCommandLineParser& parser)
{
    const storage::VesselStore store(history);
    auto listed = store.engines();
    if (!listed.has_value())
        return listed.error();
    const QString vessel = parser.value(QStringLiteral("vessel")), engine = parser.value(QStringLiteral("engine"));
    if (listed.value().empty() && !(vessel.isEmpty() && engine.isEmpty()))
        return Problem{Problem::Kind::not_found, "The history holds no engine yet.",
                       "Take the files of an engine in first."};
    std::vector<storage::EngineEntry> chosen;
    std::string known;
    for (const storage::EngineEntry& entry : listed.value()) {
        known += (known.empty() ? "" : "; ") + entry.vessel_name + ", " + entry.name;
        const bool vessel_fits = vessel.isEmpty() || vessel == QString::fromStdString(entry.vessel_name);
        const bool engine_fits = engine.isEmpty() || engine == QString::fromStdString(entry.name);
        if (vessel_fits && engine_fits)
            chosen.push_back(entry);
    }
    if (chosen.empty() && !(vessel.isEmpty() && engine.isEmpty()))
        return Problem{Problem::Kind::not_found,
                       not_held(vessel.toStdString(), engine.toStdString()),
                       "Choose one of: " + known + "."};
    return chosen;
}

Result<storage::EngineEntry> chosen_engine(storage::History& history, const QCommandLineParser& parser)
{
    const auto chosen = chosen_engines(history, parser);
    if (!chosen.has_value())
        return chosen.error();
    const std::string name = parser.value(QStringLiteral("engine")).toStdString();
    if (chosen.value().empty())
        return Problem{Problem::Kind::not_found, not_held(parser.value(QStringLiteral("vessel")).toStdString(), name),
                       "Take the files of an engine in first."};
    if (chosen.value().size() == 1)
        return chosen.value().front();
    std::string vessels;
    for (const storage::EngineEntry& entry : chosen.value())
        vessels += (vessels.empty() ? " " : "; ") + entry.vessel_name;
    return invalid_input("Several vessels have an engine \"" + name + "\":" + vessels + ".", "Name one with --vessel.");
}

Result<void> for_each_judgement(storage::History& history, const std::vector<storage::EngineEntry>& engines,
                                Streams& streams, const std::function<void(const Judgement&)>& use)
{
    const storage::Progress progress = progress_line(streams, QStringLiteral("judging"));
    qint64 finished = 0;
    for (const storage::EngineEntry& entry : engines) {
        if (!progress(finished++, static_cast<qint64>(engines.size())))
            return Problem{Problem::Kind::storage, "The work was stopped.", "Start it again when it suits."};
        const auto loaded = storage::load_record(history, entry.id);
        if (!loaded.has_value())
            return loaded.error();
        use(judge(loaded.value().record));
    }
    progress(finished, static_cast<qint64>(engines.size()));
    return BOOST_OUTCOME_V2_NAMESPACE::success();
}

std::string place_cell(const Engine& engine, const Place& place)
{
    switch (place.kind) {
    case Place::Kind::cylinder: return engine.cylinder_name(place.number);
    case Place::Kind::turbocharger: return "tc" + std::to_string(place.number);
    case Place::Kind::cooler: return "cooler" + std::to_string(place.number);
    case Place::Kind::engine:
    case Place::Kind::ship: break;
    }
    return {};
}

} // namespace evenstroke::batch
