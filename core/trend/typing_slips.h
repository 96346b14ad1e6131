// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/trend/drift.h"

#include <functional>
#include <optional>
#include <string>
#include <string_view>
#include <vector>

/// The ways in which a hand slips on a keypad, undone one at a time.
namespace evenstroke::drift {

struct SlipTrial
{
    Verdict verdict = Verdict::implausible; ///< decimal_slip or digits_swapped
    std::string text;                       ///< what may have been meant
    double number = 0.0;                    ///< the same in the typed unit
};

/// Every number that one slip would have turned into `text`: the point one or two places off, or two
/// neighbouring digits exchanged ("08.4" for a lost leading nought included). Empty for text that is no
/// plain number.
std::vector<SlipTrial> undo_slips(std::string_view text);

/// The trial with the smallest distance, and that distance.
struct BestTrial
{
    SlipTrial trial;
    double distance = 0.0;
};
/// @param distance of a number (in the typed unit) from the usual, in standard deviations, >= 0
std::optional<BestTrial> best_trial(std::string_view text, const std::function<double(double)>& distance);

/// Digits after the point that carry something: "80.40" has 1, "80.0" has 0.
int significant_decimals(std::string_view text);

/// Shortest decimal text of a number, for values that came without the text they were typed as.
std::string plain_text(double number);

} // namespace evenstroke::drift
