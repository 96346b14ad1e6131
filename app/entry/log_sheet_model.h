// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "app/entry/entry_sheet.h"

#include <QAbstractTableModel>
#include <QString>
#include <QUndoStack>

#include <map>
#include <optional>

namespace evenstroke {

/// What the judging says of a box, as a mark in it. The sentence stands in the ear.
enum class BoxMark { none, asked, impossible, unreadable, confirmed };

/// The log sheet as a table: a row a quantity, a column a place, headings between the sections. Holds and
/// shows; reads what is typed through the core, computes nothing.
class LogSheetModel : public QAbstractTableModel
{
    Q_OBJECT

public:
    enum Role {
        mark_role = Qt::UserRole, ///< BoxMark as int
        lent_role,                ///< bool: entered for the ship with another engine
        missing_role,             ///< bool: a reason stands here instead of a value
        heading_role,             ///< bool: the row is a section's heading
        words_role,               ///< bool: words, not a number
        beside_role,              ///< bool: no box, but last time's number beside one
    };

    LogSheetModel(EntrySheet& sheet, QUndoStack& undo, QObject* parent = nullptr);

    int rowCount(const QModelIndex& parent = {}) const override;
    int columnCount(const QModelIndex& parent = {}) const override;
    QVariant data(const QModelIndex& index, int role = Qt::DisplayRole) const override;
    QVariant headerData(int section, Qt::Orientation orientation, int role = Qt::DisplayRole) const override;
    Qt::ItemFlags flags(const QModelIndex& index) const override;
    /// Takes what was typed as one undoable step; false, with `refusal`, where it cannot be read. The text
    /// then stays in the box, marked, until it is put right.
    bool setData(const QModelIndex& index, const QVariant& text, int role = Qt::EditRole) override;

    EntrySheet& sheet() const { return sheet_; }
    QUndoStack& undo_stack() const { return undo_; }

    std::optional<LogBox> box(const QModelIndex& index) const;
    /// The row it stands in; none for headings.
    const LogRow* row(int row) const;
    /// "" for quantity rows.
    QString heading(int row) const;
    int section_of(int row) const { return rows_.at(static_cast<std::size_t>(row)).section; }
    QModelIndex index_of(const LogBox& box) const;
    /// "Exhaust temperature of cylinder 4", as sentences name a box.
    QString box_name(const LogBox& box) const;

    /// Rows that this engine never filled and that are not asked for are folded away until shown.
    bool shows_all() const { return all_rows_; }
    void show_all(bool all);
    int folded_rows() const { return folded_; }
    /// The sections with the rows that are not folded away.
    std::vector<LogSection> shown_sections() const;

    /// Last time's numbers, shown beside the box where a row has only one.
    void set_previous(std::map<QuantityId, QString> previous);
    void set_marks(std::map<LogBox, BoxMark> marks);
    /// Texts that could not be read and wait to be put right.
    const std::map<LogBox, QString>& unreadable() const { return sheet_.unreadable(); }
    void forget_unreadable(const LogBox& box) { sheet_.forget_unreadable(box); }
    /// Why the text that waits in a box cannot be read; none where none waits.
    std::optional<Problem> refusal(const LogBox& box) const;
    /// Rows that were folded away and hold something now come up.
    void unfold_filled();

    /// Pushes one undoable step for a box; nothing where it would change nothing.
    void put(const Value& value, const QString& what);

signals:
    void folding_changed();
    void refused(const QModelIndex& index);

private:
    struct Row
    {
        int section = 0;
        int row = -1; ///< -1: the section's heading
    };
    void rebuild();
    bool unfolded(const LogRow& row) const;
    void tell_box(const LogBox& box);
    void restart();
    BoxMark mark_of(const LogBox& box, const Value* value) const;
    QVariant heading_data(const QModelIndex& index, int role) const;
    QVariant beside_data(const QModelIndex& index, int role) const;
    QString accessible_text(const LogBox& box, const QString& shown) const;
    QString shown_text(const LogBox& box) const;

    EntrySheet& sheet_;
    QUndoStack& undo_;
    std::vector<Row> rows_;
    int columns_ = 4, folded_ = 0;
    bool all_rows_ = false;
    std::map<LogBox, BoxMark> marks_;
    std::map<QuantityId, QString> previous_;
};

} // namespace evenstroke
