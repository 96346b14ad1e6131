// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "storage/trace_layout.h"

#include <QWidget>

class QCheckBox;
class QComboBox;
class QGridLayout;
class QLabel;
class QLineEdit;
class QSpinBox;

namespace evenstroke {

/// Boxes for everything in a layout that is not a choice of columns.
class LayoutBoxes : public QWidget
{
    Q_OBJECT

public:
    explicit LayoutBoxes(QWidget* parent = nullptr);

    void show_layout(const storage::TraceLayout& layout);
    /// Writes what the boxes say into a layout. @return what cannot be read as a number, in words
    std::optional<Problem> read_into(storage::TraceLayout& layout) const;
    void choose_unit(WrittenUnit unit);

signals:
    void changed(); ///< by a person, not by `show_layout`

private:
    QComboBox* add_choice(int row, int column, const QString& title, const QStringList& words);
    QLineEdit* add_line(int row, int column, const QString& title, const QString& hint = {});
    void add_titled(int row, int column, const QString& title, QWidget* box);
    void make_signal_boxes();
    void show_needed(storage::AngleFrom from);
    void set_shown(QWidget* box, bool shown);

    QGridLayout* grid_;
    QComboBox* separator_;
    QComboBox* decimal_sign_;
    QSpinBox* header_lines_;
    QComboBox* unit_;
    QComboBox* kind_;
    QLineEdit* missing_;
    QLineEdit* dead_centre_;
    QComboBox* direction_;
    QLineEdit* counts_;
    QLineEdit* first_angle_;
    QComboBox* time_unit_;
    QLineEdit* speed_;
    QCheckBox* signal_;
    QWidget* points_;
    QLineEdit* point_[4];
    bool showing_ = false;
};

} // namespace evenstroke
