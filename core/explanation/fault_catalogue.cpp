// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/explanation/fault_catalogue.h"

#include "core/catalogue_table.h"
#include "core/catalogue_text.h"
#include "core/trend/flag_text.h"

#include <algorithm>
#include <array>
#include <stdexcept>
#include <utility>

namespace evenstroke {
namespace {

template <typename Value, std::size_t Size>
Value meaning(const std::array<std::pair<std::string_view, Value>, Size>& words, const std::string& word)
{
    for (const auto& [name, value] : words)
        if (name == word)
            return value;
    throw std::logic_error("fault catalogue: \"" + word + "\" is not known");
}

constexpr std::array<std::pair<std::string_view, Urgency>, 5> urgencies = {
    {{"remember", Urgency::remember}, {"plan", Urgency::plan}, {"soon", Urgency::soon}, {"now", Urgency::now},
     {"emergency", Urgency::emergency}}};
constexpr std::array<std::pair<std::string_view, Fault::Group>, 3> groups = {
    {{"measurement", Fault::Group::measurement}, {"engine", Fault::Group::engine}, {"cylinder", Fault::Group::cylinder}}};
constexpr std::array<std::pair<std::string_view, Fault::Test>, 6> tests = {
    {{"signature", Fault::Test::signature}, {"unit_test", Fault::Test::unit}, {"swap_test", Fault::Test::swap},
     {"single_value_test", Fault::Test::single_value}, {"work_test", Fault::Test::work},
     {"alarm_only", Fault::Test::alarm_only}}};
constexpr std::array<std::pair<std::string_view, Fault::Course>, 3> courses = {
    {{"any", Fault::Course::any}, {"sudden", Fault::Course::sudden}, {"creeping", Fault::Course::creeping}}};
constexpr std::array<std::pair<std::string_view, int>, 3> commonness = {{{"frequent", 2}, {"occasional", 1}, {"rare", 0}}};
constexpr std::array<std::pair<std::string_view, FaultQuantity::Per>, 3> pers = {
    {{"cylinder", FaultQuantity::Per::cylinder}, {"engine", FaultQuantity::Per::engine}, {"both", FaultQuantity::Per::both}}};
constexpr std::array<std::pair<std::string_view, FaultQuantity::Form>, 4> forms = {
    {{"difference", FaultQuantity::Form::difference}, {"percent", FaultQuantity::Form::percent},
     {"percent_absolute", FaultQuantity::Form::percent_absolute},
     {"speed_at_power", FaultQuantity::Form::speed_at_power}}};

constexpr std::array<std::pair<std::string_view, int>, 3> ways = {{{"up", 1}, {"down", -1}, {"", 0}}};

std::vector<FaultQuantity> load_quantities()
{
    const CatalogueTable table(catalogue_text::fault_noise);
    std::vector<FaultQuantity> quantities;
    for (std::size_t row = 0; row < table.rows(); ++row)
        quantities.push_back({table.cell(row, "quantity"), table.cell(row, "read_as"), meaning(pers, table.cell(row, "per")),
                              table.number(row, "noise").value(), table.cell(row, "unit"),
                              meaning(forms, table.cell(row, "form")), table.cell(row, "compare") == "baseline",
                              meaning(ways, table.cell(row, "after_work"))});
    return quantities;
}

Fault load_fault(const CatalogueTable& table, std::size_t row)
{
    Fault fault;
    fault.id = table.cell(row, "fault_id");
    fault.group = meaning(groups, table.cell(row, "group"));
    const std::string& scope = table.cell(row, "scope");
    fault.of_engine = scope == "all" || scope == "engine" || scope == "quantity";
    fault.engine_kind = table.cell(row, "engine_kind");
    fault.either_sign = table.cell(row, "either_sign") == "yes";
    fault.test = meaning(tests, table.cell(row, "test"));
    fault.urgency = meaning(urgencies, table.cell(row, "urgency"));
    fault.commonness = meaning(commonness, table.cell(row, "commonness"));
    fault.course = meaning(courses, table.cell(row, "course"));
    fault.only_if_read = table.cell(row, "only_if_read");
    fault.reference_size = table.cell(row, "reference_size");
    for (const FaultQuantity& quantity_of : fault_quantities())
        fault.levels.push_back(table.number(row, quantity_of.name));
    fault.full_levels = fault.levels;
    return fault;
}

void set_finer_levels(std::vector<Fault>& faults)
{
    const CatalogueTable table(catalogue_text::fault_finer_levels);
    for (std::size_t row = 0; row < table.rows(); ++row)
        for (Fault& fault : faults)
            if (!fault.variant && fault.id == table.cell(row, "fault_id"))
                fault.full_levels[find_fault_quantity(table.cell(row, "quantity")).value()] = table.number(row, "level");
}

std::vector<Fault> load_faults()
{
    const CatalogueTable table(catalogue_text::fault_signatures), words(catalogue_text::fault_words);
    std::vector<Fault> faults;
    for (std::size_t row = 0; row < table.rows(); ++row) {
        Fault fault = load_fault(table, row);
        fault.variant = std::any_of(faults.begin(), faults.end(), [&](const Fault& before) { return before.id == fault.id; });
        for (std::size_t line = 0; line < words.rows(); ++line)
            if (words.cell(line, "fault_id") == fault.id) {
                fault.title = words.cell(line, "title");
                fault.sets_apart = words.cell(line, "sets_apart");
            }
        fault.check_next = next_check(fault.id, {});
        faults.push_back(std::move(fault));
    }
    set_finer_levels(faults);
    return faults;
}

struct FaultPair
{
    std::string first, second;
    TellingObservation observation;
};

const std::vector<FaultPair>& fault_pairs()
{
    static const std::vector<FaultPair> pairs = [] {
        const CatalogueTable table(catalogue_text::fault_pairs);
        std::vector<FaultPair> loaded;
        for (std::size_t row = 0; row < table.rows(); ++row)
            loaded.push_back({table.cell(row, "first"), table.cell(row, "second"),
                              {table.cell(row, "observation"), table.cell(row, "quantity")}});
        return loaded;
    }();
    return pairs;
}

} // namespace

std::string urgency_word(Urgency urgency)
{
    for (const auto& [name, value] : urgencies)
        if (value == urgency)
            return std::string(name);
    return {};
}

std::string urgency_sentence(Urgency urgency)
{
    switch (urgency) {
    case Urgency::remember: return "Compare at the next reading.";
    case Urgency::plan: return "Put it on the job list: within a month or at the next port.";
    case Urgency::soon: return "Look into it within days.";
    case Urgency::now: return "Look into it at once; take load off if in doubt.";
    case Urgency::emergency: return "Follow the alarm procedure; no reading helps here.";
    }
    return {};
}

bool Fault::possible_on(const Engine& engine) const
{
    return engine_kind == "any" || engine_kind == (engine.two_stroke() ? "two_stroke" : "four_stroke");
}

std::span<const FaultQuantity> fault_quantities()
{
    static const std::vector<FaultQuantity> quantities = load_quantities();
    return quantities;
}

std::optional<std::size_t> find_fault_quantity(std::string_view name)
{
    const auto quantities = fault_quantities();
    for (std::size_t k = 0; k < quantities.size(); ++k)
        if (quantities[k].name == name)
            return k;
    return std::nullopt;
}

std::span<const Fault> all_faults()
{
    static const std::vector<Fault> faults = load_faults();
    return faults;
}

const Fault* find_fault(std::string_view id)
{
    for (const Fault& fault : all_faults())
        if (fault.id == id)
            return &fault;
    return nullptr;
}

TellingObservation telling_observation(std::string_view one, std::string_view other)
{
    for (const FaultPair& pair : fault_pairs())
        if ((pair.first == one && pair.second == other) || (pair.first == other && pair.second == one))
            return pair.observation;
    return {};
}

} // namespace evenstroke
