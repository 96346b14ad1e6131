// SPDX-License-Identifier: GPL-3.0-or-later
#include "storage/csv_reader.h"

#include <QBuffer>

#include <gtest/gtest.h>

#include <string>
#include <vector>

namespace evenstroke::storage {
namespace {

using Got = CsvReader::Got;

/// Everything a text says, a row as its fields joined by '|', anything else as a mark with its line.
std::vector<std::string> all_of(const QByteArray& text)
{
    QByteArray bytes = text;
    QBuffer buffer(&bytes);
    buffer.open(QIODevice::ReadOnly);
    CsvReader reader(buffer);
    std::vector<std::string> said;
    for (Got got = reader.next(); got != Got::end; got = reader.next()) {
        if (got != Got::row) {
            const char* const marks[] = {"",          "",           "too long",    "zero byte",
                                         "not UTF-8", "open quote", "stray quote", "cannot read"};
            said.push_back(std::string(marks[static_cast<int>(got)]) + " on " +
                           std::to_string(reader.line()));
            if (got == Got::too_long)
                return said;
            continue;
        }
        std::string row;
        for (std::size_t i = 0; i < reader.fields().size(); ++i)
            row += (i == 0 ? "" : "|") + std::string(reader.fields()[i]);
        said.push_back(row);
    }
    return said;
}
using Said = std::vector<std::string>;

TEST(CsvReader, ReadsPlainRows)
{
    EXPECT_EQ(all_of("a,b\n1,2\n3,4\n"), (Said{"a|b", "1|2", "3|4"}));
}
TEST(CsvReader, ReadsALastLineWithoutEnd)
{
    EXPECT_EQ(all_of("a,b\n1,2"), (Said{"a|b", "1|2"}));
}
TEST(CsvReader, TakesByteOrderMarkAndCarriageReturns)
{
    EXPECT_EQ(all_of("\xEF\xBB\xBFq,b\r\n1,2\r\n"), (Said{"q|b", "1|2"}));
}
TEST(CsvReader, TakesSemicolons)
{
    EXPECT_EQ(all_of("a;b\n1,5;2\n"), (Said{"a|b", "1,5|2"}));
}
TEST(CsvReader, PassesOverBlankLines)
{
    EXPECT_EQ(all_of("a,b\n\n  \r\n1,2\n\n"), (Said{"a|b", "1|2"}));
}
TEST(CsvReader, ReadsQuotedFields)
{
    EXPECT_EQ(all_of("a,b\n\"x, y\",\"say \"\"so\"\"\"\n\"two\nlines\",2\n\"\",\"\"\n"),
              (Said{"a|b", "x, y|say \"so\"", "two\nlines|2", "|"}));
}
TEST(CsvReader, KeepsAQuotationMarkInsideAPlainField)
{
    EXPECT_EQ(all_of("a,b\n5\" pipe,2\n"), (Said{"a|b", "5\" pipe|2"}));
}
TEST(CsvReader, GoesOnAfterAnOpenQuote)
{
    EXPECT_EQ(all_of("a,b\n\"x,2\n3,4\n"), (Said{"a|b", "open quote on 2", "3|4"}));
}
TEST(CsvReader, GoesOnAfterTextBehindAQuote)
{
    EXPECT_EQ(all_of("a,b\n\"x\"y,2\n3,4\n"), (Said{"a|b", "stray quote on 2", "3|4"}));
}
TEST(CsvReader, TellsZeroBytesApart)
{
    EXPECT_EQ(all_of(QByteArray("a,b\n1,\0002\n3,4\n", 13)), (Said{"a|b", "zero byte on 2", "3|4"}));
}
TEST(CsvReader, TellsWhatIsNotUtf8Apart)
{
    for (const char* const bad : {"\xff", "\xc0\xaf", "\xed\xa0\x80", "\xf5\x80\x80\x80", "\xe2\x82", "\x80"})
        EXPECT_EQ(all_of(QByteArray("a,b\n1,") + bad + "\n\"q\"," + bad + "\n3,4\n"),
                  (Said{"a|b", "not UTF-8 on 2", "not UTF-8 on 3", "3|4"}))
            << bad;
    EXPECT_EQ(all_of("a,b\n°C,²€😀\n"), (Said{"a|b", "°C|²€😀"}));
}
TEST(CsvReader, CountsLinesOverQuotedLineEnds)
{
    EXPECT_EQ(all_of("a,b\n\"x\n\ny\",2\n\"z,3\n"), (Said{"a|b", "x\n\ny|2", "open quote on 5"}));
}
TEST(CsvReader, StopsAtALineThatIsTooLong)
{
    const QByteArray line(static_cast<qsizetype>(CsvReader::longest_line) + 1, 'x');
    EXPECT_EQ(all_of("a,b\n1,2\n" + line + "\n3,4\n"), (Said{"a|b", "1|2", "too long on 3"}));
    EXPECT_EQ(
        all_of("a,b\n" + QByteArray(static_cast<qsizetype>(CsvReader::longest_line), 'x') + "\n").size(), 2U);
}
TEST(CsvReader, ReadsOnOverManyPieces)
{
    QByteArray text = "a,b\n";
    for (int i = 0; i < 100000; ++i)
        text += QByteArray::number(i) + (i % 7 == 0 ? ",\"quoted, text\"\n" : ",plain\n");
    const Said said = all_of(text);
    ASSERT_EQ(said.size(), 100001U);
    for (int i = 0; i < 100000; ++i)
        ASSERT_EQ(said[static_cast<std::size_t>(i) + 1],
                  std::to_string(i) + (i % 7 == 0 ? "|quoted, text" : "|plain"));
}

} // namespace
} // namespace evenstroke::storage
