// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/survey/event_labels.h"

#include "core/reading/reading.h"

#include <algorithm>
#include <chrono>
#include <numeric>

namespace evenstroke {
namespace {

constexpr double air = 8.0; ///< between a word and the next tick, in points

QString day_of(double across)
{
    return QString::fromStdString(date_text(TimePoint(std::chrono::seconds(static_cast<long long>(across)))));
}

/// The events in order of time.
std::vector<std::size_t> in_order(const report::Plot& plot)
{
    std::vector<std::size_t> order(plot.events.size());
    std::iota(order.begin(), order.end(), std::size_t{0});
    std::stable_sort(order.begin(), order.end(), [&](std::size_t a, std::size_t b) { return plot.events[a].across < plot.events[b].across; });
    return order;
}

} // namespace

EventLabels label_events(const report::Plot& plot, double width, const TextMeasure& measure)
{
    EventLabels labels{std::vector<QString>(plot.events.size()), std::vector<bool>(plot.events.size(), false), {}};
    const double scale = (width - plot_margin_left - plot_margin_right) / (plot.to - plot.from);
    const auto x_of = [&](std::size_t event) { return (plot.events[event].across - plot.from) * scale; };
    const double end = (plot.to - plot.from) * scale + plot_margin_right - air;
    const std::vector<std::size_t> order = in_order(plot);
    QStringList key;
    double free_from = -1e9;
    std::size_t last_number = plot.events.size();
    for (std::size_t i = 0; i < order.size(); ++i) {
        const std::size_t event = order[i];
        const QString words = QString::fromStdString(plot.events[event].text);
        const double wide = measure.width(words, ReportFont::body) + air;
        const double next = i + 1 < order.size() ? x_of(order[i + 1]) : end;
        if (x_of(event) >= free_from && x_of(event) + wide <= next) {
            labels.at_tick[event] = words;
            free_from = x_of(event) + wide;
            continue;
        }
        labels.is_number[event] = true;
        const QString number = QString::number(key.size() + 1);
        key.append(QStringLiteral("%1\u00a0%2\u00a0%3").arg(number, day_of(plot.events[event].across), words));
        const bool joins = x_of(event) < free_from && last_number < plot.events.size();
        QString& label = labels.at_tick[joins ? last_number : event];
        label += (joins ? QStringLiteral(",") : QString()) + number;
        last_number = joins ? last_number : event;
        free_from = x_of(last_number) + measure.width(label, ReportFont::body) + 3.0;
    }
    labels.key = key.join(QStringLiteral(" · "));
    return labels;
}

} // namespace evenstroke
