// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/reading/quantity_catalogue.h"

#include <optional>
#include <string>
#include <vector>

/// How one number came about, so that whoever doubts it can follow it with a pocket calculator.
namespace evenstroke {

/// One number that went into a formula.
struct WorkingInput
{
    std::string words;                ///< "Scavenge air pressure"
    std::string symbol;               ///< as in the formula, "p_scav"
    Place place;
    double value = 0.0;
    std::string unit;                 ///< "bar gauge", "°C"
    std::optional<double> half_width; ///< at 95 %; empty: nobody states one
    double moved = 0.0;               ///< what this half-width alone moves the result by, with its sign
    std::optional<double> share;      ///< of the squared half-width of the result, 0 to 1
    std::string origin;               ///< "typed 2,51 bar", "mean of 2 turbochargers", "no barometer read: 1 bar taken"
};

/// A number on the way from the inputs to the result.
struct WorkingStep
{
    std::string words; ///< "Compressor pressure ratio"
    double value = 0.0;
    std::string unit;  ///< empty: a bare number
};

/// The sheet of workings of one number. Numbers are not rounded.
struct Workings
{
    std::string title; ///< "Compressor efficiency"
    Place place;
    std::string unit;
    int decimals = 1;                       ///< as the result is shown
    std::optional<double> value, half_width; ///< of a typed value the instrument's alone
    std::optional<double> corrected, expected, deviation, apart, from_usual; ///< where the number has them
    std::optional<double> deviation_half_width; ///< of a typed value: load and ambient conditions come into it
    std::string formula;                    ///< with the symbols of the inputs
    std::string source, validity;           ///< of the formula
    std::vector<WorkingInput> inputs;
    std::vector<WorkingStep> steps;
    std::vector<std::string> remarks;       ///< what was assumed, whole sentences
    std::string missing; ///< whole sentences: why the number is not known and what to read; empty where it is known
};

/// Of a difference between two values of the quantity: "K" for temperatures; empty for a bare number.
std::string difference_unit(const Quantity& quantity);

/// The sheet as plain text, lines of at most 100 characters, for the clipboard and for screen readers.
std::string workings_text(const Workings& workings, const std::string& heading);

} // namespace evenstroke
