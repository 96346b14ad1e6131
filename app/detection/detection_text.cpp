// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/detection/detection_text.h"

#include "app/desk/number_text.h"

#include <QCoreApplication>

#include <cmath>

namespace evenstroke {
namespace {

using simulation::DetectionPower;
using simulation::FaultPower;
using simulation::Interval;

QString tr_(const char* text, int n = -1) { return QCoreApplication::translate("evenstroke", text, nullptr, n); }

QString per_cent(double share) { return with_unit(number_text(100.0 * share, 0), u"%"); }
QString fault_title(simulation::Fault fault) { return QString::fromLatin1(fault_name(fault)); }

DetectionRow alarm_row(const QString& what, std::size_t count, double a_year, const Interval& interval)
{
    return {what, {}, tr_("%1 a year (%2)").arg(number_text(a_year, 2)).arg(count),
            tr_("%1 to %2").arg(number_text(interval.low, 2), number_text(interval.high, 2)), {}};
}

DetectionRow fault_row(const FaultPower& fault)
{
    const double share = static_cast<double>(fault.found) / static_cast<double>(fault.engines);
    return {fault_title(fault.fault), to_qstring(fault_effect_words(fault.fault)),
            tr_("%1 of %2, %3").arg(fault.found).arg(fault.engines).arg(per_cent(share)),
            tr_("%1 to %2").arg(number_text(100.0 * fault.share.low, 0), per_cent(fault.share.high)),
            fault.median_readings > 0 ? tr_("%n reading(s)", static_cast<int>(fault.median_readings))
                                      : tr_("more than half never")};
}

/// What twelve readings without a flag speak for, and what they leave open.
QString meaning_of(const DetectionPower& power)
{
    constexpr double nearly_all = 0.9;
    QStringList excluded, open;
    for (const FaultPower& fault : power.faults)
        (fault.share.low >= nearly_all - 0.1 && static_cast<double>(fault.found) >= nearly_all * static_cast<double>(fault.engines)
             ? excluded
             : open)
            .append(fault_title(fault.fault));
    QStringList sentences;
    if (!excluded.isEmpty())
        sentences.append(tr_("A year of readings without a flag speaks against %1.").arg(excluded.join(QStringLiteral(", "))));
    if (!open.isEmpty())
        sentences.append(tr_("It says little of %1: these can grow for a year unseen.").arg(open.join(QStringLiteral(", "))));
    return sentences.join(u' ');
}

void add_rows(QString& plain, const std::vector<DetectionRow>& rows)
{
    for (const DetectionRow& row : rows)
        plain += QStringList{row.what, row.measured, row.interval, row.half_found, row.remark}.join(u'\t').trimmed() + u'\n';
}

} // namespace

DetectionText detection_text(const QString& engine_words, const simulation::Likeness& likeness,
                             const std::optional<simulation::DetectionPower>& power)
{
    DetectionText text;
    text.title = tr_("How good is this?");
    text.engine = tr_("%1: %n cylinder(s)", static_cast<int>(likeness.cylinders)).arg(engine_words) +
                  tr_(", read every %1 months, scatter as in its own %n reading(s).", static_cast<int>(likeness.readings))
                      .arg(number_text(likeness.months_between_readings, 1));
    text.assumptions =
        tr_("The simulated engines are invented: the noise of this engine, of which a part lasts and a few values are "
            "far out, lasting differences between cylinders, missed readings, slips of the pen, work of which a tenth is "
            "not written down. A real ship has more surprises: expect worse.");
    if (!power)
        return text;
    text.sound = tr_("On simulated sound engines like this one, over %1 engine-years:").arg(number_text(power->engine_years, 0));
    text.alarms.push_back(alarm_row(tr_("Flags without a fault"), power->false_flags, power->false_per_year(), power->false_a_year));
    text.alarms.push_back(
        alarm_row(tr_("Questions about work"), power->questions, power->questions_per_year(), power->questions_a_year));
    for (const FaultPower& fault : power->faults)
        text.faults.push_back(fault_row(fault));
    text.meaning = meaning_of(*power);
    return text;
}

QString detection_plain(const DetectionText& text)
{
    QString plain = text.title + u'\n' + text.engine + u'\n';
    if (!text.sound.isEmpty())
        plain += text.sound + u'\n';
    add_rows(plain, text.alarms);
    add_rows(plain, text.faults);
    if (!text.meaning.isEmpty())
        plain += text.meaning + u'\n';
    return plain + text.assumptions + u'\n';
}

} // namespace evenstroke
