// SPDX-License-Identifier: GPL-3.0-or-later
#include "trace_files.h"

namespace evenstroke::storage {
namespace {

/// Files of instruments, whatever their columns.
class Traces : public StorageTest
{
protected:
    ReadTrace one(const QByteArray& text, const TraceLayout& layout, const Engine& engine = two_stroke())
    {
        const auto read = value_of_result(read_traces_text(
            {text.constData(), static_cast<std::size_t>(text.size())}, "card.txt", layout, engine));
        EXPECT_EQ(read.size(), 1U);
        return read.front();
    }
    /// The record as it must come out: half degrees over the period, the hump at firing dead centre.
    static void expect_whole(const CardTrace& trace, double period = 360.0, double tolerance = 1e-4)
    {
        ASSERT_EQ(trace.crank_angle_deg.size(), static_cast<std::size_t>(2.0 * period));
        EXPECT_TRUE(trace.cycle.empty());
        for (std::size_t i = 0; i < trace.crank_angle_deg.size(); ++i) {
            ASSERT_NEAR(trace.pressure_bar[i], hump(trace.crank_angle_deg[i]), tolerance)
                << trace.crank_angle_deg[i];
            if (i > 0) {
                ASSERT_NEAR(trace.crank_angle_deg[i] - trace.crank_angle_deg[i - 1], 0.5, tolerance);
            }
        }
        EXPECT_GE(trace.crank_angle_deg.front(), -0.5 * period);
        EXPECT_LE(trace.crank_angle_deg.back(), 0.5 * period);
    }
};

TEST_F(Traces, AreReadWhateverTheSeparatorAndDecimalSign)
{
    struct Writing
    {
        ColumnSeparator separator;
        char sign;
        char decimal;
    };
    using enum ColumnSeparator;
    for (const Writing& writing :
         {Writing{comma, ',', '.'}, {semicolon, ';', ','}, {tab, '\t', ','}, {space, ' ', '.'}}) {
        const QByteArray text =
            "angle" + QByteArray(1, writing.sign) + "p\r\n" + rows(-180.0, 180.0, [&](double angle) {
                QByteArray row = number(angle) + "|" + number(hump(angle)) + "\r";
                return row.replace('.', writing.decimal).replace('|', writing.sign);
            });
        TraceLayout layout = in_bar();
        layout.decimal_sign = writing.decimal;
        for (const ColumnSeparator chosen : {writing.separator, automatic}) {
            layout.separator = chosen;
            expect_whole(one(text, layout).trace);
        }
    }
}

TEST_F(Traces, HaveOneTraceAPressureColumn)
{
    const QByteArray text =
        "2031 instrument\nangle,A,B,cycle\n" + rows(-180.0, 180.0, [&](double angle) {
            return number(angle) + "," + number(hump(angle, 1)) + "," + number(hump(angle, 5)) + ",7";
        });
    TraceLayout layout = in_bar();
    layout.header_lines = 2;
    layout.cycle_column = 4;
    layout.pressures = {{2, 1}, {3, 5}};
    const auto read = value_of_result(read_traces_text(text.toStdString(), "card.txt", layout, two_stroke()));
    ASSERT_EQ(read.size(), 2U);
    EXPECT_EQ(read[0].cylinder, 1);
    EXPECT_EQ(read[1].cylinder, 5);
    expect_whole(read[0].trace);
    EXPECT_NEAR(read[1].trace.pressure_bar[360], 98.0, 1e-4) << "cylinder 5 at dead centre";
}

TEST_F(Traces, ComeFromAnyAngleTheFileStartsAt)
{
    TraceLayout layout = in_bar();
    layout.header_lines = 0;
    // 0 to 360 with the firing dead centre at 180, then with it at 0, then counted backwards.
    layout.dead_centre_at = 180.0;
    expect_whole(
        one(rows(0.0, 360.0, [](double a) { return number(a) + "," + number(hump(a - 180.0)); }), layout)
            .trace);
    layout.dead_centre_at = 0.0;
    expect_whole(
        one(rows(0.0, 360.0, [](double a) { return number(a) + "," + number(hump(a)); }), layout).trace);
    layout.backwards = true;
    expect_whole(
        one(rows(0.0, 360.0, [](double a) { return number(360.0 - a) + "," + number(hump(a)); }), layout)
            .trace);
}

TEST_F(Traces, HoldAPlaceOnceThatBothEndsOfTheRecordHave)
{
    TraceLayout layout = in_bar();
    layout.header_lines = 0;
    const ReadTrace read =
        one(rows(0.0, 360.5, [](double a) { return number(a) + "," + number(a == 360.0 ? 95.0 : hump(a)); }),
            layout);
    EXPECT_EQ(read.trace.crank_angle_deg.size(), 720U);
    EXPECT_NEAR(read.trace.pressure_bar[359], 94.5, 1e-4)
        << "the mean of 94 and 95; the period begins at -179.5";
}

TEST_F(Traces, TakeTheAngleFromTheNumberOfTheSample)
{
    TraceLayout layout = in_bar();
    layout.header_lines = 0;
    layout.angle_from = AngleFrom::sample_number;
    layout.counts_per_revolution = 720.0;
    layout.first_angle = -180.0;
    layout.pressures = {{1, std::nullopt}};
    expect_whole(one(rows(-180.0, 180.0, [](double a) { return number(hump(a)); }), layout).trace);
    layout.first_angle = 0.0;
    expect_whole(one(rows(0.0, 360.0, [](double a) { return number(hump(a)); }), layout).trace);
}

TEST_F(Traces, TakeTheAngleFromTimesAtEvenSpeed)
{
    TraceLayout layout = in_bar();
    layout.header_lines = 0;
    layout.angle_from = AngleFrom::time;
    layout.seconds_per_count = 0.001;
    layout.speed = 100.0; // 0.6 degrees a millisecond
    layout.first_angle = -180.0;
    // The times carry four decimals of a millisecond: 6e-5 degrees, below 1e-3 bar on the steepest part
    expect_whole(
        one(rows(-180.0, 180.0,
                 [](double a) { return number(5000.0 + (a + 180.0) / 0.6) + "," + number(hump(a)); }),
            layout)
            .trace,
        360.0, 1e-3);
}

TEST_F(Traces, CountCyclesThatFollowEachOther)
{
    TraceLayout layout = in_bar();
    layout.header_lines = 0;
    const auto row = [](double a) { return number(a) + "," + number(hump(a)); };
    const QByteArray cycle = rows(-180.0, 180.0, row);
    const CardTrace falls = one(cycle + cycle + cycle, layout).trace;
    const CardTrace goes_on = one(rows(-180.0, 900.0, row), layout).trace;
    for (const CardTrace* trace : {&falls, &goes_on}) {
        ASSERT_EQ(trace->crank_angle_deg.size(), 2160U);
        EXPECT_EQ(trace->cycle.front(), 1);
        EXPECT_EQ(trace->cycle.back(), 3);
    }
    EXPECT_EQ(falls.crank_angle_deg[1000], -40.0);
}

TEST_F(Traces, OfAFourStrokeHaveTwoRevolutions)
{
    Engine engine = two_stroke();
    engine.kind = EngineKind::four_stroke;
    TraceLayout layout = in_bar();
    layout.header_lines = 0;
    layout.dead_centre_at = 360.0;
    const ReadTrace read = one(
        rows(0.0, 720.0, [](double a) { return number(a) + "," + number(hump(a - 360.0)); }), layout, engine);
    EXPECT_EQ(read.trace.crank_angle_deg.size(), 1440U);
    EXPECT_EQ(read.trace.crank_angle_deg.front(), -360.0);
    EXPECT_NEAR(read.trace.pressure_bar[720], 94.0, 1e-4);
}

TEST_F(Traces, AreBroughtToBarFromAnyUnitAndSignal)
{
    TraceLayout layout = in_bar();
    layout.header_lines = 0;
    layout.unit = find_unit("MPa").value().id;
    layout.gauge = true;
    const ReadTrace read =
        one(rows(-180.0, 180.0,
                 [](double a) { return number(a) + "," + QByteArray::number(hump(a) / 10.0, 'f', 6); }),
            layout);
    EXPECT_TRUE(read.trace.gauge);
    expect_whole(read.trace);
    layout.unit = find_unit("bar").value().id;
    layout.calibration = TwoPointCalibration{1.0, 0.0, 5.0, 250.0}; // volts: 62.5 bar a volt
    expect_whole(
        one(rows(-180.0, 180.0,
                 [](double a) { return number(a) + "," + QByteArray::number(1.0 + hump(a) / 62.5, 'f', 8); }),
            layout)
            .trace);
}

TEST_F(Traces, LeaveOutSamplesThatAreMissing)
{
    TraceLayout layout = in_bar();
    layout.header_lines = 0;
    layout.missing_words = {"NaN", "lost"};
    const ReadTrace read = one(rows(-180.0, 180.0,
                                    [](double a) {
                                        return number(a) + "," +
                                               (a == -100.0  ? "nan"
                                                : a == 100.0 ? " Lost"
                                                : a == 150.0 ? ""
                                                             : number(hump(a)));
                                    }),
                               layout);
    EXPECT_EQ(read.missing, 3);
    EXPECT_EQ(read.trace.crank_angle_deg.size(), 717U);
}

TEST_F(Traces, KeepTheirLayoutWithTheEngine)
{
    const auto history = memory();
    EXPECT_FALSE(value_of_result(load_trace_layout(*history, "engine")).has_value());
    TraceLayout layout = in_bar();
    layout.separator = ColumnSeparator::tab;
    layout.decimal_sign = ',';
    layout.header_lines = 4;
    layout.angle_from = AngleFrom::time;
    layout.angle_column = 3;
    layout.seconds_per_count = 0.001;
    layout.speed = 104.5;
    layout.first_angle = -180.0;
    layout.dead_centre_at = 12.5;
    layout.backwards = true;
    layout.cycle_column = 1;
    layout.pressures = {{4, 2}, {5, std::nullopt}};
    layout.gauge = true;
    layout.calibration = TwoPointCalibration{0.5, 0.0, 4.5, 200.0};
    layout.missing_words = {"off"};
    expect_done(save_trace_layout(*history, "engine", layout));
    const auto kept = value_of_result(load_trace_layout(*history, "engine"));
    ASSERT_TRUE(kept.has_value());
    EXPECT_EQ(kept->separator, layout.separator);
    EXPECT_EQ(kept->decimal_sign, ',');
    EXPECT_EQ(kept->header_lines, 4);
    EXPECT_EQ(kept->angle_from, AngleFrom::time);
    EXPECT_EQ(kept->angle_column, 3);
    EXPECT_EQ(kept->seconds_per_count, 0.001);
    EXPECT_EQ(kept->speed, 104.5);
    EXPECT_EQ(kept->first_angle, -180.0);
    EXPECT_EQ(kept->dead_centre_at, 12.5);
    EXPECT_TRUE(kept->backwards);
    EXPECT_EQ(kept->cycle_column, 1);
    ASSERT_EQ(kept->pressures.size(), 2U);
    EXPECT_EQ(kept->pressures[0].column, 4);
    EXPECT_EQ(kept->pressures[0].cylinder, 2);
    EXPECT_FALSE(kept->pressures[1].cylinder.has_value());
    EXPECT_EQ(kept->unit, layout.unit);
    EXPECT_TRUE(kept->gauge);
    EXPECT_EQ(kept->calibration->pressure_2, 200.0);
    EXPECT_EQ(kept->missing_words, layout.missing_words);
    EXPECT_FALSE(value_of_result(load_trace_layout(*history, "other engine")).has_value());
}

} // namespace
} // namespace evenstroke::storage
