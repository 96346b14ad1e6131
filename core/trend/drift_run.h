// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/trend/decision.h"
#include "core/trend/drift_history.h"
#include "core/trend/engine_level.h"
#include "core/trend/scan.h"
#include "core/trend/typing_check.h"

#include <optional>
#include <string>
#include <vector>

namespace evenstroke::drift {

/// Takes one reading after the other, so that no later one can reach back.
class DriftRun
{
public:
    explicit DriftRun(const Input& input);

    void take(std::size_t reading);
    /// The typing check's opinion on a reading before it is taken.
    ReadingOpinion look_at(std::size_t reading);
    Output finish();

private:
    void begin(std::size_t reading);
    void open_segments(std::size_t reading);
    void take_answers(std::size_t reading);
    void keep_usable(std::size_t reading, const ReadingOpinion& opinion);
    void take_apart(std::size_t reading, std::size_t channel, const ReadingOpinion& opinion);
    void judge_poor(std::size_t reading);
    void learn_noise(std::size_t reading);
    void add_to_sums(std::size_t reading);
    double clip_one_off(std::size_t channel, std::size_t cylinder, double apart) const;
    void renew_first_values(std::size_t reading, std::size_t channel, std::size_t cylinder);
    std::optional<double> recent_level(std::size_t reading, std::size_t channel, std::size_t cylinder) const;
    void find_levels(std::size_t reading);
    void judge_cylinder(std::size_t reading, std::size_t cylinder);
    std::vector<ScanSeries> series_of(std::size_t cylinder, std::size_t not_before) const;
    Flag::View view_of(std::size_t reading, const ScanResult& result,
                       const std::vector<ScanSeries>& series) const;
    bool limit_is_near(std::size_t reading, std::optional<std::size_t> cylinder,
                       const Flag::View& view) const;
    void settle_cylinder(std::size_t reading, std::size_t cylinder, CylinderDecision::Outcome outcome,
                         const ScanResult& result, const std::vector<ScanSeries>& series);
    void judge_engine(std::size_t reading, const ReadingOpinion& opinion);
    void settle_engine(std::size_t reading, const ScanResult& result);
    Flag::View engine_view(std::size_t reading, const ScanResult& result) const;
    std::string candidate_name(std::size_t candidate) const;
    std::size_t at(std::size_t reading, std::size_t cylinder) const
    {
        return reading * cylinders_ + cylinder;
    }

    const Input* input_;
    std::size_t cylinders_;
    std::vector<double> months_;
    std::vector<ChannelHistory> history_;
    std::vector<NoiseEstimate> apart_noise_;     ///< [channel]
    std::vector<std::size_t> scanned_;           ///< channels that take part in the scan
    std::vector<std::vector<RunningSums>> sums_; ///< [channel][cylinder]
    std::vector<MaybeValues> levels_;            ///< [channel][cylinder] of the last readings before this one
    TypingCheck typing_;
    SignatureMatcher matcher_;
    Thresholds thresholds_;
    std::vector<CylinderDecision> decisions_;
    std::vector<FlagBook> books_; ///< one a cylinder, the engine last
    std::vector<std::optional<std::size_t>>
        question_; ///< [cylinder] index of the open question among the flags
    EngineLevel engine_;
    std::optional<std::size_t> last_engine_drift_;
    Output output_;
};

} // namespace evenstroke::drift
