// SPDX-License-Identifier: GPL-3.0-or-later
#include "storage/hand_out.h"

#include "storage/card_store.h"
#include "storage/csv_writer.h"
#include "storage/event_store.h"
#include "storage/reading_store.h"
#include "storage/sql.h"
#include "storage/transaction.h"
#include "storage/value_reader.h"
#include "storage/vessel_store.h"
#include "storage/written_unit.h"

#include <QDir>
#include <QFile>
#include <QSaveFile>

#include <algorithm>
#include <map>
#include <set>

namespace evenstroke::storage {
namespace {

const char* const missing_words[] = {"", "not_fitted", "not_read", "out_of_order"};
const char* const phase_words[] = {"before", "", "after"};

/// With the ship's own offset, so that the log sheet's time can be read in the file.
std::string file_time(const StampedTime& time)
{
    const auto local = time.utc + std::chrono::minutes(time.offset_minutes);
    const auto second =
        std::chrono::duration_cast<std::chrono::seconds>(time.utc.time_since_epoch()).count() % 60;
    const std::string minutes =
        utc_text(std::chrono::time_point_cast<std::chrono::seconds>(local)); // 2026-03-14T06:30Z
    std::string text = minutes.substr(0, minutes.size() - 1);
    const auto two = [](qint64 number) {
        return std::string(number < 10 ? "0" : "") + std::to_string(number);
    };
    if (second != 0)
        text += ":" + two(second);
    if (time.offset_minutes == 0)
        return text + "Z";
    const int minutes_off = std::abs(time.offset_minutes);
    return text + (time.offset_minutes < 0 ? "-" : "+") + two(minutes_off / 60) + ":" + two(minutes_off % 60);
}

/// The nine columns of one value; `engine` is null for the ship's shared readings.
std::vector<std::string> value_fields(const Reading& reading, const Value& value, const Engine* engine, std::string time)
{
    const Quantity& q = quantity(value.quantity);
    const bool number = q.type == ValueType::number && value.missing == MissingReason::none;
    const bool bare = number && unit(value.unit).dimension == Dimension::number && value.unit_typed.empty();
    return {reading.name,
            std::move(time),
            q.name,
            value.place_typed.empty() ? file_place(value.place, engine) : value.place_typed,
            number ? value.typed : std::string(),
            number && !bare ? written_unit(value) : std::string(),
            phase_words[static_cast<std::size_t>(value.phase)],
            number ? value.words : value.typed,
            missing_words[static_cast<std::size_t>(value.missing)]};
}

bool any_from_cards(const std::vector<Reading>& readings)
{
    return std::any_of(readings.begin(), readings.end(), [](const Reading& reading) {
        return std::any_of(reading.values.begin(), reading.values.end(),
                           [](const Value& value) { return value.origin == Origin::card; });
    });
}

std::string readings_text(const std::vector<Reading>& readings, const Engine* engine)
{
    const bool origins = any_from_cards(readings);
    std::vector<std::string> header = {"reading", "taken_at", "quantity", "cylinder",      "value",
                                       "unit",    "phase",    "text",     "missing_reason"};
    if (!engine)
        header.erase(header.begin() + 3);
    if (origins)
        header.push_back("origin");
    std::string text = csv_line(header);
    for (const Reading& reading : readings) {
        for (const Value& value : reading.values) {
            std::vector<std::string> fields = value_fields(reading, value, engine, file_time(reading.taken_at));
            if (!engine)
                fields.erase(fields.begin() + 3);
            if (origins)
                fields.push_back(value.origin == Origin::card ? "card" : "");
            text += csv_line(fields);
        }
    }
    return text;
}

std::string events_text(const std::vector<Event>& events, const Engine& engine)
{
    std::string text = csv_line({"date", "cylinder", "kind", "note", "running_hours", "done_by", "part"});
    for (const Event& event : events)
        text += csv_line(
            {event.date_only ? date_text(event.date.utc) : file_time(event.date),
             file_place(event.place, &engine), event.kind, event.note,
             event.running_hours ? from_qt(QString::number(*event.running_hours, 'g', 15)) : std::string(),
             event.done_by, event.part});
    return text;
}

/// "auxiliary-engine-2" for "Auxiliary engine 2"; every folder gets a name of its own.
QString folder_name(const std::string& engine, std::set<QString>& taken)
{
    QString plain;
    for (const QChar letter : to_qt(engine).toLower())
        plain += letter.isLetterOrNumber() ? letter : QLatin1Char('-');
    plain = plain.simplified().left(60);
    if (plain.isEmpty())
        plain = QStringLiteral("engine");
    QString name = plain;
    for (int i = 2; !taken.insert(name).second; ++i)
        name = plain + QStringLiteral("-%1").arg(i);
    return name;
}

/// A name that can be a folder or a file of its own, and nothing else.
bool is_file_name(const std::string& name)
{
    return !name.empty() && name.front() != '.' && name.find_first_of("/\\:") == std::string::npos;
}

class HandingOut
{
public:
    HandingOut(History& history, const QString& folder, const Progress& progress)
        : history_(history), folder_(folder), progress_(progress)
    {
    }
    Result<QStringList> run(const std::string& vessel_id);

private:
    Done write_engine(const EngineEntry& entry);
    Done write_cards(const EngineEntry& entry, const QString& folder, const Engine& engine,
                     const std::vector<Reading>& readings);
    Done write_file(const QString& path, const std::string& content);

    History& history_;
    QDir folder_;
    const Progress& progress_;
    std::set<QString> taken_;
    QStringList written_;
};

Done HandingOut::write_file(const QString& path, const std::string& content)
{
    if (QFile::exists(path))
        return Problem{Problem::Kind::storage, "\"" + from_qt(path) + "\" is there already.",
                       "Choose an empty folder."};
    QDir().mkpath(QFileInfo(path).path());
    QSaveFile file(path);
    const bool opened = file.open(QIODevice::WriteOnly);
    const auto size = static_cast<qint64>(content.size());
    if (!opened || file.write(content.data(), size) != size || !file.commit())
        return Problem{Problem::Kind::storage, "\"" + from_qt(path) + "\" cannot be written.",
                       "Check that the disk has room and that you may write there."};
    written_ << path;
    return done();
}

Done HandingOut::write_cards(const EngineEntry& entry, const QString& folder, const Engine& engine,
                             const std::vector<Reading>& readings)
{
    const CardStore cards(history_);
    const auto list = cards.list(entry.id);
    if (!list)
        return list.error();
    std::map<std::string, std::string> name_of;
    for (const Reading& reading : readings)
        name_of[reading.id] = reading.name;
    for (const CardEntry& card : list.value()) {
        const auto name = name_of.find(card.reading_id);
        if (name == name_of.end() || !is_file_name(name->second))
            continue; // its folder could not be named after the reading
        const std::string cylinder = engine.cylinder_name(card.cylinder);
        const auto trace = cards.load(card.id);
        if (!trace)
            return trace.error();
        const QString path =
            QStringLiteral("%1/cards/%2/%3.csv")
                .arg(folder, to_qt(name->second),
                     to_qt(is_file_name(cylinder) ? cylinder : std::to_string(card.cylinder)));
        BOOST_OUTCOME_TRYV(write_file(folder_.filePath(path), card_text(trace.value())));
    }
    return done();
}

Done HandingOut::write_engine(const EngineEntry& entry)
{
    const auto stored = VesselStore(history_).engine(entry.id);
    if (!stored)
        return stored.error();
    const Engine& engine = stored.value().engine;
    const auto readings = ReadingStore(history_).load_own(Owner::engine(entry.id));
    if (!readings)
        return readings.error();
    const auto events = EventStore(history_).load_own(entry.id);
    if (!events)
        return events.error();
    const QString folder = folder_name(entry.name, taken_);
    const auto path = [&](const char* name) {
        return folder_.filePath(folder + QLatin1Char('/') + QLatin1String(name));
    };
    BOOST_OUTCOME_TRYV(write_file(path("engine.json"), stored.value().document));
    BOOST_OUTCOME_TRYV(write_file(path("readings.csv"), readings_text(readings.value(), &engine)));
    if (!events.value().empty()) {
        BOOST_OUTCOME_TRYV(write_file(path("events.csv"), events_text(events.value(), engine)));
    }
    return write_cards(entry, folder, engine, readings.value());
}

Result<QStringList> HandingOut::run(const std::string& vessel_id)
{
    const ReadTransaction same_state(history_);
    const auto vessel = VesselStore(history_).vessel(vessel_id);
    if (!vessel)
        return vessel.error();
    const auto engines = VesselStore(history_).engines_of(vessel_id);
    if (!engines)
        return engines.error();
    qint64 count = 0;
    for (const EngineEntry& entry : engines.value()) {
        BOOST_OUTCOME_TRYV(write_engine(entry));
        if (progress_ && !progress_(++count, static_cast<qint64>(engines.value().size())))
            return Problem{Problem::Kind::storage, "The writing was stopped.",
                           "Remove the folder, or start again with an empty one."};
    }
    const auto shared = ReadingStore(history_).load_own(Owner::vessel(vessel_id));
    if (!shared)
        return shared.error();
    if (!shared.value().empty()) {
        BOOST_OUTCOME_TRYV(write_file(folder_.filePath(QStringLiteral("ship_readings.csv")),
                                      readings_text(shared.value(), nullptr)));
    }
    return written_;
}

} // namespace

std::vector<std::string> value_lines(const Reading& reading, const Engine& engine)
{
    std::vector<std::string> lines;
    lines.reserve(reading.values.size());
    for (const Value& value : reading.values)
        lines.push_back(csv_line(value_fields(reading, value, &engine, utc_text(reading.taken_at.utc))));
    return lines;
}

Result<QStringList> hand_out(History& history, const std::string& vessel_id, const QString& folder,
                             const Progress& progress)
{
    return HandingOut(history, folder, progress).run(vessel_id);
}

} // namespace evenstroke::storage
