// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/reading/relations.h"
#include "core/trend/drift_catalogue.h"
#include "core/trend/drift_input.h"
#include "core/trend/drift_results.h"
#include "core/trend/flag_text.h"
#include "core/trend/meant_number.h"
#include "core/trend/other_unit.h"

#include <algorithm>
#include <cmath>

namespace evenstroke {
namespace {

/// Readings that a draft is compared with: three years of monthly ones. The usual band looks back over the last
/// twelve; more serve the noise only, and typing must not wait for them.
constexpr std::size_t draft_memory = 36;

/// The record with the draft as its last reading; readings taken after the draft are left out.
std::shared_ptr<EngineRecord> with_draft(const EngineRecord& record, const Reading& draft)
{
    auto extended = std::make_shared<EngineRecord>();
    extended->vessel = record.vessel;
    extended->engine = record.engine;
    extended->events = record.events;
    std::vector<const Reading*> before;
    for (const Reading& reading : record.readings)
        if (reading.taken_at.utc < draft.taken_at.utc && (reading.id.empty() || reading.id != draft.id))
            before.push_back(&reading);
    const std::size_t skipped = before.size() > draft_memory ? before.size() - draft_memory : 0;
    for (std::size_t i = skipped; i < before.size(); ++i)
        extended->readings.push_back(*before[i]);
    extended->readings.push_back(draft);
    return extended;
}

const drift::UsualBand* find_band(const drift::Input& input, const drift::ReadingCheck& check, const Quantity& q,
                                  const Place& place, const drift::CatalogueChannel** channel)
{
    if (place.kind == Place::Kind::cylinder) {
        for (std::size_t k = 0; k < input.channels.size() && k < check.cylinder_bands.size(); ++k) {
            const auto& row = check.cylinder_bands[k];
            const std::size_t j = static_cast<std::size_t>(place.number) - 1;
            if (drift_quantity(input.channels[k].quantity) == q.id && j < row.size() && row[j]) {
                *channel = drift::find_channel(input.channels[k].quantity, drift::Subject::cylinder);
                return &*row[j];
            }
        }
        return nullptr;
    }
    for (std::size_t k = 0; k < input.engine_channels.size() && k < check.engine_bands.size(); ++k)
        if (input.engine_channels[k].quantity == q.name && check.engine_bands[k]) {
            *channel = drift::find_channel(q.name, drift::Subject::engine);
            return &*check.engine_bands[k];
        }
    return nullptr;
}

std::string range_text(const Range& range, const Quantity& q)
{
    const std::string symbol = " " + std::string(unit(q.unit).symbol);
    if (range.low && range.high)
        return two_digits(*range.low) + " to " + two_digits(*range.high) + symbol;
    return range.low ? "above " + two_digits(*range.low) + symbol : "below " + two_digits(*range.high) + symbol;
}

bool outside(const Range& range, double value)
{
    return (range.low && value < *range.low) || (range.high && value > *range.high);
}

void judge_ranges(ValueOpinion& opinion, const Quantity& q, double own)
{
    if (outside(q.hard, own)) {
        opinion.verdict = ValueOpinion::Verdict::impossible;
        opinion.sentence = q.title + " cannot be outside " + range_text(q.hard, q) +
                           ". It is kept as typed, and used for nothing until you change or confirm it.";
    } else if (outside(q.soft, own)) {
        opinion.verdict = ValueOpinion::Verdict::unlikely;
        opinion.sentence = q.title + " is seldom outside " + range_text(q.soft, q) + ". Please read it again or confirm it.";
    } else {
        opinion.verdict = ValueOpinion::Verdict::usual;
    }
}

/// The last value at the same place before the draft, in the quantity's own unit.
std::optional<double> previous_value(const EngineRecord& record, const std::vector<PreparedReading>& prepared, const Value& at)
{
    for (std::size_t i = record.readings.size() - 1; i-- > 0;) {
        const Value* value = record.readings[i].find(at.quantity, at.place);
        if (!value)
            continue;
        const auto own = own_value(*value, prepared[i].conditions);
        return own ? std::optional<double>(own->value) : std::nullopt;
    }
    return std::nullopt;
}

/// A unit mixed up is said beside what else the number may mean.
void judge_unit(ValueOpinion& one, const Value& value, std::optional<double> own)
{
    const auto reference = one.expected ? one.expected : one.previous;
    if (!own || !reference || value.confirmed || value.phase != Phase::reading)
        return;
    const auto other =
        guess_other_unit(value, *own, *reference, one.expected ? "expected is" : "last time it was");
    if (!other)
        return;
    if (one.verdict != ValueOpinion::Verdict::impossible)
        one.verdict = ValueOpinion::Verdict::doubtful;
    one.sentence += (one.sentence.empty() ? "" : " ") + other->sentence;
    if (!one.suggestion) {
        one.suggestion = other->suggestion;
        one.second_suggestion = other->second;
    }
}

/// What the same draft says a number is about: the quick lines, for the load the power. Then earlier readings, which
/// count only where the number is doubted already: the load may have changed since.
std::vector<NumberReference> references_of(const Reading& draft, const Value& value, const ValueOpinion& one,
                                           const Engine& engine, const Conditions& conditions)
{
    std::vector<NumberReference> references;
    for (const Value& quick : draft.values)
        if (quick.quantity == value.quantity && quick.place == value.place && quick.phase != Phase::reading)
            if (const auto own = own_value(quick, conditions))
                references.push_back({own->value, "The quick lines say"});
    const double rated = engine.rated_power.value();
    if (quantity(value.quantity).name == "load_percent" && conditions.shaft_power && rated > 0.0)
        references.push_back({100.0 * 1000.0 * *conditions.shaft_power / rated, "By shaft power it is"});
    const bool out_of_range =
        one.verdict == ValueOpinion::Verdict::unlikely || one.verdict == ValueOpinion::Verdict::impossible;
    if (out_of_range && one.expected)
        references.push_back({*one.expected, "Expected is"});
    if (out_of_range && one.previous)
        references.push_back({*one.previous, "Last time it was"});
    return references;
}

/// A point in the wrong place is offered for what the drift check does not look at, such as the load.
void judge_slip(ValueOpinion& one, const Value& value, std::optional<double> own,
                std::span<const NumberReference> references)
{
    if (!own || one.suggestion || value.confirmed || value.phase != Phase::reading)
        return;
    const auto meant = guess_meant_number(value, *own, references);
    if (!meant)
        return;
    if (one.verdict != ValueOpinion::Verdict::impossible)
        one.verdict = ValueOpinion::Verdict::doubtful;
    one.sentence += (one.sentence.empty() ? "" : " ") + meant->sentence;
    one.suggestion = meant->suggestion;
}

} // namespace

DraftOpinion judge_draft(const Judgement& history, const Reading& draft)
{
    DraftOpinion opinion;
    const auto record = with_draft(*history.record, draft);
    const Engine& engine = record->engine;
    const Baseline baseline(engine);
    std::vector<PreparedReading> prepared;
    for (const Reading& reading : record->readings)
        prepared.push_back(prepare_reading(engine, baseline, reading));
    const std::vector<char> unsteady(prepared.size(), 0);
    const drift::Input input = make_drift_input(*record, baseline, prepared, unsteady);
    const drift::ReadingCheck check = drift::check_last_reading(input);
    const Conditions& conditions = prepared.back().conditions;
    const Reading& last = record->readings.back();
    opinion.doubts = translate_doubts(engine, last, check.doubts);

    for (const Value& value : draft.values) {
        ValueOpinion one;
        const Quantity& q = quantity(value.quantity);
        if (q.type != ValueType::number) {
            opinion.values.push_back(std::move(one));
            continue;
        }
        one.previous = previous_value(*record, prepared, value);
        const auto own = own_value(value, conditions);
        if (own && value.phase == Phase::reading)
            judge_ranges(one, q, own->value);
        const drift::CatalogueChannel* channel = nullptr;
        if (const drift::UsualBand* band = find_band(input, check, q, value.place, &channel); band && channel) {
            const double at = own ? own->value : one.previous.value_or(0.0);
            const auto form = deviation_form(engine, baseline, q, at, conditions,
                                             channel->form == drift::DeviationForm::percent, std::nullopt);
            if (form && form->scale != 0.0) {
                one.expected = form->own(band->centre);
                one.usual_low = std::min(form->own(band->low), form->own(band->high));
                one.usual_high = std::max(form->own(band->low), form->own(band->high));
            }
        }
        for (const Doubt& doubt : opinion.doubts) {
            const bool here = doubt.quantity == std::optional<QuantityId>(q.id) && doubt.place == std::optional<Place>(value.place);
            if (!here || value.confirmed || value.phase != Phase::reading)
                continue;
            one.verdict = one.verdict == ValueOpinion::Verdict::impossible ? one.verdict : ValueOpinion::Verdict::doubtful;
            one.suggestion = doubt.suggestion;
            one.sentence = doubt.sentence;
        }
        const std::optional<double> own_number = own ? std::optional<double>(own->value) : std::nullopt;
        judge_slip(one, value, own_number, references_of(draft, value, one, engine, conditions));
        judge_unit(one, value, own_number);
        opinion.values.push_back(std::move(one));
    }
    const SteadinessVerdict steadiness = judge_steadiness(draft, !engine.two_stroke());
    opinion.steadiness = steadiness.verdict;
    opinion.steadiness_sentence = steadiness.sentence;
    ReadingContext context{std::span<const Reading>(record->readings).first(record->readings.size() - 1), record->events, {}};
    for (const Relation& relation : check_relations(engine, draft, context))
        opinion.between.push_back(relation.sentence);
    return opinion;
}

} // namespace evenstroke
