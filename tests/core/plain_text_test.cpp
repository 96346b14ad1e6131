// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/plain_text.h"

#include <gtest/gtest.h>
#include <limits>

namespace evenstroke {
namespace {

TEST(Trimmed, TakesOffBlanksOfEveryWidth)
{
    EXPECT_EQ(trimmed(" \t12.5\r\n"), "12.5");
    EXPECT_EQ(trimmed("\u00A0\u2009\u202F12 bar\u2007\u00A0"), "12 bar");
    EXPECT_EQ(trimmed("\u00A0 \u2003"), "");
    EXPECT_EQ(trimmed(""), "");
    EXPECT_EQ(trimmed("\u2212"
                      "5"),
              "\u2212"
              "5"); // the typographic minus begins with the same byte as the blanks
    EXPECT_EQ(trimmed("°"), "°");
    EXPECT_EQ(trimmed("\xE2\x80"), "\xE2\x80"); // half a blank is none
}

TEST(BlankLength, MeasuresTheBlankAtAPlace)
{
    EXPECT_EQ(blank_length("a b", 1), 1u);
    EXPECT_EQ(blank_length("a\u00A0b", 1), 2u);
    EXPECT_EQ(blank_length("a\u202Fb", 1), 3u);
    EXPECT_EQ(blank_length("a b", 0), 0u);
    EXPECT_EQ(blank_length("a", 1), 0u);
}

TEST(Quoted, ShowsTextAsItIs)
{
    EXPECT_EQ(evenstroke::quoted("385 °C"), "\"385 °C\"");
    EXPECT_EQ(evenstroke::quoted(""), "\"\"");
}

TEST(Quoted, ShortensAfterFortyCharactersNotBytes)
{
    std::string degrees;
    for (int count = 0; count < 40; ++count)
        degrees += "°";
    EXPECT_EQ(evenstroke::quoted(degrees), "\"" + degrees + "\"");
    EXPECT_EQ(evenstroke::quoted(degrees + "C"), "\"" + degrees + "…\"");
}

TEST(Quoted, LetsNoControlCharacterAndNoBrokenByteThrough)
{
    EXPECT_EQ(evenstroke::quoted("a\nb\x1B[31m\x7F"), "\"a?b?[31m?\"");
    EXPECT_EQ(evenstroke::quoted("a\u0085"), "\"a?\""); // a control character of Latin-1
    EXPECT_EQ(evenstroke::quoted("\xB0"
                                 "C"),
              "\"?C\"");                                           // Latin-1 degree sign
    EXPECT_EQ(evenstroke::quoted("\xC0\x80"), "\"??\"");           // overlong zero
    EXPECT_EQ(evenstroke::quoted("\xED\xA0\x80"), "\"???\"");      // surrogate
    EXPECT_EQ(evenstroke::quoted("\xF4\x90\x80\x80"), "\"????\""); // beyond U+10FFFF
    EXPECT_EQ(evenstroke::quoted("5\xE2\x82"), "\"5??\"");         // cut off
    EXPECT_EQ(evenstroke::quoted(std::string_view("a\0b", 3)), "\"a?b\"");
    EXPECT_EQ(evenstroke::quoted("1\t2"), "\"1 2\"") << "a line of a file in columns";
}

TEST(NumberText, KeepsEveryDigitAndNoMore)
{
    EXPECT_EQ(number_text(385.0), "385");
    EXPECT_EQ(number_text(100000.0), "100000");
    EXPECT_EQ(number_text(-273.15), "-273.15");
    EXPECT_EQ(number_text(0.1 + 0.2), "0.30000000000000004");
    EXPECT_EQ(number_text(0.0), "0");
    EXPECT_EQ(number_text(1e300), "1e+300");
    EXPECT_EQ(number_text(std::numeric_limits<double>::quiet_NaN()), "nan");
}

TEST(ShortNumberText, KeepsSixDigits)
{
    EXPECT_EQ(short_number_text(273.04999999999995), "273.05");
    EXPECT_EQ(short_number_text(42700.0), "42700");
    EXPECT_EQ(short_number_text(-0.5123456789), "-0.512346");
}

} // namespace
} // namespace evenstroke
