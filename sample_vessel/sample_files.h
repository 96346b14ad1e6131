// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "sample_vessel/sample_vessel.h"
#include "sample_vessel/scenario.h"

namespace evenstroke::sample {

/// The files of any scenario; `make_sample_vessel` is this for the sample scenario.
std::vector<SampleFile> make_files(const Scenario& scenario, std::uint64_t seed);

} // namespace evenstroke::sample
