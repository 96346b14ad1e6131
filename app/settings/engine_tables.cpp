// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/settings/engine_table.h"

#include "app/desk/number_text.h"
#include "app/settings/engine_fields.h"
#include "core/reading/quantity_names.h"

#include <QCoreApplication>

#include <iterator>

/// What the tables of an engine's limits, instruments and coefficients consist of.
namespace evenstroke {
namespace {

QString tr_(const char* text) { return QCoreApplication::translate("evenstroke", text); }

QString title_of(const std::string& name)
{
    const auto id = find_quantity(name);
    return id ? quantity_title(*id) : to_qstring(name);
}

QString unit_of(const std::string& name)
{
    const auto id = find_quantity(name);
    return id ? unit_text(*id) : QString();
}

/// Column of the quantity: naming one in the empty row adds the row.
template <typename Item>
EngineColumn quantity_column(std::vector<Item> Engine::* list)
{
    EngineColumn column{tr_("Quantity"), false, true, true,
                        [list](const Engine& engine, int row) { return title_of((engine.*list)[static_cast<std::size_t>(row)].quantity); }};
    column.set = [list](Engine& engine, int row, const QString& text) -> std::optional<Problem> {
        const auto name = read_quantity_name(text);
        if (!name.has_value())
            return name.error();
        if (row >= static_cast<int>((engine.*list).size()))
            (engine.*list).emplace_back();
        (engine.*list)[static_cast<std::size_t>(row)].quantity = name.value();
        return std::nullopt;
    };
    return column;
}

template <typename Item>
EngineColumn unit_column(std::vector<Item> Engine::* list)
{
    return {tr_("Unit"), false, false, false,
            [list](const Engine& engine, int row) { return unit_of((engine.*list)[static_cast<std::size_t>(row)].quantity); }};
}

template <typename Item>
EngineColumn words_column(const char* title, std::vector<Item> Engine::* list, std::string Item::* member)
{
    return {tr_(title), false, true, false,
            [list, member](const Engine& engine, int row) { return to_qstring((engine.*list)[static_cast<std::size_t>(row)].*member); },
            [list, member](Engine& engine, int row, const QString& text) -> std::optional<Problem> {
                (engine.*list)[static_cast<std::size_t>(row)].*member = text.toStdString();
                return std::nullopt;
            }};
}

template <typename Item>
EngineColumn number_column(const char* title, std::vector<Item> Engine::* list, std::optional<double> Item::* member)
{
    return {tr_(title), true, true, false,
            [list, member](const Engine& engine, int row) { return plain_text((engine.*list)[static_cast<std::size_t>(row)].*member); },
            [list, member](Engine& engine, int row, const QString& text) -> std::optional<Problem> {
                const auto value = read_box(text);
                if (!value.has_value())
                    return value.error();
                (engine.*list)[static_cast<std::size_t>(row)].*member = value.value();
                return std::nullopt;
            }};
}

template <typename Item>
std::function<int(const Engine&)> rows_of(std::vector<Item> Engine::* list)
{
    return [list](const Engine& engine) { return static_cast<int>((engine.*list).size()); };
}

template <typename Item>
std::function<void(Engine&, int)> remover(std::vector<Item> Engine::* list)
{
    return [list](Engine& engine, int row) { (engine.*list).erase((engine.*list).begin() + row); };
}

using Coefficients = std::map<std::string, CorrectionCoefficients>;

EngineColumn coefficient_column(const char* title, double CorrectionCoefficients::* member)
{
    return {tr_(title), true, true, false,
            [member](const Engine& engine, int row) { return plain_text(std::next(engine.correction.begin(), row)->second.*member); },
            [member](Engine& engine, int row, const QString& text) -> std::optional<Problem> {
                const auto value = read_box(text);
                if (!value.has_value())
                    return value.error();
                std::next(engine.correction.begin(), row)->second.*member = value.value().value_or(0.0);
                return std::nullopt;
            }};
}

EngineColumn coefficient_quantity()
{
    EngineColumn column{tr_("Quantity"), false, true, true,
                        [](const Engine& engine, int row) { return title_of(std::next(engine.correction.begin(), row)->first); }};
    column.set = [](Engine& engine, int row, const QString& text) -> std::optional<Problem> {
        const auto name = read_quantity_name(text);
        if (!name.has_value())
            return name.error();
        if (engine.correction.count(name.value()))
            return invalid_input(title_of(name.value()).toStdString() + " has coefficients already.", "Change them in its own row.");
        CorrectionCoefficients kept;
        if (row < static_cast<int>(engine.correction.size())) {
            const auto old = std::next(engine.correction.begin(), row);
            kept = old->second;
            engine.correction.erase(old);
        }
        engine.correction.emplace(name.value(), kept);
        return std::nullopt;
    };
    return column;
}

} // namespace

Result<std::string> read_quantity_name(const QString& text)
{
    const std::string typed = text.trimmed().toStdString();
    for (const Quantity& of : all_quantities())
        if (text.trimmed().compare(to_qstring(of.title), Qt::CaseInsensitive) == 0 || of.name == typed)
            return of.name;
    std::string nearest;
    for (const std::string& name : nearest_names_of_all(typed))
        nearest += (nearest.empty() ? "" : ", ") + title_of(name).toStdString();
    return invalid_input("No quantity is called \"" + typed + "\".", "Choose one of the log sheet" + (nearest.empty() ? "." : ", such as " + nearest + "."));
}

EngineTable::Kind limits_table()
{
    return {tr_("limit"),
            {quantity_column(&Engine::limits), unit_column(&Engine::limits), number_column("Low", &Engine::limits, &AbsoluteLimit::low),
             number_column("High", &Engine::limits, &AbsoluteLimit::high), words_column("Source", &Engine::limits, &AbsoluteLimit::source)},
            rows_of(&Engine::limits), remover(&Engine::limits)};
}

EngineTable::Kind instruments_table()
{
    return {tr_("instrument"),
            {quantity_column(&Engine::instruments), words_column("Serial number", &Engine::instruments, &Instrument::serial),
             words_column("Calibrated", &Engine::instruments, &Instrument::calibrated),
             number_column("Uncertainty ± (95 %)", &Engine::instruments, &Instrument::uncertainty), unit_column(&Engine::instruments),
             words_column("Source", &Engine::instruments, &Instrument::source)},
            rows_of(&Engine::instruments), remover(&Engine::instruments)};
}

EngineTable::Kind coefficients_table()
{
    EngineColumn source{tr_("Source"), false, true, false,
                        [](const Engine& engine, int row) { return to_qstring(std::next(engine.correction.begin(), row)->second.source); },
                        [](Engine& engine, int row, const QString& text) -> std::optional<Problem> {
                            std::next(engine.correction.begin(), row)->second.source = text.toStdString();
                            return std::nullopt;
                        }};
    return {tr_("coefficient"),
            {coefficient_quantity(), coefficient_column("Per °C of inlet air", &CorrectionCoefficients::per_inlet_air),
             coefficient_column("Per °C of coolant", &CorrectionCoefficients::per_coolant), source},
            [](const Engine& engine) { return static_cast<int>(engine.correction.size()); },
            [](Engine& engine, int row) { engine.correction.erase(std::next(engine.correction.begin(), row)); }};
}

} // namespace evenstroke
