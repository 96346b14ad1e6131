// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/reading/figure_plot.h"
#include "app/reading/figure_table_model.h"
#include "app/reading/side_views.h"
#include "core/engine/crank_forces.h"
#include "core/heat/wall_chain.h"
#include "tests/app/invented_judgement.h"
#include "tests/app/pictures.h"
#include "tests/core/reading_maker.h"

#include <gtest/gtest.h>

#include <QAbstractItemModelTester>

#include <cmath>

namespace evenstroke {
namespace {

/// All numbers of engine and cards are invented.
struct Described
{
    std::shared_ptr<EngineRecord> record;
    Judgement judgement;
    std::size_t newest = 0;
};

Described described(bool limits = true, bool walls = true)
{
    Described made;
    made.judgement = *invented::judgement();
    made.record = std::make_shared<EngineRecord>(*made.judgement.record);
    Engine& engine = made.record->engine;
    engine.rated_power = kilowatts(12000);
    engine.rated_speed = per_minute(105);
    engine.bore = millimetres(600);
    engine.stroke = millimetres(2400);
    engine.rod_length = millimetres(2460);
    engine.firing_order = {1, 5, 3, 4, 2, 6};
    if (limits) {
        LoadLimits load;
        load.mean_effective_pressure = 1.0;
        load.torque_exponent = 2.2;
        load.torque_below_speed = 0.9;
        load.highest_speed = 1.05;
        load.overload = 1.1;
        load.light_running_margin = 0.05;
        load.source = "invented";
        engine.load_limits = load;
    }
    if (walls)
        engine.walls = {{"liner", 75.0, celsius(890), film_coefficient(400), millimetres(35), conductivity(45), film_coefficient(8000),
                         celsius(80), {}, {}, "invented"},
                        {"cover", 75.0, celsius(890), film_coefficient(450), millimetres(30), conductivity(45), film_coefficient(8000),
                         celsius(80), {}, {}, "invented"}};
    for (std::size_t i = 0; i < made.record->readings.size(); ++i) {
        test::ReadingMaker maker;
        maker.number("speed", 92.0 + 0.3 * static_cast<double>(i % 9)).number("scavenge_pressure", 2.0).number("jacket_inlet_pressure", 3.0);
        maker.number("barometric_pressure", 1000, Place{Place::Kind::ship, 0});
        for (int cylinder = 1; cylinder <= 6; ++cylinder)
            maker.number("jacket_outlet_temperature", 84, Place::cylinder(cylinder));
        for (const Value& value : maker.done().values)
            made.record->readings[i].values.push_back(value);
    }
    made.judgement.record = made.record;
    made.newest = made.judgement.readings.size() - 1;
    return made;
}

/// A pressure trace of one two-stroke cycle without its last point, absolute bar.
storage::CardTrace card(double peak)
{
    storage::CardTrace trace;
    for (int i = 0; i < 720; ++i) {
        const double angle = -180.0 + 0.5 * i;
        trace.crank_angle_deg.push_back(angle);
        trace.pressure_bar.push_back(3.0 + peak * std::exp(-std::pow((angle - 12.0) / 28.0, 2.0)));
    }
    return trace;
}

Cards six_cards()
{
    Cards cards;
    for (int cylinder = 1; cylinder <= 6; ++cylinder)
        cards.emplace(cylinder, card(130.0 + cylinder));
    return cards;
}

PowerAgreement four_ways()
{
    PowerAgreement power;
    for (const auto& [words, kilowatt, half] : {std::tuple{"Torsion meter", 9000.0, 90.0}, {"Indicated power", 9110.0, 180.0},
                                                {"Turbocharger speed", 8950.0, 300.0}, {"Fuel index and speed", 9700.0, 250.0}}) {
        PowerEstimate estimate;
        estimate.words = words;
        estimate.power = kilowatt;
        estimate.half_width = half;
        estimate.in_mean = kilowatt < 9500.0;
        power.estimates.push_back(estimate);
    }
    PowerEstimate unknown;
    unknown.words = "Fuel consumption";
    unknown.missing = "no fuel was measured.";
    power.estimates.push_back(unknown);
    power.typed_power = 9000.0;
    power.mean = 9020.0;
    power.mean_half_width = 75.0;
    power.doubtful = 3;
    power.sentence = "The fuel index stands apart from the others.";
    return power;
}

void keep(const SideView& view, const QString& name)
{
    for (const ThemeKind kind : {ThemeKind::day, ThemeKind::night})
        for (std::size_t i = 0; i < view.figures.size(); ++i) {
            FigurePlot plot;
            plot.resize(430, 280);
            plot.show_figure(view.figures[i], theme_of(kind));
            plot.show();
            plot.replot(QCustomPlot::rpImmediateRefresh);
            EXPECT_TRUE(shows_something(plot.grab().toImage()));
            keep_picture(plot, QStringLiteral("side_%1_%2_%3").arg(name).arg(i).arg(kind == ThemeKind::day ? "day" : "night"));
        }
}

TEST(PowerView, ShowsEveryKnownEstimateTheMeanAndWhatIsNotKnown)
{
    const SideView view = power_view(four_ways(), described().record->engine);
    ASSERT_EQ(view.figures.size(), 1U);
    EXPECT_EQ(view.figures[0].dots.size(), 5U) << "four estimates and their mean";
    EXPECT_TRUE(view.figures[0].dots[3].hollow);
    EXPECT_TRUE(view.figures[0].dots[3].label.contains(QStringLiteral("doubt")));
    EXPECT_EQ(view.sentence, QStringLiteral("The fuel index stands apart from the others."));
    EXPECT_TRUE(view.second_sentence.contains(QStringLiteral("Fuel consumption: no fuel was measured."))) << view.second_sentence.toStdString();
    EXPECT_EQ(view.table.rows.size(), 7U);
    keep(view, QStringLiteral("power"));
}

TEST(PowerView, SaysWhatToReadWhereNothingIsKnown)
{
    EXPECT_FALSE(power_view({}, described().record->engine).empty.isEmpty());
}

TEST(LoadView, LiesWhereTheCoreLocatesTheReading)
{
    const Described engine = described();
    const SideView view = load_view(engine.judgement, engine.newest);
    ASSERT_EQ(view.figures.size(), 1U) << view.empty.toStdString();
    EXPECT_EQ(view.figures[0].dots.size(), engine.judgement.readings.size());
    const FigureDot& dot = view.figures[0].dots.back();
    EXPECT_EQ(dot.role, FigureRole::in_hand);
    const double load = *engine.judgement.readings[engine.newest].load_percent;
    EXPECT_NEAR(dot.y, load, 1e-9) << "the load is typed in per cent of the rating";
    const auto diagram = LoadDiagram::make(kilowatts(12000), per_minute(105), *engine.record->engine.load_limits);
    const auto state = diagram.value().locate(kilowatts(120.0 * load), per_minute(105.0 * dot.x / 100.0));
    EXPECT_EQ(view.sentence.toStdString(), state.value().sentence);
    keep(view, QStringLiteral("load"));
}

TEST(LoadView, NamesTheKeysThatAreMissing)
{
    Described engine = described(false);
    EXPECT_TRUE(load_view(engine.judgement, 0).empty.contains(QStringLiteral("load_limits")));
    engine.record->engine.rated_speed = {};
    EXPECT_TRUE(load_view(engine.judgement, 0).empty.contains(QStringLiteral("rated_speed_rpm")));
}

TEST(WallView, SaysWhatTheCoreSaysOfTheTrial)
{
    const Described engine = described();
    WallTrial trial;
    trial.coolant = 80.0;
    trial.scale = 0.5;
    trial.scale_conductivity = 1.5;
    const SideView view = wall_view(engine.judgement, engine.newest, 0, trial);
    ASSERT_EQ(view.figures.size(), 1U) << view.empty.toStdString();
    // 348.0 °C: the chain check of core/heat, 400 W/(m² K), 890 and 80 °C, 35 mm of iron, 0.5 mm of scale, 8000 W/(m² K).
    EXPECT_TRUE(view.sentence.contains(QStringLiteral("348"))) << view.sentence.toStdString();
    EXPECT_TRUE(view.sentence.contains(QStringLiteral("+53"))) << view.sentence.toStdString();
    EXPECT_TRUE(view.second_sentence.contains(QStringLiteral("no claim of its own")));
    keep(view, QStringLiteral("wall_scale"));
    keep(wall_view(engine.judgement, engine.newest, 0, {}), QStringLiteral("wall"));
    trial.as_iron = true;
    const SideView iron = wall_view(engine.judgement, engine.newest, 0, trial);
    EXPECT_EQ(iron.figures[0].curves[1].x.size(), 2U) << "one straight line";
    keep(iron, QStringLiteral("wall_iron"));
}

TEST(WallView, ClaimsNoTemperatureAtAnotherLoadThanTheDescriptions)
{
    Described engine = described();
    engine.judgement.readings[engine.newest].load_percent = 40.0;
    const SideView view = wall_view(engine.judgement, engine.newest, 0, {});
    EXPECT_TRUE(view.sentence.contains(QStringLiteral("not known at 40 % load"))) << view.sentence.toStdString();
    EXPECT_FALSE(view.sentence.contains(QStringLiteral("weakens")));
}

TEST(WallView, SaysWhatBelongsThereWhereNoWallIsDescribed)
{
    EXPECT_TRUE(wall_view(described(true, false).judgement, 0, 0, {}).empty.contains(QStringLiteral("walls")));
}

TEST(CrankView, ShowsTheForcesOfTheCoreAndTheSumOfAllCylinders)
{
    const Described engine = described();
    const Cards cards = six_cards();
    const SideView view = crank_view(engine.judgement, engine.newest, cards, 4);
    ASSERT_EQ(view.figures.size(), 2U) << view.empty.toStdString() << view.second_sentence.toStdString();
    EXPECT_TRUE(view.sentence.contains(QStringLiteral("gas force only"))) << "no moving mass is entered";
    EXPECT_TRUE(view.sentence.startsWith(QStringLiteral("Cylinder 4")));
    // At 15° after dead centre: pressure below the piston 2.0 bar gauge and 1000 mbar.
    const auto gear = SliderCrank::make(millimetres(600), millimetres(2400), millimetres(2460));
    const std::size_t at = 390; // (15 + 180) / 0.5
    const auto forces = crank_forces(gear.value(), crank_degrees(15.0), bar_absolute(cards.at(4).pressure_bar[at]), {bar_absolute(3.0), {}, {}});
    EXPECT_NEAR(view.figures[0].curves[0].y[at], forces.value().piston.value() / 1e3, 1e-6) << "the same formula";
    keep(view, QStringLiteral("crank"));
}

TEST(CrankView, DoesNotAddUpWhereACardIsMissing)
{
    const Described engine = described();
    Cards cards = six_cards();
    cards.erase(2);
    const SideView view = crank_view(engine.judgement, engine.newest, cards, 2);
    EXPECT_EQ(view.figures.size(), 1U);
    EXPECT_TRUE(view.sentence.contains(QStringLiteral("Cylinder 2 has no card")));
    EXPECT_TRUE(view.second_sentence.contains(u'2')) << view.second_sentence.toStdString();
    EXPECT_FALSE(crank_view(engine.judgement, engine.newest, {}, 1).empty.isEmpty());
}

TEST(CrankView, TakesTheMeanOverTheCyclesOfACard)
{
    const Described engine = described();
    storage::CardTrace two = card(100.0), second = card(140.0);
    two.cycle.assign(720, 1);
    two.cycle.insert(two.cycle.end(), 720, 2);
    two.crank_angle_deg.insert(two.crank_angle_deg.end(), second.crank_angle_deg.begin(), second.crank_angle_deg.end());
    two.pressure_bar.insert(two.pressure_bar.end(), second.pressure_bar.begin(), second.pressure_bar.end());
    const SideView mean = crank_view(engine.judgement, engine.newest, {{1, two}}, 1);
    const SideView plain = crank_view(engine.judgement, engine.newest, {{1, card(120.0)}}, 1);
    ASSERT_EQ(mean.figures.size(), 1U);
    EXPECT_NEAR(mean.figures[0].curves[0].y[380], plain.figures[0].curves[0].y[380], 1e-6);
}

TEST(FigureTableModel, KeepsTheRulesOfItemModels)
{
    FigureTableModel model;
    const QAbstractItemModelTester tester(&model, QAbstractItemModelTester::FailureReportingMode::Fatal);
    const SideView view = power_view(four_ways(), described().record->engine);
    model.show_table(view.table);
    EXPECT_EQ(model.rowCount(), 7);
    EXPECT_EQ(view.table.as_text().count(u'\n'), 8);
    model.show_table({});
    EXPECT_EQ(model.rowCount(), 0);
}

} // namespace
} // namespace evenstroke
