// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/trend/typing_check.h"

#include <utility>

namespace evenstroke::drift {

/// Two cylinders whose values stand in each other's boxes: each fits the other's lasting offsets better
/// than its own. Log-likelihood ratio over all quantities that both have, each quantity's part limited so
/// that one wild value decides nothing.
/// @return the likeliest pair, or nothing where none is likely enough
struct ExchangedPair
{
    std::size_t first = 0, second = 0;
    double likelihood = 0.0; ///< log of the ratio
};
std::optional<ExchangedPair> find_exchanged_cylinders(const ReadingOpinion& opinion);

} // namespace evenstroke::drift
