// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/reading/reading.h"

#include <gtest/gtest.h>

namespace evenstroke {
namespace {

using namespace std::chrono;

bool contains(const std::string& text, std::string_view part)
{
    return text.find(part) != std::string::npos;
}

TEST(ParseTime, TakesIso8601WithAZone)
{
    const TimePoint expected = sys_days(2026y / March / 14) + 6h + 30min;
    for (const std::string_view text :
         {"2026-03-14T06:30Z", "2026-03-14T06:30:00Z", "2026-03-14T06:30:00.000Z", "2026-03-14T06:30z",
          "2026-03-14 06:30Z", "2026-03-14T08:30+02:00", "2026-03-14T08:30:00+0200", "2026-03-14T08:30+02",
          "2026-03-14T01:00-05:30",
          "2026-03-14T01:00\u2212"
          "05:30",
          "2026-03-14T20:30+14:00", "2026-03-13T18:30-12:00", " 2026-03-14T06:30Z\n"}) {
        const Result<StampedTime> time = parse_time(text);
        ASSERT_TRUE(time.has_value()) << text << ": " << time.error().text();
        EXPECT_EQ(time.value().utc, expected) << text;
    }
}

TEST(ParseTime, KeepsTheOffsetOfTheShipsClock)
{
    EXPECT_EQ(parse_time("2026-03-14T06:30Z").value().offset_minutes, 0);
    EXPECT_EQ(parse_time("2026-03-14T08:30+02:00").value().offset_minutes, 120);
    EXPECT_EQ(parse_time("2026-03-14T01:00-0530").value().offset_minutes, -330);
    EXPECT_EQ(parse_time("2026-03-14T01:00+13").value().offset_minutes, 780);
}

TEST(ParseTime, TakesSecondsAndLeapDays)
{
    EXPECT_EQ(parse_time("2024-02-29T23:59:59Z").value().utc,
              sys_days(2024y / February / 29) + 23h + 59min + 59s);
    EXPECT_EQ(parse_time("2000-02-29T00:00Z").value().utc, sys_days(2000y / February / 29));
    EXPECT_EQ(parse_time("2026-03-14T06:30:59.9Z").value().utc,
              sys_days(2026y / March / 14) + 6h + 30min + 59s);
}

struct Refusal
{
    std::string_view text, reason;
};

TEST(ParseTime, RefusesWithTheTextAndTheReason)
{
    const Refusal refusals[] = {
        {"2026-03-14", "without time and zone"},
        {"2026-03-14T06:30", "which clock"},
        {"2026-03-14T06:30:00", "which clock"},
        {"2026-02-29T06:30Z", "not in the calendar"},
        {"1900-02-29T06:30Z", "not in the calendar"},
        {"2026-13-01T06:30Z", "not in the calendar"},
        {"2026-00-10T06:30Z", "not in the calendar"},
        {"2026-04-31T06:30Z", "not in the calendar"},
        {"2026-04-00T06:30Z", "not in the calendar"},
        {"1899-12-31T06:30Z", "1900 to 2200"},
        {"2201-01-01T06:30Z", "1900 to 2200"},
        {"0026-01-01T06:30Z", "1900 to 2200"},
        {"2026-03-14T24:00Z", "no clock shows"},
        {"2026-03-14T06:60Z", "no clock shows"},
        {"2026-03-14T06:30:60Z", "no clock shows"},
        {"2026-03-14T06:30+15:00", "no zone has"},
        {"2026-03-14T06:30-12:01", "no zone has"},
        {"2026-03-14T06:30+02:60", "no zone has"},
        {"14.03.2026 06:30", "not a date and time"},
        {"2026/03/14T06:30Z", "not a date and time"},
        {"26-03-14T06:30Z", "not a date and time"},
        {"2026-3-14T06:30Z", "not a date and time"},
        {"2026-03-14T6:30Z", "not a date and time"},
        {"2026-03-14T06.30Z", "not a date and time"},
        {"2026-03-14T0630Z", "not a date and time"},
        {"2026-03-14T06:30ZZ", "not a date and time"},
        {"2026-03-14T06:30Z+02:00", "not a date and time"},
        {"2026-03-14T06:30+2", "not a date and time"},
        {"2026-03-14T06:30+02:", "not a date and time"},
        {"2026-03-14T06:30:Z", "not a date and time"},
        {"2026-03-14T06:30:00.Z", "not a date and time"},
        {"2026-03-14T06:30 UTC", "not a date and time"},
        {"2026-03-140T06:30Z", "not a date and time"},
        {"+2026-03-14T06:30Z", "not a date and time"},
        {"yesterday", "not a date and time"},
    };
    for (const Refusal& refusal : refusals) {
        const Result<StampedTime> time = parse_time(refusal.text);
        ASSERT_FALSE(time.has_value()) << refusal.text;
        EXPECT_EQ(time.error().kind, Problem::Kind::invalid_input);
        EXPECT_TRUE(contains(time.error().what_happened, "\"" + std::string(refusal.text) + "\""))
            << refusal.text;
        EXPECT_TRUE(contains(time.error().what_happened, refusal.reason)) << time.error().what_happened;
        EXPECT_FALSE(time.error().what_to_do.empty());
    }
    EXPECT_EQ(parse_time("").error().what_happened, "There is no date and time.");
}

TEST(ParseDate, TakesADateAsMidnightUtc)
{
    const StampedTime date = parse_date("2026-03-14").value();
    EXPECT_EQ(date.utc, TimePoint(sys_days(2026y / March / 14)));
    EXPECT_EQ(date.offset_minutes, 0);
    EXPECT_EQ(parse_date("2026-03-14T08:30+02:00").value().utc, sys_days(2026y / March / 14) + 6h + 30min);
}

TEST(ParseDate, RefusesWithTheTextAndTheReason)
{
    const Refusal refusals[] = {
        {"2026-02-30", "not in the calendar"}, {"14.03.2026", "not a date"}, {"2026-03", "not a date"},
        {"2026-03-14T06:30", "which clock"},   {"2026-03-1", "not a date"},  {"2026-03-14T", "not a date"},
        {"1066-10-14", "outside the years"},   {"20260314", "not a date"},
    };
    for (const Refusal& refusal : refusals) {
        const Result<StampedTime> date = parse_date(refusal.text);
        ASSERT_FALSE(date.has_value()) << refusal.text;
        EXPECT_TRUE(contains(date.error().what_happened, refusal.reason)) << date.error().what_happened;
        EXPECT_TRUE(contains(date.error().what_happened, refusal.text)) << date.error().what_happened;
    }
    EXPECT_EQ(parse_date(" ").error().what_happened, "There is no date.");
}

TEST(TimeText, IsWrittenTheWaysTheProgramWritesIt)
{
    const TimePoint time = sys_days(2026y / March / 4) + 6h + 5min + 59s;
    EXPECT_EQ(utc_text(time), "2026-03-04T06:05Z");
    EXPECT_EQ(date_text(time), "2026-03-04");
    EXPECT_EQ(short_date(time), "4 Mar 2026");
    const TimePoint before_1970 = sys_days(1969y / December / 31) + 23h + 59min;
    EXPECT_EQ(utc_text(before_1970), "1969-12-31T23:59Z");
    EXPECT_EQ(short_date(before_1970), "31 Dec 1969");
}

TEST(TimeText, IsReadBackAsTheSameMinuteForEveryDayOfThreeCenturies)
{
    for (sys_days day = sys_days(1900y / January / 1); day <= sys_days(2200y / December / 31);
         day += days(1)) {
        const TimePoint time = day + 13h + 7min;
        ASSERT_EQ(parse_time(utc_text(time)).value().utc, time) << utc_text(time);
        ASSERT_EQ(parse_date(date_text(time)).value().utc, TimePoint(day)) << date_text(time);
    }
}

} // namespace
} // namespace evenstroke
