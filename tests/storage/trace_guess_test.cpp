// SPDX-License-Identifier: GPL-3.0-or-later
#include "trace_files.h"

namespace evenstroke::storage {
namespace {

TEST(TraceGuess, FindsColumnsByTheirTitles)
{
    const auto proposed =
        guess_layout("Card of 12 March\n"
                     "Crank angle [deg];Cyl 1 [bar];Cyl 2 [bar];cycle\n"
                     "-180,0;3,25;3,30;1\n-179,5;3,26;3,31;1\n-179,0;3,27;3,33;1\n-178,5;3,28;3,32;1\n");
    EXPECT_EQ(proposed.columns, 4);
    EXPECT_EQ(proposed.layout.separator, ColumnSeparator::semicolon);
    EXPECT_EQ(proposed.layout.decimal_sign, ',');
    EXPECT_EQ(proposed.layout.header_lines, 2);
    EXPECT_EQ(proposed.layout.angle_from, AngleFrom::column);
    EXPECT_EQ(proposed.layout.angle_column, 1);
    EXPECT_EQ(proposed.layout.cycle_column, 4);
    ASSERT_EQ(proposed.layout.pressures.size(), 2U);
    EXPECT_EQ(proposed.layout.pressures.front().column, 2);
    ASSERT_EQ(proposed.titles.size(), 4U);
    EXPECT_EQ(proposed.titles[2], "Cyl 2 [bar]");
}

TEST(TraceGuess, NamesTheUnitAndNeverChoosesIt)
{
    const auto proposed = guess_layout("angle\tpressure_MPa_gauge\n0\t0.3\n1\t0.31\n2\t0.32\n3\t0.33\n");
    ASSERT_TRUE(proposed.unit.has_value());
    EXPECT_EQ(unit(proposed.unit->id).symbol, "MPa");
    EXPECT_EQ(proposed.unit->kind, PressureKind::gauge);
    EXPECT_FALSE(proposed.layout.unit.has_value());
    EXPECT_FALSE(guess_layout("angle,barometer reading\n0,3\n1,3\n").unit.has_value());
}

TEST(TraceGuess, TakesTheEvenlySteppingColumnForTheAngle)
{
    const auto proposed = guess_layout("3.1 10\n3.2 10.5\n3.4 11\n3.3 11.5\n3.6 12\n");
    EXPECT_EQ(proposed.layout.separator, ColumnSeparator::space);
    EXPECT_EQ(proposed.layout.header_lines, 0);
    EXPECT_EQ(proposed.layout.angle_column, 2);
    ASSERT_EQ(proposed.layout.pressures.size(), 1U);
    EXPECT_EQ(proposed.layout.pressures.front().column, 1);
}

TEST(TraceGuess, SeesTimesFallingAnglesAndFilesOfPressuresOnly)
{
    const auto times = guess_layout("t [ms],p\n0,3.1\n0.5,3.2\n1.0,3.3\n1.5,3.5\n");
    EXPECT_EQ(times.layout.angle_from, AngleFrom::time);
    EXPECT_EQ(times.layout.seconds_per_count, 0.001);
    EXPECT_TRUE(guess_layout("deg,p\n180,3.1\n179,3.2\n178,3.3\n").layout.backwards);
    const auto pressures = guess_layout("3.1\n3.25\n3.2\n3.4\n3.3\n");
    EXPECT_EQ(pressures.layout.angle_from, AngleFrom::sample_number);
    EXPECT_EQ(pressures.layout.pressures.front().column, 1);
}

/// Rows "index,pressure" of so many cycles.
std::string counted_file(int first, int samples, int cycles, const char* title = "n,p")
{
    std::string text = std::string(title) + "\n";
    for (int i = 0; i < samples * cycles; ++i)
        text += std::to_string(first + i) + "," + number(hump(360.0 * i / samples)).toStdString() + "\n";
    return text;
}

TEST(TraceGuess, TellsAnIndexOfSamplesFromAnAngle)
{
    const auto one = guess_layout(counted_file(0, 720, 1));
    EXPECT_EQ(one.layout.angle_from, AngleFrom::sample_number);
    EXPECT_EQ(one.layout.angle_column, 1);
    EXPECT_EQ(one.layout.counts_per_revolution, 720.0);
    ASSERT_EQ(one.layout.pressures.size(), 1U) << "the index is no pressure";
    EXPECT_EQ(one.layout.pressures.front().column, 2);
    const auto several = guess_layout(counted_file(1, 1024, 3));
    EXPECT_EQ(several.layout.angle_from, AngleFrom::sample_number);
    EXPECT_EQ(several.layout.counts_per_revolution, 1024.0);
    const auto four_stroke = guess_layout(counted_file(0, 3600, 1), 720.0);
    EXPECT_EQ(four_stroke.layout.counts_per_revolution, 1800.0) << "two revolutions a cycle";
    EXPECT_EQ(guess_layout(counted_file(0, 360, 1)).layout.angle_from, AngleFrom::column)
        << "0 to 359 are whole degrees";
    EXPECT_EQ(guess_layout(counted_file(0, 720, 1), 720.0).layout.angle_from, AngleFrom::column);
    EXPECT_EQ(guess_layout(counted_file(0, 100, 1, "sample,p")).layout.angle_from, AngleFrom::sample_number)
        << "its title says so";
}

TEST(TraceGuess, TakesTheUnitOfTimeAndTheSignalFromTheTitles)
{
    const auto file = guess_layout("time_ms,signal_V\n0,1.1\n0.1,1.2\n0.3,1.3\n0.4,1.5\n0.5,1.4\n");
    EXPECT_EQ(file.layout.angle_from, AngleFrom::time) << "rounded times do not step evenly";
    EXPECT_EQ(file.layout.seconds_per_count, 0.001);
    ASSERT_EQ(file.layout.pressures.size(), 1U);
    EXPECT_EQ(file.layout.pressures.front().column, 2);
    ASSERT_TRUE(file.layout.calibration.has_value());
    TraceLayout layout = file.layout;
    layout.unit = find_unit("bar").value().id;
    layout.speed = 100.0;
    const auto problem = find_layout_problem(layout, 2);
    ASSERT_TRUE(problem.has_value()) << "volts are never taken for bar";
    EXPECT_NE(problem->what_happened.find("signal"), std::string::npos) << problem->text();
    EXPECT_EQ(guess_layout("time,p\n0,3\n1,3\n2,3\n3,4\n").layout.seconds_per_count, 1.0);
    EXPECT_EQ(guess_layout("time us;volt\n0;3\n1;3\n2;3\n3;4\n").layout.seconds_per_count, 1e-6);
    EXPECT_FALSE(guess_layout("angle,p [bar]\n0,3\n1,3\n2,3\n").layout.calibration.has_value());
}

TEST(TraceGuess, SaysLittleOfWhatIsNoTable)
{
    for (const char* text :
         {"", "\n\n", "Dear Sir,\n\nthe card follows.\n", ";;;;\n;;;;\n", "\xff\xfe\xfd"}) {
        const auto proposed = guess_layout(text);
        EXPECT_EQ(proposed.columns, 0) << text;
        EXPECT_EQ(proposed.layout.pressures.size(), 1U);
    }
}

TEST(TraceGuess, FindsTheCylinderInNames)
{
    Engine engine = two_stroke();
    EXPECT_EQ(guess_cylinder("2031-03-12 cyl4.csv", engine), 4);
    EXPECT_EQ(guess_cylinder("Cylinder_06", engine), 6);
    EXPECT_EQ(guess_cylinder("card no. 2 of 2031.txt", engine), 2);
    EXPECT_EQ(guess_cylinder("3", engine), 3);
    EXPECT_EQ(guess_cylinder("20310312_5.csv", engine), 5);
    EXPECT_FALSE(guess_cylinder("1-2.csv", engine).has_value()) << "two that it could be";
    EXPECT_FALSE(guess_cylinder("cyl7", engine).has_value()) << "the engine has six";
    EXPECT_FALSE(guess_cylinder("card.csv", engine).has_value());
    EXPECT_FALSE(guess_cylinder("99999999999999999999", engine).has_value());
    engine.cylinder_names = {"A1", "A2", "A3", "B1", "B2", "B3"};
    EXPECT_EQ(guess_cylinder("2031-03 B2.csv", engine), 5);
}

} // namespace
} // namespace evenstroke::storage
