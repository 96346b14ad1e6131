// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/review/power_agreement.h"

#include "core/reading/typed_number.h"
#include "core/review/power_ways.h"
#include "core/sentence_words.h"

#include <algorithm>
#include <cmath>
#include <map>

namespace evenstroke {
namespace {

/// Two ways that differ by more than this are both named (common practice).
constexpr double largest_difference_of_two = 0.05;
/// How much wider the half-widths count with 2, 3, ... ways, so that one of all stands apart by chance in 5 of 100
/// readings: Φ⁻¹((1 + 0.95^(1/n)) / 2) / 1.960 (Šidák's inequality). With two the 5 % above decide.
constexpr double wider_by_count[] = {1.0, 1.0, 1.141, 1.218, 1.271, 1.311, 1.342, 1.369, 1.391};
/// The load as typed, compared with the mean of ways that it does not belong to: no less than this is said, since
/// loads are typed in whole per cent (common practice, as the check between load and shaft power).
constexpr double least_difference_of_load = 0.03;

double square(double x) { return x * x; }
double wider(std::size_t count) { return wider_by_count[std::min(count, std::size(wider_by_count) - 1)]; }

struct Mean
{
    double value = 0.0, half_width = 0.0;
};

using Estimates = std::vector<PowerEstimate>;
using Indices = std::vector<std::size_t>;

Mean weighted_mean(const Estimates& estimates, const Indices& of)
{
    double weights = 0.0, sum = 0.0;
    for (const std::size_t i : of) {
        const double weight = 1.0 / square(*estimates[i].half_width);
        weights += weight;
        sum += weight * *estimates[i].power;
    }
    return {sum / weights, 1.0 / std::sqrt(weights)};
}

Indices without(Indices of, std::size_t one)
{
    of.erase(std::remove(of.begin(), of.end(), one), of.end());
    return of;
}

/// The one that lies farthest from the mean of the others, and how far in their combined half-widths.
struct Farthest
{
    std::size_t index = 0;
    double distance = 0.0;
};

Farthest find_farthest(const Estimates& estimates, const Indices& of)
{
    Farthest farthest;
    for (const std::size_t i : of) {
        const Mean others = weighted_mean(estimates, without(of, i));
        const double combined = std::sqrt(square(*estimates[i].half_width) + square(others.half_width));
        const double distance = std::abs(*estimates[i].power - others.value) / combined;
        if (distance > farthest.distance)
            farthest = {i, distance};
    }
    return farthest;
}

std::string kilowatt(double power) { return plain_number(power, 0) + " kW"; }

std::string percent_apart(double power, double of)
{
    const double percent = 100.0 * (power / of - 1.0);
    return plain_number(std::abs(percent), 1) + " % " + (percent > 0.0 ? "above" : "below");
}

/// What to look at where one way does not fit (common practice).
std::string what_to_check(const std::string& name)
{
    static const std::map<std::string, std::string> checks{
        {"torsion_meter", "the torsion meter's zero and the unit of the power"},
        {"shaft_power", "where the shaft power was taken from, and its unit"},
        {"shaft_torque", "the torsion meter's zero and the unit of the torque"},
        {"switchboard", "the wattmeter, and the generator's efficiency as entered"},
        {"indicated", "the indicator's unit and dead centre, and the mechanical efficiency as entered"},
        {"turbocharger_speed", "turbocharger speed and inlet air temperature, and whether the by-pass stood as usual"},
        {"fuel_index", "the fuel index and its scale, and what fuel was burnt"},
        {"fuel_consumption", "the meter, its measuring time and the heating value"},
        {"typed", "how the load was found"}};
    const auto found = checks.find(name);
    return found == checks.end() ? "that value" : found->second;
}

class Agreeing
{
public:
    Agreeing(PowerAgreement& agreement, const std::vector<power_ways::Way>& ways) : agreement_(agreement), ways_(ways)
    {
        for (std::size_t i = 0; i < agreement.estimates.size(); ++i)
            if (agreement.estimates[i].in_mean)
                counted_.push_back(i);
    }

    void judge()
    {
        set_spread();
        if (!counted_.empty()) {
            const Mean mean = weighted_mean(estimates(), counted_);
            agreement_.mean = mean.value;
            agreement_.mean_half_width = mean.half_width;
        }
        if (counted_.size() < 2)
            judge_too_few();
        else if (counted_.size() == 2)
            judge_two();
        else
            judge_many();
        add_load();
    }

private:
    const Estimates& estimates() const { return agreement_.estimates; }
    const PowerEstimate& at(std::size_t index) const { return agreement_.estimates[index]; }

    void set_spread()
    {
        std::optional<double> lowest, highest;
        for (const PowerEstimate& one : estimates()) {
            if (!one.power || one.suspected)
                continue;
            lowest = std::min(lowest.value_or(*one.power), *one.power);
            highest = std::max(highest.value_or(*one.power), *one.power);
        }
        if (lowest && *highest > *lowest && !counted_.empty())
            agreement_.spread_percent = 100.0 * (*highest - *lowest) / weighted_mean(estimates(), counted_).value;
    }

    void judge_too_few()
    {
        if (counted_.empty()) {
            const bool any = std::any_of(estimates().begin(), estimates().end(), [](const auto& one) { return one.power; });
            agreement_.sentence = any ? "No way to the power can be counted on here: see beside each why. Settle those values "
                                        "first."
                                      : "No power is known: note the load, or a power with its source.";
            return;
        }
        agreement_.sentence = "Only one way to the power is known, " + lower_first(at(counted_[0]).words) + " with " +
                              kilowatt(*at(counted_[0]).power) + ": nothing stands beside it.";
    }

    void judge_two()
    {
        const PowerEstimate &first = at(counted_[0]), &second = at(counted_[1]);
        const double difference = std::abs(*first.power - *second.power) / *agreement_.mean;
        if (difference <= largest_difference_of_two) {
            say_agree();
            return;
        }
        agreement_.agrees = false;
        agreement_.sentence = first.words + " (" + kilowatt(*first.power) + ") and " + lower_first(second.words) + " (" +
                              kilowatt(*second.power) + ") differ by " + plain_number(100.0 * difference, 1) +
                              " %, and nothing tells which of the two is off. Look at " + what_to_check(first.name) +
                              "; at " + what_to_check(second.name) + ".";
    }

    void judge_many()
    {
        const Farthest farthest = find_farthest(estimates(), counted_);
        if (farthest.distance <= wider(counted_.size())) {
            say_agree();
            return;
        }
        agreement_.agrees = false;
        const Indices others = without(counted_, farthest.index);
        const bool others_agree = others.size() == 2 ? two_agree(others)
                                                     : find_farthest(estimates(), others).distance <= wider(others.size());
        if (!others_agree) {
            agreement_.sentence = "The " + std::to_string(counted_.size()) + " ways to the power do not agree, and leaving one " +
                                  "out does not mend it: from " + kilowatt(extreme(false)) + " to " + kilowatt(extreme(true)) +
                                  ". Look at the units, and at what was read while the load moved.";
            return;
        }
        agreement_.doubtful = farthest.index;
        const PowerEstimate& odd = at(farthest.index);
        const Mean mean = weighted_mean(estimates(), others);
        agreement_.sentence = odd.words + " stands apart: " + kilowatt(*odd.power) + ", " +
                              percent_apart(*odd.power, mean.value) + " the " + kilowatt(mean.value) + " of the " +
                              std::to_string(others.size()) + " others, which agree. Look at " + what_to_check(odd.name) + ".";
    }

    bool two_agree(const Indices& two) const
    {
        const double combined = std::sqrt(square(*at(two[0]).half_width) + square(*at(two[1]).half_width));
        return std::abs(*at(two[0]).power - *at(two[1]).power) <= wider(2) * combined;
    }

    double extreme(bool highest) const
    {
        const auto less = [&](std::size_t a, std::size_t b) { return *at(a).power < *at(b).power; };
        return *at(highest ? *std::max_element(counted_.begin(), counted_.end(), less)
                           : *std::min_element(counted_.begin(), counted_.end(), less))
                    .power;
    }

    void say_agree()
    {
        agreement_.sentence = std::string(counted_.size() == 2 ? "Both" : "All " + std::to_string(counted_.size())) +
                              " ways to the power agree: " + kilowatt(*agreement_.mean) + " ± " +
                              plain_number(*agreement_.mean_half_width, 0) + " kW.";
    }

    /// The load that everything is compared at: what it has to do with the others.
    void add_load()
    {
        const auto typed = std::find_if(estimates().begin(), estimates().end(),
                                        [](const PowerEstimate& one) { return one.name == "typed"; });
        if (typed == estimates().end() || !typed->power || !agreement_.mean || !typed->half_width)
            return;
        const std::size_t index = static_cast<std::size_t>(typed - estimates().begin());
        constexpr char whose[] = " The program never changes the load: correct it yourself where it was wrong.";
        if (agreement_.doubtful == index) {
            agreement_.sentence += whose;
            return;
        }
        if (!ways_[index].repeats)
            return;
        if (agreement_.doubtful && at(*agreement_.doubtful).words == ways_[index].repeats_of) {
            agreement_.sentence += " The load as typed comes from it." + std::string(whose);
            agreement_.load_doubtful = true;
            return;
        }
        const double apart = std::abs(*typed->power - *agreement_.mean);
        const double combined = std::sqrt(square(*typed->half_width) + square(*agreement_.mean_half_width));
        if (agreement_.agrees && apart > wider(2) * combined && apart > least_difference_of_load * *agreement_.mean) {
            agreement_.agrees = false;
            agreement_.doubtful = index;
            agreement_.load_doubtful = true;
            agreement_.sentence += " But the load as typed is " + kilowatt(*typed->power) + ", " +
                                   percent_apart(*typed->power, *agreement_.mean) + " them." + whose;
        }
    }

    PowerAgreement& agreement_;
    const std::vector<power_ways::Way>& ways_;
    Indices counted_;
};

void hold_out_suspected(power_ways::Way& way, std::span<const SuspectedQuantity> suspected)
{
    for (const SuspectedQuantity& one : suspected) {
        const bool named = std::find(way.rests_on.begin(), way.rests_on.end(), quantity(one.quantity).name) != way.rests_on.end();
        if (!named || (one.place.kind == Place::Kind::cylinder && !way.of_cylinders))
            continue;
        way.estimate.suspected = true;
        way.estimate.remark = "left out of the mean: " + lower_first(quantity(one.quantity).title) + ", " + one.why;
        return;
    }
}

} // namespace

PowerAgreement agree_on_power(const Engine& engine, const Baseline& baseline, const Reading& reading,
                              std::span<const SuspectedQuantity> suspected, const BaselineScatter& scatter)
{
    const Conditions conditions = find_conditions(engine, reading);
    std::vector<power_ways::Way> ways = power_ways::find_ways(engine, baseline, reading, conditions, scatter);
    PowerAgreement agreement;
    if (conditions.load_percent && engine.rated_power.value() > 0.0)
        agreement.typed_power = *conditions.load_percent / 100.0 * engine.rated_power.value() / 1000.0;
    for (power_ways::Way& way : ways) {
        if (way.estimate.power) {
            hold_out_suspected(way, suspected);
            const bool weighable = way.estimate.half_width && *way.estimate.half_width > 0.0;
            if (!weighable && way.estimate.remark.empty())
                way.estimate.remark = "left out of the mean: its uncertainty is not known";
            way.estimate.in_mean = weighable && !way.estimate.suspected && !way.repeats;
        }
        agreement.estimates.push_back(way.estimate);
    }
    // What repeats a way that is under suspicion is no better.
    for (std::size_t i = 0; i < ways.size(); ++i)
        for (const PowerEstimate& one : agreement.estimates)
            if (ways[i].repeats && ways[i].repeats_of == one.words && one.suspected)
                agreement.estimates[i].suspected = true;
    Agreeing(agreement, ways).judge();
    return agreement;
}

} // namespace evenstroke
