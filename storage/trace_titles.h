// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <initializer_list>
#include <optional>
#include <string>
#include <string_view>

/// What the title of a column in an instrument's file says of it.
namespace evenstroke::storage {

std::string lower(std::string_view text);
/// A part of the title, whatever stands around it.
bool names_any(const std::string& title, std::initializer_list<const char*> parts);
/// A word of its own: "ms" in "time_ms".
bool has_word(const std::string& title, std::initializer_list<const char*> wanted);

bool names_angle(const std::string& title);
bool names_signal(const std::string& title); ///< volts or counts, not yet a pressure
/// Seconds of one count, where a title speaks of time; without a unit it is seconds.
std::optional<double> time_unit_of(const std::string& title);

} // namespace evenstroke::storage
