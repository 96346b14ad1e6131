// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/trend/drift_run.h"

#include "core/trend/robust.h"

#include <utility>

namespace evenstroke::drift {

namespace {

constexpr std::size_t cells_for_scatter = 10;
constexpr std::size_t first_values = 5; ///< judged together once they are there: nothing came before them

/// Ascending and finite, from the first reading on. A month that is neither counts like the one before.
std::vector<double> sound_months(const std::vector<double>& months)
{
    std::vector<double> sound;
    double origin = 0.0;
    bool known = false;
    for (const double month : months) {
        const bool usable = std::isfinite(month) && std::abs(month) < 1e6;
        if (usable && !known) {
            origin = month;
            known = true;
        }
        const double before = sound.empty() ? 0.0 : sound.back();
        sound.push_back(usable ? std::max(month - origin, before) : before);
    }
    return sound;
}

/// More often at first: a ship whose scatter is not the catalogue's shows it within half a year.
bool noise_is_renewed_at(std::size_t reading)
{
    return reading == 4 || reading == 6 || (reading >= 8 && reading % 4 == 0);
}

std::vector<std::string> names_of(const Input& input, const std::vector<std::size_t>& channels)
{
    std::vector<std::string> names;
    for (const std::size_t k : channels)
        names.push_back(input.channels[k].quantity);
    return names;
}

std::vector<std::size_t> channels_in_scan(const Input& input, const std::vector<ChannelHistory>& history)
{
    std::vector<std::size_t> scanned;
    for (std::size_t k = 0; k < history.size(); ++k)
        if (input.channels[k].in_scan && history[k].sound_input)
            scanned.push_back(k);
    return scanned;
}

std::vector<ChannelHistory> empty_history(const Input& input)
{
    std::vector<ChannelHistory> history;
    for (const Channel& channel : input.channels)
        history.emplace_back(channel, input.readings(), input.cylinders);
    return history;
}

} // namespace

DriftRun::DriftRun(const Input& input)
    : input_(&input), cylinders_(input.cylinders), months_(sound_months(input.months)),
      history_(empty_history(input)), scanned_(channels_in_scan(input, history_)),
      sums_(input.channels.size(), std::vector<RunningSums>(input.cylinders)),
      levels_(input.channels.size(), MaybeValues(input.cylinders)), typing_(input),
      matcher_(names_of(input, scanned_)), decisions_(input.cylinders), question_(input.cylinders),
      engine_(input)
{
    const std::size_t readings = input.readings();
    for (const Channel& channel : input.channels)
        apart_noise_.emplace_back(noise_against_others(channel.noise, cylinders_), prior_noise_weight);
    std::size_t engine_scanned = 0;
    for (const EngineSeries& series : engine_.series())
        engine_scanned += series.in_scan() ? 1 : 0;
    thresholds_ = thresholds_for(scanned_.size(), engine_scanned);
    output_.cylinder_threshold = thresholds_.cylinder;
    output_.engine_threshold = thresholds_.engine;
    output_.note_threshold = thresholds_.note;
    output_.readings.resize(readings);
    output_.cells.assign(input.channels.size(), std::vector<CellResult>(readings * cylinders_));
    output_.cylinders.resize(readings * cylinders_);
    output_.engine.resize(readings);
    output_.engine_cells.assign(engine_.series().size(), std::vector<CellResult>(readings));
    for (const EngineSeries& series : engine_.series())
        output_.engine_quantities.push_back(series.is_median() ? "median " + series.quantity()
                                                               : series.quantity());
    books_.assign(cylinders_ + 1, FlagBook(output_.flags));
}

void DriftRun::take(std::size_t reading)
{
    const ReadingOpinion opinion = look_at(reading);
    typing_.remember(reading, opinion);
    for (ChannelHistory& channel : history_)
        channel.take_texts(reading);
    output_.doubts.insert(output_.doubts.end(), opinion.doubts.begin(), opinion.doubts.end());
    output_.readings[reading].unsteady = opinion.unsteady;
    output_.readings[reading].scatter = opinion.scatter;
    keep_usable(reading, opinion);
    for (std::size_t k = 0; k < history_.size(); ++k)
        take_apart(reading, k, opinion);
    find_levels(reading);
    judge_poor(reading);
    learn_noise(reading);
    add_to_sums(reading);
    for (std::size_t j = 0; j < cylinders_; ++j)
        judge_cylinder(reading, j);
    judge_engine(reading, opinion);
    take_answers(reading);
}

ReadingOpinion DriftRun::look_at(std::size_t reading)
{
    open_segments(reading);
    if (noise_is_renewed_at(reading))
        for (std::size_t k = 0; k < history_.size(); ++k) {
            history_[k].check_noise.renew();
            history_[k].alone_noise.renew();
            apart_noise_[k].renew();
        }
    return typing_.look_at(reading, history_);
}

void DriftRun::open_segments(std::size_t reading)
{
    const std::size_t cells = input_->readings() * cylinders_;
    for (std::size_t j = 0; j < cylinders_; ++j) {
        const bool work = is_set(input_->cylinder_work, at(reading, j), cells);
        for (ChannelHistory& channel : history_)
            if (work || is_set(channel.input->segment_starts, at(reading, j), cells))
                channel.start[j] = reading;
        if (!work)
            continue;
        decisions_[j].recorded_work(reading);
        books_[j].close_all();
        if (question_[j])
            output_.flags[*question_[j]].active = false;
        question_[j].reset();
    }
    const bool engine_work = is_set(input_->engine_work, reading, input_->readings());
    for (std::size_t e = 0; e < engine_.series().size(); ++e) {
        const bool own = e < input_->engine_channels.size() &&
                         is_set(input_->engine_channels[e].segment_starts, reading, input_->readings());
        if (engine_work || own)
            engine_.series()[e].open_segment();
    }
    if (engine_work) {
        books_[cylinders_].close_all();
        last_engine_drift_.reset();
    }
}

void DriftRun::keep_usable(std::size_t reading, const ReadingOpinion& opinion)
{
    const bool excluded = is_set(input_->excluded, reading, input_->readings());
    const bool steady = !opinion.unsteady && !(reading > 0 && output_.readings[reading - 1].unsteady);
    for (std::size_t k = 0; k < history_.size(); ++k) {
        MaybeValues row(cylinders_);
        for (std::size_t j = 0; j < cylinders_; ++j) {
            const Cell* cell = history_[k].cell(reading, j);
            output_.cells[k][at(reading, j)].doubtful = opinion.held[k][j] != 0 && cell;
            if (cell && !opinion.held[k][j])
                row[j] = usable_deviation(*cell, input_->channels[k].noise);
        }
        if (!excluded)
            history_[k].take(reading, row, steady);
        else
            std::copy(row.begin(), row.end(),
                      history_[k].deviation.begin() + static_cast<std::ptrdiff_t>(at(reading, 0)));
    }
}

void DriftRun::take_apart(std::size_t reading, std::size_t channel, const ReadingOpinion& opinion)
{
    const ChannelHistory& history = history_[channel];
    std::vector<double> offsets(cylinders_);
    for (std::size_t j = 0; j < cylinders_; ++j) {
        const std::size_t supposed = decisions_[j].supposed();
        offsets[j] = supposed <= history.start[j] && history.sound_input && history.input->checked
                         ? opinion.cylinders[channel][j].own_offset // from the same readings
                         : own_offset(history.from_others, cylinders_, j,
                                      std::max(history.start[j], supposed), reading)
                               .amount;
    }
    const Row row = Row(history.deviation).subspan(at(reading, 0), cylinders_);
    const double noise = apart_noise_[channel].value();
    const MaybeValues common = common_mode(row, offsets, noise);
    for (std::size_t j = 0; j < cylinders_; ++j) {
        CellResult& cell = output_.cells[channel][at(reading, j)];
        cell.own_offset = offsets[j];
        cell.noise = noise;
        cell.segment_start = history.start[j];
        if (!row[j] || !common[j])
            continue;
        cell.apart = *row[j] - *common[j];
    }
}

void DriftRun::learn_noise(std::size_t reading)
{
    if (reading == 0 || is_set(input_->excluded, reading, input_->readings()))
        return;
    const bool steady = !output_.readings[reading].poor && !output_.readings[reading - 1].poor;
    for (std::size_t k = 0; k < history_.size(); ++k)
        for (std::size_t j = 0; j < cylinders_; ++j) {
            const auto &now = output_.cells[k][at(reading, j)].apart,
                       &before = output_.cells[k][at(reading - 1, j)].apart;
            if (now && before && history_[k].start[j] < reading)
                apart_noise_[k].add_difference(*now - *before, steady);
        }
}

std::optional<double> DriftRun::recent_level(std::size_t reading, std::size_t channel,
                                             std::size_t cylinder) const
{
    constexpr std::size_t memory = 5, needed = 2;
    std::array<double, memory> last{};
    std::size_t count = 0;
    for (std::size_t i = reading; i > history_[channel].start[cylinder] && count < memory; --i) {
        const CellResult& cell = output_.cells[channel][at(i - 1, cylinder)];
        if (cell.used)
            last[count++] = *cell.apart;
    }
    if (count < needed)
        return std::nullopt;
    return median_in_place(std::span(last.data(), count));
}

void DriftRun::find_levels(std::size_t reading)
{
    for (std::size_t k = 0; k < history_.size(); ++k)
        for (std::size_t j = 0; j < cylinders_; ++j)
            levels_[k][j] = output_.cells[k][at(reading, j)].apart ? recent_level(reading, k, j) : std::nullopt;
}

void DriftRun::judge_poor(std::size_t reading)
{
    ReadingResult& result = output_.readings[reading];
    if (is_set(input_->excluded, reading, input_->readings())) {
        result.poor = true;
        return;
    }
    if (reading < 2)
        return;
    std::vector<double> distances;
    for (const std::size_t k : scanned_)
        for (std::size_t j = 0; j < cylinders_; ++j) {
            const CellResult& cell = output_.cells[k][at(reading, j)];
            if (!cell.apart)
                continue;
            if (const auto& level = levels_[k][j])
                distances.push_back(std::abs(*cell.apart - *level) / cell.noise);
        }
    if (distances.size() < cells_for_scatter)
        return;
    const double known = static_cast<double>(std::min<std::size_t>(reading, 5));
    const double scatter = median_to_sigma * median_in_place(distances) / std::sqrt(1.0 + 1.4 / known);
    result.poor = scatter > unsteady_scatter;
}

double DriftRun::clip_one_off(std::size_t channel, std::size_t cylinder, double apart) const
{
    const auto& level = levels_[channel][cylinder];
    return level ? pull_in(apart, *level, 2.5 * apart_noise_[channel].value()) : apart;
}

void DriftRun::add_to_sums(std::size_t reading)
{
    const bool poor = output_.readings[reading].poor;
    for (std::size_t k = 0; k < history_.size(); ++k)
        for (std::size_t j = 0; j < cylinders_; ++j) {
            CellResult& cell = output_.cells[k][at(reading, j)];
            std::optional<double> value;
            if (cell.apart && !poor) {
                value = clip_one_off(k, j, *cell.apart);
                cell.used = true;
                cell.clipped = *value;
            }
            sums_[k][j].add(months_[reading], value);
            cell.usable =
                static_cast<std::size_t>(sums_[k][j].between(history_[k].start[j], reading).count + 0.5);
            if (value && cell.usable == first_values)
                renew_first_values(reading, k, j);
        }
}

void DriftRun::renew_first_values(std::size_t reading, std::size_t channel, std::size_t cylinder)
{
    std::vector<std::size_t> readings;
    std::vector<double> values;
    for (std::size_t i = history_[channel].start[cylinder]; i <= reading; ++i)
        if (const CellResult& cell = output_.cells[channel][at(i, cylinder)]; cell.used) {
            readings.push_back(i);
            values.push_back(*cell.apart);
        }
    const double middle = median_in_place(values), reach = 2.5 * apart_noise_[channel].value();
    for (const std::size_t i : readings)
        sums_[channel][cylinder].replace(
            i, months_[i], pull_in(*output_.cells[channel][at(i, cylinder)].apart, middle, reach));
}

std::vector<ScanSeries> DriftRun::series_of(std::size_t cylinder, std::size_t not_before) const
{
    std::vector<ScanSeries> series;
    for (const std::size_t k : scanned_)
        series.push_back({&sums_[k][cylinder], std::max(history_[k].start[cylinder], not_before),
                          apart_noise_[k].value()});
    return series;
}

Output DriftRun::finish()
{
    return std::move(output_);
}

} // namespace evenstroke::drift
