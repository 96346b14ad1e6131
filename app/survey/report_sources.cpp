// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/survey/report_sources.h"

#include "storage/audit.h"
#include "storage/card_store.h"
#include "storage/engine_record.h"
#include "storage/hand_out.h"
#include "storage/reading_store.h"

#include <QCryptographicHash>

#include <algorithm>

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
    line.what = quantity(correction.new_value.quantity).title;
    if (correction.new_value.place.kind == Place::Kind::cylinder)
        line.what += ", cylinder " + engine.cylinder_name(correction.new_value.place.number);
    for (const Reading& reading : record.readings)
        if (reading.id == correction.reading_id)
            line.what = reading.name + ": " + line.what;
    return line;
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
    sources.details.revisions = corrections.value().size();
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
