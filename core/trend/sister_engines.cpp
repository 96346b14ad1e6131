// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/trend/sister_engines.h"

#include "core/sentence_words.h"
#include "core/trend/drift.h"
#include "core/trend/drift_catalogue.h"
#include "core/trend/drift_input.h"
#include "core/trend/flag_text.h"
#include "core/trend/robust.h"

#include <algorithm>
#include <cmath>
#include <map>

namespace evenstroke {
namespace {

constexpr double seconds_in_month = days_in_month * 86400.0;
constexpr std::size_t most_months = 1200; // a century: a year that was mistyped must not ask for all memory
constexpr std::size_t newest_taken = 3;

/// One engine's deviation of one quantity at one reading.
struct Point
{
    TimePoint at;
    double deviation;
    int stretch;
};

struct Watched
{
    QuantityId quantity;
    const drift::CatalogueChannel* channel;
    bool over_cylinders;
    std::vector<std::vector<Point>> engines; ///< [engine], in order of time
};

std::optional<double> in_channel_unit(const TrendPoint& point, const drift::CatalogueChannel& channel)
{
    if (!point.deviation || point.unsteady || point.doubtful)
        return std::nullopt;
    if (channel.form != drift::DeviationForm::percent)
        return point.deviation;
    return point.expected && *point.expected != 0.0 ? std::optional(100.0 * *point.deviation / std::abs(*point.expected))
                                                    : std::nullopt;
}

/// The engine's own trend of a quantity, or the mean over its cylinders at each reading.
std::vector<Point> points_of(const Judgement& judgement, const Watched& watched)
{
    struct Sum
    {
        double sum = 0.0;
        int count = 0, stretch = 0;
    };
    std::map<std::size_t, Sum> at;
    for (const Trend& trend : judgement.trends) {
        const bool wanted = watched.over_cylinders ? trend.place.kind == Place::Kind::cylinder : trend.place == Place::engine();
        if (trend.quantity != watched.quantity || !wanted)
            continue;
        for (const TrendPoint& point : trend.points)
            if (const auto value = in_channel_unit(point, *watched.channel)) {
                Sum& here = at[point.reading];
                here.sum += *value;
                ++here.count;
                here.stretch = watched.over_cylinders ? 0 : point.stretch; // one cylinder's overhaul starts no new engine
            }
    }
    std::vector<Point> points;
    const int needed = watched.over_cylinders ? (judgement.record->engine.cylinders + 1) / 2 : 1;
    for (const auto& [reading, here] : at)
        if (here.count >= needed && reading < judgement.record->readings.size())
            points.push_back({judgement.record->readings[reading].taken_at.utc, here.sum / here.count, here.stretch});
    return points;
}

std::vector<Watched> watched_quantities(std::span<const std::shared_ptr<const Judgement>> engines)
{
    std::vector<Watched> all;
    for (const drift::CatalogueChannel& channel : drift::channel_catalogue()) {
        const bool over_cylinders = channel.subject == drift::Subject::cylinder_median;
        if (!channel.evidence || channel.subject == drift::Subject::cylinder)
            continue;
        const auto id = over_cylinders ? find_quantity(channel.quantity, Place::Kind::cylinder) : find_quantity(channel.quantity);
        if (!id)
            continue;
        Watched watched{*id, &channel, over_cylinders, {}};
        std::size_t read = 0;
        for (const auto& engine : engines) {
            watched.engines.push_back(engine && engine->record ? points_of(*engine, watched) : std::vector<Point>());
            read += watched.engines.back().empty() ? 0 : 1;
        }
        if (read >= 2)
            all.push_back(std::move(watched));
    }
    std::stable_sort(all.begin(), all.end(), [](const Watched& a, const Watched& b) { return a.quantity < b.quantity; });
    return all;
}

SisterRow row_of(const Watched& watched)
{
    SisterRow row;
    row.quantity = watched.quantity;
    row.over_cylinders = watched.over_cylinders;
    row.percent = watched.channel->form == drift::DeviationForm::percent;
    row.usual = 2.0 * watched.channel->noise;
    for (const std::vector<Point>& points : watched.engines) {
        std::vector<double> newest;
        for (auto point = points.rbegin(); point != points.rend() && newest.size() < newest_taken; ++point)
            newest.push_back(point->deviation);
        row.cells.push_back({drift::median(std::move(newest)), std::nullopt});
    }
    for (std::size_t e = 0; e < row.cells.size(); ++e) {
        std::vector<double> others;
        for (std::size_t o = 0; o < row.cells.size(); ++o)
            if (o != e && row.cells[o].deviation)
                others.push_back(*row.cells[o].deviation);
        const auto middle = drift::median(std::move(others));
        if (middle && row.cells[e].deviation)
            row.cells[e].apart = *row.cells[e].deviation - *middle;
    }
    return row;
}

/// The months from the first reading of all to the last.
struct Calendar
{
    TimePoint first{};
    std::size_t months = 0;

    explicit Calendar(const std::vector<Watched>& all)
    {
        std::optional<TimePoint> earliest, latest;
        for (const Watched& watched : all)
            for (const auto& points : watched.engines)
                if (!points.empty()) {
                    earliest = earliest ? std::min(*earliest, points.front().at) : points.front().at;
                    latest = latest ? std::max(*latest, points.back().at) : points.back().at;
                }
        if (!earliest)
            return;
        first = *earliest;
        months = std::min(most_months, static_cast<std::size_t>(static_cast<double>((*latest - first).count()) / seconds_in_month) + 1);
    }
    std::optional<std::size_t> month_of(TimePoint at) const
    {
        const double month = static_cast<double>((at - first).count()) / seconds_in_month;
        return month >= 0.0 && month < static_cast<double>(months) ? std::optional(static_cast<std::size_t>(month)) : std::nullopt;
    }
    TimePoint end_of(std::size_t month) const
    {
        return first + std::chrono::seconds(static_cast<long long>(static_cast<double>(month + 1) * seconds_in_month) - 1);
    }
};

/// Engines in the place of cylinders, months in the place of readings; of several readings in a month the last.
drift::Input input_of(const std::vector<Watched>& all, const Calendar& calendar, std::size_t engines)
{
    drift::Input input;
    input.cylinders = engines;
    for (std::size_t month = 0; month < calendar.months; ++month)
        input.months.push_back(static_cast<double>(month));
    for (const Watched& watched : all) {
        drift::Channel channel;
        channel.quantity = quantity(watched.quantity).name;
        channel.noise = watched.channel->noise;
        channel.offset_spread = 2.0 * watched.channel->noise; // common practice, no source
        channel.checked = false; // what is doubtful was left out when each engine was judged
        channel.cells.resize(calendar.months * engines);
        channel.segment_starts.assign(calendar.months * engines, 0);
        for (std::size_t e = 0; e < engines; ++e) {
            int stretch = watched.engines[e].empty() ? 0 : watched.engines[e].front().stretch;
            for (const Point& point : watched.engines[e]) {
                const auto month = calendar.month_of(point.at);
                if (!month)
                    continue;
                drift::Cell& cell = channel.cells[*month * engines + e];
                cell.present = true;
                cell.deviation = cell.typed_number = point.deviation;
                if (point.stretch != stretch)
                    channel.segment_starts[*month * engines + e] = 1;
                stretch = point.stretch;
            }
        }
        input.channels.push_back(std::move(channel));
    }
    return input;
}

std::string sentence_of(const drift::Flag& flag, const Engine& engine, const std::vector<Watched>& all, const Calendar& calendar)
{
    std::string moved;
    for (const drift::QuantityChange& change : flag.now.changes) {
        const auto watched = std::find_if(all.begin(), all.end(),
                                          [&](const Watched& w) { return quantity(w.quantity).name == change.quantity; });
        if (watched == all.end())
            continue;
        const std::string unit_words = watched->channel->unit == "1" ? "" : " " + watched->channel->unit;
        moved += (moved.empty() ? "" : ", ") + lower_first(quantity(watched->quantity).title) + " " +
                 (change.size < 0.0 ? "down " : "up ") + two_digits(std::abs(change.size)) + unit_words +
                 (flag.now.shape == drift::Shape::ramp ? " a month" : "");
    }
    const std::string since = date_text(calendar.end_of(flag.now.since));
    if (flag.level == drift::Level::ask)
        return upper_first(engine.name) + " took a new level against its sisters about " + since + ". Was work done, or is it read in another way?";
    return upper_first(engine.name) + " has left its sisters since " + since + (moved.empty() ? "." : ": " + moved + ".");
}

Level level_of(drift::Level level)
{
    return level == drift::Level::act ? Level::act : level == drift::Level::ask ? Level::ask : Level::watch;
}

} // namespace

bool are_sisters(const Engine& a, const Engine& b)
{
    const auto near = [](double x, double y) { return std::abs(x - y) <= 0.005 * std::max(std::abs(x), std::abs(y)); };
    return a.two_stroke() == b.two_stroke() && a.cylinders == b.cylinders && near(a.bore.value(), b.bore.value()) &&
           near(a.stroke.value(), b.stroke.value()) && near(a.rated_power.value(), b.rated_power.value()) &&
           near(a.rated_speed.value(), b.rated_speed.value());
}

SisterComparison compare_sisters(std::span<const std::shared_ptr<const Judgement>> engines)
{
    SisterComparison comparison;
    const std::vector<Watched> all = watched_quantities(engines);
    for (const Watched& watched : all)
        comparison.rows.push_back(row_of(watched));
    comparison.judged = engines.size() >= fewest_sisters_to_judge && !all.empty();
    if (!comparison.judged)
        return comparison;
    const Calendar calendar(all);
    const drift::Output output = drift::judge(input_of(all, calendar, engines.size()));
    comparison.threshold = output.cylinder_threshold;
    for (const drift::Flag& flag : output.flags) {
        if (!flag.cylinder || !engines[*flag.cylinder])
            continue; // what all of them do is each engine's own matter
        SisterFlag shown;
        shown.engine = *flag.cylinder;
        shown.level = level_of(flag.level);
        shown.standing = flag.active;
        shown.flagged_at = calendar.end_of(flag.reading);
        shown.evidence = flag.now.evidence;
        shown.sentence = sentence_of(flag, engines[shown.engine]->record->engine, all, calendar);
        comparison.flags.push_back(std::move(shown));
    }
    return comparison;
}

} // namespace evenstroke
