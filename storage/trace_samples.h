// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "storage/trace_layout.h"

/// What the samples of an instrument's file look like before anybody has said what they are.
namespace evenstroke::storage {

/// Whole numbers, as samples are counted.
bool steps_by_one(const std::vector<double>& numbers);
/// The numbers of a column, from 0, over the whole text.
std::vector<double> column_of_text(std::string_view text, const TraceLayout& layout, std::size_t column);
/// Of a record of whole cycles, whose last sample may be the first of the next; 0 where that is not known.
double samples_a_cycle(const std::vector<double>& pressure);

} // namespace evenstroke::storage
