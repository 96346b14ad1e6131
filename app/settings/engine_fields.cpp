// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/settings/engine_fields.h"

#include "app/desk/number_text.h"
#include "core/reference/reference_conditions.h"

#include <QCoreApplication>

#include <cmath>

namespace evenstroke {
namespace {

using State = EngineDraft::State;
QString tr_(const char* text) { return QCoreApplication::translate("evenstroke", text); }

EngineField words(const char* group, const char* title, std::function<std::string&(State&)> at)
{
    return {tr_(group), tr_(title), {},
            [at](const State& state) { State copy = state; return to_qstring(at(copy)); },
            [at](State& state, const QString& text) -> std::optional<Problem> {
                at(state) = text.trimmed().toStdString();
                return std::nullopt;
            }};
}

/// A number that the engine always has; `get` and `set` speak in the unit shown. Nothing typed is not zero.
EngineField number(const char* group, const char* title, const char* unit_symbol, std::function<double(const State&)> get,
                   std::function<void(State&, double)> set)
{
    const std::string named = title;
    return {tr_(group), tr_(title), QString::fromUtf8(unit_symbol),
            [get](const State& state) {
                const double value = get(state);
                return value == 0.0 ? QString() : plain_text(value);
            },
            [set, named](State& state, const QString& text) -> std::optional<Problem> {
                const auto value = read_box(text);
                if (!value.has_value())
                    return value.error();
                if (!value.value())
                    return invalid_input("\u201c" + named + "\u201d needs a number.", "Type one; what stood there before is kept.");
                set(state, *value.value());
                return std::nullopt;
            }};
}

/// A number that may be left out.
EngineField maybe(const char* group, const char* title, const char* unit_symbol, std::function<std::optional<double>(const State&)> get,
                  std::function<void(State&, std::optional<double>)> set)
{
    return {tr_(group), tr_(title), QString::fromUtf8(unit_symbol), [get](const State& state) { return plain_text(get(state)); },
            [set](State& state, const QString& text) -> std::optional<Problem> {
                const auto value = read_box(text);
                if (!value.has_value())
                    return value.error();
                set(state, value.value());
                return std::nullopt;
            }};
}

EngineField optional_member(const char* group, const char* title, const char* unit_symbol, std::optional<double> Engine::* member)
{
    return maybe(group, title, unit_symbol, [member](const State& state) { return state.engine.*member; },
                 [member](State& state, std::optional<double> value) { state.engine.*member = value; });
}

EngineField length(const char* title, Length Engine::* member)
{
    return number("Engine", title, "mm", [member](const State& state) { return (state.engine.*member).value() * 1000.0; },
                  [member](State& state, double value) { state.engine.*member = millimetres(value); });
}

EngineField choice(const char* group, const char* title, QStringList choices, std::function<int(const State&)> get, std::function<void(State&, int)> set)
{
    return {tr_(group), tr_(title), {}, [choices, get](const State& state) { return choices.value(get(state)); },
            [choices, set](State& state, const QString& text) -> std::optional<Problem> {
                set(state, static_cast<int>(choices.indexOf(text)));
                return std::nullopt;
            },
            choices};
}

EngineField cylinder_count()
{
    return {tr_("Engine"), tr_("Cylinders"), {},
            [](const State& state) { return state.engine.cylinders > 0 ? QString::number(state.engine.cylinders) : QString(); },
            [](State& state, const QString& text) -> std::optional<Problem> {
                bool whole = false;
                const int count = text.trimmed().toInt(&whole);
                if (!whole || count < 1)
                    return invalid_input("\"" + text.toStdString() + "\" is no number of cylinders.", "Type a whole number from 1 on.");
                state.engine.cylinders = count;
                return std::nullopt;
            }};
}

EngineField cylinder_names()
{
    return {tr_("Engine"), tr_("Names of cylinders"), {},
            [](const State& state) {
                QStringList names;
                for (const std::string& name : state.engine.cylinder_names)
                    names.append(to_qstring(name));
                return names.join(QLatin1Char(' '));
            },
            [](State& state, const QString& text) -> std::optional<Problem> {
                const QStringList names = text.simplified().split(QLatin1Char(' '), Qt::SkipEmptyParts);
                if (!names.isEmpty() && state.engine.cylinders == 0)
                    return invalid_input("How many cylinders there are is not written yet.", "Type their number first, then their names.");
                if (!names.isEmpty() && names.size() != state.engine.cylinders)
                    return invalid_input(QStringLiteral("%1 names for %2 cylinders.").arg(names.size()).arg(state.engine.cylinders).toStdString(),
                                         "Give one name a cylinder with blanks between, or none at all.");
                state.engine.cylinder_names.clear();
                for (const QString& name : names)
                    state.engine.cylinder_names.push_back(name.toStdString());
                return std::nullopt;
            }};
}

EngineField firing_order()
{
    return {tr_("Engine"), tr_("Firing order"), {},
            [](const State& state) {
                QStringList order;
                for (const int number : state.engine.firing_order)
                    order.append(to_qstring(state.engine.cylinder_name(number)));
                return order.join(QLatin1Char('-'));
            },
            [](State& state, const QString& text) -> std::optional<Problem> {
                std::vector<int> order;
                QString spaced = text;
                for (const QString& name : spaced.replace(QLatin1Char('-'), QLatin1Char(' ')).split(QLatin1Char(' '), Qt::SkipEmptyParts)) {
                    const auto cylinder = state.engine.find_cylinder(name.toStdString());
                    if (!cylinder)
                        return invalid_input("There is no cylinder \"" + name.toStdString() + "\".", "Write the order as 1-5-3-4-2-6, or leave it empty.");
                    order.push_back(*cylinder);
                }
                state.engine.firing_order = order;
                return std::nullopt;
            }};
}

EngineField needed(EngineField field, const char* as)
{
    field.needed_as = tr_(as);
    return field;
}

void add_vessel(std::vector<EngineField>& fields)
{
    fields.push_back(needed(words("Ship", "Name of the ship", [](State& s) -> std::string& { return s.vessel.name; }), "name of the ship"));
    fields.push_back(words("Ship", "IMO number", [](State& s) -> std::string& { return s.vessel.imo; }));
    fields.push_back(words("Ship", "Flag", [](State& s) -> std::string& { return s.vessel.flag; }));
    fields.push_back(words("Ship", "Class", [](State& s) -> std::string& { return s.vessel.class_society; }));
    fields.push_back(words("Ship", "Class number", [](State& s) -> std::string& { return s.vessel.class_number; }));
}

void add_engine(std::vector<EngineField>& fields)
{
    fields.push_back(needed(words("Engine", "Name of the engine", [](State& s) -> std::string& { return s.engine.name; }), "name of the engine"));
    fields.push_back(choice("Engine", "Working cycle", {tr_("two-stroke"), tr_("four-stroke")},
                            [](const State& s) { return s.engine.two_stroke() ? 0 : 1; },
                            [](State& s, int index) { s.engine.kind = index == 1 ? EngineKind::four_stroke : EngineKind::two_stroke; }));
    fields.push_back(needed(cylinder_count(), "number of cylinders"));
    fields.push_back(cylinder_names());
    fields.push_back(firing_order());
    fields.push_back(needed(length("Bore", &Engine::bore), "bore"));
    fields.push_back(needed(length("Stroke", &Engine::stroke), "stroke"));
    fields.push_back(needed(length("Length of connecting rod", &Engine::rod_length), "length of connecting rod"));
    fields.push_back(needed(number("Engine", "Rated power", "kW", [](const State& s) { return s.engine.rated_power.value() / 1000.0; },
                                   [](State& s, double value) { s.engine.rated_power = kilowatts(value); }),
                            "rated power"));
    fields.push_back(needed(number("Engine", "Rated speed", "r/min", [](const State& s) { return s.engine.rated_speed.value() * 60.0; },
                                   [](State& s, double value) { s.engine.rated_speed = per_minute(value); }),
                            "rated speed"));
    fields.push_back(choice("Engine", "Maximum pressure", {tr_("follows the load"), tr_("held by the control")},
                            [](const State& s) { return s.engine.maximum_pressure_controlled ? 1 : 0; },
                            [](State& s, int index) { s.engine.maximum_pressure_controlled = index == 1; }));
    fields.push_back(optional_member("Engine", "Mechanical efficiency", "", &Engine::mechanical_efficiency));
    fields.push_back(maybe("Engine", "Pitch of propeller", "m",
                           [](const State& s) { return s.engine.propeller_pitch ? std::optional<double>(s.engine.propeller_pitch->value()) : std::nullopt; },
                           [](State& s, std::optional<double> value) {
                               s.engine.propeller_pitch = value ? std::optional<Length>(*value * si::metres) : std::nullopt;
                           }));
    fields.push_back(optional_member("Engine", "Generator efficiency", "", &Engine::generator_efficiency));
    fields.push_back(maybe("Engine", "Moving mass of one cylinder", "kg",
                           [](const State& s) { return s.engine.moving_mass ? std::optional<double>(s.engine.moving_mass->value()) : std::nullopt; },
                           [](State& s, std::optional<double> value) {
                               s.engine.moving_mass = value ? std::optional<Mass>(*value * si::kilograms) : std::nullopt;
                           }));
    fields.push_back(choice("Engine", "Aspiration", {tr_("turbocharged, charge-air cooler"), tr_("turbocharged, no cooler"), tr_("naturally aspirated")},
                            [](const State& s) { return static_cast<int>(s.engine.aspiration); },
                            [](State& s, int index) { s.engine.aspiration = static_cast<AspirationClass>(index); }));
}

/// What the numbers are where no set of the program has them.
QString own_conditions() { return tr_("the engine's own, as of its shop trial"); }

bool same(const ReferenceConditions& a, const ReferenceConditions& b)
{
    const auto near = [](double x, double y) { return std::abs(x - y) < 1e-6; }; // typed numbers, back from SI
    return near(a.inlet_air.value(), b.inlet_air.value()) && near(a.cooler_coolant.value(), b.cooler_coolant.value()) &&
           near(in_bar(a.barometer), in_bar(b.barometer)) &&
           (!a.relative_humidity || near(*a.relative_humidity, b.relative_humidity.value_or(-1.0)));
}

/// Fills the boxes below it with one of the known sets; the engine's own conditions are typed there.
EngineField reference_set()
{
    QStringList choices;
    for (const ReferenceSet& set : all_reference_sets())
        choices.append(to_qstring(std::string(set.title)));
    choices.append(own_conditions());
    return {tr_("Reference conditions"), tr_("Conditions"), {},
            [](const State& state) {
                for (const ReferenceSet& set : all_reference_sets())
                    if (same(state.engine.reference, set.conditions()))
                        return to_qstring(std::string(set.title));
                return own_conditions();
            },
            [](State& state, const QString& text) -> std::optional<Problem> {
                for (const ReferenceSet& set : all_reference_sets())
                    if (text == to_qstring(std::string(set.title)))
                        state.engine.reference = set.conditions();
                if (text == own_conditions())
                    return invalid_input("The engine's own conditions are those that its shop trial was brought to.",
                                         "Type them into the boxes below, with their source.");
                return std::nullopt;
            },
            choices};
}

void add_reference(std::vector<EngineField>& fields)
{
    fields.push_back(reference_set());
    fields.push_back(number("Reference conditions", "Inlet air", "°C", [](const State& s) { return in_celsius(s.engine.reference.inlet_air); },
                            [](State& s, double value) { s.engine.reference.inlet_air = celsius(value); }));
    fields.push_back(number("Reference conditions", "Charge-air coolant", "°C", [](const State& s) { return in_celsius(s.engine.reference.cooler_coolant); },
                            [](State& s, double value) { s.engine.reference.cooler_coolant = celsius(value); }));
    fields.push_back(number("Reference conditions", "Barometer", "mbar", [](const State& s) { return in_bar(s.engine.reference.barometer) * 1000.0; },
                            [](State& s, double value) { s.engine.reference.barometer = bar_absolute(value / 1000.0); }));
    fields.push_back(maybe("Reference conditions", "Relative humidity", "%",
                           [](const State& s) { return s.engine.reference.relative_humidity ? std::optional(*s.engine.reference.relative_humidity * 100.0) : std::nullopt; },
                           [](State& s, std::optional<double> value) {
                               s.engine.reference.relative_humidity = value ? std::optional(*value / 100.0) : std::nullopt;
                           }));
    fields.push_back(choice("Reference conditions", "Consumption", {tr_("by the engine's own coefficients"), tr_("by ISO 3046-1")},
                            [](const State& s) { return s.engine.consumption_correction == ConsumptionCorrection::iso_3046 ? 1 : 0; },
                            [](State& s, int index) {
                                s.engine.consumption_correction = index == 1 ? ConsumptionCorrection::iso_3046 : ConsumptionCorrection::linear;
                            }));
    fields.push_back(words("Reference conditions", "Source", [](State& s) -> std::string& { return s.engine.reference.source; }));
}

void add_cards(std::vector<EngineField>& fields)
{
    fields.push_back(optional_member("For cards", "Compression ratio", "", &Engine::compression_ratio));
    fields.push_back(optional_member("For cards", "Cylinder closes at", "deg", &Engine::cylinder_closes_deg));
    fields.push_back(optional_member("For cards", "Cylinder opens at", "deg", &Engine::cylinder_opens_deg));
    fields.push_back(number("For cards", "Expansion angle", "deg", [](const State& s) { return s.engine.expansion_angle_deg; },
                            [](State& s, double value) { s.engine.expansion_angle_deg = value; }));
}

} // namespace

QString plain_text(const std::optional<double>& number)
{
    if (!number)
        return {};
    return QString::number(*number, 'g', 10);
}

Result<std::optional<double>> read_box(const QString& text)
{
    const QString typed = text.trimmed();
    if (typed.isEmpty())
        return std::optional<double>();
    const auto value = parse_number(typed.toStdString());
    if (!value.has_value())
        return value.error();
    return std::optional<double>(value.value());
}

const std::vector<EngineField>& engine_fields()
{
    static const std::vector<EngineField> fields = [] {
        std::vector<EngineField> list;
        add_vessel(list);
        add_engine(list);
        add_reference(list);
        add_cards(list);
        return list;
    }();
    return fields;
}

QStringList still_needed(const EngineDraft::State& state)
{
    QStringList names;
    for (const EngineField& field : engine_fields())
        if (!field.needed_as.isEmpty() && field.show(state).isEmpty())
            names.append(field.needed_as);
    return names;
}

} // namespace evenstroke
