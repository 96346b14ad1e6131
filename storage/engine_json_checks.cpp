// SPDX-License-Identifier: GPL-3.0-or-later
#include "storage/engine_json_checks.h"

#include "core/engine/table_text.h"
#include "core/plain_text.h"
#include "core/reading/quantity_names.h"

#include <algorithm>

namespace evenstroke::storage {
namespace {

constexpr std::size_t shortest_beginning = 5; // letters; fewer begin too many names
constexpr const char* coefficients_expected =
    "Write [per °C of inlet air, per °C of coolant], or {\"per_inlet_air\": …, \"per_coolant\": …, "
    "\"source\": …}; write 0 for a coefficient that is nought.";

std::string lacking(const JsonReader& coefficients)
{
    const bool air = coefficients.has("per_inlet_air"), coolant = coefficients.has("per_coolant");
    return air ? "per_coolant" : coolant ? "per_inlet_air" : "per_inlet_air and per_coolant";
}

void remark_on(std::vector<std::string>& remarks, const char* place, const std::string& name)
{
    if (name.empty() || find_quantity(name))
        return;
    const std::string meant = likely_quantity(name);
    std::string remark = std::string(place) + ": no quantity is called " + evenstroke::quoted(name) +
                         "; it was kept and not used";
    if (!meant.empty())
        remark += ". Write " + meant + " if that is meant";
    if (std::find(remarks.begin(), remarks.end(), remark) == remarks.end())
        remarks.push_back(std::move(remark));
}

} // namespace

std::optional<CorrectionCoefficients> read_coefficients(JsonReader& correction, const char* quantity,
                                                        const std::string& common_source)
{
    const QJsonValue value = correction.take(quantity);
    if (value.isUndefined())
        return std::nullopt;
    const std::string is = correction.path(quantity) + " is " + json_text(value);
    if (value.isArray()) {
        const QJsonArray pair = value.toArray();
        if (pair.size() == 2 && pair.at(0).isDouble() && pair.at(1).isDouble())
            return CorrectionCoefficients{pair.at(0).toDouble(), pair.at(1).toDouble(), common_source};
    }
    if (!value.isObject()) {
        correction.refuse(quantity, value, is + ", which is no pair of coefficients.", coefficients_expected);
        return std::nullopt;
    }
    JsonReader both(value.toObject(), correction.path(quantity) + ".", correction.problems());
    if (!both.has("per_inlet_air") || !both.has("per_coolant")) {
        correction.refuse(quantity, value, is + ", where " + lacking(both) + " cannot be found.",
                          coefficients_expected);
        return std::nullopt;
    }
    const auto air = both.number("per_inlet_air"), coolant = both.number("per_coolant");
    const std::string source = both.text("source");
    for (const std::string& key : both.left_keys())
        correction.keep_aside(key);
    if (!air || !coolant)
        return std::nullopt;
    return CorrectionCoefficients{*air, *coolant, source.empty() ? common_source : source};
}

std::string likely_quantity(const std::string& name)
{
    std::string words = name;
    std::replace(words.begin(), words.end(), '_', ' ');
    if (std::string usual = table_text::quantity_of(table_text::read_heading(words)); !usual.empty())
        return usual;
    if (name.size() >= shortest_beginning)
        for (const Quantity& known : all_quantities())
            if (known.name.starts_with(name))
                return known.name;
    const std::vector<std::string> nearest = nearest_names_of_all(name, 1);
    // A third of the letters wrong is still a likeness; more is chance.
    if (nearest.empty() || name.size() > 64 || edit_distance(name, nearest.front()) > name.size() / 3)
        return {};
    return nearest.front();
}

std::vector<std::string> unknown_quantity_remarks(const Engine& engine)
{
    std::vector<std::string> remarks;
    for (const auto& [name, coefficients] : engine.correction)
        remark_on(remarks, "correction", name);
    for (const AbsoluteLimit& limit : engine.limits)
        remark_on(remarks, "limits", limit.quantity);
    for (const Instrument& instrument : engine.instruments)
        remark_on(remarks, "instruments", instrument.quantity);
    for (const BaselinePoint& point : engine.baseline)
        for (const auto& [name, value] : point.values)
            remark_on(remarks, "baseline", name);
    return remarks;
}

std::vector<RepeatedKey> find_repeated_keys(std::string_view text)
{
    struct Level
    {
        bool object = false, key_comes = false;
        std::set<std::string_view> keys;
    };
    std::vector<RepeatedKey> repeated;
    std::vector<Level> levels;
    for (std::size_t i = 0; i < text.size(); ++i) {
        const char letter = text[i];
        if (letter == '{' || letter == '[') {
            levels.push_back({letter == '{', letter == '{', {}});
        } else if ((letter == '}' || letter == ']') && !levels.empty()) {
            levels.pop_back();
        } else if (letter == ',' && !levels.empty()) {
            levels.back().key_comes = levels.back().object;
        } else if (letter == '"') {
            const std::size_t begin = i + 1;
            for (++i; i < text.size() && text[i] != '"'; ++i)
                i += text[i] == '\\' ? 1 : 0;
            if (levels.empty() || !levels.back().key_comes)
                continue;
            levels.back().key_comes = false;
            const std::string_view key = text.substr(begin, std::min(i, text.size()) - begin);
            if (!levels.back().keys.insert(key).second)
                repeated.push_back({std::string(key), begin});
        }
    }
    return repeated;
}

} // namespace evenstroke::storage
