// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/fleet/fleet_view.h"

#include "app/desk/theme.h"

#include <QHeaderView>
#include <QKeyEvent>
#include <QMouseEvent>
#include <QPainter>
#include <QPainterPath>
#include <QScrollBar>
#include <QStyledItemDelegate>

#include <algorithm>
#include <cmath>

namespace evenstroke {

namespace {

constexpr int row_height = 56, fold_height = 32, ship_width = 172, date_width = 104, strip_width = 88, strip_least = 46, sentence_least = 240, gap = 12;
constexpr int sentence_top = 8, sentence_indent = 64;
constexpr double strip_reach = 3.2; // standard deviations from the middle to the edge while quiet

void paint_strip(QPainter& painter, const QRectF& area, const FleetStrip& strip, const Theme& t)
{
    if (strip.values.empty())
        return;
    double reach = strip_reach;
    for (const float value : strip.values)
        reach = std::max(reach, 1.05 * std::abs(static_cast<double>(value)));
    const auto y_of = [&](double value) { return area.center().y() - value / reach * area.height() / 2.0; };
    painter.fillRect(QRectF(area.left(), y_of(2.0), area.width(), y_of(-2.0) - y_of(2.0)), t.band_brush());
    painter.setPen(t.pen(t.rule));
    painter.drawLine(QPointF(area.left(), y_of(0.0)), QPointF(area.right(), y_of(0.0)));
    const double step = area.width() / std::max<double>(1.0, static_cast<double>(strip.values.size()) - 1.0);
    QPainterPath path;
    QPointF last;
    for (std::size_t i = 0; i < strip.values.size(); ++i) {
        last = {area.left() + step * static_cast<double>(i), y_of(static_cast<double>(strip.values[i]))};
        i == 0 ? path.moveTo(last) : path.lineTo(last);
    }
    painter.save();
    painter.setRenderHint(QPainter::Antialiasing);
    QPen pen = t.pen(t.line);
    pen.setWidthF(strip.level >= Level::watch ? 1.6 : 1.0);
    painter.setPen(pen);
    painter.drawPath(path);
    painter.setBrush(t.line);
    painter.drawEllipse(last, 2.0, 2.0);
    painter.restore();
    if (!has_mark(strip.level))
        return;
    draw_mark(painter, QRectF(area.right() - 10.0, area.top() - 9.0, 9.0, 9.0), strip.level, t);
    painter.setFont(type(TypeSize::label));
    painter.setPen(t.level_colour(strip.level));
    painter.drawText(QRectF(area.left(), area.top() - 12.0, area.width() - 14.0, 14.0), Qt::AlignRight | Qt::AlignVCenter, level_text(strip.level));
}

void paint_two_lines(QPainter& painter, const QRect& area, const QString& first, const QString& second, const Theme& t)
{
    painter.setFont(type(TypeSize::body));
    painter.setPen(t.ink);
    painter.drawText(area.adjusted(0, 8, 0, 0), Qt::AlignTop | Qt::AlignLeft,
                     QFontMetrics(painter.font()).elidedText(first, Qt::ElideRight, area.width()));
    painter.setFont(type(TypeSize::label));
    painter.setPen(t.muted);
    painter.drawText(area.adjusted(0, 28, 0, 0), Qt::AlignTop | Qt::AlignLeft,
                     QFontMetrics(painter.font()).elidedText(second, Qt::ElideRight, area.width()));
}

void paint_sentence(QPainter& painter, const QRect& area, const FleetRow& row, const QString& words, const Theme& t)
{
    QRect text = area;
    if (has_mark(row.summary.level)) {
        const QRect mark(area.left(), area.top() + 9, 13, 13);
        draw_mark(painter, mark, row.summary.level, t);
        painter.setFont(type(TypeSize::label));
        painter.setPen(t.level_colour(row.summary.level));
        painter.drawText(QRect(mark.right() + 6, area.top() + 8, 44, 16), Qt::AlignVCenter | Qt::AlignLeft,
                         level_text(row.summary.level));
        text.setLeft(area.left() + sentence_indent);
    }
    painter.setFont(type(TypeSize::label));
    painter.setPen(has_mark(row.summary.level) ? t.ink : t.muted);
    painter.drawText(text.adjusted(0, sentence_top, 0, 0), Qt::AlignTop | Qt::AlignLeft | Qt::TextWordWrap, words);
}

class RowDelegate : public QStyledItemDelegate
{
public:
    explicit RowDelegate(FleetView& view) : QStyledItemDelegate(&view), view_(view) {}

    void paint(QPainter* painter, const QStyleOptionViewItem& option, const QModelIndex& index) const override
    {
        const Theme& t = theme();
        const bool in_hand = index.row() == view_.currentIndex().row() && view_.hasFocus();
        if (in_hand || (option.state & QStyle::State_MouseOver))
            painter->fillRect(option.rect, t.sheet);
        paint_content(*painter, option.rect.adjusted(4, 0, -gap, 0), index, t);
        painter->setPen(t.rule);
        painter->drawLine(option.rect.bottomLeft(), option.rect.bottomRight());
        if (in_hand) {
            painter->setPen(t.line);
            painter->drawLine(option.rect.topLeft(), option.rect.topRight());
            painter->drawLine(option.rect.bottomLeft(), option.rect.bottomRight());
            if (index.column() == FleetModel::ship)
                painter->fillRect(QRect(option.rect.topLeft(), QSize(3, option.rect.height())), t.line);
        }
    }

private:
    void paint_content(QPainter& painter, const QRect& area, const QModelIndex& index, const Theme& t) const
    {
        const FleetModel& model = view_.fleet_model();
        const FleetRow* row = model.row(index.row());
        if (!row) {
            if (index.column() != FleetModel::ship)
                return;
            painter.setFont(type(TypeSize::body));
            painter.setPen(t.muted);
            painter.drawText(area, Qt::AlignVCenter | Qt::AlignLeft, model.fold_text());
            return;
        }
        const int column = index.column();
        if (column == FleetModel::ship) {
            paint_two_lines(painter, area.adjusted(4, 0, 0, 0), row->vessel_name, row->engine_name, t);
        } else if (column == FleetModel::last_reading) {
            painter.setFont(type(TypeSize::label, model.is_late(*row)));
            painter.setPen(model.is_late(*row) ? t.ink : t.muted);
            painter.drawText(area.adjusted(0, 9, 0, 0), Qt::AlignTop | Qt::AlignLeft | Qt::TextWordWrap,
                             model.last_reading_words(*row));
        } else if (column == FleetModel::sentence) {
            paint_sentence(painter, area, *row, model.sentence_words(*row), t);
        } else if (const auto number = static_cast<std::size_t>(column - FleetModel::first_strip);
                   number < row->summary.strips.size()) {
            paint_strip(painter, QRectF(area.left(), area.top() + 11, area.width(), row_height - 21),
                        row->summary.strips[number], t);
        }
    }
    const FleetView& view_;
};

} // namespace

FleetView::FleetView(QWidget* parent) : QTableView(parent)
{
    setModel(&model_);
    setItemDelegate(new RowDelegate(*this));
    verticalHeader()->hide();
    verticalHeader()->setMinimumSectionSize(10);
    verticalHeader()->setDefaultSectionSize(row_height);
    horizontalHeader()->setSectionResizeMode(QHeaderView::Fixed);
    horizontalHeader()->setDefaultAlignment(Qt::AlignLeft | Qt::AlignBottom | Qt::Alignment(Qt::TextWordWrap));
    horizontalHeader()->setSectionsClickable(false);
    horizontalHeader()->setHighlightSections(false);
    horizontalHeader()->setFixedHeight(40);
    setShowGrid(false);
    setFrameShape(QFrame::NoFrame);
    setEditTriggers(NoEditTriggers);
    setSelectionMode(NoSelection); // the cell in hand is drawn by the delegate
    setSelectionBehavior(SelectRows);
    setTabKeyNavigation(false);
    setMouseTracking(true);
    setVerticalScrollMode(ScrollPerPixel);
    setHorizontalScrollBarPolicy(Qt::ScrollBarAlwaysOff);
    setAccessibleName(tr("Fleet, worst first"));
}

void FleetView::show_fleet(std::vector<FleetRow> rows, TimePoint now)
{
    const FleetRow* current = model_.row(currentIndex().row());
    const QString was = current ? current->engine_id : QString();
    const int scrolled = verticalScrollBar()->value();
    model_.show_fleet(std::move(rows), now);
    set_sizes();
    // Until a row was chosen the worst engine is in hand, also when a judgement moves another one up.
    const int row = chosen_ ? std::max(0, model_.row_of(was)) : 0;
    if (model_.rowCount() > 0)
        setCurrentIndex(model_.index(row, 0));
    verticalScrollBar()->setValue(scrolled);
}

void FleetView::set_sizes()
{
    setColumnWidth(FleetModel::ship, ship_width);
    setColumnWidth(FleetModel::last_reading, date_width);
    // In a narrow window the strips give way before the sentence does.
    const int room = (viewport()->width() - ship_width - date_width - sentence_least) / fleet_strip_count;
    const int strip = std::clamp(room, strip_least, strip_width);
    for (int i = 0; i < fleet_strip_count; ++i)
        setColumnWidth(FleetModel::first_strip + i, strip);
    const int taken = ship_width + date_width + fleet_strip_count * strip;
    setColumnWidth(FleetModel::sentence, std::max(sentence_least, viewport()->width() - taken));
    for (int row = 0; row < model_.rowCount(); ++row)
        if (const int height = height_of(row); rowHeight(row) != height)
            setRowHeight(row, height);
}

/// A row is as high as its sentence needs: nothing of it may be cut off.
int FleetView::height_of(int row) const
{
    if (model_.is_fold(row))
        return fold_height;
    const FleetRow* shown = model_.row(row);
    if (!shown || !has_mark(shown->summary.level))
        return row_height;
    const int width = columnWidth(FleetModel::sentence) - sentence_indent - gap - 4;
    const QRect needed = QFontMetrics(type(TypeSize::label))
                             .boundingRect(QRect(0, 0, width, 10'000), Qt::TextWordWrap, model_.sentence_words(*shown));
    return std::max(row_height, needed.height() + 2 * sentence_top);
}

void FleetView::take(int row)
{
    if (model_.is_fold(row)) {
        model_.unfold(!model_.unfolded());
        set_sizes();
    } else if (const FleetRow* chosen = model_.row(row)) {
        emit asked_for(chosen->vessel_id, chosen->engine_id);
    }
}

void FleetView::resizeEvent(QResizeEvent* event)
{
    QTableView::resizeEvent(event);
    set_sizes();
}

void FleetView::focusInEvent(QFocusEvent* event)
{
    QTableView::focusInEvent(event);
    setAttribute(Qt::WA_InputMethodEnabled, false); // nothing is typed here: letters turn pages
    viewport()->update();
}

void FleetView::keyPressEvent(QKeyEvent* event)
{
    chosen_ = true;
    if (event->key() == Qt::Key_Return || event->key() == Qt::Key_Enter)
        take(currentIndex().row());
    else
        QTableView::keyPressEvent(event);
}

void FleetView::mouseReleaseEvent(QMouseEvent* event)
{
    chosen_ = true;
    QTableView::mouseReleaseEvent(event);
    if (event->button() == Qt::LeftButton)
        take(rowAt(event->position().toPoint().y()));
}

} // namespace evenstroke
