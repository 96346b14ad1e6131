// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "sample_vessel/scenario.h"
#include "sample_vessel/sheet.h"

#include <string>
#include <vector>

/// The public file formats, written by hand: RFC 4180 comma-separated text and JSON, UTF-8, decimal point.
namespace evenstroke::sample {

std::string readings_csv(const std::vector<Sheet>& sheets);
/// Shared by all engines: the same columns without cylinder, phase and gaps.
std::string ship_readings_csv(const std::vector<Sheet>& sheets);
/// Work and fuel changes of one engine in order of date.
std::string events_csv(const Scenario& scenario, int engine);
std::string engine_json(const Scenario& scenario, const EngineDesign& engine);

} // namespace evenstroke::sample
