// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/trend/typing_slips.h"

#include <algorithm>
#include <array>
#include <charconv>
#include <system_error>

namespace evenstroke::drift {

namespace {

/// A plain decimal taken apart: digits without the point, and how many of them follow it.
struct Decimal
{
    bool negative = false;
    char point = '.';
    std::string digits;
    int decimals = 0;
};

std::optional<Decimal> take_apart(std::string_view text)
{
    Decimal decimal;
    bool after_point = false;
    for (std::size_t at = 0; at < text.size(); ++at) {
        const char letter = text[at];
        if (letter >= '0' && letter <= '9') {
            decimal.digits.push_back(letter);
            decimal.decimals += after_point ? 1 : 0;
        } else if ((letter == '.' || letter == ',') && !after_point) {
            after_point = true;
            decimal.point = letter;
        } else if ((letter == '-' || letter == '+') && at == 0) {
            decimal.negative = letter == '-';
        } else {
            return std::nullopt;
        }
    }
    constexpr std::size_t longest = 15; // digits a double holds
    if (decimal.digits.empty() || decimal.digits.size() > longest)
        return std::nullopt;
    return decimal;
}

SlipTrial put_together(Decimal decimal, Verdict verdict)
{
    if (decimal.decimals < 0) {
        decimal.digits.append(static_cast<std::size_t>(-decimal.decimals), '0');
        decimal.decimals = 0;
    }
    const std::size_t decimals = static_cast<std::size_t>(decimal.decimals);
    if (decimal.digits.size() <= decimals)
        decimal.digits.insert(0, decimals + 1 - decimal.digits.size(), '0');
    const std::size_t whole = decimal.digits.size() - decimals;
    const std::size_t first = std::min(decimal.digits.find_first_not_of('0'), whole - 1);
    std::string text = decimal.digits.substr(first, whole - first);
    if (decimals > 0)
        text += '.' + decimal.digits.substr(whole);
    double number = 0.0;
    std::from_chars(text.data(), text.data() + text.size(), number);
    if (const std::size_t point = text.find('.'); point != std::string::npos)
        text[point] = decimal.point;
    if (decimal.negative)
        return {verdict, "-" + text, -number};
    return {verdict, text, number};
}

} // namespace

std::vector<SlipTrial> undo_slips(std::string_view text)
{
    const auto decimal = take_apart(text);
    if (!decimal)
        return {};
    std::vector<SlipTrial> trials;
    for (const int places : {1, -1, 2, -2}) {
        Decimal moved = *decimal;
        moved.decimals += places;
        trials.push_back(put_together(moved, Verdict::decimal_slip));
    }
    Decimal padded = *decimal;
    padded.digits.insert(padded.digits.begin(), '0'); // 80.4 typed as 08.4 is kept as 8.4
    for (std::size_t at = 0; at + 1 < padded.digits.size(); ++at) {
        if (padded.digits[at] == padded.digits[at + 1])
            continue;
        Decimal exchanged = padded;
        std::swap(exchanged.digits[at], exchanged.digits[at + 1]);
        trials.push_back(put_together(exchanged, Verdict::digits_swapped));
    }
    return trials;
}

std::optional<BestTrial> best_trial(std::string_view text, const std::function<double(double)>& distance)
{
    std::optional<BestTrial> best;
    for (SlipTrial& trial : undo_slips(text)) {
        const double away = distance(trial.number);
        if (!best || away < best->distance)
            best = BestTrial{std::move(trial), away};
    }
    return best;
}

int significant_decimals(std::string_view text)
{
    const auto decimal = take_apart(text);
    if (!decimal)
        return 0;
    int decimals = decimal->decimals;
    for (std::size_t at = decimal->digits.size(); decimals > 0 && at > 0 && decimal->digits[at - 1] == '0';
         --at)
        --decimals;
    return decimals;
}

std::string plain_text(double number)
{
    std::array<char, 64> buffer{};
    const auto written =
        std::to_chars(buffer.data(), buffer.data() + buffer.size(), number, std::chars_format::fixed);
    return written.ec == std::errc{} ? std::string(buffer.data(), written.ptr) : std::string();
}

} // namespace evenstroke::drift
