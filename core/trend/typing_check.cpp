// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/trend/typing_check.h"

#include "core/trend/copied_values.h"
#include "core/trend/drift_catalogue.h"
#include "core/trend/exchanged_cylinders.h"
#include "core/trend/robust.h"
#include "core/trend/typing_slips.h"

#include <cmath>

namespace evenstroke::drift {

namespace {

// Limits of the check in standard deviations; found with simulated fleets.
constexpr double doubtful_from = 6.0;   ///< doubted whatever it may be
constexpr double suspicious_from = 5.0; ///< doubted if undoing a slip makes it quite usual
constexpr double quite_usual = 1.5;
constexpr double usual_enough = 3.0; ///< a slip is named if undoing it brings the value so near
constexpr double no_slip_from = 2.5; ///< a change seen twice is believed if no slip explains it
constexpr double alone_doubtful_from = 7.0;
constexpr std::size_t cells_for_scatter = 10;

/// Opinion on one place from what the others do at this reading.
CellOpinion compare_with_others(const ChannelHistory& history, std::size_t reading, std::size_t cylinder)
{
    CellOpinion opinion;
    const OwnOffset offset =
        own_offset(history.from_others, history.cylinders, cylinder, history.start[cylinder], reading);
    opinion.own_offset = offset.amount;
    opinion.offset_count = offset.count;
    const double noise = history.check_noise.value(), spread = history.input->offset_spread;
    const double count = static_cast<double>(std::max<std::size_t>(offset.count, 1));
    opinion.tolerance =
        std::sqrt(noise * noise * (1.0 + 1.5 / count) + (offset.count < 2 ? spread * spread : 0.0));
    return opinion;
}

/// Without three others: the place's own last values, with all that they share left in.
void compare_with_itself(const ChannelHistory& history, std::size_t reading, std::size_t cylinder,
                         CellOpinion& opinion)
{
    constexpr std::size_t memory = 6, needed = 4;
    std::vector<double> last;
    for (std::size_t i = reading; i > history.start[cylinder] && last.size() < memory; --i)
        if (const auto& value = history.deviation[(i - 1) * history.cylinders + cylinder])
            last.push_back(*value);
    if (last.size() < needed)
        return;
    opinion.tolerance = history.alone_noise.value() * std::sqrt(1.0 + 1.5 / static_cast<double>(last.size()));
    opinion.centre = median_in_place(last);
    opinion.alone = true;
}

std::string typed_text(const Cell& cell)
{
    return cell.typed_text.empty() ? plain_text(cell.typed_number) : cell.typed_text;
}

/// Slip that best explains a value, judged by how usual the value would be without it.
std::optional<BestTrial> best_slip(const Cell& cell, const CellOpinion& opinion)
{
    return best_trial(typed_text(cell), [&](double number) {
        const double deviation = cell.deviation + cell.scale * (number - cell.typed_number);
        return std::abs(deviation - *opinion.centre) / opinion.tolerance;
    });
}

/// What is wrong with one value, if anything.
struct CellVerdict
{
    Verdict verdict = Verdict::implausible;
    std::optional<SlipTrial> suggestion;
};

std::optional<CellVerdict> judge_cell(const Cell& cell, const CellOpinion& opinion, int held_sign_before,
                                      double doubt_limit, double suspicion_limit)
{
    if (cell.confirmed)
        return std::nullopt;
    if (!opinion.distance)
        return cell.held_out ? std::optional(CellVerdict{}) : std::nullopt;
    const double away = std::abs(*opinion.distance);
    if (!cell.held_out && !(away > suspicion_limit))
        return std::nullopt;
    const auto slip = best_slip(cell, opinion);
    const bool named = slip && slip->distance < usual_enough;
    if (!cell.held_out) {
        if (away <= doubt_limit && !(slip && slip->distance < quite_usual))
            return std::nullopt;
        const int sign = *opinion.distance > 0.0 ? 1 : -1;
        if (sign == held_sign_before && !(slip && slip->distance <= no_slip_from))
            return std::nullopt; // the same again, and no slip explains it: a real large change
    }
    if (!named)
        return CellVerdict{};
    return CellVerdict{slip->trial.verdict, slip->trial};
}

Doubt doubt_about(std::size_t reading, const CellVerdict& verdict, const Cell& cell,
                  const CellOpinion& opinion)
{
    Doubt doubt;
    doubt.reading = reading;
    doubt.verdict = verdict.verdict;
    if (verdict.suggestion) {
        doubt.suggested_number = verdict.suggestion->number;
        doubt.suggested_text = verdict.suggestion->text;
    }
    doubt.size = opinion.distance ? std::abs(*opinion.distance) : 0.0;
    if (std::isfinite(cell.deviation))
        doubt.deviation = cell.deviation;
    if (const auto band = usual_band(opinion)) {
        doubt.usual_low = band->low;
        doubt.usual_high = band->high;
    }
    return doubt;
}

/// Median of typed over expected for a row that nobody confirmed; nothing with fewer than 3 values.
std::optional<double> row_ratio(const ChannelHistory& history, std::size_t reading)
{
    const auto& expected = history.input->expected_typed;
    if (!history.sound_input || expected.size() * history.cylinders != history.input->cells.size())
        return std::nullopt;
    const auto wanted = expected[reading];
    if (!wanted || !std::isfinite(*wanted) || *wanted <= 0.0)
        return std::nullopt;
    std::vector<double> ratios;
    for (std::size_t j = 0; j < history.cylinders; ++j)
        if (const Cell* cell = history.cell(reading, j);
            cell && !cell->confirmed && std::isfinite(cell->typed_number))
            ratios.push_back(cell->typed_number / *wanted);
    return ratios.size() < 3 ? std::nullopt : median(ratios);
}

} // namespace

std::optional<UsualBand> usual_band(const CellOpinion& opinion)
{
    if (!opinion.centre)
        return std::nullopt;
    return UsualBand{*opinion.centre, *opinion.centre - 2.0 * opinion.tolerance,
                     *opinion.centre + 2.0 * opinion.tolerance, !opinion.alone};
}

TypingCheck::TypingCheck(const Input& input)
    : input_(&input), held_sign_(input.channels.size(), std::vector<int>(input.cylinders, 0)),
      engine_held_sign_(input.engine_channels.size(), 0), engine_values_(input.engine_channels.size())
{
    constexpr double prior_weight = 8.0; // one difference a reading only: the engine's own has to come sooner
    for (const EngineChannel& channel : input.engine_channels)
        engine_noise_.emplace_back(channel.noise, prior_weight);
}

ReadingOpinion TypingCheck::look_at(std::size_t reading, const std::vector<ChannelHistory>& history) const
{
    ReadingOpinion opinion;
    opinion.held.assign(history.size(), std::vector<char>(input_->cylinders, 0));
    opinion.engine_held.assign(input_->engine_channels.size(), 0);
    doubt_rows(reading, history, opinion);
    judge_cylinders(reading, history, opinion);
    judge_scatter(reading, opinion);
    doubt_cells(reading, history, opinion);
    judge_engine(reading, opinion);
    return opinion;
}

void TypingCheck::doubt_rows(std::size_t reading, const std::vector<ChannelHistory>& history,
                             ReadingOpinion& opinion) const
{
    for (std::size_t k = 0; k < history.size(); ++k) {
        const CatalogueChannel* known = find_channel(history[k].input->quantity, Subject::cylinder);
        const auto ratio = row_ratio(history[k], reading);
        const bool other_unit = known && ratio && *ratio > 0.004 &&
                                (*ratio < known->row_ratio_low || *ratio > known->row_ratio_high);
        const bool copied = !other_unit && row_is_copied(history[k], reading);
        if (!other_unit && !copied)
            continue;
        Doubt doubt;
        doubt.reading = reading;
        doubt.verdict = other_unit ? Verdict::unit_slip : Verdict::copied;
        doubt.quantity = history[k].input->quantity;
        doubt.size = other_unit ? *ratio : 0.0;
        opinion.doubts.push_back(doubt);
        opinion.held[k].assign(input_->cylinders, 1);
    }
    if (boxes_are_copied(history, reading)) {
        Doubt doubt;
        doubt.reading = reading;
        doubt.verdict = Verdict::copied;
        opinion.doubts.push_back(doubt);
        for (auto& row : opinion.held)
            row.assign(input_->cylinders, 1);
    }
}

void TypingCheck::judge_cylinders(std::size_t reading, const std::vector<ChannelHistory>& history,
                                  ReadingOpinion& opinion) const
{
    opinion.cylinders.assign(history.size(), std::vector<CellOpinion>(input_->cylinders));
    for (std::size_t k = 0; k < history.size(); ++k) {
        if (!history[k].sound_input || !history[k].input->checked)
            continue;
        std::vector<CellOpinion>& row = opinion.cylinders[k];
        MaybeValues typed(input_->cylinders), offset_free(input_->cylinders);
        for (std::size_t j = 0; j < input_->cylinders; ++j) {
            row[j] = compare_with_others(history[k], reading, j);
            if (const Cell* cell = history[k].cell(reading, j); cell && !opinion.held[k][j])
                typed[j] = usable_deviation(*cell, history[k].input->noise);
            if (typed[j])
                offset_free[j] = *typed[j] - row[j].own_offset;
        }
        const MaybeValues common = median_of_others(offset_free);
        for (std::size_t j = 0; j < input_->cylinders; ++j) {
            row[j].common = common[j];
            if (common[j])
                row[j].centre = row[j].own_offset + *common[j];
            else
                compare_with_itself(history[k], reading, j, row[j]);
            const Cell* cell = history[k].cell(reading, j);
            if (cell && row[j].centre && std::isfinite(cell->deviation) && !opinion.held[k][j])
                row[j].distance = (cell->deviation - *row[j].centre) / row[j].tolerance;
        }
    }
}

void TypingCheck::judge_scatter(std::size_t reading, ReadingOpinion& opinion) const
{
    std::vector<double> distances;
    for (const auto& row : opinion.cylinders)
        for (const CellOpinion& cell : row)
            if (cell.distance && !cell.alone)
                distances.push_back(std::abs(*cell.distance));
    if (distances.size() < cells_for_scatter)
        return;
    opinion.scatter = median_to_sigma * median_in_place(distances);
    const double wider = std::max(1.0, *opinion.scatter);
    for (auto& row : opinion.cylinders)
        for (CellOpinion& cell : row) {
            if (cell.alone)
                continue;
            cell.tolerance *= wider;
            if (cell.distance)
                *cell.distance /= wider;
        }
    opinion.unsteady = *opinion.scatter > unsteady_scatter;
    if (!opinion.unsteady)
        return;
    Doubt doubt;
    doubt.reading = reading;
    doubt.verdict = Verdict::unsteady;
    doubt.size = *opinion.scatter;
    opinion.doubts.push_back(doubt);
}

void TypingCheck::doubt_cells(std::size_t reading, const std::vector<ChannelHistory>& history,
                              ReadingOpinion& opinion) const
{
    const auto pair = find_exchanged_cylinders(opinion);
    if (pair) {
        Doubt doubt;
        doubt.reading = reading;
        doubt.verdict = Verdict::cylinders_swapped;
        doubt.cylinders = {pair->first, pair->second};
        doubt.size = pair->likelihood;
        opinion.doubts.push_back(doubt);
    }
    for (std::size_t k = 0; k < history.size(); ++k) {
        for (std::size_t j = 0; j < input_->cylinders; ++j) {
            const Cell* cell = history[k].cell(reading, j);
            const bool exchanged = pair && (j == pair->first || j == pair->second);
            if (!cell || opinion.held[k][j])
                continue;
            const CellOpinion& seen = opinion.cylinders[k][j];
            const auto verdict =
                judge_cell(*cell, seen, held_sign_[k][j], seen.alone ? alone_doubtful_from : doubtful_from,
                           seen.alone ? alone_doubtful_from : suspicious_from);
            opinion.held[k][j] = exchanged || verdict ? 1 : 0;
            if (!verdict || (exchanged && verdict->verdict == Verdict::implausible))
                continue; // the exchange explains it
            Doubt doubt = doubt_about(reading, *verdict, *cell, seen);
            doubt.quantity = history[k].input->quantity;
            doubt.cylinders = {j};
            opinion.doubts.push_back(doubt);
        }
    }
}

void TypingCheck::judge_engine(std::size_t reading, ReadingOpinion& opinion) const
{
    constexpr std::size_t memory = 6, needed = 2;
    constexpr double doubt_limit = 7.0, suspicion_limit = 6.0;
    opinion.engine.assign(input_->engine_channels.size(), CellOpinion{});
    for (std::size_t e = 0; e < input_->engine_channels.size(); ++e) {
        const EngineChannel& channel = input_->engine_channels[e];
        if (channel.cells.size() != input_->readings() || !(channel.noise > 0.0) ||
            !std::isfinite(channel.noise))
            continue;
        const std::vector<double>& before = engine_values_[e];
        std::vector<double> last(before.end() - static_cast<std::ptrdiff_t>(std::min(memory, before.size())),
                                 before.end());
        CellOpinion& seen = opinion.engine[e];
        seen.offset_count = last.size();
        seen.tolerance = (last.size() < needed ? 2.5 : 1.2) * engine_noise_[e].value();
        seen.centre = last.size() < needed ? 0.0 : median_in_place(last);
        const Cell& cell = channel.cells[reading];
        if (!cell.present)
            continue;
        if (std::isfinite(cell.deviation))
            seen.distance = (cell.deviation - *seen.centre) / seen.tolerance;
        const auto verdict = judge_cell(cell, seen, engine_held_sign_[e], doubt_limit,
                                        last.size() < needed ? doubt_limit : suspicion_limit);
        if (!verdict)
            continue;
        opinion.engine_held[e] = 1;
        Doubt doubt = doubt_about(reading, *verdict, cell, seen);
        doubt.quantity = channel.typed_quantity.empty() ? channel.quantity : channel.typed_quantity;
        doubt.engine_level = true;
        opinion.doubts.push_back(doubt);
    }
}

void TypingCheck::remember(std::size_t reading, const ReadingOpinion& opinion)
{
    const auto sign_if = [](bool held, const CellOpinion& seen) {
        return !held || !seen.distance ? 0 : (*seen.distance > 0.0 ? 1 : -1);
    };
    for (std::size_t k = 0; k < held_sign_.size(); ++k) {
        const Channel& channel = input_->channels[k];
        if (channel.cells.size() != input_->readings() * input_->cylinders)
            continue;
        for (std::size_t j = 0; j < input_->cylinders; ++j)
            if (channel.cells[reading * input_->cylinders + j].present)
                held_sign_[k][j] = sign_if(opinion.held[k][j] != 0, opinion.cylinders[k][j]);
    }
    for (std::size_t e = 0; e < engine_values_.size(); ++e) {
        const EngineChannel& channel = input_->engine_channels[e];
        if (channel.cells.size() != input_->readings() || !channel.cells[reading].present)
            continue;
        engine_held_sign_[e] = sign_if(opinion.engine_held[e] != 0, opinion.engine[e]);
        const auto value = usable_deviation(channel.cells[reading], channel.noise);
        if (!value || opinion.engine_held[e])
            continue;
        if (!engine_values_[e].empty()) {
            engine_noise_[e].add_difference(*value - engine_values_[e].back(), true);
            engine_noise_[e].renew();
        }
        engine_values_[e].push_back(*value);
    }
}

} // namespace evenstroke::drift
