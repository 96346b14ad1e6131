// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/cards/cylinder_strip.h"

#include "app/cards/card_words.h"
#include "app/desk/number_text.h"

#include <QEvent>
#include <QMouseEvent>
#include <QPainter>
#include <QPainterPath>

#include <algorithm>
#include <cmath>

namespace evenstroke {

namespace {

constexpr int most_a_row = 12, row_height = 104, gap = 6, name_height = 17, words_height = 17;
constexpr double degrees_before = -120.0, degrees_after = 140.0; // the closed part and a little of the opening
constexpr double least_scale = 2.0;                              // bar either way: noise must not look like a fault

int columns_of(int cylinders) { return cylinders <= most_a_row ? std::max(1, cylinders) : (cylinders + 1) / 2; }

QRectF cell_of(const QRectF& area, int cylinders, int cylinder)
{
    const int columns = columns_of(cylinders), rows = (cylinders + columns - 1) / columns;
    const double width = (area.width() - gap * (columns - 1)) / columns, height = (area.height() - gap * (rows - 1)) / rows;
    const int column = (cylinder - 1) % columns, row = (cylinder - 1) / columns;
    return {area.left() + column * (width + gap), area.top() + row * (height + gap), width, height};
}

/// The same scale for all cylinders, bar either way.
double scale_of(const CardsInHand& cards)
{
    double most = least_scale;
    for (const indicator::ReviewedCard& card : cards.review.cards)
        if (card.comparison)
            for (std::size_t i = 0; i < card.comparison->angle.size(); ++i)
                if (card.comparison->angle[i] >= degrees_before && card.comparison->angle[i] <= degrees_after)
                    most = std::max(most, std::abs(card.comparison->difference[i]));
    return 1.05 * most;
}

class CellPainter
{
public:
    CellPainter(QPainter& painter, const Theme& colours, const QRectF& frame, double scale)
        : painter_(painter), theme_(colours), frame_(frame), scale_(scale)
    {
    }

    void paint(const indicator::Comparison& with)
    {
        QPolygonF band, line;
        std::vector<QPointF> below;
        for (std::size_t i = 0; i < with.angle.size(); ++i) {
            if (with.angle[i] < degrees_before || with.angle[i] > degrees_after || !std::isfinite(with.difference[i]))
                continue;
            band.append(at(with.angle[i], with.half_width[i]));
            below.push_back(at(with.angle[i], -with.half_width[i]));
            line.append(at(with.angle[i], with.difference[i]));
        }
        for (auto point = below.rbegin(); point != below.rend(); ++point)
            band.append(*point);
        painter_.setRenderHint(QPainter::Antialiasing, false);
        painter_.setPen(Qt::NoPen);
        painter_.setBrush(theme_.band_brush());
        painter_.drawPolygon(band);
        painter_.setBrush(Qt::NoBrush);
        painter_.setPen(theme_.pen(theme_.rule));
        painter_.drawLine(at(0.0, scale_), at(0.0, -scale_));
        painter_.setRenderHint(QPainter::Antialiasing);
        painter_.setPen(theme_.pen(theme_.line));
        painter_.drawPolyline(line);
    }

private:
    QPointF at(double angle, double bar) const
    {
        const double x = frame_.left() + frame_.width() * (angle - degrees_before) / (degrees_after - degrees_before);
        return {x, frame_.center().y() - 0.5 * frame_.height() * std::clamp(bar / scale_, -1.0, 1.0)};
    }

    QPainter& painter_;
    const Theme& theme_;
    QRectF frame_;
    double scale_;
};

bool differs(const CardsInHand& cards, int cylinder)
{
    const indicator::ReviewedCard* card = cards.find(cylinder);
    return card && card->comparison
           && std::any_of(card->comparison->parts.begin(), card->comparison->parts.end(), [](const indicator::PartDifference& part) {
                  return part.clear && part.part != indicator::CyclePart::gas_exchange;
              });
}

} // namespace

CylinderStrip::CylinderStrip(QWidget* parent) : QWidget(parent)
{
    setFocusPolicy(Qt::NoFocus);
    setSizePolicy(QSizePolicy::Expanding, QSizePolicy::Fixed);
}

int CylinderStrip::rows() const
{
    const int cylinders = cards_ ? cards_->engine().cylinders : 1;
    return (cylinders + columns_of(cylinders) - 1) / columns_of(cylinders);
}

QSize CylinderStrip::sizeHint() const { return {400, rows() * row_height + (rows() - 1) * gap}; }

void CylinderStrip::show_cards(const std::shared_ptr<const CardsInHand>& cards, int cylinder)
{
    cards_ = cards;
    cylinder_ = cylinder;
    QStringList spoken;
    if (cards)
        for (int number = 1; number <= cards->engine().cylinders; ++number)
            spoken.append(tr("%1: %2").arg(place_title(cards->engine(), Place::cylinder(number)), cylinder_words(*cards, number)));
    setAccessibleName(tr("Differences of all cylinders"));
    setAccessibleDescription(spoken.join(QStringLiteral("; ")));
    updateGeometry();
    update();
}

void CylinderStrip::paint(const CardsInHand& cards, int cylinder, QPainter& painter, const QRectF& area, const Theme& colours)
{
    const double scale = scale_of(cards);
    for (int number = 1; number <= cards.engine().cylinders; ++number) {
        const QRectF cell = cell_of(area, cards.engine().cylinders, number);
        const bool in_hand = number == cylinder, apart = differs(cards, number);
        painter.setRenderHint(QPainter::Antialiasing, false);
        painter.setPen(in_hand ? colours.pen(colours.ink) : colours.pen(colours.rule));
        painter.setBrush(colours.print() ? QBrush(Qt::NoBrush) : QBrush(colours.sheet));
        painter.drawRect(cell.adjusted(0.5, 0.5, -0.5, -0.5));
        painter.setFont(type(TypeSize::label, in_hand));
        painter.setPen(in_hand ? colours.ink : colours.muted);
        painter.drawText(cell.adjusted(6, 2, -4, 0), Qt::AlignLeft | Qt::AlignTop, to_qstring(cards.engine().cylinder_name(number)));
        const indicator::ReviewedCard* card = cards.find(number);
        const QRectF frame = cell.adjusted(4, name_height, -4, -words_height);
        if (card && card->comparison)
            CellPainter(painter, colours, frame, scale).paint(*card->comparison);
        painter.setFont(type(TypeSize::label, apart));
        painter.setPen(apart ? colours.ink : colours.muted);
        QString words = cylinder_words(cards, number);
        const QFontMetrics metrics(painter.font());
        if (apart && metrics.horizontalAdvance(words) > cell.width() - 8.0) // the picture shows where; the number says how much
            words = tr("%1 bar").arg(words.section(QLatin1Char(' '), -1));
        words = metrics.elidedText(words, Qt::ElideRight, static_cast<int>(cell.width()) - 8);
        painter.drawText(cell.adjusted(4, 0, -4, -2), Qt::AlignHCenter | Qt::AlignBottom, words);
        if (card && !card->remarks.empty()) {
            painter.setPen(colours.watch);
            painter.setFont(type(TypeSize::label, true));
            painter.drawText(cell.adjusted(0, 2, -6, 0), Qt::AlignRight | Qt::AlignTop,
                             QCoreApplication::translate("evenstroke", "%n remark(s)", nullptr, static_cast<int>(card->remarks.size())));
        }
    }
}

void CylinderStrip::paintEvent(QPaintEvent*)
{
    if (!cards_)
        return;
    QPainter painter(this);
    paint(*cards_, cylinder_, painter, QRectF(rect()), theme());
}

void CylinderStrip::mousePressEvent(QMouseEvent* event)
{
    if (!cards_)
        return;
    for (int number = 1; number <= cards_->engine().cylinders; ++number)
        if (cell_of(QRectF(rect()), cards_->engine().cylinders, number).contains(event->position()))
            emit cylinder_chosen(number);
    event->accept();
}

void CylinderStrip::changeEvent(QEvent* event)
{
    if (event->type() == QEvent::StyleChange)
        update();
    QWidget::changeEvent(event);
}

} // namespace evenstroke
