// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/desk/sentence_choices.h"

#include "app/desk/number_text.h"
#include "app/desk/reading_in_hand.h"
#include "app/desk/workplace.h"

#include <QCoreApplication>

#include <algorithm>
#include <array>

namespace evenstroke {

namespace {

QString tr_(const char* text) { return QCoreApplication::translate("evenstroke", text); }

/// Places as one number in a QVariant.
constexpr int place_base = 1000;
int code_of(const Place& place) { return static_cast<int>(place.kind) * place_base + place.number; }
Place place_of(int code) { return {static_cast<Place::Kind>(code / place_base), code % place_base}; }

/// A first word keeps its capitals where the second letter is one ("TC speed").
QString in_sentence(QString text, bool starts_sentence)
{
    if (text.isEmpty() || (text.size() > 1 && text[1].isUpper()))
        return text;
    text[0] = starts_sentence ? text[0].toUpper() : text[0].toLower();
    return text;
}

std::vector<Place> places_of(const Judgement& judgement, QuantityId quantity)
{
    std::vector<Place> places;
    for (const Trend& trend : judgement.trends)
        if (trend.quantity == quantity)
            places.push_back(trend.place);
    return places;
}

std::vector<Choice> quantity_choices(const Workplace& workplace)
{
    std::vector<Choice> choices;
    const auto judgement = workplace.judgement();
    if (!judgement)
        return choices;
    for (const Trend& trend : judgement->trends) {
        const QVariant value(trend.quantity);
        if (choices.empty() || choices.back().value != value)
            choices.push_back({quantity_title(trend.quantity), value, Level::no_data,
                               workplace.selection().quantity == trend.quantity});
        choices.back().level = std::max(choices.back().level, trend.level);
    }
    return choices;
}

std::vector<Choice> place_choices(const Workplace& workplace)
{
    std::vector<Choice> choices;
    const auto judgement = workplace.judgement();
    if (!judgement || !workplace.selection().quantity)
        return choices;
    for (const Trend& trend : judgement->trends)
        if (trend.quantity == *workplace.selection().quantity)
            choices.push_back({place_title(judgement->record->engine, trend.place), code_of(trend.place), trend.level,
                               trend.place == workplace.selection().place});
    return choices;
}

std::vector<Choice> engine_choices(const Workplace& workplace)
{
    std::vector<Choice> choices;
    if (const VesselChoice* vessel = workplace.find_vessel(workplace.selection().vessel))
        for (const EngineChoice& engine : vessel->engines) {
            Level level = Level::quiet;
            for (const FleetRow& row : workplace.fleet())
                if (row.engine_id == engine.id)
                    level = row.summary.level;
            choices.push_back({engine.name, engine.id, level, engine.id == workplace.selection().engine});
        }
    return choices;
}

/// "14 Mar 2031 · 76 % load · steady", the newest first.
std::vector<Choice> reading_choices(const Workplace& workplace)
{
    std::vector<Choice> choices;
    const auto judgement = workplace.judgement();
    if (!judgement)
        return choices;
    const auto in_hand = reading_in_hand(*judgement, workplace.selection());
    for (std::size_t i = judgement->readings.size(); i-- > 0;)
        choices.push_back({reading_words(*judgement, i), to_qstring(judgement->record->readings[i].id), Level::quiet,
                           in_hand == i});
    return choices;
}

template <typename Value, std::size_t count>
std::vector<Choice> fixed_choices(const std::array<Value, count>& values, QString (*text)(Value), Value now)
{
    std::vector<Choice> choices;
    for (const Value value : values)
        choices.push_back({in_sentence(text(value), true), static_cast<int>(value), Level::quiet, value == now});
    return choices;
}

} // namespace

QString range_text(TimeRange range)
{
    switch (range) {
    case TimeRange::since_overhaul: return tr_("since the last overhaul");
    case TimeRange::three_years: return tr_("last three years");
    case TimeRange::all: return tr_("all readings");
    }
    return {};
}

QString view_text(ValueView view)
{
    switch (view) {
    case ValueView::raw: return tr_("as read");
    case ValueView::corrected: return tr_("corrected");
    case ValueView::deviation: return tr_("deviation from the baseline");
    case ValueView::apart: return tr_("apart from the others");
    }
    return {};
}

std::optional<SentencePart> find_sentence_part(QStringView name)
{
    static const std::array<std::pair<const char*, SentencePart>, 7> parts{{{"engine", SentencePart::engine},
                                                                            {"vessel", SentencePart::vessel},
                                                                            {"quantity", SentencePart::quantity},
                                                                            {"place", SentencePart::place},
                                                                            {"range", SentencePart::range},
                                                                            {"view", SentencePart::view},
                                                                            {"reading", SentencePart::reading}}};
    for (const auto& [text, part] : parts)
        if (name == QLatin1String(text))
            return part;
    return std::nullopt;
}

QChar sentence_letter(SentencePart part)
{
    switch (part) {
    case SentencePart::engine: return u'N';
    case SentencePart::vessel: return u'V';
    case SentencePart::quantity: return u'Q';
    case SentencePart::place: return u'L';
    case SentencePart::range: return u'P';
    case SentencePart::view: return u'K';
    case SentencePart::reading: return u'M';
    }
    return {};
}

QString sentence_text(SentencePart part, const Workplace& workplace, bool starts_sentence)
{
    const Selection& selection = workplace.selection();
    switch (part) {
    case SentencePart::engine: {
        const EngineChoice* engine = workplace.find_engine(selection.engine);
        return in_sentence(engine ? engine->name : tr_("no engine"), starts_sentence);
    }
    case SentencePart::vessel: {
        const VesselChoice* vessel = workplace.find_vessel(selection.vessel);
        return vessel ? vessel->name : in_sentence(tr_("no ship"), starts_sentence);
    }
    case SentencePart::quantity:
        return in_sentence(selection.quantity ? quantity_title(*selection.quantity) : tr_("no quantity"),
                           starts_sentence);
    case SentencePart::place: {
        const auto judgement = workplace.judgement();
        return in_sentence(judgement && judgement->record
                               ? place_title(judgement->record->engine, selection.place)
                               : to_qstring(place_text(selection.place)),
                           starts_sentence);
    }
    case SentencePart::range: return in_sentence(range_text(selection.range), starts_sentence);
    case SentencePart::view: return in_sentence(view_text(selection.view), starts_sentence);
    case SentencePart::reading: {
        const auto judgement = workplace.judgement();
        const auto reading = judgement ? reading_in_hand(*judgement, selection) : std::nullopt;
        return reading ? reading_title(*judgement, *reading) : tr_("no date");
    }
    }
    return {};
}

std::vector<Choice> sentence_choices(SentencePart part, const Workplace& workplace)
{
    const Selection& now = workplace.selection();
    switch (part) {
    case SentencePart::engine: return engine_choices(workplace);
    case SentencePart::vessel: {
        std::vector<Choice> choices;
        for (const VesselChoice& vessel : workplace.vessels())
            choices.push_back({vessel.name, vessel.id, Level::quiet, vessel.id == now.vessel});
        return choices;
    }
    case SentencePart::quantity: return quantity_choices(workplace);
    case SentencePart::place: return place_choices(workplace);
    case SentencePart::range:
        return fixed_choices(std::array{TimeRange::since_overhaul, TimeRange::three_years, TimeRange::all}, range_text,
                             now.range);
    case SentencePart::view:
        return fixed_choices(
            std::array{ValueView::raw, ValueView::corrected, ValueView::deviation, ValueView::apart}, view_text,
            now.view);
    case SentencePart::reading: return reading_choices(workplace);
    }
    return {};
}

Selection with_choice(SentencePart part, const Workplace& workplace, const QVariant& value)
{
    Selection selection = workplace.selection();
    switch (part) {
    case SentencePart::engine: selection.engine = value.toString(); break;
    case SentencePart::vessel: {
        selection.vessel = value.toString();
        const VesselChoice* vessel = workplace.find_vessel(selection.vessel);
        selection.engine = vessel && !vessel->engines.empty() ? vessel->engines.front().id : QString();
        break;
    }
    case SentencePart::quantity: {
        selection.quantity = value.toInt();
        selection.estimate.clear();
        if (const auto judgement = workplace.judgement())
            return settled(selection, *judgement);
        break;
    }
    case SentencePart::place: selection.place = place_of(value.toInt()); break;
    case SentencePart::range: selection.range = static_cast<TimeRange>(value.toInt()); break;
    case SentencePart::view: selection.view = static_cast<ValueView>(value.toInt()); break;
    case SentencePart::reading: selection.reading = value.toString(); break;
    }
    if (part == SentencePart::engine || part == SentencePart::vessel)
        selection.reading.clear();
    if (part == SentencePart::quantity || part == SentencePart::place)
        selection.estimate.clear();
    return selection;
}

Selection settled(const Selection& selection, const Judgement& judgement)
{
    Selection result = selection;
    if (judgement.trends.empty())
        return result;
    if (!result.quantity) {
        // Where nothing stands out: a cylinder, rather than the conditions that stand first on the sheet.
        const auto cylinder = std::find_if(judgement.trends.begin(), judgement.trends.end(), [](const Trend& trend) {
            return trend.place.kind == Place::Kind::cylinder && trend.level != Level::no_data;
        });
        const Trend& quiet = cylinder == judgement.trends.end() ? judgement.trends.front() : *cylinder;
        const std::vector<const Flag*> flags = judgement.standing_flags();
        result.quantity = flags.empty() ? quiet.quantity : flags.front()->quantity;
        result.place = flags.empty() ? quiet.place : flags.front()->subject;
    }
    std::vector<Place> places = places_of(judgement, *result.quantity);
    if (places.empty()) {
        result.quantity = judgement.trends.front().quantity;
        places = places_of(judgement, *result.quantity);
    }
    if (std::find(places.begin(), places.end(), result.place) == places.end())
        result.place = places.front();
    return result;
}

} // namespace evenstroke
