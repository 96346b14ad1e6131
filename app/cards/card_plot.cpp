// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/cards/card_plot.h"

#include "app/desk/number_text.h"
#include "app/trends/plot_tickers.h"

#include <algorithm>
#include <cmath>

namespace evenstroke {

namespace {

constexpr int left_margin = 52, right_margin = 12, top_margin = 22, bottom_margin = 40;
constexpr double nearest_zoom = 400.0; // times nearer than the whole picture
constexpr double spot_size = 17.0;

/// Ticks of logarithmic axes stand at 1, 2 and 5 of each decade.
class DecadeTicker : public QCPAxisTicker
{
protected:
    QVector<double> createTickVector(double, const QCPRange& range) override
    {
        QVector<double> ticks;
        for (int decade = static_cast<int>(std::floor(range.lower)); decade <= range.upper; ++decade)
            for (const double first : {1.0, 2.0, 5.0})
                ticks.append(decade + std::log10(first));
        return ticks;
    }
    int getSubTickCount(double) override { return 0; }
    QString getTickLabel(double tick, const QLocale&, QChar, int) override
    {
        const double value = std::pow(10.0, tick);
        return number_text(value, value < 0.95 ? 1 : 0);
    }
};

} // namespace

CardPlot::CardPlot(QWidget* parent) : QCustomPlot(parent), theme_(&theme())
{
    setFocusPolicy(Qt::NoFocus);
    setMouseTracking(true);
    setNotAntialiasedElements(QCP::aeAxes | QCP::aeGrid);
    setInteractions(QCP::iRangeDrag | QCP::iRangeZoom);
    setNoAntialiasingOnDrag(true);
    axisRect()->setAutoMargins(QCP::msNone);
    axisRect()->setMargins(QMargins(left_margin, top_margin, right_margin, bottom_margin));
    for (QCPAxis* axis : {xAxis, yAxis})
        connect(axis, qOverload<const QCPRange&>(&QCPAxis::rangeChanged), this, &CardPlot::keep_within);
}

void CardPlot::show_picture(const CardPicture& picture, const Theme& colours)
{
    // The same view of another cylinder keeps its zoom: that is how cylinders are compared.
    const bool keep = zoomed() && picture.view == picture_.view && picture.empty.isEmpty() && picture_.empty.isEmpty();
    const QCPRange x = xAxis->range(), y = yAxis->range();
    picture_ = picture;
    theme_ = &colours;
    setAccessibleName(picture.name);
    setAccessibleDescription(picture.empty.isEmpty() ? picture.sentence : picture.empty);
    if (cursor_ && (*cursor_ < picture.x_low || *cursor_ > picture.x_high))
        cursor_.reset();
    draw_all();
    if (keep) {
        xAxis->setRange(x);
        yAxis->setRange(y);
    }
    emit cursor_moved();
}

void CardPlot::draw_all()
{
    clearPlottables();
    clearItems();
    cursor_line_ = nullptr;
    part_names_.clear();
    setBackground(QBrush(theme_->page));
    xAxis->setVisible(picture_.empty.isEmpty());
    yAxis->setVisible(picture_.empty.isEmpty());
    xAxis->grid()->setVisible(false);
    yAxis->grid()->setVisible(picture_.empty.isEmpty());
    if (picture_.empty.isEmpty()) {
        style_axes();
        show_all();
        add_parts();
        add_band();
        add_cycles();
        add_lines();
        add_marks();
        add_spots();
        add_titles();
        set_cursor(cursor_);
    }
    replot(rpQueuedReplot);
}

void CardPlot::style_axes()
{
    const QPen none(Qt::NoPen);
    for (QCPAxis* axis : {xAxis, yAxis}) {
        const bool below = axis == xAxis;
        axis->setBasePen(below ? theme_->pen(theme_->muted) : none);
        axis->setTickPen(below ? theme_->pen(theme_->muted) : none);
        axis->setSubTickPen(none);
        axis->setTickLengthIn(0);
        axis->setTickLengthOut(below ? 4 : 0);
        axis->setTickLabelFont(type(TypeSize::label));
        axis->setTickLabelColor(theme_->muted);
        axis->grid()->setPen(theme_->pen(theme_->rule));
        axis->grid()->setZeroLinePen(!below && picture_.is_signed ? theme_->pen(theme_->muted) : none);
        if (picture_.logarithmic)
            axis->setTicker(QSharedPointer<QCPAxisTicker>(new DecadeTicker));
        else
            axis->setTicker(QSharedPointer<QCPAxisTicker>(new NumberTicker(!below && picture_.is_signed)));
    }
}

QColor CardPlot::colour_of(FigureRole role) const
{
    switch (role) {
    case FigureRole::in_hand: return theme_->line;
    case FigureRole::other: return theme_->muted;
    case FigureRole::limit:
    case FigureRole::guide: break;
    }
    return theme_->others;
}

QCPItemText* CardPlot::add_text(const QString& text, const QColor& colour, Qt::Alignment alignment)
{
    auto* item = new QCPItemText(this);
    item->setText(text);
    item->setFont(type(TypeSize::label));
    item->setColor(colour);
    item->setClipToAxisRect(false);
    item->setPositionAlignment(alignment);
    return item;
}

void CardPlot::stand_over_x(QCPItemPosition& position)
{
    position.setTypeX(QCPItemPosition::ptPlotCoords);
    position.setTypeY(QCPItemPosition::ptAxisRectRatio);
    position.setAxisRect(axisRect());
}

/// Shaded from top to bottom; the names stand at the top within the plot.
void CardPlot::add_parts()
{
    for (const CardPart& part : picture_.parts) {
        if (part.shaded) {
            auto* area = new QCPItemRect(this);
            area->setLayer(QStringLiteral("background"));
            area->setPen(QPen(Qt::NoPen));
            area->setBrush(theme_->print() ? QBrush(theme_->rule) : QBrush(theme_->sheet));
            for (auto* corner : {area->topLeft, area->bottomRight})
                stand_over_x(*corner);
            area->topLeft->setCoords(part.from, 0.0);
            area->bottomRight->setCoords(part.to, 1.0);
        }
        if (part.name.isEmpty())
            continue;
        QCPItemText* name = add_text(part.name, part.shaded ? theme_->ink : theme_->muted, Qt::AlignHCenter | Qt::AlignTop);
        name->setClipToAxisRect(true);
        stand_over_x(*name->position);
        name->setPadding(QMargins(0, 3, 0, 0));
        part_names_.push_back({name, part.from, part.to});
        auto* edge = new QCPItemLine(this);
        edge->setPen(theme_->pen(theme_->rule));
        for (auto* end : {edge->start, edge->end})
            stand_over_x(*end);
        edge->start->setCoords(part.to, 0.0);
        edge->end->setCoords(part.to, 1.0);
    }
    place_part_names();
}

void CardPlot::place_part_names()
{
    for (const PartName& name : part_names_) {
        const double from = std::max(name.from, xAxis->range().lower), to = std::min(name.to, xAxis->range().upper);
        name.text->setVisible(to > from);
        name.text->position->setCoords(0.5 * (from + to), 0.0);
    }
}

void CardPlot::add_band()
{
    if (picture_.band)
        fill_between(*picture_.band, theme_->band_brush(), theme_->print() ? theme_->pen(theme_->muted, 2) : QPen(Qt::NoPen));
    if (picture_.beyond)
        fill_between(*picture_.beyond, QBrush(mixed(theme_->line, theme_->page, 0.55)), QPen(Qt::NoPen));
}

void CardPlot::fill_between(const CardBand& band, const QBrush& brush, const QPen& edge)
{
    const QVector<double> x(band.x.begin(), band.x.end());
    QCPGraph *lower = addGraph(), *upper = addGraph();
    lower->setData(x, QVector<double>(band.low.begin(), band.low.end()), true);
    upper->setData(x, QVector<double>(band.high.begin(), band.high.end()), true);
    lower->setPen(edge);
    upper->setPen(edge);
    upper->setBrush(brush);
    upper->setChannelFillGraph(lower);
}

void CardPlot::add_cycles()
{
    int number = 0;
    for (const auto& envelope : picture_.others)
        (new CycleBand(xAxis, yAxis, envelope))->setPen(theme_->pen(theme_->others_level(number++ % 5)));
    if (picture_.cycles && picture_.cycles->cycles() > 1)
        (new CycleBand(xAxis, yAxis, picture_.cycles))->setPen(theme_->pen(theme_->others_level(0)));
}

void CardPlot::add_lines()
{
    for (const CardLine& line : picture_.lines) {
        if (line.role == FigureRole::limit)
            continue;
        QPen pen = theme_->pen(colour_of(line.role));
        if (line.dashed)
            pen.setStyle(Qt::DashLine);
        const QVector<double> x(line.x.begin(), line.x.end()), y(line.y.begin(), line.y.end());
        if (std::is_sorted(line.x.begin(), line.x.end())) { // a graph draws no more points than pixels
            QCPGraph* graph = addGraph();
            graph->setData(x, y, true);
            graph->setPen(pen);
        } else {
            auto* curve = new QCPCurve(xAxis, yAxis);
            curve->setData(x, y);
            curve->setPen(pen);
        }
    }
}

void CardPlot::add_marks()
{
    for (const FigureMark& mark : picture_.marks) {
        auto* line = new QCPItemLine(this);
        QPen pen = theme_->pen(mark.role == FigureRole::guide ? theme_->others : theme_->muted);
        pen.setStyle(Qt::DashLine);
        line->setPen(pen);
        for (auto* end : {line->start, line->end})
            stand_over_x(*end);
        line->start->setCoords(mark.at, 0.0);
        line->end->setCoords(mark.at, 1.0);
        QCPItemText* label = add_text(mark.label, theme_->muted, Qt::AlignLeft | Qt::AlignBottom);
        label->setClipToAxisRect(true);
        stand_over_x(*label->position);
        label->position->setCoords(mark.at, 1.0 - 0.07 * static_cast<double>(&mark - picture_.marks.data()));
        label->setPadding(QMargins(4, 0, 0, 2));
    }
}

void CardPlot::add_spots()
{
    for (const CardSpot& spot : picture_.spots) {
        auto* ring = new QCPItemTracer(this);
        ring->setStyle(QCPItemTracer::tsCircle);
        ring->setSize(spot_size);
        ring->setPen(theme_->pen(theme_->watch));
        ring->setBrush(theme_->page);
        ring->position->setCoords(spot.x, spot.y);
        QCPItemText* number = add_text(QString::number(spot.number), theme_->watch, Qt::AlignCenter);
        number->setClipToAxisRect(true);
        number->position->setCoords(spot.x, spot.y);
    }
}

void CardPlot::add_titles()
{
    QCPItemText* above = add_text(picture_.y_title, theme_->muted, Qt::AlignLeft | Qt::AlignBottom);
    above->position->setType(QCPItemPosition::ptAxisRectRatio);
    above->position->setCoords(0.0, 0.0);
    above->setPadding(QMargins(0, 0, 0, 4));
    QCPItemText* below = add_text(picture_.x_title, theme_->muted, Qt::AlignRight | Qt::AlignTop);
    below->position->setType(QCPItemPosition::ptAxisRectRatio);
    below->position->setCoords(1.0, 1.0);
    below->setPadding(QMargins(0, 20, 0, 0));
}

void CardPlot::show_all()
{
    xAxis->setRange(picture_.x_low, picture_.x_high);
    yAxis->setRange(picture_.y_low, picture_.y_high);
    replot(rpQueuedReplot);
}

bool CardPlot::zoomed() const
{
    const double whole = picture_.x_high - picture_.x_low, tall = picture_.y_high - picture_.y_low;
    return xAxis->range().size() < 0.999 * whole || yAxis->range().size() < 0.999 * tall;
}

/// Nothing is shown beyond the picture, and nothing nearer than what its samples can tell.
void CardPlot::keep_within()
{
    if (keeping_ || !picture_.empty.isEmpty())
        return;
    keeping_ = true;
    const auto keep = [](QCPAxis* axis, double low, double high) {
        const double size = std::clamp(axis->range().size(), (high - low) / nearest_zoom, high - low);
        const double middle = std::clamp(axis->range().center(), low + 0.5 * size, high - 0.5 * size);
        axis->setRange(middle - 0.5 * size, middle + 0.5 * size);
    };
    keep(xAxis, picture_.x_low, picture_.x_high);
    keep(yAxis, picture_.y_low, picture_.y_high);
    keeping_ = false;
    place_part_names();
}

void CardPlot::paint(const CardPicture& picture, QCPPainter& painter, const QSize& size)
{
    CardPlot plot;
    plot.resize(size);
    plot.show_picture(picture, theme_of(ThemeKind::print));
    plot.toPainter(&painter, size.width(), size.height());
}

bool CardPlot::save(const CardPicture& picture, const QString& path, const QSize& size)
{
    CardPlot plot;
    plot.resize(size);
    plot.show_picture(picture, theme_of(ThemeKind::print));
    return path.endsWith(QStringLiteral(".pdf"), Qt::CaseInsensitive) ? plot.savePdf(path, size.width(), size.height())
                                                                      : plot.savePng(path, size.width(), size.height(), 2.0);
}

} // namespace evenstroke
