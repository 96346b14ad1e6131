// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/derived/derived.h"
#include "core/trend/deviations.h"
#include "core/trend/drift.h"
#include "core/trend/judgement.h"

#include <string_view>
#include <vector>

/// Lays out what was judged reading by reading as the plain table that the drift method works on.
namespace evenstroke {

struct PreparedReading
{
    Conditions conditions;
    std::vector<JudgedValue> values;
    std::vector<DerivedValue> derived; ///< those that are trended; empty for a draft, which shows none
    bool outside_baseline = false; ///< load or mode that the baseline does not reach: raises nothing
};

/// A reading's conditions and values, judged but for drift.
PreparedReading prepare_reading(const Engine& engine, const Baseline& baseline, const Reading& reading);

inline constexpr double days_in_month = 30.4375; ///< on average

/// Months since the first day of 1970, as the drift method counts them.
double months_of(TimePoint time);

/// @param prepared one for each of the record's readings, same order
/// @param unsteady readings that the quick lines call unsteady
drift::Input make_drift_input(const EngineRecord& record, const Baseline& baseline,
                              const std::vector<PreparedReading>& prepared, const std::vector<char>& unsteady);

/// The deviation in the drift method's form (per cent of the baseline for some quantities) as an affine
/// function of the quantity's own value.
struct DeviationForm
{
    double scale = 1.0, shift = 0.0;
    double of(double own) const { return scale * own + shift; }
    double own(double deviation) const { return (deviation - shift) / scale; }
};
/// Nothing where the baseline has this quantity but not at this load.
/// @param row_median median of the corrected values of all cylinders, used where per cent has no baseline
std::optional<DeviationForm> deviation_form(const Engine& engine, const Baseline& baseline, const Quantity& quantity,
                                            double own, const Conditions& conditions, bool percent,
                                            std::optional<double> row_median);

/// The reading from which on work of this date counts: the first taken after it (after noon of its day
/// where only the day is known). The number of readings where there is none yet.
std::size_t first_reading_after(const EngineRecord& record, const Event& event);

} // namespace evenstroke
