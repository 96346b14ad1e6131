// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/reading/reading.h"

#include <optional>
#include <span>
#include <string>

namespace evenstroke {

/// What a number is compared with, in the quantity's own unit, and how sentences name it: "The quick lines say".
struct NumberReference
{
    double value = 0.0;
    std::string words;
};

/// The number one slip of the hand away from the typed one that lies near what it is compared with.
struct MeantNumber
{
    std::string suggestion; ///< in the unit in which the value was typed: "85.4"
    std::string sentence;
};

/// Looks for a point in the wrong place, or two digits exchanged, where the quick lines or the power of the same
/// reading, or earlier readings, say what the number is about: 8.54 where the quick lines say 85.
///
/// Nothing is said where the typed number itself is within a factor of 1.5 of a reference: that is no slip of a
/// point. The first reference that a slip explains decides.
/// @param own the value as typed, in the quantity's own unit
std::optional<MeantNumber> guess_meant_number(const Value& value, double own, std::span<const NumberReference> references);

} // namespace evenstroke
