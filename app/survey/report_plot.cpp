// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/survey/report_painter.h"

#include "app/desk/theme.h"
#include "app/survey/event_labels.h"

#include <qcustomplot.h>

#include <algorithm>
#include <chrono>
#include <cmath>

namespace evenstroke {
namespace {

using namespace report;
using Days = std::chrono::days;

const Theme& ink() { return theme_of(ThemeKind::print); }
QString words_of(const std::string& text) { return QString::fromUtf8(text.data(), static_cast<qsizetype>(text.size())); }

QPen thin(const QColor& colour, double width, int style = 0)
{
    QPen pen = ink().pen(colour, style);
    pen.setWidthF(width);
    return pen;
}

/// Ticks at month starts, few enough that their dates stand apart.
QSharedPointer<QCPAxisTicker> month_ticks(double from, double to)
{
    using namespace std::chrono;
    QSharedPointer<QCPAxisTickerText> ticker(new QCPAxisTickerText);
    const double span_months = (to - from) / (30.4375 * 86400.0);
    int step = 12;
    for (const int candidate : {1, 2, 3, 6})
        if (span_months / candidate <= 9.0) {
            step = candidate;
            break;
        }
    const year_month_day first(floor<Days>(TimePoint(seconds(static_cast<long long>(from)))));
    year_month month = first.year() / January;
    for (; month.year() < first.year() + years(60); month += months(step)) {
        const auto at = static_cast<double>(sys_seconds(sys_days(month / 1)).time_since_epoch().count());
        if (at > to)
            break;
        if (at >= from)
            ticker->addTick(at, QString::fromStdString(date_text(sys_days(month / 1))).left(7));
    }
    return ticker;
}

/// Numbers with a true minus sign, as everywhere in the report.
class ValueTicker : public QCPAxisTicker
{
protected:
    QString getTickLabel(double tick, const QLocale& locale, QChar format, int precision) override
    {
        return QCPAxisTicker::getTickLabel(tick, locale, format, precision).replace(QLatin1Char('-'), QChar(0x2212));
    }
};

/// Range of the values with everything drawn on that scale, and some air.
QCPRange value_range(const Plot& plot)
{
    double low = std::numeric_limits<double>::infinity(), high = -low;
    const auto take = [&](double value) {
        low = std::min(low, value);
        high = std::max(high, value);
    };
    for (const PlotLine& line : plot.lines)
        for (const PlotPoint& point : line.points)
            take(point.value);
    if (plot.band) {
        take(plot.band->low);
        take(plot.band->high);
    }
    for (const Plot::Limit& limit : plot.limits)
        take(limit.value);
    if (plot.from_zero)
        take(0.0);
    if (!(high >= low))
        return {0.0, 1.0};
    const double air = std::max((high - low) * 0.12, std::abs(high) * 1e-3 + 1e-6);
    // Below the line there is room for the flags of the events and their words.
    const double below = plot.events.empty() ? air : 0.35 * (high - low) + air;
    return {plot.from_zero ? low : low - below, high + air};
}

void style_axes(QCustomPlot& widget, const Plot& plot)
{
    widget.xAxis->setRange(plot.from, plot.to);
    widget.yAxis->setRange(value_range(plot));
    if (plot.across == Plot::Across::time) {
        widget.xAxis->setTicker(month_ticks(plot.from, plot.to));
    } else {
        QSharedPointer<QCPAxisTicker> ticker(new QCPAxisTicker);
        ticker->setTickCount(5);
        widget.xAxis->setTicker(ticker);
        widget.xAxis->setNumberFormat(QStringLiteral("gb"));
    }
    QSharedPointer<QCPAxisTicker> values(new ValueTicker);
    values->setTickCount(4);
    widget.yAxis->setTicker(values);
    for (QCPAxis* axis : {widget.xAxis, widget.yAxis}) {
        axis->setTickLabelFont(report_font(ReportFont::body));
        axis->setTickLabelColor(ink().ink);
        axis->setBasePen(axis == widget.xAxis ? thin(ink().ink, 0.5) : QPen(Qt::NoPen));
        axis->setTickPen(axis == widget.xAxis ? thin(ink().ink, 0.5) : QPen(Qt::NoPen));
        axis->setSubTicks(false);
        axis->setTickLengthIn(0);
        axis->setTickLengthOut(axis == widget.xAxis ? 3 : 0);
        axis->setTickLabelPadding(3);
    }
    widget.xAxis->grid()->setVisible(false);
    widget.yAxis->grid()->setPen(thin(ink().rule, 0.3));
    widget.yAxis->grid()->setZeroLinePen(thin(ink().others, 0.4));
}

void add_band(QCustomPlot& widget, const Plot& plot)
{
    auto* area = new QCPItemRect(&widget);
    area->topLeft->setCoords(plot.from, plot.band->high);
    area->bottomRight->setCoords(plot.to, plot.band->low);
    area->setPen(Qt::NoPen);
    area->setBrush(ink().band);
    area->setLayer(QStringLiteral("background")); // first of all: an opaque colour must cover nothing
    area->setClipToAxisRect(true);
}

/// Stretches in which no flag is possible yet.
class LearningItem : public QCPAbstractItem
{
public:
    LearningItem(QCustomPlot* widget, const Plot::Stretch& stretch)
        : QCPAbstractItem(widget), from_(createPosition(QStringLiteral("from"))), to_(createPosition(QStringLiteral("to")))
    {
        from_->setCoords(stretch.from, 0.0);
        to_->setCoords(stretch.to, 0.0);
        setLayer(QStringLiteral("background"));
    }
    double selectTest(const QPointF&, bool, QVariant*) const override { return -1.0; }

protected:
    void draw(QCPPainter* painter) override
    {
        const QRectF inside = parentPlot()->axisRect()->rect();
        hatch(*painter, QRectF(QPointF(from_->pixelPosition().x(), inside.top()), QPointF(to_->pixelPosition().x(), inside.bottom())));
    }

private:
    QCPItemPosition *from_, *to_;
};

void add_text(QCustomPlot& widget, double across, double value, const QString& words, Qt::Alignment anchor, bool bold = false, int padding = 3)
{
    auto* label = new QCPItemText(&widget);
    label->position->setCoords(across, value);
    label->setPositionAlignment(anchor);
    label->setText(words);
    label->setFont(report_font(bold ? ReportFont::bold : ReportFont::body));
    label->setColor(ink().ink);
    label->setPadding(QMargins(padding, 0, padding, 0));
    label->setClipToAxisRect(false);
}

/// A graph of single points with one mark.
void add_points(QCustomPlot& widget, const PlotLine& line, PlotPoint::Mark mark, const QCPScatterStyle& style)
{
    QVector<double> across, value;
    for (const PlotPoint& point : line.points)
        if (point.mark == mark) {
            across.append(point.across);
            value.append(point.value);
        }
    if (across.isEmpty())
        return;
    QCPGraph* graph = widget.addGraph();
    graph->setLineStyle(QCPGraph::lsNone);
    graph->setScatterStyle(style);
    graph->setPen(thin(ink().ink, 0.6));
    graph->setData(across, value, true);
}

bool has_label(const PlotLine& line) { return line.in_question && !line.points_only && !line.points.empty() && !line.label.empty(); }

/// From the last point to the label at the right edge; dotted, so that nobody takes it for a stretch of the line.
void add_leader(QCustomPlot& widget, const PlotPoint& last, double to, double label_value)
{
    auto* leader = new QCPItemLine(&widget);
    leader->start->setCoords(last.across, last.value);
    leader->end->setCoords(to, label_value);
    QPen pen = thin(ink().muted, 0.4);
    pen.setStyle(Qt::DotLine);
    leader->setPen(pen);
}

void add_line(QCustomPlot& widget, const PlotLine& line, int style, double label_across, double label_value)
{
    const QColor colour = line.in_question ? ink().ink : ink().others;
    if (!line.points_only) {
        QVector<double> across, value;
        for (const PlotPoint& point : line.points)
            if (point.mark == PlotPoint::Mark::filled) {
                across.append(point.across);
                value.append(point.value);
            }
        QCPGraph* graph = widget.addGraph();
        graph->setPen(thin(colour, line.in_question ? 0.9 : 0.5, style));
        graph->setAdaptiveSampling(true);
        graph->setData(across, value, true);
    }
    if (line.in_question && !line.without_marks) {
        add_points(widget, line, PlotPoint::Mark::filled, {QCPScatterStyle::ssDisc, 2.6});
        add_points(widget, line, PlotPoint::Mark::hollow, {QCPScatterStyle::ssCircle, colour, Qt::white, 4.0});
        add_points(widget, line, PlotPoint::Mark::crossed, {QCPScatterStyle::ssCross, 4.0});
    }
    if (!has_label(line))
        return;
    add_leader(widget, line.points.back(), label_across, label_value);
    add_text(widget, label_across, label_value, words_of(line.label), Qt::AlignLeft | Qt::AlignVCenter, true);
}

/// Heights of the labels at the right edge, of the lines and then of the limits, pushed apart where they would cover
/// each other.
std::vector<double> label_heights(const Plot& plot, double apart)
{
    std::vector<std::pair<double, std::size_t>> wanted;
    for (std::size_t i = 0; i < plot.lines.size(); ++i)
        if (has_label(plot.lines[i]))
            wanted.push_back({plot.lines[i].points.back().value, i});
    for (std::size_t i = 0; i < plot.limits.size(); ++i)
        wanted.push_back({plot.limits[i].value, plot.lines.size() + i});
    std::sort(wanted.begin(), wanted.end());
    std::vector<double> heights(plot.lines.size() + plot.limits.size(), 0.0);
    double last = -std::numeric_limits<double>::infinity();
    for (const auto& [value, index] : wanted) {
        last = std::max(value, last + apart);
        heights[index] = last;
    }
    return heights;
}

/// Small flags on the time axis, each with its word, or a number that the key below the plot explains.
void add_events(QCustomPlot& widget, const Plot& plot, double width)
{
    const EventLabels labels = label_events(plot, width, TextMeasure());
    const double low = widget.yAxis->range().lower, high = widget.yAxis->range().upper;
    const double top = low + (high - low) * 0.16;
    for (std::size_t i = 0; i < plot.events.size(); ++i) {
        auto* stem = new QCPItemLine(&widget);
        stem->start->setCoords(plot.events[i].across, low);
        stem->end->setCoords(plot.events[i].across, top);
        stem->setPen(thin(ink().ink, 0.5));
        if (!labels.at_tick[i].isEmpty())
            add_text(widget, plot.events[i].across, top, labels.at_tick[i], Qt::AlignLeft | (labels.is_number[i] ? Qt::AlignBottom : Qt::AlignVCenter), false,
                     labels.is_number[i] ? 0 : 3);
    }
}

void add_limits(QCustomPlot& widget, const Plot& plot, const std::vector<double>& heights)
{
    for (std::size_t i = 0; i < plot.limits.size(); ++i) {
        auto* line = new QCPItemLine(&widget);
        line->start->setCoords(plot.from, plot.limits[i].value);
        line->end->setCoords(plot.to, plot.limits[i].value);
        line->setPen(thin(ink().ink, 0.7, 1));
        add_text(widget, plot.to, heights[i], words_of(plot.limits[i].text), Qt::AlignLeft | Qt::AlignVCenter);
    }
}

/// The mark of a flag, drawn by the program's own hand at the point where it started.
class FlagItem : public QCPAbstractItem
{
public:
    FlagItem(QCustomPlot* widget, const Plot::FlagMark& mark)
        : QCPAbstractItem(widget), position_(createPosition(QStringLiteral("position"))), level_(mark.level)
    {
        position_->setCoords(mark.across, mark.value);
    }
    double selectTest(const QPointF&, bool, QVariant*) const override { return -1.0; }

protected:
    void draw(QCPPainter* painter) override
    {
        const QPointF centre = position_->pixelPosition() - QPointF(0.0, 9.0);
        draw_mark(*painter, QRectF(centre - QPointF(5.0, 5.0), QSizeF(10.0, 10.0)), level_, ink());
    }

private:
    QCPItemPosition* position_;
    Level level_;
};

void add_title(QCustomPlot& widget, const Plot& plot)
{
    auto* title = new QCPItemText(&widget);
    title->position->setType(QCPItemPosition::ptViewportRatio);
    title->position->setCoords(0.0, 0.0);
    title->setPositionAlignment(Qt::AlignLeft | Qt::AlignTop);
    title->setText(words_of(plot.title));
    title->setFont(report_font(ReportFont::bold));
    title->setClipToAxisRect(false);
    auto* unit = new QCPItemText(&widget);
    unit->position->setType(QCPItemPosition::ptAbsolute);
    unit->position->setCoords(0.0, 11.5);
    unit->setPositionAlignment(Qt::AlignLeft | Qt::AlignTop);
    unit->setText(words_of(plot.value_title) + (plot.across == Plot::Across::load    ? QStringLiteral(" over load, %")
                                                : plot.across == Plot::Across::angle ? QStringLiteral(" over crank angle, °")
                                                                                     : QString())
                  + (plot.band ? QStringLiteral("; grey: usual range") : QString())
                  + (plot.learning.empty() ? QString() : QStringLiteral("; hatched: learning, no flag possible yet")));
    unit->setFont(report_font(ReportFont::body));
    unit->setClipToAxisRect(false);
}

void reset(QCustomPlot& widget, const Plot& plot)
{
    widget.clearItems();
    widget.clearGraphs();
    widget.axisRect()->setAutoMargins(QCP::msNone);
    const bool labels = plot.across == Plot::Across::time;
    widget.axisRect()->setMargins(QMargins(static_cast<int>(plot_margin_left), 26, labels ? static_cast<int>(plot_margin_right) : 6, 16));
    widget.axisRect()->setBackground(Qt::NoBrush);
}

} // namespace

void draw_report_plot(QCustomPlot& widget, const Plot& plot, const QSizeF& size, QCPPainter& painter)
{
    reset(widget, plot);
    style_axes(widget, plot);
    const double low = widget.yAxis->range().lower, high = widget.yAxis->range().upper;
    const double inner_height = size.height() - 42.0;
    if (plot.band)
        add_band(widget, plot);
    for (const Plot::Stretch& part : plot.learning)
        new LearningItem(&widget, part);
    const std::vector<double> heights = label_heights(plot, 11.0 * (high - low) / inner_height);
    add_limits(widget, plot, {heights.begin() + static_cast<std::ptrdiff_t>(plot.lines.size()), heights.end()});
    int style = 0;
    for (std::size_t i = 0; i < plot.lines.size(); ++i)
        add_line(widget, plot.lines[i], plot.lines[i].in_question ? style++ : 0, plot.to, heights[i]);
    if (plot.across == Plot::Across::time)
        add_events(widget, plot, size.width());
    for (const Plot::FlagMark& mark : plot.flags)
        new FlagItem(&widget, mark);
    add_title(widget, plot);
    widget.toPainter(&painter, static_cast<int>(size.width()), static_cast<int>(size.height()));
}

} // namespace evenstroke
