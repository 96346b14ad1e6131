// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/trend/judgement.h"
#include "sample_vessel/scenario.h"

#include <memory>

/// One engine of a scenario as the core knows it, made without files: what taking in would give.
std::shared_ptr<const evenstroke::EngineRecord> sample_record(const evenstroke::sample::Scenario& scenario,
                                                              std::uint64_t seed, int engine);
