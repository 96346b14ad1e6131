// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/explanation/change_window.h"
#include "core/explanation/explanation.h"

/// The sentences of an explanation: "fits", "partly fits", "speaks against", "not read", and nothing stronger.
namespace evenstroke {

/// "exhaust temperature", "revolutions at this power"
std::string fault_quantity_words(std::size_t quantity);
/// "18 °C up"
std::string change_words(std::size_t quantity, double amount);

/// Fills the words of one cause whose numbers are set.
/// @param window nothing for slips of the pen, which have no course
void word_hypothesis(Hypothesis& hypothesis, const ChangeWindow* window, bool two_stroke);
/// Fills answer, history and what cannot be told apart.
void word_subject(SubjectExplanation& subject, const EngineRecord& record, const ChangeWindow* window);
/// The sentence over everything.
std::string whole_sentence(const Explanation& explanation);

} // namespace evenstroke
