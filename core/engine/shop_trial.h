// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/engine/engine.h"

#include <string>
#include <string_view>
#include <vector>

/// A shop-test sheet as it comes from a spreadsheet, made into points of the baseline.
namespace evenstroke {

/// One quantity of the table and what was made of it.
struct TrialQuantity
{
    std::string header;     ///< as it stood in the table
    std::string quantity;   ///< name in the catalogue; empty where it was not understood
    std::string words;      ///< "Exhaust temperature, °C: 4 values, converted from °F", or why it is left out
    std::size_t values = 0; ///< taken
};

struct ShopTrial
{
    std::vector<BaselinePoint> points;     ///< in order of load, own units of the quantities
    std::vector<TrialQuantity> understood, left_out;
    std::vector<std::string> refused;      ///< single cells: "row 4, column 3: …"
};

/// Reads a table of loads and quantities, in any order, loads as rows or as columns.
///
/// Cells are parted by tabs, else by semicolons, else by commas. The first row or the first column names the
/// quantities: by the catalogue's names and titles or by usual words (resources/catalogue/quantity_words.csv);
/// a unit stands behind the name, in brackets or after a comma, or in a row or column of its own; without one the
/// quantity's own unit is meant. Decimal comma and point are both taken. A cylinder's number behind the name
/// is dropped and the mean over the cylinders is taken. Loads come as per cent or as power, which is divided by
/// the rated power. An absolute pressure becomes a gauge one with the reference barometer.
/// @par Problems invalid_input: no table, no load, no quantity that is known
Result<ShopTrial> read_shop_trial(std::string_view text, const Engine& engine);

/// The engine's baseline with the curves of a trial in it. Each quantity of the trial is replaced whole within the
/// trial's mode, so that no curve mixes points of two tests; other quantities and other modes stay. Same loads are
/// joined, new ones added, points left without a value taken away.
std::vector<BaselinePoint> merged_baseline(std::vector<BaselinePoint> baseline, const std::vector<BaselinePoint>& points);

} // namespace evenstroke
