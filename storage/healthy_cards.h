// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "storage/history.h"

#include <string>
#include <vector>

namespace evenstroke::storage {

/// A reading whose cards somebody calls healthy.
struct HealthyCards
{
    std::string reading_id;
    std::string who, words; ///< as said last
    TimePoint at{};
};

/// Which readings' cards are the healthy ones that later cards are compared with. What was said is only added
/// to; the last word counts, and the trail holds each.
class HealthyCardStore
{
public:
    explicit HealthyCardStore(History& history) : history_(history) {}

    /// The closed readings whose cards are called healthy now, in order of time.
    Result<std::vector<HealthyCards>> list(const std::string& engine_id) const;
    /// Calls a closed reading's cards healthy, or takes that back. Without `words` the reason of the
    /// signature stands.
    /// @par Problems invalid_input: nobody signed, it is taken back without words, the reading is not closed
    /// or has no
    ///      card, it is said already; not_found
    Done say(const std::string& reading_id, bool healthy, const std::string& words, const Signature& by);

private:
    History& history_;
};

} // namespace evenstroke::storage
