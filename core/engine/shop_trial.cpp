// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/engine/shop_trial.h"

#include "core/engine/table_text.h"
#include "core/plain_text.h"

#include <algorithm>
#include <cmath>
#include <set>

namespace evenstroke {
namespace {

using namespace table_text;

/// Two loads closer than this, in per cent, are the same point.
constexpr double same_load = 0.05;

/// One line of the table: a heading and its cells, one a load.
struct Line
{
    std::string header;
    Heading heading;
    std::string quantity;
    std::vector<std::string> cells;
};

std::size_t headings_known(const Grid& grid)
{
    return static_cast<std::size_t>(std::count_if(grid.begin(), grid.end(), [](const auto& row) {
        return !row.empty() && !quantity_of(read_heading(row.front())).empty();
    }));
}

/// The table with one quantity a row, whichever way it came.
Grid upright(const Grid& grid)
{
    const Grid turned = transposed(grid);
    return headings_known(turned) > headings_known(grid) ? turned : grid;
}

/// Column of units: headed so, or nothing but units in the second column.
std::optional<std::size_t> unit_column(const Grid& grid)
{
    if (grid.empty() || grid.front().size() < 3)
        return std::nullopt;
    for (std::size_t column = 1; column < grid.front().size(); ++column)
        if (std::any_of(grid.begin(), grid.end(), [&](const auto& row) { return names_units(row[column]); }))
            return column;
    std::size_t units = 0, others = 0;
    for (const auto& row : grid) {
        if (is_blank(row[1]))
            continue;
        (find_unit(row[1]).has_value() ? units : others) += 1;
    }
    return units > 0 && others <= 1 && units > others ? std::optional<std::size_t>(1) : std::nullopt;
}

std::vector<Line> lines_of(const Grid& grid)
{
    std::vector<Line> lines;
    const auto units = unit_column(grid);
    for (const auto& row : grid) {
        if (is_blank(row.front()) || names_units(row.front()))
            continue;
        Line line{row.front(), read_heading(row.front()), {}, {}};
        line.quantity = quantity_of(line.heading);
        for (std::size_t column = 1; column < row.size(); ++column) {
            if (units != column)
                line.cells.push_back(row[column]);
            else if (const auto written = find_unit(row[column]); written.has_value() && !line.heading.unit)
                line.heading.unit = written.value();
        }
        lines.push_back(std::move(line));
    }
    return lines;
}

std::string count_words(std::size_t count) { return std::to_string(count) + (count == 1 ? " value" : " values"); }

class TrialReader
{
public:
    TrialReader(const Engine& engine, std::vector<Line> lines) : engine_(engine), lines_(std::move(lines)) {}

    Result<ShopTrial> read()
    {
        const Line* loads = find_loads();
        if (!loads)
            return invalid_input("The table names no load.", "Add a row or a column \"load\" in per cent, or the power in kW.");
        if (auto problem = take_loads(*loads))
            return *problem;
        for (const Line& line : lines_)
            if (&line != loads)
                take(line);
        if (trial_.understood.empty())
            return invalid_input("None of the table's headings is a quantity known here.",
                                 "Head the rows or columns with the names on the log sheet, such as \"Exhaust temperature, °C\".");
        finish();
        return std::move(trial_);
    }

private:
    const Line* find_loads() const
    {
        for (const char* name : {"load_percent", "shaft_power"})
            for (const Line& line : lines_)
                if (line.quantity == name)
                    return &line;
        return nullptr;
    }

    std::optional<Problem> take_loads(const Line& line)
    {
        for (std::size_t i = 0; i < line.cells.size(); ++i) {
            const auto value = converted(line, i);
            if (!value) {
                loads_.push_back(std::nullopt);
                continue;
            }
            const double load = line.quantity == "shaft_power" ? 100.0 * *value / (engine_.rated_power.value() / 1000.0) : *value;
            loads_.push_back(load);
            BaselinePoint point;
            point.load_percent = std::round(load * 100.0) / 100.0;
            trial_.points.push_back(point);
        }
        if (trial_.points.empty())
            return invalid_input("The load \"" + line.header + "\" has no number behind it.", "Give a load for each point.");
        for (std::size_t a = 0; a < trial_.points.size(); ++a)
            for (std::size_t b = 0; b < a; ++b)
                if (std::abs(trial_.points[a].load_percent - trial_.points[b].load_percent) < same_load)
                    return invalid_input("Two points of the table have the load " + short_number_text(trial_.points[a].load_percent) + " %.",
                                         "Keep each load once, or enter the mean of the two.");
        return std::nullopt;
    }

    void take(const Line& line)
    {
        if (line.quantity.empty()) {
            trial_.left_out.push_back({line.header, {}, "no quantity of this name is known", 0});
            return;
        }
        if (line.quantity == "load_percent" || line.quantity == "shaft_power")
            return take_into(line, "power beside the load");
        take_into(line, {});
    }

    void take_into(const Line& line, const std::string& remark)
    {
        std::size_t taken = 0, point = 0;
        for (std::size_t i = 0; i < line.cells.size() && i < loads_.size(); ++i) {
            if (!loads_[i])
                continue;
            if (const auto value = converted(line, i)) {
                add(trial_.points[point], line.quantity, *value);
                ++taken;
            }
            ++point;
        }
        const auto id = find_quantity(line.quantity);
        std::string words = quantity(*id).title + (unit_symbol(*id).empty() ? "" : ", " + unit_symbol(*id)) + ": " + count_words(taken);
        if (line.heading.unit && line.heading.unit->id != quantity(*id).unit)
            words += ", converted from " + std::string(unit(line.heading.unit->id).symbol);
        if (becomes_gauge(line, *id))
            words += ", absolute made gauge with the reference barometer";
        if (line.heading.cylinder)
            words += ", one cylinder of the mean";
        if (!remark.empty())
            words += ", " + remark;
        (taken > 0 ? trial_.understood : trial_.left_out).push_back({line.header, line.quantity, taken > 0 ? words : why_none_, taken});
    }

    static std::string unit_symbol(QuantityId id)
    {
        const Unit& own = unit(quantity(id).unit);
        return own.dimension == Dimension::number ? std::string() : std::string(own.symbol);
    }

    static bool becomes_gauge(const Line& line, QuantityId id)
    {
        return line.heading.unit && line.heading.unit->kind == PressureKind::absolute && quantity(id).kind == PressureKind::gauge;
    }

    /// A cell in the quantity's own unit; nothing where it is blank or refused, which is then said.
    std::optional<double> converted(const Line& line, std::size_t i)
    {
        why_none_ = "no number stands behind it";
        if (i >= line.cells.size() || is_blank(line.cells[i]))
            return std::nullopt;
        const Quantity& of = quantity(*find_quantity(line.quantity));
        const auto number = parse_number(line.cells[i]);
        if (!number.has_value()) {
            trial_.refused.push_back(line.header + ": " + number.error().text());
            return std::nullopt;
        }
        const WrittenUnit written = line.heading.unit.value_or(WrittenUnit{of.unit, PressureKind::none});
        if (unit(written.id).dimension != unit(of.unit).dimension) {
            why_none_ = "the unit " + std::string(unit(written.id).symbol) + " does not measure " + of.title;
            return std::nullopt;
        }
        double value_si = unit(written.id).to_si(number.value());
        if (becomes_gauge(line, of.id))
            value_si -= engine_.reference.barometer.value();
        return in_range(line, of, unit(of.unit).from_si(value_si));
    }

    std::optional<double> in_range(const Line& line, const Quantity& of, double value)
    {
        if ((of.hard.low && value < *of.hard.low) || (of.hard.high && value > *of.hard.high)) {
            trial_.refused.push_back(line.header + ": " + short_number_text(value) + " " + unit_symbol(of.id)
                                     + " cannot be. Check the unit in the heading and the number.");
            return std::nullopt;
        }
        return value;
    }

    /// Several lines of one quantity are its cylinders, turbochargers or coolers: the mean counts.
    void add(BaselinePoint& point, const std::string& name, double value)
    {
        int& count = counts_[{point.load_percent, name}];
        double& mean = point.values[name];
        mean += (value - mean) / ++count;
    }

    void finish()
    {
        std::sort(trial_.points.begin(), trial_.points.end(), [](const BaselinePoint& a, const BaselinePoint& b) { return a.load_percent < b.load_percent; });
        std::erase_if(trial_.points, [](const BaselinePoint& point) { return point.values.empty(); });
    }

    const Engine& engine_;
    std::vector<Line> lines_;
    ShopTrial trial_;
    std::vector<std::optional<double>> loads_;
    std::map<std::pair<double, std::string>, int> counts_;
    std::string why_none_;
};

} // namespace

Result<ShopTrial> read_shop_trial(std::string_view text, const Engine& engine)
{
    const Grid grid = read_grid(text);
    if (grid.empty() || grid.front().size() < 2)
        return invalid_input("There is no table in what was pasted: it has " + std::string(grid.empty() ? "nothing in it." : "one column only."),
                             "Copy the cells of the sheet with their headings and paste again.");
    return TrialReader(engine, lines_of(upright(grid))).read();
}

namespace {

/// Takes the curves that the trial brings out of the baseline.
void take_out(std::vector<BaselinePoint>& baseline, const std::vector<BaselinePoint>& points)
{
    std::set<std::pair<std::string, std::string>> brought; // mode, quantity
    for (const BaselinePoint& point : points)
        for (const auto& [name, value] : point.values)
            brought.emplace(point.mode, name);
    std::erase_if(baseline, [&](BaselinePoint& point) {
        const auto taken = std::erase_if(point.values, [&](const auto& one) { return brought.count({point.mode, one.first}) > 0; });
        return taken > 0 && point.values.empty();
    });
}

} // namespace

std::vector<BaselinePoint> merged_baseline(std::vector<BaselinePoint> baseline, const std::vector<BaselinePoint>& points)
{
    take_out(baseline, points);
    for (const BaselinePoint& point : points) {
        const auto same = std::find_if(baseline.begin(), baseline.end(), [&](const BaselinePoint& one) {
            return one.mode == point.mode && std::abs(one.load_percent - point.load_percent) < same_load;
        });
        if (same == baseline.end()) {
            baseline.push_back(point);
            continue;
        }
        for (const auto& [name, value] : point.values)
            same->values[name] = value;
    }
    std::stable_sort(baseline.begin(), baseline.end(), [](const BaselinePoint& a, const BaselinePoint& b) {
        return a.mode != b.mode ? a.mode < b.mode : a.load_percent < b.load_percent;
    });
    return baseline;
}

} // namespace evenstroke
