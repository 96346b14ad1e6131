// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/explanation/explanation_words.h"

#include "core/explanation/cautions.h"
#include "core/explanation/change_course.h"
#include "core/explanation/event_effect.h"
#include "core/sentence_words.h"
#include "core/trend/flag_text.h"

#include <algorithm>
#include <chrono>
#include <cmath>
#include <utility>

namespace evenstroke {
namespace {

using Says = QuantityEvidence::Says;
using namespace std::chrono_literals;

constexpr double fits_from = 0.8;          ///< share explained from which "fits" is said without "partly"
constexpr std::size_t course_needs = 3;    ///< readings from which its course over time is spoken of

/// A crankcase pressure is no reading of a crosshead engine, nor a piston coolant of a trunk piston engine.
bool can_be_read(std::size_t index, bool two_stroke)
{
    const FaultQuantity& of = fault_quantities()[index];
    const auto id = find_quantity(of.read_as.empty() ? of.name : of.read_as);
    return !id || quantity(*id).only_for.empty() || (quantity(*id).only_for == "two-stroke") == two_stroke;
}

std::string words_of(const QuantityEvidence& evidence)
{
    const std::string name = fault_quantity_words(evidence.quantity);
    if (!evidence.amount)
        return name;
    const double noise = fault_quantities()[evidence.quantity].noise, expected = evidence.expected.value_or(0.0);
    const bool should_move = std::abs(expected) >= 0.5 * noise, moved = std::abs(*evidence.amount) >= 0.5 * noise;
    const std::string seen = name + " " + (moved ? change_words(evidence.quantity, *evidence.amount) : "as usual");
    if (evidence.says == Says::fits)
        return seen;
    return seen + (should_move ? ", where about " + change_words(evidence.quantity, expected) + " would go with the rest of it"
                               : ", which should not move with it");
}

std::string course_sentence(const Fault& fault, const ChangeWindow& window)
{
    if (fault.course == Fault::Course::any || window.readings < course_needs)
        return {};
    const bool fits = (fault.course == Fault::Course::creeping) == window.ramp;
    return std::string("That it ") + (window.ramp ? "came little by little" : "came at once") + (fits ? " fits this cause." : " speaks rather against this cause.");
}

bool concerns(const Event& event, const Place& subject)
{
    if (event.place.kind == Place::Kind::cylinder)
        return event.place == subject;
    return event.kind != "note" && event.kind != "hull_cleaned" && event.kind != "propeller_polished";
}

/// Events between the last reading that was as usual and the first that was not.
std::vector<std::string> events_before(const EngineRecord& record, const Place& subject, std::size_t onset)
{
    const TimePoint until = record.readings[onset].taken_at.utc;
    const TimePoint from = (onset == 0 ? until : record.readings[onset - 1].taken_at.utc) - 24h;
    std::vector<std::string> words;
    for (const Event& event : record.events)
        if (event.date.utc >= from && event.date.utc <= until && concerns(event, subject))
            words.push_back(event_words(event));
    return words;
}

std::string readings_words(std::size_t count)
{
    return count == 1 ? "1 reading" : std::to_string(count) + " readings";
}

std::string history_sentence(const SubjectExplanation& subject, const EngineRecord& record, const ChangeWindow& window)
{
    const std::string since = short_date(record.readings[window.onset - 1].taken_at.utc);
    std::string text = window.at_edge ? "It stands for " + readings_words(window.readings) + " or more."
                       : window.readings == 1 ? "Only the last reading shows it; before that nothing did."
                       : window.ramp ? "It came little by little since " + since + ", over " + readings_words(window.readings) + "."
                                     : "It came at once after " + since + " and stands for " + readings_words(window.readings) + ".";
    // The flag beside it goes by the drift of what moved most, and dates and measures that alone.
    if (window.readings > 1)
        text += std::string(" This is all that moved taken together; sizes are ") +
                (window.ramp ? "what a straight line from there has reached by now."
                             : "the mean of those readings against the level before.");
    const auto events = events_before(record, subject.subject, window.onset);
    if (!events.empty())
        text += " Entered about then: " + and_list(events) + ".";
    return text;
}

std::vector<std::string> moved_words(const ChangeWindow& window)
{
    std::vector<std::pair<double, std::string>> moved;
    for (std::size_t k = 0; k < window.changes.size(); ++k)
        if (const auto& change = window.changes[k];
            change && moved_clearly(*change))
            moved.emplace_back(-std::abs(change->amount), fault_quantity_words(k) + " " + change_words(k, *window.amounts[k]));
    std::sort(moved.begin(), moved.end());
    std::vector<std::string> words;
    for (const auto& one : moved)
        words.push_back(one.second);
    return words;
}

/// A flag of the drift method stands, and nothing here supports a cause.
bool is_only_flagged(const SubjectExplanation& subject)
{
    return subject.flagged && subject.history.empty() && subject.causes.empty() && subject.cautions.empty();
}

bool was_read(const SubjectExplanation& subject, const std::string& quantity_name)
{
    for (const Hypothesis& cause : subject.causes)
        for (const QuantityEvidence& evidence : cause.evidence)
            if (fault_quantities()[evidence.quantity].name == quantity_name && evidence.says != QuantityEvidence::Says::not_read)
                return true;
    return false;
}

std::string cannot_tell_sentence(const SubjectExplanation& subject)
{
    std::vector<std::string> equals;
    std::string observations;
    for (const Hypothesis& one : subject.causes) {
        if (!one.as_likely_as_first)
            continue;
        equals.push_back(one.fault->title);
        const TellingObservation found = telling_observation(subject.causes.front().fault->id, one.fault->id);
        std::string observation = found.words.empty() ? one.fault->title + ": " + lower_first(one.fault->sets_apart) : found.words;
        if (was_read(subject, found.quantity))
            observation += " It was read and does not part them clearly: read it again with the next reading.";
        if (observations.find(observation) == std::string::npos)
            observations += " " + observation;
    }
    if (equals.empty())
        return {};
    equals.insert(equals.begin(), subject.causes.front().fault->title);
    std::string all;
    for (const std::string& one : equals)
        all += (all.empty() ? "" : "; ") + one;
    return "These readings cannot tell apart: " + all + ". What would:" + observations;
}

} // namespace

std::string fault_quantity_words(std::size_t index)
{
    const FaultQuantity& of = fault_quantities()[index];
    if (of.form == FaultQuantity::Form::speed_at_power)
        return "revolutions at this power";
    const auto id = find_quantity(of.read_as.empty() ? of.name : of.read_as);
    return id ? lower_first(quantity(*id).title) : of.name;
}

std::string change_words(std::size_t index, double amount)
{
    const FaultQuantity& of = fault_quantities()[index];
    const bool share = of.unit == "1"; // an efficiency: in points of per cent
    const std::string symbol = share ? " points" : " " + of.unit;
    return two_digits(std::abs(amount) * (share ? 100.0 : 1.0)) + symbol + (amount > 0.0 ? " up" : " down");
}

void word_hypothesis(Hypothesis& hypothesis, const ChangeWindow* window, bool two_stroke)
{
    const Fault& fault = *hypothesis.fault;
    hypothesis.what = (hypothesis.in_the_rest                            ? "And perhaps also: "
                       : !hypothesis.explained || *hypothesis.explained >= fits_from ? "The readings fit: "
                                                                         : "The readings partly fit: ") +
                      fault.title + ".";
    for (QuantityEvidence& evidence : hypothesis.evidence) {
        evidence.words = words_of(evidence);
        if (evidence.says == Says::fits)
            hypothesis.fits.push_back(evidence.words);
        else if (evidence.says == Says::partly_fits)
            hypothesis.fits.push_back(evidence.words + " (partly fits)");
        else if (evidence.says == Says::against)
            hypothesis.against.push_back(evidence.words);
        else if (evidence.says == Says::not_read && can_be_read(evidence.quantity, two_stroke))
            hypothesis.not_read.push_back(evidence.words);
    }
    if (window)
        hypothesis.course = course_sentence(fault, *window);
    hypothesis.check_next = fault.check_next;
    hypothesis.urgency = urgency_sentence(fault.urgency);
    hypothesis.cautions = cautions_for(fault.id, {}, two_stroke);
}

/// Why the causes stand in this order. The share explained is no part of it: it is cut where a change is far beyond the
/// noise, and says little of causes that move the same things.
void word_order(std::vector<Hypothesis>& causes)
{
    for (Hypothesis& cause : causes) {
        if (!cause.explained)
            continue;
        if (cause.in_the_rest)
            cause.order = "after the first is taken off what moved";
        else if (&cause == &causes.front())
            cause.order = causes.size() > 1 ? "first by sizes, dates, what stayed as usual and how often such a fault is met" : "";
        else if (cause.as_likely_as_first)
            cause.order = "as likely as the first, as far as these readings can tell";
        else if (cause.odds && *cause.odds < 1.0)
            cause.order = "odds of about 1 to " + two_digits(std::min(1.0 / *cause.odds, 1000.0)) +
                          (*cause.odds < 1e-3 ? " or less" : "") + " against the first";
    }
}

void word_subject(SubjectExplanation& subject, const EngineRecord& record, const ChangeWindow* window)
{
    const std::string who = subject_text(record.engine, subject.subject);
    if (window) {
        subject.answer = who + " is out of its usual" +
                         (subject.causes.empty() ? ", and it does not look like any fault on the list." : ".");
        subject.history = history_sentence(subject, record, *window);
        subject.moved = moved_words(*window);
    } else if (!subject.causes.empty()) {
        subject.answer = who + ": something looks miswritten at this reading.";
    } else {
        subject.answer = who + " has a value that belongs to the alarms and not to a trend.";
    }
    subject.cannot_tell = cannot_tell_sentence(subject);
    word_order(subject.causes);
}

std::string whole_sentence(const Explanation& explanation)
{
    if (!explanation.reading)
        return "There is no reading yet.";
    const EngineRecord& record = *explanation.record;
    const std::string at = " at reading " + record.readings[*explanation.reading].name + " (" +
                           short_date(record.readings[*explanation.reading].taken_at.utc) + ").";
    std::vector<std::string> who, only_flagged;
    for (const SubjectExplanation& subject : explanation.subjects)
        (is_only_flagged(subject) ? only_flagged : who).push_back(lower_first(subject_text(record.engine, subject.subject)));
    if (!who.empty())
        return upper_first(and_list(who)) + (who.size() == 1 ? " is" : " are") + " out of the usual" + at;
    if (!only_flagged.empty())
        return "No cause is borne out" + at + " A flag stands on " + and_list(only_flagged) + ".";
    if (explanation.too_few_readings)
        return "There are too few readings to say what is usual" + at;
    return "Nothing is out of the usual" + at;
}

} // namespace evenstroke
