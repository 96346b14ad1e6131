// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/explanation/change_window.h"

#include <string>
#include <vector>

/// Whether a change is there at some readings and gone at others, as with a sticking needle or a loose contact; and
/// what those readings have in common.
namespace evenstroke {

struct ComesAndGoes
{
    std::size_t quantity = 0; ///< index in fault_quantities(): the one that moved most surely
    std::vector<std::size_t> off, usual; ///< readings since the onset, in order of time
};

/// At least two readings clearly off and two clearly as usual, one of these after one of those and off again later,
/// and few in between: a steady change with scatter is none.
/// @return nothing where it does not come and go, or where there are too few readings to say
std::optional<ComesAndGoes> comes_and_goes(const SubjectSeries& series, const ChangeWindow& window);

/// The same in a sentence, with load or kind of fuel where they part the readings and chance hardly would.
/// @return empty where it does not come and go
std::string comes_and_goes_sentence(const SubjectSeries& series, const ChangeWindow& window, const Judgement& judgement);

} // namespace evenstroke
