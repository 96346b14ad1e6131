// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/trends/trend_plot.h"

#include "app/desk/number_text.h"
#include "app/trends/plot_items.h"
#include "app/trends/plot_tickers.h"

#include <QToolTip>

#include <algorithm>
#include <cmath>
#include <limits>

namespace evenstroke {

namespace {

constexpr double reach = 12.0; // pixels around a point that still hit it
constexpr int left_margin = 56, load_margin = 34, evidence_height = 96;
constexpr double point_size = 5.0, ring_size = 11.0;

} // namespace

TrendPlot::TrendPlot(QWidget* parent) : QCustomPlot(parent), theme_(&theme())
{
    setFocusPolicy(Qt::NoFocus);
    setMouseTracking(true);
    setNoAntialiasingOnDrag(false);
    setNotAntialiasedElements(QCP::aeAxes | QCP::aeGrid);
    setAccessibleName(tr("Trend plot; the same as a table with key A"));
    make_rects();
}

void TrendPlot::make_rects()
{
    plotLayout()->clear();
    values_ = new QCPAxisRect(this);
    evidence_ = new QCPAxisRect(this);
    plotLayout()->addElement(0, 0, values_);
    plotLayout()->addElement(1, 0, evidence_);
    plotLayout()->setRowSpacing(0);
    for (QCPAxisRect* rect : {values_, evidence_}) {
        rect->setAutoMargins(QCP::msNone);
        for (QCPAxis* axis : rect->axes()) {
            axis->setLayer(QStringLiteral("axes"));
            axis->grid()->setLayer(QStringLiteral("grid"));
        }
    }
    evidence_->setMinimumSize(0, evidence_height);
    evidence_->setMaximumSize(QWIDGETSIZE_MAX, evidence_height);
    evidence_->axis(QCPAxis::atBottom)->setTickLabels(false);
    // Where the words find room is known once the axes have their places.
    connect(this, &QCustomPlot::afterLayout, this, &TrendPlot::thin_event_words);
}

QString TrendPlot::newest_label() const
{
    for (auto point = picture_.points.rbegin(); point != picture_.points.rend(); ++point)
        if (!point->doubtful)
            return tr("%1 %2").arg(picture_.difference ? signed_text(point->value, picture_.decimals)
                                                       : number_text(point->value, picture_.decimals),
                                   picture_.place_name);
    return {};
}

/// Direct labels stand at the right of the lines; they get the room they need.
void TrendPlot::set_margins()
{
    const int words = std::max(QFontMetrics(type(TypeSize::body, true)).horizontalAdvance(newest_label()), threshold_label_width());
    const int right = words + label_gap() + 6;
    values_->setMargins(QMargins(left_margin, 20, right, 24));
    evidence_->setMargins(QMargins(left_margin, 20, right, 4));
}

int TrendPlot::threshold_label_width() const
{
    int widest = 0;
    for (const QString& line : picture_.threshold_words.split(u'\n'))
        widest = std::max(widest, QFontMetrics(type(TypeSize::label)).horizontalAdvance(line));
    return widest;
}

int TrendPlot::label_gap() const { return extras_.load ? 10 + load_margin : 10; }

void TrendPlot::show_picture(const TrendPicture& picture, const Theme& colours)
{
    picture_ = picture;
    theme_ = &colours;
    draw_all();
}

void TrendPlot::show_extras(const TrendExtras& extras)
{
    extras_ = extras;
    draw_all();
}

void TrendPlot::choose(std::optional<std::size_t> reading)
{
    if (chosen_ == reading)
        return;
    chosen_ = reading;
    add_chosen();
    replot(rpQueuedReplot);
}

void TrendPlot::draw_all()
{
    clearPlottables();
    clearItems();
    event_items_.clear();
    ring_ = nullptr;
    ring_whiskers_ = nullptr;
    setBackground(QBrush(theme_->page));
    set_margins();
    style_axes();
    if (!picture_.points.empty()) {
        set_ranges();
        add_band();
        add_fixed_limits();
        add_others();
        add_line();
        add_uncertainty();
        add_points();
        add_marks();
        add_load();
        add_chosen();
        add_labels();
        add_evidence();
    }
    replot(rpQueuedReplot);
}

void TrendPlot::style_axes()
{
    const QPen rule = theme_->pen(theme_->rule), none(Qt::NoPen);
    for (QCPAxisRect* rect : {values_, evidence_})
        for (QCPAxis* axis : rect->axes()) {
            axis->setBasePen(none);
            axis->setTickPen(axis->axisType() == QCPAxis::atBottom ? theme_->pen(theme_->muted) : none);
            axis->setSubTickPen(none);
            axis->setTickLengthIn(0);
            axis->setTickLengthOut(axis->axisType() == QCPAxis::atBottom ? 5 : 0);
            axis->setTickLabelFont(type(TypeSize::label));
            axis->setTickLabelColor(theme_->muted);
            axis->grid()->setPen(rule);
            axis->grid()->setZeroLinePen(none);
            axis->grid()->setVisible(rect == values_ && axis->axisType() == QCPAxis::atLeft);
        }
    for (QCPAxisRect* rect : {values_, evidence_})
        rect->axis(QCPAxis::atBottom)->setTicker(QSharedPointer<QCPAxisTicker>(new MonthTicker));
    values_->axis(QCPAxis::atLeft)->setTicker(QSharedPointer<QCPAxisTicker>(new NumberTicker(picture_.difference)));
    evidence_->axis(QCPAxis::atLeft)->setTicks(false);
    evidence_->axis(QCPAxis::atLeft)->setTickLabels(false);
    values_->axis(QCPAxis::atRight)->setVisible(extras_.load);
}

void TrendPlot::set_ranges()
{
    double low = std::numeric_limits<double>::max(), high = std::numeric_limits<double>::lowest();
    const auto widen = [&](double value) {
        if (std::isfinite(value)) {
            low = std::min(low, value);
            high = std::max(high, value);
        }
    };
    for (const PicturePoint& point : picture_.points) {
        if (!point.doubtful) // a slip of the pen must not flatten everything else
            widen(point.value);
        if (extras_.uncertainty && point.half_width && !point.doubtful) {
            widen(point.value - *point.half_width);
            widen(point.value + *point.half_width);
        }
        if (point.band_low && point.band_high) {
            widen(*point.band_low);
            widen(*point.band_high);
        }
    }
    if (extras_.fixed_limits)
        for (const PictureLine* edge : {&picture_.fixed_low, &picture_.fixed_high})
            for (const double value : edge->values)
                widen(value);
    for (const PictureLine& line : picture_.others)
        for (const double value : line.values)
            widen(value);
    if (low > high) {
        low = -1.0;
        high = 1.0;
    }
    // Room below for the event flags, above for the marks.
    const double span = std::max(high - low, 2.0 * std::pow(10.0, -picture_.decimals));
    low_ = low - 0.14 * span;
    high_ = high + 0.10 * span;
    values_->axis(QCPAxis::atLeft)->setRange(low_, high_);
    const double axis_span = std::max(86400.0, picture_.last_time - picture_.first_time);
    for (QCPAxisRect* rect : {values_, evidence_})
        rect->axis(QCPAxis::atBottom)->setRange(picture_.first_time - 0.01 * axis_span, picture_.last_time + 0.01 * axis_span);
}

void TrendPlot::add_band()
{
    QCPGraph* lower = addGraph(values_->axis(QCPAxis::atBottom), values_->axis(QCPAxis::atLeft));
    QCPGraph* upper = addGraph(values_->axis(QCPAxis::atBottom), values_->axis(QCPAxis::atLeft));
    QVector<double> times, lows, highs;
    for (const PicturePoint& point : picture_.points)
        if (point.band_low && point.band_high) {
            times.append(point.time);
            lows.append(*point.band_low);
            highs.append(*point.band_high);
        }
    if (times.size() == 1) { // a band of one point would not be seen
        times.prepend(times.first() - 5 * 86400.0);
        lows.prepend(lows.first());
        highs.prepend(highs.first());
    }
    lower->setData(times, lows, true);
    upper->setData(times, highs, true);
    for (QCPGraph* graph : {lower, upper}) {
        graph->setPen(theme_->print() ? theme_->pen(theme_->muted, 2) : QPen(Qt::NoPen));
        graph->setLayer(QStringLiteral("background"));
    }
    upper->setBrush(theme_->band_brush());
    upper->setChannelFillGraph(lower);
}

void TrendPlot::add_others()
{
    int number = 0;
    for (const PictureLine& line : picture_.others) {
        QCPGraph* graph = addGraph(values_->axis(QCPAxis::atBottom), values_->axis(QCPAxis::atLeft));
        graph->setData(QVector<double>(line.times.begin(), line.times.end()),
                       QVector<double>(line.values.begin(), line.values.end()), true);
        graph->setPen(theme_->pen(theme_->others_level(number % 5), theme_->print() ? 1 : 0));
        ++number;
    }
}

void TrendPlot::add_line()
{
    QVector<double> times, values;
    for (const PicturePoint& point : picture_.points) {
        if (point.doubtful)
            continue;
        if (point.starts_stretch) {
            times.append(point.time - 1.0);
            values.append(std::numeric_limits<double>::quiet_NaN());
        }
        times.append(point.time);
        values.append(point.value);
    }
    QCPGraph* graph = addGraph(values_->axis(QCPAxis::atBottom), values_->axis(QCPAxis::atLeft));
    graph->setData(times, values, true);
    graph->setPen(theme_->pen(theme_->line));
}

void TrendPlot::add_points()
{
    QVector<double> steady_times, steady_values, unsteady_times, unsteady_values, doubtful_times, doubtful_values;
    for (const PicturePoint& point : picture_.points) {
        const bool hollow = point.unsteady || point.with_care;
        auto& times = point.doubtful ? doubtful_times : hollow ? unsteady_times : steady_times;
        auto& values = point.doubtful ? doubtful_values : hollow ? unsteady_values : steady_values;
        times.append(point.time);
        values.append(std::clamp(point.value, low_, high_)); // a wild one is shown at the edge
    }
    const auto add = [this](const QVector<double>& times, const QVector<double>& values, const QCPScatterStyle& style) {
        if (times.isEmpty())
            return;
        QCPGraph* graph = addGraph(values_->axis(QCPAxis::atBottom), values_->axis(QCPAxis::atLeft));
        graph->setData(times, values, true);
        graph->setLineStyle(QCPGraph::lsNone);
        graph->setScatterStyle(style);
        graph->setPen(theme_->pen(theme_->line));
    };
    add(steady_times, steady_values,
        QCPScatterStyle(QCPScatterStyle::ssDisc, theme_->line, theme_->line, point_size));
    add(unsteady_times, unsteady_values,
        QCPScatterStyle(QCPScatterStyle::ssCircle, theme_->line, theme_->page, point_size + 1.0));
    add(doubtful_times, doubtful_values,
        QCPScatterStyle(QCPScatterStyle::ssCross, theme_->muted, QColor(Qt::transparent), point_size + 3.0));
}

void TrendPlot::add_chosen()
{
    if (!ring_) {
        ring_ = addGraph(values_->axis(QCPAxis::atBottom), values_->axis(QCPAxis::atLeft));
        ring_->setLineStyle(QCPGraph::lsNone);
        ring_->setScatterStyle(QCPScatterStyle(QCPScatterStyle::ssCircle, theme_->ink, QColor(Qt::transparent), ring_size));
        ring_whiskers_ = add_whiskers(ring_);
        ring_whiskers_->setPen(theme_->pen(theme_->ink));
    }
    QVector<double> times, values, half_widths;
    for (const PicturePoint& point : picture_.points)
        if (chosen_ && point.reading == *chosen_) {
            times.append(point.time);
            values.append(std::clamp(point.value, low_, high_));
            half_widths.append(point.half_width.value_or(std::numeric_limits<double>::quiet_NaN()));
        }
    ring_->setData(times, values, true);
    ring_whiskers_->setData(half_widths);
}

std::optional<std::size_t> TrendPlot::reading_at(const QPointF& place) const
{
    std::optional<std::size_t> nearest;
    double shortest = reach;
    for (const PicturePoint& point : picture_.points) {
        const QPointF at(values_->axis(QCPAxis::atBottom)->coordToPixel(point.time),
                         values_->axis(QCPAxis::atLeft)->coordToPixel(std::clamp(point.value, low_, high_)));
        const double distance = std::hypot(at.x() - place.x(), at.y() - place.y());
        if (distance < shortest) {
            shortest = distance;
            nearest = point.reading;
        }
    }
    return nearest;
}

QString TrendPlot::words_at(const QPointF& place) const
{
    if (const auto reading = reading_at(place))
        for (const PicturePoint& point : picture_.points)
            if (point.reading == *reading)
                return point.spoken;
    for (std::size_t i = 0; i < event_items_.size(); ++i)
        if (event_items_[i]->area().contains(place))
            return picture_.events[i].spoken;
    return {};
}

void TrendPlot::mousePressEvent(QMouseEvent* event)
{
    if (const auto reading = reading_at(event->position()))
        emit reading_chosen(*reading);
    event->accept();
}

void TrendPlot::mouseMoveEvent(QMouseEvent* event)
{
    setCursor(reading_at(event->position()) ? Qt::PointingHandCursor : Qt::ArrowCursor);
    event->accept();
}

bool TrendPlot::event(QEvent* event)
{
    if (event->type() == QEvent::ToolTip) {
        const auto* help = static_cast<QHelpEvent*>(event);
        const QString words = words_at(help->pos());
        if (words.isEmpty())
            QToolTip::hideText();
        else
            QToolTip::showText(help->globalPos(), words, this);
        return true;
    }
    return QCustomPlot::event(event);
}

} // namespace evenstroke
