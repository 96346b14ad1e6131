// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/trend/conditions.h"
#include "core/uncertainty.h"
#include "core/workings/workings.h"

#include <optional>
#include <string>
#include <string_view>
#include <vector>

namespace evenstroke {

/// The numbers that one way to the power needs: for the propagation, and in words for its sheet of workings.
class PowerInputs
{
public:
    PowerInputs(const Engine& engine, const Reading& reading, const Conditions& conditions)
        : engine_(engine), reading_(reading), conditions_(conditions)
    {
    }

    /// The value typed at one place, in its quantity's own unit; nothing where it was not read.
    std::optional<std::size_t> at(std::string_view name, const std::string& symbol, Place place,
                                  int instrument = UncertainInput::own);
    /// The engine's own value or the mean over its places.
    std::optional<std::size_t> mean(std::string_view name, const std::string& symbol);
    /// A number that was not read: of the engine, or common practice, as `origin` says.
    std::size_t given(WorkingInput input);

    /// Half-width, parts and shares are written into the inputs.
    std::optional<Propagated> solve(const Formula& formula);
    const std::vector<WorkingInput>& words() const { return words_; }
    double value(std::size_t index) const { return inputs_[index].value; }

private:
    std::size_t add(WorkingInput input, int instrument);
    WorkingInput described(std::string_view name, const std::string& symbol, Place place, double own) const;

    const Engine& engine_;
    const Reading& reading_;
    const Conditions& conditions_;
    std::vector<UncertainInput> inputs_;
    std::vector<WorkingInput> words_;
};

} // namespace evenstroke
