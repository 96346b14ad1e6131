// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "app/board/board_model.h"

#include <QPersistentModelIndex>
#include <QTableView>

namespace evenstroke {

/// The strip board on the screen: cylinders across, quantities down, the labels fixed while it scrolls.
/// Arrow keys move the cell in hand, Enter opens its trend.
class BoardView : public QTableView
{
    Q_OBJECT

public:
    explicit BoardView(QWidget* parent = nullptr);
    void show_board(Board board);
    BoardModel& board_model() { return model_; }
    const BoardModel& board_model() const { return model_; }
    void go_to(QuantityId quantity, const Place& place);

signals:
    void asked_for(QuantityId quantity, const Place& place); ///< Enter or a double click
    void moved_to(QuantityId quantity, const Place& place);

protected:
    void resizeEvent(QResizeEvent* event) override;
    void focusInEvent(QFocusEvent* event) override;
    void currentChanged(const QModelIndex& current, const QModelIndex& previous) override;
    void keyPressEvent(QKeyEvent* event) override;

private:
    void update_around(const QModelIndex& index);
    QPersistentModelIndex hovered_;
    void set_sizes();
    void set_spans();
    int wanted_span() const;
    BoardModel model_;
    bool filling_ = false;
};

} // namespace evenstroke
