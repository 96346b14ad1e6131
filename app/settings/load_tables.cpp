// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/desk/number_text.h"
#include "app/settings/engine_fields.h"
#include "app/settings/engine_table.h"

#include <QCoreApplication>

#include <iterator>

/// The tables of an engine's load diagram and of its walls.
namespace evenstroke {
namespace {

QString tr_(const char* text) { return QCoreApplication::translate("evenstroke", text); }

/// One row of the load diagram: a number of the rating, in the unit shown.
struct LimitRow
{
    const char *title, *unit;
    std::optional<double> LoadLimits::* member; ///< null: the factor, which always has a value
    double per;
};
constexpr LimitRow limit_rows[] = {
    {"Mean effective pressure, at most", "% of the rating's", &LoadLimits::mean_effective_pressure, 100.0},
    {"Torque and speed: exponent of the speed", "", &LoadLimits::torque_exponent, 1.0},
    {"Torque and speed: below a speed of", "% of rated speed", &LoadLimits::torque_below_speed, 100.0},
    {"Torque and speed: factor", "", nullptr, 1.0},
    {"Speed, at most", "% of rated speed", &LoadLimits::highest_speed, 100.0},
    {"Overload for a time, at most", "% of rated power", &LoadLimits::overload, 100.0},
    {"Light running margin", "%", &LoadLimits::light_running_margin, 100.0},
};
constexpr int speed_row = static_cast<int>(std::size(limit_rows)); ///< the last one says whether the speed is held

QString yes() { return tr_("yes"); }
QString no() { return tr_("no"); }

const LimitRow& row_at(int row) { return limit_rows[static_cast<std::size_t>(row)]; }

QString limit_text(const Engine& engine, int row)
{
    const LoadLimits limits = engine.load_limits.value_or(LoadLimits{});
    if (row == speed_row)
        return limits.constant_speed ? yes() : no();
    const LimitRow& of = row_at(row);
    if (!of.member)
        return engine.load_limits ? plain_text(limits.torque_factor) : QString();
    const std::optional<double>& value = limits.*of.member;
    return value ? plain_text(*value * of.per) : QString();
}

/// Limits without any number are no limits: the key goes with the last of them.
void put(Engine& engine, const LoadLimits& limits)
{
    bool any = limits.constant_speed || limits.torque_factor != 1.0 || !limits.source.empty();
    for (const LimitRow& row : limit_rows)
        any = any || (row.member && (limits.*row.member).has_value());
    engine.load_limits = any ? std::optional(limits) : std::nullopt;
}

std::optional<Problem> take_speed(LoadLimits& limits, const QString& text)
{
    if (text.compare(yes(), Qt::CaseInsensitive) != 0 && text.compare(no(), Qt::CaseInsensitive) != 0)
        return invalid_input("\"" + text.toStdString() + "\" is neither yes nor no.",
                             "Type yes for a generating set, whose speed is held; no for an engine that drives a propeller.");
    limits.constant_speed = text.compare(yes(), Qt::CaseInsensitive) == 0;
    return std::nullopt;
}

std::optional<Problem> take_limit(Engine& engine, int row, const QString& text)
{
    LoadLimits limits = engine.load_limits.value_or(LoadLimits{});
    if (row == speed_row) {
        if (const auto problem = take_speed(limits, text))
            return problem;
        put(engine, limits);
        return std::nullopt;
    }
    const auto value = read_box(text);
    if (!value.has_value())
        return value.error();
    const LimitRow& of = row_at(row);
    if (!of.member)
        limits.torque_factor = value.value().value_or(1.0);
    else
        limits.*of.member = value.value() ? std::optional(*value.value() / of.per) : std::nullopt;
    // The exponent waits for its speed: that it is missing is said when the engine is saved.
    LoadLimits checked = limits;
    checked.torque_below_speed = limits.torque_below_speed.value_or(0.9);
    if (const auto diagram = LoadDiagram::make(kilowatts(1.0), per_minute(1.0), checked); !diagram.has_value())
        return invalid_input(diagram.error().what_happened, "Type it in the unit of its row: 105 for 105 %.");
    put(engine, limits);
    return std::nullopt;
}

EngineColumn fixed_column(const QString& title, std::function<QString(int)> show)
{
    return {title, false, false, false, [show](const Engine&, int row) { return show(row); }};
}

WallDescription& wall_at(Engine& engine, int row) { return engine.walls[static_cast<std::size_t>(row)]; }
const WallDescription& wall_at(const Engine& engine, int row) { return engine.walls[static_cast<std::size_t>(row)]; }

/// A number that every wall needs. Nothing typed yet shows as nothing.
EngineColumn wall_number(const char* title, std::function<std::optional<double>(const WallDescription&)> get,
                         std::function<void(WallDescription&, std::optional<double>)> set)
{
    return {tr_(title), true, true, false, [get](const Engine& engine, int row) { return plain_text(get(wall_at(engine, row))); },
            [set](Engine& engine, int row, const QString& text) -> std::optional<Problem> {
                const auto value = read_box(text);
                if (!value.has_value())
                    return value.error();
                set(wall_at(engine, row), value.value());
                return std::nullopt;
            }};
}

EngineColumn wall_words(const char* title, std::string WallDescription::* member, bool adds)
{
    return {tr_(title), false, true, false,
            [member](const Engine& engine, int row) { return to_qstring(wall_at(engine, row).*member); },
            [member, adds](Engine& engine, int row, const QString& text) -> std::optional<Problem> {
                if (adds && row >= static_cast<int>(engine.walls.size()))
                    engine.walls.emplace_back();
                wall_at(engine, row).*member = text.toStdString();
                return std::nullopt;
            }};
}

std::optional<double> if_positive(double number) { return number > 0.0 ? std::optional(number) : std::nullopt; }

EngineColumn temperature_column(const char* title, Temperature WallDescription::* member)
{
    return wall_number(
        title,
        [member](const WallDescription& wall) {
            return (wall.*member).value() > 0.0 ? std::optional(in_celsius(wall.*member)) : std::nullopt;
        },
        [member](WallDescription& wall, std::optional<double> value) { wall.*member = value ? celsius(*value) : Temperature{}; });
}

EngineColumn mark_column(const char* title, std::optional<Temperature> WallDescription::* member)
{
    return wall_number(
        title,
        [member](const WallDescription& wall) {
            return wall.*member ? std::optional(in_celsius(*(wall.*member))) : std::nullopt;
        },
        [member](WallDescription& wall, std::optional<double> value) {
            wall.*member = value ? std::optional(celsius(*value)) : std::nullopt;
        });
}

EngineColumn film_column(const char* title, HeatTransferCoefficient WallDescription::* member)
{
    return wall_number(
        title, [member](const WallDescription& wall) { return if_positive((wall.*member).value()); },
        [member](WallDescription& wall, std::optional<double> value) { wall.*member = film_coefficient(value.value_or(0.0)); });
}

} // namespace

EngineTable::Kind load_limits_table()
{
    EngineColumn value{tr_("Value"), true, true, false, limit_text, take_limit};
    EngineColumn source{tr_("Source of all of them"), false, true, false,
                        [](const Engine& engine, int) { return engine.load_limits ? to_qstring(engine.load_limits->source) : QString(); },
                        [](Engine& engine, int, const QString& text) -> std::optional<Problem> {
                            LoadLimits limits = engine.load_limits.value_or(LoadLimits{});
                            limits.source = text.toStdString();
                            put(engine, limits);
                            return std::nullopt;
                        }};
    const auto title = [](int row) { return row == speed_row ? tr_("Speed is held constant") : tr_(row_at(row).title); };
    const auto unit = [](int row) { return row == speed_row ? QString() : tr_(row_at(row).unit); };
    EngineTable::Kind kind{tr_("load limit"), {fixed_column(tr_("Limit of the load diagram"), title), value, fixed_column(tr_("Unit"), unit), source},
                           [](const Engine&) { return speed_row + 1; },
                           [](Engine& engine, int row) {
                               take_limit(engine, row, row == speed_row ? no() : QString());
                           }};
    kind.fixed = true;
    return kind;
}

EngineTable::Kind walls_table()
{
    const auto load = wall_number(
        "Load %", [](const WallDescription& wall) { return if_positive(wall.load_percent); },
        [](WallDescription& wall, std::optional<double> value) { wall.load_percent = value.value_or(0.0); });
    const auto thickness = wall_number(
        "Thickness mm", [](const WallDescription& wall) { return if_positive(wall.thickness.value() * 1000.0); },
        [](WallDescription& wall, std::optional<double> value) { wall.thickness = millimetres(value.value_or(0.0)); });
    const auto conducts = wall_number(
        "Conductivity W/(m K)", [](const WallDescription& wall) { return if_positive(wall.conductivity.value()); },
        [](WallDescription& wall, std::optional<double> value) { wall.conductivity = conductivity(value.value_or(0.0)); });
    return {tr_("wall"),
            {wall_words("Part", &WallDescription::part, true), load, temperature_column("Gas °C", &WallDescription::gas),
             film_column("Gas film W/(m² K)", &WallDescription::gas_film), thickness, conducts,
             film_column("Coolant film W/(m² K)", &WallDescription::coolant_film), temperature_column("Coolant °C", &WallDescription::coolant),
             mark_column("Highest °C", &WallDescription::highest), mark_column("Lowest °C", &WallDescription::lowest),
             wall_words("Source", &WallDescription::source, false)},
            [](const Engine& engine) { return static_cast<int>(engine.walls.size()); },
            [](Engine& engine, int row) { engine.walls.erase(engine.walls.begin() + row); }};
}

} // namespace evenstroke
