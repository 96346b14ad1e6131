// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/entry/reading_name.h"
#include "app/entry/typed_time.h"

#include <gtest/gtest.h>

using namespace evenstroke;

namespace {

std::string read(const char* date, const char* clock, const char* offset)
{
    const auto time =
        read_time({QString::fromUtf8(date), QString::fromUtf8(clock), QString::fromUtf8(offset)});
    return time ? utc_text(time.value().utc) : "refused: " + time.error().text();
}

TEST(TypedTime, TakesTheShipsClockAndItsOffset)
{
    EXPECT_EQ(read("2031-03-14", "09:10", "+02:00"), "2031-03-14T07:10Z");
    EXPECT_EQ(read("2031-03-14", "0910", "+2"), "2031-03-14T07:10Z");
    EXPECT_EQ(read("14.3.2031", "9.10", "-3:30"), "2031-03-14T12:40Z");
    EXPECT_EQ(read("2031-03-14", "00:30", "+14:00"), "2031-03-13T10:30Z") << "across the date line";
    EXPECT_EQ(read("2031-03-14", "23:59", "UTC"), "2031-03-14T23:59Z");
}

TEST(TypedTime, RefusesWhatCouldMeanTwoDaysOrNone)
{
    for (const auto& [date, clock, offset] :
         std::vector<std::array<const char*, 3>>{{"3/4/2031", "09:10", "+2"},
                                                 {"2031-02-30", "09:10", "+2"},
                                                 {"2031-03-14", "24:10", "+2"},
                                                 {"2031-03-14", "9", "+2"},
                                                 {"2031-03-14", "09:10", "2"},
                                                 {"2031-03-14", "09:10", "+15"}})
        EXPECT_EQ(read(date, clock, offset).compare(0, 8, "refused:"), 0)
            << date << " " << clock << " " << offset;
}

TEST(TypedTime, NamesTheFieldAndAWayToWriteIt)
{
    const auto time = read_time({QStringLiteral("2031-03-14"), QStringLiteral("noon"), QStringLiteral("+2")});
    ASSERT_FALSE(time.has_value());
    EXPECT_NE(time.error().what_happened.find("noon"), std::string::npos);
    EXPECT_NE(time.error().what_to_do.find("09:10"), std::string::npos);
}

TEST(TypedTime, ShowsWhatItReads)
{
    const StampedTime time =
        read_time({QStringLiteral("2031-03-14"), QStringLiteral("00:05"), QStringLiteral("-03:30")}).value();
    const TimeText text = time_text(time);
    EXPECT_EQ(text.date, QStringLiteral("2031-03-14"));
    EXPECT_EQ(text.clock, QStringLiteral("00:05"));
    EXPECT_EQ(text.offset, QStringLiteral("-03:30"));
}

TEST(ReadingName, IsTheMonthThenTheDayThenTheDayWithANumber)
{
    const StampedTime time =
        parse_time("2031-03-31T23:30-02:00").value(); // 1 April in UTC, still March on board
    std::vector<storage::ReadingEntry> taken;
    const auto name = [&](const std::string& own) {
        return free_name(Result<std::vector<storage::ReadingEntry>>(taken), time, own);
    };
    EXPECT_EQ(name(""), "2031-03");
    taken.push_back({"a", "2031-03", time, storage::ReadingState::closed, 0, 0, {}});
    EXPECT_EQ(name(""), "2031-03-31");
    EXPECT_EQ(name("a"), "2031-03") << "a reading keeps its own name";
    taken.push_back({"b", "2031-03-31", time, storage::ReadingState::closed, 0, 0, {}});
    EXPECT_EQ(name(""), "2031-03-31-2");
}

} // namespace
