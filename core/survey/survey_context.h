// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/sentence_words.h"
#include "core/survey/report_blocks.h"
#include "core/survey/survey_report.h"

#include <map>
#include <string>
#include <utility>
#include <vector>

/// For the parts of core/survey only: what every section needs to know, and the words they share.
namespace evenstroke::report {

/// One value with what was made of it; either may be null.
struct ValueCell
{
    const Value* value = nullptr;
    const JudgedValue* judged = nullptr;
};
using CellKey = std::pair<QuantityId, Place>;

struct Context
{
    Context(const Judgement& whole, const ReportPeriod& wanted_period, const ReportDetails& report_details);

    const Judgement& judgement;
    const EngineRecord& record;
    const Engine& engine;
    const ReportPeriod& period;
    const ReportDetails& details;
    ReportSummary summary;
    std::vector<std::size_t> readings;                ///< indices of those in the period
    std::vector<std::map<CellKey, ValueCell>> cells;  ///< one a reading of the period
    std::vector<const Event*> events;                 ///< of the period
    std::vector<const Flag*> flags;                   ///< that began, stood or ended in the period

    bool contains(TimePoint time) const;
    /// Readings whose values are printed: all, or the last twelve. Indices into `readings`.
    std::vector<std::size_t> printed_readings() const;
};

/// The whole of a day: a period's last day counts to its end.
TimePoint end_of_day(TimePoint day);
/// "bar gauge", "°C", "r/min"; empty for bare numbers and words.
std::string unit_words(UnitId unit, PressureKind kind);
std::string unit_of(const Quantity& quantity);
/// Of deviation and apart: a difference has no kind of pressure.
std::string deviation_unit(const Quantity& quantity);
/// Events at the flag's subject since it began, in one line: what was done about it; "none recorded".
std::string work_since(const Context& context, const Flag& flag);
/// What the flag asks to be checked; without the card to be taken where the newest reading of the period has one of this cylinder.
std::string next_check_words(const Context& context, const Flag& flag);
/// Values that cards added to closed readings, where nothing had stood before; the rest of the changes are corrections.
std::size_t added_from_cards(const ReportDetails& details);
/// "2.5 months"
std::string months_words(double months);
/// "76 %"; a dash where the load is not known.
std::string load_words(const std::optional<double>& load_percent);
std::string missing_words(MissingReason reason);
/// "source not given" where there is none.
std::string source_words(const std::string& source);
std::string event_title(const Event& event);
/// Usable for comparison: not unsteady, not poor, its load known.
bool usable(const ReadingJudgement& reading);
/// "steady", "unsteady", "steady, but the values scatter more than usual"
std::string state_words(const ReadingJudgement& reading);
/// The level's mark and its word, "◐ watch"; what is quiet has the word alone.
std::string level_words(Level level);
/// "◐ watch since 2030-11-12", "■ act since 2031-02-14 (began 2030-11-12 as watch)", "began … as watch, no longer standing"
std::string standing_words(const Judgement& judgement, const Flag& flag);
/// The same with the flag's sentence behind it.
std::string flag_line(const Judgement& judgement, const Flag& flag);
/// "Cylinder 4, compression pressure"
std::string flag_subject(const Judgement& judgement, const Flag& flag);

/// The results, remarks and differences of the cards that were evaluated for the report.
void add_cards(const Context&, Section&);

// The sections, in the order of print.
Section title_section(const Context&);
Section summary_section(const Context&);
Section items_section(const Context&);
Section strips_section(const Context&);
Section cylinder_values_section(const Context&);
Section words_section(const Context&);
Section engine_values_section(const Context&);
Section reference_section(const Context&);
Section baseline_section(const Context&);
Section limits_section(const Context&);
Section trends_section(const Context&);
Section diagrams_section(const Context&);
Section flags_section(const Context&);
Section events_section(const Context&);
Section gaps_section(const Context&);
Section instruments_section(const Context&);
Section method_section(const Context&);
Section integrity_section(const Context&);
Section sign_off_section(const Context&);

} // namespace evenstroke::report
