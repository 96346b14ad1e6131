// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/survey/survey_context.h"

#include <algorithm>
#include <chrono>

namespace evenstroke {
namespace {

using namespace std::chrono;

/// A month is asked for when at least this many of its days lie in the period. Common practice, no source.
constexpr int days_that_count = 15;

year_month_day day_of(TimePoint time)
{
    return year_month_day(floor<days>(time));
}

std::vector<MonthState> months_of(const ReportPeriod& period)
{
    std::vector<MonthState> months;
    const year_month_day last = day_of(period.to);
    if (period.to < period.from)
        return months;
    const year_month_day first = day_of(period.from);
    for (year_month month = first.year() / first.month(); month <= last.year() / last.month(); month += std::chrono::months(1)) {
        const sys_days begin = std::max(sys_days(month / 1), floor<days>(period.from));
        const sys_days end = std::min(sys_days(month / std::chrono::last), floor<days>(period.to));
        if ((end - begin).count() + 1 >= days_that_count)
            months.push_back({static_cast<int>(month.year()), static_cast<unsigned>(month.month()), MonthState::State::missing, {}});
    }
    return months;
}

std::string reason_of(const ReadingJudgement& reading)
{
    if (!reading.load_percent)
        return "load not known";
    if (reading.steadiness == Steadiness::unsteady)
        return reading.steadiness_sentence.empty() ? "not steady" : reading.steadiness_sentence;
    return "the values scatter more than usual: the load was probably not steady";
}

void judge_months(const Judgement& judgement, const ReportPeriod& period, ReportSummary& summary)
{
    const auto& readings = judgement.record->readings;
    for (std::size_t i = 0; i < readings.size(); ++i) {
        const TimePoint at = readings[i].taken_at.utc;
        if (at < period.from || at > report::end_of_day(period.to))
            continue;
        ++summary.taken;
        const ReadingJudgement* judged = i < judgement.readings.size() ? &judgement.readings[i] : nullptr;
        const bool good = judged && report::usable(*judged);
        summary.usable += good ? 1 : 0;
        const year_month_day day = day_of(at);
        for (MonthState& month : summary.months) {
            if (month.year != static_cast<int>(day.year()) || month.month != static_cast<unsigned>(day.month()))
                continue;
            if (good)
                month = {month.year, month.month, MonthState::State::usable, {}};
            else if (month.state == MonthState::State::missing)
                month = {month.year, month.month, MonthState::State::unsteady, judged ? reason_of(*judged) : "not judged"};
        }
    }
    for (MonthState& month : summary.months)
        if (month.state == MonthState::State::missing)
            month.reason = "no reading was taken";
}

void sort_flags(const Judgement& judgement, const ReportPeriod& period, ReportSummary& summary)
{
    for (const Flag* flag : judgement.standing_flags())
        summary.standing.push_back(report::flag_line(judgement, *flag));
    for (const Flag& flag : judgement.flags) {
        const TimePoint start = judgement.record->readings[flag.reading].taken_at.utc;
        if (start < period.from || start > report::end_of_day(period.to))
            continue;
        ++summary.began;
        if (flag.level_now < Level::note)
            summary.closed.push_back(report::flag_line(judgement, flag));
    }
}

} // namespace

ReportPeriod last_months(TimePoint to, int count)
{
    const year_month_day end = day_of(to);
    year_month_day begin = end - std::chrono::months(count);
    if (!begin.ok()) // 31 March less one month
        begin = begin.year() / begin.month() / last;
    return {sys_days(begin) + days(1), sys_days(end)};
}

ReportSummary summarize(const Judgement& judgement, const ReportPeriod& period)
{
    ReportSummary summary;
    summary.months = months_of(period);
    summary.asked = summary.months.size();
    judge_months(judgement, period, summary);
    const auto& readings = judgement.record->readings;
    for (const Doubt& doubt : judgement.doubts)
        if (doubt.reading < readings.size() && readings[doubt.reading].taken_at.utc >= period.from)
            ++summary.doubts;
    sort_flags(judgement, period, summary);
    return summary;
}

} // namespace evenstroke
