// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/batch/judging_commands.h"

#include "app/batch/engines.h"
#include "app/batch/table_output.h"
#include "core/trend/conditions.h"
#include "core/derived/derived.h"
#include "storage/written_unit.h"

#include <algorithm>
#include <cmath>
#include <tuple>

namespace evenstroke::batch {
namespace {

using Cell = TableOutput::Cell;

/// A judged value in the unit it was typed in: `own = scale * typed + shift`.
struct InTypedUnit
{
    double scale, shift;
    Cell point(std::optional<double> own) const { return own ? Cell((*own - shift) / scale) : Cell(); }
    Cell difference(std::optional<double> own) const { return own ? Cell(*own / scale) : Cell(); }
};

/// As in the file: a plain number has no unit there.
std::string unit_cell(const Value& typed)
{
    const bool bare = typed.unit_typed.empty() && unit(typed.unit).dimension == Dimension::number;
    return bare ? std::string() : storage::written_unit(typed);
}

/// All numbers of a reading in walking order; without a judgement those that could not be brought to their
/// quantity's unit (a volume flow without density), which are shown as typed all the same.
std::vector<std::pair<std::size_t, const JudgedValue*>> numbers_of(const Reading& reading,
                                                                   const ReadingJudgement& judged)
{
    std::vector<const JudgedValue*> judgement(reading.values.size(), nullptr);
    for (const JudgedValue& value : judged.values)
        judgement[value.value_index] = &value;
    std::vector<std::pair<std::size_t, const JudgedValue*>> numbers;
    for (std::size_t i = 0; i < reading.values.size(); ++i)
        if (judgement[i] || (reading.values[i].number && reading.values[i].phase == Phase::reading))
            numbers.emplace_back(i, judgement[i]);
    std::stable_sort(numbers.begin(), numbers.end(), [&](const auto& a, const auto& b) {
        const Value &x = reading.values[a.first], &y = reading.values[b.first];
        return std::tie(x.quantity, x.place) < std::tie(y.quantity, y.place);
    });
    return numbers;
}

void evaluate_reading(TableOutput& table, const Judgement& judgement, const ReadingJudgement& judged)
{
    const EngineRecord& record = *judgement.record;
    const Reading& reading = record.readings[judged.reading];
    const Conditions conditions = find_conditions(record.engine, reading);
    for (const auto& [index, found] : numbers_of(reading, judged)) {
        const Value& typed = reading.values[index];
        const auto own = own_value(typed, conditions);
        const bool usable = found && own && own->scale != 0.0;
        const InTypedUnit in{usable ? own->scale : 1.0, usable ? own->shift : 0.0};
        const JudgedValue value = usable ? *found : JudgedValue{};
        table.row({record.vessel.name, record.engine.name, reading.name, utc_text(reading.taken_at.utc),
                   quantity(typed.quantity).name,
                   typed.place_typed.empty() ? place_cell(record.engine, typed.place) : typed.place_typed, typed.typed,
                   unit_cell(typed), in.point(value.corrected), in.point(value.expected),
                   in.difference(value.deviation), in.difference(value.apart), in.difference(value.uncertainty)});
    }
}

/// Twelve significant digits: what a computed number can be held to.
Cell computed(std::optional<double> value)
{
    if (!value || *value == 0.0 || !std::isfinite(*value))
        return TableOutput::number(value);
    const double scale = std::pow(10.0, 11.0 - std::floor(std::log10(std::abs(*value))));
    const double rounded = std::round(*value * scale) / scale;
    return std::isfinite(rounded) ? Cell(rounded) : Cell(*value);
}

/// The computed quantities of a reading.
void derive_reading(TableOutput& table, const Judgement& judgement, const ReadingJudgement& judged, const Baseline& baseline)
{
    const EngineRecord& record = *judgement.record;
    const Reading& reading = record.readings[judged.reading];
    for (const DerivedValue& row : derive(record.engine, baseline, reading))
        table.row({record.vessel.name, record.engine.name, reading.name, utc_text(reading.taken_at.utc),
                   std::string(row.quantity), place_cell(record.engine, row.place), computed(row.value),
                   std::string(row.unit), computed(row.corrected), computed(row.expected), computed(row.deviation), Cell(),
                   computed(row.uncertainty)});
}

/// @param has_found  asked at the end; false: nothing was meant, and no table is written
int with_table(const QCommandLineParser& parser, Streams& streams, std::vector<std::string> header,
               const std::function<void(TableOutput&, const Judgement&)>& rows,
               const std::function<bool()>& has_found = [] { return true; })
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
    if (has_found())
        table.finish();
    return done;
}

} // namespace

int run_evaluate(const QCommandLineParser& parser, Streams& streams)
{
    const bool derived = parser.isSet(QStringLiteral("derived"));
    const QString wanted = parser.value(QStringLiteral("reading"));
    bool found = wanted.isEmpty();
    const int code = with_table(
        parser, streams,
        {"vessel", "engine", "reading", "taken_at", "quantity", "cylinder", "value", "unit", "corrected", "expected",
         "deviation", "apart", "uncertainty"},
        [&](TableOutput& table, const Judgement& judgement) {
            const Baseline baseline = derived ? Baseline(judgement.record->engine) : Baseline();
            for (const ReadingJudgement& reading : judgement.readings)
                if (wanted.isEmpty() ||
                    QString::fromStdString(judgement.record->readings[reading.reading].name) == wanted) {
                    found = true;
                    evaluate_reading(table, judgement, reading);
                    if (derived)
                        derive_reading(table, judgement, reading, baseline);
                }
        },
        [&] { return found; });
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
                                         flag.first_chance_sentence.empty()
                                             ? flag.first_sentence
                                             : flag.first_sentence + " " + flag.first_chance_sentence});
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
