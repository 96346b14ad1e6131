// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/events/events_page.h"

#include "app/events/key_box.h"
#include "storage/audit.h"
#include "storage/event_store.h"
#include "tests/app/page_desk.h"

#include <QAbstractItemModelTester>
#include <QLabel>
#include <QLineEdit>
#include <QPushButton>
#include <QTableView>

namespace evenstroke {
namespace {

TimePoint day(const char* text) { return parse_date(text).value().utc; }

class EventsDesk : public test::PageDesk
{
protected:
    void SetUp() override
    {
        open(6);
        page_ = make_page<EventsPage>();
        page_->set_today(day("2031-03-14"));
        box_ = page_->findChild<KeyBox*>();
        box_->setFocus();
    }
    std::vector<Event> stored()
    {
        auto loaded = storage::EventStore(*workplace_->history()).load(engine().toStdString());
        return loaded.has_value() ? loaded.value() : std::vector<Event>{};
    }
    QString words(const char* label) { return page_->findChild<QLabel*>(QString::fromLatin1(label))->text(); }
    QTableView& diary() { return *page_->findChild<QTableView*>(); }

    std::unique_ptr<EventsPage> page_;
    KeyBox* box_ = nullptr;
};

TEST_F(EventsDesk, ThreeKeysEnterAnEvent)
{
    QTest::keyClick(box_, Qt::Key_F);
    QTest::keyClick(box_, Qt::Key_4);
    QTest::keyClick(box_, Qt::Key_Return);
    const auto events = stored();
    ASSERT_EQ(events.size(), 1u);
    EXPECT_EQ(events[0].kind, "fuel_valves");
    EXPECT_EQ(events[0].place, Place::cylinder(4));
    EXPECT_EQ(date_text(events[0].date.utc), "2031-03-14");
    EXPECT_EQ(page_->model().rowCount(), 1);
}

TEST_F(EventsDesk, SaysWhatTheEventDoesBeforeItIsEntered)
{
    QTest::keyClick(box_, Qt::Key_F);
    QTest::keyClick(box_, Qt::Key_4);
    EXPECT_TRUE(words("effect").contains("cylinder 4 is compared anew")) << words("effect").toStdString();
    EXPECT_TRUE(words("reminder").contains("no approved record book"));
    EXPECT_TRUE(stored().empty());
}

TEST_F(EventsDesk, RefusesACylinderThatIsNotThere)
{
    QTest::keyClick(box_, Qt::Key_O);
    QTest::keyClick(box_, Qt::Key_9);
    EXPECT_TRUE(words("problem").contains("6 cylinders")) << words("problem").toStdString();
}

TEST_F(EventsDesk, EnterDoesNothingWhileTheRedLineStands)
{
    for (const Qt::Key key : {Qt::Key_O, Qt::Key_9, Qt::Key_Return})
        QTest::keyClick(box_, key);
    EXPECT_TRUE(stored().empty()) << "an overhaul of cylinder 9 is none of the whole engine";
    EXPECT_TRUE(words("problem").contains("6 cylinders"));
    QTest::keyClick(box_, Qt::Key_4);
    QTest::keyClick(box_, Qt::Key_Return);
    ASSERT_EQ(stored().size(), 1u);
    EXPECT_EQ(stored()[0].place, Place::cylinder(4));
}

TEST_F(EventsDesk, SaysWhatWasAddedAndTakesItBackAtOnce)
{
    for (const Qt::Key key : {Qt::Key_O, Qt::Key_4, Qt::Key_Return})
        QTest::keyClick(box_, key);
    auto* undo = page_->findChild<QPushButton*>("added_undo_button");
    ASSERT_TRUE(undo->isVisible());
    EXPECT_TRUE(words("added").startsWith("Added: Overhaul, Cylinder 4, 14 Mar 2031.")) << words("added").toStdString();
    EXPECT_TRUE(words("added").contains("cylinder 4 is compared anew"));
    undo->click();
    EXPECT_TRUE(stored().empty());
    EXPECT_FALSE(undo->isVisible());
}

TEST_F(EventsDesk, ADayMayBeGivenItsTime)
{
    auto& date = *page_->findChild<QLineEdit*>("date_field");
    QTest::keyClick(box_, Qt::Key_O);
    QTest::keyClick(box_, Qt::Key_4);
    date.setText(QStringLiteral("2031-03-12T15:00Z"));
    QTest::keyClick(&date, Qt::Key_Return);
    ASSERT_EQ(stored().size(), 1u) << words("problem").toStdString();
    EXPECT_FALSE(stored()[0].date_only);
    EXPECT_EQ(utc_text(stored()[0].date.utc), "2031-03-12T15:00Z");
    diary().setCurrentIndex(diary().model()->index(0, 0));
    EXPECT_EQ(date.text(), QStringLiteral("2031-03-12T15:00Z")) << "and keeps it when another field is changed";
}

TEST_F(EventsDesk, ArrowKeysMoveTheDay)
{
    QTest::keyClick(box_, Qt::Key_W);
    QTest::keyClick(box_, Qt::Key_Left);
    QTest::keyClick(box_, Qt::Key_Left);
    QTest::keyClick(box_, Qt::Key_Return);
    ASSERT_EQ(stored().size(), 1u);
    EXPECT_EQ(date_text(stored()[0].date.utc), "2031-03-12");
    EXPECT_EQ(stored()[0].place, Place::engine());
}

TEST_F(EventsDesk, AddingIsUndoneAndDoneAgain)
{
    QTest::keyClick(box_, Qt::Key_O);
    QTest::keyClick(box_, Qt::Key_2);
    QTest::keyClick(box_, Qt::Key_Return);
    ASSERT_EQ(stored().size(), 1u);
    page_->diary().undo().undo();
    EXPECT_TRUE(stored().empty());
    page_->diary().undo().redo();
    ASSERT_EQ(stored().size(), 1u);
    EXPECT_EQ(stored()[0].place, Place::cylinder(2));
}

TEST_F(EventsDesk, RemovingAsksForAReasonAndIsUndone)
{
    QTest::keyClick(box_, Qt::Key_O);
    QTest::keyClick(box_, Qt::Key_2);
    QTest::keyClick(box_, Qt::Key_Return);
    diary().setCurrentIndex(page_->model().index(0, 0));
    diary().setFocus();
    QTest::keyClick(&diary(), Qt::Key_Delete);
    EXPECT_EQ(stored().size(), 1u) << "no reason, no removal";
    page_->findChild<QLineEdit*>("why_field")->setText("entered twice");
    diary().setFocus();
    QTest::keyClick(&diary(), Qt::Key_Delete);
    EXPECT_TRUE(stored().empty());
    const auto audit = storage::audit_entries(*workplace_->history());
    ASSERT_TRUE(audit.has_value());
    EXPECT_EQ(audit.value().front().why, "entered twice") << "the removed event stays in the audit trail";
    page_->diary().undo().undo();
    EXPECT_EQ(stored().size(), 1u);
    page_->diary().undo().undo();
    EXPECT_TRUE(stored().empty()) << "the event that came back can be undone too";
}

TEST_F(EventsDesk, ChangingANoteKeepsTheEvent)
{
    QTest::keyClick(box_, Qt::Key_N);
    QTest::keyClick(box_, Qt::Key_Return);
    diary().setCurrentIndex(page_->model().index(0, 0));
    page_->findChild<QLineEdit*>("note_field")->setText("smoke test of the boiler");
    QTest::keyClick(page_->findChild<QLineEdit*>("note_field"), Qt::Key_Return);
    ASSERT_EQ(stored().size(), 1u);
    EXPECT_EQ(stored()[0].note, "smoke test of the boiler");
    page_->diary().undo().undo();
    EXPECT_EQ(stored()[0].note, "");
}

TEST_F(EventsDesk, DayThatIsNoneIsSaidInWords)
{
    QTest::keyClick(box_, Qt::Key_N);
    page_->findChild<QLineEdit*>("date_field")->setText("14.14.2031");
    QTest::keyClick(box_, Qt::Key_Return);
    EXPECT_TRUE(stored().empty());
    EXPECT_FALSE(words("problem").isEmpty());
}

TEST_F(EventsDesk, TakesLettersOnlyWhereTheyAreTyped)
{
    EXPECT_TRUE(page_->takes_letters());
    diary().setVisible(true);
    diary().setFocus();
    EXPECT_FALSE(page_->takes_letters());
}

TEST_F(EventsDesk, PictureIsKept)
{
    const QString folder = qEnvironmentVariable("EVENSTROKE_PICTURES");
    if (folder.isEmpty())
        GTEST_SKIP() << "EVENSTROKE_PICTURES names no folder";
    for (const Qt::Key key : {Qt::Key_O, Qt::Key_2, Qt::Key_Return, Qt::Key_W, Qt::Key_Left, Qt::Key_Return, Qt::Key_F, Qt::Key_4})
        QTest::keyClick(box_, key);
    page_->grab().save(folder + "/events_page.png");
}

TEST(EventModelShows, HoursOfTheCounterOrAboutThem)
{
    Engine engine;
    engine.cylinders = 6;
    EventModel model;
    const QAbstractItemModelTester tester(&model, QAbstractItemModelTester::FailureReportingMode::Fatal);
    Event with, without;
    with.kind = without.kind = "overhaul";
    with.date = without.date = {day("2031-01-10"), 0};
    with.place = without.place = Place::cylinder(3);
    with.running_hours = 36120.0;
    model.show(engine, {with, without}, {});
    EXPECT_TRUE(model.index(0, EventModel::hours).data().toString().startsWith("36"));
    EXPECT_EQ(model.index(1, EventModel::hours).data().toString(), "");
    EXPECT_EQ(model.index(0, EventModel::part).data().toString(), "Cylinder 3");
    EXPECT_EQ(model.index(0, EventModel::comparison).data().toString(), "compared anew");
    model.show(engine, {}, {});
    EXPECT_EQ(model.rowCount(), 0);
}

} // namespace
} // namespace evenstroke
