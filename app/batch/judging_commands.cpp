// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/batch/judging_commands.h"

#include "app/batch/engines.h"
#include "app/batch/table_output.h"
#include "core/trend/conditions.h"

#include <algorithm>

namespace evenstroke::batch {
namespace {

using Cell = TableOutput::Cell;

/// A judged value in the unit it was typed in: `own = scale * typed + shift`.
struct InTypedUnit
{
    double number, raw, scale;
    Cell point(std::optional<double> own) const { return own ? Cell(number + (*own - raw) / scale) : Cell(); }
    Cell difference(std::optional<double> own) const { return own ? Cell(*own / scale) : Cell(); }
};

void evaluate_reading(TableOutput& table, const Judgement& judgement, const ReadingJudgement& judged)
{
    const EngineRecord& record = *judgement.record;
    const Reading& reading = record.readings[judged.reading];
    const Conditions conditions = find_conditions(record.engine, reading);
    for (const JudgedValue& value : judged.values) {
        const Value& typed = reading.values[value.value_index];
        const auto own = own_value(typed, conditions);
        if (!own || own->scale == 0.0)
            continue;
        const InTypedUnit in{*typed.number, own->value, own->scale};
        table.row({record.vessel.name, record.engine.name, reading.name, utc_text(reading.taken_at.utc),
                   quantity(value.quantity).name,
                   typed.place_typed.empty() ? place_cell(record.engine, value.place) : typed.place_typed, typed.typed,
                   typed.unit_typed.empty() ? std::string(unit(typed.unit).symbol) : typed.unit_typed, in.point(value.corrected), in.point(value.expected),
                   in.difference(value.deviation), in.difference(value.apart), in.difference(value.uncertainty)});
    }
}

int with_table(const QCommandLineParser& parser, Streams& streams, std::vector<std::string> header,
               const std::function<void(TableOutput&, const Judgement&)>& rows)
{
    const auto format = TableOutput::read_format(parser, streams);
    if (!format)
        return wrong_use;
    auto history = open_history(parser);
    if (!history.has_value())
        return refuse(streams, history.error());
    const auto engines = chosen_engines(*history.value(), parser);
    if (!engines.has_value())
        return refuse(streams, engines.error());
    TableOutput table(streams, *format, std::move(header));
    const auto finished = for_each_judgement(*history.value(), engines.value(), streams,
                                             [&](const Judgement& judgement) { rows(table, judgement); });
    if (!finished.has_value())
        return refuse(streams, finished.error());
    table.finish();
    return done;
}

} // namespace

int run_evaluate(const QCommandLineParser& parser, Streams& streams)
{
    if (parser.isSet(QStringLiteral("derived"))) {
        streams.err << "--derived is not in this version yet. Leave it out.\n";
        return wrong_use;
    }
    const QString wanted = parser.value(QStringLiteral("reading"));
    bool found = wanted.isEmpty();
    const int code = with_table(
        parser, streams,
        {"vessel", "engine", "reading", "taken_at", "quantity", "cylinder", "value", "unit", "corrected", "expected",
         "deviation", "apart", "uncertainty"},
        [&](TableOutput& table, const Judgement& judgement) {
            for (const ReadingJudgement& reading : judgement.readings)
                if (wanted.isEmpty() ||
                    QString::fromStdString(judgement.record->readings[reading.reading].name) == wanted) {
                    found = true;
                    evaluate_reading(table, judgement, reading);
                }
        });
    if (code == done && !found) {
        streams.err << "No chosen engine has a reading \"" << wanted << "\". Leave --reading out to see all.\n";
        return data_refused;
    }
    return code;
}

int run_flags(const QCommandLineParser& parser, Streams& streams)
{
    return with_table(parser, streams,
                      {"vessel", "engine", "flagged_at", "subject", "quantity", "severity", "sentence"},
                      [](TableOutput& table, const Judgement& judgement) {
                          const EngineRecord& record = *judgement.record;
                          for (const Flag& flag : judgement.flags)
                              table.row({record.vessel.name, record.engine.name,
                                         utc_text(record.readings[flag.reading].taken_at.utc),
                                         flag.subject.kind == Place::Kind::cylinder
                                             ? "cylinder " + record.engine.cylinder_name(flag.subject.number)
                                             : std::string("engine"),
                                         quantity(flag.first_quantity).name, level_word(flag.severity),
                                         flag.first_sentence});
                      });
}

int run_doubts(const QCommandLineParser& parser, Streams& streams)
{
    return with_table(parser, streams, {"vessel", "engine", "reading", "quantity", "cylinder", "verdict"},
                      [](TableOutput& table, const Judgement& judgement) {
                          const EngineRecord& record = *judgement.record;
                          for (const Doubt& doubt : judgement.doubts)
                              table.row({record.vessel.name, record.engine.name, record.readings[doubt.reading].name,
                                         doubt.quantity ? quantity(*doubt.quantity).name : std::string(),
                                         doubt.place ? place_cell(record.engine, *doubt.place) : std::string(),
                                         verdict_name(doubt.verdict)});
                      });
}

} // namespace evenstroke::batch
