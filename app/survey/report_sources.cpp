// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/survey/report_sources.h"

#include "storage/audit.h"
#include "storage/engine_record.h"
#include "storage/reading_store.h"

#include <QCryptographicHash>

namespace evenstroke {
namespace {

std::string place_of(const Engine& engine, const Place& place)
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

std::string data_set_hash(const EngineRecord& record)
{
    QCryptographicHash hash(QCryptographicHash::Sha256);
    for (const Reading& reading : record.readings) {
        const std::string head = reading.name + "," + utc_text(reading.taken_at.utc) + ",";
        for (const Value& value : reading.values) {
            if (value.phase != Phase::reading)
                continue;
            const std::string line = head + quantity(value.quantity).name + "," + place_of(record.engine, value.place) +
                                     "," + value_text(value) + "," + std::string(unit(value.unit).symbol) + "\n";
            hash.addData(QByteArrayView(line.data(), static_cast<qsizetype>(line.size())));
        }
    }
    return hash.result().toHex().toStdString();
}

Result<ReportSources> load_report_sources(storage::History& history, const std::string& engine_id)
{
    const auto loaded = storage::load_record(history, engine_id);
    if (!loaded.has_value())
        return loaded.error();
    ReportSources sources;
    sources.record = loaded.value().record;
    sources.details.data_hash = data_set_hash(*sources.record);
    const auto audit = storage::audit_state(history);
    if (!audit.has_value())
        return audit.error();
    sources.details.audit_hash = audit.value().last_hash;
    const auto corrections = storage::ReadingStore(history).corrections_of(storage::Owner::engine(engine_id));
    if (!corrections.has_value())
        return corrections.error();
    for (const storage::Correction& correction : corrections.value())
        sources.details.corrections.push_back(correction_line(sources.record->engine, correction, *sources.record));
    sources.details.revisions = corrections.value().size();
    return sources;
}

} // namespace evenstroke
