// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/reading/reading.h"

#include <string>

namespace evenstroke::storage {

/// The unit of a value as files write it: as it was typed, or the catalogue's symbol with "abs" or "gauge"
/// where the kind is not the quantity's usual one.
std::string written_unit(const Value& value);
std::string written_unit(WrittenUnit written, PressureKind usual);

} // namespace evenstroke::storage
