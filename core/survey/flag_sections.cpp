// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/survey/trend_plots.h"

#include "core/explanation/cautions.h"
#include "core/explanation/work_outcome.h"
#include "core/trend/flag_text.h"

#include <algorithm>
#include <cmath>

namespace evenstroke::report {
namespace {

std::string state_now(const Judgement& judgement, const Flag& flag)
{
    if (flag.level_now < Level::note)
        return "no longer standing";
    return level_words(flag.level_now)
           + (flag.raised_at ? " since " + date_text(judgement.record->readings[*flag.raised_at].taken_at.utc) : "");
}

TimePoint time_of(const Context& context, std::size_t reading)
{
    return context.record.readings[reading].taken_at.utc;
}

Table overview(const Context& context)
{
    Table table{"Flags and questions of the period",
                {{"No.", Column::Kind::words}, {"Began", Column::Kind::words}, {"As", Column::Kind::words},
                 {"Subject", Column::Kind::remark}, {"Change since", Column::Kind::words}, {"Now", Column::Kind::words}},
                {}, 1, "Began: the reading whose evidence first passed the threshold. Change since: the estimated start of the change."};
    int number = 0;
    for (const Flag* flag : context.flags)
        table.rows.push_back({{std::to_string(++number), date_text(time_of(context, flag->reading)), level_words(flag->severity),
                               flag_subject(context.judgement, *flag), date_text(flag->since),
                               state_now(context.judgement, *flag)}, true});
    return table;
}

Table moved_table(const Flag& flag)
{
    Table table{{}, {{"Quantity that moved", Column::Kind::words}, {"By", Column::Kind::number},
                     {flag.ramp ? "Each" : "", Column::Kind::words}, {"Standard deviations", Column::Kind::number}}, {}, 1, {}};
    for (const MovedQuantity& moved : flag.moved) {
        const Quantity& of = quantity(moved.quantity);
        const std::string in = moved.percent ? "%" : unit_words(of.unit, PressureKind::none);
        const int decimals = moved.percent ? 1 : of.decimals;
        table.rows.push_back({{of.title, rounded_text(moved.amount, flag.ramp ? decimals + 1 : decimals, Sign::always) + " " + in,
                               flag.ramp ? "month" : "once", rounded_text(std::abs(moved.strength), 1)}, true});
    }
    return table;
}

/// "the customary limit (not the maker's), 5.0 bar below its earlier level," as the subject of a sentence.
std::string limit_as_subject(const TimeToLimit& limit)
{
    return limit.limit_text + (limit.limit_text.find("), ") == std::string::npos ? "" : ",");
}

std::string limit_sentence(const TimeToLimit& limit)
{
    if (!limit.months_5 && !limit.months_50)
        return "If it goes on like this, " + limit_as_subject(limit) + " is not reached within ten years.";
    if (limit.months_95 && *limit.months_95 < 0.5)
        return "By now " + limit_as_subject(limit) + " has been reached (nine times in ten).";
    const std::string early = limit.months_5 ? months_words(*limit.months_5) : std::string("more than ten years");
    const std::string late = limit.months_95 ? months_words(*limit.months_95) : std::string("more than ten years");
    return "If it goes on like this, " + limit_as_subject(limit) + " is reached in " + early + " to " + late
           + " from the last reading (nine times in ten).";
}

std::optional<Plot> evidence_plot(const Context& context, const Flag& flag)
{
    const Evidence* evidence = context.judgement.find_evidence(flag.subject);
    if (!evidence || flag.absolute_limit)
        return std::nullopt;
    Plot plot = empty_plot(context);
    plot.title = "Evidence for a change, " + place_words(context.engine, flag.subject);
    plot.value_title = "grows with each reading that supports it";
    plot.from_zero = true;
    PlotLine line{{}, {}, true, false};
    for (const std::size_t i : context.readings)
        if (i < evidence->amount.size() && evidence->amount[i])
            line.points.push_back({seconds(time_of(context, i)), *evidence->amount[i], PlotPoint::Mark::filled});
    if (line.points.size() < 2)
        return std::nullopt;
    plot.lines.push_back(std::move(line));
    plot.limits.push_back({evidence->threshold, "flag from here"});
    return plot;
}

std::optional<Plot> flag_plot(const Context& context, const Flag& flag)
{
    const Trend* trend = context.judgement.find_trend(flag.quantity, flag.subject);
    if (!trend)
        return std::nullopt;
    const View view = flag.absolute_limit ? View::raw : flag.subject.kind == Place::Kind::cylinder ? View::apart : View::deviation;
    Plot plot = trend_plot(context, *trend, view);
    const double start = seconds(time_of(context, flag.reading));
    for (const PlotPoint& point : plot.lines.front().points)
        if (point.across == start)
            plot.flags.push_back({point.across, point.value, flag.severity});
    return plot.lines.front().points.empty() ? std::nullopt : std::optional<Plot>(std::move(plot));
}

void add_flag(const Context& context, const Flag& flag, int number, Section& section)
{
    auto& blocks = section.blocks;
    blocks.push_back(Heading{std::to_string(number) + ". " + flag_subject(context.judgement, flag) + ": "
                             + standing_words(context.judgement, flag)});
    blocks.push_back(Paragraph{flag.sentence, {}});
    if (!flag.chance_sentence.empty())
        blocks.push_back(Paragraph{flag.chance_sentence, {}});
    if (!flag.moved.empty())
        blocks.push_back(moved_table(flag));
    FieldList fields;
    if (!flag.pattern_words.empty())
        fields.fields.push_back({"Pattern it fits", flag.pattern_words});
    if (!flag.absolute_limit)
        fields.fields.push_back({"Evidence", rounded_text(flag.evidence, 1) + ", threshold " + rounded_text(flag.threshold, 2)});
    if (flag.time_to_limit)
        fields.fields.push_back({"Time to limit", limit_sentence(*flag.time_to_limit)});
    if (const std::string check = next_check_words(context, flag); !check.empty())
        fields.fields.push_back({"To check next", check});
    if (flag.note)
        fields.fields.push_back({"Noted on board", note_text(*flag.note, date_text(flag.note->written_at))});
    fields.fields.push_back({"Work recorded since", work_since(context, flag)});
    if (const std::string outcome = work_without_effect(context.judgement, flag); !outcome.empty())
        fields.fields.push_back({"After the work", outcome});
    blocks.push_back(std::move(fields));
    for (const std::string& name : flag.cautions)
        if (const Caution* caution = find_caution(name))
            blocks.push_back(Paragraph{"Caution, " + lower_first(caution->title) + ": " + caution->short_text,
                                       caution->emergency ? Paragraph::Style::boxed : Paragraph::Style::body});
    if (auto plot = flag_plot(context, flag))
        blocks.push_back(std::move(*plot));
    if (auto plot = evidence_plot(context, flag))
        blocks.push_back(std::move(*plot));
}

/// The whole text of every caution that some flag names, once.
void add_cautions(const Context& context, Section& section)
{
    std::vector<const Caution*> named;
    for (const Caution& caution : all_cautions())
        for (const Flag* flag : context.flags)
            if (std::find(flag->cautions.begin(), flag->cautions.end(), caution.name) != flag->cautions.end()
                && (named.empty() || named.back() != &caution))
                named.push_back(&caution);
    if (named.empty())
        return;
    section.blocks.push_back(Heading{"Cautions in full"});
    for (const Caution* caution : named)
        section.blocks.push_back(Paragraph{caution->title + ". " + caution->long_text + " " + caution->authority, {}});
}

} // namespace

std::string next_check_words(const Context& context, const Flag& flag)
{
    constexpr std::string_view take_a_card = "Take a card";
    const std::string& check = flag.next_check;
    if (check.rfind(take_a_card, 0) != 0 || context.readings.empty() || flag.subject.kind != Place::Kind::cylinder)
        return check;
    const std::string& newest = context.record.readings[context.readings.back()].id;
    const auto& diagrams = context.details.diagrams;
    const bool taken = std::any_of(diagrams.begin(), diagrams.end(), [&](const DiagramLine& one) {
        return one.reading_id == newest && one.cylinder == flag.subject.number;
    });
    if (!taken)
        return check;
    const std::size_t end = check.find_first_of(";.");
    const std::size_t rest = end == std::string::npos ? end : check.find_first_not_of(' ', end + 1);
    return rest == std::string::npos ? std::string() : upper_first(check.substr(rest));
}

std::string work_since(const Context& context, const Flag& flag)
{
    std::string words;
    for (const Event* event : context.events) {
        if (event->date.utc < time_of(context, flag.reading) || event->place != flag.subject)
            continue;
        words += (words.empty() ? "" : "; ") + date_text(event->date.utc) + ", " + lower_first(event_title(*event));
        if (!event->note.empty())
            words += " (" + event->note + ")";
        if (!event->done_by.empty())
            words += ", by " + event->done_by;
    }
    return words.empty() ? "none recorded" : words;
}

Section flags_section(const Context& context)
{
    Section section{"Flags and questions", !context.flags.empty(), {}};
    if (context.flags.empty()) {
        section.blocks.push_back(Paragraph{"No flag and no question began or stood in this period.", {}});
        return section;
    }
    section.blocks.push_back(overview(context));
    section.blocks.push_back(Paragraph{
        "A flag names what moved and what the movement fits. It is no finding about a part: other causes may fit as well, and "
        "only opening or measuring can tell. No flag can be dismissed by hand: it ends when the readings come back to their "
        "level or when recorded work begins a new comparison. What was checked without work is not recorded here, save as a "
        "note among the events.", Paragraph::Style::muted});
    int number = 0;
    for (const Flag* flag : context.flags)
        add_flag(context, *flag, ++number, section);
    add_cautions(context, section);
    return section;
}

} // namespace evenstroke::report
