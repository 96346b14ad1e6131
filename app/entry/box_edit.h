// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <QLineEdit>
#include <QModelIndex>
#include <QStyledItemDelegate>

namespace evenstroke {

/// The editor of one box: plain text, so that decimal comma and point are both just typed. A locale-minded
/// number field would read "12.5" as 125 where the comma is the decimal sign.
class BoxEdit : public QLineEdit
{
    Q_OBJECT

public:
    explicit BoxEdit(QWidget* parent);
    QModelIndex index; ///< the box it edits
    /// Begun by typing a character: arrows then leave the box, as there is nothing to move the cursor in.
    void begin_typing(const QString& first);

    /// Shift, Ctrl, a dead key and their like: pressed alone they say nothing yet.
    static bool only_modifies(int key);

signals:
    void leave(int key, Qt::KeyboardModifiers modifiers); ///< Enter, Tab or an arrow: take the text and go on
    void give_up();                                       ///< Escape: what was there before stands

protected:
    bool event(QEvent* event) override;
    void keyPressEvent(QKeyEvent* event) override;

private:
    bool typing_ = false;
};

/// Paints the boxes of the log sheet and makes their editors.
class BoxDelegate : public QStyledItemDelegate
{
    Q_OBJECT

public:
    using QStyledItemDelegate::QStyledItemDelegate;

    void paint(QPainter* painter, const QStyleOptionViewItem& option,
               const QModelIndex& index) const override;
    QSize sizeHint(const QStyleOptionViewItem& option, const QModelIndex& index) const override;
    QWidget* createEditor(QWidget* parent, const QStyleOptionViewItem& option,
                          const QModelIndex& index) const override;
    void setEditorData(QWidget* editor, const QModelIndex& index) const override;
    void setModelData(QWidget* editor, QAbstractItemModel* model, const QModelIndex& index) const override;
    void updateEditorGeometry(QWidget* editor, const QStyleOptionViewItem& option,
                              const QModelIndex& index) const override;
    bool eventFilter(QObject* object, QEvent* event) override;

signals:
    void editor_made(evenstroke::BoxEdit* editor) const;

private:
    void paint_box(QPainter& painter, const QStyleOptionViewItem& option, const QModelIndex& index) const;
};

} // namespace evenstroke
