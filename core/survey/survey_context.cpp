// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/survey/survey_context.h"

#include "core/survey/rounding.h"

#include <algorithm>
#include <cctype>

namespace evenstroke::report {

Context::Context(const Judgement& whole, const ReportPeriod& wanted_period, const ReportDetails& report_details)
    : judgement(whole), record(*whole.record), engine(whole.record->engine), period(wanted_period),
      details(report_details), summary(summarize(whole, wanted_period))
{
    for (std::size_t i = 0; i < record.readings.size(); ++i) {
        if (!contains(record.readings[i].taken_at.utc))
            continue;
        readings.push_back(i);
        auto& row = cells.emplace_back();
        for (const Value& value : record.readings[i].values)
            if (value.phase == Phase::reading)
                row.try_emplace({value.quantity, value.place}, ValueCell{&value, nullptr});
        if (i < judgement.readings.size())
            for (const JudgedValue& judged : judgement.readings[i].values)
                row[{judged.quantity, judged.place}].judged = &judged;
    }
    for (const Event& event : record.events)
        if (contains(event.date.utc))
            events.push_back(&event);
    for (const Flag& flag : judgement.flags) {
        const auto in_period = [&](std::size_t i) { return i < record.readings.size() && contains(record.readings[i].taken_at.utc); };
        const bool stood_here = !flag.carrying.empty() && in_period(flag.carrying.back());
        if (in_period(flag.reading) || stood_here || flag.level_now >= Level::note)
            flags.push_back(&flag);
    }
}

bool Context::contains(TimePoint time) const
{
    return time >= period.from && time <= end_of_day(period.to);
}

std::vector<std::size_t> Context::printed_readings() const
{
    const std::size_t most = details.depth == ReportDepth::full ? readings.size() : 12;
    std::vector<std::size_t> wanted;
    for (std::size_t i = readings.size() > most ? readings.size() - most : 0; i < readings.size(); ++i)
        wanted.push_back(i);
    return wanted;
}

TimePoint end_of_day(TimePoint day)
{
    return std::chrono::floor<std::chrono::days>(day) + std::chrono::days(1) - std::chrono::seconds(1);
}

std::string unit_words(UnitId id, PressureKind kind)
{
    const Unit& known = unit(id);
    if (known.dimension == Dimension::number)
        return {};
    std::string words(known.symbol);
    if (known.dimension == Dimension::pressure && kind == PressureKind::gauge)
        words += " gauge";
    if (known.dimension == Dimension::pressure && kind == PressureKind::absolute)
        words += " absolute";
    return words;
}

std::string unit_of(const Quantity& quantity)
{
    return quantity.type == ValueType::number ? unit_words(quantity.unit, quantity.kind) : std::string();
}

std::string deviation_unit(const Quantity& quantity)
{
    return unit_words(quantity.unit, PressureKind::none);
}

std::string months_words(double months)
{
    const std::string number = rounded_text(months, months < 10.0 ? 1 : 0);
    return number + (number == "1" || number == "1.0" ? " month" : " months");
}

std::string load_words(const std::optional<double>& load_percent)
{
    return load_percent ? rounded_text(*load_percent, 0) + " %" : "load not known";
}

std::string missing_words(MissingReason reason)
{
    switch (reason) {
    case MissingReason::not_fitted: return "not fitted";
    case MissingReason::out_of_order: return "out of order";
    case MissingReason::none:
    case MissingReason::not_read: break;
    }
    return "not read";
}

std::string source_words(const std::string& source)
{
    return source.empty() ? "source not given" : source;
}

std::string event_title(const Event& event)
{
    const EventKind* kind = find_event_kind(event.kind);
    return kind ? kind->title : event.kind;
}

bool usable(const ReadingJudgement& reading)
{
    return reading.steadiness != Steadiness::unsteady && !reading.poor && reading.load_percent.has_value();
}

std::string state_words(const ReadingJudgement& reading)
{
    std::string words = steadiness_word(reading.steadiness);
    if (reading.poor)
        words += ", but the values scatter more than usual";
    if (!reading.load_percent)
        words += ", load not known";
    return words;
}

std::string flag_subject(const Judgement& judgement, const Flag& flag)
{
    return upper_first(place_words(judgement.record->engine, flag.subject)) + ", " + lower_first(quantity(flag.quantity).title);
}

std::string level_words(Level level)
{
    switch (level) {
    case Level::note: return "\u25cb " + level_word(level);
    case Level::ask: return "\u25c7 " + level_word(level);
    case Level::watch: return "\u25d0 " + level_word(level);
    case Level::act: return "\u25a0 " + level_word(level);
    case Level::no_data:
    case Level::learning:
    case Level::quiet: break;
    }
    return level_word(level);
}

std::string standing_words(const Judgement& judgement, const Flag& flag)
{
    const auto day = [&](std::size_t reading) { return date_text(judgement.record->readings[reading].taken_at.utc); };
    if (flag.level_now == flag.severity)
        return level_words(flag.severity) + " since " + day(flag.reading);
    const std::string began = "began " + day(flag.reading) + " as " + level_word(flag.severity);
    if (flag.level_now < Level::note)
        return began + ", no longer standing";
    const std::string now = level_words(flag.level_now);
    return (flag.raised_at ? now + " since " + day(*flag.raised_at) : now + " now") + " (" + began + ")";
}

std::string flag_line(const Judgement& judgement, const Flag& flag)
{
    return standing_words(judgement, flag) + ": " + flag.sentence;
}

} // namespace evenstroke::report
