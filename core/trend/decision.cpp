// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/trend/decision.h"

#include <algorithm>
#include <cmath>

namespace evenstroke::drift {

Thresholds thresholds_for(std::size_t cylinder_quantities, std::size_t engine_quantities)
{
    // Simulated (bench_drift): 5 more quantities a cylinder and 6 more of the engine leave the rate of false
    // flags where it was, when the square of a threshold grows by a constant times the log of the number of
    // candidates, and 2 more may stay unexplained for each quantity that F adds up.
    constexpr std::size_t usual_of_cylinder = 7, usual_of_engine = 10;
    constexpr double candidates_of_cylinder = 10.0, candidates_of_engine = 12.0;
    const auto more = [](std::size_t quantities, std::size_t usual) {
        return quantities > usual ? static_cast<double>(quantities - usual) : 0.0;
    };
    const double more_of_cylinder = more(cylinder_quantities, usual_of_cylinder);
    const double more_of_engine = more(engine_quantities, usual_of_engine);
    Thresholds thresholds;
    thresholds.cylinder = std::sqrt(thresholds.cylinder * thresholds.cylinder +
                                    2.0 * std::log1p(more_of_cylinder / candidates_of_cylinder));
    thresholds.engine = std::sqrt(thresholds.engine * thresholds.engine +
                                  4.0 * std::log1p(more_of_engine / candidates_of_engine));
    thresholds.ask_constant =
        std::max(9.0, thresholds.ask_constant + 2.0 * (static_cast<double>(cylinder_quantities) -
                                                       static_cast<double>(usual_of_cylinder)));
    return thresholds;
}

void CylinderDecision::recorded_work(std::size_t reading)
{
    start_ = supposed_ = reading;
    last_drift_.reset();
    no_work_ = false;
}

void CylinderDecision::answer(bool work_was_done)
{
    if (work_was_done)
        start_ = supposed_;
    supposed_ = start_;
    no_work_ = !work_was_done;
}

void CylinderDecision::accept_level(std::size_t onset)
{
    start_ = supposed_ = std::max(onset, start_);
    no_work_ = false;
}

CylinderDecision::Outcome CylinderDecision::decide(std::size_t reading, const ScanResult& from_start,
                                                   const ScanResult* from_supposed_work,
                                                   const Thresholds& thresholds)
{
    const auto passes = [&](const ScanResult& result) {
        return result.possible && result.evidence > thresholds.cylinder;
    };
    const auto unexplained = [](const ScanResult& result) {
        return result.any_change - result.strength * result.strength;
    };
    const bool open = question_open() && from_supposed_work;
    const double patience = open ? 0.5 : 1.0; // with a question open, its onset is known to be suspect
    if (passes(from_start) &&
        (no_work_ || unexplained(from_start) <= patience * thresholds.ask(from_start.strength)))
        return Outcome::drift_from_start;
    if (open && passes(*from_supposed_work) &&
        unexplained(*from_supposed_work) <= thresholds.ask(from_supposed_work->strength))
        return Outcome::drift_from_supposed_work;
    if (!was_quiet(reading))
        return Outcome::nothing;
    const ScanResult& asked = open ? *from_supposed_work : from_start;
    if (!passes(asked))
        return Outcome::nothing;
    supposed_ = std::max(asked.any_change_onset, start_);
    return Outcome::question;
}

void FlagBook::carry(std::size_t reading, std::optional<std::size_t> cylinder, Level level,
                     const Flag::View& view, bool starts)
{
    if (starts || !open_) {
        close();
        Flag flag;
        flag.reading = reading;
        flag.cylinder = cylinder;
        flag.level = level;
        flag.at_start = view;
        open_ = flags_->size();
        flags_->push_back(std::move(flag));
    }
    Flag& flag = (*flags_)[*open_];
    flag.last_reading = reading;
    flag.now = view;
    flag.active = true;
    const Level before = flag.escalations.empty() ? flag.level : flag.escalations.back().level;
    if (level == Level::act && before == Level::watch)
        flag.escalations.push_back({reading, level});
}

void FlagBook::close()
{
    if (open_)
        (*flags_)[*open_].active = false;
    open_.reset();
}

void FlagBook::keep_as_lasting()
{
    (*flags_)[*open_].lasting_level = true;
    lasting_.push_back(*open_);
    open_.reset();
}

void FlagBook::close_all()
{
    close();
    for (const std::size_t lasting : lasting_)
        (*flags_)[lasting].active = false;
    lasting_.clear();
}

} // namespace evenstroke::drift
