// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/batch/report_command.h"

#include "app/batch/engines.h"
#include "app/batch/long_work.h"
#include "app/cards/card_shelf.h"
#include "app/survey/report_sources.h"
#include "app/survey/report_writer.h"

#include <algorithm>
#include <chrono>

namespace evenstroke::batch {
namespace {

using namespace std::chrono_literals;

/// A day of the command line; a sentence on err and nothing where it is none.
std::optional<TimePoint> read_day(const QCommandLineParser& parser, const char* option, Streams& streams)
{
    const auto day = parse_date(parser.value(QString::fromUtf8(option)).toStdString());
    if (day.has_value())
        return day.value().utc;
    streams.err << "--" << option << ": " << QString::fromStdString(day.error().text()) << "\n";
    return std::nullopt;
}

/// Nobody can report of days to come. A ship whose clock is ahead of this machine's has its readings all the same.
TimePoint end_of_period(TimePoint to, const std::vector<Reading>& readings)
{
    const TimePoint today = std::chrono::floor<std::chrono::seconds>(std::chrono::system_clock::now());
    const TimePoint known = readings.empty() ? today : std::max(today, readings.back().taken_at.utc);
    return std::min(to, TimePoint(std::chrono::floor<std::chrono::days>(known)));
}

/// All readings of the period where nothing is said, since whoever writes a period wants it; a sentence on err and nothing where it is none of the words.
std::optional<ReportDepth> read_depth(const QCommandLineParser& parser, Streams& streams)
{
    const QString word = parser.value(QStringLiteral("depth"));
    if (word.isEmpty() || word == QLatin1String("full"))
        return ReportDepth::full;
    if (word == QLatin1String("usual"))
        return ReportDepth::usual;
    if (word == QLatin1String("brief"))
        return ReportDepth::brief;
    streams.err << "--depth: “" << word << "” is no depth of a report. Write brief, usual or full.\n";
    return std::nullopt;
}

} // namespace

int run_report(const QCommandLineParser& parser, Streams& streams)
{
    const auto from = read_day(parser, "from", streams), to = read_day(parser, "to", streams);
    if (!from || !to)
        return wrong_use;
    if (*to < *from) {
        streams.err << "The period ends on " << parser.value(QStringLiteral("to")) << ", before it begins on "
                    << parser.value(QStringLiteral("from")) << ". Give the earlier day to --from.\n";
        return wrong_use;
    }
    const auto depth = read_depth(parser, streams);
    if (!depth)
        return wrong_use;
    std::optional<TimePoint> date;
    if (parser.isSet(QStringLiteral("date"))) {
        const auto given = read_day(parser, "date", streams);
        if (!given)
            return wrong_use;
        date = *given;
    }
    auto history = open_history(parser);
    if (!history.has_value())
        return refuse(streams, history.error());
    const auto engine = chosen_engine(*history.value(), parser);
    if (!engine.has_value())
        return refuse(streams, engine.error());
    const auto sources = load_report_sources(*history.value(), engine.value().id);
    if (!sources.has_value())
        return refuse(streams, sources.error());
    ReportDetails details = sources.value().details;
    const TimePoint end = end_of_period(*to, sources.value().record->readings);
    if (end < *to)
        streams.err << "The period ends on " << QString::fromStdString(date_text(end)) << ": the days to "
                    << QString::fromStdString(date_text(*to)) << " are still to come.\n";
    details.date = date.value_or(end);
    details.depth = *depth;
    details.program_version = EVENSTROKE_VERSION;
    const ReportPeriod period{*from, end + 24h - 1s};
    const Judgement judgement = judge(sources.value().record);
    details.cards = review_newest_cards(*history.value(), judgement, period.from, period.to);
    const SurveyReport report = make_survey_report(judgement, period, details);
    const QString path = parser.value(QStringLiteral("out"));
    const auto written = write_survey_pdf(report, path);
    if (!written.has_value())
        return refuse(streams, written.error());
    streams.out << "report written to " << path << "\n";
    return done;
}

} // namespace evenstroke::batch
