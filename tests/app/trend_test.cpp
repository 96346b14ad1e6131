// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/trends/plot_tickers.h"
#include "app/trends/trend_plot.h"
#include "app/trends/trend_table_model.h"
#include "tests/app/invented_judgement.h"
#include "tests/app/pictures.h"

#include <gtest/gtest.h>

#include <QAbstractItemModelTester>
#include <QFileInfo>
#include <QSignalSpy>
#include <QTemporaryDir>
#include <QTest>

#include <algorithm>

namespace evenstroke {
namespace {

Selection compression_of(int cylinder, ValueView view = ValueView::apart)
{
    Selection selection;
    selection.quantity = find_quantity("compression_pressure");
    selection.place = Place::cylinder(cylinder);
    selection.range = TimeRange::all;
    selection.view = view;
    return selection;
}

TEST(TrendPicture, MarksUnsteadyAndDoubtfulPoints)
{
    const TrendPicture picture = make_trend_picture(*invented::judgement(), compression_of(4));
    const auto count = [&](auto property) { return std::count_if(picture.points.begin(), picture.points.end(), property); };
    EXPECT_EQ(count([](const PicturePoint& p) { return p.unsteady; }), 1);
    EXPECT_EQ(count([](const PicturePoint& p) { return p.doubtful; }), 1);
    EXPECT_EQ(picture.others.size(), 5U);
    EXPECT_EQ(picture.events.size(), 2U);
}

TEST(TrendPicture, CarriesTheFlagWhereItStartedAndItsWords)
{
    const TrendPicture picture = make_trend_picture(*invented::judgement(), compression_of(4));
    ASSERT_EQ(picture.flags.size(), 1U);
    EXPECT_TRUE(picture.flags.front().standing);
    EXPECT_EQ(picture.limit_figure, QStringLiteral("3 to 11 months"));
    EXPECT_FALSE(picture.fits.isEmpty());
    EXPECT_FALSE(picture.next_check.isEmpty());
}

TEST(TrendPicture, NamesTheLevelItBeganWithAndTheOneItHas)
{
    auto judgement = std::make_shared<Judgement>(*invented::judgement());
    EXPECT_EQ(make_trend_picture(*judgement, compression_of(4)).threshold_words, "watch from here");
    EXPECT_EQ(make_trend_picture(*judgement, compression_of(2)).threshold_words, "flag from here");
    for (Flag& flag : judgement->flags)
        if (flag.subject == Place::cylinder(4)) {
            flag.level_now = Level::act;
            flag.raised_at = judgement->readings.size() - 1;
        }
    const TrendPicture picture = make_trend_picture(*judgement, compression_of(4));
    EXPECT_TRUE(picture.threshold_words.startsWith("watch from here,\nact since ")) << picture.threshold_words.toStdString();
    ASSERT_EQ(picture.flags.size(), 1U);
    ASSERT_TRUE(picture.flags.front().raised_time);
    EXPECT_EQ(*picture.flags.front().raised_time, picture.points.back().time) << "each level has its mark at its own point";
}

TEST(TrendPicture, SaysThatALimitIsPassedWhereTheNewestReadingIsBeyondIt)
{
    auto judgement = std::make_shared<Judgement>(*invented::judgement());
    auto record = std::make_shared<EngineRecord>(*judgement->record);
    const Trend* trend = judgement->find_trend(*find_quantity("compression_pressure"), Place::cylinder(4));
    AbsoluteLimit limit;
    limit.quantity = "compression_pressure";
    limit.low = trend->points.back().raw + 0.1;
    record->engine.limits = {limit};
    judgement->record = record;
    EXPECT_EQ(make_trend_picture(*judgement, compression_of(4)).limit_figure, "limit passed");
    record->engine.limits[0].low = trend->points.back().raw - 20.0;
    EXPECT_EQ(make_trend_picture(*judgement, compression_of(4)).limit_figure, "3 to 11 months");
}

TEST(TrendPicture, ReadingsToBeUsedWithCareAreHollowAndNamed)
{
    auto judgement = std::make_shared<Judgement>(*invented::judgement());
    judgement->readings.back().steadiness = Steadiness::usable_with_care;
    const TrendPicture picture = make_trend_picture(*judgement, compression_of(4));
    EXPECT_TRUE(picture.points.back().with_care);
    EXPECT_TRUE(picture.points.back().spoken.contains("usable with care")) << picture.points.back().spoken.toStdString();
}

TEST(TrendPicture, WhatWasReadIsShownInTheUnitItWasTypedIn)
{
    auto judgement = std::make_shared<Judgement>(*invented::judgement());
    auto record = std::make_shared<EngineRecord>(*judgement->record);
    const Trend* trend = judgement->find_trend(*find_quantity("compression_pressure"), Place::cylinder(4));
    const std::size_t reading = trend->points.back().reading;
    auto& values = record->readings[reading].values;
    std::erase_if(values, [&](const Value& value) { return value.quantity == trend->quantity && value.place == trend->place; });
    Value value;
    value.quantity = trend->quantity;
    value.place = trend->place;
    value.typed = "67.0";
    value.number = 67.0;
    value.unit = find_unit("kgf/cm2").value().id;
    value.value_si = unit(value.unit).to_si(67.0);
    values.push_back(value);
    judgement->record = record;
    EXPECT_TRUE(point_words(*judgement, *trend, reading).contains("read 67.0\u00a0kgf/cm² (")) << point_words(*judgement, *trend, reading).toStdString();
}

TEST(TrendPicture, FallsBackToAViewThatThePlaceHas)
{
    const auto judgement = invented::judgement();
    Selection selection;
    selection.quantity = find_quantity("scavenge_pressure");
    selection.view = ValueView::apart; // an engine has no others to be apart from
    EXPECT_EQ(make_trend_picture(*judgement, selection).view, ValueView::deviation);
}

TEST(TrendPicture, SaysNothingOfAPlaceThatWasNeverRead)
{
    Selection selection = compression_of(17);
    EXPECT_TRUE(make_trend_picture(*invented::judgement(), selection).points.empty());
}

TEST(TrendPlot, DrawsEveryViewAndTheLoad)
{
    const auto judgement = invented::judgement();
    for (int view = 0; view < 4; ++view) {
        TrendPlot plot;
        plot.resize(950, 520);
        plot.show_picture(make_trend_picture(*judgement, compression_of(4, static_cast<ValueView>(view))), theme());
        TrendExtras extras;
        extras.load = view == 1;
        extras.uncertainty = view == 2;
        extras.fixed_limits = view == 3;
        plot.show_extras(extras);
        plot.show();
        plot.choose(20);
        EXPECT_TRUE(shows_something(plot.grab().toImage()));
        keep_picture(plot, QStringLiteral("trend_plot_%1").arg(view));
    }
}

TEST(TrendPlot, AClickOnAPointChoosesItsReading)
{
    TrendPlot plot;
    plot.resize(950, 520);
    plot.show_picture(make_trend_picture(*invented::judgement(), compression_of(4)), theme());
    plot.show();
    plot.replot(QCustomPlot::rpImmediateRefresh);
    QSignalSpy chosen(&plot, &TrendPlot::reading_chosen);
    const PicturePoint& newest = plot.picture().points.back();
    const QPoint place(static_cast<int>(plot.axisRect(0)->axis(QCPAxis::atBottom)->coordToPixel(newest.time)),
                       static_cast<int>(plot.axisRect(0)->axis(QCPAxis::atLeft)->coordToPixel(newest.value)));
    QTest::mouseClick(&plot, Qt::LeftButton, Qt::NoModifier, place);
    ASSERT_EQ(chosen.count(), 1);
    EXPECT_EQ(chosen.at(0).at(0).toULongLong(), newest.reading);
    EXPECT_TRUE(plot.words_at(place).contains(QStringLiteral("bar")));
    QTest::mouseClick(&plot, Qt::LeftButton, Qt::NoModifier, QPoint(2, 2));
    EXPECT_EQ(chosen.count(), 1);
}

TEST(TrendPlot, IsWrittenAsPictureAndAsPaper)
{
    const QTemporaryDir folder;
    const TrendPicture picture = make_trend_picture(*invented::judgement(), compression_of(4));
    const QString png = folder.filePath(QStringLiteral("trend.png")), pdf = folder.filePath(QStringLiteral("trend.pdf"));
    ASSERT_TRUE(TrendPlot::save(picture, {}, png, QSize(1000, 560)));
    TrendExtras everything;
    everything.load = everything.uncertainty = everything.fixed_limits = true;
    ASSERT_TRUE(TrendPlot::save(picture, everything, pdf, QSize(1000, 560)));
    EXPECT_TRUE(shows_something(QImage(png)));
    EXPECT_GT(QFileInfo(pdf).size(), 3000);
    EXPECT_FALSE(TrendPlot::save(picture, {}, folder.filePath(QStringLiteral("absent/trend.pdf")), QSize(1000, 560)));
}

TEST(TrendTable, KeepsTheRulesOfItemModelsAndShowsTheNewestFirst)
{
    TrendTableModel model;
    const QAbstractItemModelTester tester(&model, QAbstractItemModelTester::FailureReportingMode::Fatal);
    const auto judgement = invented::judgement();
    const Trend* trend = judgement->find_trend(*find_quantity("compression_pressure"), Place::cylinder(4));
    ASSERT_NE(trend, nullptr);
    model.show_trend(judgement, trend);
    EXPECT_EQ(model.rowCount(), static_cast<int>(trend->points.size()));
    EXPECT_EQ(model.reading_of(0), trend->points.back().reading);
    EXPECT_EQ(model.row_of(trend->points.front().reading), model.rowCount() - 1);
    model.show_trend(nullptr, nullptr);
    EXPECT_EQ(model.rowCount(), 0);
}

TEST(TrendTable, IsHandedOutWithAHeadingAndOneLineAReading)
{
    TrendTableModel model;
    const auto judgement = invented::judgement();
    model.show_trend(judgement, judgement->find_trend(*find_quantity("compression_pressure"), Place::cylinder(4)));
    const QByteArray csv = model.as_csv();
    EXPECT_TRUE(csv.startsWith("taken_at,load_percent,value,"));
    EXPECT_EQ(csv.count("\r\n"), model.rowCount() + 1);
    EXPECT_FALSE(csv.contains("\xE2\x88\x92")) << "files keep a plain minus sign";
    EXPECT_EQ(model.as_text().count(u'\n'), model.rowCount() + 1);
}

TEST(MonthTicker, SetsFewTicksOnTheStartsOfMonths)
{
    struct Open : MonthTicker
    {
        using MonthTicker::createTickVector, MonthTicker::getTickLabel, MonthTicker::getTickStep;
    } ticker;
    const double start = static_cast<double>(QDateTime(QDate(2028, 3, 14), QTime(6, 0), Qt::UTC).toSecsSinceEpoch());
    for (const double years : {0.4, 1.0, 3.0, 10.0}) {
        const QCPRange range(start, start + years * 365.25 * 86400.0);
        const QVector<double> ticks = ticker.createTickVector(ticker.getTickStep(range), range);
        EXPECT_GE(ticks.size(), 2) << years;
        EXPECT_LE(ticks.size(), 9) << years;
        for (const double tick : ticks)
            EXPECT_EQ(QDateTime::fromSecsSinceEpoch(static_cast<qint64>(tick), Qt::UTC).date().day(), 1);
        EXPECT_TRUE(ticker.getTickLabel(ticks.first(), QLocale(), u'f', 0).contains(QStringLiteral("20")));
    }
}

} // namespace
} // namespace evenstroke
