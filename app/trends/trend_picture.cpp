// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/trends/trend_picture.h"

#include "app/desk/number_text.h"
#include "app/trends/second_opinion_words.h"
#include "app/trends/trend_words.h"
#include "core/sentence_words.h"
#include "core/trend/flag_text.h"

#include <QCoreApplication>

#include <algorithm>
#include <cmath>
#include <limits>

namespace evenstroke {

namespace {

constexpr double day = 86400.0, three_years = 1096.0 * day, shortest_axis = 180.0 * day;
constexpr double gap = std::numeric_limits<double>::quiet_NaN(); // QCustomPlot interrupts a line there

QString tr_(const char* text) { return QCoreApplication::translate("evenstroke", text); }

double seconds(TimePoint time) { return static_cast<double>(time.time_since_epoch().count()); }
double time_of(const Judgement& judgement, std::size_t reading)
{
    return seconds(judgement.record->readings.at(reading).taken_at.utc);
}

std::optional<double> value_of(const TrendPoint& point, ValueView view)
{
    switch (view) {
    case ValueView::raw: return point.raw;
    case ValueView::corrected: return point.corrected;
    case ValueView::deviation: return point.deviation;
    case ValueView::apart: return point.apart;
    }
    return std::nullopt;
}

ValueView shown_view(const Trend& trend, ValueView wanted)
{
    const std::vector<ValueView> possible = possible_views(trend);
    if (std::find(possible.begin(), possible.end(), wanted) != possible.end())
        return wanted;
    return possible.empty() ? ValueView::raw : possible.back();
}

/// Half of the usual range, the same for values and deviations.
std::optional<double> usual_half(const Trend& trend)
{
    if (trend.usual_low && trend.usual_high)
        return 0.5 * (*trend.usual_high - *trend.usual_low);
    return std::nullopt;
}

/// The usual range holds for what it was learned from: apart of cylinders, deviation of the engine. Around the
/// expected value it is drawn with the same width.
void add_band(PicturePoint& shown, const Trend& trend, const TrendPoint& point, ValueView view)
{
    const bool of_cylinder = trend.place.kind == Place::Kind::cylinder;
    const ValueView learned_from = of_cylinder ? ValueView::apart : ValueView::deviation;
    if (view == learned_from) {
        const bool present = trend.points.empty() || point.stretch == trend.points.back().stretch;
        if (present) {
            shown.band_low = trend.usual_low;
            shown.band_high = trend.usual_high;
        }
        return;
    }
    const auto half = usual_half(trend);
    if (!point.expected || !half || (view != ValueView::raw && view != ValueView::corrected))
        return;
    // As read, the conditions of that day stay in: the expected value is moved by what the correction moved.
    const double moved = view == ValueView::raw && point.corrected ? point.raw - *point.corrected : 0.0;
    shown.band_low = *point.expected + moved - *half;
    shown.band_high = *point.expected + moved + *half;
}

double axis_start(const Judgement& judgement, const Trend& trend, TimeRange range)
{
    const double last = time_of(judgement, judgement.readings.back().reading);
    const double first = time_of(judgement, judgement.readings.front().reading);
    if (range == TimeRange::three_years)
        return std::max(first, last - three_years);
    if (range == TimeRange::since_overhaul && trend.current_start)
        return std::max(first, std::min(time_of(judgement, *trend.current_start), last - shortest_axis));
    return first;
}

QString words_of(ValueView view, const Trend& trend)
{
    switch (view) {
    case ValueView::raw: return tr_("as read");
    case ValueView::corrected: return tr_("corrected to reference conditions");
    case ValueView::deviation: return trend.own_level ? tr_("deviation from its own level") : tr_("deviation from the baseline");
    case ValueView::apart: return tr_("apart from the other cylinders");
    }
    return {};
}

QString axis_title(const TrendPicture& picture)
{
    return picture.unit_symbol.isEmpty() ? picture.view_words : tr_("%1, %2").arg(picture.unit_symbol, picture.view_words);
}

void add_points(TrendPicture& picture, const Judgement& judgement, const Trend& trend)
{
    int stretch = -1;
    for (const TrendPoint& point : trend.points) {
        const auto value = value_of(point, picture.view);
        const double time = time_of(judgement, point.reading);
        if (!value || time < picture.first_time)
            continue;
        PicturePoint shown;
        shown.time = time;
        shown.value = *value;
        shown.reading = point.reading;
        shown.unsteady = point.unsteady;
        shown.doubtful = point.doubtful;
        shown.starts_stretch = stretch >= 0 && point.stretch != stretch;
        stretch = point.stretch;
        if (point.reading < judgement.readings.size()) { // same order as the readings
            shown.load_percent = judgement.readings[point.reading].load_percent;
            shown.with_care = judgement.readings[point.reading].steadiness == Steadiness::usable_with_care;
        }
        add_band(shown, trend, point, picture.view);
        if (picture.view != ValueView::raw)
            shown.half_width = point.uncertainty;
        shown.spoken = spoken_point(picture, shown);
        picture.points.push_back(std::move(shown));
    }
}

void add_others(TrendPicture& picture, const Judgement& judgement)
{
    for (const Trend& trend : judgement.trends) {
        if (trend.quantity != picture.quantity || trend.place == picture.place)
            continue;
        PictureLine line;
        line.name = place_title(judgement.record->engine, trend.place, false);
        int stretch = -1;
        for (const TrendPoint& point : trend.points) {
            const auto value = value_of(point, picture.view);
            const double time = time_of(judgement, point.reading);
            if (!value || point.doubtful || time < picture.first_time)
                continue;
            if (stretch >= 0 && point.stretch != stretch) {
                line.times.push_back(time - 1.0);
                line.values.push_back(gap);
            }
            stretch = point.stretch;
            line.times.push_back(time);
            line.values.push_back(*value);
        }
        if (!line.times.empty())
            picture.others.push_back(std::move(line));
    }
}

void add_events(TrendPicture& picture, const Judgement& judgement)
{
    for (const Event& event : judgement.record->events) {
        const double time = seconds(event.date.utc);
        const bool concerns = event.place == picture.place || event.place.kind == Place::Kind::engine
                              || event.place.kind == Place::Kind::ship
                              || (picture.place.kind != Place::Kind::cylinder
                                  && event.place.kind != Place::Kind::cylinder);
        if (!concerns || time < picture.first_time || time > picture.last_time)
            continue;
        const EventKind* kind = find_event_kind(event.kind);
        PictureEvent shown;
        shown.time = time;
        shown.word = kind ? to_qstring(kind->title).toLower() : to_qstring(event.kind);
        shown.spoken = tr_("%1, %2: %3").arg(day_text(event.date.utc),
                                             place_title(judgement.record->engine, event.place, false), shown.word);
        if (!event.note.empty())
            shown.spoken += QStringLiteral(". ") + to_qstring(event.note);
        picture.events.push_back(std::move(shown));
    }
}

void add_evidence(TrendPicture& picture, const Judgement& judgement)
{
    const Place subject = picture.place.kind == Place::Kind::cylinder ? picture.place : Place::engine();
    const Evidence* evidence = judgement.find_evidence(subject);
    if (!evidence)
        return;
    picture.evidence_of = to_qstring(lower_first(subject_text(judgement.record->engine, subject)));
    picture.threshold = evidence->threshold;
    for (std::size_t i = 0; i < evidence->amount.size() && i < judgement.readings.size(); ++i) {
        const double time = time_of(judgement, judgement.readings[i].reading);
        if (time < picture.first_time)
            continue;
        picture.evidence_times.push_back(time);
        picture.evidence.push_back(evidence->amount[i].value_or(gap));
    }
}

} // namespace

std::vector<ValueView> possible_views(const Trend& trend)
{
    std::vector<ValueView> views;
    for (const ValueView view : {ValueView::raw, ValueView::corrected, ValueView::deviation, ValueView::apart})
        if (std::any_of(trend.points.begin(), trend.points.end(),
                        [view](const TrendPoint& point) { return value_of(point, view).has_value(); }))
            views.push_back(view);
    return views;
}

TrendPicture make_trend_picture(const Judgement& judgement, const Selection& selection)
{
    TrendPicture picture;
    if (!selection.quantity || judgement.readings.empty() || !judgement.record)
        return picture;
    const Trend* trend = judgement.find_trend(*selection.quantity, selection.place);
    if (!trend || trend->points.empty())
        return picture;
    picture.quantity = trend->quantity;
    picture.place = trend->place;
    picture.place_name = place_title(judgement.record->engine, trend->place, false);
    picture.unit_symbol = unit_text(trend->quantity);
    picture.decimals = decimals_of(trend->quantity);
    picture.view = shown_view(*trend, selection.view);
    picture.difference = picture.view == ValueView::deviation || picture.view == ValueView::apart;
    picture.view_words = words_of(picture.view, *trend);
    picture.axis_title = axis_title(picture);
    picture.first_time = axis_start(judgement, *trend, selection.range);
    picture.last_time = time_of(judgement, judgement.readings.back().reading);
    add_points(picture, judgement, *trend);
    if (std::any_of(picture.points.begin(), picture.points.end(), [](const PicturePoint& p) { return p.band_low; }))
        picture.band_name = picture.difference ? tr_("usual range of this engine") : tr_("expected at the load of the day");
    add_others(picture, judgement);
    add_events(picture, judgement);
    add_evidence(picture, judgement);
    add_second_opinions(picture, judgement);
    add_trend_words(picture, judgement, *trend);
    return picture;
}

} // namespace evenstroke
