// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/cards/card_files_page.h"
#include "app/cards/layout_boxes.h"
#include "app/cards/paper_card.h"
#include "app/cards/trace_columns.h"
#include "storage/card_store.h"
#include "storage/reading_store.h"
#include "tests/app/page_desk.h"
#include "tests/app/pictures.h"

#include <QComboBox>
#include <QFile>
#include <QLabel>
#include <QPushButton>

#include <cmath>

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
    void choose_megapascal()
    {
        storage::TraceLayout layout = page_->layout_in_hand();
        layout.unit = find_unit("MPa").value().id;
        page_->set_layout_in_hand(layout);
        wait();
    }
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
