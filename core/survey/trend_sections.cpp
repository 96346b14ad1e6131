// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/survey/survey_context.h"
#include "core/survey/trend_plots.h"

#include <algorithm>

namespace evenstroke::report {

double seconds(TimePoint time) { return static_cast<double>(time.time_since_epoch().count()); }

namespace {

std::optional<double> amount_of(const TrendPoint& point, View view)
{
    switch (view) {
    case View::raw: return point.raw;
    case View::deviation: return point.deviation;
    case View::apart: break;
    }
    return point.apart;
}

/// "bar, as read"; a number without a unit: "As read".
std::string with_unit_before(const std::string& unit, const std::string& words)
{
    return unit.empty() ? upper_first(words) : unit + ", " + words;
}

bool flagged(const Context& context, QuantityId id, const Place& place)
{
    return std::any_of(context.flags.begin(), context.flags.end(), [&](const Flag* flag) {
        return flag->subject == place
               && (flag->quantity == id || std::any_of(flag->moved.begin(), flag->moved.end(), [&](const MovedQuantity& moved) { return moved.quantity == id; }));
    });
}

void add_limits(const Context& context, const Quantity& of, Plot& plot)
{
    for (const AbsoluteLimit& limit : context.engine.limits) {
        if (limit.quantity != of.name)
            continue;
        if (limit.high)
            plot.limits.push_back({*limit.high, "limit, high: " + rounded_text(*limit.high, of.decimals)});
        if (limit.low)
            plot.limits.push_back({*limit.low, "limit, low: " + rounded_text(*limit.low, of.decimals)});
    }
}

bool has_limit(const Context& context, const Quantity& of)
{
    return std::any_of(context.engine.limits.begin(), context.engine.limits.end(), [&](const AbsoluteLimit& limit) { return limit.quantity == of.name; });
}

/// Hatched until so many usable readings stand in a stretch that a flag is possible.
void add_learning(const Context& context, const Trend& trend, Plot& plot)
{
    std::map<int, std::pair<Plot::Stretch, int>> stretches; // with the number of usable points so far
    for (const TrendPoint& point : trend.points) {
        const double at = seconds(context.record.readings[point.reading].taken_at.utc);
        auto& [stretch, usable_points] = stretches.try_emplace(point.stretch, Plot::Stretch{at, at}, 0).first->second;
        if (usable_points >= trend.needed)
            continue;
        stretch.to = at;
        usable_points += point.unsteady || point.doubtful ? 0 : 1;
    }
    for (const auto& [number, part] : stretches) {
        const Plot::Stretch shown{std::max(part.first.from, plot.from), std::min(part.first.to, plot.to)};
        if (shown.to > shown.from)
            plot.learning.push_back(shown);
    }
}

} // namespace

Plot empty_plot(const Context& context)
{
    Plot plot;
    plot.from = seconds(context.period.from);
    plot.to = seconds(end_of_day(context.period.to));
    return plot;
}

PlotLine trend_line(const Context& context, const Trend& trend, View view)
{
    PlotLine line{upper_first(place_words(context.engine, trend.place)), {}, false, false};
    for (const TrendPoint& point : trend.points) {
        const TimePoint at = context.record.readings[point.reading].taken_at.utc;
        const auto amount = amount_of(point, view);
        if (!amount || !context.contains(at))
            continue;
        line.points.push_back({seconds(at), *amount,
                               point.doubtful ? PlotPoint::Mark::crossed : point.unsteady ? PlotPoint::Mark::hollow : PlotPoint::Mark::filled});
    }
    return line;
}

void add_events(const Context& context, const Place& subject, Plot& plot)
{
    const bool of_cylinder = subject.kind == Place::Kind::cylinder;
    for (const Event* event : context.events) {
        const bool on_cylinder = event->place.kind == Place::Kind::cylinder;
        const bool on_machine = event->place.kind == Place::Kind::turbocharger || event->place.kind == Place::Kind::cooler;
        const bool concerns = event->place == subject || (of_cylinder ? !on_cylinder && !on_machine : !on_cylinder);
        if (concerns)
            plot.events.push_back({seconds(event->date.utc), lower_first(event_title(*event))});
    }
}

Plot trend_plot(const Context& context, const Trend& trend, View view)
{
    const Quantity& of = quantity(trend.quantity);
    Plot plot = empty_plot(context);
    plot.title = of.title + (trend.place.number > 0 ? ", " + place_words(context.engine, trend.place) : "");
    plot.value_title = view == View::raw     ? with_unit_before(unit_of(of), "as read")
                       : view == View::apart ? with_unit_before(deviation_unit(of), "apart from the other cylinders")
                       : trend.own_level     ? with_unit_before(deviation_unit(of), "deviation from its own level")
                                             : with_unit_before(deviation_unit(of), "deviation from the baseline");
    plot.lines = {trend_line(context, trend, view)};
    plot.lines.front().in_question = true;
    const bool banded = (view == View::apart && trend.place.kind == Place::Kind::cylinder)
                        || (view == View::deviation && trend.place.kind != Place::Kind::cylinder);
    if (banded && trend.usual_low && trend.usual_high)
        plot.band = Plot::Band{*trend.usual_low, *trend.usual_high, "usual range"};
    if (view == View::raw)
        add_limits(context, of, plot);
    add_learning(context, trend, plot);
    add_events(context, trend.place, plot);
    return plot;
}

namespace {

/// All cylinders of a quantity: those with a flag strong and labelled, the others quiet.
Plot cylinders_plot(const Context& context, const Quantity& of, const std::vector<const Trend*>& trends, View view)
{
    Plot plot = empty_plot(context);
    plot.title = of.title + ", all cylinders";
    plot.value_title = view == View::raw ? with_unit_before(unit_of(of), "as read")
                                         : with_unit_before(deviation_unit(of), "apart from the other cylinders");
    for (const Trend* trend : trends) {
        PlotLine line = trend_line(context, *trend, view);
        line.in_question = flagged(context, of.id, trend->place);
        if (!line.points.empty())
            plot.lines.push_back(std::move(line));
    }
    std::stable_partition(plot.lines.begin(), plot.lines.end(), [](const PlotLine& line) { return !line.in_question; });
    if (view == View::raw)
        add_limits(context, of, plot);
    return plot;
}

bool any_of_view(const std::vector<const Trend*>& trends, View view)
{
    return std::any_of(trends.begin(), trends.end(), [&](const Trend* trend) {
        return std::any_of(trend->points.begin(), trend->points.end(), [&](const TrendPoint& point) { return amount_of(point, view).has_value(); });
    });
}

Strips::Cell strip_cell(const Context& context, const Trend& trend)
{
    Strips::Cell cell;
    cell.line = trend_line(context, trend, View::apart);
    cell.level = trend.level;
    if (trend.usual_low && trend.usual_high)
        cell.band = Plot::Band{*trend.usual_low, *trend.usual_high, {}};
    if (!cell.line.points.empty())
        cell.newest = rounded_text(cell.line.points.back().value, quantity(trend.quantity).decimals, Sign::always);
    if (trend.level == Level::learning)
        cell.remark = "learning " + std::to_string(trend.learned) + " of " + std::to_string(trend.needed);
    else if (trend.level >= Level::note)
        cell.remark = level_words(trend.level);
    return cell;
}

} // namespace

Section strips_section(const Context& context)
{
    Strips strips;
    strips.from = seconds(context.period.from);
    strips.to = seconds(end_of_day(context.period.to));
    for (int number = 1; number <= context.engine.cylinders; ++number)
        strips.columns.push_back(context.engine.cylinder_name(number));
    for (const Quantity& of : all_quantities()) {
        if (of.per != Place::Kind::cylinder)
            continue;
        Strips::Row row{of.title, deviation_unit(of), std::vector<Strips::Cell>(strips.columns.size())};
        bool any = false;
        for (int number = 1; number <= context.engine.cylinders; ++number)
            if (const Trend* trend = context.judgement.find_trend(of.id, Place::cylinder(number))) {
                row.cells[static_cast<std::size_t>(number - 1)] = strip_cell(context, *trend);
                any = any || !row.cells[static_cast<std::size_t>(number - 1)].line.points.empty();
            }
        if (any)
            strips.rows.push_back(std::move(row));
    }
    Section section{"All cylinders at a glance", true, {}};
    if (strips.rows.empty())
        return section;
    section.blocks.push_back(Paragraph{"Each strip shows one quantity of one cylinder over the period, apart from the other "
                                       "cylinders; grey is its usual range, the number is the newest value. A level that is not quiet "
                                       "stands beside or below it; \u201clearning 4 of 8\u201d: so many of the usable readings that a flag needs.", Paragraph::Style::muted});
    section.blocks.push_back(std::move(strips));
    return section;
}

Section trends_section(const Context& context)
{
    Section section{"Trends", true, {}};
    for (const Quantity& of : all_quantities()) {
        std::vector<const Trend*> cylinders;
        for (const Trend& trend : context.judgement.trends) {
            if (trend.quantity != of.id)
                continue;
            if (trend.place.kind == Place::Kind::cylinder) {
                cylinders.push_back(&trend);
                continue;
            }
            const bool deviates = any_of_view({&trend}, View::deviation);
            if (deviates)
                section.blocks.push_back(trend_plot(context, trend, View::deviation));
            if (has_limit(context, of) || (!deviates && of.correction_form != CorrectionForm::none))
                section.blocks.push_back(trend_plot(context, trend, View::raw));
        }
        if (any_of_view(cylinders, View::apart))
            section.blocks.push_back(cylinders_plot(context, of, cylinders, View::apart));
        if (!cylinders.empty() && has_limit(context, of))
            section.blocks.push_back(cylinders_plot(context, of, cylinders, View::raw));
    }
    std::erase_if(section.blocks, [](const Block& block) {
        const Plot* plot = std::get_if<Plot>(&block);
        return plot && std::all_of(plot->lines.begin(), plot->lines.end(), [](const PlotLine& line) { return line.points.empty(); });
    });
    return section;
}

} // namespace evenstroke::report
