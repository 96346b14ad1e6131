// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "storage/healthy_cards.h"

namespace evenstroke::storage {

/// One row: what somebody said of the cards of a reading.
struct HealthySaying
{
    std::string id, reading_id;
    bool healthy = true; ///< false: taken back
    std::string words, who;
    TimePoint at{};
};

/// Everybody's, in the order in which they were said.
Result<std::vector<HealthySaying>> load_healthy_sayings(History& history);
/// What the trail holds of it.
std::string healthy_saying_hash(const HealthySaying& saying);

} // namespace evenstroke::storage
