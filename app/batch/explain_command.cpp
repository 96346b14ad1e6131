// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/batch/explain_command.h"

#include "app/batch/engines.h"
#include "app/batch/table_output.h"
#include "app/cards/card_shelf.h"
#include "app/causes/causes_text.h"
#include "core/explanation/explanation.h"
#include "storage/engine_record.h"

#include <cmath>

namespace evenstroke::batch {
namespace {

using Cell = TableOutput::Cell;

std::string subject_cell(const Engine& engine, const Place& subject)
{
    return subject.kind == Place::Kind::cylinder ? "cylinder " + engine.cylinder_name(subject.number) : std::string("engine");
}

/// A thousandth is more than the share explained can be held to.
Cell share_cell(std::optional<double> share)
{
    return share ? Cell(std::round(*share * 1000.0) / 1000.0) : Cell();
}

void write_rows(TableOutput& table, const Explanation& explanation)
{
    const EngineRecord& record = *explanation.record;
    for (const SubjectExplanation& subject : explanation.subjects) {
        const auto row = [&](double rank, Cell cause, Cell explained, Cell urgency) {
            const auto& time = subject.time_to_limit;
            table.row({record.vessel.name, record.engine.name, record.readings[*explanation.reading].name,
                       subject_cell(record.engine, subject.subject), rank, std::move(cause), std::move(explained),
                       std::move(urgency), subject.limit_quantity ? Cell(quantity(*subject.limit_quantity).name) : Cell(),
                       TableOutput::number(time ? time->months_5 : std::nullopt),
                       TableOutput::number(time ? time->months_50 : std::nullopt),
                       TableOutput::number(time ? time->months_95 : std::nullopt)});
        };
        for (const Hypothesis& cause : subject.causes)
            row(cause.rank, cause.fault->id, share_cell(cause.explained), urgency_word(cause.fault->urgency));
        if (subject.causes.empty() && !subject.history.empty())
            row(0, Cell(), Cell(), Cell()); // out of its usual, and like no fault on the list
    }
}

/// How far in a line of its kind stands.
const char* indent(CausesLine::Kind kind)
{
    switch (kind) {
    case CausesLine::Kind::subject: return "\n";
    case CausesLine::Kind::cause: return "  ";
    case CausesLine::Kind::label: return "     ";
    case CausesLine::Kind::last: return "\n";
    case CausesLine::Kind::caution:
    case CausesLine::Kind::plain: break;
    }
    return "";
}

void write_text(QTextStream& out, const Explanation& explanation, const CardsStored& cards)
{
    const EngineRecord& record = *explanation.record;
    out << QString::fromStdString(record.vessel.name) << ", " << QString::fromStdString(record.engine.name) << "\n";
    for (const CausesLine& line : causes_lines(explanation, cards)) {
        out << indent(line.kind);
        if (line.kind == CausesLine::Kind::caution)
            out << "  Caution: ";
        else if (!line.lead.isEmpty())
            out << line.lead << ": ";
        out << line.words << "\n";
    }
    out.flush();
}

/// The record up to the reading that is meant; nothing where it has none of this name.
std::shared_ptr<const EngineRecord> up_to_reading(const std::shared_ptr<const EngineRecord>& record, const QString& name)
{
    if (name.isEmpty())
        return record;
    for (std::size_t i = 0; i < record->readings.size(); ++i)
        if (QString::fromStdString(record->readings[i].name) == name)
            return std::make_shared<const EngineRecord>(record_until(*record, i));
    return nullptr;
}

} // namespace

int run_explain(const QCommandLineParser& parser, Streams& streams)
{
    const QString format = parser.value(QStringLiteral("format"));
    const bool as_text = format.isEmpty() || format == QStringLiteral("text");
    if (!as_text && format != QStringLiteral("csv") && format != QStringLiteral("json")) {
        streams.err << "\"" << format << "\" is no format. Use --format text, --format csv or --format json.\n";
        return wrong_use;
    }
    auto history = open_history(parser);
    if (!history.has_value())
        return refuse(streams, history.error());
    const auto engine = chosen_engine(*history.value(), parser);
    if (!engine.has_value())
        return refuse(streams, engine.error());
    const auto loaded = storage::load_record(*history.value(), engine.value().id);
    if (!loaded.has_value())
        return refuse(streams, loaded.error());
    const QString wanted = parser.value(QStringLiteral("reading"));
    const auto record = up_to_reading(loaded.value().record, wanted);
    if (!record) {
        streams.err << "The engine has no reading \"" << wanted << "\". Leave --reading out for the newest.\n";
        return data_refused;
    }
    const Judgement judgement = judge(record);
    const Explanation explanation = explain(judgement);
    if (as_text) {
        const auto cards = find_cards(*history.value(), judgement);
        if (!cards)
            return refuse(streams, cards.error());
        write_text(streams.out, explanation, cards.value());
        return done;
    }
    TableOutput table(streams, format == QStringLiteral("json") ? TableOutput::Format::json : TableOutput::Format::csv,
                      {"vessel", "engine", "reading", "subject", "rank", "cause", "explained", "urgency", "limit_quantity",
                       "months_5", "months_50", "months_95"});
    write_rows(table, explanation);
    table.finish();
    return done;
}

} // namespace evenstroke::batch
