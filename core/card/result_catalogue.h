// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/card/evaluation.h"

namespace evenstroke::indicator {

/// What is left of a result's spread where all unknowns were known: model and reading, one standard deviation, found by
/// simulation (tests/core/card_statistics_test.cpp).
struct ResultSpread
{
    double two_stroke = 0.0, four_stroke = 0.0;
    bool relative = false; ///< of the value
};
const ResultSpread& result_spread(CardResult result);

/// The text of a remark with {0}, {1}… replaced. @throws std::logic_error where the catalogue has no such code
Remark make_remark(std::string_view code, const std::vector<std::string>& words, std::optional<double> angle = {});

} // namespace evenstroke::indicator
