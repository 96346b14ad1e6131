// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/explanation/explanation.h"

#include "core/explanation/cautions.h"
#include "core/explanation/change_course.h"
#include "core/explanation/comes_and_goes.h"
#include "core/explanation/explanation_words.h"
#include "core/explanation/hypotheses.h"
#include "core/explanation/soonest_limit.h"
#include "core/sentence_words.h"
#include "core/trend/flag_text.h"

#include <algorithm>
#include <cmath>
#include <map>

namespace evenstroke {
namespace {

/// From which evidence on something is called out of the usual: logarithm of how much likelier some fault makes the
/// readings than nothing does, or, for a pattern that no fault has, standard deviations of the strongest sign. Settled
/// by simulation of sound engines (tests/core/fault_statistics_test.cpp).
constexpr double claim_on_any_cylinder_from = 3.4, claim_where_known_from = 3.0, claim_without_fault_from = 5.2;
constexpr double claim_one_reading_from = 6.0; ///< standard deviations: one reading may be odd by itself
/// After so many readings an unanswered question about work is taken as work done, as the drift method takes it.
constexpr std::size_t question_lasts = 12;
constexpr double misread_from = 4.0, others_below = 1.5; ///< noise units, of one value that stands alone

/// What the engine's readings hold at all.
std::set<std::string> names_read(const Judgement& judgement)
{
    std::set<std::string> names;
    for (const Trend& trend : judgement.trends)
        names.insert(quantity(trend.quantity).name);
    return names;
}

bool is_drift(const Flag& flag) { return flag.severity != Level::ask && !flag.absolute_limit; }

const Flag* standing_drift(const Judgement& judgement, const Place& subject)
{
    for (const Flag* flag : judgement.standing_flags())
        if (is_drift(*flag) && flag->subject == subject)
            return flag;
    return nullptr;
}

/// The newest question whether work was done on this subject; null where there is none.
const Flag* last_question(const Judgement& judgement, const Place& subject)
{
    const Flag* last = nullptr;
    for (const Flag& flag : judgement.flags)
        if (flag.severity == Level::ask && flag.subject == subject && !flag.carrying.empty())
            last = &flag;
    return last;
}

/// The same while nobody has answered it.
const Flag* open_question(const Judgement& judgement, const Place& subject)
{
    const Flag* question = last_question(judgement, subject);
    return question && question->level_now == Level::ask ? question : nullptr;
}

class Explainer
{
public:
    explicit Explainer(const Judgement& judgement)
        : judgement_(judgement), record_(*judgement.record), series_(judgement), read_(names_read(judgement))
    {
        result_.record = judgement.record;
    }

    Explanation run()
    {
        if (judgement_.readings.empty()) {
            result_.sentence = whole_sentence(result_);
            return std::move(result_);
        }
        result_.reading = judgement_.readings.size() - 1;
        std::set<int> out_of_usual;
        for (int number = 1; number <= record_.engine.cylinders; ++number)
            if (look_at(series_.cylinder(number)))
                out_of_usual.insert(number);
        // With half of the cylinders left out the rest would no longer stand for the engine.
        if (2 * static_cast<int>(out_of_usual.size()) >= record_.engine.cylinders)
            out_of_usual.clear();
        look_at(series_.engine(out_of_usual));
        add_slips();
        add_alarm_values();
        result_.too_few_readings = !comparable_;
        std::stable_sort(result_.subjects.begin(), result_.subjects.end(), in_order);
        result_.sentence = whole_sentence(result_);
        return std::move(result_);
    }

private:
    static bool in_order(const SubjectExplanation& a, const SubjectExplanation& b)
    {
        const auto key = [](const Place& place) {
            return place.kind == Place::Kind::cylinder ? place.number : 1000000; // the engine last
        };
        return key(a.subject) < key(b.subject);
    }

    std::size_t earliest_onset(const Place& subject) const
    {
        const Flag* question = last_question(judgement_, subject);
        const std::size_t last = judgement_.readings.size() - 1;
        return question && last - question->reading > question_lasts ? question->carrying.front() + level_needs : 1;
    }

    /// A flag, or a question, of the drift method says which cylinder; otherwise there are many to choose from.
    static double claim_from(const Place& subject, bool marked)
    {
        return marked || subject.kind != Place::Kind::cylinder ? claim_where_known_from : claim_on_any_cylinder_from;
    }

    static bool is_out_of_usual(const Place& subject, const ChangeWindow& window, bool marked)
    {
        if (window.strength >= claim_one_reading_from || (window.readings > 1 && window.strength >= claim_without_fault_from))
            return true;
        const auto likeliest = std::max_element(window.log_weights.begin(), window.log_weights.end());
        return (window.readings > 1 || marked) && likeliest != window.log_weights.end() && *likeliest >= claim_from(subject, marked);
    }

    /// @return whether it is out of the usual
    bool look_at(const SubjectSeries& series)
    {
        const auto faults = possible_faults(record_.engine, series.subject, read_);
        const auto window = find_change(series, faults, earliest_onset(series.subject));
        comparable_ = comparable_ || window.has_value();
        const Flag* flag = standing_drift(judgement_, series.subject);
        const bool marked = flag || open_question(judgement_, series.subject);
        if (!window || !is_out_of_usual(series.subject, *window, marked)) {
            if (flag)
                add_unsupported_flag(*flag);
            return false;
        }
        SubjectExplanation subject;
        subject.subject = series.subject;
        subject.flagged = flag != nullptr;
        if (flag)
            tell_of_flag(subject, *flag);
        subject.sudden = !window->ramp;
        subject.last_reading_only = window->readings == 1;
        subject.since = record_.readings[window->onset - 1].taken_at.utc;
        subject.months = window->months;
        subject.causes = rank_causes(faults, *window);
        consider_misreading(subject, *window);
        consider_work(subject, *window);
        for (Hypothesis& cause : subject.causes)
            word_hypothesis(cause, &*window, record_.engine.two_stroke());
        word_subject(subject, record_, &*window);
        if (const std::string course = comes_and_goes_sentence(series, *window, judgement_); !course.empty())
            subject.history += " " + course;
        add_remarks(subject, *window);
        add_limit(subject);
        result_.subjects.push_back(std::move(subject));
        return true;
    }

    static void tell_of_flag(SubjectExplanation& subject, const Flag& flag)
    {
        subject.flag_sentence = flag.sentence;
        if (!flag.note)
            return;
        subject.flag_note = note_text(*flag.note, short_date(flag.note->written_at));
        if (!subject.flag_note.ends_with('.'))
            subject.flag_note += '.';
        if (flag.reopened)
            subject.flag_note += " New evidence came since.";
    }

    /// A flag stands until a reading shows that it is over; a cause is another matter.
    void add_unsupported_flag(const Flag& flag)
    {
        SubjectExplanation subject;
        subject.subject = flag.subject;
        subject.flagged = true;
        tell_of_flag(subject, flag);
        subject.since = flag.since;
        subject.months = flag.months;
        subject.answer = subject_text(record_.engine, flag.subject) +
                         " has a flag, and the readings up to now bear no cause out: no fault on the list is much likelier "
                         "than chance, and the next readings will tell.";
        result_.subjects.push_back(std::move(subject));
    }

    /// One value far out at the last reading alone, with all linked to it as usual.
    void consider_misreading(SubjectExplanation& subject, const ChangeWindow& window) const
    {
        if (window.readings != 1)
            return;
        std::size_t out = 0, usual = 0;
        for (const auto& change : window.changes)
            if (change) {
                out += std::abs(change->amount) >= misread_from ? 1 : 0;
                usual += std::abs(change->amount) < others_below ? 1 : 0;
            }
        const auto seen = std::count_if(window.changes.begin(), window.changes.end(), [](const auto& c) { return c.has_value(); });
        if (out != 1 || usual + 1 != static_cast<std::size_t>(seen))
            return;
        Hypothesis slip;
        slip.fault = find_fault("single_misread");
        if (!subject.causes.empty())
            subject.causes.front().as_likely_as_first = true;
        put_first(subject, std::move(slip));
    }

    /// Work that nobody entered: where the drift method asks about it, or what moved, moved as after work. Parts of their
    /// own take levels of their own, so it comes before the faults only where no pattern of theirs accounts for more.
    void consider_work(SubjectExplanation& subject, const ChangeWindow& window) const
    {
        const Flag* question = open_question(judgement_, subject.subject);
        if (!question && !looks_like_work(window))
            return;
        Hypothesis work;
        work.fault = find_fault("work_not_recorded");
        work.fits.push_back(question ? question->sentence
                                     : "It came at once, and what moved clearly moved as after an overhaul or a cleaning.");
        const bool before_faults =
            subject.causes.empty() ||
            (question && log_weight_of_no_pattern(window.changes) > match_faults({&subject.causes.front().fault, 1}, window.changes).front().log_weight);
        if (before_faults) {
            put_first(subject, std::move(work));
            return;
        }
        work.rank = static_cast<int>(subject.causes.size()) + 1;
        subject.causes.push_back(std::move(work));
    }

    static void put_first(SubjectExplanation& subject, Hypothesis first)
    {
        subject.causes.insert(subject.causes.begin(), std::move(first));
        for (std::size_t i = 0; i < subject.causes.size(); ++i)
            subject.causes[i].rank = static_cast<int>(i) + 1;
    }

    SubjectExplanation& subject_at(const Place& place)
    {
        for (SubjectExplanation& subject : result_.subjects)
            if (subject.subject == place)
                return subject;
        SubjectExplanation fresh;
        fresh.subject = place;
        fresh.since = record_.readings.back().taken_at.utc;
        result_.subjects.push_back(std::move(fresh));
        return result_.subjects.back();
    }

    static const char* slip_behind(Doubt::Verdict verdict)
    {
        switch (verdict) {
        case Doubt::Verdict::unit_slip: return "wrong_unit";
        case Doubt::Verdict::cylinders_swapped: return "cylinders_swapped";
        case Doubt::Verdict::decimal_slip:
        case Doubt::Verdict::digits_swapped:
        case Doubt::Verdict::implausible: return "single_misread";
        case Doubt::Verdict::copied:
        case Doubt::Verdict::unsteady: break;
        }
        return nullptr;
    }

    /// What the typing check doubts at the last reading competes with every other cause, and comes first.
    void add_slips()
    {
        for (const Doubt& doubt : judgement_.doubts) {
            const char* cause = slip_behind(doubt.verdict);
            if (!cause || doubt.reading != *result_.reading || series_.trusts(doubt))
                continue;
            const Place place = doubt.place && doubt.place->kind == Place::Kind::cylinder ? *doubt.place : Place::engine();
            SubjectExplanation& subject = subject_at(place);
            const auto same = std::find_if(subject.causes.begin(), subject.causes.end(),
                                           [&](const Hypothesis& one) { return one.fault->id == cause; });
            if (same != subject.causes.end()) {
                same->fits.push_back(doubt.sentence);
                continue;
            }
            Hypothesis slip;
            slip.fault = find_fault(cause);
            word_hypothesis(slip, nullptr, record_.engine.two_stroke());
            slip.fits.push_back(doubt.sentence);
            // A change that several readings carry is no slip of the pen: then it is said last.
            if (subject.causes.empty() || subject.last_reading_only)
                put_first(subject, std::move(slip));
            else {
                slip.rank = static_cast<int>(subject.causes.size()) + 1;
                subject.causes.push_back(std::move(slip));
            }
            if (subject.answer.empty())
                word_subject(subject, record_, nullptr);
        }
    }

    /// Signs of fire or a hot bearing beyond the range in which one asks again: the caution, without any matching.
    void add_alarm_values()
    {
        for (const JudgedValue& value : judgement_.readings.back().values) {
            const Quantity& q = quantity(value.quantity);
            static const std::set<std::string> alarms = {"scavenge_box_temperature", "oil_mist_level", "crankcase_pressure",
                                                         "thrust_bearing_temperature", "lube_oil_outlet_temperature"};
            if (alarms.count(q.name) == 0 || !q.soft.high || value.raw <= *q.soft.high)
                continue;
            SubjectExplanation& subject =
                subject_at(value.place.kind == Place::Kind::cylinder ? value.place : Place::engine());
            subject.remarks.push_back(q.title + " reads " + two_digits(value.raw) + " " + std::string(unit(q.unit).symbol) +
                                      ": this belongs to the alarm procedure and is not judged from a trend.");
            for (const std::string& name : cautions_for({}, q.name, record_.engine.two_stroke()))
                subject.cautions.push_back(name);
            if (subject.answer.empty())
                word_subject(subject, record_, nullptr);
        }
    }

    void add_remarks(SubjectExplanation& subject, const ChangeWindow& window) const
    {
        for (const char* name : {"injection_timing_offset", "exhaust_valve_closing_offset"}) {
            const std::size_t k = *find_fault_quantity(name);
            if (window.changes[k] && std::abs(window.changes[k]->amount) >= 2.0)
                subject.remarks.push_back("The " + fault_quantity_words(k) + " set in the control moved " +
                                          change_words(k, *window.amounts[k]) +
                                          ": pressures that stay may hide wear, and pressures that move may come from it.");
        }
        const Flag* flag = standing_drift(judgement_, subject.subject);
        if (flag && subject.causes.empty() && !flag->pattern_words.empty())
            subject.remarks.push_back("The flag that stands here goes by the pattern of " + flag->pattern_words + ".");
        if (const Flag* question = open_question(judgement_, subject.subject))
            subject.remarks.push_back(question->sentence + " If so, enter it, and the comparison starts anew.");
        const ReadingJudgement& last = judgement_.readings.back();
        if (last.poor || last.steadiness == Steadiness::unsteady)
            subject.remarks.push_back("The last reading was not steady and does not count here: what is said rests on those before it.");
    }

    void add_limit(SubjectExplanation& subject) const
    {
        for (const Flag* flag : judgement_.standing_flags())
            if (is_drift(*flag) && flag->subject == subject.subject && !subject.time_to_limit)
                if (const auto soonest = find_soonest_limit(judgement_, *flag)) {
                    subject.time_to_limit = soonest->time;
                    subject.limit_quantity = soonest->quantity;
                }
    }

    const Judgement& judgement_;
    const EngineRecord& record_;
    SeriesMaker series_;
    std::set<std::string> read_;
    bool comparable_ = false;
    Explanation result_;
};

} // namespace

Explanation explain(const Judgement& judgement)
{
    if (!judgement.record || judgement.readings.size() != judgement.record->readings.size())
        return {};
    return Explainer(judgement).run();
}

EngineRecord record_until(const EngineRecord& record, std::size_t reading)
{
    EngineRecord earlier = record;
    if (reading + 1 < earlier.readings.size())
        earlier.readings.erase(earlier.readings.begin() + static_cast<std::ptrdiff_t>(reading) + 1, earlier.readings.end());
    return earlier;
}

} // namespace evenstroke
