// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/trend/second_opinions.h"

#include "core/trend/control_charts.h"
#include "core/trend/drift_input.h"

#include <numeric>

namespace evenstroke {
namespace {

struct Series
{
    std::vector<double> months, values;
    std::vector<std::size_t> readings;
};

/// Usable values of the present stretch.
Series series_of(const Judgement& judgement, const Trend& trend)
{
    Series series;
    const bool cylinder = trend.place.kind == Place::Kind::cylinder;
    for (const TrendPoint& point : trend.points) {
        const auto value = cylinder ? point.apart : point.deviation;
        if (!value || point.unsteady || point.doubtful || point.stretch != trend.points.back().stretch)
            continue;
        series.months.push_back(months_of(judgement.record->readings.at(point.reading).taken_at.utc));
        series.values.push_back(*value);
        series.readings.push_back(point.reading);
    }
    return series;
}

void ask_charts(const Series& series, double noise, SecondOpinions& opinions)
{
    if (series.values.size() <= values_of_reference || !(noise > 0.0))
        return;
    opinions.charted = true;
    const auto begin = series.values.begin(), after = begin + static_cast<std::ptrdiff_t>(values_of_reference);
    const double target = std::accumulate(begin, after, 0.0) / static_cast<double>(values_of_reference);
    const std::span<const double> later = std::span(series.values).subspan(values_of_reference);
    const auto reading_of = [&](const std::optional<std::size_t>& alarm) {
        return alarm ? std::optional(series.readings[values_of_reference + *alarm]) : std::nullopt;
    };
    if (const auto chart = drift::ewma_chart(later, ewma_weight, target, noise, ewma_factor))
        opinions.ewma_alarm = reading_of(chart->alarm);
    if (const auto chart = drift::cusum_chart(later, target, cusum_slack * noise, cusum_decision * noise))
        opinions.cusum_alarm = reading_of(chart->alarm);
}

} // namespace

SecondOpinions second_opinions(const Judgement& judgement, QuantityId id, Place place)
{
    SecondOpinions opinions;
    opinions.fixed = fixed_limit_opinion(judgement, id, place);
    const Trend* trend = judgement.find_trend(id, place);
    if (!trend || trend->points.empty())
        return opinions;
    const Series series = series_of(judgement, *trend);
    opinions.values = series.values.size();
    opinions.slope = drift::theil_sen(series.months, series.values);
    opinions.order = drift::mann_kendall(series.values);
    ask_charts(series, trend->noise.value_or(0.0), opinions);
    return opinions;
}

} // namespace evenstroke
