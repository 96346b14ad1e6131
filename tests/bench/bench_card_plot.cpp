// SPDX-License-Identifier: GPL-3.0-or-later
// What drawing cards costs: 12 cylinders of 20 cycles in steps of 0.1 degree, at several zooms, beside the same
// samples drawn as ordinary lines. Aim: 16 ms a replot. Prints absolutes and ratios; nothing fails on a figure.
#include "app/cards/card_plot.h"
#include "app/desk/theme.h"

#include <QApplication>
#include <QElapsedTimer>

#include <algorithm>
#include <cmath>
#include <cstdio>
#include <vector>

using namespace evenstroke;

namespace {

constexpr std::size_t places = 3600;
constexpr int cylinders = 12, cycles = 20, rounds = 15;

/// A made-up pressure: a power law of the angle, a hump, and another scatter for each cycle.
std::shared_ptr<const indicator::Evaluation> made_up_card(int cylinder)
{
    auto card = std::make_shared<indicator::Evaluation>();
    card->trace.step = 0.1;
    for (std::size_t i = 0; i < places; ++i)
        card->trace.angle.push_back(-180.0 + 0.1 * static_cast<double>(i));
    for (int cycle = 0; cycle < cycles; ++cycle) {
        indicator::Cycle one;
        for (std::size_t i = 0; i < places; ++i) {
            const double angle = card->trace.angle[i], hump = std::exp(-std::pow((angle - 12.0) / 14.0, 2));
            one.pressure.push_back(3.0 + 120.0 * std::exp(-std::abs(angle) / 25.0) + (40.0 + cylinder + 0.3 * cycle) * hump
                                   + 0.2 * std::sin(0.7 * static_cast<double>(i) + cycle));
        }
        card->trace.cycles.push_back(std::move(one));
    }
    card->trace.mean = card->trace.cycles.front().pressure;
    return card;
}

double median_replot(QCustomPlot& plot)
{
    std::vector<double> times;
    for (int round = 0; round < rounds; ++round) {
        QElapsedTimer timer;
        timer.start();
        plot.replot(QCustomPlot::rpImmediateRefresh);
        times.push_back(static_cast<double>(timer.nsecsElapsed()) / 1e6);
    }
    std::nth_element(times.begin(), times.begin() + rounds / 2, times.end());
    return times[rounds / 2];
}

} // namespace

int main(int count, char** arguments)
{
    qputenv("QT_QPA_PLATFORM", "offscreen");
    QApplication application(count, arguments);
    set_theme(ThemeKind::day);
    std::vector<std::shared_ptr<const CycleEnvelope>> envelopes;
    QElapsedTimer timer;
    timer.start();
    for (int cylinder = 1; cylinder <= cylinders; ++cylinder)
        envelopes.push_back(std::make_shared<const CycleEnvelope>(made_up_card(cylinder)));
    std::printf("making and laying out %d x %d cycles: %.0f ms\n", cylinders, cycles, static_cast<double>(timer.nsecsElapsed()) / 1e6);

    CardPicture picture;
    picture.view = CardView::pressure;
    picture.x_low = -180.0;
    picture.x_high = 180.0;
    picture.y_high = 190.0;
    picture.cycles = envelopes.front();
    picture.others.assign(envelopes.begin() + 1, envelopes.end());
    CardLine line;
    line.x = envelopes.front()->card().trace.angle;
    line.y = envelopes.front()->card().trace.mean;
    picture.lines.push_back(line);
    CardPlot plot;
    plot.resize(760, 300);
    plot.show_picture(picture, theme());
    plot.show();
    application.processEvents();

    QCustomPlot plain;
    plain.resize(760, 300);
    for (const auto& envelope : envelopes)
        for (std::size_t cycle = 0; cycle < envelope->cycles(); ++cycle) {
            QVector<double> x, y;
            for (std::size_t i = 0; i < envelope->size(); ++i) {
                x.append(envelope->angle(i));
                y.append(static_cast<double>(envelope->pressure(cycle, i)));
            }
            plain.addGraph()->setData(x, y, true);
        }
    plain.yAxis->setRange(0.0, 190.0);
    plain.show();
    application.processEvents();

    for (const double width : {360.0, 90.0, 36.0, 9.0, 2.0}) {
        plot.xAxis->setRange(10.0 - 0.5 * width, 10.0 + 0.5 * width);
        plain.xAxis->setRange(10.0 - 0.5 * width, 10.0 + 0.5 * width);
        const double own = median_replot(plot), ordinary = median_replot(plain);
        std::printf("%5.0f degrees across: %.1f ms a replot; as ordinary lines %.1f ms, %.1f times as long\n", width, own, ordinary, ordinary / own);
    }
    return 0;
}
