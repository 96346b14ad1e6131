// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "app/entry/block_text.h"
#include "app/entry/walk.h"

#include <QPointer>
#include <QTableView>

namespace evenstroke {

class BoxDelegate;
class BoxEdit;
class RowHeader;

/// The log sheet on the screen: everything by keys, like writing down a column on paper.
class LogSheetView : public QTableView
{
    Q_OBJECT

public:
    explicit LogSheetView(QWidget* parent = nullptr);

    /// Must be a LogSheetModel.
    void set_sheet_model(LogSheetModel* model);
    LogSheetModel* sheet_model() const { return model_; }

    WalkOrder walk_order() const { return order_; }
    void set_walk_order(WalkOrder order) { order_ = order; }

    std::optional<LogBox> current_box() const;
    void go_to(const QModelIndex& index);
    void go_to(const LogBox& box);

    /// Takes what is being typed, if anything is. False: it cannot be read; the text stands in its box, marked,
    /// and waits there to be put right.
    bool finish_editing();
    bool is_editing() const;

    void copy();
    void cut();
    void paste();
    void clear_boxes();
    void set_reason(MissingReason reason);
    /// The decimal sign copied blocks carry; the system's unless set.
    void set_decimal_sign(QChar sign) { decimal_sign_ = sign; }

signals:
    void current_box_changed();
    void typing(const QString& text);                      ///< while a box is being edited
    void paste_refused(const evenstroke::PastePlan& plan); ///< nothing was pasted
    void pasted(int values);
    void unit_wanted(int row);
    void suggestion_wanted(); ///< F3
    void second_wanted();     ///< Shift+F3
    void confirm_wanted();    ///< F4
    void unreadable(const QModelIndex& index);
    void left_sheet(bool forward); ///< Tab behind the last box, Shift+Tab before the first

protected:
    void keyPressEvent(QKeyEvent* event) override;
    bool event(QEvent* event) override;
    QModelIndex moveCursor(CursorAction action, Qt::KeyboardModifiers modifiers) override;
    void currentChanged(const QModelIndex& current, const QModelIndex& previous) override;
    void resizeEvent(QResizeEvent* event) override;
    void inputMethodEvent(QInputMethodEvent* event) override;

private:
    void lay_out();
    void lay_out_columns();
    void editor_made(BoxEdit* editor);
    void leave_editor(int key, Qt::KeyboardModifiers modifiers);
    void close_editor();
    bool leave_for_key(int key);
    bool walk_key(int key, Qt::KeyboardModifiers modifiers);
    bool sheet_key(QKeyEvent* event);
    void begin_edit(const QString& first);
    void take_back(bool again);
    void go_to_section(bool forward);
    void go_to_end(bool first);
    QModelIndexList selected_boxes() const;

    LogSheetModel* model_ = nullptr;
    BoxDelegate* delegate_;
    RowHeader* labels_;
    QPointer<BoxEdit> editor_;
    WalkOrder order_ = WalkOrder::along_cylinders;
    QChar decimal_sign_;
};

} // namespace evenstroke
