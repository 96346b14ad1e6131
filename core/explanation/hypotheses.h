// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/explanation/change_window.h"
#include "core/explanation/explanation.h"

#include <set>
#include <string>

/// From a change to ranked causes: which are shown, which are equals, and in what order. Numbers only; the words
/// are in explanation_words.
namespace evenstroke {

/// Faults that can be meant at this subject of this engine.
/// @param ever_read names of quantities that the engine's readings hold
std::vector<const Fault*> possible_faults(const Engine& engine, const Place& subject,
                                          const std::set<std::string>& ever_read);

/// At most three causes that account for half of the pattern at least; more only where an equal would not wait.
std::vector<Hypothesis> rank_causes(std::span<const Fault* const> faults, const ChangeWindow& window);

/// What each quantity says about one cause.
std::vector<QuantityEvidence> weigh_evidence(const Fault& fault, double full_size, const ChangeWindow& window);

} // namespace evenstroke
