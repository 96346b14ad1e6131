// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/workings/workings.h"

#include "core/plain_text.h"
#include "core/survey/rounding.h"

#include <cmath>

namespace evenstroke {
namespace {

constexpr std::size_t line_length = 100;

/// Characters, not bytes.
std::size_t length_of(std::string_view text)
{
    std::size_t count = 0;
    for (const char byte : text)
        count += (static_cast<unsigned char>(byte) & 0xC0) != 0x80 ? 1 : 0;
    return count;
}

class Lines
{
public:
    /// Folds at blanks; what goes on stands two places in. A word longer than a line is cut.
    void add(std::string_view text)
    {
        std::string line;
        std::size_t at = 0;
        while (at < text.size()) {
            const std::size_t end = std::min(text.find(' ', at), text.size());
            std::string_view word = text.substr(at, end - at);
            at = std::min(end + 1, text.size());
            if (!line.empty() && line != "  " && length_of(line) + 1 + length_of(word) > line_length) {
                put(line);
                line = "  ";
            }
            while (length_of(line) + 1 + length_of(word) > line_length) {
                const std::size_t bytes = bytes_of(word, line_length - length_of(line) - 1);
                put(line + std::string(word.substr(0, bytes)));
                word.remove_prefix(bytes);
                line = "  ";
            }
            line += (line.empty() || line == "  " ? "" : " ") + std::string(word);
        }
        put(line);
    }
    std::string text() && { return std::move(text_); }

private:
    static std::size_t bytes_of(std::string_view word, std::size_t characters)
    {
        std::size_t bytes = 0;
        for (std::size_t seen = 0; bytes < word.size(); ++bytes)
            if ((static_cast<unsigned char>(word[bytes]) & 0xC0) != 0x80 && ++seen > characters)
                break;
        return bytes;
    }
    void put(const std::string& line) { text_ += line + "\n"; }
    std::string text_;
};

std::string with_unit(const std::string& number, const std::string& unit) { return unit.empty() ? number : number + " " + unit; }

std::string input_line(const WorkingInput& input)
{
    std::string line = input.words;
    if (input.place.kind != Place::Kind::engine && input.place.kind != Place::Kind::ship)
        line += ", " + place_text(input.place);
    line += ": " + (input.symbol.empty() ? "" : input.symbol + " = ") + with_unit(short_number_text(input.value), input.unit);
    if (input.half_width)
        line += " ± " + short_number_text(*input.half_width);
    if (input.share)
        line += ", moves it by " + short_number_text(input.moved) + ", share " + rounded_text(100.0 * *input.share, 0) + " %";
    return line + (input.origin.empty() ? "" : " (" + input.origin + ")");
}

} // namespace

std::string difference_unit(const Quantity& of)
{
    const Unit& in = unit(of.unit);
    return in.dimension == Dimension::temperature ? "K" : in.symbol == "1" ? "" : std::string(in.symbol);
}

std::string workings_text(const Workings& workings, const std::string& heading)
{
    Lines lines;
    if (!heading.empty())
        lines.add(heading);
    const bool at_place = workings.place.kind != Place::Kind::engine && workings.place.kind != Place::Kind::ship;
    std::string result = workings.title + (at_place ? ", " + place_text(workings.place) : "") + ": ";
    const auto number = [&](double value) { return rounded_text(value, workings.decimals); };
    result += workings.value ? number(*workings.value) : "not known";
    if (workings.value && workings.half_width)
        result += " ± " + short_number_text(*workings.half_width);
    lines.add(workings.value ? with_unit(result, workings.unit) : result);
    const auto further = [&](const char* words, const std::optional<double>& value) {
        if (value)
            lines.add(with_unit(std::string(words) + ": " + number(*value), workings.unit));
    };
    further("Corrected", workings.corrected);
    further("Expected", workings.expected);
    if (workings.deviation)
        lines.add(with_unit("Deviation: " + number(*workings.deviation) +
                                (workings.deviation_half_width ? " ± " + short_number_text(*workings.deviation_half_width) : ""),
                            workings.unit));
    further("Apart from the others", workings.apart);
    further("From its own usual level", workings.from_usual);
    if (!workings.missing.empty())
        lines.add(workings.missing);
    if (!workings.formula.empty())
        lines.add("Formula: " + workings.formula);
    if (!workings.inputs.empty())
        lines.add("Inputs");
    for (const WorkingInput& input : workings.inputs)
        lines.add("- " + input_line(input));
    if (!workings.steps.empty())
        lines.add("Steps");
    for (const WorkingStep& step : workings.steps)
        lines.add("- " + step.words + ": " + with_unit(short_number_text(step.value), step.unit));
    for (const std::string& remark : workings.remarks)
        lines.add(remark);
    if (!workings.source.empty())
        lines.add("Source: " + workings.source);
    if (!workings.validity.empty())
        lines.add("Valid for: " + workings.validity);
    return std::move(lines).text();
}

} // namespace evenstroke
