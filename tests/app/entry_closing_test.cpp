// SPDX-License-Identifier: GPL-3.0-or-later
// What stands in the way of closing, and what can be put right afterwards.
#include "app/entry/closed_view.h"
#include "tests/app/entry_desk.h"

#include <QLineEdit>

using namespace evenstroke;
using evenstroke::test::box;
using evenstroke::test::usual_exhaust;

namespace {

class EntryClosing : public evenstroke::test::EntryDesk
{
protected:
    void type_load_and_exhausts(const QString& of_cylinder_4)
    {
        page->set_time(QStringLiteral("2021-04-01"), QStringLiteral("9:10"), QStringLiteral("+02:00"));
        enter(box("load_percent"), QStringLiteral("75"));
        for (int cylinder = 1; cylinder <= 6; ++cylinder)
            enter(box("exhaust_temperature", Place::cylinder(cylinder)),
                  cylinder == 4 ? of_cylinder_4 : QString::number(usual_exhaust(cylinder)));
    }
    QString foot() const { return page->notes().text(); }
    EntrySession::State state() const { return page->session().state(); }
    QString closed_words()
    {
        const QString engine = workplace->selection().engine;
        EXPECT_TRUE(QTest::qWaitFor([&] { return !workplace->judging(engine); }, 20000));
        page->judge_now();
        return page->findChild<ClosedView*>()->text();
    }
};

TEST_F(EntryClosing, StopsOnceForADoubtAndKeepsItAsConfirmed)
{
    open(14);
    type_load_and_exhausts(QStringLiteral("533"));
    page->close_reading();
    EXPECT_EQ(state(), EntrySession::State::writing);
    EXPECT_TRUE(foot().contains(QStringLiteral("Before closing"))) << foot().toStdString();
    EXPECT_TRUE(const_cast<NoteLines&>(page->notes()).act(QStringLiteral("Go there")));
    EXPECT_EQ(page->view().current_box(), box("exhaust_temperature", Place::cylinder(4)));
    EXPECT_TRUE(const_cast<NoteLines&>(page->notes()).act(QStringLiteral("Close all the same")));
    ASSERT_EQ(state(), EntrySession::State::closed);
    const Reading closed = stored(listed(storage::ReadingState::closed).back().id);
    EXPECT_TRUE(closed.find(box("exhaust_temperature", Place::cylinder(4)).quantity, Place::cylinder(4))->confirmed);
    const QString words = closed_words();
    EXPECT_TRUE(words.contains(QStringLiteral("in doubt when it was closed"))) << words.toStdString();
    EXPECT_FALSE(words.contains(QStringLiteral("Nothing new began"))) << words.toStdString();
    EXPECT_FALSE(words.contains(QStringLiteral("what the ship shares is already entered")));
}

TEST_F(EntryClosing, StopsOnceForAllThatIsEmptyBesideWhatIsInDoubt)
{
    open(14);
    type_load_and_exhausts(QStringLiteral("533"));
    page->close_reading();
    ASSERT_EQ(state(), EntrySession::State::writing);
    EXPECT_TRUE(foot().contains(QStringLiteral("matter in doubt"))) << foot().toStdString();
    EXPECT_TRUE(foot().contains(QStringLiteral("required boxes empty"))) << foot().toStdString();
    EXPECT_TRUE(foot().contains(QStringLiteral("the quick lines not filled in"))) << foot().toStdString();
    EXPECT_TRUE(foot().contains(QStringLiteral("Running hours"))) << foot().toStdString();
    EXPECT_TRUE(foot().contains(QStringLiteral("Maximum pressure of all cylinders"))) << foot().toStdString();
    page->close_reading();
    EXPECT_EQ(state(), EntrySession::State::closed);
}

TEST_F(EntryClosing, EmptyBoxesAloneStopClosingAndTheWayLeadsToTheFirst)
{
    open(2);
    page->set_time(QStringLiteral("2021-04-01"), QStringLiteral("9:10"), QStringLiteral("+02:00"));
    enter(box("load_percent"), QStringLiteral("75"));
    page->close_reading();
    ASSERT_EQ(state(), EntrySession::State::writing);
    EXPECT_FALSE(foot().contains(QStringLiteral("in doubt"))) << foot().toStdString();
    EXPECT_TRUE(const_cast<NoteLines&>(page->notes()).act(QStringLiteral("Go there")));
    ASSERT_TRUE(page->view().current_box().has_value());
    EXPECT_NE(page->view().current_box()->phase, Phase::reading) << "the quick lines come first";
    enter(box("engine_running_hours"), QStringLiteral("21000"));
    page->close_reading();
    EXPECT_EQ(state(), EntrySession::State::writing) << "what was typed since is looked at again";
    EXPECT_FALSE(foot().contains(QStringLiteral("Running hours"))) << foot().toStdString();
    page->close_reading();
    EXPECT_EQ(state(), EntrySession::State::closed);
}

TEST_F(EntryClosing, StopsForATimeToComeAndForRunningHoursThatFell)
{
    open(3);
    type_load_and_exhausts(QStringLiteral("350"));
    page->set_time(QStringLiteral("2999-03-14"), QStringLiteral("9:10"), QStringLiteral("+02:00"));
    page->close_reading();
    EXPECT_EQ(state(), EntrySession::State::writing);
    EXPECT_TRUE(foot().contains(QStringLiteral("still to come"))) << foot().toStdString();
    EXPECT_TRUE(const_cast<NoteLines&>(page->notes()).act(QStringLiteral("Go there")));
    EXPECT_EQ(QApplication::focusWidget()->objectName(), QStringLiteral("date_field"));
    page->set_time(QStringLiteral("2021-04-01"), QStringLiteral("9:10"), QStringLiteral("+02:00"));
    page->view().setFocus();
    enter(box("engine_running_hours"), QStringLiteral("100"));
    page->close_reading();
    EXPECT_EQ(state(), EntrySession::State::writing);
    EXPECT_TRUE(foot().contains(QStringLiteral("Running hours went down"))) << foot().toStdString();
}

TEST_F(EntryClosing, ADateThatCannotBeReadIsPutRightFirst)
{
    open(2);
    enter(box("load_percent"), QStringLiteral("75"));
    page->set_time(QStringLiteral("14 of March"), QStringLiteral("9:10"), QStringLiteral("+02:00"));
    page->close_reading();
    page->close_reading();
    EXPECT_EQ(state(), EntrySession::State::writing);
}

TEST_F(EntryClosing, TheTimeOfAClosedReadingIsCorrectedWithNameAndReason)
{
    open(3);
    const auto last = listed(storage::ReadingState::closed).back();
    page->correct(QString::fromStdString(last.id));
    EXPECT_EQ(QApplication::focusWidget()->objectName(), QStringLiteral("who_field"));
    page->set_time(QStringLiteral("2021-01-15"), QStringLiteral("9:10"), QStringLiteral("+02:00"));
    QApplication::processEvents();
    EXPECT_TRUE(foot().contains(QStringLiteral("name and a reason"))) << foot().toStdString();
    EXPECT_EQ(stored(last.id).taken_at.utc, last.taken_at.utc);
    page->session().set_signature(QStringLiteral("A. Chief"), QStringLiteral("wrong month"));
    EXPECT_TRUE(page->session().flush());
    const auto closed = listed(storage::ReadingState::closed);
    ASSERT_EQ(closed.size(), 3u);
    EXPECT_EQ(closed[1].id, last.id) << "January's reading stands between January's first and February's";
    EXPECT_EQ(utc_text(closed[1].taken_at.utc), "2021-01-15T07:10Z");
}

TEST_F(EntryClosing, AClosedReadingIsWithdrawnOnlyWithAReason)
{
    open(3);
    const auto last = listed(storage::ReadingState::closed).back();
    page->correct(QString::fromStdString(last.id));
    EXPECT_TRUE(page->session().withdraw().has_value());
    EXPECT_EQ(listed(storage::ReadingState::withdrawn).size(), 0u);
    page->session().set_signature(QStringLiteral("A. Chief"), QStringLiteral("taken on another engine"));
    EXPECT_FALSE(page->session().withdraw().has_value());
    EXPECT_EQ(listed(storage::ReadingState::withdrawn).size(), 1u);
    EXPECT_EQ(state(), EntrySession::State::writing);
    const auto offered = page->session().withdrawn_readings(5);
    ASSERT_EQ(offered.size(), 1u);
    const QString id = QString::fromStdString(offered.front().id);
    EXPECT_TRUE(page->session().bring_back(id, {"A. Chief", ""}).has_value()) << "no reason given";
    EXPECT_FALSE(page->session().bring_back(id, {"A. Chief", "it was this engine after all"}).has_value());
    EXPECT_EQ(listed(storage::ReadingState::withdrawn).size(), 0u);
    EXPECT_EQ(listed(storage::ReadingState::closed).size(), 3u);
}

TEST_F(EntryClosing, ARowBeginsInTheUnitOfTheLastReading)
{
    open(2);
    const LogBox pressure = box("scavenge_pressure");
    page->set_time(QStringLiteral("2021-04-01"), QStringLiteral("9:10"), QStringLiteral("+02:00"));
    enter(box("load_percent"), QStringLiteral("75"));
    enter(pressure, QStringLiteral("2.04 kgf/cm2"));
    page->close_reading();
    page->close_reading();
    ASSERT_EQ(state(), EntrySession::State::closed);
    page.reset();
    make_page();
    EXPECT_EQ(unit(page->session().sheet().row_unit(pressure.quantity).id).symbol, "kgf/cm²");
    page->session().set_row_unit(pressure.quantity, find_unit("bar").value());
    page.reset();
    make_page();
    EXPECT_EQ(unit(page->session().sheet().row_unit(pressure.quantity).id).symbol, "bar") << "chosen since";
}

} // namespace
