// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/trend/drift.h"
#include "core/trend/judgement.h"

/// Brings what the drift method found back to quantities, places and words.
namespace evenstroke {

/// The typing check's doubts, and values outside their hard range that it did not look at.
void add_doubts(Judgement& judgement, const drift::Output& output);
void add_evidence(Judgement& judgement, const drift::Output& output);
void add_flags(Judgement& judgement, const drift::Input& input, const drift::Output& output);

/// Doubts of one reading in the judgement's terms.
/// @param reading the reading that the drift doubts speak of
std::vector<Doubt> translate_doubts(const Engine& engine, const Reading& reading, const std::vector<drift::Doubt>& doubts);

/// The quantity a name of the drift method means: "maximum_pressure", "median exhaust_temperature".
QuantityId drift_quantity(std::string_view name);

} // namespace evenstroke
