// SPDX-License-Identifier: GPL-3.0-or-later
// Relations between the values of one cylinder, and between the cylinders of one row.
#include "core/reading/relations_detail.h"

#include <algorithm>
#include <cmath>
#include <map>

namespace evenstroke::relations_detail {
namespace {

/// Closer than this the peak is no higher than the compression. Common practice, no source.
constexpr double firing_margin_bar = 2.0;
/// Common practice: a sound cylinder keeps its ratio of absolute compression to scavenge pressure within
/// this.
constexpr double ratio_room = 0.05;
/// Fewer earlier ratios than this are no habit; more than the last twelve are another engine. Invented.
constexpr std::size_t ratios_needed = 5, ratios_kept = 12;

std::string pair_words(const char* what, double first, const char* than, double second)
{
    return std::string(what) + " " + plain_number(first, 1) + " bar" + than + plain_number(second, 1) +
           " bar";
}

/// "maximum pressure is below compression pressure (98.0 and 110.0 bar)"; several cylinders give no values.
std::string peak_sentence(const Engine& engine, const std::vector<int>& cylinders, double peak,
                          double compression, const char* short_words, const char* advice)
{
    std::string sentence = cylinders_words(engine, cylinders) + ": ";
    if (cylinders.size() == 1)
        sentence += pair_words("maximum pressure", peak, short_words, compression);
    else
        sentence += std::string("maximum pressure") + short_words + "the compression pressure";
    return sentence + ". " + advice;
}

void check_peaks(const Engine& engine, const Numbers& numbers, std::vector<Relation>& found)
{
    const QuantityId peak_id = id_of("maximum_pressure", Place::Kind::cylinder);
    const QuantityId compression_id = id_of("compression_pressure", Place::Kind::cylinder);
    std::vector<int> below, equal;
    double below_peak = 0.0, below_compression = 0.0, equal_peak = 0.0, equal_compression = 0.0;
    for (const auto& [place, peak] : numbers.all(peak_id)) {
        const auto compression = numbers.at(compression_id, place);
        if (!compression || peak > *compression + firing_margin_bar)
            continue;
        const bool lower = peak < *compression - firing_margin_bar;
        (lower ? below : equal).push_back(place.number);
        (lower ? below_peak : equal_peak) = peak;
        (lower ? below_compression : equal_compression) = *compression;
    }
    const auto report = [&](const char* name, const std::vector<int>& cylinders,
                            const std::string& sentence) {
        Relation relation{name, sentence, {}, false};
        for (const int cylinder : cylinders) {
            relation.concerned.push_back({peak_id, Place::cylinder(cylinder)});
            relation.concerned.push_back({compression_id, Place::cylinder(cylinder)});
        }
        found.push_back(std::move(relation));
    };
    if (!below.empty())
        report("maximum_below_compression", below,
               peak_sentence(
                   engine, below, below_peak, below_compression, " is lower than ",
                   "Without firing the two are equal, never the peak lower: look whether each stands in "
                   "the other's box."));
    if (!equal.empty())
        report("maximum_equals_compression", equal,
               peak_sentence(
                   engine, equal, equal_peak, equal_compression, " is no more than 2 bar from ",
                   "This is how a cylinder looks that does not fire or fires very late: read it again."));
}

bool is_setting(const std::string& name)
{
    return name == "cylinder_running_hours" || name == "injection_timing_setting" ||
           name == "injection_timing_offset" || name == "exhaust_valve_closing_offset" ||
           name == "cylinder_oil_feed_rate";
}

/// Settings stand alike on purpose; measured values of three or more cylinders never do, to the last digit.
void check_identical(const Engine& engine, const Numbers& numbers, std::vector<Relation>& found)
{
    for (const Quantity& quantity : all_quantities()) {
        if (quantity.per != Place::Kind::cylinder || is_setting(quantity.name) || engine.cylinders < 3)
            continue;
        const auto row = numbers.all(quantity.id);
        if (row.size() != static_cast<std::size_t>(engine.cylinders))
            continue;
        const bool alike = std::all_of(row.begin(), row.end(),
                                       [&](const auto& cell) { return cell.second == row.front().second; });
        if (!alike)
            continue;
        Relation relation{
            "cylinders_identical",
            quantity.title + " is " + with_own_unit(quantity.id, row.front().second) +
                " at every cylinder. Measured values differ a little: was one of them written for all?",
            {},
            false};
        for (const auto& [place, value] : row)
            relation.concerned.push_back({quantity.id, place});
        found.push_back(std::move(relation));
    }
}

std::optional<double> ratio_at(const Numbers& numbers, Place cylinder)
{
    const auto compression =
        numbers.absolute_at(id_of("compression_pressure", Place::Kind::cylinder), cylinder);
    const auto scavenge =
        numbers.absolute_at(id_of("scavenge_pressure", Place::Kind::engine), Place::engine());
    return compression && scavenge && *scavenge > 0.0 ? std::optional(*compression / *scavenge)
                                                      : std::nullopt;
}

double median(std::vector<double> values)
{
    const auto middle = values.begin() + static_cast<std::ptrdiff_t>(values.size() / 2);
    std::nth_element(values.begin(), middle, values.end());
    if (values.size() % 2 == 1)
        return *middle;
    return 0.5 * (*middle + *std::max_element(values.begin(), middle));
}

/// The cylinder's own ratio over its last readings; none before there are enough of them.
std::optional<double> usual_ratio(std::span<const Reading> earlier, Place cylinder)
{
    std::vector<double> ratios;
    for (auto reading = earlier.rbegin(); reading != earlier.rend() && ratios.size() < ratios_kept; ++reading)
        if (const auto ratio = ratio_at(Numbers(*reading), cylinder))
            ratios.push_back(*ratio);
    return ratios.size() >= ratios_needed ? std::optional(median(std::move(ratios))) : std::nullopt;
}

} // namespace

void check_cylinders(const Engine& engine, const Numbers& numbers, std::vector<Relation>& found)
{
    check_peaks(engine, numbers, found);
    check_identical(engine, numbers, found);
}

/// A sound cylinder compresses the scavenge air by the same ratio at any load, within a few per cent.
void check_compression_ratio(const Engine& engine, const Numbers& numbers, const ReadingContext& context,
                             std::vector<Relation>& found)
{
    const QuantityId compression_id = id_of("compression_pressure", Place::Kind::cylinder);
    std::vector<int> off;
    double ratio_off = 0.0, usual_off = 0.0;
    bool any_low = false, any_high = false;
    int compared = 0;
    for (int cylinder = 1; cylinder <= engine.cylinders; ++cylinder) {
        const auto ratio = ratio_at(numbers, Place::cylinder(cylinder));
        const auto usual = ratio ? usual_ratio(context.earlier, Place::cylinder(cylinder)) : std::nullopt;
        if (!usual)
            continue;
        ++compared;
        if (std::abs(*ratio / *usual - 1.0) <= ratio_room)
            continue;
        off.push_back(cylinder);
        ratio_off = *ratio;
        usual_off = *usual;
        (*ratio < *usual ? any_low : any_high) = true;
    }
    if (off.empty())
        return;
    const ConcernedValue scavenge{id_of("scavenge_pressure", Place::Kind::engine), Place::engine()};
    const std::string change =
        "from its usual " + plain_number(usual_off, 1) + " to " + plain_number(ratio_off, 1);
    if (2 * static_cast<int>(off.size()) > compared && compared > 1) {
        found.push_back(
            {"compression_ratio_of_all",
             "Compression over scavenge pressure went " + change +
                 " at most cylinders. Look at scavenge pressure and barometer first: gauge or absolute, and "
                 "which unit?",
             {scavenge},
             false});
        return;
    }
    Relation relation{
        "compression_ratio",
        cylinders_words(engine, off) +
            ": compression over scavenge pressure is more than 5 % off its "
            "usual ratio" +
            (off.size() == 1 ? ", " + change : std::string()) +
            ". Read the compression pressure again" +
            (any_low ? std::string("; if it stays ") + (any_high ? "where it is " : "") + "low, rings or exhaust valve come to mind." : std::string()) +
            (any_high ? std::string(any_low ? " A" : ". A") +
                            " higher one is no leak: a figure misread, an indicator gone wrong, or work that made the compression space smaller."
                      : std::string()),
        {},
        false};
    for (const int cylinder : off)
        relation.concerned.push_back({compression_id, Place::cylinder(cylinder)});
    found.push_back(std::move(relation));
}

} // namespace evenstroke::relations_detail
