// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/trend/drift.h"
#include "core/trend/scan.h"

#include <cstddef>
#include <optional>
#include <vector>

/// From evidence to a flag, a question, or nothing.
///
/// A fault moves one quantity, or the few of its signature. Work that nobody wrote down moves all quantities
/// of a cylinder at once in no particular direction: then the best single explanation leaves much of the
/// whole change unexplained, and the engineer is asked before anybody is alarmed.
namespace evenstroke::drift {

inline constexpr std::size_t quiet_readings = 6;          ///< without drift, before a flag may start again
inline constexpr std::size_t lasting_after_readings = 12; ///< a step so long open is the new level

/// Thresholds for the set of quantities in use.
struct Thresholds
{
    double cylinder = 5.0, engine = 5.4, note = 4.0, act_above = 2.0;
    double ask_constant = 17.0, ask_slope = 0.1;
    /// How much may stay unexplained beside evidence S before it looks like work.
    double ask(double evidence) const { return ask_constant + ask_slope * evidence * evidence; }
};
/// @param cylinder_quantities, engine_quantities of the scan. More candidates find something by chance more
/// often, so the thresholds rise with them.
Thresholds thresholds_for(std::size_t cylinder_quantities, std::size_t engine_quantities);

/// One cylinder's state between readings.
class CylinderDecision
{
public:
    enum class Outcome { nothing, drift_from_start, drift_from_supposed_work, question };

    void recorded_work(std::size_t reading);
    void answer(bool work_was_done);
    /// @param from_start        scan since the recorded work
    /// @param from_supposed_work scan since the supposed one, while a question is open
    Outcome decide(std::size_t reading, const ScanResult& from_start, const ScanResult* from_supposed_work,
                   const Thresholds& thresholds);
    /// The step of a flag is taken as the new level.
    void accept_level(std::size_t onset);

    std::size_t start() const { return start_; }       ///< after recorded work, or an accepted level
    std::size_t supposed() const { return supposed_; } ///< after supposed work; >= start
    bool question_open() const { return supposed_ > start_; }
    /// A drift at this reading would start a flag of its own.
    bool was_quiet(std::size_t reading) const
    {
        return !last_drift_ || reading - *last_drift_ > quiet_readings;
    }
    void note_drift(std::size_t reading) { last_drift_ = reading; }

private:
    std::size_t start_ = 0, supposed_ = 0;
    std::optional<std::size_t> last_drift_;
    bool no_work_ = false; ///< the engineer said so: this segment is not asked about again
};

/// Keeps the list of flags: starts, carries on, escalates and closes them.
class FlagBook
{
public:
    explicit FlagBook(std::vector<Flag>& flags) : flags_(&flags) {}

    /// A drift or question at a reading. Starts a flag if none is open.
    void carry(std::size_t reading, std::optional<std::size_t> cylinder, Level level, const Flag::View& view,
               bool starts);
    void close();
    /// The open flag stays on the list, but a new one may start.
    void keep_as_lasting();
    /// Recorded work ends them all.
    void close_all();
    Flag* open() { return open_ ? &(*flags_)[*open_] : nullptr; }

private:
    std::vector<Flag>* flags_;
    std::optional<std::size_t> open_;
    std::vector<std::size_t> lasting_;
};

} // namespace evenstroke::drift
