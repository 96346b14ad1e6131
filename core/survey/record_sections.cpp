// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/explanation/event_effect.h"
#include "core/survey/rounding.h"
#include "core/survey/survey_context.h"

#include <algorithm>
#include <set>

namespace evenstroke::report {
namespace {

Table months_table(const Context& context)
{
    Table table{"Months of the period without a usable reading",
                {{"Month", Column::Kind::words}, {"State", Column::Kind::words}, {"Why", Column::Kind::remark}}, {}, 1, {}};
    for (const MonthState& month : context.summary.months) {
        if (month.state == MonthState::State::usable)
            continue;
        const std::string number = (month.month < 10 ? "0" : "") + std::to_string(month.month);
        table.rows.push_back({{std::to_string(month.year) + "-" + number,
                               month.state == MonthState::State::missing ? "missing" : "not usable", month.reason}, true});
    }
    return table;
}

Table states_table(const Context& context)
{
    Table table{"Every reading of the period",
                {{"Reading", Column::Kind::words}, {"Date", Column::Kind::words}, {"Load", Column::Kind::number},
                 {"State", Column::Kind::words}, {"What decided", Column::Kind::remark}}, {}, 1, {}};
    for (const std::size_t i : context.readings) {
        const Reading& reading = context.record.readings[i];
        const ReadingJudgement& judged = context.judgement.readings[i];
        table.rows.push_back({{reading.name, date_text(reading.taken_at.utc), load_words(judged.load_percent),
                               state_words(judged), judged.steadiness_sentence}, true});
    }
    return table;
}

Table doubts_table(const Context& context)
{
    Table table{"Values that looked mistyped",
                {{"Reading", Column::Kind::words}, {"Value", Column::Kind::words}, {"What is the matter", Column::Kind::remark}}, {}, 1,
                "A doubted value is printed as typed and takes no part in the comparison until it is corrected or confirmed."};
    for (const Doubt& doubt : context.judgement.doubts) {
        if (doubt.reading >= context.record.readings.size() || !context.contains(context.record.readings[doubt.reading].taken_at.utc))
            continue;
        std::string subject = doubt.quantity ? quantity(*doubt.quantity).title : std::string("all quantities");
        if (doubt.place && doubt.place->number > 0)
            subject += ", " + place_words(context.engine, *doubt.place);
        table.rows.push_back({{context.record.readings[doubt.reading].name, subject, doubt.sentence}, true});
    }
    return table;
}

/// All the corrections of one value.
struct CorrectionChain
{
    TimePoint last{};
    std::string what, first_value, value_in_force, who, why;
    int steps = 0;
};

void add_once(std::string& list, const std::string& words)
{
    if (words.empty() || ("; " + list + ";").find("; " + words + ";") != std::string::npos)
        return;
    list += (list.empty() ? "" : "; ") + words;
}

/// One line a value, in the order of their first corrections.
std::vector<CorrectionChain> correction_chains(std::vector<CorrectionLine> lines)
{
    lines.erase(std::remove_if(lines.begin(), lines.end(), [](const CorrectionLine& line) { return line.adds(); }), lines.end());
    std::stable_sort(lines.begin(), lines.end(), [](const CorrectionLine& a, const CorrectionLine& b) { return a.when < b.when; });
    std::vector<CorrectionChain> chains;
    for (const CorrectionLine& line : lines) {
        auto chain = std::find_if(chains.begin(), chains.end(), [&](const CorrectionChain& one) { return one.what == line.what; });
        if (chain == chains.end())
            chain = chains.insert(chain, CorrectionChain{line.when, line.what, line.old_value, {}, {}, {}, 0});
        chain->last = line.when;
        chain->value_in_force = line.new_value;
        ++chain->steps;
        add_once(chain->who, line.who);
        add_once(chain->why, line.reason);
    }
    return chains;
}

Table corrections_table(const Context& context)
{
    Table table{"Values corrected after a reading was closed: what stood there first, and what is in force",
                {{"Last", Column::Kind::words}, {"What", Column::Kind::words}, {"First", Column::Kind::number},
                 {"In force", Column::Kind::number}, {"Steps", Column::Kind::number}, {"By", Column::Kind::remark}, {"Why", Column::Kind::remark}}, {}, 1, {}};
    for (const CorrectionChain& chain : correction_chains(context.details.corrections))
        table.rows.push_back({{date_text(chain.last), chain.what, chain.first_value, chain.value_in_force, std::to_string(chain.steps), chain.who, chain.why}, true});
    return table;
}

/// Values that the program had doubted and somebody read again: the warnings that were overridden.
Table confirmed_table(const Context& context)
{
    Table table{"Values confirmed although the program asked",
                {{"Reading", Column::Kind::words}, {"Value", Column::Kind::words}, {"As typed", Column::Kind::number}}, {}, 1, {}};
    for (std::size_t i = 0; i < context.readings.size(); ++i)
        for (const auto& [key, cell] : context.cells[i]) {
            if (!cell.value || !cell.value->confirmed)
                continue;
            const std::string place = key.second.number > 0 ? ", " + place_words(context.engine, key.second) : "";
            table.rows.push_back({{context.record.readings[context.readings[i]].name, quantity(key.first).title + place,
                                   cell.value->typed + " " + unit_words(cell.value->unit, cell.value->kind)}, true});
        }
    return table;
}

void add_or_say(Section& section, Table table, const std::string& otherwise)
{
    if (table.rows.empty())
        section.blocks.push_back(Paragraph{otherwise, {}});
    else
        section.blocks.push_back(std::move(table));
}

/// Thresholds that the evidence was held against, as the judgement carries them.
std::string threshold_words(const Judgement& judgement)
{
    std::set<std::string> cylinders, engine;
    for (const Evidence& evidence : judgement.evidence)
        (evidence.place.kind == Place::Kind::cylinder ? cylinders : engine).insert(rounded_text(evidence.threshold, 2));
    std::string words;
    for (const std::string& text : cylinders)
        words += (words.empty() ? "" : " and ") + text + " for cylinders";
    for (const std::string& text : engine)
        words += (words.empty() ? "" : ", ") + text + " for the engine as a whole";
    return words.empty() ? "not reached: nothing could be judged" : words;
}

} // namespace

Section events_section(const Context& context)
{
    Section section{"Overhauls, adjustments and other events", false, {}};
    Table table{"Of the period, in order of time",
                {{"Date", Column::Kind::words}, {"Part", Column::Kind::words}, {"Event", Column::Kind::words},
                 {"Hours", Column::Kind::number}, {"Comparison", Column::Kind::words}, {"Note, done by, parts", Column::Kind::remark}},
                {}, 1, {}};
    bool record_book = false;
    for (const Event* event : context.events) {
        const EventKind* kind = find_event_kind(event->kind);
        record_book = record_book || (kind && kind->record_book);
        std::string remark = event->note;
        for (const std::string& more : {event->done_by, event->part})
            if (!more.empty())
                remark += (remark.empty() ? "" : "; ") + more;
        table.rows.push_back({{date_text(event->date.utc), place_words(context.engine, event->place),
                               event_title(*event) + (kind && kind->record_book ? " *" : ""),
                               event->running_hours ? rounded_text(*event->running_hours, 0) : "not given", event_effect_word(*event), remark}, true});
    }
    if (record_book)
        table.note = "* touches a setting or part of the engine's technical file: the entry belongs in the engine's own record "
                     "book of parameters. Evenstroke is no approved record book.";
    add_or_say(section, std::move(table), "No event was recorded in this period.");
    return section;
}

std::size_t added_from_cards(const ReportDetails& details)
{
    return static_cast<std::size_t>(std::count_if(details.corrections.begin(), details.corrections.end(),
                                                  [](const CorrectionLine& line) { return line.adds(); }));
}

Section gaps_section(const Context& context)
{
    Section section{"Missing and unsteady readings, doubts and corrections", false, {}};
    add_or_say(section, months_table(context), "Every month of the period has a usable reading.");
    if (!context.readings.empty())
        section.blocks.push_back(states_table(context));
    add_or_say(section, doubts_table(context), "No value of the period looked mistyped.");
    add_or_say(section, confirmed_table(context), "No doubted value of the period was confirmed as read.");
    add_or_say(section, corrections_table(context), "No value was corrected after its reading was closed.");
    if (const std::size_t added = added_from_cards(context.details); added > 0)
        section.blocks.push_back(Paragraph{(added == 1 ? std::string("1 value was added") : std::to_string(added) + " values were added") +
                                               " from indicator cards after the reading was closed; nothing had stood there before.", {}});
    return section;
}

Section method_section(const Context& context)
{
    Section section{"Method, false alarms, units and rounding", false, {}};
    section.blocks.push_back(Paragraph{
        "Method version " + std::to_string(context.judgement.version) + ". Readings are corrected to reference conditions and "
        "compared with the engine's baseline at the same load; what all cylinders share is taken out; a change is flagged when "
        "the evidence of several readings together passes a threshold (" + threshold_words(context.judgement) + "). After "
        "recorded work the comparison starts anew and needs eight usable readings.", {}});
    section.blocks.push_back(Paragraph{
        "The thresholds were set by simulation so that a sound engine read once a month raises about one flag by chance in five "
        "years, with one overhaul in ten not recorded; questions about work that was not recorded are not counted. Invented "
        "engines were simulated: on this engine the rate may be higher or lower.", {}});
    section.blocks.push_back(Paragraph{
        "Units are printed beside the values; a pressure is a gauge pressure, an absolute pressure or a difference as it says. "
        "Values as read are printed as they were typed. All others are computed unrounded and rounded only for print, half away "
        "from zero, to the decimals that the instrument shows. Dates are in UTC, written year-month-day; narrow headings "
        "say 14 Mar 2031.", {}});
    return section;
}

Section integrity_section(const Context& context)
{
    const ReportDetails& details = context.details;
    FieldList fields;
    fields.fields = {{"Data set, SHA-256", details.data_hash.empty() ? "not given" : details.data_hash},
                     {"Audit log, SHA-256", details.audit_hash.empty() ? "not given" : details.audit_hash},
                     {"Revisions of closed readings", details.revisions ? std::to_string(*details.revisions) : "not given"}};
    Section section{"Integrity of the data", false, {fields}};
    section.blocks.push_back(Paragraph{
        "The first is over the engine's own closed readings in the history, of all time, values in force; what the ship's shared "
        "readings lend is left out. One line a value with nine fields and commas between: reading, taken_at, quantity, cylinder, "
        "value, unit, phase, text, missing_reason. taken_at in UTC to the minute, as 2026-03-14T06:30Z; quantity by its name in the "
        "files; cylinder, value and unit as they were typed (\u201cdegC\u201d stays so, \u201cbar abs\u201d too), the unit empty where "
        "none was; phase before or after, empty for the reading itself; a choice or words under text, and value empty then; an empty "
        "box has not_read, not_fitted or out_of_order as its reason. A field with a comma, semicolon, quotation mark or line break, or with a "
        "blank at an end, stands in quotation marks, its own doubled (RFC 4180). The lines are sorted by their bytes (UTF-8), each "
        "ends with one line feed; the SHA-256 is of all of them. From a readings.csv of the same values it can be made anew and compared.", {}});
    section.blocks.push_back(Paragraph{
        "A closed reading changes only by a correction that keeps the old value. The second hash is of the last line of the audit "
        "log, which is only added to, each line carrying the hash of the one before; the program's command \u201cverify\u201d follows the "
        "whole chain and compares every reading with it.", {}});
    return section;
}

Section sign_off_section(const Context& context)
{
    const ReportDetails& details = context.details;
    Section section{"Signatures", false, {}};
    section.blocks.push_back(SignOff{"Chief engineer", "The readings were taken on board as stated.",
                                     {{"Name", details.chief_engineer}, {"Licence", details.chief_licence}, {"Date", ""}, {"Signature", ""}}});
    section.blocks.push_back(SignOff{"Superintendent", "Seen.",
                                     {{"Name", details.superintendent}, {"Date", ""}, {"Signature", ""}}});
    section.blocks.push_back(SignOff{"Surveyor", "Seen / credited; remarks:", {{"Remarks", ""}, {"", ""}, {"Name", ""}, {"Date", ""}, {"Signature", ""}}});
    return section;
}

} // namespace evenstroke::report
