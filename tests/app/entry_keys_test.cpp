// SPDX-License-Identifier: GPL-3.0-or-later
// What keys do on the entry page beside typing a value.
#include "tests/app/entry_desk.h"

#include <QClipboard>
#include <QInputMethodEvent>
#include <QKeyEvent>
#include <QLineEdit>
#include <QPushButton>

using namespace evenstroke;
using evenstroke::test::box;
using evenstroke::test::ship;
using evenstroke::test::usual_exhaust;

namespace {

class EntryKeys : public evenstroke::test::EntryDesk
{
protected:
    void type_exhausts(const QString& of_cylinder_4)
    {
        page->set_time(QStringLiteral("2021-04-01"), QStringLiteral("9:10"), QStringLiteral("+02:00"));
        enter(box("load_percent"), QStringLiteral("75"));
        for (int cylinder = 1; cylinder <= 6; ++cylinder)
            enter(box("exhaust_temperature", Place::cylinder(cylinder)),
                  cylinder == 4 ? of_cylinder_4 : QString::number(usual_exhaust(cylinder)));
        page->judge_now();
    }
    std::string focus_name() const
    {
        QWidget* focus = QApplication::focusWidget();
        return focus ? focus->objectName().toStdString() : "nothing";
    }
};

TEST_F(EntryKeys, AModifierAloneNeitherClosesNorOpensABox)
{
    open(2);
    page->model().show_all(true);
    page->view().go_to(box("load_percent"));
    const Qt::Key keys_alone[] = {Qt::Key_Shift, Qt::Key_Control, Qt::Key_Alt, Qt::Key_AltGr, Qt::Key_Meta, Qt::Key_CapsLock,
                                  Qt::Key_Dead_Acute};
    const auto press_alone = [this](Qt::Key key) { // some of them QTest does not know
        QKeyEvent down(QEvent::KeyPress, key, Qt::NoModifier), up(QEvent::KeyRelease, key, Qt::NoModifier);
        QApplication::sendEvent(keys(), &down);
        QApplication::sendEvent(keys(), &up);
    };
    for (const Qt::Key key : keys_alone) {
        press_alone(key);
        EXPECT_FALSE(page->view().is_editing());
    }
    type(QStringLiteral("62"));
    for (const Qt::Key key : keys_alone) {
        press_alone(key);
        EXPECT_TRUE(page->view().is_editing()) << key;
    }
    type(QStringLiteral("9"));
    press(Qt::Key_Return);
    EXPECT_EQ(shown(box("load_percent")), QStringLiteral("629"));
}

TEST_F(EntryKeys, TypingReplacesAClosedBoxAndF2ChangesIt)
{
    open(2);
    enter(box("load_percent"), QStringLiteral("75"));
    enter(box("load_percent"), QStringLiteral("68"));
    EXPECT_EQ(shown(box("load_percent")), QStringLiteral("68"));
    page->view().go_to(box("load_percent"));
    press(Qt::Key_F2);
    press(Qt::Key_End);
    type(QStringLiteral(",5"));
    press(Qt::Key_Return);
    EXPECT_EQ(shown(box("load_percent")), QStringLiteral("68,5"));
}

TEST_F(EntryKeys, AComposedLetterOpensTheBox)
{
    open(2);
    page->model().show_all(true);
    page->view().go_to(box("recorded_by"));
    QInputMethodEvent composed;
    composed.setCommitString(QStringLiteral("É"));
    QApplication::sendEvent(&page->view(), &composed);
    EXPECT_TRUE(page->view().is_editing());
    type(QStringLiteral("mile"));
    press(Qt::Key_Return);
    EXPECT_EQ(shown(box("recorded_by")), QStringLiteral("Émile"));
}

TEST_F(EntryKeys, TakingBackShowsTheBoxItChanged)
{
    open(2);
    enter(box("load_percent"), QStringLiteral("75"));
    page->view().go_to(box("exhaust_temperature", Place::cylinder(3)));
    press(Qt::Key_Z, Qt::ControlModifier);
    EXPECT_EQ(shown(box("load_percent")), QString());
    EXPECT_EQ(page->view().current_box(), box("load_percent"));
}

TEST_F(EntryKeys, TabLeadsOutOfTheSheetAtBothEnds)
{
    open(2);
    press(Qt::Key_Home, Qt::ControlModifier);
    press(Qt::Key_Backtab, Qt::ShiftModifier);
    EXPECT_EQ(focus_name(), "offset_field");
    page->view().setFocus();
    std::set<LogBox> been;
    for (int steps = 0; steps < 2000 && focus_name() == "grid"; ++steps) {
        ASSERT_TRUE(been.insert(*page->view().current_box()).second) << "Tab goes round in circles";
        press(Qt::Key_Tab);
    }
    EXPECT_EQ(focus_name(), "close_button");
    EXPECT_TRUE(std::any_of(been.begin(), been.end(), [](const LogBox& at) { return at.phase == Phase::after; }));
}

TEST_F(EntryKeys, TheDateTheDoubtAndTheClosingHaveKeys)
{
    open(14);
    type_exhausts(QStringLiteral("533"));
    page->view().go_to(box("load_percent"));
    type(QStringLiteral("75"));
    press(Qt::Key_D, Qt::ControlModifier);
    EXPECT_EQ(focus_name(), "date_field");
    press(Qt::Key_Return);
    EXPECT_EQ(focus_name(), "grid") << "from the date into the sheet";
    press(Qt::Key_D, Qt::ControlModifier);
    EXPECT_EQ(shown(box("load_percent")), QStringLiteral("75"));
    press(Qt::Key_N, Qt::ControlModifier);
    EXPECT_EQ(page->view().current_box(), box("exhaust_temperature", Place::cylinder(4)));
    press(Qt::Key_Return, Qt::ControlModifier);
    EXPECT_TRUE(page->notes().text().contains(QStringLiteral("Before closing")));
    EXPECT_EQ(page->session().state(), EntrySession::State::writing);
    for (const QPushButton* button : page->findChildren<QPushButton*>(QStringLiteral("close_button")))
        EXPECT_TRUE(button->text().contains(QStringLiteral("Ctrl+Enter")));
}

TEST_F(EntryKeys, TheSlipItselfComesBeforeWhatOnlyContradictsIt)
{
    open(14);
    page->set_time(QStringLiteral("2021-04-01"), QStringLiteral("9:10"), QStringLiteral("+02:00"));
    enter(box("load_percent"), QStringLiteral("75"));
    const LogBox peak = box("maximum_pressure", Place::cylinder(2)), compression = box("compression_pressure", Place::cylinder(2));
    enter(peak, QStringLiteral("14.2")); // 142
    enter(compression, QStringLiteral("118")); // as usual, and above the peak as typed
    page->judge_now();
    page->view().go_to(box("load_percent"));
    press(Qt::Key_N, Qt::ControlModifier);
    EXPECT_EQ(page->view().current_box(), peak);
}

TEST_F(EntryKeys, TheDoubtAboutTheValueJustLeftStaysReadable)
{
    open(14);
    type_exhausts(QStringLiteral("533"));
    page->view().go_to(box("exhaust_temperature", Place::cylinder(5)));
    EXPECT_TRUE(page->ear().newest().contains(QStringLiteral("533"))) << page->ear().newest().toStdString();
    EXPECT_TRUE(page->ear().newest().startsWith(QStringLiteral("Exhaust temperature of cylinder 4: ")));
    type(QStringLiteral("3"));
    EXPECT_FALSE(page->ear().newest().isEmpty()) << "also while the next is typed";
    EXPECT_TRUE(page->notes().text().contains(QStringLiteral("533"))) << "the foot lists single values too";
    press(Qt::Key_Escape);
    press(Qt::Key_N, Qt::ControlModifier);
    press(Qt::Key_F4);
    page->view().go_to(box("exhaust_temperature", Place::cylinder(5)));
    EXPECT_TRUE(page->ear().newest().isEmpty()) << page->ear().newest().toStdString();
}

TEST_F(EntryKeys, ChoicesAndLastTimesWordsAreOfferedWhereNoNumberIsTyped)
{
    open(2);
    page->model().show_all(true);
    page->set_time(QStringLiteral("2021-04-01"), QStringLiteral("9:10"), QStringLiteral("+02:00"));
    enter(box("load_percent"), QStringLiteral("75"));
    enter(box("recorded_by"), QStringLiteral("J. Smith"));
    page->close_reading();
    page->close_reading();
    ASSERT_EQ(page->session().state(), EntrySession::State::closed);
    ASSERT_TRUE(QTest::qWaitFor(
        [&] {
            const auto judgement = workplace->judgement();
            return judgement && judgement->record && judgement->record->readings.size() == 3;
        },
        20000));
    page->session().begin_new();
    page->set_time(QStringLiteral("2021-05-01"), QStringLiteral("9:10"), QStringLiteral("+02:00"));
    page->judge_now();
    page->view().go_to(box("recorded_by"));
    EXPECT_EQ(page->ear().suggestion(), QStringLiteral("J. Smith"));
    press(Qt::Key_F3);
    EXPECT_EQ(shown(box("recorded_by")), QStringLiteral("J. Smith"));
}

TEST_F(EntryKeys, ACopiedReadingGoesBackIntoAnEmptySheetByItsTitles)
{
    open(2);
    enter({*find_quantity("speed"), Place::engine(), Phase::before}, QStringLiteral("94"));
    enter(box("load_percent"), QStringLiteral("75"));
    enter(box("scavenge_pressure"), QStringLiteral("2,1 kgf/cm2"));
    enter(box("exhaust_temperature", Place::cylinder(4)), QStringLiteral("351"));
    page->copy_all();
    EXPECT_TRUE(page->notes().text().contains(QStringLiteral("copied")));
    const QString block = QApplication::clipboard()->text();
    page->session().begin_new();
    EXPECT_EQ(shown(box("load_percent")), QString());
    page->view().go_to(box("maximum_pressure", Place::cylinder(2)));
    press(Qt::Key_V, Qt::ControlModifier);
    EXPECT_EQ(shown(box("load_percent")), QStringLiteral("75")) << page->notes().text().toStdString();
    EXPECT_TRUE(shown(box("scavenge_pressure")).contains(QStringLiteral("kgf")));
    EXPECT_EQ(shown(box("exhaust_temperature", Place::cylinder(4))), QStringLiteral("351"));
    EXPECT_EQ(shown({*find_quantity("speed"), Place::engine(), Phase::before}), QStringLiteral("94"));
    EXPECT_FALSE(block.isEmpty());
}

} // namespace
