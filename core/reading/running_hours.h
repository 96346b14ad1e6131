// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/reading/reading.h"

#include <optional>
#include <span>

namespace evenstroke {

/// The engine's hour counter at a time, by a straight line between the readings before and after it.
/// @return hours; nothing before the first or after the last counter value, or where the counter went back
std::optional<double> running_hours_at(std::span<const Reading> readings, TimePoint time);

} // namespace evenstroke
