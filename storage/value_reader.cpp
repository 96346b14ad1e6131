// SPDX-License-Identifier: GPL-3.0-or-later
#include "storage/value_reader.h"

#include "core/plain_text.h"
#include "core/reading/fitting_unit.h"
#include "core/sentence_words.h"

#include <algorithm>

namespace evenstroke::storage {
namespace {

RowProblem problem_of(std::string_view value, const Problem& problem)
{
    return {std::string(value), problem.what_happened, problem.what_to_do};
}

std::optional<Phase> read_phase(std::string_view text)
{
    if (text.empty() || text == "reading")
        return Phase::reading;
    if (text == "before")
        return Phase::before;
    return text == "after" ? std::optional(Phase::after) : std::nullopt;
}

/// "no" for "No", "0" and "false"; empty where it is neither.
std::string yes_or_no(std::string_view text)
{
    std::string plain(text);
    std::transform(plain.begin(), plain.end(), plain.begin(),
                   [](unsigned char letter) { return static_cast<char>(std::tolower(letter)); });
    if (plain == "yes" || plain == "true" || plain == "1" || plain == "on" || plain == "running")
        return "yes";
    return plain == "no" || plain == "false" || plain == "0" || plain == "off" || plain == "stopped" ? "no"
                                                                                                     : "";
}

/// A choice may be followed by words of one's own: "residual, batch 12".
bool names_choice(std::string_view text, const std::string& choice)
{
    if (!text.starts_with(choice))
        return false;
    return text.size() == choice.size() ||
           std::string_view(" ,;:(").find(text[choice.size()]) != std::string_view::npos;
}

/// A trend stays in the unit of its baseline, which is the quantity's own: rack millimetres are no per cent.
std::optional<RowProblem> differs_from_baseline(const Engine* engine, const Quantity& q,
                                                std::string_view unit_typed)
{
    const bool has_baseline =
        engine && std::any_of(engine->baseline.begin(), engine->baseline.end(),
                              [&](const BaselinePoint& point) { return point.values.count(q.name) > 0; });
    if (!has_baseline)
        return std::nullopt;
    const std::string usual(unit(q.unit).symbol);
    return RowProblem{std::string(unit_typed),
                      "The engine's baseline has " + q.name + " in " + usual + ", and " +
                          evenstroke::quoted(unit_typed) + " cannot be compared with it.",
                      "Write it in " + usual + ", or leave " + q.name + " out of the baseline."};
}

} // namespace

const ValueReader::KnownQuantity* ValueReader::find_quantity_entry(std::string_view name,
                                                                   std::optional<RowProblem>& problem)
{
    if (const auto known = quantities_.find(name); known != quantities_.end())
        return &known->second;
    if (!find_quantity(name)) {
        problem = {
            std::string(name),
            name.empty() ? "The quantity is missing."
                         : "The quantity " + evenstroke::quoted(name) + " is not known.",
            "Write a name of the catalogue" +
                (name.empty() ? "." : "; near to it are " + comma_list(nearest_quantity_names(name)) + ".")};
        return nullptr;
    }
    const auto key = names_.quantity_key(name);
    if (!key) {
        problem = problem_of(name, key.error());
        return nullptr;
    }
    KnownQuantity known{key.value(), {}};
    for (int kind = 0; kind < place_kinds; ++kind)
        known.id[static_cast<std::size_t>(kind)] =
            find_quantity(name, static_cast<Place::Kind>(kind)).value_or(-1);
    return &quantities_.emplace(name, known).first->second;
}

const ValueReader::KnownPlace* ValueReader::find_place(std::string_view text)
{
    if (const auto known = places_.find(text); known != places_.end())
        return &known->second;
    const auto found = read_file_place(text, engine_);
    if (!found)
        return nullptr; // not remembered: a file of nonsense must not fill the memory
    return &places_.emplace(text, KnownPlace{*found, file_place(*found, engine_) != text}).first->second;
}

const ValueReader::KnownUnit* ValueReader::find_unit_entry(std::string_view text,
                                                           std::optional<RowProblem>& problem)
{
    if (const auto known = units_.find(text); known != units_.end())
        return &known->second;
    KnownUnit entry;
    if (const auto found = find_unit(text); found.has_value()) {
        entry.unit = found.value();
        const auto key = text.empty() ? Result<int>(0) : names_.unit_key(text);
        if (!key) {
            problem = problem_of(text, key.error());
            return nullptr;
        }
        entry.key = key.value();
    } else {
        problem =
            problem_of(text, found.error()); // not remembered: a file of wrong units must not fill the memory
        return nullptr;
    }
    return &units_.emplace(text, std::move(entry)).first->second;
}

std::optional<RowProblem> ValueReader::wrong_place(const ValueTexts& texts) const
{
    const std::string name(texts.quantity), written = evenstroke::quoted(texts.cylinder);
    const Quantity& q = quantity(*find_quantity(texts.quantity));
    if (!engine_)
        return RowProblem{
            name, "The quantity " + evenstroke::quoted(name) + " is not shared by the ship's engines.",
            "Write it in the readings.csv of its engine."};
    if (texts.cylinder.empty())
        return RowProblem{name,
                          "The quantity " + name + " is read at each cylinder, and no cylinder is given.",
                          "Write a cylinder: " + cylinders_expected(*engine_) + "."};
    if (!read_file_place(texts.cylinder, engine_))
        return RowProblem{std::string(texts.cylinder), "The engine has no cylinder " + written + ".",
                          "Write " + cylinders_expected(*engine_) +
                              ", or tc1, cooler1 and so on, or leave it empty for the engine."};
    switch (q.per) {
    case Place::Kind::cylinder:
        return RowProblem{std::string(texts.cylinder),
                          name + " is read at each cylinder, not at " + written + ".",
                          "Write a cylinder: " + cylinders_expected(*engine_) + "."};
    case Place::Kind::turbocharger:
        return RowProblem{std::string(texts.cylinder),
                          name + " is read at each turbocharger, not at " + written + ".",
                          "Write tc1, tc2 and so on, or leave it empty."};
    case Place::Kind::cooler:
        return RowProblem{std::string(texts.cylinder),
                          name + " is read at each cooler, not at " + written + ".",
                          "Write cooler1, cooler2 and so on, or leave it empty."};
    default:
        return RowProblem{std::string(texts.cylinder),
                          name + " belongs to the engine as a whole, not to " + written + ".",
                          "Leave the column cylinder empty."};
    }
}

std::optional<RowProblem> ValueReader::read_place(const ValueTexts& texts, const KnownQuantity& known,
                                                  ValueRow& row, QuantityId& id)
{
    const KnownPlace* const found = find_place(texts.cylinder);
    if (!found)
        return wrong_place(texts);
    Place place = found->place;
    id = known.id[static_cast<std::size_t>(place.kind)];
    if (id < 0)
        return wrong_place(texts);
    if (quantity(id).per == Place::Kind::ship && place.kind == Place::Kind::engine)
        place = {Place::Kind::ship, 0};
    row.place = place_code(place);
    row.place_typed.clear();
    if (found->unusual)
        row.place_typed = texts.cylinder;
    return std::nullopt;
}

std::optional<RowProblem> ValueReader::read_number(const ValueTexts& texts, const Quantity& q, ValueRow& row)
{
    std::optional<RowProblem> problem;
    const KnownUnit* const known = find_unit_entry(texts.unit, problem);
    if (!known)
        return problem;
    WrittenUnit written = *known->unit;
    const std::string_view usual = unit(q.unit).symbol;
    if (texts.unit.empty() && unit(q.unit).dimension != Dimension::number)
        return RowProblem{std::string(texts.value),
                          "The value " + evenstroke::quoted(texts.value) + " of " + q.name + " has no unit.",
                          "Write its unit, such as " + std::string(usual) + "."};
    if (!may_be_written_in(q, written.id)) // with the unit as it was typed, where nobody knows it otherwise
        return RowProblem{std::string(texts.unit),
                          evenstroke::quoted(texts.unit) + " is no unit of " + q.name + ".",
                          find_unit_problem(q, written)->what_to_do};
    if (const auto misfit = find_unit_problem(q, written))
        return problem_of(texts.unit, *misfit);
    const Dimension dimension = unit(written.id).dimension;
    if (!converts_by_si(q, dimension) && unit(q.unit).dimension != Dimension::mass_flow)
        if (auto misfit = differs_from_baseline(engine_, q, texts.unit))
            return misfit;
    if (written.kind == PressureKind::none)
        written.kind = q.kind;
    const auto number = parse_number(texts.value);
    if (!number.has_value())
        return problem_of(texts.value, number.error());
    const auto value_si = to_si_checked(number.value(), written);
    if (!value_si.has_value())
        return problem_of(texts.value, value_si.error());
    row.typed = texts.value;
    row.words = texts.words;
    row.unit_key = known->key;
    row.value_si = value_si.value() + 0.0; // the file does not keep the sign of a zero
    return std::nullopt;
}

std::optional<RowProblem> ValueReader::read_words(const ValueTexts& texts, const Quantity& q, ValueRow& row)
{
    const std::string_view text = texts.words.empty() ? texts.value : texts.words;
    row.typed = text;
    row.words = text;
    row.unit_key = 0;
    row.value_si.reset();
    if (q.type == ValueType::yes_no) {
        row.words = yes_or_no(text);
        if (row.words.empty())
            return RowProblem{std::string(text),
                              evenstroke::quoted(text) + " does not answer " + q.name + ".",
                              "Write yes or no."};
    }
    const bool known = q.type != ValueType::choice ||
                       std::any_of(q.choices.begin(), q.choices.end(),
                                   [&](const std::string& choice) { return names_choice(text, choice); });
    if (!known)
        return RowProblem{std::string(text), evenstroke::quoted(text) + " is no choice of " + q.name + ".",
                          "Write one of " + comma_list(q.choices) + "."};
    return std::nullopt;
}

std::optional<RowProblem> ValueReader::read_missing(const ValueTexts& texts, ValueRow& row)
{
    std::string plain(texts.missing_reason);
    std::replace(plain.begin(), plain.end(), ' ', '_');
    row.typed.clear();
    row.words.clear();
    row.unit_key = 0;
    row.value_si.reset();
    // An empty box without a reason was not read.
    if (plain.empty() || plain == "not_read")
        row.missing = static_cast<int>(MissingReason::not_read);
    else if (plain == "not_fitted")
        row.missing = static_cast<int>(MissingReason::not_fitted);
    else if (plain == "out_of_order")
        row.missing = static_cast<int>(MissingReason::out_of_order);
    else
        return RowProblem{std::string(texts.missing_reason),
                          "The reason " + evenstroke::quoted(texts.missing_reason) +
                              " for a missing value is not known.",
                          "Write not_fitted, not_read or out_of_order."};
    return std::nullopt;
}

std::optional<RowProblem> ValueReader::read(const ValueTexts& texts, ValueRow& row)
{
    std::optional<RowProblem> problem;
    const KnownQuantity* const known = find_quantity_entry(texts.quantity, problem);
    if (!known)
        return problem;
    QuantityId id = -1;
    if (problem = read_place(texts, *known, row, id); problem)
        return problem;
    const auto phase = read_phase(texts.phase);
    if (!phase)
        return RowProblem{std::string(texts.phase),
                          "The phase " + evenstroke::quoted(texts.phase) + " is not known.",
                          "Write before, reading or after, or leave it empty."};
    row.quantity_key = known->key;
    row.phase = static_cast<int>(*phase);
    row.missing = 0;
    row.confirmed = false;
    row.origin = static_cast<int>(texts.origin == "card" ? Origin::card : Origin::read);
    if (!texts.origin.empty() && texts.origin != "card" && texts.origin != "read")
        return RowProblem{std::string(texts.origin),
                          "The origin " + evenstroke::quoted(texts.origin) + " is not known.",
                          "Write card where an indicator card gave the value, or leave it empty."};
    const Quantity& q = quantity(id);
    const bool number = q.type == ValueType::number;
    if (texts.value.empty() && (texts.words.empty() || number))
        return read_missing(texts, row);
    if (!texts.missing_reason.empty())
        return RowProblem{std::string(texts.missing_reason),
                          "The row has a value and says why it is missing.", "Leave one of the two empty."};
    return number ? read_number(texts, q, row) : read_words(texts, q, row);
}

} // namespace evenstroke::storage
