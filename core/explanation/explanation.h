// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/explanation/fault_catalogue.h"
#include "core/trend/judgement.h"

#include <memory>
#include <optional>
#include <string>
#include <vector>

/// What may lie behind readings that are out of the usual: two or three possible causes, with what fits each and
/// what speaks against it. Never a verdict; "cannot tell apart", "no fault on the list" and "too few readings" are
/// answers.
namespace evenstroke {

/// One quantity's part in the evidence for or against a cause.
struct QuantityEvidence
{
    enum class Says {
        fits,        ///< moved as the cause would move it
        partly_fits, ///< the right way, but clearly more or less than that
        against,     ///< moved, or stayed, where the cause would have it otherwise
        as_usual,    ///< stayed, as it should
        not_read,    ///< would tell something and was not read
    };
    std::size_t quantity = 0; ///< index in fault_quantities()
    Says says = Says::not_read;
    std::optional<double> amount;   ///< how far it moved, in the quantity's unit of comparison
    std::optional<double> expected; ///< how far the cause would have moved it at the size that fits best
    std::string words;              ///< "exhaust temperature 18 °C up, where about 15 °C up is expected"
};

struct Hypothesis
{
    const Fault* fault = nullptr;
    int rank = 0;                    ///< 1 is the likeliest
    std::optional<double> explained; ///< share of the pattern, 0 to 1; nothing for slips of the pen
    std::optional<double> odds;      ///< over those of the first, by every reading since it began; nothing for slips of the pen
    double size = 0.0;               ///< over the fault's reference size
    bool as_likely_as_first = false; ///< these readings cannot tell it from the first
    bool only_for_its_urgency = false; ///< further down the list, and shown because it would not wait
    bool in_the_rest = false;        ///< what the first cause leaves over looks like this one
    std::vector<QuantityEvidence> evidence;
    // Words, ready for a page or a report:
    std::string what;                ///< "This looks like ...", "This partly looks like ..."
    std::vector<std::string> fits, against, not_read;
    std::string order;               ///< why it stands where it does: "odds of about 1 to 6 against the first"
    std::string course;              ///< whether the course over time fits; empty where it says nothing
    std::string check_next, urgency; ///< sentences
    std::vector<std::string> cautions; ///< catalogue names, most urgent first
};

/// A cylinder, or the engine, that is out of the usual.
struct SubjectExplanation
{
    Place subject;
    std::vector<Hypothesis> causes;  ///< in order of rank; none: no fault on the list looks like it
    bool flagged = false;            ///< a flag of the drift method stands on it
    std::string flag_sentence;       ///< of that flag, which goes by what moved most and dates that alone
    std::string flag_note;           ///< what was last said of it on board; empty: nothing that still counts
    bool sudden = true;              ///< came at once; else little by little
    bool last_reading_only = false;  ///< no earlier reading shows it
    TimePoint since{};
    double months = 0.0;
    std::string answer;              ///< one sentence: what can be said at all
    std::string history;             ///< since when, sudden or creeping, after which event
    std::vector<std::string> moved;  ///< what moved clearly, most first: "scavenge pressure 3.1 % down"
    std::string cannot_tell;         ///< empty where the first stands alone; else with the cheapest observation
    std::vector<std::string> cautions; ///< of an alarm value beyond its range; those of a cause stand with it
    std::vector<std::string> remarks; ///< what else belongs here: offsets set in a control, an open question
    std::optional<QuantityId> limit_quantity;
    std::optional<TimeToLimit> time_to_limit; ///< of the drift that stands, if it goes on
};

struct Explanation
{
    std::shared_ptr<const EngineRecord> record;
    std::optional<std::size_t> reading; ///< the last of the judgement; none where there is no reading
    std::vector<SubjectExplanation> subjects; ///< cylinders in order, then the engine
    bool too_few_readings = false;
    std::string sentence; ///< the whole in one sentence, also where nothing is out of the usual
};

/// Explains the last reading of a judgement with what went before it.
Explanation explain(const Judgement& judgement);

/// The record as it stood at a reading, for explaining an earlier one: what came later is left out.
EngineRecord record_until(const EngineRecord& record, std::size_t reading);

} // namespace evenstroke
