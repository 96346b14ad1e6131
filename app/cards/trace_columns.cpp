// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/cards/trace_columns.h"

#include "app/desk/number_text.h"
#include "app/desk/theme.h"

#include <QComboBox>
#include <QHeaderView>

#include <algorithm>

namespace evenstroke {
namespace {

constexpr int lines_shown = 6, most_columns = 40, column_width = 112;

std::vector<std::vector<std::string>> fields_of(const std::string& text, storage::ColumnSeparator separator)
{
    using storage::ColumnSeparator;
    if (separator == ColumnSeparator::automatic)
        separator = storage::find_separator(text);
    std::vector<std::vector<std::string>> lines;
    std::string_view rest = text;
    while (!rest.empty() && static_cast<int>(lines.size()) < lines_shown) {
        const std::size_t end = rest.find('\n');
        std::string_view line = rest.substr(0, end);
        rest.remove_prefix(end == std::string_view::npos ? rest.size() : end + 1);
        if (line.ends_with('\r'))
            line.remove_suffix(1);
        lines.push_back(storage::split_line(line, separator));
    }
    return lines;
}

TraceColumns::Role role_of(storage::AngleFrom from)
{
    switch (from) {
    case storage::AngleFrom::sample_number:
        return TraceColumns::sample_index;
    case storage::AngleFrom::time:
        return TraceColumns::time;
    default:
        return TraceColumns::angle;
    }
}

int columns_of(const std::vector<std::vector<std::string>>& lines)
{
    std::size_t most = 0;
    for (const auto& line : lines)
        most = std::max(most, line.size());
    return std::min(static_cast<int>(most), most_columns);
}

} // namespace

TraceColumns::TraceColumns(QWidget* parent) : QTableWidget(parent)
{
    setEditTriggers(NoEditTriggers);
    setSelectionMode(NoSelection);
    setFocusPolicy(Qt::NoFocus); // the choices above the columns take the keys
    setShowGrid(false);
    verticalHeader()->hide();
    verticalHeader()->setDefaultSectionSize(20);
    horizontalHeader()->hide();
    setAccessibleName(tr("The first lines of the file"));
}

void TraceColumns::show_file(const std::string& text, const storage::TraceLayout& layout,
                             const Engine& engine)
{
    const auto lines = fields_of(text, layout.separator);
    const int columns = columns_of(lines);
    clear();
    choices_.clear();
    setColumnCount(columns);
    setRowCount(columns > 0 ? static_cast<int>(lines.size()) + 1 : 0);
    const bool several = layout.pressures.size() > 1;
    for (int column = 1; column <= columns; ++column) {
        const auto found =
            std::find_if(layout.pressures.begin(), layout.pressures.end(),
                         [&](const storage::PressureColumn& one) { return one.column == column; });
        Role role = unused;
        if (found != layout.pressures.end())
            role = pressure;
        else if (layout.cycle_column == column)
            role = cycle;
        else if (layout.angle_column == column)
            role = role_of(layout.angle_from);
        add_choice(column - 1, role, role == pressure && several ? found->cylinder : std::nullopt, engine);
        setColumnWidth(column - 1, column_width);
    }
    fill_lines(lines, columns, layout.header_lines);
    if (rowCount() > 0)
        setRowHeight(0, 28);
}

void TraceColumns::fill_lines(const std::vector<std::vector<std::string>>& lines, int columns,
                              int header_lines)
{
    for (int row = 0; row < static_cast<int>(lines.size()); ++row) {
        const auto& line = lines[static_cast<std::size_t>(row)];
        for (int column = 0; column < columns; ++column) {
            const auto index = static_cast<std::size_t>(column);
            QString field = index < line.size() ? to_qstring(line[index]) : QString();
            field.replace(QLatin1Char('\t'), QStringLiteral("    ")); // no font has a sign for it
            auto* item = new QTableWidgetItem(field);
            item->setFlags(Qt::ItemIsEnabled);
            if (row < header_lines)
                item->setForeground(theme().muted);
            setItem(row + 1, column, item);
        }
    }
}

void TraceColumns::add_choice(int column, Role role, std::optional<int> cylinder, const Engine& engine)
{
    auto* choice = new QComboBox(this);
    choice->addItems(
        {tr("not used"), tr("angle, °"), tr("time"), tr("sample index"), tr("cycle"), tr("pressure")});
    for (int number = 1; number <= engine.cylinders; ++number)
        choice->addItem(tr("cylinder %1").arg(to_qstring(engine.cylinder_name(number))));
    choice->setAccessibleName(tr("What column %1 holds").arg(column + 1));
    choice->setCurrentIndex(cylinder ? first_cylinder + *cylinder - 1 : role);
    connect(choice, &QComboBox::activated, this, [this] { emit changed(); });
    setCellWidget(0, column, choice);
    choices_.push_back(choice);
}

void TraceColumns::choose(int column, int role)
{
    choices_[static_cast<std::size_t>(column - 1)]->setCurrentIndex(role);
    emit changed();
}

void TraceColumns::read_into(storage::TraceLayout& layout) const
{
    using storage::AngleFrom;
    layout.pressures.clear();
    layout.cycle_column.reset();
    layout.angle_from = AngleFrom::sample_number;
    layout.angle_column = 0;
    for (int column = 1; column <= columns_shown(); ++column) {
        const int role = choices_[static_cast<std::size_t>(column - 1)]->currentIndex();
        if (role == cycle)
            layout.cycle_column = column;
        if (role == angle || role == time) {
            layout.angle_column = column;
            layout.angle_from = role == angle ? AngleFrom::column : AngleFrom::time;
        }
        if (role == sample_index && layout.angle_from == AngleFrom::sample_number)
            layout.angle_column = column;
        if (role == pressure)
            layout.pressures.push_back({column, std::nullopt});
        if (role >= first_cylinder)
            layout.pressures.push_back({column, role - first_cylinder + 1});
    }
}

} // namespace evenstroke
