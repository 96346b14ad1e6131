// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/entry/usual_scale.h"

#include "app/desk/theme.h"

#include <QPainter>

#include <algorithm>
#include <cmath>

namespace evenstroke {
namespace {

constexpr int side = 10, band_top = 10, band_height = 18, labels_top = 34;

struct Span
{
    double low, high;
};

/// The band in the middle with as much again on both sides; last time's value is always on it. A value that
/// was mistyped by a power of ten must not squeeze the band to nothing: it is shown at the end, with an
/// arrow.
Span scale_of(const UsualScale::Content& c)
{
    double low = c.low.value_or(c.expected.value_or(c.previous.value_or(c.typed.value_or(0.0))));
    double high = c.high.value_or(low);
    const double width = high > low ? high - low : std::max(std::abs(low) * 0.1, 1e-6);
    low -= width;
    high += width;
    for (const auto& shown : {c.previous, c.expected})
        if (shown) {
            low = std::min(low, *shown - 0.2 * width);
            high = std::max(high, *shown + 0.2 * width);
        }
    if (c.typed && *c.typed > low - 3.0 * width && *c.typed < high + 3.0 * width) {
        low = std::min(low, *c.typed - 0.2 * width);
        high = std::max(high, *c.typed + 0.2 * width);
    }
    return {low, high};
}

void draw_label(QPainter& painter, double x, int width, const QString& text)
{
    const int text_width = painter.fontMetrics().horizontalAdvance(text);
    const int left = std::clamp(static_cast<int>(x) - text_width / 2, 0, std::max(0, width - text_width));
    painter.drawText(left, labels_top + painter.fontMetrics().ascent(), text);
}

} // namespace

UsualScale::UsualScale(QWidget* parent) : QWidget(parent)
{
    setSizePolicy(QSizePolicy::Expanding, QSizePolicy::Fixed);
}

void UsualScale::show_content(const Content& content)
{
    content_ = content;
    QString description;
    if (content.low && content.high)
        description = tr("Usual between %1 and %2")
                          .arg(number_text(*content.low, content.decimals),
                               number_text(*content.high, content.decimals));
    if (content.typed)
        description += (description.isEmpty() ? QString() : QStringLiteral(", ")) +
                       tr("typed %1").arg(number_text(*content.typed, content.decimals));
    setAccessibleName(description);
    setVisible(!content.empty());
    update();
}

void UsualScale::paintEvent(QPaintEvent*)
{
    QPainter painter(this);
    painter.setRenderHint(QPainter::Antialiasing);
    const Span span = scale_of(content_);
    const auto x = [&](double value) {
        return side + (value - span.low) / (span.high - span.low) * (width() - 2.0 * side);
    };
    const int line = band_top + band_height / 2;
    painter.setFont(type(TypeSize::label));
    if (content_.low && content_.high) {
        painter.setPen(Qt::NoPen);
        painter.setBrush(theme().band_brush());
        painter.drawRect(
            QRectF(x(*content_.low), band_top, x(*content_.high) - x(*content_.low), band_height));
    }
    painter.setPen(QPen(theme().rule, 1));
    painter.drawLine(side, line, width() - side, line);
    painter.setPen(theme().muted);
    if (content_.low && content_.high && x(*content_.high) - x(*content_.low) > 40) {
        draw_label(painter, x(*content_.low), width(), number_text(*content_.low, content_.decimals));
        draw_label(painter, x(*content_.high), width(), number_text(*content_.high, content_.decimals));
    }
    if (content_.expected) {
        painter.setPen(QPen(theme().muted, 1));
        painter.drawLine(QPointF(x(*content_.expected), band_top - 2),
                         QPointF(x(*content_.expected), band_top + band_height + 2));
    }
    if (content_.previous) {
        painter.setPen(QPen(theme().muted, 1));
        painter.setBrush(theme().page);
        painter.drawEllipse(QPointF(x(*content_.previous), line), 4, 4);
    }
    if (!content_.typed)
        return;
    if (*content_.typed < span.low || *content_.typed > span.high) {
        paint_off_scale(painter, *content_.typed, span.low, span.high, line);
        return;
    }
    painter.setPen(Qt::NoPen);
    painter.setBrush(theme().line);
    painter.drawEllipse(QPointF(x(*content_.typed), line), 5, 5);
}

void UsualScale::paint_off_scale(QPainter& painter, double typed, double low, double, int line) const
{
    const bool left = typed < low;
    const double tip = left ? 1.0 : width() - 1.0, back = left ? 9.0 : width() - 9.0;
    painter.setPen(Qt::NoPen);
    painter.setBrush(theme().line);
    const QPointF arrow[] = {{tip, double(line)}, {back, line - 6.0}, {back, line + 6.0}};
    painter.drawPolygon(arrow, 3);
}

} // namespace evenstroke
