// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/reading/figure_plot.h"

#include "app/trends/plot_tickers.h"

#include <algorithm>
#include <cmath>

namespace evenstroke {

namespace {

constexpr double dot_size = 6.0, old_dot_size = 4.0, bar_end = 4.0, reach = 10.0;
constexpr int plain_margin = 12, bottom_margin = 40, top_margin = 24, number_column = 44;
constexpr int paleness_steps = 5;

} // namespace

FigurePlot::FigurePlot(QWidget* parent) : QCustomPlot(parent), theme_(&theme())
{
    setFocusPolicy(Qt::NoFocus);
    setNotAntialiasedElements(QCP::aeAxes | QCP::aeGrid);
    axisRect()->setAutoMargins(QCP::msNone);
}

QColor FigurePlot::colour_of(FigureRole role) const
{
    switch (role) {
    case FigureRole::in_hand: return theme_->line;
    case FigureRole::other: return theme_->muted;
    case FigureRole::limit: return theme_->act;
    case FigureRole::guide: return theme_->others;
    }
    return theme_->muted;
}

int FigurePlot::label_width(const QString& label, bool bold) const
{
    return label.isEmpty() ? 0 : QFontMetrics(type(bold ? TypeSize::body : TypeSize::label, bold)).horizontalAdvance(label);
}

void FigurePlot::show_figure(const Figure& figure, const Theme& colours)
{
    figure_ = figure;
    theme_ = &colours;
    setAccessibleName(figure.name);
    draw_all();
}

void FigurePlot::draw_all()
{
    clearPlottables();
    clearItems();
    setBackground(QBrush(theme_->page));
    xAxis->setRange(figure_.x_low, figure_.x_high);
    yAxis->setRange(figure_.y_low, figure_.y_high);
    set_margins();
    style_axes();
    add_layers();
    for (const FigureMark& mark : figure_.marks)
        add_mark(mark);
    for (const FigureCurve& curve : figure_.curves)
        add_curve(curve);
    add_dots();
    add_titles();
    replot(rpQueuedReplot);
}

void FigurePlot::set_margins()
{
    int left = figure_.y_ticks.empty() ? number_column : 0, right = plain_margin;
    for (const FigureTick& tick : figure_.y_ticks)
        left = std::max(left, label_width(tick.words) + 10);
    for (const FigureCurve& curve : figure_.curves)
        if (!curve.label_at_start)
            right = std::max(right, label_width(curve.label) + 10);
    const bool x_words = figure_.x_numbers || !figure_.x_ticks.empty();
    const bool words_above = !figure_.y_title.isEmpty()
                             || std::any_of(figure_.marks.begin(), figure_.marks.end(), [](const FigureMark& mark) {
                                    return mark.upright && !mark.label.isEmpty();
                                });
    axisRect()->setMargins(QMargins(left, words_above ? top_margin : 8, right,
                                    figure_.x_title.isEmpty() ? (x_words ? 22 : 8) : bottom_margin));
}

void FigurePlot::style_axes()
{
    const QPen none(Qt::NoPen), rule = theme_->pen(theme_->rule);
    for (QCPAxis* axis : {xAxis, yAxis}) {
        const bool below = axis == xAxis;
        const std::vector<FigureTick>& words = below ? figure_.x_ticks : figure_.y_ticks;
        axis->setBasePen(below ? theme_->pen(theme_->muted) : none);
        axis->setTickPen(below ? theme_->pen(theme_->muted) : none);
        axis->setSubTickPen(none);
        axis->setTickLengthIn(0);
        axis->setTickLengthOut(below ? 4 : 0);
        axis->setTickLabelFont(type(TypeSize::label));
        axis->setTickLabelColor(words.empty() || below ? theme_->muted : theme_->ink);
        axis->setTickLabels(below ? figure_.x_numbers || !words.empty() : true);
        axis->setTicks(axis->tickLabels());
        axis->grid()->setPen(rule);
        axis->grid()->setZeroLinePen(none);
        axis->grid()->setVisible(!below && figure_.y_grid);
        if (!words.empty()) {
            QSharedPointer<QCPAxisTickerText> ticker(new QCPAxisTickerText);
            for (const FigureTick& tick : words)
                ticker->addTick(tick.at, tick.words);
            axis->setTicker(ticker);
        } else if (below && figure_.x_step > 0.0) {
            QSharedPointer<QCPAxisTickerFixed> ticker(new QCPAxisTickerFixed);
            ticker->setTickStep(figure_.x_step);
            axis->setNumberFormat(QStringLiteral("f"));
            axis->setNumberPrecision(0);
            axis->setTicker(ticker);
        } else {
            axis->setTicker(QSharedPointer<QCPAxisTicker>(new NumberTicker(false)));
        }
    }
}

QCPItemText* FigurePlot::add_text(const QString& text, const QColor& colour, Qt::Alignment alignment, bool bold)
{
    auto* item = new QCPItemText(this);
    item->setText(text);
    item->setFont(type(bold ? TypeSize::body : TypeSize::label, bold));
    item->setColor(colour);
    item->setClipToAxisRect(false);
    item->setPositionAlignment(alignment);
    item->position->setType(QCPItemPosition::ptPlotCoords);
    return item;
}

void FigurePlot::add_titles()
{
    if (!figure_.y_title.isEmpty()) {
        QCPItemText* title = add_text(figure_.y_title, theme_->muted, Qt::AlignLeft | Qt::AlignBottom);
        title->position->setType(QCPItemPosition::ptAxisRectRatio);
        title->position->setCoords(0.0, 0.0);
        title->setPadding(QMargins(0, 0, 0, 5));
    }
    if (!figure_.x_title.isEmpty()) {
        QCPItemText* title = add_text(figure_.x_title, theme_->muted, Qt::AlignRight | Qt::AlignTop);
        title->position->setType(QCPItemPosition::ptAxisRectRatio);
        title->position->setCoords(1.0, 1.0);
        title->setPadding(QMargins(0, 22, 0, 0));
    }
}

void FigurePlot::add_layers()
{
    for (const FigureLayer& layer : figure_.layers) {
        if (layer.shaded) {
            auto* area = new QCPItemRect(this);
            area->topLeft->setType(QCPItemPosition::ptPlotCoords);
            area->topLeft->setCoords(layer.from, figure_.y_high);
            area->bottomRight->setCoords(layer.to, figure_.y_low);
            area->setPen(QPen(Qt::NoPen));
            area->setBrush(theme_->band_brush());
            area->setLayer(QStringLiteral("background"));
        }
        if (layer.name.isEmpty())
            continue;
        QCPItemText* name = add_text(layer.name, theme_->muted, Qt::AlignHCenter | Qt::AlignTop);
        name->position->setTypeX(QCPItemPosition::ptPlotCoords);
        name->position->setTypeY(QCPItemPosition::ptAxisRectRatio);
        name->position->setCoords(0.5 * (layer.from + layer.to), 0.0);
        name->setPadding(QMargins(0, 4, 0, 0));
    }
}

void FigurePlot::add_curve(const FigureCurve& curve)
{
    auto* line = new QCPCurve(xAxis, yAxis);
    line->setData(QVector<double>(curve.x.begin(), curve.x.end()), QVector<double>(curve.y.begin(), curve.y.end()));
    QPen pen = theme_->pen(colour_of(curve.role), curve.role == FigureRole::in_hand ? 0 : 1);
    if (curve.dashed)
        pen.setStyle(Qt::DashLine);
    line->setPen(pen);
    if (curve.label.isEmpty() || curve.x.empty())
        return;
    const QColor colour = curve.role == FigureRole::guide ? theme_->muted : colour_of(curve.role);
    QCPItemText* label = add_text(curve.label, colour,
                                  curve.label_at_start ? Qt::AlignLeft | Qt::AlignBottom : Qt::AlignLeft | Qt::AlignVCenter);
    // A line that leaves the plot at its top still says there what it is.
    label->position->setCoords(curve.label_at_start ? curve.x.front() : curve.x.back(),
                               std::clamp(curve.label_at_start ? curve.y.front() : curve.y.back(), figure_.y_low, figure_.y_high));
    label->setPadding(curve.label_at_start ? QMargins(4, 0, 0, 2) : QMargins(6, 0, 0, 0));
}

void FigurePlot::add_dots()
{
    // Old ones first and pale, in few steps: one graph a step keeps drawing fast.
    const auto add = [this](const QVector<double>& x, const QVector<double>& y, const QCPScatterStyle& style) {
        auto* graph = addGraph();
        graph->setData(x, y, false);
        graph->setLineStyle(QCPGraph::lsNone);
        graph->setScatterStyle(style);
    };
    for (int step = paleness_steps; step >= 1; --step) {
        QVector<double> x, y;
        for (const FigureDot& dot : figure_.dots)
            if (dot.role == FigureRole::other && static_cast<int>(std::ceil(dot.age * paleness_steps)) == step) {
                x.append(dot.x);
                y.append(dot.y);
            }
        const QColor colour = mixed(theme_->muted, theme_->page, 0.15 * step);
        add(x, y, QCPScatterStyle(QCPScatterStyle::ssDisc, colour, colour, old_dot_size));
    }
    for (const FigureDot& dot : figure_.dots) {
        if (dot.role == FigureRole::other && dot.age > 0.0)
            continue;
        const QColor colour = colour_of(dot.role);
        if (dot.x_half) {
            auto* bar = new QCPItemLine(this);
            bar->start->setCoords(dot.x - *dot.x_half, dot.y);
            bar->end->setCoords(dot.x + *dot.x_half, dot.y);
            bar->setPen(theme_->pen(colour));
            bar->setHead(QCPLineEnding(QCPLineEnding::esBar, bar_end, bar_end));
            bar->setTail(QCPLineEnding(QCPLineEnding::esBar, bar_end, bar_end));
        }
        add({dot.x}, {dot.y},
            QCPScatterStyle(dot.hollow ? QCPScatterStyle::ssCircle : QCPScatterStyle::ssDisc, colour,
                            dot.hollow ? theme_->page : colour, dot.hollow ? dot_size + 1.0 : dot_size));
        add_dot_label(dot);
    }
}

/// Right of the dot, or left of it where the plot ends.
void FigurePlot::add_dot_label(const FigureDot& dot)
{
    if (dot.label.isEmpty())
        return;
    const bool bold = dot.role == FigureRole::in_hand && !dot.x_half;
    const double room = std::max(1, width() - axisRect()->margins().left() - axisRect()->margins().right());
    const double share = (dot.x + dot.x_half.value_or(0.0) - figure_.x_low) / (figure_.x_high - figure_.x_low);
    const bool left = share * room + label_width(dot.label, bold) + 12.0 > room;
    QCPItemText* label = add_text(dot.label, dot.role == FigureRole::in_hand ? theme_->ink : colour_of(dot.role),
                                  (left ? Qt::AlignRight : Qt::AlignLeft) | Qt::AlignVCenter, bold);
    const double half = dot.x_half.value_or(0.0);
    label->position->setCoords(left ? dot.x - half : dot.x + half, dot.y);
    label->setPadding(left ? QMargins(0, 0, 8, 0) : QMargins(8, 0, 0, 0));
}

void FigurePlot::add_mark(const FigureMark& mark)
{
    auto* line = new QCPItemLine(this);
    const double x1 = mark.upright ? mark.at : figure_.x_low, x2 = mark.upright ? mark.at : figure_.x_high;
    const double y1 = mark.upright ? figure_.y_low : mark.at, y2 = mark.upright ? figure_.y_high : mark.at;
    line->start->setCoords(x1, y1);
    line->end->setCoords(x2, y2);
    QPen pen = theme_->pen(colour_of(mark.role), 2);
    pen.setStyle(mark.role == FigureRole::in_hand ? Qt::SolidLine : Qt::DashLine);
    line->setPen(pen);
    if (mark.label.isEmpty())
        return;
    QCPItemText* label = add_text(mark.label, mark.role == FigureRole::guide ? theme_->muted : colour_of(mark.role),
                                  mark.upright ? Qt::AlignHCenter | Qt::AlignBottom : Qt::AlignRight | Qt::AlignBottom);
    label->position->setCoords(mark.upright ? mark.at : figure_.x_high, mark.upright ? figure_.y_high : mark.at);
    label->setPadding(QMargins(0, 0, 2, mark.upright ? 3 : 1));
}

void FigurePlot::mousePressEvent(QMouseEvent* event)
{
    double shortest = reach;
    std::optional<std::size_t> nearest;
    for (std::size_t i = 0; i < figure_.dots.size(); ++i) {
        const double distance = std::hypot(xAxis->coordToPixel(figure_.dots[i].x) - event->position().x(),
                                           yAxis->coordToPixel(figure_.dots[i].y) - event->position().y());
        if (distance < shortest) {
            shortest = distance;
            nearest = i;
        }
    }
    if (nearest)
        emit dot_chosen(*nearest);
    event->accept();
}

void FigurePlot::resizeEvent(QResizeEvent* event)
{
    QCustomPlot::resizeEvent(event);
    if (event->size().width() != event->oldSize().width())
        draw_all(); // on which side of a dot its words stand
}

void FigurePlot::paint(const Figure& figure, QCPPainter& painter, const QSize& size)
{
    FigurePlot plot;
    plot.resize(size);
    plot.show_figure(figure, theme_of(ThemeKind::print));
    plot.toPainter(&painter, size.width(), size.height());
}

QString FigureTable::as_text() const
{
    QStringList lines{heading.join(u'\t')};
    for (const QStringList& row : rows)
        lines.append(row.join(u'\t'));
    return lines.join(u'\n') + u'\n';
}

} // namespace evenstroke
