// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/trend/judgement.h"

#include <memory>
#include <optional>
#include <span>
#include <string>
#include <vector>

/// Engines of one kind against each other, each at its own power against its own baseline: the drift method with an
/// engine in the place of a cylinder. What all sisters share (fuel bought together, a common way of reading) leaves
/// with the common part; what one engine does alone stays.
namespace evenstroke {

/// Same cycle, cylinders, bore, stroke, rated power and speed (half a per cent).
bool are_sisters(const Engine& a, const Engine& b);

/// How many engines it takes before one of them can be judged against the others: three others.
inline constexpr std::size_t fewest_sisters_to_judge = 4;

struct SisterCell
{
    std::optional<double> deviation; ///< median of the last three usable, the deviation's unit
    std::optional<double> apart;     ///< the same minus the median of the sisters'
};

/// One quantity over the sisters.
struct SisterRow
{
    QuantityId quantity = 0;
    bool over_cylinders = false; ///< the mean over the cylinders
    bool percent = false;        ///< of the baseline
    double usual = 0.0;          ///< apart within which a sound engine stays, 95 of 100 (common practice: two of the usual scatter)
    std::vector<SisterCell> cells; ///< one an engine
};

struct SisterFlag
{
    std::size_t engine = 0;
    Level level = Level::watch; ///< watch, act or ask, when it started
    bool standing = false;
    TimePoint flagged_at{};     ///< end of the month whose readings first passed the threshold
    double evidence = 0.0;
    std::string sentence;
};

struct SisterComparison
{
    std::vector<SisterRow> rows;   ///< walking order; only quantities that two engines are read for
    std::vector<SisterFlag> flags; ///< in order of their start; empty with fewer than four engines
    double threshold = 0.0;
    bool judged = false;           ///< enough engines
};

/// @param engines sisters, in the order of the cells; null ones count as not read
SisterComparison compare_sisters(std::span<const std::shared_ptr<const Judgement>> engines);

} // namespace evenstroke
