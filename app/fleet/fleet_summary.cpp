// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/fleet/fleet_summary.h"

#include "app/desk/number_text.h"
#include "core/explanation/work_outcome.h"
#include "core/trend/flag_text.h"
#include "core/trend/fleet_strips.h"

#include <QCoreApplication>
#include <QDataStream>
#include <QIODevice>

#include <algorithm>
#include <cmath>
#include <set>

namespace evenstroke {

namespace {

constexpr quint16 layout_version = 5;
constexpr std::size_t points_in_a_strip = 36; // three years of monthly readings

QString tr_(const char* text) { return QCoreApplication::translate("evenstroke", text); }

/// Values in the trend's own standard deviations; empty where its noise is not known yet.
std::vector<float> standardised(const Trend& trend)
{
    std::vector<float> values;
    if (!trend.noise || !(*trend.noise > 0.0) || !trend.usual_low || !trend.usual_high)
        return values;
    const double centre = 0.5 * (*trend.usual_low + *trend.usual_high);
    const std::size_t first = trend.points.size() > points_in_a_strip ? trend.points.size() - points_in_a_strip : 0;
    for (std::size_t i = first; i < trend.points.size(); ++i) {
        const TrendPoint& point = trend.points[i];
        const auto value = trend.place.kind == Place::Kind::cylinder ? point.apart : point.deviation;
        if (value && !point.doubtful)
            values.push_back(static_cast<float>((*value - centre) / *trend.noise));
    }
    return values;
}

double newest_size(const std::vector<float>& values)
{
    const std::size_t count = std::min<std::size_t>(3, values.size());
    double sum = 0.0;
    for (std::size_t i = values.size() - count; i < values.size(); ++i)
        sum += values[i];
    return count == 0 ? 0.0 : std::abs(sum) / static_cast<double>(count);
}

std::vector<FleetStrip> make_strips(const Judgement& judgement)
{
    std::vector<FleetStrip> strips(all_fleet_strips().size());
    std::vector<double> sizes(strips.size());
    for (const Trend& trend : judgement.trends) {
        const auto group = find_fleet_strip(quantity(trend.quantity));
        if (!group)
            continue;
        FleetStrip& strip = strips[*group];
        std::vector<float> values = standardised(trend);
        const double size = newest_size(values);
        if (values.empty() || trend.level < strip.level
            || (trend.level == strip.level && size <= sizes[*group] && !strip.values.empty()))
            continue;
        strip.level = trend.level;
        strip.values = std::move(values);
        strip.title = tr_("%1, %2").arg(quantity_title(trend.quantity),
                                        place_title(judgement.record->engine, trend.place, false));
        sizes[*group] = size;
    }
    return strips;
}

QString note_sentence(const Judgement& judgement)
{
    for (const Trend& trend : judgement.trends)
        if (trend.level == Level::note)
            return tr_("%1, %2: look again at the next reading.")
                .arg(quantity_title(trend.quantity), place_title(judgement.record->engine, trend.place, false));
    return {};
}

} // namespace

FleetSummary summarise(const Judgement& judgement)
{
    FleetSummary summary;
    summary.level = judgement.level;
    summary.readings = static_cast<int>(judgement.readings.size());
    if (!judgement.record)
        return summary;
    for (const ReadingJudgement& reading : judgement.readings) {
        const TimePoint time = judgement.record->readings.at(reading.reading).taken_at.utc;
        summary.last_reading = time;
        if (reading.steadiness != Steadiness::unsteady && !reading.poor)
            summary.last_usable = time;
    }
    std::set<Place> places;
    const std::vector<const Flag*> flags = judgement.standing_flags();
    for (const Flag* flag : flags) {
        places.insert(flag->subject);
        summary.limit_passed = summary.limit_passed || (flag->absolute_limit && !flag->seen());
    }
    summary.places_concerned = static_cast<int>(places.size());
    if (!flags.empty()) {
        const Flag& worst = *flags.front();
        summary.seen = worst.seen(); // those that were not stand first
        summary.sentence = to_qstring(short_sentence(worst, judgement.record->engine));
        if (summary.seen)
            summary.sentence = tr_("Seen %1: %2").arg(day_text(worst.note->written_at), summary.sentence);
        summary.worsening = worst.ramp;
        summary.excess = worst.threshold > 0.0 ? worst.evidence / worst.threshold : 0.0;
    } else if (const QString without_effect = to_qstring(work_without_effect(judgement)); !without_effect.isEmpty()) {
        summary.level = std::max(summary.level, Level::note); // the comparison began anew, and nothing else would say it
        summary.sentence = without_effect;
    } else if (summary.level == Level::note) {
        summary.sentence = note_sentence(judgement);
    }
    summary.strips = make_strips(judgement);
    return summary;
}

std::optional<int> days_late(const FleetSummary& summary, TimePoint now)
{
    if (!summary.last_usable)
        return std::nullopt;
    const auto days = std::chrono::floor<std::chrono::days>(now - *summary.last_usable).count();
    return days > late_after_days ? std::optional(static_cast<int>(days)) : std::nullopt;
}

int trouble_rank(const FleetSummary& summary, TimePoint now)
{
    if (summary.limit_passed)
        return 0;
    if (summary.seen)
        return !summary.last_usable || days_late(summary, now) ? 4 : 7;
    if (summary.level == Level::act)
        return summary.worsening ? 1 : 2;
    if (summary.level == Level::watch && summary.worsening)
        return 3;
    if (!summary.last_usable || days_late(summary, now))
        return 4;
    switch (summary.level) {
    case Level::watch: return 5;
    case Level::ask: return 6;
    case Level::note: return 7;
    default: return 8;
    }
}

QByteArray pack(const FleetSummary& summary)
{
    QByteArray bytes;
    QDataStream out(&bytes, QIODevice::WriteOnly);
    out.setVersion(QDataStream::Qt_6_4);
    out.setFloatingPointPrecision(QDataStream::SinglePrecision);
    const auto seconds = [](const std::optional<TimePoint>& time) {
        return time ? static_cast<qint64>(time->time_since_epoch().count()) : std::numeric_limits<qint64>::min();
    };
    out << layout_version << static_cast<qint8>(summary.level) << summary.seen << summary.limit_passed << summary.worsening
        << summary.excess << summary.places_concerned << summary.readings << seconds(summary.last_reading)
        << seconds(summary.last_usable) << summary.sentence << static_cast<qint32>(summary.strips.size());
    for (const FleetStrip& strip : summary.strips) {
        out << static_cast<qint8>(strip.level) << strip.title
            << static_cast<qint32>(strip.values.size());
        for (const float value : strip.values)
            out << value;
    }
    return bytes;
}

std::optional<FleetSummary> unpack(const QByteArray& bytes)
{
    QDataStream in(bytes);
    in.setVersion(QDataStream::Qt_6_4);
    in.setFloatingPointPrecision(QDataStream::SinglePrecision);
    quint16 layout = 0;
    in >> layout;
    if (layout != layout_version)
        return std::nullopt;
    FleetSummary summary;
    qint8 level = 0;
    qint64 last = 0, usable = 0;
    qint32 strips = 0;
    in >> level >> summary.seen >> summary.limit_passed >> summary.worsening >> summary.excess >> summary.places_concerned
        >> summary.readings >> last >> usable >> summary.sentence >> strips;
    const auto time = [](qint64 seconds) {
        return seconds == std::numeric_limits<qint64>::min()
                   ? std::nullopt
                   : std::optional(TimePoint(std::chrono::seconds(seconds)));
    };
    summary.level = static_cast<Level>(level);
    summary.last_reading = time(last);
    summary.last_usable = time(usable);
    for (qint32 s = 0; s < strips && in.status() == QDataStream::Ok; ++s) {
        FleetStrip strip;
        qint8 strip_level = 0;
        qint32 values = 0;
        in >> strip_level >> strip.title >> values;
        strip.level = static_cast<Level>(strip_level);
        for (qint32 i = 0; i < values && in.status() == QDataStream::Ok; ++i) {
            float value = 0.0F;
            in >> value;
            strip.values.push_back(value);
        }
        summary.strips.push_back(std::move(strip));
    }
    if (in.status() != QDataStream::Ok)
        return std::nullopt;
    return summary;
}

} // namespace evenstroke
