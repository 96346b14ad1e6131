// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/reading/relations.h"
#include "core/review/review_context.h"

#include <algorithm>
#include <set>

/// The steps that come before anything is called a fault: what was typed, whether it was steady, what the power was.
namespace evenstroke::reviewing {
namespace {

std::string count_words(std::size_t count, const std::string& one, const std::string& many)
{
    return std::to_string(count) + " " + (count == 1 ? one : many);
}

/// Everything the finding speaks of was read again.
bool all_confirmed(const ReviewContext& context, const Relation& relation)
{
    return !relation.concerned.empty() &&
           std::all_of(relation.concerned.begin(), relation.concerned.end(), [&](const ConcernedValue& box) {
               const Value* value = context.reading.find(box.quantity, box.place);
               return value && value->confirmed;
           });
}

/// A cylinder that a flag already speaks of reads oddly because of what is the matter with it, not because of a slip.
bool told_by_a_flag(const ReviewContext& context, const Relation& relation)
{
    return !relation.impossible &&
           std::any_of(relation.concerned.begin(), relation.concerned.end(), [&](const ConcernedValue& box) {
               return box.place.kind == Place::Kind::cylinder &&
                      std::any_of(context.standing.begin(), context.standing.end(), [&](const Flag* flag) {
                          return flag->subject == box.place && speaks_of(*flag, box.quantity);
                      });
           });
}

ReviewLine words_line(std::string words, std::optional<QuantityId> quantity, Place place, std::string verdict)
{
    ReviewLine line;
    line.words = std::move(words);
    line.quantity = quantity;
    line.place = place;
    line.level = Level::note;
    line.verdict = std::move(verdict);
    return line;
}

std::string baseline_sentence(const ReviewContext& context)
{
    if (context.outside.empty())
        return {};
    if (!context.conditions.load_percent)
        return " No load was typed: what follows is shown, and nothing in it is judged against the baseline.";
    return std::string(" The baseline does not reach this load") + (context.conditions.mode.empty() ? "" : " in this mode") +
           ": what follows is shown, and nothing in it is called a fault.";
}

} // namespace

ReviewSection entry_section(const ReviewContext& context)
{
    ReviewSection section{ReviewTopic::entry, "As typed", {}, Level::quiet, {}};
    std::size_t doubts = 0;
    for (const Doubt& doubt : context.judgement.doubts) {
        if (doubt.reading != context.index || doubt.verdict == Doubt::Verdict::unsteady)
            continue;
        const Value* value = doubt.quantity && doubt.place ? context.reading.find(*doubt.quantity, *doubt.place) : nullptr;
        if (value && value->confirmed)
            continue;
        section.lines.push_back(words_line(doubt.sentence, doubt.quantity, doubt.place.value_or(Place::engine()),
                                           doubt.suggestion ? "meant " + *doubt.suggestion + "?" : "settle first"));
        ++doubts;
    }
    const auto& record = *context.judgement.record;
    const ReadingContext around{std::span(record.readings).first(context.index), record.events, std::nullopt};
    for (const Relation& relation : check_relations(context.engine, context.reading, around)) {
        if (all_confirmed(context, relation) || told_by_a_flag(context, relation))
            continue;
        ReviewLine line = words_line(relation.sentence, std::nullopt, Place::engine(),
                                     relation.impossible ? "cannot be" : "look again");
        if (!relation.concerned.empty()) {
            line.quantity = relation.concerned.front().quantity;
            line.place = relation.concerned.front().place;
        }
        section.lines.push_back(std::move(line));
    }
    const auto from_cards = static_cast<std::size_t>(std::count_if(context.reading.values.begin(), context.reading.values.end(), [](const Value& value) {
        return value.origin == Origin::card && value.number;
    }));
    const std::string cards = from_cards == 0 ? "" : count_words(from_cards, "value comes", "values come") + " from indicator cards.";
    if (section.lines.empty()) {
        section.sentence = upper_first(cards);
        return section;
    }
    section.level = Level::note;
    const std::size_t relations = section.lines.size() - doubts;
    std::vector<std::string> what;
    if (doubts > 0)
        what.push_back(count_words(doubts, "value is in doubt", "values are in doubt"));
    if (relations > 0)
        what.push_back(count_words(relations, "comparison between values does not fit", "comparisons between values do not fit"));
    section.sentence = upper_first(and_list(what)) + ". Settle this first: it spoils everything below." + (cards.empty() ? "" : " " + upper_first(cards));
    return section;
}

ReviewSection steadiness_section(const ReviewContext& context)
{
    ReviewSection section{ReviewTopic::steadiness, "Steadiness", {}, Level::quiet, {}};
    for (const SteadinessFinding& finding : steadiness_findings(context.reading, context.generating_set)) {
        const Quantity& q = quantity(finding.quantity);
        ReviewLine line;
        line.words = finding.before ? q.title + ", change" : q.title;
        line.quantity = finding.quantity;
        line.unit = finding.unit;
        line.decimals = finding.unit == "%" ? 2 : finding.unit == "min" ? 0 : q.decimals;
        line.value = finding.amount;
        line.level = finding.verdict == Steadiness::steady ? Level::quiet : Level::note;
        line.verdict = steadiness_word(finding.verdict) + ": " + finding.words;
        section.lines.push_back(std::move(line));
    }
    const Steadiness verdict = context.judged.steadiness;
    if (verdict != Steadiness::steady)
        section.sentence = context.judged.steadiness_sentence;
    const bool poor = context.judged.poor && context.outside.empty();
    if (poor && verdict != Steadiness::unsteady)
        section.sentence += std::string(section.sentence.empty() ? "" : " ") +
                            "The values scatter more than they do when the load stands still.";
    if (context.held == "unsteady")
        section.sentence += " What follows is shown, and nothing in it is called a fault.";
    if (verdict == Steadiness::unsteady || verdict == Steadiness::usable_with_care || poor)
        section.level = Level::note;
    return section;
}

ReviewSection power_section(const ReviewContext& context, const PowerAgreement& power)
{
    ReviewSection section{ReviewTopic::power, "Power", {}, Level::quiet, {}};
    for (std::size_t i = 0; i < power.estimates.size(); ++i) {
        const PowerEstimate& estimate = power.estimates[i];
        ReviewLine line;
        line.words = estimate.words;
        line.unit = "kW";
        line.decimals = 0;
        line.value = estimate.power;
        line.half_width = estimate.half_width;
        if (estimate.power && power.mean)
            line.deviation = *estimate.power - *power.mean;
        const bool odd = power.doubtful == i;
        line.level = odd ? Level::note : estimate.power ? Level::quiet : Level::no_data;
        line.verdict = !estimate.power ? "not known: " + estimate.missing
                       : odd           ? "stands apart"
                                       : estimate.remark;
        line.has_workings = true;
        line.estimate = i;
        section.lines.push_back(std::move(line));
    }
    if (power.mean) {
        ReviewLine mean;
        mean.words = "Weighted mean";
        mean.unit = "kW";
        mean.decimals = 0;
        mean.value = power.mean;
        mean.half_width = power.mean_half_width;
        mean.level = power.agrees ? Level::quiet : Level::note;
        section.lines.push_back(std::move(mean));
    }
    add_derived(section.lines, context, "mean_effective_pressure");
    add_derived(section.lines, context, "mechanical_efficiency");
    const bool told = std::count_if(power.estimates.begin(), power.estimates.end(), [](const PowerEstimate& one) {
                          return one.in_mean;
                      }) >= 2;
    section.sentence = power.agrees && told ? "" : power.sentence;
    section.sentence += baseline_sentence(context);
    if (!section.sentence.empty() && section.sentence.front() == ' ')
        section.sentence.erase(0, 1);
    section.level = power.agrees ? Level::quiet : Level::note;
    return section;
}

} // namespace evenstroke::reviewing
