// SPDX-License-Identifier: GPL-3.0-or-later
// Entering a reading from beginning to end, by keys, on a history in a file.
#include "app/entry/entry_page.h"

#include "app/desk/workplace.h"
#include "app/entry/closed_view.h"
#include "app/entry/ear.h"
#include "app/entry/log_sheet_view.h"
#include "app/entry/note_lines.h"
#include "storage/vessel_store.h"
#include "tests/app/entry_desk.h"

#include <QApplication>
#include <QClipboard>
#include <QFile>
#include <QLabel>
#include <QProcess>
#include <QStandardPaths>
#include <QTemporaryDir>
#include <QTest>
#include <gtest/gtest.h>

using namespace evenstroke;
using evenstroke::test::box;
using evenstroke::test::ship;
using evenstroke::test::usual_exhaust;
using evenstroke::test::usual_peak;

namespace {

class EntryDesk : public evenstroke::test::EntryDesk
{
};

TEST_F(EntryDesk, TakesAWholeReadingByKeysAlone)
{
    open(12);
    page->set_time(QStringLiteral("2021-04-01"), QStringLiteral("9:10"), QStringLiteral("+02:00"));
    page->view().go_to(box("load_percent"));
    for (const char* line : {"75", "9000"}) {
        type(QString::fromLatin1(line));
        press(Qt::Key_Return);
    }
    page->view().go_to(box("maximum_pressure", Place::cylinder(1)));
    for (int row = 0; row < 2; ++row)
        for (int cylinder = 1; cylinder <= 6; ++cylinder) {
            type(row == 0 ? QString::number(usual_peak(cylinder))
                          : QString::number(117.5 + 0.2 * cylinder).replace(u'.', u','));
            press(Qt::Key_Return);
        }
    page->view().go_to(box("exhaust_temperature", Place::cylinder(1)));
    for (int cylinder = 1; cylinder <= 6; ++cylinder) {
        type(QString::number(usual_exhaust(cylinder) + 1));
        press(Qt::Key_Return);
    }
    QApplication::processEvents();
    const auto drafts = listed(storage::ReadingState::draft);
    ASSERT_EQ(drafts.size(), 1u);
    EXPECT_EQ(drafts.front().name, "2021-04");
    EXPECT_EQ(drafts.front().values, 20);
    EXPECT_TRUE(page->draft_text().startsWith(QStringLiteral("draft saved")));
    const EntryOpinions& opinions = page->judge_now();
    EXPECT_TRUE(opinions.notes().empty()) << page->notes().text().toStdString();
    EXPECT_TRUE(opinions.marks().empty());
    page->close_reading();
    page->close_reading(); // boxes are empty: said once
    EXPECT_EQ(page->session().state(), EntrySession::State::closed);
    EXPECT_TRUE(listed(storage::ReadingState::draft).empty());
    EXPECT_EQ(listed(storage::ReadingState::closed).size(), 13u);
}

TEST_F(EntryDesk, KeepsEveryValueAtOnceAndFindsTheDraftAgain)
{
    open(3);
    enter(box("load_percent"), QStringLiteral("74,5"));
    enter(box("exhaust_temperature", Place::cylinder(2)), QStringLiteral("351"));
    QApplication::processEvents();
    page.reset();
    workplace = std::make_unique<Workplace>(); // as after the machine went off
    ASSERT_FALSE(workplace->open(file()).has_value());
    look_at("main engine");
    make_page();
    EXPECT_EQ(page->session().state(), EntrySession::State::writing);
    EXPECT_EQ(shown(box("load_percent")), QStringLiteral("74,5"));
    EXPECT_EQ(shown(box("exhaust_temperature", Place::cylinder(2))), QStringLiteral("351"));
}

TEST_F(EntryDesk, LosesNothingWhenThePageGoesWhileABoxIsBeingTyped)
{
    open(3);
    page->view().go_to(box("load_percent"));
    type(QStringLiteral("68"));
    EXPECT_TRUE(page->view().is_editing());
    page.reset();
    make_page();
    EXPECT_EQ(shown(box("load_percent")), QStringLiteral("68"));
}

TEST_F(EntryDesk, ATextThatCannotBeReadWaitsInItsBoxAndHoldsUpOnlyTheClosing)
{
    open(3);
    page->view().go_to(box("load_percent"));
    type(QStringLiteral("6 8"));
    EXPECT_TRUE(page->may_leave()) << "it waits in its box";
    look_at("auxiliary engine 1");
    page->refresh();
    look_at("main engine");
    page->refresh();
    EXPECT_EQ(shown(box("load_percent")), QStringLiteral("6 8"));
    page.reset();
    make_page();
    EXPECT_EQ(shown(box("load_percent")), QStringLiteral("6 8")) << "the program was closed and opened";
    enter(box("speed"), QStringLiteral("90"));
    page.reset();
    make_page();
    EXPECT_EQ(shown(box("load_percent")), QStringLiteral("6 8")) << "the draft has a place in the history now";
    page->view().go_to(box("load_percent"));
    page->close_reading();
    EXPECT_TRUE(page->notes().text().contains(QStringLiteral("6 8"))) << page->notes().text().toStdString();
    EXPECT_EQ(page->session().state(), EntrySession::State::writing);
    press(Qt::Key_Delete);
    EXPECT_TRUE(page->model().unreadable().empty());
}

TEST_F(EntryDesk, TheEarOffersWhatWasProbablyMeantAndChangesNothingByItself)
{
    open(14);
    page->set_time(QStringLiteral("2021-04-01"), QStringLiteral("9:10"), QStringLiteral("+02:00"));
    enter(box("load_percent"), QStringLiteral("75"));
    for (int cylinder = 1; cylinder <= 6; ++cylinder)
        enter(box("exhaust_temperature", Place::cylinder(cylinder)),
              cylinder == 4 ? QStringLiteral("533") : QString::number(usual_exhaust(cylinder)));
    page->judge_now();
    page->view().go_to(box("exhaust_temperature", Place::cylinder(4)));
    EXPECT_EQ(page->ear().suggestion(), QStringLiteral("353"));
    EXPECT_FALSE(page->ear().sentence().isEmpty());
    EXPECT_EQ(shown(box("exhaust_temperature", Place::cylinder(4))), QStringLiteral("533"));
    press(Qt::Key_F3);
    EXPECT_EQ(shown(box("exhaust_temperature", Place::cylinder(4))), QStringLiteral("353"));
    EXPECT_TRUE(page->ear().suggestion().isEmpty());
    press(Qt::Key_Z, Qt::ControlModifier);
    EXPECT_EQ(shown(box("exhaust_temperature", Place::cylinder(4))), QStringLiteral("533"));
}

TEST_F(EntryDesk, OneKeyConfirmsADoubtAndTheHistoryRemembersIt)
{
    open(14);
    enter(box("load_percent"), QStringLiteral("75"));
    for (int cylinder = 1; cylinder <= 6; ++cylinder)
        enter(box("exhaust_temperature", Place::cylinder(cylinder)),
              cylinder == 4 ? QStringLiteral("533") : QString::number(usual_exhaust(cylinder)));
    page->judge_now();
    const LogBox doubted = box("exhaust_temperature", Place::cylinder(4));
    EXPECT_EQ(page->model().index_of(doubted).data(LogSheetModel::mark_role).toInt(),
              static_cast<int>(BoxMark::asked));
    page->view().go_to(doubted);
    press(Qt::Key_F4);
    EXPECT_EQ(page->model().index_of(doubted).data(LogSheetModel::mark_role).toInt(),
              static_cast<int>(BoxMark::confirmed));
    QApplication::processEvents();
    const Reading draft = stored(listed(storage::ReadingState::draft).front().id);
    EXPECT_TRUE(draft.find(doubted.quantity, doubted.place)->confirmed);
}

TEST_F(EntryDesk, NamesRangesAndRelationsBeforeTheFirstReadingToo)
{
    open(0);
    EXPECT_EQ(page->session().state(), EntrySession::State::writing);
    enter(box("load_percent"), QStringLiteral("75"));
    enter(box("shaft_power"), QStringLiteral("5000"));
    enter(box("exhaust_temperature", Place::cylinder(1)), QStringLiteral("3500"));
    enter(box("exhaust_temperature", Place::cylinder(2)), QStringLiteral("620"));
    page->judge_now();
    EXPECT_TRUE(page->notes().text().contains(QStringLiteral("More than 3 % apart")))
        << page->notes().text().toStdString();
    const auto mark = [&](const LogBox& at) {
        return static_cast<BoxMark>(page->model().index_of(at).data(LogSheetModel::mark_role).toInt());
    };
    EXPECT_EQ(mark(box("load_percent")), BoxMark::asked);
    EXPECT_EQ(mark(box("exhaust_temperature", Place::cylinder(1))), BoxMark::impossible);
    EXPECT_EQ(mark(box("exhaust_temperature", Place::cylinder(2))), BoxMark::asked);
    page->view().go_to(box("exhaust_temperature", Place::cylinder(3)));
    EXPECT_TRUE(page->ear().sentence().contains(QStringLiteral("no earlier reading")))
        << page->ear().sentence().toStdString();
}

TEST_F(EntryDesk, APointInTheWrongPlaceOfTheLoadIsOfferedRightBesideTheQuickLines)
{
    open(14);
    page->set_time(QStringLiteral("2021-04-01"), QStringLiteral("9:10"), QStringLiteral("+02:00"));
    const LogBox load = box("load_percent");
    enter({load.quantity, load.place, Phase::before}, QStringLiteral("75"));
    enter(load, QStringLiteral("7.54"));
    page->judge_now();
    page->view().go_to(load);
    EXPECT_EQ(page->ear().suggestion(), QStringLiteral("75.4")) << page->ear().sentence().toStdString();
    page->take_suggestion();
    EXPECT_EQ(shown(load), QStringLiteral("75.4"));
}

TEST_F(EntryDesk, ANumberThatTwoUnitsExplainIsOfferedInBoth)
{
    open(14);
    page->set_time(QStringLiteral("2021-04-01"), QStringLiteral("9:10"), QStringLiteral("+02:00"));
    enter(box("load_percent"), QStringLiteral("75"));
    const LogBox exhaust = box("exhaust_temperature", Place::cylinder(4));
    enter(exhaust, QStringLiteral("644")); // 644 °F are 340 °C and 644 K are 371 °C; about 353 is expected
    page->judge_now();
    page->view().go_to(exhaust);
    const QStringList offered{page->ear().suggestion(), page->ear().second_suggestion()};
    EXPECT_TRUE(offered.contains(QStringLiteral("644 K"))) << page->ear().sentence().toStdString();
    EXPECT_TRUE(offered.contains(QStringLiteral("644 °F"))) << page->ear().sentence().toStdString();
}

TEST_F(EntryDesk, NoTextBesideTheSheetIsCutWhereTheHeightIsShort)
{
    open(14);
    enter(box("load_percent"), QStringLiteral("75"));
    enter(box("exhaust_temperature", Place::cylinder(3)), QStringLiteral("533"));
    enter(box("exhaust_temperature", Place::cylinder(4)), QStringLiteral("533"));
    page->resize(1190, 617); // of the smallest window, 700 px, less its head and foot
    page->judge_now();
    page->view().go_to(box("exhaust_temperature", Place::cylinder(4)));
    QTest::qWait(50); // nested layouts settle in several rounds
    for (const QLabel* label : page->ear().findChildren<QLabel*>()) {
        if (label->objectName() == QStringLiteral("keys"))
            continue; // the reminder of keys is the first to lose room, and may lose part of it
        const bool wraps = label->isVisible() && label->wordWrap() && label->hasHeightForWidth();
        EXPECT_TRUE(!wraps || label->height() >= label->heightForWidth(label->width()))
            << label->objectName().toStdString() << ": " << label->height() << " px of " << label->heightForWidth(label->width());
    }
}

TEST_F(EntryDesk, WhatTheShipSharesIsEnteredOnce)
{
    open(2);
    page->set_time(QStringLiteral("2021-04-01"), QStringLiteral("9:10"), QStringLiteral("+02:00"));
    enter(box("load_percent"), QStringLiteral("75"));
    enter(box("barometric_pressure", ship), QStringLiteral("1011"));
    page->close_reading();
    page->close_reading(); // boxes are empty: said once
    ASSERT_EQ(page->session().state(), EntrySession::State::closed);
    look_at("auxiliary engine 1");
    page->refresh();
    page->set_time(QStringLiteral("2021-04-01"), QStringLiteral("11:00"), QStringLiteral("+02:00"));
    EXPECT_EQ(shown(box("barometric_pressure", ship)), QStringLiteral("1011"));
    EXPECT_TRUE(page->session().sheet().lent(box("barometric_pressure", ship)));
    EXPECT_TRUE(page->session().sheet().empty());
}

TEST_F(EntryDesk, RefusesABadBlockInWordsAndTakesTheGoodCellsOnlyWhenTold)
{
    open(2);
    QApplication::clipboard()->setText(QStringLiteral("141\t142\nabc\t119\n"));
    page->view().go_to(box("maximum_pressure", Place::cylinder(1)));
    press(Qt::Key_V, Qt::ControlModifier);
    EXPECT_TRUE(page->notes().text().contains(QStringLiteral("Compression pressure of cylinder 1")))
        << page->notes().text().toStdString();
    EXPECT_TRUE(page->session().sheet().empty());
    page->take_paste_that_can_be_read();
    EXPECT_EQ(shown(box("compression_pressure", Place::cylinder(2))), QStringLiteral("119"));
    EXPECT_EQ(page->session().undo().count(), 1);
    QApplication::processEvents();
    EXPECT_EQ(listed(storage::ReadingState::draft).front().values, 3);
    page->session().undo().undo();
    QApplication::processEvents();
    EXPECT_TRUE(stored(listed(storage::ReadingState::draft).front().id).values.empty());
}

TEST_F(EntryDesk, ClosingNeedsALoadAndListsWhatIsMissing)
{
    open(2);
    page->set_time(QStringLiteral("2021-04-01"), QStringLiteral("9:10"), QStringLiteral("+02:00"));
    enter(box("exhaust_temperature", Place::cylinder(1)), QStringLiteral("350"));
    page->close_reading();
    EXPECT_EQ(page->session().state(), EntrySession::State::writing);
    EXPECT_TRUE(page->notes().text().contains(QStringLiteral("no figure of load")));
    enter(box("load_percent"), QStringLiteral("75"));
    page->close_reading();
    page->close_reading(); // boxes are empty: said once
    ASSERT_EQ(page->session().state(), EntrySession::State::closed);
    const QString engine = workplace->selection().engine;
    ASSERT_TRUE(QTest::qWaitFor([&] { return !workplace->judging(engine); }, 20000));
    page->refresh();
    page->judge_now();
    const auto* closed = page->findChild<ClosedView*>();
    ASSERT_NE(closed, nullptr);
    EXPECT_TRUE(closed->text().contains(QStringLiteral("Exhaust temperature of cylinders 2, 3, 4, 5 and 6")))
        << closed->text().toStdString();
    EXPECT_TRUE(closed->text().contains(QStringLiteral("auxiliary engine 1")));
    emit const_cast<ClosedView*>(closed)->board_wanted();
    EXPECT_EQ(workplace->page(), QStringLiteral("board"));
}

TEST_F(EntryDesk, CorrectsAClosedReadingWithNameAndReasonAndKeepsTheOldValue)
{
    open(3);
    const auto last = listed(storage::ReadingState::closed).back();
    page->correct(QString::fromStdString(last.id));
    EXPECT_EQ(page->session().state(), EntrySession::State::correcting);
    const LogBox at = box("exhaust_temperature", Place::cylinder(5));
    const QString old = shown(at);
    page->view().setFocus();
    enter(at, QStringLiteral("361"));
    QApplication::processEvents();
    EXPECT_TRUE(page->notes().text().contains(QStringLiteral("name and a reason")))
        << page->notes().text().toStdString();
    EXPECT_EQ(stored(last.id).find(at.quantity, at.place)->typed, old.toStdString());
    page->session().set_signature(QStringLiteral("A. Chief"), QStringLiteral("misread by ten"));
    EXPECT_TRUE(page->session().flush());
    EXPECT_EQ(stored(last.id).find(at.quantity, at.place)->typed, "361");
    const auto corrections = storage::ReadingStore(*workplace->history()).corrections(last.id).value();
    ASSERT_EQ(corrections.size(), 1u);
    EXPECT_EQ(corrections.front().old_value.typed, old.toStdString());
    EXPECT_EQ(corrections.front().by.why, "misread by ten");
}

TEST_F(EntryDesk, RemembersTheUnitOfARowAndTheWayOfEnter)
{
    open(2);
    page->session().set_row_unit(box("scavenge_pressure").quantity, find_unit("kgf/cm2").value());
    page->set_walk_order(WalkOrder::along_quantities);
    page.reset();
    make_page();
    EXPECT_EQ(unit(page->session().sheet().row_unit(box("scavenge_pressure").quantity).id).symbol, "kgf/cm²");
    EXPECT_EQ(page->view().walk_order(), WalkOrder::along_quantities);
}

TEST_F(EntryDesk, SaysWhenTheTimeCannotBeReadOrIsStillToCome)
{
    open(2);
    page->set_time(QStringLiteral("14 of March"), QStringLiteral("9:10"), QStringLiteral("+02:00"));
    EXPECT_TRUE(page->notes().text().contains(QStringLiteral("14 of March")));
    page->set_time(QStringLiteral("2999-03-14"), QStringLiteral("9:10"), QStringLiteral("+02:00"));
    page->judge_now();
    EXPECT_TRUE(page->notes().text().contains(QStringLiteral("still to come")))
        << page->notes().text().toStdString();
}

TEST_F(EntryDesk, JudgesSteadinessFromTheQuickLines)
{
    open(2);
    const QuantityId speed = *find_quantity("speed");
    enter({speed, Place::engine(), Phase::before}, QStringLiteral("95"));
    enter({speed, Place::engine(), Phase::after}, QStringLiteral("97,5"));
    EXPECT_EQ(page->judge_now().steadiness().verdict, Steadiness::unsteady);
}

TEST_F(EntryDesk, PrintsABlankSheetWhoseTextCanBeSearched)
{
    open(3);
    const QString path = folder.filePath(QStringLiteral("blank.pdf"));
    ASSERT_TRUE(page->save_blank_sheet(path));
    QFile pdf(path);
    ASSERT_TRUE(pdf.open(QIODevice::ReadOnly));
    const QByteArray bytes = pdf.readAll();
    EXPECT_TRUE(bytes.startsWith("%PDF-"));
    EXPECT_GT(bytes.size(), 5000);
    EXPECT_TRUE(bytes.contains("/ToUnicode")) << "embedded faces carry their characters";
    const QString tool = QStandardPaths::findExecutable(QStringLiteral("pdftotext"));
    if (tool.isEmpty())
        GTEST_SKIP() << "pdftotext is not installed: the words themselves were not looked for";
    QProcess process;
    process.start(tool, {QStringLiteral("-layout"), path, QStringLiteral("-")});
    ASSERT_TRUE(process.waitForFinished());
    const QString text = QString::fromUtf8(process.readAllStandardOutput());
    for (const char* words : {"Log sheet: main engine of Quiet Barley", "Before you go", "open cock",
                              "Exhaust temperature", "1 Mar 2021"})
        EXPECT_TRUE(text.contains(QString::fromLatin1(words))) << words;
}

TEST(EntryDeskWithout, AHistorySaysWhatBelongsHere)
{
    Workplace workplace;
    EntryPage page(workplace);
    page.refresh();
    bool said = false;
    for (const QLabel* label : page.findChildren<QLabel*>())
        said = said || label->text().contains(QStringLiteral("Open or begin a history"));
    EXPECT_TRUE(said);
    EXPECT_TRUE(page.may_leave());
}

} // namespace
