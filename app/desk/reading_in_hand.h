// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "app/desk/selection.h"
#include "core/trend/judgement.h"

#include <QString>

#include <optional>

/// Which reading is looked at, how it is named, and the steps to its neighbours.
namespace evenstroke {

/// Index of the reading that is chosen, else of the newest; nothing where there is none.
std::optional<std::size_t> reading_in_hand(const Judgement& judgement, const Selection& selection);
Selection with_reading(const Selection& selection, const Judgement& judgement, std::size_t reading);
/// The same selection with the reading some steps later (earlier where negative); stops at the ends.
Selection with_reading_step(const Selection& selection, const Judgement& judgement, int steps);

/// "14 Mar 2031"; with the ship's clock where another reading is of the same day.
QString reading_title(const Judgement& judgement, std::size_t reading);
/// "14 Mar 2031 · 76 % load · steady"
QString reading_words(const Judgement& judgement, std::size_t reading);

} // namespace evenstroke
