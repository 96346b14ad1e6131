// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/uncertainty.h"

#include <algorithm>
#include <cmath>
#include <map>

namespace evenstroke {
namespace {

constexpr double share_of_half_width = 1e-3;
constexpr double share_of_number = 1e-6;

double step_at(const UncertainInput& input)
{
    const double step = input.half_width ? share_of_half_width * *input.half_width : 0.0;
    return step > 0.0 ? step : share_of_number * std::max(std::abs(input.value), 1.0);
}

} // namespace

std::optional<Propagated> propagate(std::span<const UncertainInput> inputs, const Formula& formula)
{
    std::vector<double> numbers;
    for (const UncertainInput& input : inputs)
        numbers.push_back(input.value);
    const std::optional<double> value = formula(numbers);
    if (!value)
        return std::nullopt;
    Propagated result{*value, std::nullopt, std::vector<double>(inputs.size(), 0.0)};
    std::map<int, double> of_instruments;
    double squares = 0.0;
    bool known = true;
    for (std::size_t i = 0; i < inputs.size(); ++i) {
        const double step = step_at(inputs[i]);
        numbers[i] = inputs[i].value + step;
        const std::optional<double> above = formula(numbers);
        numbers[i] = inputs[i].value - step;
        const std::optional<double> below = formula(numbers);
        numbers[i] = inputs[i].value;
        if (!above || !below || (!inputs[i].half_width && *above != *below)) {
            known = false;
            continue;
        }
        const double part = (*above - *below) / (2.0 * step) * inputs[i].half_width.value_or(0.0);
        result.parts[i] = part;
        if (inputs[i].instrument == UncertainInput::own)
            squares += part * part;
        else
            of_instruments[inputs[i].instrument] += part;
    }
    for (const auto& [instrument, part] : of_instruments)
        squares += part * part;
    if (known)
        result.half_width = std::sqrt(squares);
    return result;
}

std::vector<std::optional<double>> budget_shares(const Propagated& solved, std::span<const int> instruments)
{
    std::vector<std::optional<double>> shares(instruments.size());
    if (!solved.half_width || !(*solved.half_width > 0.0))
        return shares;
    const std::size_t count = std::min(instruments.size(), solved.parts.size());
    std::map<int, double> of_instruments;
    for (std::size_t i = 0; i < count; ++i)
        of_instruments[instruments[i]] += solved.parts[i];
    for (std::size_t i = 0; i < count; ++i) {
        const double together = instruments[i] == UncertainInput::own ? solved.parts[i] : of_instruments[instruments[i]];
        shares[i] = solved.parts[i] * together / (*solved.half_width * *solved.half_width);
    }
    return shares;
}

} // namespace evenstroke
