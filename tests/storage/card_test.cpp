// SPDX-License-Identifier: GPL-3.0-or-later
#include "fixture.h"

#include "storage/audit.h"
#include "storage/card_packing.h"
#include "storage/card_store.h"

#include <QDir>
#include <QElapsedTimer>

#include <cmath>

namespace evenstroke::storage {
namespace {

class Cards : public StorageTest
{
};

CardTrace smooth_trace(double step)
{
    CardTrace trace;
    const int half = static_cast<int>(std::lround(180.0 / step));
    for (int i = -half; i < half; ++i) {
        const double angle = std::round(i * step * 10.0) / 10.0;
        trace.crank_angle_deg.push_back(angle);
        trace.pressure_bar.push_back(std::round((3.0 + 120.0 * std::exp(-angle * angle / 800.0)) * 1000.0) /
                                     1000.0);
    }
    return trace;
}

TEST_F(Cards, AreReadInBothForms)
{
    const CardTrace plain =
        value_of_result(read_card_text("crank_angle_deg,pressure_bar\r\n-0.5,101.25\r\n0,1e2\r\n", "1.csv"));
    EXPECT_EQ(plain.crank_angle_deg, (std::vector<double>{-0.5, 0.0}));
    EXPECT_EQ(plain.pressure_bar, (std::vector<double>{101.25, 100.0}));
    EXPECT_FALSE(plain.gauge);
    EXPECT_TRUE(plain.cycle.empty());
    const CardTrace cycles =
        value_of_result(read_card_text("\xEF\xBB\xBF"
                                       "cycle;crank_angle_deg;pressure_bar_gauge\n1;-0,5;101,25\n2;0;100\n",
                                       "1.csv"));
    EXPECT_EQ(cycles.cycle, (std::vector<int>{1, 2}));
    EXPECT_EQ(cycles.crank_angle_deg.front(), -0.5);
    EXPECT_TRUE(cycles.gauge);
}

TEST_F(Cards, ThatCannotBeReadAreRefusedWithFileAndLine)
{
    const auto refused = [](const char* text) { return read_card_text(text, "4.csv").error().what_happened; };
    EXPECT_NE(refused("angle,pressure\n0,1\n").find("4.csv, line 1: The header"), std::string::npos);
    EXPECT_NE(refused("crank_angle_deg,pressure_bar\n0,100\n1,x\n")
                  .find("4.csv, line 3: The pressure is not readable"),
              std::string::npos);
    EXPECT_NE(refused("crank_angle_deg,pressure_bar\n400,100\n").find("beyond one working cycle"),
              std::string::npos);
    EXPECT_NE(refused("crank_angle_deg,pressure_bar\n0\n").find("line 2"), std::string::npos);
    EXPECT_NE(refused("crank_angle_deg,pressure_bar\n0,nan\n").find("line 2"), std::string::npos);
    EXPECT_NE(refused("crank_angle_deg,pressure_bar\n").find("no samples"), std::string::npos);
    EXPECT_NE(refused("").find("header"), std::string::npos);
    EXPECT_EQ(read_card_file(path(QStringLiteral("none.csv"))).error().kind, Problem::Kind::not_found);
}

TEST_F(Cards, ComeBackFromTheHistoryToTheLastBit)
{
    CardTrace odd = smooth_trace(0.5);
    odd.gauge = true;
    odd.pressure_bar[7] = 1.0 / 3.0;
    odd.pressure_bar[8] = -0.0;
    CardTrace cycles = smooth_trace(1.0);
    cycles.cycle.assign(cycles.pressure_bar.size(), 3);
    cycles.cycle.front() = -70000;
    for (const CardTrace& trace : {smooth_trace(0.1), smooth_trace(0.5), odd, cycles}) {
        const auto unpacked = unpack_card(pack_card(trace));
        ASSERT_TRUE(unpacked.has_value());
        EXPECT_EQ(unpacked->cycle, trace.cycle);
        EXPECT_EQ(unpacked->crank_angle_deg, trace.crank_angle_deg);
        EXPECT_EQ(unpacked->pressure_bar, trace.pressure_bar);
        EXPECT_EQ(unpacked->gauge, trace.gauge);
    }
}

TEST_F(Cards, TakeLittleRoomInTheHistory)
{
    const CardTrace trace =
        smooth_trace(0.1); // 3600 samples with three decimals, smooth as a filtered trace is
    EXPECT_LT(pack_card(trace).size(), 3 * 3600 / 2) << "bytes; a tenth of plain doubles";
}

TEST_F(Cards, DamagedBytesAreNoTrace)
{
    const QByteArray packed = pack_card(smooth_trace(1.0));
    EXPECT_FALSE(unpack_card({}).has_value());
    EXPECT_FALSE(unpack_card(qCompress(QByteArray("\x01\x00\x7f", 3))).has_value());
    EXPECT_FALSE(unpack_card(qCompress(qUncompress(packed).chopped(5))).has_value());
}

TEST_F(Cards, BelongToAReadingAndACylinder)
{
    const auto history = memory();
    write_engine(QStringLiteral("engine"), header + "2029-01,2029-01-12T08:30Z,speed,,95.4,r/min\n");
    write(QStringLiteral("engine/cards/2029-01/3.csv"), "crank_angle_deg,pressure_bar\n-1,100\n0,101.5\n");
    EXPECT_FALSE(take_folder(*history, QStringLiteral("engine")).anything_refused());
    CardStore store(*history);
    const auto cards = value_of_result(store.list(only_engine(*history)));
    ASSERT_EQ(cards.size(), 1U);
    EXPECT_EQ(cards[0].cylinder, 3);
    EXPECT_EQ(cards[0].samples, 2);
    const CardTrace trace = value_of_result(store.load(cards[0].id));
    EXPECT_EQ(trace.pressure_bar.back(), 101.5);
    EXPECT_EQ(value_of_result(store.add(cards[0].reading_id, 3, trace, chief_)), cards[0].id)
        << "the same again is the same";
    CardTrace other = trace;
    other.pressure_bar.back() = 102.0;
    EXPECT_FALSE(store.add(cards[0].reading_id, 3, other, chief_).has_value());
    write(QStringLiteral("engine/cards/2029-01/3.csv"), "crank_angle_deg,pressure_bar\n-1,100\n0,102\n");
    EXPECT_FALSE(take_folder(*history, QStringLiteral("engine")).folders.front().taken);
}

TEST_F(Cards, MeasuredTracesComeBackToTheLastBit)
{
    const QDir data(qEnvironmentVariable("EVENSTROKE_CHECK_DATA",
                                         QStringLiteral(EVENSTROKE_SOURCE_DIR "/../shared/data")));
    const QString file = data.filePath(QStringLiteral("four_cylinder_96x104/cylinder1_100Nm_1600rpm.csv"));
    if (!QFile::exists(file))
        GTEST_SKIP() << "the check data are not here: " << file.toStdString();
    const CardTrace trace = value_of_result(read_card_file(file));
    EXPECT_EQ(trace.crank_angle_deg.size(), 7200U);
    EXPECT_EQ(unpack_card(pack_card(trace))->pressure_bar, trace.pressure_bar);
}

TEST_F(Cards, OfAReadingAreAddedTogetherOrNotAtAll)
{
    write_engine(QStringLiteral("one"), header + "2029-01,2029-01-10T08:00Z,speed,,95,r/min\n");
    const auto history = memory();
    take_folder(*history, QStringLiteral("one"));
    const std::string engine = only_engine(*history), reading = readings_of(*history).front().id;
    CardStore store(*history);
    const CardTrace first = smooth_trace(0.5), second = smooth_trace(1.0);
    const qint64 before = value_of_result(VesselStore(*history).engines()).front().input_revision;
    const auto added = value_of_result(store.add_all(reading, {{1, &first}, {2, &second}}, chief_));
    EXPECT_EQ(added.added, 2);
    EXPECT_GT(value_of_result(VesselStore(*history).engines()).front().input_revision, before);
    EXPECT_EQ(value_of_result(store.add_all(reading, {{1, &first}}, chief_)).same, 1);
    const auto contradicts = store.add_all(reading, {{3, &first}, {1, &second}}, chief_);
    ASSERT_FALSE(contradicts.has_value());
    EXPECT_NE(contradicts.error().what_happened.find("another card of cylinder 1"), std::string::npos);
    EXPECT_FALSE(store.add_all(reading, {{4, &first}, {4, &second}}, chief_).has_value());
    const auto foreseen = value_of_result(store.foresee(reading, {{1, &first}, {6, &second}}));
    EXPECT_EQ(foreseen.added, 1);
    EXPECT_EQ(foreseen.same, 1);
    EXPECT_EQ(foreseen.in_all, 3) << "two are kept";
    EXPECT_FALSE(store.foresee(reading, {{3, &first}, {1, &second}}).has_value())
        << "another card of cylinder 1";
    EXPECT_EQ(value_of_result(store.add_all(reading, {{1, &first}}, chief_)).in_all, 2)
        << "nothing came in by foreseeing";
    EXPECT_FALSE(store.add_all(reading, {{5, &first}}, {"", ""}).has_value());
    EXPECT_EQ(value_of_result(store.list(engine)).size(), 2U);
    EXPECT_TRUE(value_of_result(verify(*history)).sound());
}

} // namespace
} // namespace evenstroke::storage
