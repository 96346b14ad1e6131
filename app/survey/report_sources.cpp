// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/survey/report_sources.h"

#include "storage/audit.h"
#include "storage/card_store.h"
#include "storage/engine_record.h"
#include "storage/hand_out.h"
#include "storage/reading_store.h"

#include <QCryptographicHash>

#include <algorithm>
#include <map>
#include <optional>

namespace evenstroke {
namespace {

std::string value_text(const Value& value)
{
    return value.typed.empty() ? value.words : value.typed;
}

CorrectionLine correction_line(const Engine& engine, const storage::Correction& correction, const EngineRecord& record)
{
    CorrectionLine line;
    line.when = correction.at;
    line.who = correction.by.who;
    line.reason = correction.by.why;
    line.old_value = value_text(correction.old_value);
    line.new_value = value_text(correction.new_value);
    line.from_card = correction.new_value.origin == Origin::card;
    line.what = quantity(correction.new_value.quantity).title;
    if (correction.new_value.place.kind == Place::Kind::cylinder)
        line.what += ", cylinder " + engine.cylinder_name(correction.new_value.place.number);
    for (const Reading& reading : record.readings)
        if (reading.id == correction.reading_id)
            line.what = reading.name + ": " + line.what;
    return line;
}

/// A reading as a whole was given another time, withdrawn or brought back: only the trail has that.
std::optional<CorrectionLine> whole_reading_line(const storage::AuditEntry& entry, const std::string& name)
{
    const std::string time_of = "time of " + name + ": ", arrow = " -> ";
    if (entry.action == "withdrawn" || entry.action == "brought back")
        return CorrectionLine{entry.at, entry.who, name + ": the whole reading",
                              entry.action == "withdrawn" ? "in use" : "withdrawn",
                              entry.action == "withdrawn" ? "withdrawn" : "in use", entry.why};
    if (entry.action != "corrected" || entry.detail.rfind(time_of, 0) != 0)
        return std::nullopt;
    const std::size_t at = entry.detail.find(arrow);
    if (at == std::string::npos)
        return std::nullopt;
    return CorrectionLine{entry.at,
                          entry.who,
                          name + ": time of the reading",
                          entry.detail.substr(time_of.size(), at - time_of.size()),
                          entry.detail.substr(at + arrow.size()),
                          entry.why};
}

/// Adds what happened to whole readings among the corrections, in order of time.
storage::Done add_whole_readings(storage::History& history, const storage::Owner& owner, std::vector<CorrectionLine>& lines)
{
    constexpr int whole_trail = 1'000'000;
    const auto readings = storage::ReadingStore(history).list(owner);
    if (!readings)
        return readings.error();
    const auto trail = storage::audit_entries(history, {}, whole_trail);
    if (!trail)
        return trail.error();
    std::map<std::string, std::string> names;
    for (const storage::ReadingEntry& reading : readings.value())
        names[reading.id] = reading.name;
    for (const storage::AuditEntry& entry : trail.value())
        if (const auto named = names.find(entry.subject_id); named != names.end())
            if (auto line = whole_reading_line(entry, named->second))
                lines.push_back(std::move(*line));
    std::stable_sort(lines.begin(), lines.end(),
                     [](const CorrectionLine& a, const CorrectionLine& b) { return a.when < b.when; });
    return storage::done();
}

} // namespace

std::string data_set_hash(const Engine& engine, const std::vector<Reading>& own_readings)
{
    std::vector<std::string> lines;
    for (const Reading& reading : own_readings)
        for (std::string& line : storage::value_lines(reading, engine))
            lines.push_back(std::move(line));
    std::sort(lines.begin(), lines.end()); // characters compare as unsigned bytes
    QCryptographicHash hash(QCryptographicHash::Sha256);
    for (const std::string& line : lines)
        hash.addData(QByteArrayView(line.data(), static_cast<qsizetype>(line.size())));
    return hash.result().toHex().toStdString();
}

Result<ReportSources> load_report_sources(storage::History& history, const std::string& engine_id)
{
    const auto loaded = storage::load_record(history, engine_id);
    if (!loaded.has_value())
        return loaded.error();
    ReportSources sources;
    sources.record = loaded.value().record;
    const storage::ReadingStore readings(history);
    const auto owner = storage::Owner::engine(engine_id);
    const auto own = readings.load_own(owner);
    if (!own.has_value())
        return own.error();
    sources.details.data_hash = data_set_hash(sources.record->engine, own.value());
    const auto audit = storage::audit_state(history);
    if (!audit.has_value())
        return audit.error();
    sources.details.audit_hash = audit.value().last_hash;
    const auto corrections = readings.corrections_of(owner);
    if (!corrections.has_value())
        return corrections.error();
    for (const storage::Correction& correction : corrections.value())
        sources.details.corrections.push_back(correction_line(sources.record->engine, correction, *sources.record));
    if (const auto added = add_whole_readings(history, owner, sources.details.corrections); !added)
        return added.error();
    sources.details.revisions = sources.details.corrections.size();
    const auto cards = storage::CardStore(history).list(engine_id);
    if (!cards.has_value())
        return cards.error();
    for (const storage::CardEntry& card : cards.value())
        sources.details.diagrams.push_back({card.reading_id, card.cylinder});
    const auto changes = storage::audit_entries(history, engine_id);
    if (!changes.has_value())
        return changes.error();
    for (auto entry = changes.value().rbegin(); entry != changes.value().rend(); ++entry) // the newest stands first
        sources.details.engine_changes.push_back({entry->at, entry->who, entry->action + ", " + entry->detail, entry->why});
    return sources;
}

ReportDetails with_found(ReportDetails wished, const ReportDetails& found)
{
    wished.data_hash = found.data_hash;
    wished.audit_hash = found.audit_hash;
    wished.revisions = found.revisions;
    wished.corrections = found.corrections;
    wished.diagrams = found.diagrams;
    wished.engine_changes = found.engine_changes;
    return wished;
}

} // namespace evenstroke
