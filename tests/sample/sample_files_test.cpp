// SPDX-License-Identifier: GPL-3.0-or-later
#include "sample_vessel/sample_vessel.h"

#include "tests/sample/csv_lines.h"

#include <gtest/gtest.h>

#include <algorithm>
#include <filesystem>
#include <fstream>
#include <set>
#include <sstream>

using namespace evenstroke::sample;

namespace {

const std::filesystem::path kept_files =
    std::filesystem::path(EVENSTROKE_SOURCE_DIR) / "sample_vessel" / "files";

std::string text_of(const std::filesystem::path& path)
{
    std::ifstream in(path, std::ios::binary);
    std::ostringstream text;
    text << in.rdbuf();
    return text.str();
}

const std::string& content_of(const std::vector<SampleFile>& files, const std::string& path)
{
    const auto found = std::find_if(files.begin(), files.end(),
                                    [&](const SampleFile& file) { return file.relative_path == path; });
    if (found == files.end())
        throw std::runtime_error("not among the sample files: " + path);
    return found->content;
}

const std::vector<SampleFile>& files()
{
    static const std::vector<SampleFile> made = make_sample_vessel();
    return made;
}

bool is_readings_file(const SampleFile& file)
{
    return file.relative_path.ends_with("readings.csv");
}

} // namespace

TEST(SampleVessel, MakesTheFilesThatAreKeptWithTheSources)
{
    for (const SampleFile& file : files())
        EXPECT_TRUE(text_of(kept_files / file.relative_path) == file.content)
            << file.relative_path
            << " differs from the kept file: run make_sample_vessel sample_vessel/files";
}

TEST(SampleVessel, KeepsNoOtherFileThanThoseItMakes)
{
    std::set<std::string> made, kept;
    for (const SampleFile& file : files())
        made.insert(file.relative_path);
    for (const auto& entry : std::filesystem::recursive_directory_iterator(kept_files))
        if (entry.is_regular_file())
            kept.insert(std::filesystem::relative(entry.path(), kept_files).generic_string());
    EXPECT_EQ(kept, made);
}

TEST(SampleVessel, GivesTheSameFilesForTheSameSeed)
{
    const std::vector<SampleFile> again = make_sample_vessel();
    ASSERT_EQ(again.size(), files().size());
    for (std::size_t i = 0; i < again.size(); ++i)
        EXPECT_TRUE(again[i].content == files()[i].content) << again[i].relative_path;
}

TEST(SampleVessel, GivesOtherReadingsOfTheSameEnginesForAnotherSeed)
{
    const std::vector<SampleFile> other = make_sample_vessel(default_seed + 1);
    ASSERT_EQ(other.size(), files().size());
    for (std::size_t i = 0; i < other.size(); ++i) {
        ASSERT_EQ(other[i].relative_path, files()[i].relative_path);
        const bool drawn_by_chance = is_readings_file(files()[i]);
        if (drawn_by_chance || files()[i].relative_path.ends_with(".json")) {
            EXPECT_EQ(other[i].content != files()[i].content, drawn_by_chance) << other[i].relative_path;
        }
    }
}

TEST(SampleVessel, WritesTheColumnsOfThePublicFormat)
{
    EXPECT_EQ(csv_lines(content_of(files(), "main_engine/readings.csv")).front(),
              (CsvLine{"reading", "taken_at", "quantity", "cylinder", "value", "unit", "phase", "text",
                       "missing_reason"}));
    EXPECT_EQ(csv_lines(content_of(files(), "ship_readings.csv")).front(),
              (CsvLine{"reading", "taken_at", "quantity", "value", "unit"}));
    EXPECT_EQ(csv_lines(content_of(files(), "auxiliary_engine_2/events.csv")).front(),
              (CsvLine{"date", "cylinder", "kind", "note", "running_hours", "done_by", "part"}));
}

TEST(SampleVessel, FillsEveryColumnOfEveryLine)
{
    for (const SampleFile& file : files()) {
        if (!file.relative_path.ends_with(".csv"))
            continue;
        EXPECT_EQ(file.content.back(), '\n') << file.relative_path;
        const std::vector<CsvLine> lines = csv_lines(file.content);
        for (std::size_t i = 1; i < lines.size(); ++i)
            ASSERT_EQ(lines[i].size(), lines[0].size()) << file.relative_path << " line " << i + 1;
    }
}

TEST(SampleVessel, WritesEachPlaceOnceInEachReading)
{
    const std::vector<CsvLine> lines = csv_lines(content_of(files(), "main_engine/readings.csv"));
    std::set<CsvLine> places;
    for (std::size_t i = 1; i < lines.size(); ++i)
        EXPECT_TRUE(places.insert({lines[i][0], lines[i][2], lines[i][3], lines[i][6]}).second)
            << "line " << i + 1;
}

TEST(SampleVessel, GivesANumberWordsOrAReasonInEveryLine)
{
    for (const SampleFile& file : files()) {
        if (!is_readings_file(file) || file.relative_path == "ship_readings.csv")
            continue;
        const std::vector<CsvLine> lines = csv_lines(file.content);
        for (std::size_t i = 1; i < lines.size(); ++i) {
            const int given = !lines[i][4].empty() + !lines[i][7].empty() + !lines[i][8].empty();
            ASSERT_EQ(given, 1) << file.relative_path << " line " << i + 1;
        }
    }
}

TEST(SampleVessel, TakesReadingsOneAfterAnother)
{
    for (const SampleFile& file : files()) {
        if (!is_readings_file(file))
            continue;
        std::vector<long long> times;
        std::string last;
        for (const CsvLine& line : csv_lines(file.content)) {
            if (line[0] == "reading" || line[1] == last)
                continue;
            last = line[1];
            times.push_back(minutes_utc(line[1]));
        }
        EXPECT_GE(times.size(), 44U) << file.relative_path;
        EXPECT_TRUE(std::adjacent_find(times.begin(), times.end(), std::greater_equal<>()) == times.end())
            << file.relative_path;
    }
}

TEST(SampleVessel, HasASharedReadingWithinSixHoursOfEveryReading)
{
    std::set<long long> shared;
    for (const CsvLine& line : csv_lines(content_of(files(), "ship_readings.csv")))
        if (line[0] != "reading")
            shared.insert(minutes_utc(line[1]));
    for (const std::string engine : {"main_engine", "auxiliary_engine_1", "auxiliary_engine_2"})
        for (const CsvLine& line : csv_lines(content_of(files(), engine + "/readings.csv"))) {
            if (line[0] == "reading")
                continue;
            const long long time = minutes_utc(line[1]);
            const auto next = shared.lower_bound(time);
            const bool near = (next != shared.end() && *next - time <= 360) ||
                              (next != shared.begin() && time - *std::prev(next) <= 360);
            ASSERT_TRUE(near) << engine << " " << line[1];
        }
}

TEST(SampleVessel, WritesAboutAHundredNumbersForAMainEngineReading)
{
    int count = 0;
    for (const CsvLine& line : csv_lines(content_of(files(), "main_engine/readings.csv")))
        count += line[0] == "2026-11" && !line[4].empty();
    EXPECT_GE(count, 100);
    EXPECT_LE(count, 130);
}
