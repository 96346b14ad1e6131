// SPDX-License-Identifier: GPL-3.0-or-later
#include "storage/trace_titles.h"

#include <algorithm>
#include <cctype>
#include <vector>

namespace evenstroke::storage {
namespace {

/// The words of a title, small: "time_ms" is "time" and "ms".
std::vector<std::string> words_of(const std::string& title)
{
    std::vector<std::string> words(1);
    for (const char letter : lower(title)) {
        const auto byte = static_cast<unsigned char>(letter);
        if (std::isalnum(byte) || byte >= 0x80)
            words.back() += letter;
        else if (!words.back().empty())
            words.emplace_back();
    }
    return words;
}

} // namespace

std::string lower(std::string_view text)
{
    std::string plain(text);
    std::transform(plain.begin(), plain.end(), plain.begin(),
                   [](unsigned char letter) { return static_cast<char>(std::tolower(letter)); });
    return plain;
}

bool names_any(const std::string& title, std::initializer_list<const char*> parts)
{
    const std::string plain = lower(title);
    return std::any_of(parts.begin(), parts.end(),
                       [&](const char* part) { return plain.find(part) != std::string::npos; });
}

bool has_word(const std::string& title, std::initializer_list<const char*> wanted)
{
    const auto words = words_of(title);
    return std::find_first_of(words.begin(), words.end(), wanted.begin(), wanted.end()) != words.end();
}

bool names_angle(const std::string& title)
{
    return names_any(title, {"angle", "deg", "°", "crank", "phi", "theta"});
}

std::optional<double> time_unit_of(const std::string& title)
{
    if (has_word(title, {"ms", "msec", "millisecond", "milliseconds"}))
        return 1e-3;
    if (has_word(title, {"us", "µs", "μs", "usec", "microsecond", "microseconds"}))
        return 1e-6;
    if (names_any(title, {"time"}) || has_word(title, {"s", "sec", "second", "seconds"}))
        return 1.0;
    return std::nullopt;
}

bool names_signal(const std::string& title)
{
    return has_word(title, {"v", "mv", "volt", "volts", "voltage", "signal", "adc"});
}

} // namespace evenstroke::storage
