// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/board/board_view.h"

#include "app/board/board_painting.h"

#include <QHeaderView>
#include <QKeyEvent>
#include <QPainter>
#include <QStyledItemDelegate>

#include <algorithm>
#include <utility>

namespace evenstroke {

namespace {

constexpr int narrowest_column = 76, widest_column = 200, engine_cell_width = 150;
constexpr int lowest_row = 70, highest_row = 96, engine_row = 78, heading_height = 40;

class CellDelegate : public QStyledItemDelegate
{
public:
    explicit CellDelegate(BoardView& view) : QStyledItemDelegate(&view), view_(view) {}

    void paint(QPainter* painter, const QStyleOptionViewItem& option, const QModelIndex& index) const override
    {
        const Theme& t = theme();
        const BoardCell* cell = view_.board_model().cell(index);
        if (cell && (option.state & QStyle::State_MouseOver))
            painter->fillRect(option.rect.adjusted(-6, 1, -6, -1), t.sheet);
        if (cell) {
            const bool of_engine = view_.board_model().is_engine_row(index.row());
            (of_engine ? paint_engine_cell : paint_cell)(*painter, QRectF(option.rect), *cell, t);
        }
        painter->setPen(t.rule);
        painter->drawLine(option.rect.bottomLeft(), option.rect.bottomRight());
        if (cell && index == view_.currentIndex() && view_.hasFocus()) {
            painter->setPen(t.line);
            painter->setBrush(Qt::NoBrush);
            painter->drawRect(option.rect.adjusted(-5, 2, -8, -4));
        }
    }

private:
    const BoardView& view_;
};

class LabelHeader : public QHeaderView
{
public:
    LabelHeader(const BoardModel& model, QWidget* parent) : QHeaderView(Qt::Vertical, parent), board_(model) {}

protected:
    QSize sectionSizeFromContents(int) const override { return {label_column, lowest_row}; }
    void paintSection(QPainter* painter, const QRect& area, int section) const override
    {
        const Theme& t = theme();
        painter->fillRect(area, t.page);
        if (!board_.is_engine_row(section)) {
            const BoardRow& row = board_.board().rows[static_cast<std::size_t>(section)];
            paint_row_label(*painter, area, row.title, row.subtitle, t);
        } else if (section == board_.cylinder_rows()) {
            paint_row_label(*painter, area, tr("The engine"), tr("from its own usual level"), t);
        }
        painter->setPen(t.rule);
        painter->drawLine(area.bottomLeft(), area.bottomRight());
    }

private:
    const BoardModel& board_;
};

class CylinderHeader : public QHeaderView
{
public:
    CylinderHeader(const BoardModel& model, QWidget* parent) : QHeaderView(Qt::Horizontal, parent), board_(model) {}

protected:
    QSize sectionSizeFromContents(int) const override { return {narrowest_column, heading_height}; }
    void paintSection(QPainter* painter, const QRect& area, int section) const override
    {
        painter->fillRect(area, theme().page);
        paint_heading(*painter, area, board_.board().cylinders[static_cast<std::size_t>(section)], theme());
        painter->setPen(theme().rule);
        painter->drawLine(area.bottomLeft(), area.bottomRight());
    }

private:
    const BoardModel& board_;
};

} // namespace

BoardView::BoardView(QWidget* parent) : QTableView(parent)
{
    setHorizontalHeader(new CylinderHeader(model_, this));
    setVerticalHeader(new LabelHeader(model_, this));
    for (QHeaderView* header : {horizontalHeader(), verticalHeader()}) {
        header->setSectionResizeMode(QHeaderView::Fixed);
        header->setSectionsClickable(false);
        header->setHighlightSections(false);
        header->setMinimumSectionSize(10);
    }
    verticalHeader()->setFixedWidth(label_column);
    horizontalHeader()->setFixedHeight(heading_height);
    setItemDelegate(new CellDelegate(*this));
    setModel(&model_);
    setShowGrid(false);
    setCornerButtonEnabled(false);
    setFrameShape(QFrame::NoFrame);
    setEditTriggers(NoEditTriggers);
    setSelectionMode(NoSelection); // the cell in hand is drawn by the delegate
    setTabKeyNavigation(false);
    setMouseTracking(true);
    setHorizontalScrollMode(ScrollPerPixel);
    setVerticalScrollMode(ScrollPerPixel);
    setAccessibleName(tr("Strip board"));
    connect(this, &QTableView::entered, this, [this](const QModelIndex& index) {
        update_around(hovered_);
        hovered_ = index;
        update_around(index);
    });
    connect(this, &QTableView::viewportEntered, this, [this] { update_around(hovered_); });
    connect(this, &QTableView::doubleClicked, this, [this](const QModelIndex& index) {
        if (const BoardCell* cell = model_.cell(index))
            emit asked_for(cell->quantity, cell->place);
    });
}

int BoardView::wanted_span() const
{
    const int columns = std::max(1, static_cast<int>(model_.board().cylinders.size()));
    const int width = std::max(narrowest_column, viewport()->width() / columns);
    return std::clamp((engine_cell_width + width - 1) / width, 1, columns);
}

void BoardView::show_board(Board board)
{
    filling_ = true;
    const BoardCell* current = model_.cell(currentIndex());
    const auto was = current ? std::optional(std::pair(current->quantity, current->place)) : std::nullopt;
    clearSpans();
    const int columns = std::max(1, static_cast<int>(board.cylinders.size()));
    const int width = std::max(narrowest_column, viewport()->width() / columns);
    model_.set_board(std::move(board), std::clamp((engine_cell_width + width - 1) / width, 1, columns));
    set_spans();
    set_sizes();
    if (was)
        setCurrentIndex(model_.find(was->first, was->second));
    if (!currentIndex().isValid() && model_.rowCount() > 0)
        setCurrentIndex(model_.index(0, 0));
    filling_ = false;
}

void BoardView::set_spans()
{
    clearSpans();
    const int span = model_.engine_span();
    if (span < 2)
        return;
    for (int row = model_.cylinder_rows(); row < model_.rowCount(); ++row)
        for (int column = 0; column + span <= model_.columnCount(); column += span)
            setSpan(row, column, 1, span);
}

void BoardView::set_sizes()
{
    const int columns = model_.columnCount();
    if (columns == 0)
        return;
    const int width = std::clamp(viewport()->width() / columns, narrowest_column, widest_column);
    for (int column = 0; column < columns; ++column)
        setColumnWidth(column, width);
    const int rows = std::max(1, model_.cylinder_rows());
    const int height = std::clamp(viewport()->height() / rows, lowest_row, highest_row);
    for (int row = 0; row < model_.rowCount(); ++row)
        setRowHeight(row, model_.is_engine_row(row) ? engine_row : height);
}

void BoardView::go_to(QuantityId quantity, const Place& place)
{
    const QModelIndex index = model_.find(quantity, place);
    if (!index.isValid() || index == currentIndex())
        return;
    filling_ = true;
    setCurrentIndex(index);
    filling_ = false;
}

void BoardView::resizeEvent(QResizeEvent* event)
{
    QTableView::resizeEvent(event);
    if (wanted_span() != model_.engine_span() && model_.columnCount() > 0)
        show_board(Board(model_.board()));
    else
        set_sizes();
}

void BoardView::focusInEvent(QFocusEvent* event)
{
    QTableView::focusInEvent(event);
    setAttribute(Qt::WA_InputMethodEnabled, false); // nothing is typed here: letters turn pages
    viewport()->update();
}

/// Frame and hover reach a little beyond the cell, over its neighbours' edges.
void BoardView::update_around(const QModelIndex& index)
{
    if (index.isValid())
        viewport()->update(visualRect(index).adjusted(-8, -2, 8, 2));
}

void BoardView::currentChanged(const QModelIndex& current, const QModelIndex& previous)
{
    QTableView::currentChanged(current, previous);
    update_around(previous);
    update_around(current);
    const BoardCell* cell = model_.cell(current);
    if (cell && !filling_)
        emit moved_to(cell->quantity, cell->place);
}

void BoardView::keyPressEvent(QKeyEvent* event)
{
    const BoardCell* cell = model_.cell(currentIndex());
    if (cell && (event->key() == Qt::Key_Return || event->key() == Qt::Key_Enter)) {
        emit asked_for(cell->quantity, cell->place);
        return;
    }
    QTableView::keyPressEvent(event);
}

} // namespace evenstroke
