// SPDX-License-Identifier: GPL-3.0-or-later
#include "storage/trace_layout.h"

#include <algorithm>
#include <cctype>

// Which cylinder a name speaks of.
namespace evenstroke::storage {
namespace {

struct NumberInName
{
    int number = 0;
    std::string word; ///< letters right before it, small: "cyl"
};

std::vector<NumberInName> numbers_in(std::string_view text)
{
    const auto is = [&](std::size_t at, int (*kind)(int)) {
        return at < text.size() && kind(static_cast<unsigned char>(text[at])) != 0;
    };
    std::vector<NumberInName> found;
    for (std::size_t at = 0; at < text.size();) {
        if (!is(at, std::isdigit)) {
            ++at;
            continue;
        }
        std::size_t word_end = at;
        while (word_end > 0 && std::string_view(" _-.#").find(text[word_end - 1]) != std::string_view::npos)
            --word_end;
        std::size_t word = word_end;
        while (word > 0 && is(word - 1, std::isalpha))
            --word;
        NumberInName name;
        for (const char letter : text.substr(word, word_end - word))
            name.word += static_cast<char>(std::tolower(static_cast<unsigned char>(letter)));
        std::size_t digits = 0;
        for (; is(at, std::isdigit); ++at, ++digits)
            name.number = digits < 6 ? name.number * 10 + (text[at] - '0') : 1'000'000;
        found.push_back(std::move(name));
    }
    return found;
}

bool speaks_of_cylinder(const std::string& word)
{
    for (const char* known : {"cyl", "cylinder", "cylno", "no", "nr", "c", "p", "unit"})
        if (word == known)
            return true;
    return word.ends_with("cyl");
}

} // namespace

std::optional<int> guess_cylinder(std::string_view text, const Engine& engine)
{
    std::vector<NumberInName> numbers = numbers_in(text);
    std::erase_if(
        numbers, [&](const NumberInName& name) { return name.number < 1 || name.number > engine.cylinders; });
    const auto named = std::find_if(numbers.begin(), numbers.end(),
                                    [](const NumberInName& name) { return speaks_of_cylinder(name.word); });
    if (named != numbers.end())
        return named->number;
    // A cylinder's own name as a word of its own: "A3" in "2029-01 A3.csv".
    for (int cylinder = 1; cylinder <= static_cast<int>(engine.cylinder_names.size()); ++cylinder) {
        const std::string own = engine.cylinder_name(cylinder);
        const std::size_t at = own.empty() ? std::string_view::npos : text.find(own);
        if (at == std::string_view::npos)
            continue;
        const auto apart = [&](std::size_t place) {
            return place >= text.size() || std::isalnum(static_cast<unsigned char>(text[place])) == 0;
        };
        if ((at == 0 || apart(at - 1)) && apart(at + own.size()))
            return cylinder;
    }
    return numbers.size() == 1 ? std::optional(numbers.front().number) : std::nullopt;
}

} // namespace evenstroke::storage
