// SPDX-License-Identifier: GPL-3.0-or-later
#include "trace_files.h"

#include <random>

namespace evenstroke::storage {
namespace {

/// Files that are no card: each is refused in words that say where and what to do.
class BadTraces : public StorageTest
{
protected:
    Problem refused(const QByteArray& text, const TraceLayout& layout = in_bar())
    {
        const auto read = read_traces_text({text.constData(), static_cast<std::size_t>(text.size())},
                                           "card.txt", layout, two_stroke());
        EXPECT_FALSE(read.has_value()) << text.left(60).toStdString();
        const Problem problem = read ? Problem{} : read.error();
        EXPECT_NE(problem.what_happened.find("card.txt"), std::string::npos) << problem.what_happened;
        EXPECT_FALSE(problem.what_to_do.empty());
        return problem;
    }
    static bool says(const Problem& problem, const char* words)
    {
        return problem.text().find(words) != std::string::npos;
    }
    static QByteArray good(double from = -180.0, double to = 180.0)
    {
        return "angle,p\n" + rows(from, to, [](double a) { return number(a) + "," + number(hump(a)); });
    }
};

TEST_F(BadTraces, OfNothingOrText)
{
    EXPECT_TRUE(says(refused(""), "is empty"));
    EXPECT_TRUE(says(refused(" \r\n\n"), "is empty"));
    EXPECT_TRUE(says(refused("angle,p\n"), "no row of numbers"));
    EXPECT_TRUE(says(refused("angle,p\nDear Sir,\nthe card\n"), "line 2"));
    EXPECT_TRUE(says(refused(good() + "end of record\n"), "line 722"));
}

TEST_F(BadTraces, OfTooFewColumns)
{
    const Problem problem = refused("p\n1.5\n2.5\n");
    EXPECT_TRUE(says(problem, "line 2"));
    EXPECT_TRUE(says(problem, "column 2 is asked for"));
}

TEST_F(BadTraces, WithoutAUnit)
{
    TraceLayout layout = in_bar();
    layout.unit.reset();
    EXPECT_TRUE(says(refused(good(), layout), "unit"));
    layout.unit = find_unit("degC").value().id;
    EXPECT_TRUE(says(refused(good(), layout), "no unit of pressure"));
}

TEST_F(BadTraces, WithoutTheCompression)
{
    EXPECT_TRUE(says(refused(good(-20.0, 180.0)), "compression"));
    EXPECT_TRUE(says(refused(good(20.0, 180.0)), "compression"));
}

TEST_F(BadTraces, WhoseAnglesStandOrFall)
{
    const Problem twice = refused("angle,p\n-180,3\n-179.5,3.1\n-179.5,3.1\n");
    EXPECT_TRUE(says(twice, "line 4")) << twice.text();
    EXPECT_TRUE(says(twice, "-179.5° stands twice"));
    const Problem falls = refused("angle,p\n180,3\n179.5,3.1\n");
    EXPECT_TRUE(says(falls, "line 3"));
    EXPECT_TRUE(says(falls, "from 180° to 179.5°"));
    EXPECT_TRUE(says(falls, "turn their direction"));
}

TEST_F(BadTraces, WithoutAnyPressure)
{
    EXPECT_TRUE(
        says(refused("angle,p\n" + rows(-180.0, 180.0, [](double a) { return number(a) + ",0"; })), "0 bar"));
    EXPECT_TRUE(says(refused("angle,p\n" + rows(-180.0, 180.0, [](double a) { return number(a) + ",nan"; })),
                     "Column 2"));
}

TEST_F(BadTraces, InAnotherUnitThanChosen)
{
    TraceLayout layout = in_bar();
    layout.unit = find_unit("MPa").value().id;
    EXPECT_TRUE(says(refused(good(), layout), "unit of the pressures")) << "940 bar cannot be";
}

TEST_F(BadTraces, OfBytesThatAreNoText)
{
    QByteArray text = good();
    text[500] = '\0';
    EXPECT_TRUE(says(refused(text), "no text"));
    EXPECT_TRUE(says(refused(QByteArray("\x89PNG\r\n\x1a\n\0\0\0\rIHDR", 16)), "no text"));
}

TEST_F(BadTraces, OfFarTooManyRows)
{
    EXPECT_TRUE(says(refused("angle,p\n" + QByteArray("0,1\n").repeated(10'000'000)), "rows"));
}

TEST_F(BadTraces, WithTheOtherDecimalSign)
{
    TraceLayout layout = in_bar();
    layout.separator = ColumnSeparator::semicolon;
    EXPECT_TRUE(says(refused("angle;p\n-180,0;3,25\n", layout), "decimal sign"));
}

TEST_F(BadTraces, WithNumbersThatAreNone)
{
    for (const char* field : {"1e999", "inf", "0x1F", "1.2.3", "--4", "3 4", "\xff\xfe"})
        EXPECT_TRUE(says(refused(QByteArray("angle,p\n-180,") + field + "\n"), "line 2")) << field;
}

TEST_F(BadTraces, OfALayoutThatCannotBe)
{
    const auto problem = [](auto change) {
        TraceLayout layout = in_bar();
        change(layout);
        return find_layout_problem(layout, 3).has_value();
    };
    EXPECT_FALSE(problem([](TraceLayout&) {}));
    EXPECT_TRUE(problem([](TraceLayout& layout) { layout.pressures.clear(); }));
    EXPECT_TRUE(problem([](TraceLayout& layout) { layout.pressures = {{4, std::nullopt}}; }));
    EXPECT_TRUE(problem([](TraceLayout& layout) { layout.angle_column = 0; }));
    EXPECT_TRUE(problem([](TraceLayout& layout) { layout.cycle_column = 9; }));
    EXPECT_TRUE(problem([](TraceLayout& layout) {
        layout.calibration = TwoPointCalibration{1.0, 0.0, 1.0, 5.0};
    }));
    EXPECT_TRUE(problem([](TraceLayout& layout) { layout.angle_from = AngleFrom::time; }));
    EXPECT_TRUE(problem([](TraceLayout& layout) {
        layout.angle_from = AngleFrom::sample_number;
        layout.counts_per_revolution = 0.0;
    }));
    EXPECT_TRUE(problem([](TraceLayout& layout) { layout.dead_centre_at = std::nan(""); }));
}

TEST_F(BadTraces, OfRandomBytesAreNeverTaken)
{
    std::mt19937 dice(11);
    const char letters[] = "0123456789.,;- \t\n\"eE+anbr\r\xC3\xB0";
    for (int round = 0; round < 300; ++round) {
        QByteArray text;
        const int length = static_cast<int>(dice() % 600);
        for (int i = 0; i < length; ++i)
            text += round % 2 == 0 ? static_cast<char>(dice()) : letters[dice() % (sizeof letters - 1)];
        const std::string_view bytes(text.constData(), static_cast<std::size_t>(text.size()));
        TraceLayout layout = guess_layout(bytes).layout;
        layout.unit = find_unit("bar").value().id;
        const auto read = read_traces_text(bytes, "card.txt", layout, two_stroke());
        ASSERT_FALSE(read.has_value());
        EXPECT_FALSE(read.error().what_happened.empty());
    }
}

TEST_F(BadTraces, ThatAreNotThere)
{
    EXPECT_EQ(read_traces(path(QStringLiteral("none.txt")), in_bar(), two_stroke()).error().kind,
              Problem::Kind::not_found);
    EXPECT_FALSE(first_lines_of(path(QStringLiteral("none.txt")), 5).has_value());
}

} // namespace
} // namespace evenstroke::storage
