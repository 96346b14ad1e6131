// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/cards/card_files_page.h"
#include "app/cards/layout_boxes.h"
#include "app/cards/paper_card.h"
#include "app/cards/trace_columns.h"
#include "app/desk/reading_in_hand.h"
#include "core/trend/judgement.h"
#include "storage/card_store.h"
#include "storage/reading_store.h"
#include "tests/app/page_desk.h"
#include "tests/app/pictures.h"

#include <QComboBox>
#include <QFile>
#include <QLabel>
#include <QPushButton>

#include <algorithm>
#include <cmath>
#include <functional>
#include <string_view>

namespace evenstroke {
namespace {

/// A page on the invented ship, with files of an instrument beside it.
class CardFilesDesk : public test::PageDesk
{
protected:
    void SetUp() override
    {
        open(6);
        page_ = make_page<CardFilesPage>();
    }
    /// A diagram of a kind: compression and expansion, turned by a smooth combustion.
    static double pressure(double angle)
    {
        const double closed =
            3.2 * std::pow(16.0 / (1.0 + 7.5 * (1.0 - std::cos(angle * M_PI / 180.0))), 1.35);
        return std::max(3.2, angle > 0.0 ? closed * (1.0 + 0.45 * (1.0 - std::exp(-angle * angle / 300.0)))
                                         : closed);
    }
    QString write(const QString& name, double scale = 1.0)
    {
        QByteArray text = "crank angle;cyl pressure [MPa]\n";
        for (double angle = -180.0; angle < 180.0; angle += 0.5)
            text += QByteArray::number(angle, 'f', 1).replace('.', ',') + ";" +
                    QByteArray::number(scale * pressure(angle) / 10.0, 'f', 4).replace('.', ',') + "\n";
        return write_text(name, text);
    }
    QString write_text(const QString& name, const QByteArray& text)
    {
        QFile file(folder_.filePath(name));
        EXPECT_TRUE(file.open(QIODevice::WriteOnly));
        file.write(text);
        return file.fileName();
    }
    void wait()
    {
        EXPECT_TRUE(QTest::qWaitFor([this] { return !page_->busy(); }, 20000));
        QApplication::processEvents(); // plots and wrapped words settle
    }
    /// Bar, each row's first column as the caller counts it.
    QString write_bar(const QString& name, const QByteArray& titles, const std::function<double(int)>& first,
                      double turned = 0.0)
    {
        QByteArray text = titles + "\n";
        for (int i = 0; i < 720; ++i)
            text += QByteArray::number(first(i), 'g', 10) + "," +
                    QByteArray::number(pressure(std::remainder(0.5 * i - 180.0 - turned, 360.0)), 'f', 3) +
                    "\n";
        return write_text(name, text);
    }
    void choose_unit(const char* symbol)
    {
        storage::TraceLayout layout = page_->layout_in_hand();
        layout.unit = find_unit(symbol).value().id;
        page_->set_layout_in_hand(layout);
        wait();
    }
    void choose_megapascal() { choose_unit("MPa"); }
    QString words(const char* label) { return page_->findChild<QLabel*>(QString::fromLatin1(label))->text(); }
    QPushButton& button(const char* name)
    {
        return *page_->findChild<QPushButton*>(QString::fromLatin1(name));
    }
    std::vector<storage::CardEntry> cards()
    {
        return storage::CardStore(*workplace_->history()).list(engine().toStdString()).value();
    }

    std::unique_ptr<CardFilesPage> page_;
    const storage::Signature second_{"B. Second", "monthly cards"};
};

TEST_F(CardFilesDesk, SaysHowToBeginAndWarnsOfTheCocks)
{
    EXPECT_TRUE(words("hint").contains(QStringLiteral("drop them here")));
    EXPECT_TRUE(words("hint").contains(QStringLiteral("cock")));
    EXPECT_FALSE(button("take_button").isVisible());
    keep_picture(*page_, QStringLiteral("card_files_empty"));
}

TEST_F(CardFilesDesk, ProposesALayoutAndWaitsForTheUnit)
{
    page_->add_files({write(QStringLiteral("cyl1.csv"))});
    wait();
    EXPECT_TRUE(page_->traces().empty());
    EXPECT_TRUE(words("problem").contains(QStringLiteral("unit")));
    EXPECT_TRUE(words("unit_words").contains(QStringLiteral("MPa")));
    EXPECT_FALSE(button("take_button").isEnabled());
    keep_picture(*page_, QStringLiteral("card_files_unit"));
    button("unit_button").click();
    wait();
    ASSERT_EQ(page_->traces().size(), 1U);
    EXPECT_EQ(page_->traces().front().cylinder, 1);
    EXPECT_EQ(page_->traces().front().trace->crank_angle_deg.size(), 720U);
    EXPECT_NEAR(page_->traces().front().trace->pressure_bar.at(100), pressure(-130.0), 1e-3)
        << "four decimals of a megapascal";
    EXPECT_TRUE(words("problem").isEmpty());
    EXPECT_TRUE(button("take_button").isEnabled()) << words("into").toStdString();
    EXPECT_TRUE(words("sentences").contains(QStringLiteral("MIP"))) << words("sentences").toStdString();
    keep_picture(*page_, QStringLiteral("card_files_preview"));
}

TEST_F(CardFilesDesk, SaysWhereTheHeaderCountsFromTheOpenAirAndTheChoiceDoesNot)
{
    page_->add_files({write_bar(QStringLiteral("cyl1.csv"), "crank angle,pressure [bar gauge]",
                                [](int i) { return 0.5 * i - 180.0; })});
    wait();
    choose_unit("bar"); // the unit alone: counted from vacuum as nothing else was said
    EXPECT_FALSE(page_->layout_in_hand().gauge);
    EXPECT_TRUE(words("unit_words").contains(QStringLiteral("gauge"))) << words("unit_words").toStdString();
    EXPECT_FALSE(button("unit_button").isHidden());
    button("unit_button").click();
    wait();
    EXPECT_TRUE(page_->layout_in_hand().gauge);
    EXPECT_TRUE(button("unit_button").isHidden());
}

TEST_F(CardFilesDesk, TakesAllCardsInOneStepAndRemembersTheLayout)
{
    page_->add_files({write(QStringLiteral("cyl1.csv")), write(QStringLiteral("cyl2.csv"), 1.01)});
    choose_megapascal();
    ASSERT_TRUE(page_->take_in(second_)) << page_->outcome().toStdString();
    EXPECT_EQ(cards().size(), 2U);
    EXPECT_TRUE(page_->outcome().contains(QStringLiteral("2 cards"))) << page_->outcome().toStdString();
    EXPECT_TRUE(page_->traces().empty());
    page_->add_files({write(QStringLiteral("cyl1.csv"))});
    wait();
    ASSERT_EQ(page_->traces().size(), 1U) << "the unit is known from the last time";
    EXPECT_TRUE(words("lines_title").contains(QStringLiteral("the last time")));
    ASSERT_TRUE(page_->take_in(second_));
    EXPECT_EQ(cards().size(), 2U) << "it was there already";
}

TEST_F(CardFilesDesk, StoresNothingWhereOneCardContradicts)
{
    page_->add_files({write(QStringLiteral("cyl2.csv"))});
    choose_megapascal();
    ASSERT_TRUE(page_->take_in(second_));
    page_->add_files({write(QStringLiteral("cyl1.csv")), write(QStringLiteral("cyl2.csv"), 1.05)});
    wait();
    EXPECT_FALSE(page_->take_in(second_));
    EXPECT_TRUE(page_->outcome().contains(QStringLiteral("another card of cylinder 2")))
        << page_->outcome().toStdString();
    EXPECT_EQ(cards().size(), 1U);
}

TEST_F(CardFilesDesk, LeavesOutWhatIsNoCardAndSaysSo)
{
    page_->add_files({write(QStringLiteral("cyl1.csv")),
                      write_text(QStringLiteral("letter.txt"), "Dear Sir\nno card\n"),
                      write(QStringLiteral("from the port.csv"))});
    choose_megapascal();
    ASSERT_EQ(page_->traces().size(), 3U);
    EXPECT_TRUE(page_->traces()[1].problem.has_value());
    EXPECT_TRUE(words("into").contains(QStringLiteral("2 cards are left out")))
        << words("into").toStdString();
    page_->set_cylinder(2, 1);
    EXPECT_FALSE(button("take_button").isEnabled()) << "two of cylinder 1";
    page_->set_cylinder(2, 3);
    EXPECT_TRUE(button("take_button").isEnabled());
    keep_picture(*page_, QStringLiteral("card_files_refused"));
    ASSERT_TRUE(page_->take_in(second_));
    EXPECT_EQ(cards().size(), 2U);
}

TEST_F(CardFilesDesk, ProposesAnIndexAsWhatItIsAndTheSpeedOfTheReading)
{
    page_->add_files({write_bar(QStringLiteral("cyl1.csv"), "n,p", [](int i) { return i; })});
    EXPECT_EQ(page_->layout_in_hand().angle_from, storage::AngleFrom::sample_number);
    EXPECT_EQ(page_->layout_in_hand().counts_per_revolution, 720.0);
    auto* const first = qobject_cast<QComboBox*>(page_->findChild<TraceColumns*>()->cellWidget(0, 0));
    ASSERT_NE(first, nullptr);
    EXPECT_EQ(first->currentText(), QStringLiteral("sample index"));
    EXPECT_EQ(page_->layout_in_hand().speed, 95.0) << "as the readings of the invented ship have it";
    page_->findChild<TraceColumns*>()->choose(1, TraceColumns::unused);
    EXPECT_EQ(page_->layout_in_hand().angle_column, 0);
    page_->findChild<TraceColumns*>()->choose(1, TraceColumns::sample_index);
    EXPECT_EQ(page_->layout_in_hand().angle_column, 1);
}

TEST_F(CardFilesDesk, TakesADoubtfulCardOnlyByASecondStep)
{
    page_->add_files(
        {write_bar(
             QStringLiteral("cyl1.csv"), "angle,p", [](int i) { return 0.5 * i - 180.0; }, 120.0),
         write_bar(QStringLiteral("cyl2.csv"), "angle,p", [](int i) { return 0.5 * i - 180.0; })});
    choose_unit("bar");
    ASSERT_EQ(page_->traces().size(), 2U);
    ASSERT_TRUE(page_->traces().front().trace != nullptr);
    EXPECT_TRUE(words("into").contains(QStringLiteral("dead centre is not determined")))
        << words("into").toStdString();
    EXPECT_TRUE(button("doubtful_button").isVisible());
    EXPECT_TRUE(button("take_button").text().contains(QStringLiteral("1 card"))) << "that of cylinder 2";
    keep_picture(*page_, QStringLiteral("card_files_doubtful"));
    button("doubtful_button").click();
    EXPECT_FALSE(button("doubtful_button").isVisible());
    EXPECT_TRUE(button("take_button").text().contains(QStringLiteral("2 cards")));
    page_->set_cylinder(0, 3);
    EXPECT_TRUE(button("doubtful_button").isVisible()) << "another choice: said anew";
    ASSERT_TRUE(page_->take_in(second_)) << page_->outcome().toStdString();
    ASSERT_EQ(cards().size(), 1U);
    EXPECT_EQ(cards().front().cylinder, 2);
}

TEST_F(CardFilesDesk, AsksWhereTheSameSamplesStandInAnotherReading)
{
    page_->add_files({write(QStringLiteral("cyl1.csv"))});
    choose_megapascal();
    ASSERT_TRUE(page_->take_in(second_)) << page_->outcome().toStdString();
    page_->forget_files();
    workplace_->select(with_reading_step(workplace_->selection(), *workplace_->judgement(), -1));
    page_->refresh();
    page_->add_files({write(QStringLiteral("cyl1.csv"))});
    wait();
    EXPECT_TRUE(words("into").contains(QStringLiteral("the same samples stand already as the card of cylinder 1 in the reading of")))
        << words("into").toStdString();
    EXPECT_TRUE(button("doubtful_button").isVisible());
    workplace_->select(with_reading_step(workplace_->selection(), *workplace_->judgement(), 1));
    page_->refresh();
    wait();
    EXPECT_FALSE(button("doubtful_button").isVisible()) << "that is the card itself";
}

TEST_F(CardFilesDesk, SaysThatAKeptLayoutDoesNotFitAndLooksAnew)
{
    page_->add_files({write(QStringLiteral("cyl1.csv"))});
    choose_megapascal();
    ASSERT_TRUE(page_->take_in(second_)) << page_->outcome().toStdString();
    QByteArray text = "crank angle,cyl 1,cyl 2\n";
    for (int i = 0; i < 720; ++i)
        text += QByteArray::number(0.5 * i - 180.0) + "," +
                QByteArray::number(pressure(0.5 * i - 180.0), 'f', 3) + "," +
                QByteArray::number(pressure(0.5 * i - 180.0), 'f', 3) + "\n";
    page_->add_files({write_text(QStringLiteral("all.csv"), text)});
    wait();
    EXPECT_TRUE(words("problem").contains(QStringLiteral("does not fit this file")))
        << words("problem").toStdString();
    EXPECT_TRUE(words("problem").contains(QStringLiteral("Ctrl+L")));
    button("guess_button").click();
    wait();
    EXPECT_FALSE(page_->layout_in_hand().unit.has_value()) << "the unit is asked for afresh";
    ASSERT_EQ(page_->layout_in_hand().pressures.size(), 2U);
    EXPECT_EQ(page_->layout_in_hand().pressures.front().cylinder, 1);
    EXPECT_EQ(page_->layout_in_hand().pressures.back().cylinder, 2);
    EXPECT_TRUE(words("problem").contains(QStringLiteral("unit"))) << words("problem").toStdString();
}

TEST_F(CardFilesDesk, SaysWhatIsThereAlreadyBeforeItAsksForANameAndCountsAll)
{
    page_->add_files({write(QStringLiteral("cyl1.csv")), write(QStringLiteral("cyl2.csv"))});
    choose_megapascal();
    ASSERT_TRUE(page_->take_in(second_));
    page_->add_files({write(QStringLiteral("cyl1.csv"))});
    wait();
    button("take_button").click(); // a window that asks would wait here for good
    EXPECT_TRUE(page_->outcome().contains(QStringLiteral("there already"))) << page_->outcome().toStdString();
    EXPECT_TRUE(page_->outcome().contains(QStringLiteral("2 cards in all")))
        << page_->outcome().toStdString();
    page_->forget_files();
    page_->add_files({write(QStringLiteral("cyl1.csv"), 1.02)});
    wait();
    button("take_button").click();
    EXPECT_TRUE(page_->outcome().contains(QStringLiteral("another card of cylinder 1")))
        << page_->outcome().toStdString();
    page_->set_cylinder(0, 3);
    EXPECT_TRUE(page_->outcome().isEmpty()) << "it was said of cylinder 1";
    page_->set_cylinder(0, 1);
    button("take_button").click();
    EXPECT_FALSE(page_->outcome().isEmpty());
    workplace_->select(with_reading_step(workplace_->selection(), *workplace_->judgement(), -1));
    page_->refresh();
    EXPECT_TRUE(page_->outcome().isEmpty()) << "it was said of another reading";
}

TEST_F(CardFilesDesk, SaysThatTheCardIsTakenByItself)
{
    page_->add_files({write(QStringLiteral("cyl1.csv"))});
    choose_megapascal();
    EXPECT_TRUE(words("sentences").contains(QStringLiteral("taken by itself")))
        << words("sentences").toStdString();
}

TEST_F(CardFilesDesk, AddsABarometerOnlyToGaugePressures)
{
    CardFilesTask task{{{write(QStringLiteral("cyl1.csv")), std::nullopt}}, {}, {}, {}};
    page_->add_files({task.files.front().path});
    choose_megapascal();
    task.layout = page_->layout_in_hand();
    task.engine = workplace_->judgement()->record->engine;
    task.reading = workplace_->judgement()->record->readings.back();
    std::erase_if(task.reading.values, [](const Value& value) {
        return quantity(value.quantity).name == std::string_view("barometric_pressure");
    });
    for (const bool gauge : {false, true}) {
        task.layout.gauge = gauge;
        CardFilesRun run;
        std::vector<FileTrace> found;
        QObject::connect(&run, &CardFilesRun::finished,
                         [&found](const std::vector<FileTrace>& traces) { found = traces; });
        run.start(task);
        ASSERT_TRUE(QTest::qWaitFor([&] { return !found.empty(); }, 20000));
        ASSERT_TRUE(found.front().card != nullptr);
        const auto& remarks = found.front().card->remarks;
        EXPECT_EQ(
            std::any_of(remarks.begin(), remarks.end(),
                        [](const indicator::Remark& remark) { return remark.code == "barometer_assumed"; }),
            gauge);
    }
}

TEST_F(CardFilesDesk, AsksBeforeAPaperCardFarFromTheUsualGoesIn)
{
    auto& paper = *page_->findChild<PaperCard*>();
    button("paper_button").click();
    paper.set_usual([](int) { return indicator::UsualMeanIndicated{16.0, true}; });
    int put = 0;
    paper.disconnect(&paper, &PaperCard::put_into_reading, nullptr, nullptr);
    QObject::connect(&paper, &PaperCard::put_into_reading, [&put](int, double) { ++put; });
    PaperCardText text;
    text.area = QStringLiteral("850");
    text.length = QStringLiteral("70");
    text.spring = QStringLiteral("6"); // 0.6 was meant
    paper.set_text(text);
    EXPECT_TRUE(paper.answer().contains(QStringLiteral("16.0 bar at this load")))
        << paper.answer().toStdString();
    QPushButton& put_button = *paper.findChild<QPushButton*>();
    put_button.click();
    EXPECT_EQ(put, 0) << "asked first";
    EXPECT_TRUE(put_button.text().contains(QStringLiteral("it is right")));
    put_button.click();
    EXPECT_EQ(put, 1);
    text.spring = QStringLiteral("0.6");
    paper.set_text(text);
    EXPECT_FALSE(paper.answer().contains(QStringLiteral("at this load")));
    put_button.click();
    EXPECT_EQ(put, 2) << "nothing to ask";
}

TEST_F(CardFilesDesk, WorksOutAPaperCardAndPutsItIntoTheReading)
{
    auto& paper = *page_->findChild<PaperCard*>();
    PaperCardText text;
    text.area = QStringLiteral("850");
    text.length = QStringLiteral("70");
    text.spring = QStringLiteral("0.6");
    const auto worked = work_out(text);
    ASSERT_TRUE(worked);
    EXPECT_NEAR(worked.value().bar, 20.2381, 1e-4) << "850 mm² over 70 mm by 0.6 mm a bar";
    button("paper_button").click();
    paper.set_text(text);
    EXPECT_TRUE(paper.answer().contains(QStringLiteral("20.24 bar"))) << paper.answer().toStdString();
    keep_picture(*page_, QStringLiteral("card_files_paper"));
    ASSERT_TRUE(page_->put_paper_card(3, worked.value().bar, second_)) << page_->outcome().toStdString();
    const auto readings = storage::ReadingStore(*workplace_->history()).load(engine().toStdString()).value();
    const Value* const value = readings.back().find(
        find_quantity("mean_indicated_pressure", Place::Kind::cylinder).value(), Place::cylinder(3));
    ASSERT_NE(value, nullptr);
    EXPECT_EQ(value->origin, Origin::card);
    EXPECT_EQ(value->typed, "20.238");
}

TEST(PaperCardSum, TakesInchesPoundsAndHeights)
{
    // 2.6 in² over 3.6 in with a 60 lb spring: 43.3 lb/in² (published in the public-domain book Steam
    // Engines)
    PaperCardText text;
    text.area = QStringLiteral("2.6");
    text.length = QStringLiteral("3.6");
    text.spring = QStringLiteral("60");
    text.inches = true;
    text.spring_in = 2;
    ASSERT_TRUE(work_out(text));
    EXPECT_NEAR(work_out(text).value().bar / 0.0689475729, 43.333, 1e-3);
    PaperCardText heights;
    heights.heights = QStringLiteral("10 12 14 16 18 18 16 14 12 10");
    heights.spring = QStringLiteral("2");
    heights.spring_in = 1;
    ASSERT_TRUE(work_out(heights));
    EXPECT_NEAR(work_out(heights).value().bar, 28.0, 1e-9) << "mean of 14 mm by 2 bar a mm";
    heights.heights = QStringLiteral("10 x");
    EXPECT_FALSE(work_out(heights));
    text.spring = QStringLiteral("0");
    EXPECT_FALSE(work_out(text));
}

} // namespace
} // namespace evenstroke
