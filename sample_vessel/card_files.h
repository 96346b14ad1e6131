// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "sample_vessel/sample_vessel.h"
#include "sample_vessel/scenario.h"
#include "sample_vessel/sheet.h"

#include <vector>

namespace evenstroke::sample {

/// The indicator cards that were kept of an engine: one file a cylinder for each reading the scenario names,
/// of what the cylinders truly did, from which the values on the form differ by the scatter of gauges and hands.
/// The trace is late by a little and off zero by a little, as traces are.
std::vector<SampleFile> card_files(const Scenario& scenario, std::uint64_t seed, int engine,
                                   const std::vector<Sheet>& sheets);

} // namespace evenstroke::sample
