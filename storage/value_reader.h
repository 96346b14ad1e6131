// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/engine/engine.h"
#include "storage/names.h"
#include "storage/value_rows.h"

#include <optional>
#include <string>
#include <string_view>

namespace evenstroke::storage {

/// One row of readings.csv as text.
struct ValueTexts
{
    std::string_view quantity, cylinder, value, unit, phase, words, missing_reason, origin;
};

/// What stands in the way of a row.
struct RowProblem
{
    std::string value, reason, expected;
};

/// Turns rows of text into values to be stored. What was found out about a name, a unit or a cylinder is
/// remembered: the same few stand in thousands of rows.
class ValueReader
{
public:
    /// @param engine  null for the ship's readings, which have no cylinders
    ValueReader(History::Names& names, const Engine* engine) : names_(names), engine_(engine) {}

    /// Fills `row` (whose texts are used again). Needs a transaction: a new name gets a number.
    std::optional<RowProblem> read(const ValueTexts& texts, ValueRow& row);

private:
    struct KnownQuantity
    {
        int key = 0;
        std::array<QuantityId, place_kinds> id{};
    };
    struct KnownPlace
    {
        Place place;
        bool unusual = false; ///< written in another way than hand_out writes it
    };
    struct KnownUnit
    {
        std::optional<WrittenUnit> unit;
        int key = 0;
    };

    const KnownQuantity* find_quantity_entry(std::string_view name, std::optional<RowProblem>& problem);
    const KnownPlace* find_place(std::string_view text);
    const KnownUnit* find_unit_entry(std::string_view text, std::optional<RowProblem>& problem);
    std::optional<RowProblem> read_place(const ValueTexts& texts, const KnownQuantity& known, ValueRow& row,
                                         QuantityId& id);
    std::optional<RowProblem> read_number(const ValueTexts& texts, const Quantity& q, ValueRow& row);
    std::optional<RowProblem> read_words(const ValueTexts& texts, const Quantity& q, ValueRow& row);
    std::optional<RowProblem> read_missing(const ValueTexts& texts, ValueRow& row);
    std::optional<RowProblem> wrong_place(const ValueTexts& texts) const;

    History::Names& names_;
    const Engine* engine_;
    TextMap<KnownQuantity> quantities_;
    TextMap<KnownPlace> places_;
    TextMap<KnownUnit> units_;
};

/// A place as files write it: the cylinder's name, "tc1", "cooler2", or nothing.
std::string file_place(const Place& place, const Engine* engine);
/// Reads such a text; case and blanks do not matter. None for a place that no engine has.
std::optional<Place> read_file_place(std::string_view text, const Engine* engine);
/// What may stand in the column cylinder: "1 to 7 or A1 to A7".
std::string cylinders_expected(const Engine& engine);

} // namespace evenstroke::storage
