// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/trend/drift_run.h"

#include "core/trend/robust.h"

#include <algorithm>
#include <utility>

namespace evenstroke::drift {

namespace {

constexpr double worth_naming =
    1.5; ///< standard deviations; a quantity that moved less is not named in a flag

Level level_of(const Flag& flag)
{
    return flag.escalations.empty() ? flag.level : flag.escalations.back().level;
}

/// @param quantities candidates from here on are signatures
Flag::View view_from(const ScanResult& result, std::string name, std::size_t quantities,
                     const std::vector<double>& months, std::size_t reading)
{
    Flag::View view;
    view.candidate = std::move(name);
    view.is_signature = result.candidate >= quantities;
    view.direction = view.is_signature ? 0 : result.direction;
    view.shape = result.shape;
    view.onset = result.onset;
    view.since = result.onset - 1;
    view.months = months[reading] - months[view.since];
    view.evidence = result.evidence;
    return view;
}

void say_evidence(SubjectResult& subject, const ScanResult& result, std::string name, std::size_t quantities)
{
    subject.evidence = result.evidence;
    subject.candidate = std::move(name);
    subject.is_signature = result.candidate >= quantities;
    subject.direction = subject.is_signature ? 0 : result.direction;
    subject.shape = result.shape;
    subject.onset = result.onset;
}

void keep_worth_naming(std::vector<QuantityChange>& changes)
{
    std::sort(changes.begin(), changes.end(), [](const QuantityChange& one, const QuantityChange& other) {
        return std::abs(one.strength) > std::abs(other.strength);
    });
    while (changes.size() > 1 && std::abs(changes.back().strength) < worth_naming)
        changes.pop_back();
}

} // namespace

std::string DriftRun::candidate_name(std::size_t candidate) const
{
    return candidate < scanned_.size() ? input_->channels[scanned_[candidate]].quantity
                                       : matcher_.signature(candidate - scanned_.size()).name;
}

Flag::View DriftRun::view_of(std::size_t reading, const ScanResult& result,
                             const std::vector<ScanSeries>& series) const
{
    Flag::View view = view_from(result, candidate_name(result.candidate), scanned_.size(), months_, reading);
    view.years_by_chance = years_by_chance(result.evidence, cylinders_);
    const std::vector<std::size_t> moved = view.is_signature
                                               ? matcher_.channels(result.candidate - scanned_.size())
                                               : std::vector<std::size_t>{result.candidate};
    for (const std::size_t k : moved) {
        const ScanSeries& one = series[k];
        const auto fit =
            result.onset <= one.first ? std::nullopt
            : result.shape == Shape::step
                ? fit_step(*one.sums, one.first, result.onset, reading, one.noise)
                : fit_ramp(*one.sums, one.first, result.onset, reading, one.noise, months_[view.since]);
        if (fit)
            view.changes.push_back(
                {input_->channels[scanned_[k]].quantity, fit->strength(), fit->size(one.noise)});
    }
    keep_worth_naming(view.changes);
    return view;
}

bool DriftRun::limit_is_near(std::size_t reading, std::optional<std::size_t> cylinder,
                             const Flag::View& view) const
{
    constexpr double soon_months = 2.0;
    if (view.shape != Shape::ramp)
        return false;
    // A quantity that hardly moved has so wide an interval that its early end says nothing.
    constexpr double clearly_moved = 3.0;
    return std::any_of(view.changes.begin(), view.changes.end(), [&](const QuantityChange& change) {
        if (std::abs(change.strength) < clearly_moved)
            return false;
        const std::size_t channel = channel_of(*input_, output_, change.quantity, cylinder.has_value());
        const auto mark =
            mark_ahead(*input_, output_, channel, cylinder, reading, view.onset, change.size > 0.0);
        const auto time = mark ? time_to_limit(*input_, output_, channel, cylinder, reading, mark->distance)
                               : std::nullopt;
        return time && time->months_5 && *time->months_5 < soon_months;
    });
}

void DriftRun::judge_cylinder(std::size_t reading, std::size_t cylinder)
{
    SubjectResult& subject = output_.cylinders[at(reading, cylinder)];
    CylinderDecision& decision = decisions_[cylinder];
    if (reading > 0)
        subject.level = output_.cylinders[at(reading - 1, cylinder)].level;
    if (is_set(input_->cylinder_work, at(reading, cylinder), input_->readings() * cylinders_))
        subject.level = Level::quiet;
    subject.question_open = decision.question_open();
    if (output_.readings[reading].poor)
        return;
    const std::vector<ScanSeries> series = series_of(cylinder, decision.start());
    const ScanResult from_start = scan(series, matcher_, months_, reading);
    std::vector<ScanSeries> later_series;
    ScanResult from_supposed;
    if (decision.question_open()) {
        later_series = series_of(cylinder, decision.supposed());
        from_supposed = scan(later_series, matcher_, months_, reading);
    }
    const bool was_open = decision.question_open();
    const auto outcome =
        decision.decide(reading, from_start, was_open ? &from_supposed : nullptr, thresholds_);
    const bool later = outcome == CylinderDecision::Outcome::drift_from_supposed_work ||
                       (outcome != CylinderDecision::Outcome::drift_from_start && was_open);
    const ScanResult& result = later ? from_supposed : from_start;
    settle_cylinder(reading, cylinder, outcome, result, later ? later_series : series);
    if (!result.possible)
        return;
    say_evidence(subject, result, candidate_name(result.candidate), scanned_.size());
    subject.unexplained = result.any_change;
}

void DriftRun::settle_cylinder(std::size_t reading, std::size_t cylinder, CylinderDecision::Outcome outcome,
                               const ScanResult& result, const std::vector<ScanSeries>& series)
{
    CylinderDecision& decision = decisions_[cylinder];
    FlagBook& book = books_[cylinder];
    if (outcome == CylinderDecision::Outcome::question) {
        if (question_[cylinder])
            output_.flags[*question_[cylinder]].active = false;
        question_[cylinder] = output_.flags.size();
        Flag flag;
        flag.reading = flag.last_reading = reading;
        flag.cylinder = cylinder;
        flag.level = Level::ask;
        flag.active = true;
        flag.at_start = flag.now = view_of(reading, result, series);
        flag.work_before = decision.supposed();
        output_.flags.push_back(std::move(flag));
    } else if (outcome != CylinderDecision::Outcome::nothing) {
        const Flag::View view = view_of(reading, result, series);
        const bool strong = view.evidence >= thresholds_.cylinder + thresholds_.act_above;
        const Level level = strong || limit_is_near(reading, cylinder, view) ? Level::act : Level::watch;
        const bool starts = decision.was_quiet(reading);
        decision.note_drift(reading);
        book.carry(reading, cylinder, level, view, starts);
        if (view.shape == Shape::step && reading - book.open()->reading >= lasting_after_readings) {
            decision.accept_level(view.onset);
            for (ChannelHistory& channel : history_)
                channel.start[cylinder] = std::max(channel.start[cylinder], decision.start());
            book.keep_as_lasting();
        }
    } else if (decision.was_quiet(reading)) {
        book.close();
    }
    SubjectResult& subject = output_.cylinders[at(reading, cylinder)];
    subject.question_open = decision.question_open();
    if (book.open())
        subject.level = level_of(*book.open());
    else if (decision.question_open())
        subject.level = Level::ask;
    else
        subject.level = result.possible && result.evidence >= thresholds_.note ? Level::note : Level::quiet;
}

void DriftRun::take_answers(std::size_t reading)
{
    for (const Answer& answer : input_->answers) {
        const std::size_t j = answer.cylinder;
        if (answer.reading != reading || j >= cylinders_ || !question_[j] ||
            output_.flags[*question_[j]].reading != reading)
            continue;
        decisions_[j].answer(answer.work_was_done);
        for (ChannelHistory& channel : history_)
            channel.start[j] = std::max(channel.start[j], decisions_[j].start());
        Flag& question = output_.flags[*question_[j]];
        question.answered = answer.work_was_done;
        question.active = false;
        question_[j].reset();
    }
}

void DriftRun::judge_engine(std::size_t reading, const ReadingOpinion& opinion)
{
    const bool poor = output_.readings[reading].poor;
    const bool load_known = input_->load_percent.size() == input_->readings() &&
                            input_->load_percent[reading] && std::isfinite(*input_->load_percent[reading]);
    const double load = load_known ? std::clamp(*input_->load_percent[reading], 0.0, 150.0) : 75.0;
    std::vector<std::optional<double>> values(engine_.series().size());
    for (std::size_t e = 0; e < input_->engine_channels.size() && !poor; ++e) {
        const EngineChannel& channel = input_->engine_channels[e];
        if (channel.cells.size() == input_->readings() && !opinion.engine_held[e])
            values[e] = usable_deviation(channel.cells[reading], channel.noise);
    }
    for (const EngineLevel::MedianOf& median_of : engine_.medians()) {
        std::vector<double> without_offset;
        for (std::size_t j = 0; j < cylinders_ && !poor; ++j)
            if (const auto& value = history_[median_of.channel].deviation[at(reading, j)])
                without_offset.push_back(*value -
                                         output_.cells[median_of.channel][at(reading, j)].own_offset);
        values[median_of.series] = median(std::move(without_offset));
    }
    for (std::size_t e = 0; e < values.size(); ++e) {
        EngineSeries& series = engine_.series()[e];
        series.add(months_[reading], load, values[e]);
        series.prepare();
        CellResult& cell = output_.engine_cells[e][reading];
        cell.apart = series.residual(reading);
        cell.used = series.clipped(reading).has_value();
        cell.clipped = series.clipped(reading).value_or(0.0);
        cell.doubtful = e < opinion.engine_held.size() && opinion.engine_held[e] != 0;
        cell.noise = series.noise();
        cell.usable = series.usable();
        cell.segment_start = series.first();
    }
    settle_engine(reading, poor ? ScanResult{} : engine_.scan(reading));
}

Flag::View DriftRun::engine_view(std::size_t reading, const ScanResult& result) const
{
    Flag::View view = view_from(result, engine_.candidate_name(result.candidate), engine_.series().size(), months_,
                                reading);
    view.years_by_chance = years_by_chance(result.evidence, 0);
    for (const std::size_t e : engine_.moved_by(result.candidate)) {
        const EngineSeries& series = engine_.series()[e];
        if (const auto fit = series.fit(result.onset, result.shape))
            view.changes.push_back(
                {output_.engine_quantities[e], fit->strength(), fit->size(series.noise())});
    }
    keep_worth_naming(view.changes);
    return view;
}

void DriftRun::settle_engine(std::size_t reading, const ScanResult& result)
{
    SubjectResult& subject = output_.engine[reading];
    FlagBook& book = books_[cylinders_];
    if (result.possible && result.evidence > thresholds_.engine) {
        const bool starts = !last_engine_drift_ || reading - *last_engine_drift_ > quiet_readings;
        const bool strong = result.evidence >= thresholds_.engine + thresholds_.act_above;
        last_engine_drift_ = reading;
        const Flag::View view = engine_view(reading, result);
        const bool urgent = strong || limit_is_near(reading, std::nullopt, view);
        book.carry(reading, std::nullopt, urgent ? Level::act : Level::watch, view, starts);
    } else if (last_engine_drift_ && reading - *last_engine_drift_ > quiet_readings) {
        book.close();
    }
    if (book.open())
        subject.level = level_of(*book.open());
    else if (result.possible)
        subject.level = result.evidence >= thresholds_.note ? Level::note : Level::quiet;
    else if (reading > 0)
        subject.level = output_.engine[reading - 1].level;
    if (!result.possible)
        return;
    say_evidence(subject, result, engine_.candidate_name(result.candidate), engine_.series().size());
}

} // namespace evenstroke::drift
