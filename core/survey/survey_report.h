// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/card/card_review.h"
#include "core/survey/report_blocks.h"
#include "core/trend/judgement.h"

#include <memory>
#include <optional>
#include <string>
#include <vector>

/// The report for a class survey as plain data: what was measured, how it was judged, what was done and what
/// is missing. It is evidence for the survey and approves nothing.
namespace evenstroke {

enum class ReportDepth {
    brief, ///< the first pages and the signatures: can be sent alone
    usual, ///< all sections; values of the last twelve readings
    full,  ///< all sections; values of every reading of the period
};

/// Both days belong to the period, counted in UTC.
struct ReportPeriod
{
    TimePoint from{}, to{};
};

/// A change to a closed reading, as the audit keeps it.
struct CorrectionLine
{
    TimePoint when{};
    std::string who, what, old_value, new_value, reason;
    bool from_card = false; ///< the new value comes from an indicator card
    /// Nothing stood there before: the card added the value, and corrected none.
    bool adds() const { return from_card && old_value.empty(); }
};

/// An indicator diagram that the history keeps with a reading.
struct DiagramLine
{
    std::string reading_id;
    int cylinder = 0;
};

/// A change to the engine's particulars, limits, coefficients, baseline or instruments, as the audit keeps it.
struct EngineChangeLine
{
    TimePoint when{};
    std::string who, what, reason;
};

/// What the report needs beside the judgement.
struct ReportDetails
{
    ReportDepth depth = ReportDepth::full;
    TimePoint date{};           ///< printed as the date of the report
    std::string number;         ///< empty: made from engine and date
    std::string program_version;
    std::string survey_kind;    ///< "annual audit of the maintenance scheme", in the user's words
    std::string owner;
    std::string data_hash;      ///< SHA-256 of the exported data set, hexadecimal
    std::string audit_hash;     ///< of the last line of the audit log
    std::optional<std::size_t> revisions;
    std::vector<CorrectionLine> corrections;
    std::vector<DiagramLine> diagrams;
    std::shared_ptr<const indicator::CardReview> cards; ///< of the newest reading of the period that has any; null: not evaluated
    std::vector<EngineChangeLine> engine_changes;
    std::string chief_engineer, chief_licence, superintendent; ///< empty: left blank for the pen
};

/// A month of the period and what became of its reading.
struct MonthState
{
    enum class State { usable, unsteady, missing };
    int year = 0;
    unsigned month = 0; ///< 1 to 12
    State state = State::missing;
    std::string reason; ///< why it is not usable
};

struct ReportSummary
{
    std::size_t asked = 0;  ///< one a month
    std::size_t taken = 0;  ///< readings in the period
    std::size_t usable = 0; ///< of these: steady enough, with a load
    std::vector<MonthState> months;
    std::vector<std::string> standing;     ///< a line for each flag that stands at the end of the period
    std::size_t began = 0;                 ///< flags and questions that started in the period
    std::vector<std::string> closed;       ///< a line for each of these that no longer stands
    std::size_t doubts = 0;
};

struct SurveyReport
{
    ReportPeriod period;
    ReportDetails details;
    std::string number;               ///< of the report
    std::string ship, engine;         ///< on every page
    ReportSummary summary;
    std::vector<report::Section> sections; ///< in the order of print
};

/// @param judgement of the whole history, so that baselines learned before the period count; only what
///        happened up to the end of the period is printed
SurveyReport make_survey_report(const Judgement& judgement, const ReportPeriod& period, const ReportDetails& details);

/// Months with at least 15 days in the period, in order: a month is asked for where most of it is covered.
ReportSummary summarize(const Judgement& judgement, const ReportPeriod& period);

/// The last `months` months up to and including the day of `to`.
ReportPeriod last_months(TimePoint to, int months);

/// The sentence on the first page that says what the report is and is not.
std::string standing_sentence();

/// All of it as text: captions, tables with tabs between the cells, plots as their values.
std::string report_as_text(const SurveyReport& report);

} // namespace evenstroke
