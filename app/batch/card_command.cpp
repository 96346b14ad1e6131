// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/batch/card_command.h"

#include "app/batch/long_work.h"
#include "core/card/card_values.h"
#include "core/card/evaluation.h"
#include "core/plain_text.h"
#include "core/units/unit_catalogue.h"
#include "storage/card_with_gaps.h"
#include "storage/engine_json.h"

#include <QDir>
#include <QFileInfo>
#include <QFuture>
#include <QJsonArray>
#include <QJsonDocument>
#include <QJsonObject>
#include <QtConcurrentMap>

#include <cmath>

namespace evenstroke::batch {
namespace {

using indicator::CardResult;
using indicator::Conditions;
using indicator::Evaluation;

/// A number typed after an option, within what can be.
struct NumberOption
{
    const char* name;
    double lowest, highest;
    const char* unit;
};

/// Nothing where the option is not there. @par Problems invalid_input: no number, or outside what can be
Result<std::optional<double>> read_option(const QCommandLineParser& parser, const NumberOption& option)
{
    const QString name = QString::fromUtf8(option.name);
    if (!parser.isSet(name))
        return std::optional<double>();
    const std::string text = parser.value(name).toStdString();
    const Result<double> number = parse_number(text);
    if (number && number.value() >= option.lowest && number.value() <= option.highest)
        return std::optional<double>(number.value());
    return invalid_input("--" + std::string(option.name) + " " + evenstroke::quoted(text) + " is not a number from " +
                             short_number_text(option.lowest) + " to " + short_number_text(option.highest) + " " +
                             option.unit + ".",
                         "Write it in " + std::string(option.unit) + ", or leave the option out.");
}

Result<Conditions> read_conditions(const QCommandLineParser& parser)
{
    Conditions conditions;
    const auto speed = read_option(parser, {"speed-rpm", 5.0, 6000.0, "r/min"});
    if (!speed)
        return speed.error();
    const auto scavenge = read_option(parser, {"scavenge-pressure-bar-abs", 0.3, 12.0, "bar abs"});
    if (!scavenge)
        return scavenge.error();
    const auto charge = read_option(parser, {"charge-temperature-k", 230.0, 700.0, "K"});
    if (!charge)
        return charge.error();
    if (speed.value())
        conditions.speed = per_minute(*speed.value());
    if (scavenge.value())
        conditions.scavenge_pressure = bar_absolute(*scavenge.value());
    if (charge.value())
        conditions.charge_temperature = Temperature::from_value(*charge.value());
    return conditions;
}

QJsonValue number(double value) { return std::isfinite(value) ? QJsonValue(value) : QJsonValue(); }

QJsonObject as_json(const QString& file, const Evaluation& card)
{
    QJsonObject object{{"file", file}, {"cycles", static_cast<int>(card.cycles)}};
    QJsonObject uncertainty;
    for (std::size_t i = 0; i < indicator::result_count; ++i) {
        const QString key = QString::fromStdString(describe(static_cast<CardResult>(i)).key);
        const auto& estimate = card.results[i];
        object.insert(key, estimate ? number(estimate->value) : QJsonValue());
        uncertainty.insert(key, estimate && estimate->half_width ? number(*estimate->half_width) : QJsonValue());
    }
    QJsonArray remarks;
    for (const indicator::Remark& remark : card.remarks)
        remarks.append(QJsonObject{{"code", QString::fromStdString(remark.code)}, {"text", QString::fromStdString(remark.text)}});
    object.insert(QStringLiteral("uncertainty"), uncertainty);
    object.insert(QStringLiteral("remarks"), remarks);
    return object;
}

/// One trace: its object, or why there is none.
struct Answer
{
    QJsonObject object;
    std::optional<Problem> problem;
};

Answer evaluate_file(const Engine& engine, Conditions conditions, const QString& file)
{
    auto read = storage::read_card_with_gaps(file);
    if (!read)
        return {{}, read.error()};
    storage::CardTrace& recorded = read.value();
    indicator::Trace trace{std::move(recorded.cycle), std::move(recorded.crank_angle_deg), std::move(recorded.pressure_bar)};
    conditions.barometer_assumed = recorded.gauge;
    if (recorded.gauge)
        for (double& pressure : trace.pressure)
            pressure += indicator::usual_barometer;
    const auto card = indicator::evaluate(engine, conditions, trace);
    if (card)
        return {as_json(file, card.value()), {}};
    Problem problem = card.error();
    problem.what_happened = QFileInfo(file).fileName().toStdString() + ": " + problem.what_happened;
    return {{}, std::move(problem)};
}

/// The files named; of a folder those of its cards, in the order of their names.
QStringList trace_files(const QStringList& named)
{
    QStringList files;
    for (const QString& name : named)
        if (QFileInfo(name).isDir()) {
            const QDir folder(name);
            for (const QString& file : folder.entryList({QStringLiteral("*.csv")}, QDir::Files, QDir::Name))
                files << folder.filePath(file);
        } else {
            files << name;
        }
    return files;
}

/// In the order of the files; a few at a time, so that the first answers need not wait in memory for the last.
bool evaluate_all(const Engine& engine, const Conditions& conditions, const QStringList& files, Streams& streams,
                  std::vector<Answer>& answers)
{
    constexpr qsizetype at_once = 64;
    listen_for_stop();
    const storage::Progress progress = progress_line(streams, QStringLiteral("evaluating cards"));
    for (qsizetype first = 0; first < files.size(); first += at_once) {
        if (!progress(static_cast<int>(first), static_cast<int>(files.size())))
            return false;
        const QStringList part = files.mid(first, at_once);
        const QList<Answer> found = QtConcurrent::blockingMapped<QList<Answer>>(
            part, [&](const QString& file) { return evaluate_file(engine, conditions, file); });
        answers.insert(answers.end(), found.begin(), found.end());
    }
    progress(static_cast<int>(files.size()), static_cast<int>(files.size()));
    return true;
}

int print(const std::vector<Answer>& answers, Streams& streams)
{
    int code = done;
    QJsonArray array;
    for (const Answer& answer : answers) {
        if (answer.problem)
            code = std::max(code, refuse(streams, *answer.problem));
        else
            array.append(answer.object);
    }
    if (!array.isEmpty())
        streams.out << QString::fromUtf8(QJsonDocument(array).toJson());
    streams.out.flush();
    return code;
}

} // namespace

int run_card(const QCommandLineParser& parser, Streams& streams)
{
    const QStringList files = trace_files(parser.positionalArguments());
    if (files.isEmpty()) {
        streams.err << "Name at least one card: a file with crank_angle_deg,pressure_bar, or a folder of them.\n";
        return wrong_use;
    }
    const auto conditions = read_conditions(parser);
    if (!conditions) {
        streams.err << QString::fromStdString(conditions.error().text()) << "\n";
        return wrong_use;
    }
    const auto document = storage::read_engine_file(parser.value(QStringLiteral("engine")));
    if (!document)
        return refuse(streams, document.error());
    std::vector<Answer> answers;
    if (!evaluate_all(document.value().engine, conditions.value(), files, streams, answers)) {
        streams.err << "Stopped.\n";
        return data_refused;
    }
    return print(answers, streams);
}

} // namespace evenstroke::batch
