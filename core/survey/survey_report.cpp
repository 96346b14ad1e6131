// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/survey/survey_report.h"

#include "core/survey/survey_context.h"

#include <algorithm>

namespace evenstroke {
namespace {

using namespace report;

/// The history as it was known at the end of the period, so that a report of a past year says what it said then.
std::shared_ptr<const EngineRecord> record_until(const EngineRecord& record, TimePoint to)
{
    auto cut = std::make_shared<EngineRecord>(record);
    std::erase_if(cut->readings, [&](const Reading& reading) { return reading.taken_at.utc > end_of_day(to); });
    std::erase_if(cut->events, [&](const Event& event) { return event.date.utc > end_of_day(to); });
    return cut;
}

bool reaches_beyond(const EngineRecord& record, TimePoint to)
{
    return std::any_of(record.readings.begin(), record.readings.end(),
                       [&](const Reading& reading) { return reading.taken_at.utc > end_of_day(to); });
}

using Maker = Section (*)(const Context&);

std::vector<Maker> section_makers(ReportDepth depth)
{
    if (depth == ReportDepth::brief)
        return {title_section, summary_section, items_section, sign_off_section};
    // A surveyor's own order: what and when, the outcome and what stands behind it, the values, what they were held
    // against, then the rest of the evidence.
    return {title_section,     summary_section,  flags_section,       items_section,  strips_section,    cylinder_values_section, words_section,
            engine_values_section, reference_section, baseline_section, limits_section, trends_section,  diagrams_section,
            events_section,    gaps_section,     instruments_section, method_section, integrity_section, sign_off_section};
}

} // namespace

SurveyReport make_survey_report(const Judgement& judgement, const ReportPeriod& period, const ReportDetails& details)
{
    if (reaches_beyond(*judgement.record, period.to))
        return make_survey_report(judge(record_until(*judgement.record, period.to)), period, details);
    const Context context(judgement, period, details);
    SurveyReport report;
    report.period = period;
    report.details = details;
    report.summary = context.summary;
    report.number = details.number.empty() ? context.engine.name + " " + date_text(details.date) : details.number;
    report.ship = context.record.vessel.name;
    report.engine = context.engine.name;
    for (const Maker make : section_makers(details.depth)) {
        Section section = make(context);
        if (!section.blocks.empty())
            report.sections.push_back(std::move(section));
    }
    return report;
}

} // namespace evenstroke
