// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/trend/drift.h"

#include "core/trend/drift_run.h"

#include <cmath>

namespace evenstroke::drift {

std::string_view verdict_name(Verdict verdict)
{
    switch (verdict) {
    case Verdict::decimal_slip:
        return "decimal_slip";
    case Verdict::digits_swapped:
        return "digits_swapped";
    case Verdict::unit_slip:
        return "unit_slip";
    case Verdict::cylinders_swapped:
        return "cylinders_swapped";
    case Verdict::implausible:
        return "implausible";
    case Verdict::copied:
        return "copied";
    case Verdict::unsteady:
        return "unsteady";
    }
    return "implausible";
}

Output judge(const Input& input)
{
    DriftRun run(input);
    for (std::size_t i = 0; i < input.readings(); ++i)
        run.take(i);
    return run.finish();
}

ReadingCheck check_last_reading(const Input& input)
{
    ReadingCheck check;
    if (input.readings() == 0)
        return check;
    DriftRun run(input);
    const std::size_t draft = input.readings() - 1;
    for (std::size_t i = 0; i < draft; ++i)
        run.take(i);
    const ReadingOpinion opinion = run.look_at(draft);
    for (const auto& row : opinion.cylinders) {
        check.cylinder_bands.emplace_back();
        for (const CellOpinion& cell : row)
            check.cylinder_bands.back().push_back(usual_band(cell));
    }
    for (const CellOpinion& cell : opinion.engine)
        check.engine_bands.push_back(cell.offset_count > 0 ? usual_band(cell) : std::nullopt);
    check.scatter = opinion.scatter;
    check.doubts = opinion.doubts;
    return check;
}

double years_by_chance(double evidence, std::size_t cylinders)
{
    // Fitted to starts of flags on 500 simulated sound engines (2347 years, 7 cylinders on average, all work
    // recorded). A cylinder above evidence 4.7, 5.0, 5.3, 5.6, 6.0: 253, 138, 57, 28, 9; the engine level above
    // 4.8, 5.1, 5.4, 5.8, 6.2: 239, 142, 73, 31, 12. Beyond evidence 6.5 the form is carried on.
    const double squared = evidence * evidence;
    const double rate = cylinders == 0 ? 0.102 * std::exp(-(squared - 4.8 * 4.8) / 5.2)
                                       : 0.108 * static_cast<double>(cylinders) / 7.0 *
                                             std::exp(-(squared - 4.7 * 4.7) / 4.2);
    constexpr double longest = 1000.0;
    const double years = 1.0 / rate;
    if (!(years < longest))
        return longest;
    if (years < 1.0)
        return std::round(years * 10.0) / 10.0;
    const double digit = years < 10.0 ? 0.1 : (years < 100.0 ? 1.0 : 10.0);
    return std::round(years / digit) * digit;
}

} // namespace evenstroke::drift
