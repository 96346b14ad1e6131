// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "storage/trace_layout.h"

#include <QTableWidget>

class QComboBox;

namespace evenstroke {

/// The first lines of a file as a table; above each column stands what it holds.
class TraceColumns : public QTableWidget
{
    Q_OBJECT

public:
    explicit TraceColumns(QWidget* parent = nullptr);

    /// @param lines  the beginning of the file
    void show_file(const std::string& lines, const storage::TraceLayout& layout, const Engine& engine);
    /// Writes which column is which into a layout; cylinders of several pressure columns too.
    void read_into(storage::TraceLayout& layout) const;
    int columns_shown() const { return static_cast<int>(choices_.size()); }
    /// For tests: as if somebody had chosen it.
    void choose(int column, int role);

    enum Role { unused, angle, time, sample_index, cycle, pressure, first_cylinder };

signals:
    void changed();

private:
    void add_choice(int column, Role role, std::optional<int> cylinder, const Engine& engine);
    void fill_lines(const std::vector<std::vector<std::string>>& lines, int columns, int header_lines);

    std::vector<QComboBox*> choices_;
};

} // namespace evenstroke
