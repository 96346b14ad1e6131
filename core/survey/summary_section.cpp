// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/survey/survey_context.h"

#include <algorithm>

namespace evenstroke::report {
namespace {

std::string month_name(const MonthState& month)
{
    const std::string number = std::to_string(month.month);
    return std::to_string(month.year) + "-" + (number.size() < 2 ? "0" + number : number);
}

std::string months_in(const ReportSummary& summary, MonthState::State state)
{
    std::string names;
    for (const MonthState& month : summary.months)
        if (month.state == state)
            names += (names.empty() ? "" : ", ") + month_name(month);
    return names.empty() ? "none" : names;
}

std::string running_hours(const Context& context)
{
    const auto hours = find_quantity("engine_running_hours");
    for (auto row = context.cells.rbegin(); hours && row != context.cells.rend(); ++row)
        if (const auto found = row->find({*hours, Place::engine()}); found != row->end() && found->second.value)
            return found->second.value->typed + " h";
    return "not read";
}

FieldList summary_fields(const Context& context)
{
    const ReportSummary& summary = context.summary;
    FieldList fields;
    fields.short_ones = true;
    const std::string asked = summary.asked == 1 ? "1 asked for" : std::to_string(summary.asked) + " asked for (one a month)";
    fields.fields = {{"Readings", asked + ", " + std::to_string(summary.taken) + " taken"},
                     {"Usable for comparison", std::to_string(summary.usable)},
                     {"Months without a reading", months_in(summary, MonthState::State::missing)},
                     {"Months with none usable", months_in(summary, MonthState::State::unsteady)},
                     {"Values doubted", std::to_string(summary.doubts)},
                     {"Running hours, last reading", running_hours(context)},
                     {"Events recorded", std::to_string(context.events.size())},
                     {"Flags, questions begun", std::to_string(summary.began)},
                     {"Of these, no longer standing", std::to_string(summary.closed.size())},
                     {"State, last reading", level_words(context.judgement.level)}};
    return fields;
}

constexpr std::size_t most_named = 8; ///< in one line of the summary; the sections hold them all

/// "a; b; and 3 more"
std::string listed(const std::vector<std::string>& parts)
{
    std::string words;
    for (std::size_t i = 0; i < std::min(parts.size(), most_named); ++i)
        words += (words.empty() ? "" : "; ") + parts[i];
    if (parts.size() > most_named)
        words += "; and " + std::to_string(parts.size() - most_named) + " more";
    return words.empty() ? "none" : words;
}

bool stands(const Flag& flag) { return flag.level_now >= Level::note; }

/// Flags that did something in the period, each with the day on which it did.
template <typename Day>
std::string flags_listed(const Context& context, Day day)
{
    std::vector<std::string> parts;
    for (const Flag* flag : context.flags)
        if (const std::optional<std::size_t> reading = day(*flag); reading && *reading < context.record.readings.size()) {
            const TimePoint at = context.record.readings[*reading].taken_at.utc;
            if (context.contains(at))
                parts.push_back(date_text(at) + ", " + lower_first(flag_subject(context.judgement, *flag)));
        }
    return listed(parts);
}

/// Since the first day of the period: earlier reports are not known to the history.
FieldList changes(const Context& context)
{
    using Reading = std::optional<std::size_t>;
    std::vector<std::string> work;
    for (const Event* event : context.events)
        work.push_back(date_text(event->date.utc) + ", " + lower_first(event_title(*event)) + " (" + place_words(context.engine, event->place) + ")");
    std::size_t settings = 0;
    for (const EngineChangeLine& change : context.details.engine_changes)
        settings += context.contains(change.when) ? 1 : 0;
    const std::size_t added = added_from_cards(context.details);
    FieldList fields;
    fields.fields = {{"Flags, questions begun", flags_listed(context, [](const Flag& flag) { return Reading(flag.reading); })},
                     {"Raised in level", flags_listed(context, [](const Flag& flag) { return flag.raised_at; })},
                     {"No longer standing, last seen", flags_listed(context, [](const Flag& flag) {
                          return stands(flag) || flag.carrying.empty() ? Reading() : Reading(flag.carrying.back());
                      })},
                     {"Work and other events", listed(work)},
                     {"Values corrected later", std::to_string(context.details.corrections.size() - added)},
                     {"Values added later", added == 0 ? "none" : std::to_string(added) + " from indicator cards"},
                     {"Settings of the engine", settings == 0 ? "no change recorded" : std::to_string(settings) + (settings == 1 ? " change" : " changes") + ", under \u201cLimits in force\u201d"}};
    return fields;
}

/// What each flag asks to be done and what was. The program keeps no list of actions of its own.
Table actions(const Context& context)
{
    Table table{"What the flags ask for: open while the flag stands, closed when it no longer does",
                {{"No.", Column::Kind::words}, {"Subject", Column::Kind::remark}, {"To check", Column::Kind::remark},
                 {"Work recorded since", Column::Kind::remark}, {"State", Column::Kind::words}}, {}, 1,
                "Derived from flags and events. Actions agreed elsewhere, and who is to do them, are not recorded here."};
    int number = 0;
    for (const Flag* flag : context.flags)
        table.rows.push_back({{std::to_string(++number), flag_subject(context.judgement, *flag), next_check_words(context, *flag),
                               work_since(context, *flag), stands(*flag) ? "open" : "closed"}, true});
    return table;
}

} // namespace

Section summary_section(const Context& context)
{
    Section section{"Summary", false, {summary_fields(context), Heading{"Flags standing at the end of the period"}}};
    if (context.summary.standing.empty())
        section.blocks.push_back(Paragraph{"None. No quantity has left its own level beyond the thresholds of the method.", {}});
    for (const std::string& line : context.summary.standing)
        section.blocks.push_back(Paragraph{upper_first(line), {}});
    if (!context.flags.empty() && context.details.depth != ReportDepth::brief)
        section.blocks.push_back(Paragraph{"Each flag with its workings: under \u201cFlags and questions\u201d" + page_reference("Flags and questions")
                                               + "; the readings behind it: \u201cTrends\u201d" + page_reference("Trends") + ".", {}});
    section.blocks.push_back(Heading{"What changed in the period"});
    section.blocks.push_back(changes(context));
    section.blocks.push_back(Paragraph{"The day of the last report is not recorded here; the changes are counted from the first day of "
                                       "this report's period.", Paragraph::Style::muted});
    if (!context.readings.empty() && context.readings.front() == 0 && !context.summary.months.empty())
        section.blocks.push_back(Paragraph{"The history holds no reading before "
                                               + date_text(context.record.readings.front().taken_at.utc) + ".",
                                           Paragraph::Style::muted});
    section.blocks.push_back(Heading{"Actions"});
    Table table = actions(context);
    if (table.rows.empty())
        section.blocks.push_back(Paragraph{"None open, none closed: no flag stood in this period. Actions agreed elsewhere are not recorded here.", {}});
    else
        section.blocks.push_back(std::move(table));
    return section;
}

} // namespace evenstroke::report
