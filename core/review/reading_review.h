// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/review/power_agreement.h"
#include "core/trend/judgement.h"

#include <optional>
#include <string>
#include <vector>

/// One reading from top to bottom in the order in which an engineer judges it: what spoils everything first.
namespace evenstroke {

enum class ReviewTopic { entry, steadiness, power, ship, air_side, means, cylinders, fuel };

/// One line of the page: a number with what became of it, or a sentence alone.
struct ReviewLine
{
    std::string words;                  ///< "Maximum pressure", without its place
    std::optional<QuantityId> quantity; ///< none: a line of words, or an estimate of power
    Place place;
    std::string unit;
    int decimals = 1;
    std::optional<double> value, half_width;
    std::optional<double> corrected, expected, deviation, deviation_half_width, apart;
    /// What `verdict` and `level` go by: `apart` (cylinders) or `deviation` (engine) less its own usual level of the
    /// stretch; none where that is not known. A cylinder that always ran hot is low while its deviation is still above 0.
    std::optional<double> from_usual;
    Level level = Level::no_data; ///< of the trend that this number belongs to, as of this reading
    std::string verdict;          ///< few words: "usual", "high", "not known: no barometer"; empty: nothing to say
    bool has_workings = false;    ///< find_workings or the estimate has a sheet for it
    std::optional<std::size_t> estimate; ///< index in PowerAgreement::estimates
    bool spread = false;          ///< a line that stands for all cylinders: value is the mean, `low` to `high` the spread
    std::optional<double> low, high; ///< of a criterion of steadiness: the numbers before and after the walk
};

struct ReviewSection
{
    ReviewTopic topic = ReviewTopic::entry;
    std::string title;    ///< "Air side"
    std::string sentence; ///< what this step says; empty: nothing stands out
    Level level = Level::quiet;
    std::vector<ReviewLine> lines;
};

struct ReadingReview
{
    std::size_t reading = 0;
    std::vector<ReviewSection> sections; ///< in the order of judging; sections without anything are left out
    PowerAgreement power;
    std::vector<std::string> cautions; ///< catalogue names, most urgent first
};

/// @param reading index in the judgement's readings @pre reading < judgement.readings.size()
ReadingReview review_reading(const Judgement& judgement, std::size_t reading);

} // namespace evenstroke
