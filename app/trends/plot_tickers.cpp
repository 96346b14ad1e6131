// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/trends/plot_tickers.h"

#include "app/desk/number_text.h"

#include <QDateTime>

#include <algorithm>
#include <array>
#include <cmath>

namespace evenstroke {

namespace {

constexpr double average_month = 30.4375 * 86400.0;

QDate date_of(double seconds) { return QDateTime::fromSecsSinceEpoch(static_cast<qint64>(seconds), Qt::UTC).date(); }
double seconds_of(const QDate& date)
{
    return static_cast<double>(QDateTime(date, QTime(0, 0), Qt::UTC).toSecsSinceEpoch());
}

} // namespace

/// In average months: 1, 2, 3, 6, 12, 24, 60 or 120.
double MonthTicker::getTickStep(const QCPRange& range)
{
    constexpr std::array steps{1, 2, 3, 6, 12, 24, 60, 120};
    const double months = range.size() / average_month;
    for (const int step : steps)
        if (months / step <= labels_at_most_)
            return step * average_month;
    return steps.back() * average_month;
}

QVector<double> MonthTicker::createTickVector(double step, const QCPRange& range)
{
    const int months = std::max(1, static_cast<int>(std::lround(step / average_month)));
    const QDate first = date_of(range.lower);
    // Counted from January, so that ticks fall on the same months in every plot.
    int number = (first.year() * 12 + first.month() - 1) / months * months;
    QVector<double> ticks;
    while (true) {
        const double tick = seconds_of(QDate(number / 12, number % 12 + 1, 1));
        if (tick > range.upper)
            break;
        if (tick >= range.lower)
            ticks.append(tick);
        number += months;
    }
    first_ = ticks.isEmpty() ? 0.0 : ticks.first();
    return ticks;
}

QString MonthTicker::getTickLabel(double tick, const QLocale&, QChar, int)
{
    const QString month = month_text(TimePoint(std::chrono::seconds(static_cast<long long>(tick))));
    const bool with_year = date_of(tick).month() == 1 || tick <= first_;
    return with_year ? month : month.section(u' ', 0, 0);
}

double NumberTicker::getTickStep(const QCPRange& range)
{
    const double step = QCPAxisTicker::getTickStep(range);
    decimals_ = step > 0.0 ? std::clamp(-static_cast<int>(std::floor(std::log10(step) + 1e-9)), 0, 6) : 0;
    // Steps such as 2.5 need one more.
    const double scaled = step * std::pow(10.0, decimals_);
    if (std::abs(scaled - std::round(scaled)) > 1e-6)
        ++decimals_;
    return step;
}

QString NumberTicker::getTickLabel(double tick, const QLocale&, QChar, int)
{
    return signed_ ? signed_text(tick, decimals_) : number_text(tick, decimals_);
}

} // namespace evenstroke
