// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/engine/engine.h"
#include "core/trend/judgement.h"

#include <string>
#include <vector>

/// An invented engine and readings of it for tests: round numbers, no engine that exists.
namespace evenstroke {

Engine example_engine();

/// A value as if typed, in the quantity's own unit unless another is named.
Value typed_value(std::string_view quantity, Place place, const std::string& text, std::string_view unit = {});

/// `count` monthly readings at 75 % load and reference conditions, every value on the baseline and each
/// cylinder with a small, fixed scatter of its own from reading to reading, so that noise is not zero.
EngineRecord example_record(std::size_t count);

/// Adds `amount` to the typed number of a quantity at a place of one reading.
void move_value(Reading& reading, std::string_view quantity, Place place, double amount);

/// Compression and maximum pressure of cylinder 3 fall from the 27th reading on, the former by 0.7 bar a month; after the 38th
/// comes an overhaul of it, with so many readings since in which `left` bar of the fall remain.
EngineRecord overhauled_record(std::size_t readings_since, double left);

} // namespace evenstroke
