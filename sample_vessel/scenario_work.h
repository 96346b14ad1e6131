// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "sample_vessel/scenario.h"

namespace evenstroke::sample {

/// All work on the three engines in four years; nothing was left out of the books. The two cylinders that
/// fall ill were last touched more than twelve readings before, and not afterwards.
std::vector<Work> recorded_work();

} // namespace evenstroke::sample
