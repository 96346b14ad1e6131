// SPDX-License-Identifier: GPL-3.0-or-later
#include "sample_vessel/sample_vessel.h"
#include "sample_vessel/scenario.h"
#include "sample_vessel/typing_slips.h"

#include "tests/sample/csv_lines.h"

#include <gtest/gtest.h>

#include <algorithm>
#include <map>
#include <set>

using namespace evenstroke::sample;

namespace {

std::map<std::string, std::vector<CsvLine>> files_by_path()
{
    std::map<std::string, std::vector<CsvLine>> files;
    for (const SampleFile& file : make_sample_vessel())
        if (file.relative_path.ends_with(".csv"))
            files[file.relative_path] = csv_lines(file.content);
    return files;
}

std::string folder_of(const std::string& engine)
{
    std::string folder = engine;
    std::replace(folder.begin(), folder.end(), ' ', '_');
    return folder;
}

/// Dates "2026-01-14" of the readings of an engine.
std::vector<std::string> reading_dates(const std::vector<CsvLine>& lines)
{
    std::set<std::string> dates;
    for (const CsvLine& line : lines)
        if (line[0] != "reading")
            dates.insert(line[1].substr(0, 10));
    return {dates.begin(), dates.end()};
}

} // namespace

TEST(SampleTruth, HasTwoFaultsAndAHandfulOfSlips)
{
    const SampleTruth truth = sample_truth();
    ASSERT_EQ(truth.faults.size(), 2U);
    EXPECT_EQ(truth.faults[0].cause, "ring_blow_by");
    EXPECT_EQ(truth.faults[1].cause, "nozzle_wear");
    EXPECT_EQ(truth.typing_errors.size(), 8U); // seven slips, one of them on two cylinders
    EXPECT_EQ(truth.unsteady.size(), 2U);
}

TEST(SampleTruth, LetsAFaultBeginOnlyAfterTwelveReadingsWithoutWorkAndLeavesItAlone)
{
    const auto files = files_by_path();
    for (const SampleFault& fault : sample_truth().faults) {
        std::string last_work = "2000-01-01";
        for (const CsvLine& event : files.at(folder_of(fault.engine) + "/events.csv"))
            if (event[1] == std::to_string(fault.cylinder))
                last_work = std::max(last_work, event[0]);
        EXPECT_LT(last_work, fault.onset) << fault.engine;
        const std::vector<std::string> dates =
            reading_dates(files.at(folder_of(fault.engine) + "/readings.csv"));
        const auto between = std::count_if(dates.begin(), dates.end(), [&](const std::string& date) {
            return date > last_work && date <= fault.onset;
        });
        EXPECT_GE(between, 12) << fault.engine;
        const auto after = std::count_if(dates.begin(), dates.end(),
                                         [&](const std::string& date) { return date > fault.onset; });
        EXPECT_GE(after, 8) << fault.engine;
    }
}

TEST(SampleTruth, NamesReadingsThatAreInTheFiles)
{
    const auto files = files_by_path();
    for (const SampleTypingError& error : sample_truth().typing_errors) {
        const std::vector<CsvLine>& lines = files.at(folder_of(error.engine) + "/readings.csv");
        const bool found = std::any_of(lines.begin(), lines.end(), [&](const CsvLine& line) {
            return line[0] == error.reading && (error.quantity.empty() || line[2] == error.quantity) &&
                   (error.cylinder.empty() || line[3] == error.cylinder) && !line[4].empty();
        });
        EXPECT_TRUE(found) << error.engine << " " << error.reading << " " << error.quantity;
    }
}

TEST(SampleTruth, WritesEachSlipIntoItsOwnPlaceOnly)
{
    Scenario careful = sample_scenario();
    careful.typing_errors = {{0, "2023-10", "exhaust_temperature", 3, 0, Slip::digits_swapped}};
    Sheet sheet;
    sheet.name = "2023-10";
    sheet.number("exhaust_temperature", 310.0, {"°C", 0}, 2);
    sheet.number("exhaust_temperature", 310.0, {"°C", 0}, 3);
    make_slip(sheet, careful.typing_errors.front());
    EXPECT_EQ(sheet.lines[0].value, "310");
    EXPECT_EQ(sheet.lines[1].value, "130");
}

TEST(TypingSlips, LosesOnePlace)
{
    EXPECT_EQ(with_lost_place("152.3"), "15.23");
    EXPECT_EQ(with_lost_place("5.4"), "0.54");
    EXPECT_EQ(with_lost_place("28950"), "2895");
}

TEST(TypingSlips, ExchangesThePairThatChangesTheNumberMost)
{
    EXPECT_EQ(with_digits_exchanged("352"), "532");
    EXPECT_EQ(with_digits_exchanged("64.3"), "46.3");
    EXPECT_EQ(with_digits_exchanged("303"), "330") << "a zero must not come first";
}

TEST(TypingSlips, ExchangesAllMeasuredValuesOfTwoCylinders)
{
    Sheet sheet;
    sheet.number("maximum_pressure", 140.0, {"bar", 1}, 2);
    sheet.number("maximum_pressure", 135.0, {"bar", 1}, 5);
    sheet.number("cylinder_running_hours", 900.0, {"h", 0}, 2);
    sheet.number("cylinder_running_hours", 700.0, {"h", 0}, 5);
    make_slip(sheet, {0, "", "", 2, 5, Slip::cylinders_swapped});
    EXPECT_EQ(sheet.find("maximum_pressure", 2)->value, "135.0");
    EXPECT_EQ(sheet.find("maximum_pressure", 5)->value, "140.0");
    EXPECT_EQ(sheet.find("cylinder_running_hours", 2)->value, "900") << "hours come from another list";
}
