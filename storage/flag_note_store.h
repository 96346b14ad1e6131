// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/trend/judgement.h"
#include "storage/history.h"

#include <string>
#include <vector>

namespace evenstroke::storage {

/// What was said of flags and questions. Rows are only added; the trail holds each.
class FlagNoteStore
{
public:
    explicit FlagNoteStore(History& history) : history_(history) {}

    /// In the order in which they were written.
    Result<std::vector<FlagNote>> load(const std::string& engine_id) const;
    /// Adds a note; its id and the time of writing are set here. Answers the id.
    /// @par Problems invalid_input: nobody signed it, a note without words, a cylinder the engine lacks, an event that
    ///      is not this engine's; not_found: the engine
    Result<std::string> add(const std::string& engine_id, const FlagNote& note);

private:
    History& history_;
};

} // namespace evenstroke::storage
