// SPDX-License-Identifier: GPL-3.0-or-later
#include "storage/value_reader.h"

#include <algorithm>
#include <cctype>
#include <charconv>

namespace evenstroke::storage {
namespace {

/// The largest engines have four turbochargers and coolers; four times that is a slip of the pen.
constexpr int most_of_a_kind = 16;

std::optional<int> numbered(std::string_view text, std::string_view word)
{
    if (!text.starts_with(word))
        return std::nullopt;
    text.remove_prefix(word.size());
    int number = 0;
    const auto [end, problem] = std::from_chars(text.data(), text.data() + text.size(), number);
    if (problem != std::errc() || end != text.data() + text.size() || number < 1 || number > most_of_a_kind)
        return std::nullopt;
    return number;
}

} // namespace

std::string file_place(const Place& place, const Engine* engine)
{
    switch (place.kind) {
    case Place::Kind::cylinder:
        return engine ? engine->cylinder_name(place.number) : std::to_string(place.number);
    case Place::Kind::turbocharger:
        return "tc" + std::to_string(place.number);
    case Place::Kind::cooler:
        return "cooler" + std::to_string(place.number);
    default:
        return {};
    }
}

std::optional<Place> read_file_place(std::string_view text, const Engine* engine)
{
    if (text.empty())
        return Place::engine();
    if (!engine)
        return std::nullopt;
    if (const auto cylinder = engine->find_cylinder(text))
        return Place::cylinder(*cylinder);
    std::string plain;
    for (const unsigned char letter : text)
        if (letter != ' ')
            plain += static_cast<char>(std::tolower(letter));
    if (const auto number = numbered(plain, "tc"))
        return Place::turbocharger(*number);
    if (const auto number = numbered(plain, "cooler"))
        return Place::cooler(*number);
    return std::nullopt;
}

std::string cylinders_expected(const Engine& engine)
{
    std::string text = "1 to " + std::to_string(engine.cylinders);
    if (!engine.cylinder_names.empty() && engine.cylinder_names.front() != "1")
        text += " or " + engine.cylinder_names.front() + " to " + engine.cylinder_names.back();
    return text;
}

} // namespace evenstroke::storage
