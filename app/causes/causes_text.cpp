// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/causes/causes_text.h"

#include "app/cards/card_shelf.h"
#include "app/desk/number_text.h"
#include "core/explanation/cautions.h"
#include "core/sentence_words.h"
#include "core/trend/flag_text.h"

#include <QCoreApplication>

#include <cmath>
#include <set>

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

    /// Each once a subject: where it was read already it is not read again.
    void add_cautions(const std::vector<std::string>& names)
    {
        for (const std::string& name : names)
            if (const Caution* caution = find_caution(name); caution && warned_.insert(name).second)
                add(Kind::caution, to_qstring(caution->title + ". " + caution->short_text +
                                              (caution->emergency ? " " + caution->authority : std::string())));
    }

    /// An alarm matter stands before everything that could be read instead of acting on it.
    void add_emergencies(const SubjectExplanation& subject)
    {
        warned_.clear();
        std::vector<std::string> names;
        for (const Hypothesis& cause : subject.causes)
            for (const std::string& name : cause.cautions)
                if (const Caution* caution = find_caution(name); caution && caution->emergency)
                    names.push_back(name);
        add_cautions(names);
    }

    void add_cause(const Hypothesis& cause)
    {
        add(Kind::cause, tr_("%1. %2").arg(cause.rank).arg(to_qstring(cause.what)));
        add_cautions(cause.cautions);
        add(Kind::label, to_qstring(cause.order), tr_("order"));
        for (const QuantityEvidence& evidence : cause.evidence)
            if (const QString lead = lead_of(evidence.says); !lead.isEmpty())
                add(Kind::label, to_qstring(evidence.words), lead);
        add(Kind::label, to_qstring(comma_list(cause.not_read)), tr_("not read"));
        add(Kind::label, to_qstring(cause.course), tr_("course"));
        add(Kind::label, to_qstring(cause.fault->sets_apart), tr_("sets it apart"));
        add(Kind::label, to_qstring(cause.check_next), tr_("check next"));
        add(Kind::label, to_qstring(urgency_word(cause.fault->urgency) + ": " + cause.urgency), tr_("urgency"));
    }

    void add_time(const SubjectExplanation& subject)
    {
        if (!subject.time_to_limit || !subject.limit_quantity)
            return;
        const auto months = [](const std::optional<double>& number) {
            return number ? to_qstring(two_digits(*number)) : tr_("more than 120");
        };
        const TimeToLimit& time = *subject.time_to_limit;
        if (time.months_95 && *time.months_95 < 0.5) {
            add(Kind::plain, tr_("By now %1 has reached %2 (nine times in ten).")
                                 .arg(to_qstring(lower_first(quantity(*subject.limit_quantity).title)), to_qstring(time.limit_text)));
            return;
        }
        if (time.months_50 && *time.months_50 < 0.5) {
            add(Kind::plain, tr_("%1 has reached %2 about now, or will within %3 months if it goes on (nine times in ten).")
                                 .arg(to_qstring(quantity(*subject.limit_quantity).title), to_qstring(time.limit_text),
                                      months(time.months_95)));
            return;
        }
        add(Kind::plain, tr_("If it goes on, %1 reaches %2 in %3 months (nine times in ten: %4 to %5).")
                             .arg(to_qstring(lower_first(quantity(*subject.limit_quantity).title)), to_qstring(time.limit_text),
                                  months(time.months_50), months(time.months_5), months(time.months_95)));
    }

private:
    /// Empty for what is not worth a line of its own.
    static QString lead_of(QuantityEvidence::Says says)
    {
        switch (says) {
        case QuantityEvidence::Says::fits: return tr_("fits");
        case QuantityEvidence::Says::partly_fits: return tr_("partly fits");
        case QuantityEvidence::Says::against: return tr_("speaks against");
        case QuantityEvidence::Says::as_usual:
        case QuantityEvidence::Says::not_read: break;
        }
        return {};
    }

    std::vector<CausesLine>& lines_;
    std::set<std::string> warned_; ///< cautions of the subject in hand
};

std::optional<std::size_t> newest_card(const CardsStored& cards, const Place& place)
{
    std::optional<std::size_t> newest;
    for (const CardsStored::Entry& card : cards.cards)
        if (place == Place::cylinder(card.place.cylinder) && (!newest || card.place.reading > *newest))
            newest = card.place.reading;
    return newest;
}

} // namespace

std::vector<CausesLine> causes_lines(const Explanation& explanation, const CardsStored& cards)
{
    std::vector<CausesLine> lines;
    Writer writer(lines);
    writer.add(Kind::plain, to_qstring(explanation.sentence));
    for (const SubjectExplanation& subject : explanation.subjects) {
        writer.add(Kind::subject, to_qstring(subject.answer));
        writer.add_emergencies(subject);
        writer.add_cautions(subject.cautions);
        writer.add(Kind::label, to_qstring(subject.flag_sentence), tr_("flag"));
        writer.add(Kind::label, to_qstring(subject.flag_note), tr_("noted"));
        writer.add(Kind::plain, to_qstring(subject.history));
        writer.add(Kind::label, to_qstring(comma_list(subject.moved)), tr_("moved"));
        for (const std::string& remark : subject.remarks)
            writer.add(Kind::plain, to_qstring(remark));
        writer.add(Kind::plain, to_qstring(subject.cannot_tell));
        writer.add_time(subject);
        if (const auto reading = newest_card(cards, subject.subject); reading && !subject.causes.empty())
            writer.add(Kind::plain, tr_("An indicator card of %1 is stored: what it says of leak, timing and burning, and whether it "
                                        "bears one of these causes out, stands on the page Cards (key C).")
                                        .arg(day_text(explanation.record->readings[*reading].taken_at.utc)));
        for (const Hypothesis& cause : subject.causes)
            writer.add_cause(cause);
    }
    if (!explanation.subjects.empty())
        writer.add(Kind::last, tr_("These are possible causes, not findings. The maker's instructions, the ship's safety management "
                                   "system and the class society come before this text; the people on board and licensed engineers "
                                   "decide."));
    return lines;
}

} // namespace evenstroke
