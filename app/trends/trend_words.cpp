// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/trends/trend_words.h"

#include "app/desk/flag_words.h"
#include "app/desk/number_text.h"
#include "app/desk/theme.h"
#include "core/explanation/cautions.h"
#include "core/explanation/work_outcome.h"
#include "core/sentence_words.h"
#include "core/trend/limit_passed.h"

#include <QCoreApplication>

#include <algorithm>
#include <cmath>

namespace evenstroke {

namespace {

QString tr_(const char* text, int n = -1) { return QCoreApplication::translate("evenstroke", text, nullptr, n); }

TimePoint time_of(const Judgement& judgement, std::size_t reading)
{
    return judgement.record->readings.at(reading).taken_at.utc;
}

/// A flag of a cylinder is shown on the quantities that moved; one of the engine likewise.
bool concerns(const Flag& flag, const TrendPicture& picture)
{
    if (flag.subject != picture.place && !(flag.subject.kind == Place::Kind::engine
                                           && picture.place.kind != Place::Kind::cylinder))
        return false;
    return flag.quantity == picture.quantity
           || std::any_of(flag.moved.begin(), flag.moved.end(),
                          [&](const MovedQuantity& m) { return m.quantity == picture.quantity; });
}

QString moved_text(const MovedQuantity& moved, bool ramp)
{
    const QString unit_symbol = moved.percent ? QStringLiteral("%") : unit_text(moved.quantity);
    // A month's share is small: one more decimal than the instrument shows.
    const QString amount = with_unit(signed_text(moved.amount, decimals_of(moved.quantity) + (ramp ? 1 : 0)), unit_symbol);
    const QString title = quantity_title(moved.quantity);
    return ramp ? tr_("%1 %2 a month").arg(title, amount) : tr_("%1 %2").arg(title, amount);
}

void add_flags(TrendPicture& picture, const Judgement& judgement)
{
    for (const Flag& flag : judgement.flags) {
        if (!concerns(flag, picture))
            continue;
        PictureFlag shown;
        shown.time = static_cast<double>(time_of(judgement, flag.reading).time_since_epoch().count());
        const auto point = std::find_if(picture.points.begin(), picture.points.end(),
                                        [&](const PicturePoint& p) { return p.reading >= flag.reading; });
        if (point == picture.points.end())
            continue;
        shown.value = point->value;
        shown.severity = flag.severity;
        shown.level_now = flag.level_now;
        if (flag.raised_at && flag.level_now != flag.severity) {
            const auto raised = std::find_if(point, picture.points.end(), [&](const PicturePoint& p) { return p.reading >= *flag.raised_at; });
            shown.raised_time = static_cast<double>(time_of(judgement, *flag.raised_at).time_since_epoch().count());
            shown.raised_value = (raised == picture.points.end() ? picture.points.back() : *raised).value;
        }
        shown.standing = has_mark(flag.level_now);
        const QString when = day_text(time_of(judgement, flag.reading));
        shown.words = shown.standing
                          ? tr_("%1: %2").arg(standing_words(judgement, flag), to_qstring(flag.sentence))
                          : tr_("%1 on %2, closed: %3").arg(level_text(flag.severity), when, to_qstring(flag.sentence));
        picture.flags.push_back(std::move(shown));
    }
}

/// "watch from here,\nact since 11 May 2031": the level it began with at the line, the present one with its day.
QString threshold_words(const Judgement& judgement, const Flag* flag)
{
    if (!flag || flag->absolute_limit)
        return tr_("flag from here");
    const QString began = tr_("%1 from here").arg(level_text(flag->severity));
    if (flag->level_now == flag->severity || !has_mark(flag->level_now))
        return began;
    return flag->raised_at ? tr_("%1,\n%2 since %3").arg(began, level_text(flag->level_now), day_text(time_of(judgement, *flag->raised_at)))
                           : tr_("%1,\n%2 now").arg(began, level_text(flag->level_now));
}

const Flag* leading_flag(const TrendPicture& picture, const Judgement& judgement)
{
    const std::vector<const Flag*> standing = judgement.standing_flags();
    const auto found = std::find_if(standing.begin(), standing.end(),
                                    [&](const Flag* flag) { return concerns(*flag, picture); });
    return found == standing.end() ? nullptr : *found;
}

/// A drift that stands on this cylinder or engine, whatever moved.
const Flag* flag_of_subject(const TrendPicture& picture, const Judgement& judgement)
{
    const Place subject = picture.place.kind == Place::Kind::cylinder ? picture.place : Place::engine();
    for (const Flag* flag : judgement.standing_flags())
        if (flag->subject == subject && !flag->absolute_limit && !flag->moved.empty())
            return flag;
    return nullptr;
}

std::vector<std::string> names_of(const Flag& flag)
{
    constexpr std::size_t most = 3;
    std::vector<std::string> names;
    for (std::size_t i = 0; i < std::min(most, flag.moved.size()); ++i)
        names.push_back(lower_first(quantity(flag.moved[i].quantity).title));
    return names;
}

void add_quiet_words(TrendPicture& picture, const Trend& trend, const Judgement& judgement)
{
    picture.level = trend.level;
    switch (trend.level) {
    case Level::learning:
        picture.headline = tr_("Still learning what is usual here: %1 of %2 usable readings.").arg(trend.learned).arg(trend.needed);
        break;
    case Level::note: picture.headline = tr_("Further out than usual: look again at the next reading."); break;
    case Level::no_data:
        picture.headline = static_cast<int>(trend.points.size()) >= trend.needed
                               ? tr_("Shown as it was read: this value is not watched for drift.")
                               : tr_("Too few readings to say anything.");
        break;
    default: picture.headline = tr_("Within its usual range.");
    }
    if (const Flag* of_others = flag_of_subject(picture, judgement))
        picture.second_line = tr_("The flag on %1 goes by other quantities: %2. The evidence below is of all together.")
                                  .arg(picture.evidence_of, to_qstring(and_list(names_of(*of_others))));
    if (has_mark(trend.level))
        picture.level_words = level_text(trend.level);
}

void add_cautions(TrendPicture& picture, const Flag& flag)
{
    for (const std::string& name : flag.cautions)
        if (const Caution* caution = find_caution(name))
            picture.cautions.push_back(
                {to_qstring(caution->title), to_qstring(caution->short_text), caution->emergency});
}

bool with_care(const Judgement& judgement, std::size_t reading)
{
    return reading < judgement.readings.size() && judgement.readings[reading].steadiness == Steadiness::usable_with_care;
}

/// As it was typed, in its own unit: "67.0 kgf/cm² (65.7 bar)"; the second only where the unit is another one.
QString read_words(const Judgement& judgement, const Trend& trend, const TrendPoint& point)
{
    const QString usual = with_unit(number_text(point.raw, decimals_of(trend.quantity)), unit_text(trend.quantity));
    const Value* value = judgement.record->readings.at(point.reading).find(trend.quantity, trend.place);
    if (!value || value->typed.empty() || value->unit == quantity(trend.quantity).unit)
        return usual;
    return tr_("%1 (%2)").arg(with_unit(to_qstring(value->typed), to_qstring(unit(value->unit).symbol)), usual);
}

} // namespace

QString months_text(const TimeToLimit& limit)
{
    if (!limit.months_5)
        return tr_("not within ten years");
    const auto whole = [](double months) { return static_cast<int>(std::lround(months)); };
    const int early = whole(*limit.months_5);
    if (!limit.months_95)
        return early < 1 ? tr_("from now on") : tr_("%n month(s) or more", early);
    const int late = whole(*limit.months_95);
    if (late < 1)
        return tr_("reached, or within a month");
    if (early == late)
        return tr_("%n month(s)", late);
    return tr_("%1 to %2 months").arg(early).arg(late);
}

QString spoken_point(const TrendPicture& picture, const PicturePoint& shown)
{
    QString number = picture.difference ? signed_text(shown.value, picture.decimals)
                                        : number_text(shown.value, picture.decimals);
    if (shown.half_width)
        number += QStringLiteral(" ± ") + number_text(*shown.half_width, picture.decimals);
    QStringList words{day_text(TimePoint(std::chrono::seconds(static_cast<long long>(shown.time))))};
    if (shown.load_percent)
        words.append(tr_("%1 load").arg(with_unit(number_text(*shown.load_percent, 0), u"%")));
    words.append(with_unit(number, picture.unit_symbol));
    if (shown.unsteady)
        words.append(tr_("not steady"));
    else if (shown.with_care)
        words.append(tr_("usable with care"));
    if (shown.doubtful)
        words.append(tr_("in doubt"));
    return words.join(QStringLiteral(", "));
}

/// What recorded work has to do with what is seen: none of it read yet, or no effect of it to be seen.
void add_work_words(TrendPicture& picture, const Judgement& judgement)
{
    if (picture.place.kind != Place::Kind::cylinder)
        return;
    QStringList lines{to_qstring(work_not_read_yet(judgement)), to_qstring(work_without_effect(judgement, picture.place)), picture.second_line};
    lines.removeAll(QString());
    picture.second_line = lines.join(u' ');
}

void add_trend_words(TrendPicture& picture, const Judgement& judgement, const Trend& trend)
{
    add_flags(picture, judgement);
    const Flag* flag = leading_flag(picture, judgement);
    picture.threshold_words = threshold_words(judgement, flag ? flag : flag_of_subject(picture, judgement));
    if (!flag) {
        add_quiet_words(picture, trend, judgement);
        add_work_words(picture, judgement);
        return;
    }
    picture.level = flag->level_now;
    picture.headline = to_qstring(flag->sentence);
    picture.second_line = to_qstring(flag->chance_sentence);
    add_work_words(picture, judgement);
    picture.level_words = standing_words(judgement, *flag);
    if (flag->time_to_limit) {
        const bool passed = limit_is_passed(judgement, *flag);
        const QString limit = to_qstring(flag->time_to_limit->limit_text);
        picture.limit_figure = passed ? tr_("limit passed") : months_text(*flag->time_to_limit);
        picture.limit_words = passed ? tr_("by the newest usable reading: %1").arg(limit) : tr_("to %1; nine times in ten").arg(limit);
    }
    picture.fits = to_qstring(flag->pattern_words);
    for (const MovedQuantity& moved : flag->moved)
        picture.moved.append(moved_text(moved, flag->ramp));
    if (!flag->carrying.empty())
        picture.moved.append(tr_("carried by %n reading(s), the first of %1", static_cast<int>(flag->carrying.size()))
                                 .arg(day_text(time_of(judgement, flag->carrying.front()))));
    picture.next_check = to_qstring(flag->next_check);
    picture.flag_index = static_cast<std::size_t>(flag - judgement.flags.data());
    picture.note_words = note_words(judgement, *flag);
    add_cautions(picture, *flag);
}

QString point_words(const Judgement& judgement, const Trend& trend, std::size_t reading)
{
    const auto point = std::find_if(trend.points.begin(), trend.points.end(),
                                    [reading](const TrendPoint& p) { return p.reading == reading; });
    if (point == trend.points.end())
        return {};
    const int decimals = decimals_of(trend.quantity);
    const QString unit_symbol = unit_text(trend.quantity);
    QStringList words{tr_("read %1").arg(read_words(judgement, trend, *point))};
    if (point->corrected)
        words.append(tr_("corrected %1").arg(number_text(*point->corrected, decimals)));
    if (point->expected)
        words.append((trend.own_level ? tr_("own level %1") : tr_("expected %1")).arg(number_text(*point->expected, decimals)));
    if (point->deviation)
        words.append(tr_("deviation %1").arg(signed_text(*point->deviation, decimals)));
    if (point->apart)
        words.append(tr_("apart %1").arg(signed_text(*point->apart, decimals)));
    if (point->uncertainty)
        words.append(QStringLiteral("± ") + number_text(*point->uncertainty, decimals));
    if (point->unsteady)
        words.append(tr_("not steady"));
    else if (with_care(judgement, reading))
        words.append(tr_("usable with care"));
    if (point->doubtful)
        words.append(tr_("in doubt, left out of the judging"));
    return tr_("%1: %2").arg(day_text(time_of(judgement, reading)), words.join(QStringLiteral(", ")));
}

} // namespace evenstroke
