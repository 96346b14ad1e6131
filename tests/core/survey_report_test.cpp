// SPDX-License-Identifier: GPL-3.0-or-later
#include "tests/core/survey_fixture.h"

#include "core/survey/rounding.h"

#include <gtest/gtest.h>
#include <algorithm>

namespace evenstroke {
namespace {

using namespace survey_fixture;
using report::Plot;
using report::Section;
using report::Table;

bool contains(const std::string& text, std::string_view part) { return text.find(part) != std::string::npos; }

const Section* find_section(const SurveyReport& report, const std::string& title)
{
    for (const Section& section : report.sections)
        if (contains(section.title, title))
            return &section;
    return nullptr;
}

template <typename Kind>
std::vector<const Kind*> blocks_of(const Section* section)
{
    std::vector<const Kind*> found;
    if (section)
        for (const report::Block& block : section->blocks)
            if (const Kind* one = std::get_if<Kind>(&block))
                found.push_back(one);
    return found;
}

const Table* find_table(const Section* section, const std::string& caption)
{
    for (const Table* table : blocks_of<Table>(section))
        if (contains(table->caption, caption))
            return table;
    return nullptr;
}

// ---------------------------------------------------------------------------------------------- rounding

TEST(RoundingForPrint, GoesHalfAwayFromZero)
{
    EXPECT_EQ(rounded_text(0.5, 0), "1");
    EXPECT_EQ(rounded_text(-0.5, 0), "\u22121");
    EXPECT_EQ(rounded_text(2.5, 0), "3");
    EXPECT_EQ(rounded_text(-2.5, 0), "\u22123");
    EXPECT_EQ(rounded_text(2.4999, 0), "2");
}

TEST(RoundingForPrint, TakesADecimalHalfForTheHalfThatWasMeant)
{
    // The doubles are 2.67499999999999982236431605997495353221893310546875 and 1.00499999999999989…
    EXPECT_EQ(rounded_text(2.675, 2), "2.68");
    EXPECT_EQ(rounded_text(1.005, 2), "1.01");
    EXPECT_EQ(rounded_text(-1.005, 2), "\u22121.01");
    EXPECT_EQ(rounded_text(2.6749999, 2), "2.67") << "a number that only comes near stays below";
}

TEST(RoundingForPrint, NeverPrintsMinusZero)
{
    EXPECT_EQ(rounded_text(-0.04, 1), "0.0");
    EXPECT_EQ(rounded_text(-0.04, 1, Sign::always), "0.0");
    EXPECT_EQ(rounded_text(0.04, 0, Sign::always), "0");
}

TEST(RoundingForPrint, PutsSignsWhereDifferencesAskForThem)
{
    EXPECT_EQ(rounded_text(5.64, 1, Sign::always), "+5.6");
    EXPECT_EQ(rounded_text(-5.66, 1, Sign::always), "\u22125.7");
    EXPECT_EQ(rounded_text(12345.6, 0), "12346");
}

// ----------------------------------------------------------------------------------------------- summary

TEST(SurveySummary, AsksForOneReadingAMonth)
{
    const ReportSummary summary = summarize(make_judgement(), year_to_march());
    EXPECT_EQ(summary.asked, 12u);
    EXPECT_EQ(summary.taken, 12u);
    EXPECT_EQ(summary.usable, 12u);
}

TEST(SurveySummary, CountsAMonthWhereMostOfItIsCovered)
{
    // 17 days of March 2030 and 14 of March 2031: twelve months are asked for, not thirteen.
    const ReportSummary summary = summarize(make_judgement(), {day("2030-03-15"), day("2031-03-14")});
    ASSERT_EQ(summary.months.size(), 12u);
    EXPECT_EQ(summary.months.front().month, 3u);
    EXPECT_EQ(summary.months.back().month, 2u);
}

TEST(SurveySummary, NamesMissingAndUnsteadyMonths)
{
    Scene scene;
    scene.skipped = {3};  // December 2030
    scene.unsteady = {6}; // September 2030
    const ReportSummary summary = summarize(make_judgement(scene), year_to_march());
    EXPECT_EQ(summary.taken, 11u);
    EXPECT_EQ(summary.usable, 10u);
    std::vector<unsigned> missing_months, unsteady_months;
    for (const MonthState& month : summary.months) {
        if (month.state == MonthState::State::missing)
            missing_months.push_back(month.month);
        if (month.state == MonthState::State::unsteady) {
            unsteady_months.push_back(month.month);
            EXPECT_TRUE(contains(month.reason, "104 r/min")) << month.reason;
        }
    }
    EXPECT_EQ(missing_months, std::vector<unsigned>{12});
    EXPECT_EQ(unsteady_months, std::vector<unsigned>{9});
}

TEST(SurveySummary, LastMonthsEndOnTheDayAsked)
{
    const ReportPeriod year = last_months(day("2031-03-14"), 12);
    EXPECT_EQ(date_text(year.from), "2030-03-15");
    EXPECT_EQ(date_text(year.to), "2031-03-14");
    EXPECT_EQ(date_text(last_months(day("2031-03-31"), 1).from), "2031-03-01") << "February has no 31st";
}

// ------------------------------------------------------------------------------------------------ report

TEST(SurveyReportContents, StandsInTheOrderOfASurvey)
{
    const SurveyReport report = make_survey_report(make_judgement(), year_to_march(), make_details());
    std::vector<std::string> titles;
    for (const Section& section : report.sections)
        titles.push_back(section.title);
    const std::vector<std::string> wanted{"Report of engine performance readings", "Summary", "Flags and questions", "Survey items concerned", "All cylinders at a glance",
                                          "Values of the cylinders", "Words, choices and what was not read", "Values of the engine, its turbochargers and coolers, and the ship",
                                          "Reference conditions and corrections", "Baseline", "Limits in force", "Trends", "Indicator diagrams",
                                          "Overhauls, adjustments and other events",
                                          "Missing and unsteady readings, doubts and corrections", "Instruments",
                                          "Method, false alarms, units and rounding", "Integrity of the data", "Signatures"};
    EXPECT_EQ(titles, wanted);
}

TEST(SurveyReportContents, AFlagThatRoseIsNotDatedBackToItsBeginning)
{
    Judgement judgement = make_judgement();
    Flag& flag = judgement.flags.front();
    const auto day_of_reading = [&](std::size_t i) { return date_text(judgement.record->readings[i].taken_at.utc); };
    const std::string began = day_of_reading(flag.reading), later = day_of_reading(flag.reading + 2);
    EXPECT_TRUE(contains(report_as_text(make_survey_report(judgement, year_to_march(), make_details())), "\u25d0 watch since " + began + ": "));
    flag.level_now = Level::act;
    std::string text = report_as_text(make_survey_report(judgement, year_to_march(), make_details()));
    EXPECT_TRUE(contains(text, "\u25a0 act now (began " + began + " as watch): Cylinder 4")) << "the day of the rise is not known";
    flag.raised_at = flag.reading + 2;
    text = report_as_text(make_survey_report(judgement, year_to_march(), make_details()));
    EXPECT_TRUE(contains(text, "\u25a0 act since " + later + " (began " + began + " as watch): Cylinder 4"));
    EXPECT_TRUE(contains(text, "Raised in level:\t" + later + ", cylinder 4, compression pressure"));
    EXPECT_FALSE(contains(text, "act since " + began));
    flag.level_now = Level::quiet;
    text = report_as_text(make_survey_report(judgement, year_to_march(), make_details()));
    EXPECT_TRUE(contains(text, "began " + began + " as watch, no longer standing"));
}

TEST(SurveyReportContents, SummaryNamesWhatChangedAndWhichActionsAreOpen)
{
    Judgement judgement = make_judgement();
    const auto state = [&] {
        const SurveyReport report = make_survey_report(judgement, year_to_march(), make_details());
        const Table* actions = find_table(find_section(report, "Summary"), "What the flags ask for");
        return actions && actions->rows.size() == 1 ? actions->rows[0].cells : std::vector<std::string>(5);
    };
    EXPECT_EQ(state()[2], "Compression with the indicator, scavenge-port inspection.");
    EXPECT_EQ(state()[3], "none recorded");
    EXPECT_EQ(state()[4], "open");
    const std::string text = report_as_text(make_survey_report(judgement, year_to_march(), make_details()));
    EXPECT_TRUE(contains(text, "Work and other events:\t2030-05-20, overhaul (cylinder 2); 2030-11-02, "));
    EXPECT_TRUE(contains(text, "The day of the last report is not recorded here"));
    EXPECT_TRUE(contains(text, "Actions agreed elsewhere, and who is to do them, are not recorded here."));
    judgement.flags.front().level_now = Level::quiet;
    EXPECT_EQ(state()[4], "closed");
}

TEST(SurveyReportContents, IndicatorDiagramsAreListedOrSaidToBeNone)
{
    const Judgement judgement = make_judgement();
    ReportDetails details = make_details();
    EXPECT_TRUE(contains(report_as_text(make_survey_report(judgement, year_to_march(), details)), "None in this period: the history holds no indicator diagram"));
    auto record = std::make_shared<EngineRecord>(*judgement.record);
    record->readings.back().id = "r-last";
    Judgement named = judgement;
    named.record = record;
    details.diagrams = {{"r-last", 1}, {"r-last", 2}, {"r-of another time", 3}};
    const SurveyReport report = make_survey_report(named, year_to_march(), details);
    const Table* table = find_table(find_section(report, "Indicator"), "Kept in the history");
    ASSERT_NE(table, nullptr);
    ASSERT_EQ(table->rows.size(), 1u);
    EXPECT_EQ(table->rows[0].cells[2], "1, 2");
}

TEST(SurveyReportContents, SaysWhichConditionsAreNotUsedAndWhichSettingsChanged)
{
    ReportDetails details = make_details();
    std::string text = report_as_text(make_survey_report(make_judgement(), year_to_march(), details));
    EXPECT_TRUE(contains(text, "Relative humidity:\tnot used"));
    EXPECT_TRUE(contains(text, "The audit log records no change of this engine's limits"));
    details.engine_changes = {{day("2029-01-01"), "chief engineer", "changed, revision 2", ""},
                              {day("2030-07-01"), "superintendent", "changed, revision 3", "limit of the maker's letter"}};
    text = report_as_text(make_survey_report(make_judgement(), year_to_march(), details));
    EXPECT_TRUE(contains(text, "2030-07-01\tchanged, revision 3\tsuperintendent\tlimit of the maker's letter"));
    EXPECT_FALSE(contains(text, "revision 2"));
}

TEST(SurveyReportContents, LevelsInTheStripsAreWordAndMark)
{
    const SurveyReport report = make_survey_report(make_judgement(), year_to_march(), make_details());
    const auto strips = blocks_of<report::Strips>(find_section(report, "glance"));
    ASSERT_EQ(strips.size(), 1u);
    EXPECT_EQ(strips[0]->rows[0].cells[3].remark, "\u25d0 watch");
    EXPECT_EQ(strips[0]->rows[0].cells[0].remark, "") << "quiet has no mark";
}

TEST(SurveyReportContents, FirstPageSaysWhatTheReportIsNot)
{
    const SurveyReport report = make_survey_report(make_judgement(), year_to_march(), make_details());
    const std::string text = report_as_text(report);
    EXPECT_TRUE(contains(text, standing_sentence()));
    EXPECT_TRUE(contains(standing_sentence(), "the surveyor decides"));
    EXPECT_TRUE(contains(text, "Quiet Barley"));
    EXPECT_TRUE(contains(text, "IMO number:\t9000001"));
    EXPECT_TRUE(contains(text, "Class:\tnot given"));
}

TEST(SurveyReportContents, BriefHasFirstPagesAndSignaturesOnly)
{
    ReportDetails details = make_details();
    details.depth = ReportDepth::brief;
    const SurveyReport report = make_survey_report(make_judgement(), year_to_march(), details);
    EXPECT_EQ(report.sections.size(), 4u);
    EXPECT_NE(find_section(report, "Signatures"), nullptr);
    EXPECT_EQ(find_section(report, "Values"), nullptr);
}

TEST(SurveyReportContents, RawStandsAsTypedAboveTheCorrectedValue)
{
    const SurveyReport report = make_survey_report(make_judgement(), year_to_march(), make_details());
    const Table* table = find_table(find_section(report, "Values of the cylinders"), "ompression pressure");
    ASSERT_NE(table, nullptr);
    EXPECT_TRUE(contains(table->caption, "bar gauge")) << table->caption;
    ASSERT_GE(table->rows.size(), 4u);
    EXPECT_EQ(table->rows[0].cells[2], "read");
    EXPECT_EQ(table->rows[1].cells[2], "corrected");
    EXPECT_EQ(table->rows[2].cells[2], "deviation");
    EXPECT_EQ(table->rows[3].cells[2], "apart");
    const double raw = std::stod(table->rows[0].cells[3]);
    EXPECT_EQ(table->rows[1].cells[3], rounded_text(raw + 1.0, 1));
    EXPECT_EQ(table->rows[3].cells[3], rounded_text(raw - 105.0, 1, Sign::always));
}

TEST(SurveyReportContents, BlanksSayWhyTheyAreBlank)
{
    const SurveyReport report = make_survey_report(make_judgement(), year_to_march(), make_details());
    const Table* table = find_table(find_section(report, "Values of the cylinders"), "ompression pressure");
    ASSERT_NE(table, nullptr);
    const auto row = std::find_if(table->rows.begin(), table->rows.end(), [](const report::Row& one) { return contains(one.cells[0], "2031-02-14"); });
    ASSERT_NE(row, table->rows.end());
    EXPECT_EQ(row->cells[4], "out of order") << "cylinder 2";
    EXPECT_EQ(row->cells[5], "not read") << "cylinder 3";
    const std::string text = report_as_text(report);
    EXPECT_TRUE(contains(text, "Not fitted in this period: liner"));
    EXPECT_TRUE(contains(text, "Not read in this period: "));
}

TEST(SurveyReportContents, UsualDepthPrintsTheLastTwelveReadings)
{
    Scene scene;
    scene.months = 30;
    const ReportPeriod period{day("2028-10-01"), day("2031-03-31")};
    ReportDetails details = make_details();
    const auto rows = [&](ReportDepth depth) {
        details.depth = depth;
        const SurveyReport report = make_survey_report(make_judgement(scene), period, details);
        return find_table(find_section(report, "Values of the cylinders"), "ompression pressure")->rows.size();
    };
    EXPECT_EQ(rows(ReportDepth::usual), 12u * 4u);
    EXPECT_EQ(rows(ReportDepth::full), 30u * 4u);
}

TEST(SurveyReportContents, FlagCarriesEvidenceChancePatternCautionAndNextCheck)
{
    const SurveyReport report = make_survey_report(make_judgement(), year_to_march(), make_details());
    const std::string text = report_as_text(report);
    for (const char* part : {"has fallen 0.6 bar a month", "once in 400 engine-years", "blow-by (rings or exhaust valve)", "6.1, threshold 4.80",
                             "scavenge-port inspection", "a fall of 8 bar is reached in 3.0 months to 11 months", "Never open a scavenge space",
                             "\u22120.60 bar\tmonth\t4.1"})
        EXPECT_TRUE(contains(text, part)) << part;
    EXPECT_TRUE(contains(text, "maker's instructions")) << "who decides stands beside every caution";
    const auto plots = blocks_of<Plot>(find_section(report, "Flags"));
    ASSERT_EQ(plots.size(), 2u);
    EXPECT_EQ(plots[0]->flags.size(), 1u);
    EXPECT_TRUE(plots[0]->band.has_value());
    EXPECT_EQ(plots[1]->limits.front().value, 4.8);
}

TEST(SurveyReportContents, QuietEngineSaysSo)
{
    Scene scene;
    scene.with_flag = false;
    const std::string text = report_as_text(make_survey_report(make_judgement(scene), year_to_march(), make_details()));
    EXPECT_TRUE(contains(text, "No flag and no question began or stood in this period."));
    EXPECT_TRUE(contains(text, "State, last reading:\tquiet"));
}

TEST(SurveyReportContents, SourcesStandBesideLimitsCoefficientsAndBaseline)
{
    const SurveyReport report = make_survey_report(make_judgement(), year_to_march(), make_details());
    const Table* limits = find_table(find_section(report, "Limits"), "limits");
    ASSERT_NE(limits, nullptr);
    EXPECT_EQ(limits->rows[0].cells[3], "165.0");
    EXPECT_EQ(limits->rows[0].cells[4], "nameplate");
    const std::string text = report_as_text(report);
    for (const char* part : {"+0.002000\t\u22120.001000\tshop test, sheet 4", "Source:\tshop test, sheet 2", "PI-1\t2030-02-11\t\u00b11.5 bar"})
        EXPECT_TRUE(contains(text, part)) << part;
}

TEST(SurveyReportContents, EventsNameTheirHoursAndWhatTheyDoToTheComparison)
{
    const SurveyReport report = make_survey_report(make_judgement(), year_to_march(), make_details());
    const Table* events = find_table(find_section(report, "Overhauls"), "order of time");
    ASSERT_NE(events, nullptr);
    ASSERT_EQ(events->rows.size(), 2u);
    EXPECT_EQ(events->rows[0].cells[1], "cylinder 2");
    EXPECT_EQ(events->rows[0].cells[3], "35000");
    EXPECT_EQ(events->rows[0].cells[4], "compared anew");
    EXPECT_EQ(events->rows[0].cells[5], "new rings; second engineer");
    EXPECT_TRUE(contains(events->note, "no approved record book")) << "fuel valves touch the technical file";
}

TEST(SurveyReportContents, SurveyItemsCountHoursSinceTheyWereOpened)
{
    const SurveyReport report = make_survey_report(make_judgement(), year_to_march(), make_details());
    const Table* items = find_table(find_section(report, "Survey items"), "items");
    ASSERT_NE(items, nullptr);
    const auto opened = std::find_if(items->rows.begin(), items->rows.end(), [](const report::Row& row) { return row.cells[0] == "Cylinder 2"; });
    ASSERT_NE(opened, items->rows.end());
    EXPECT_EQ(opened->cells[2], "2030-05-20");
    EXPECT_EQ(std::next(opened)->cells[2], "2030-05-20, overhaul") << "the exhaust valve was opened with it";
    EXPECT_EQ(opened->cells[3], "5000 h");
    EXPECT_EQ(items->columns.back().title, "Surveyor");
    for (const report::Row& row : items->rows)
        EXPECT_EQ(row.cells.back(), "");
}

TEST(SurveyReportContents, MethodStatesVersionRoundingAndFalseAlarms)
{
    const std::string text = report_as_text(make_survey_report(make_judgement(), year_to_march(), make_details()));
    EXPECT_TRUE(contains(text, "Method version " + std::to_string(method_version)));
    EXPECT_TRUE(contains(text, "half away from zero"));
    EXPECT_TRUE(contains(text, "one flag by chance in five years"));
    EXPECT_TRUE(contains(text, std::string(64, 'a'))) << "hash of the data set";
}

TEST(SurveyReportContents, SurveyorsFieldsStayBlank)
{
    const SurveyReport report = make_survey_report(make_judgement(), year_to_march(), make_details());
    const auto signs = blocks_of<report::SignOff>(find_section(report, "Signatures"));
    ASSERT_EQ(signs.size(), 3u);
    EXPECT_EQ(signs[2]->role, "Surveyor");
    for (const auto& field : signs[2]->fields)
        EXPECT_TRUE(field.value.empty()) << field.name;
}

TEST(SurveyReportContents, DoubtsAndCorrectionsAreListed)
{
    ReportDetails details = make_details();
    details.corrections.push_back({day("2031-01-20"), "chief engineer", "2030-12, maximum pressure, cylinder 1", "112", "121", "misread"});
    const std::string text = report_as_text(make_survey_report(make_judgement(), year_to_march(), details));
    EXPECT_TRUE(contains(text, "was 104.9 meant?"));
    EXPECT_TRUE(contains(text, "112\t121\t1\tchief engineer\tmisread"));
}

TEST(SurveyReportContents, ValuesAddedFromCardsAreNoCorrections)
{
    ReportDetails details = make_details();
    CorrectionLine added{day("2031-01-20"), "chief engineer", "2030-12, maximum pressure, cylinder 1", "", "121", "from the card"};
    added.from_card = true;
    CorrectionLine replaced = added;
    replaced.what = "2030-12, maximum pressure, cylinder 2";
    replaced.old_value = "118";
    details.corrections = {added, replaced};
    const SurveyReport report = make_survey_report(make_judgement(), year_to_march(), details);
    const std::string text = report_as_text(report);
    EXPECT_TRUE(contains(text, "1 from indicator cards"));
    EXPECT_TRUE(contains(text, "1 value was added from indicator cards"));
    const Table* table = find_table(find_section(report, "Missing"), "corrected after");
    ASSERT_NE(table, nullptr);
    ASSERT_EQ(table->rows.size(), 1u);
    EXPECT_EQ(table->rows[0].cells[2], "118");
}

TEST(SurveyReportContents, ACardIsNotAskedForWhereTheNewestReadingHasOne)
{
    Judgement judgement = make_judgement();
    ASSERT_FALSE(judgement.flags.empty());
    judgement.flags.front().subject = Place::cylinder(2);
    judgement.flags.front().next_check = "Take a card; look at the smoke. Then test the fuel valves.";
    ReportDetails details = make_details();
    details.diagrams.clear();
    const std::string without = report_as_text(make_survey_report(judgement, year_to_march(), details));
    EXPECT_TRUE(contains(without, "Take a card; look at the smoke."));
    for (const Reading& reading : judgement.record->readings)
        details.diagrams.push_back({reading.id, 2});
    const std::string with = report_as_text(make_survey_report(judgement, year_to_march(), details));
    EXPECT_FALSE(contains(with, "Take a card; look at the smoke."));
    EXPECT_TRUE(contains(with, "Look at the smoke. Then test the fuel valves."));
}

TEST(SurveyReportContents, CorrectionsOfOneValueAreOneLine)
{
    ReportDetails details = make_details();
    const std::string what = "2030-12, maximum pressure, cylinder 1";
    details.corrections = {{day("2031-01-20"), "chief engineer", what, "112", "1210", "misread"},
                           {day("2031-01-21"), "second engineer", what, "1210", "121", "a nought too many"},
                           {day("2031-02-02"), "chief engineer", "2030-12, maximum pressure, cylinder 2", "119", "118", "misread"}};
    const SurveyReport report = make_survey_report(make_judgement(), year_to_march(), details);
    const Table* table = find_table(find_section(report, "Missing"), "corrected after");
    ASSERT_NE(table, nullptr);
    ASSERT_EQ(table->rows.size(), 2u);
    EXPECT_EQ(table->rows[0].cells, (std::vector<std::string>{"2031-01-21", what, "112", "121", "2", "chief engineer; second engineer", "misread; a nought too many"}));
}

TEST(SurveyReportContents, MixedUnitsStandOncePerRow)
{
    Judgement judgement = make_judgement();
    auto record = std::make_shared<EngineRecord>(*judgement.record);
    const QuantityId id = id_of("compression_pressure");
    for (Value& value : record->readings.back().values)
        if (value.quantity == id)
            value.unit = find_unit("kgf/cm2").value().id;
    judgement.record = record;
    const SurveyReport report = make_survey_report(judgement, last_months(record->readings.back().taken_at.utc, 12), make_details());
    const Table* table = find_table(find_section(report, "Values of the cylinders"), "ompression pressure");
    ASSERT_NE(table, nullptr);
    EXPECT_TRUE(contains(table->rows[0].cells[2], "read, bar gauge")) << table->rows[0].cells[2];
    bool other = false;
    for (const report::Row& row : table->rows) {
        other = other || contains(row.cells[2], "read, kgf/cm");
        for (std::size_t c = 3; c < row.cells.size(); ++c)
            EXPECT_FALSE(contains(row.cells[c], "bar") || contains(row.cells[c], "kgf")) << row.cells[c];
    }
    EXPECT_TRUE(other);
}

TEST(SurveyReportContents, SaysSoWhereACalibrationIsOlderThanTwoYears)
{
    const auto report_with = [](const char* calibrated) {
        Judgement judgement = make_judgement();
        auto record = std::make_shared<EngineRecord>(*judgement.record);
        record->engine.instruments.assign(1, Instrument{});
        record->engine.instruments[0].quantity = "maximum_pressure";
        record->engine.instruments[0].calibrated = calibrated;
        judgement.record = record;
        ReportDetails details = make_details();
        details.date = day("2031-04-01");
        return report_as_text(make_survey_report(judgement, year_to_march(), details));
    };
    EXPECT_TRUE(contains(report_with("2029-03-31"), "2029-03-31, older than 24 months"));
    EXPECT_FALSE(contains(report_with("2029-04-01"), "older than 24 months"));
    EXPECT_FALSE(contains(report_with("at the yard"), "older than 24 months")) << "what is no date is not judged";
}

TEST(SurveyReportContents, TheSummaryCountsReadingsInOneLine)
{
    const std::string text = report_as_text(make_survey_report(make_judgement(), year_to_march(), make_details()));
    EXPECT_TRUE(contains(text, "12 asked for (one a month), ")) << text.substr(0, 2000);
}

TEST(SurveyReportContents, MakesNoPromises)
{
    const std::string text = report_as_text(make_survey_report(make_judgement(), year_to_march(), make_details()));
    for (const char* word : {"guarantee", "diagnos", "certain ", "invalid", "failed", "error"})
        EXPECT_FALSE(contains(text, word)) << word;
}

TEST(SurveyReportContents, NoReadingInThePeriodGivesAReportThatSaysSo)
{
    const SurveyReport report = make_survey_report(make_judgement(), {day("2032-01-01"), day("2032-12-31")}, make_details());
    EXPECT_EQ(report.summary.taken, 0u);
    EXPECT_EQ(report.summary.asked, 12u);
    EXPECT_TRUE(contains(report_as_text(report), "no reading was taken"));
}

} // namespace
} // namespace evenstroke
