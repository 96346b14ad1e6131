// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/survey/page_preview.h"

#include "app/desk/theme.h"
#include "app/survey/report_painter.h"

#include <QKeyEvent>
#include <QWheelEvent>

#include <qcustomplot.h>

#include <algorithm>

namespace evenstroke {
namespace {

/// White paper would be the brightest thing on a dark bridge.
QColor paper()
{
    return theme().kind == ThemeKind::night ? QColor(0xB9B4A8) : QColor(Qt::white);
}

constexpr double largest_zoom = 3.0;

} // namespace

PagePreview::PagePreview(QWidget* parent) : QWidget(parent), painter_(std::make_unique<ReportPainter>())
{
    setFocusPolicy(Qt::StrongFocus);
    setAccessibleName(tr("Preview of the report"));
}

PagePreview::~PagePreview() = default;

void PagePreview::show_layout(std::shared_ptr<const ReportLayout> layout)
{
    layout_ = std::move(layout);
    page_ = std::clamp(page_, 0, std::max(0, pages() - 1));
    draw_page();
    emit page_turned();
}

int PagePreview::pages() const
{
    return layout_ ? static_cast<int>(layout_->pages.size()) : 0;
}

void PagePreview::turn_to(int page)
{
    const int wanted = std::clamp(page, 0, std::max(0, pages() - 1));
    if (wanted == page_)
        return;
    page_ = wanted;
    offset_ = 0.0;
    draw_page();
    emit page_turned();
}

void PagePreview::draw_page()
{
    picture_ = {};
    if (page_ < pages() && width() > 10 && height() > 10) {
        const ReportPage& page = layout_->pages[static_cast<std::size_t>(page_)];
        const QSizeF sheet = sheet_size(page.landscape);
        const double scale = zoom_ * std::min((width() - 2) / sheet.width(), (height() - 2) / sheet.height());
        const double ratio = devicePixelRatioF();
        QPixmap picture((sheet * scale * ratio).toSize());
        picture.setDevicePixelRatio(ratio);
        picture.fill(paper());
        QCPPainter painter(&picture);
        painter.setRenderHints(QPainter::Antialiasing | QPainter::TextAntialiasing);
        painter.setMode(QCPPainter::pmVectorized);
        painter.scale(scale, scale);
        painter_->draw(page, painter);
        painter.end();
        picture_ = picture;
    }
    update();
}

void PagePreview::zoom(double factor)
{
    zoom_ = std::clamp(zoom_ * factor, 1.0, largest_zoom);
    draw_page();
}

void PagePreview::paintEvent(QPaintEvent*)
{
    QPainter painter(this);
    if (picture_.isNull())
        return;
    const QSizeF size = picture_.deviceIndependentSize();
    offset_ = std::clamp(offset_, 0.0, std::max(0.0, size.height() - height() + 2.0));
    const double x = std::max(0.0, (width() - size.width()) / 2.0);
    painter.drawPixmap(QPointF(x, 1.0 - offset_), picture_);
    painter.setPen(QPen(hasFocus() ? theme().line : theme().rule, 1.0));
    painter.drawRect(QRectF(x, 0.5 - offset_, size.width(), size.height() + 1.0));
}

void PagePreview::keyPressEvent(QKeyEvent* event)
{
    const double step = height() * 0.8;
    const bool taller = picture_.deviceIndependentSize().height() > height() + 1.0;
    switch (event->key()) {
    case Qt::Key_PageDown:
    case Qt::Key_Space: turn_to(page_ + 1); return;
    case Qt::Key_PageUp: turn_to(page_ - 1); return;
    case Qt::Key_Home: turn_to(0); return;
    case Qt::Key_End: turn_to(pages() - 1); return;
    case Qt::Key_Plus: zoom(1.25); return;
    case Qt::Key_Minus: zoom(0.8); return;
    case Qt::Key_Down:
        if (taller)
            offset_ += step / 4.0;
        else
            turn_to(page_ + 1);
        update();
        return;
    case Qt::Key_Up:
        if (taller)
            offset_ -= step / 4.0;
        else
            turn_to(page_ - 1);
        update();
        return;
    default: QWidget::keyPressEvent(event);
    }
}

void PagePreview::wheelEvent(QWheelEvent* event)
{
    if (event->modifiers() & Qt::ControlModifier)
        zoom(event->angleDelta().y() > 0 ? 1.25 : 0.8);
    else if (picture_.deviceIndependentSize().height() > height() + 1.0)
        offset_ -= event->angleDelta().y() / 2.0;
    else
        turn_to(page_ + (event->angleDelta().y() > 0 ? -1 : 1));
    update();
    event->accept();
}

void PagePreview::resizeEvent(QResizeEvent*) { draw_page(); }

void PagePreview::changeEvent(QEvent* event)
{
    if (event->type() == QEvent::StyleChange)
        draw_page();
    QWidget::changeEvent(event);
}

} // namespace evenstroke
