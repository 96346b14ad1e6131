// SPDX-License-Identifier: GPL-3.0-or-later
// The page Cards on the sample vessel, whose cards are invented.
#include "app/cards/cards_page.h"

#include "app/cards/card_plot.h"
#include "app/cards/card_words.h"
#include "app/cards/cylinder_strip.h"
#include "app/desk/frame.h"
#include "app/desk/pages.h"
#include "app/desk/reading_in_hand.h"
#include "app/desk/workplace.h"
#include "storage/history.h"
#include "storage/take_in.h"
#include "tests/app/pictures.h"

#include <gtest/gtest.h>

#include <QAbstractItemModelTester>
#include <QApplication>
#include <QClipboard>
#include <QFile>
#include <QLabel>
#include <QMimeData>
#include <QPrinter>
#include <QPushButton>
#include <QTableView>
#include <QTemporaryDir>
#include <QTest>
#include <QTextBrowser>

#include <cmath>

namespace evenstroke::test {
namespace {

constexpr int patience = 60'000; // milliseconds; a loaded machine is slow

class CardsDesk : public testing::Test
{
protected:
    static void SetUpTestSuite()
    {
        folder_ = std::make_unique<QTemporaryDir>();
        auto history = storage::History::create(folder_->filePath(QStringLiteral("sample.evenstroke")));
        ASSERT_TRUE(history.has_value());
        const auto taken = storage::take(*history.value(), {QStringLiteral(EVENSTROKE_SOURCE_DIR "/sample_vessel/files")});
        ASSERT_TRUE(taken.has_value());
    }
    static void TearDownTestSuite() { folder_.reset(); }

    void SetUp() override
    {
        const QString own = own_.filePath(QStringLiteral("ship.evenstroke"));
        ASSERT_TRUE(QFile::copy(folder_->filePath(QStringLiteral("sample.evenstroke")), own));
        ASSERT_FALSE(workplace_.open(own).has_value());
        for (const VesselChoice& vessel : workplace_.vessels())
            for (const EngineChoice& engine : vessel.engines)
                if (engine.name.contains(QLatin1String("main"), Qt::CaseInsensitive)) {
                    Selection selection;
                    selection.vessel = vessel.id;
                    selection.engine = engine.id;
                    workplace_.select(selection);
                }
        ASSERT_TRUE(QTest::qWaitFor([&] { return workplace_.judgement() != nullptr; }, patience));
    }
    void show()
    {
        page_ = std::make_unique<CardsPage>(workplace_);
        page_->resize(1190, 690);
        page_->refresh();
        page_->show();
        QApplication::setActiveWindow(page_.get());
        wait();
    }
    void wait() { ASSERT_TRUE(QTest::qWaitFor([&] { return page_->cards() && !page_->evaluating(); }, patience)); }
    void key(Qt::Key code, Qt::KeyboardModifiers modifiers = Qt::NoModifier)
    {
        QTest::keyClick(page_.get(), code, modifiers);
        page_->refresh();
        QTest::qWait(1);
    }
    const Judgement& judgement() const { return *workplace_.judgement(); }
    std::string reading_name() const
    {
        return judgement().record->readings[*reading_in_hand(judgement(), workplace_.selection())].name;
    }
    template <typename Widget>
    Widget& widget(const char* name)
    {
        return *page_->findChild<Widget*>(QLatin1String(name));
    }

    static std::unique_ptr<QTemporaryDir> folder_;
    QTemporaryDir own_;
    Workplace workplace_;
    std::unique_ptr<CardsPage> page_;
};
std::unique_ptr<QTemporaryDir> CardsDesk::folder_;

TEST_F(CardsDesk, BeginsWithTheNewestReadingThatHasCardsAndTheCylinderThatAsksForIt)
{
    show();
    EXPECT_EQ(reading_name(), "2026-10") << "the newest with cards";
    EXPECT_EQ(page_->cards()->review.cards.size(), 6U);
    EXPECT_EQ(page_->cylinder(), worst_cylinder(*page_->cards()).value_or(1));
    EXPECT_FALSE(widget<QLabel>("headline").text().isEmpty());
    EXPECT_FALSE(widget<QTextBrowser>("trust").toPlainText().isEmpty());
    EXPECT_GE(widget<QTableView>("results").model()->rowCount(), 15);
    const QAbstractItemModelTester tester(widget<QTableView>("results").model(), QAbstractItemModelTester::FailureReportingMode::Fatal);
    keep_picture(*page_, QStringLiteral("cards"));
}

TEST_F(CardsDesk, ArrowsWalkTheCylindersAndPagesTheReadingsWithCards)
{
    show();
    const int first = page_->cylinder();
    key(Qt::Key_Right);
    EXPECT_EQ(page_->cylinder(), first % 6 + 1);
    EXPECT_EQ(workplace_.selection().place, Place::cylinder(page_->cylinder())) << "the other pages go along";
    key(Qt::Key_Left);
    EXPECT_EQ(page_->cylinder(), first);
    key(Qt::Key_PageUp);
    wait();
    EXPECT_EQ(reading_name(), "2025-06");
    key(Qt::Key_PageDown);
    wait();
    EXPECT_EQ(reading_name(), "2026-10");
}

TEST_F(CardsDesk, EveryViewDrawsAndSaysSomething)
{
    show();
    for (int view = 0; view < card_view_count; ++view) {
        key(static_cast<Qt::Key>(Qt::Key_1 + view));
        const CardPicture& picture = page_->plot().picture();
        EXPECT_EQ(static_cast<int>(picture.view), view);
        EXPECT_TRUE(picture.empty.isEmpty()) << picture.empty.toStdString();
        EXPECT_FALSE(picture.sentence.isEmpty()) << "view " << view + 1;
        EXPECT_LT(picture.y_low, picture.y_high);
        for (const CardLine& line : picture.lines)
            EXPECT_EQ(line.x.size(), line.y.size());
        QTest::qWait(30);
        EXPECT_TRUE(shows_something(page_->plot().toPixmap(400, 300).toImage()));
        keep_picture(*page_, QStringLiteral("cards_view_%1").arg(view + 1));
    }
}

TEST_F(CardsDesk, TheCursorTellsTheValuesUnderIt)
{
    show();
    key(Qt::Key_2);
    key(Qt::Key_Period);
    ASSERT_TRUE(page_->plot().cursor().has_value());
    const double begins = *page_->plot().cursor();
    key(Qt::Key_Period, Qt::ShiftModifier);
    EXPECT_NEAR(*page_->plot().cursor(), begins + 10.0, 1e-9);
    const QString words = widget<QLabel>("cursor_words").text();
    EXPECT_TRUE(words.contains(QStringLiteral("bar"))) << words.toStdString();
}

TEST_F(CardsDesk, ZoomStaysForTheNextCylinderAndGoesBackToTheWhole)
{
    show();
    key(Qt::Key_2);
    const double whole = page_->plot().xAxis->range().size();
    key(Qt::Key_Plus);
    EXPECT_LT(page_->plot().xAxis->range().size(), whole);
    const QCPRange nearer = page_->plot().xAxis->range();
    key(Qt::Key_Right);
    EXPECT_DOUBLE_EQ(page_->plot().xAxis->range().lower, nearer.lower) << "cylinders are compared at one zoom";
    key(Qt::Key_0);
    EXPECT_DOUBLE_EQ(page_->plot().xAxis->range().size(), whole);
    for (int i = 0; i < 60; ++i)
        key(Qt::Key_Minus);
    EXPECT_LE(page_->plot().xAxis->range().size(), whole) << "nothing beyond the cycle";
}

TEST_F(CardsDesk, TheTableSaysWhatThePlotDraws)
{
    show();
    key(Qt::Key_A);
    ASSERT_TRUE(widget<QTableView>("table").isVisible());
    EXPECT_GT(widget<QTableView>("table").model()->rowCount(), 300) << "a row a degree";
    page_->copy();
    const QMimeData* copied = QGuiApplication::clipboard()->mimeData();
    EXPECT_TRUE(copied->text().contains(widget<QLabel>("headline").text()));
    EXPECT_TRUE(copied->data(QStringLiteral("text/csv")).contains("Crank angle"));
    key(Qt::Key_A);
    EXPECT_TRUE(page_->plot().isVisible());
}

TEST_F(CardsDesk, SavesPictureTableAndPaper)
{
    show();
    for (const char* ending : {"png", "pdf", "csv"}) {
        const QString path = own_.filePath(QStringLiteral("card.") + QLatin1String(ending));
        EXPECT_TRUE(page_->save_as(path)) << ending;
        EXPECT_GT(QFileInfo(path).size(), 500);
    }
    EXPECT_FALSE(page_->save_as(own_.filePath(QStringLiteral("card.doc"))));
    EXPECT_TRUE(widget<QLabel>("done").text().contains(QStringLiteral(".pdf")));
    QPrinter printer;
    printer.setOutputFormat(QPrinter::PdfFormat);
    printer.setOutputFileName(own_.filePath(QStringLiteral("page.pdf")));
    page_->print(printer);
    EXPECT_GT(QFileInfo(printer.outputFileName()).size(), 3000);
}

TEST_F(CardsDesk, ResultsGoIntoTheReadingAndWhatWasReadByHandStays)
{
    show();
    const std::size_t reading = *reading_in_hand(judgement(), workplace_.selection());
    const auto hand_read = [&](const char* name) {
        const Value* value = judgement().record->readings[reading].find(*find_quantity(name, Place::Kind::cylinder), Place::cylinder(1));
        return value ? std::optional(*value) : std::nullopt;
    };
    const auto before = hand_read("maximum_pressure");
    ASSERT_TRUE(before.has_value()) << "the sample's cylinder pressures are read by hand";
    ASSERT_TRUE(page_->accept_results({"A. Tester", "from the cards"})) << widget<QLabel>("done").text().toStdString();
    EXPECT_TRUE(widget<QLabel>("done").text().contains(QStringLiteral("read by hand left"))) << widget<QLabel>("done").text().toStdString();
    ASSERT_TRUE(QTest::qWaitFor([&] { return hand_read("angle_of_maximum_pressure").has_value() || hand_read("expansion_pressure").has_value(); }, patience));
    const auto filled = hand_read("angle_of_maximum_pressure") ? hand_read("angle_of_maximum_pressure") : hand_read("expansion_pressure");
    EXPECT_EQ(filled->origin, Origin::card);
    EXPECT_EQ(hand_read("maximum_pressure")->typed, before->typed);
    EXPECT_EQ(hand_read("maximum_pressure")->origin, Origin::read);
}

TEST_F(CardsDesk, CardsCalledHealthyAreWhatOthersAreComparedWith)
{
    show();
    EXPECT_TRUE(page_->cards()->review.provisional) << "nobody has called cards healthy yet";
    key(Qt::Key_PageUp);
    wait();
    ASSERT_EQ(reading_name(), "2025-06");
    ASSERT_TRUE(page_->call_healthy(true, {"A. Tester", "first after the survey"})) << widget<QLabel>("done").text().toStdString();
    EXPECT_TRUE(widget<QPushButton>("healthy_button").text().contains(QStringLiteral("no longer"))) << "and can be taken back";
    key(Qt::Key_PageDown);
    wait();
    ASSERT_TRUE(page_->cards()->find(page_->cylinder())->comparison.has_value());
    EXPECT_FALSE(page_->cards()->review.provisional);
    EXPECT_TRUE(page_->plot().picture().sentence.contains(QStringLiteral("the healthy card of"))) << page_->plot().picture().sentence.toStdString();
    key(Qt::Key_PageUp);
    wait();
    EXPECT_TRUE(page_->call_healthy(false, {"A. Tester", "the gauge was changed"}));
    EXPECT_TRUE(widget<QPushButton>("healthy_button").text().contains(QStringLiteral("are healthy")));
}

TEST_F(CardsDesk, AWithdrawnCardSaysWhyAndComesBack)
{
    show();
    const int cylinder = page_->cylinder();
    EXPECT_TRUE(widget<QPushButton>("withdraw_button").text().contains(QStringLiteral("withdraw")));
    ASSERT_TRUE(page_->withdraw_or_bring_back({"A. Tester", "the cock was choked"})) << widget<QLabel>("done").text().toStdString();
    const auto gone = [&] { return page_->cards() && !page_->evaluating() && !page_->cards()->find(cylinder); };
    ASSERT_TRUE(QTest::qWaitFor(gone, patience));
    page_->refresh();
    EXPECT_EQ(page_->cylinder(), cylinder) << "the eye stays where it was";
    const QString headline = widget<QLabel>("headline").text();
    EXPECT_TRUE(headline.contains(QStringLiteral("was withdrawn on")) && headline.contains(QStringLiteral("A. Tester: the cock was choked")))
        << headline.toStdString();
    EXPECT_TRUE(widget<QPushButton>("withdraw_button").text().contains(QStringLiteral("back")));
    ASSERT_TRUE(page_->withdraw_or_bring_back({"A. Tester", "it was another cock"})) << widget<QLabel>("done").text().toStdString();
    ASSERT_TRUE(QTest::qWaitFor([&] { return page_->cards() && !page_->evaluating() && page_->cards()->find(cylinder); }, patience));
}

TEST_F(CardsDesk, AReadingWhoseCardsAreAllWithdrawnSaysSoAndGivesThemBack)
{
    show();
    const std::string name = reading_name();
    for (int left = judgement().record->engine.cylinders; left > 0; --left) {
        for (int step = 0; step < judgement().record->engine.cylinders && !page_->cards()->find(page_->cylinder()); ++step)
            key(Qt::Key_Right);
        ASSERT_TRUE(page_->withdraw_or_bring_back({"A. Tester", "the indicator was out of order"}));
        ASSERT_TRUE(QTest::qWaitFor([&] { page_->refresh(); return !page_->evaluating() && (left == 1 ? !page_->cards() : page_->cards() && static_cast<int>(page_->cards()->review.cards.size()) == left - 1); }, patience)) << left;
    }
    EXPECT_EQ(reading_name(), name);
    EXPECT_TRUE(widget<QLabel>("empty").text().contains(QStringLiteral("no cards in use"))) << widget<QLabel>("empty").text().toStdString();
    EXPECT_TRUE(widget<QPushButton>("empty_restore_button").isVisible());
    ASSERT_TRUE(page_->withdraw_or_bring_back({"A. Tester", "it was in order"}));
    ASSERT_TRUE(QTest::qWaitFor([&] { page_->refresh(); return page_->cards() && !page_->evaluating(); }, patience));
    EXPECT_EQ(page_->cards()->review.cards.size(), 1U);
}

TEST_F(CardsDesk, AReadingWithoutCardsSaysSoAndLeadsToOneThatHasThem)
{
    Selection selection = workplace_.selection();
    selection = with_reading(selection, judgement(), judgement().record->readings.size() - 1);
    workplace_.select(selection);
    page_ = std::make_unique<CardsPage>(workplace_);
    page_->resize(1190, 690);
    page_->refresh();
    page_->show();
    ASSERT_NE(reading_name(), "2026-10");
    EXPECT_TRUE(widget<QLabel>("empty").isVisible());
    EXPECT_FALSE(widget<QWidget>("body").isVisible());
    key(Qt::Key_PageUp);
    wait();
    EXPECT_EQ(reading_name(), "2026-10");
}

/// The envelope of cycles at any zoom holds every sample of every cycle.
TEST(CycleEnvelope, HoldsTheLowestAndHighestOfAllCyclesOnEveryLevel)
{
    auto card = std::make_shared<indicator::Evaluation>();
    constexpr std::size_t places = 3600, cycles = 20;
    for (std::size_t i = 0; i < places; ++i)
        card->trace.angle.push_back(-180.0 + 0.1 * static_cast<double>(i));
    card->trace.step = 0.1;
    for (std::size_t cycle = 0; cycle < cycles; ++cycle) {
        indicator::Cycle one;
        for (std::size_t i = 0; i < places; ++i)
            one.pressure.push_back(10.0 + std::sin(0.01 * static_cast<double>(i * (cycle + 1))));
        one.pressure[777] = std::nan("");
        card->trace.cycles.push_back(one);
    }
    const CycleEnvelope envelope(card);
    for (const double places_a_pixel : {0.3, 1.0, 3.0, 9.0, 30.0}) {
        int exponent = 0;
        const CycleEnvelope::Level& level = envelope.level_for(places_a_pixel, exponent);
        EXPECT_LE(static_cast<double>(std::size_t{1} << exponent), std::max(1.0, places_a_pixel)) << "at least a step a pixel";
        for (std::size_t i = 0; i < places; ++i)
            for (std::size_t cycle = 0; cycle < cycles; ++cycle) {
                const float value = envelope.pressure(cycle, i);
                if (!std::isnan(value)) {
                    ASSERT_LE(level.low[i >> exponent], value);
                    ASSERT_GE(level.high[i >> exponent], value);
                }
            }
    }
    EXPECT_TRUE(std::isnan(envelope.level_for(0.1, *std::make_unique<int>()).low[777])) << "no cycle has a sample there";
}

} // namespace
} // namespace evenstroke::test
