// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "storage/history.h"

#include <map>
#include <optional>
#include <string>

namespace evenstroke::storage {

/// The unit in which an engine's instrument shows a quantity.
struct ChosenUnit
{
    UnitId unit = 0;
    PressureKind kind = PressureKind::none;
};

/// Choices that belong to the ship's history, not to one computer. Not judged, not audited.
class PreferenceStore
{
public:
    explicit PreferenceStore(History& history) : history_(history) {}

    /// By quantity; a quantity without an entry shows its own unit.
    Result<std::map<QuantityId, ChosenUnit>> units(const std::string& engine_id) const;
    Done set_unit(const std::string& engine_id, QuantityId quantity, const std::optional<ChosenUnit>& unit);

    /// Other remembered choices, by a name of the caller's; `engine_id` empty: of the whole history.
    Result<std::optional<std::string>> choice(const std::string& engine_id, const std::string& name) const;
    Done set_choice(const std::string& engine_id, const std::string& name,
                    const std::optional<std::string>& value);

private:
    History& history_;
};

} // namespace evenstroke::storage
