// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/causes/causes_text.h"

#include "app/desk/number_text.h"
#include "core/explanation/cautions.h"
#include "core/sentence_words.h"
#include "core/trend/flag_text.h"

#include <QCoreApplication>

#include <cmath>

namespace evenstroke {
namespace {

using Kind = CausesLine::Kind;

QString tr_(const char* text) { return QCoreApplication::translate("evenstroke", text); }

class Writer
{
public:
    explicit Writer(std::vector<CausesLine>& lines) : lines_(lines) {}

    void add(Kind kind, const QString& words, const QString& lead = {})
    {
        if (!words.isEmpty())
            lines_.push_back({kind, lead, words});
    }

    void add_cautions(const std::vector<std::string>& names)
    {
        for (const std::string& name : names)
            if (const Caution* caution = find_caution(name))
                add(Kind::caution, to_qstring(caution->title + ". " + caution->short_text + " " + caution->authority));
    }

    void add_cause(const Hypothesis& cause)
    {
        QString what = tr_("%1. %2").arg(cause.rank).arg(to_qstring(cause.what));
        if (cause.explained)
            what += tr_(" (%1 % of the pattern)").arg(std::lround(100.0 * *cause.explained));
        add(Kind::cause, what);
        add_cautions(cause.cautions);
        add_list(tr_("fits"), cause.fits);
        add_list(tr_("speaks against"), cause.against);
        add(Kind::label, to_qstring(comma_list(cause.not_read)), tr_("not read"));
        add(Kind::label, to_qstring(cause.course), tr_("course"));
        add(Kind::label, to_qstring(cause.fault->sets_apart), tr_("sets it apart"));
        add(Kind::label, to_qstring(cause.check_next), tr_("check next"));
        add(Kind::label, to_qstring(cause.urgency), tr_("urgency"));
    }

    void add_time(const SubjectExplanation& subject)
    {
        if (!subject.time_to_limit || !subject.limit_quantity)
            return;
        const auto months = [](const std::optional<double>& number) {
            return number ? to_qstring(two_digits(*number)) : tr_("more than 120");
        };
        const TimeToLimit& time = *subject.time_to_limit;
        add(Kind::plain, tr_("If it goes on, %1 reaches %2 in %3 months (nine times in ten: %4 to %5).")
                             .arg(to_qstring(lower_first(quantity(*subject.limit_quantity).title)), to_qstring(time.limit_text),
                                  months(time.months_50), months(time.months_5), months(time.months_95)));
    }

private:
    void add_list(const QString& lead, const std::vector<std::string>& items)
    {
        for (const std::string& item : items)
            add(Kind::label, to_qstring(item), lead);
    }

    std::vector<CausesLine>& lines_;
};

} // namespace

std::vector<CausesLine> causes_lines(const Explanation& explanation)
{
    std::vector<CausesLine> lines;
    Writer writer(lines);
    writer.add(Kind::plain, to_qstring(explanation.sentence));
    for (const SubjectExplanation& subject : explanation.subjects) {
        writer.add(Kind::subject, to_qstring(subject.answer));
        writer.add_cautions(subject.cautions);
        writer.add(Kind::plain, to_qstring(subject.history));
        writer.add(Kind::label, to_qstring(comma_list(subject.moved)), tr_("moved"));
        for (const std::string& remark : subject.remarks)
            writer.add(Kind::plain, to_qstring(remark));
        writer.add(Kind::plain, to_qstring(subject.cannot_tell));
        writer.add_time(subject);
        for (const Hypothesis& cause : subject.causes)
            writer.add_cause(cause);
    }
    if (!explanation.subjects.empty())
        writer.add(Kind::last, tr_("These are possible causes, not findings: the people on board, the maker and the class society "
                                   "decide."));
    return lines;
}

} // namespace evenstroke
