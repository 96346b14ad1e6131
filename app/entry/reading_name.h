// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "storage/reading_store.h"

#include <string>
#include <vector>

namespace evenstroke {

/// The name a reading gets by itself: its month on the ship's clock, "2031-03"; where that is taken its day,
/// then its day with a number.
/// @param own the reading that may keep its name; empty for a new one
std::string free_name(const Result<std::vector<storage::ReadingEntry>>& taken, StampedTime time,
                      const std::string& own);

/// The ship's offset from UTC at the newest of these, which come newest first; 0 where there is none.
int last_offset(const std::vector<storage::ReadingEntry>& readings);

} // namespace evenstroke
