// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/trend/conditions.h"
#include "core/uncertainty.h"

#include <optional>
#include <string_view>
#include <vector>

namespace evenstroke {

/// Where an input stands among those of a formula; nothing where it was not read.
using InputIndex = std::optional<std::size_t>;

/// The typed values that one formula needs, with the half-widths of their instruments.
class DerivedInputs
{
public:
    DerivedInputs(const Engine& engine, const Reading& reading, const Conditions& conditions)
        : engine_(engine), reading_(reading), conditions_(conditions)
    {
    }

    /// The value at this place, in its quantity's own unit and kind; for a turbocharger or cooler that has none
    /// of its own, the engine's, which then stands for all.
    InputIndex at(std::string_view name, Place place, int instrument = UncertainInput::own);
    /// The engine's own value or the mean over its places. Asked again, it is the same input.
    InputIndex mean(std::string_view name);
    InputIndex at_or_mean(std::string_view name, Place place);
    /// In bar absolute; always there.
    std::size_t barometer();

    std::optional<Propagated> solve(const Formula& formula) const { return propagate(inputs_, formula); }
    double value(std::size_t index) const { return inputs_[index].value; }

private:
    std::size_t add(std::string_view name, double own, int instrument);

    const Engine& engine_;
    const Reading& reading_;
    const Conditions& conditions_;
    std::vector<UncertainInput> inputs_;
    std::vector<std::pair<std::string_view, std::size_t>> means_;
};

} // namespace evenstroke
