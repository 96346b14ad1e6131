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
    // Fitted to rates measured on simulated sound engines; above evidence 5.1 the Gaussian tail is carried
    // on.
    const double rate = cylinders == 0 ? 0.122 * std::exp(-(evidence * evidence - 17.64) / 6.0)
                                       : 0.262 * static_cast<double>(cylinders) / 8.5 *
                                             std::exp(-(evidence * evidence - 16.81) / 3.5);
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
