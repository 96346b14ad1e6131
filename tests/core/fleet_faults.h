// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/trend/judgement.h"

#include <cstdint>
#include <memory>
#include <optional>
#include <string>
#include <vector>

/// Invented engines with one fault of the fault list, written down as readings, so that the whole way from the
/// typed value to the named cause is tried.
///
/// Sizes are the ranges that engineers give in words, each part of a pattern drawn by itself, and not the rounded
/// levels of the signatures; what a fault should leave alone moves a little all the same. Figures of power, air and
/// fuel meter are mistaken where they are typed, so that everything that follows from them follows. Engines differ
/// in noise, in lasting offsets of cylinders, in what is fitted, and values are missing. All of it is invented.
namespace evenstroke::simulation {

/// Faults with a size that the simulator can make, in the order of the catalogue.
const std::vector<std::string>& simulated_faults();

struct FaultRecipe
{
    std::string fault;             ///< catalogue name; empty: a sound engine
    std::optional<bool> cards;     ///< whether diagrams are taken; nothing: half of the engines
    std::optional<bool> gauges;    ///< whether filter drop, back pressure and the like are read; nothing: most of them
    double size = 1.0;             ///< times the usual size
    std::size_t fewest_after = 2;  ///< readings with the fault in them, at least; 11 more at most
    bool unrecorded_work = false;  ///< one cylinder takes new levels without an event, a year before the end
};

struct FaultTrial
{
    std::shared_ptr<const EngineRecord> record;
    std::string fault;
    Place subject;          ///< of the fault
    std::size_t onset = 0;  ///< first reading with the fault
    bool ramp = false;
    bool cards = false;
};
FaultTrial simulate_fault(const FaultRecipe& recipe, std::uint64_t seed);

/// What the explanation made of a trial.
struct FaultOutcome
{
    std::string fault;
    bool claimed = false;  ///< the right subject is said to be out of the usual
    int rank = 0;          ///< of the true cause there; 0: not named
    std::string first;     ///< cause named first there, "" where none is
    bool equals_said = false; ///< "cannot tell apart"
    bool true_among_equals = false;
    std::size_t other_subjects = 0; ///< said to be out of the usual without a fault
    std::size_t slips = 0; ///< subjects without a fault of which only a value looks miswritten
    double explained = 0.0;
};
FaultOutcome judge_trial(const FaultTrial& trial);

/// Whether what the readings of this engine hold can tell the fault from every other of the list: a worn liner is
/// weak rings and a leaking inlet valve is leaking rings, a zero of a peak gauge is its gain, and back pressure without
/// its gauge is a tired turbine, and a fuel meter that is not read shows nothing at all.
bool can_be_told_apart(const FaultTrial& trial);

/// Rank of the true cause by the share explained times the root of the coverage, at the same change; 0: below a half.
int rank_plainly(const FaultTrial& trial);

} // namespace evenstroke::simulation
