// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/sentence_words.h"

#include <cctype>

namespace evenstroke {

std::string lower_first(std::string text)
{
    if (text.size() > 1 && !std::isupper(static_cast<unsigned char>(text[1])))
        text[0] = static_cast<char>(std::tolower(static_cast<unsigned char>(text[0])));
    return text;
}

std::string upper_first(std::string text)
{
    if (!text.empty())
        text[0] = static_cast<char>(std::toupper(static_cast<unsigned char>(text[0])));
    return text;
}

std::string and_list(const std::vector<std::string>& parts)
{
    std::string text;
    for (std::size_t i = 0; i < parts.size(); ++i)
        text += (i == 0 ? "" : i + 1 == parts.size() ? " and " : ", ") + parts[i];
    return text;
}

std::string comma_list(const std::vector<std::string>& parts)
{
    std::string text;
    for (const std::string& part : parts)
        text += (text.empty() ? "" : ", ") + part;
    return text;
}

std::string place_words(const Engine& engine, const Place& place)
{
    return place.kind == Place::Kind::cylinder ? "cylinder " + engine.cylinder_name(place.number) : place_text(place);
}

} // namespace evenstroke
