// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/engine/engine.h"
#include "core/reading/reading.h"

#include <set>
#include <span>
#include <string>
#include <vector>

/// The log sheet of one engine in walking order: what the grid on the screen and the blank sheet on paper
/// show. Sections come from resources/catalogue/log_sheet.csv, rows and their order from the quantity
/// catalogue.
namespace evenstroke {

/// One box to write in.
struct LogBox
{
    QuantityId quantity = 0;
    Place place;
    Phase phase = Phase::reading;
    friend auto operator<=>(const LogBox&, const LogBox&) = default;
};

struct LogRow
{
    QuantityId quantity = 0;
    Need need = Need::optional; ///< for this kind of engine
    bool shared = false;        ///< entered once for the whole ship
    std::vector<LogBox> boxes;  ///< in columns, at least one
};

struct LogSection
{
    std::string name;                 ///< "engine_stand"
    std::string title;                ///< "Engine, cylinder by cylinder"
    std::vector<std::string> columns; ///< heads of the columns; empty strings where there is one box a row
    std::vector<LogRow> rows;
};

/// How many turbochargers and coolers have boxes of their own; 0: one box that stands for all.
struct EngineLayout
{
    int turbochargers = 0, coolers = 0;
    friend bool operator==(const EngineLayout&, const EngineLayout&) = default;
};

/// The layout that earlier readings were written in.
EngineLayout find_layout(std::span<const Reading> readings);

/// Quantities that were ever read, or given a reason for not being read.
std::set<QuantityId> quantities_used(std::span<const Reading> readings);

/// Every section and row that applies to this engine, the quick lines first.
std::vector<LogSection> make_log_sheet(const Engine& engine, EngineLayout layout);

/// The value in a box; null where it is empty.
const Value* find_value(const Reading& reading, const LogBox& box);

/// What a reading still lacks, in walking order. A box with a reason for being empty is answered.
struct Completeness
{
    int required = 0, answered = 0;
    std::vector<LogBox> missing; ///< required boxes left empty
    /// Share of required boxes that are answered, 0 to 100; 100 where nothing is required.
    double percent() const { return required > 0 ? 100.0 * answered / required : 100.0; }
};
Completeness find_completeness(std::span<const LogSection> sheet, const Reading& reading);

/// "Exhaust temperature of cylinders 3 and 4", one a row: the missing boxes as sentences list them.
std::vector<std::string> missing_words(const Engine& engine, const std::vector<LogBox>& missing);

/// A reading can be closed with its time, its engine and one figure of load. @return what stands in the way
std::optional<Problem> find_problem_with_closing(const Reading& reading);

} // namespace evenstroke
