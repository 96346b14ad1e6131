// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/board/board_page.h"
#include "app/board/board_view.h"
#include "app/desk/chooser.h"
#include "app/desk/frame.h"
#include "app/desk/history_page.h"
#include "app/desk/pages.h"
#include "app/desk/rail.h"
#include "app/desk/sample_files.h"
#include "app/desk/workplace.h"
#include "app/trends/flag_note_dialog.h"
#include "app/trends/trend_page.h"
#include "app/trends/trend_plot.h"
#include "storage/event_store.h"
#include "storage/history.h"
#include "storage/take_in.h"
#include "tests/app/large_engine.h"
#include "tests/app/pictures.h"

#include <gtest/gtest.h>

#include <QAbstractButton>
#include <QApplication>
#include <QClipboard>
#include <QElapsedTimer>
#include <QFile>
#include <QListView>
#include <QMimeData>
#include <QPrinter>
#include <QSignalSpy>
#include <QTemporaryDir>
#include <QTest>

#include <algorithm>
#include <iostream>

namespace evenstroke {
namespace {

constexpr int patience = 60'000; // milliseconds; a loaded machine judges slowly

bool settle(Workplace& workplace)
{
    return QTest::qWaitFor([&] { return workplace.activity().isEmpty() && workplace.judgement(); }, patience);
}

QString make_history(const QString& path, const QStringList& folders)
{
    auto history = storage::History::create(path);
    if (!history)
        throw std::runtime_error(history.error().text());
    const auto taken = storage::take(*history.value(), folders);
    if (!taken || taken.value().anything_refused())
        throw std::runtime_error("the files were not taken in");
    return path;
}

/// The sample vessel and an engine of twelve cylinders and ten years; made once, copied for each test.
class Desk : public testing::Test
{
protected:
    static void SetUpTestSuite()
    {
        made_ = std::make_unique<QTemporaryDir>();
        const QString sample = made_->filePath(QStringLiteral("sample_files"));
        ASSERT_FALSE(write_sample_files(sample).has_value());
        write_large_engine(made_->filePath(QStringLiteral("large_files")));
        make_history(made_->filePath(QStringLiteral("sample.evenstroke")), {sample});
        make_history(made_->filePath(QStringLiteral("large.evenstroke")), {made_->filePath(QStringLiteral("large_files"))});
    }
    static void TearDownTestSuite() { made_.reset(); }

    void SetUp() override { QSettings().clear(); }

    QString copy_of(const QString& name)
    {
        const QString path = folder_.filePath(name);
        QFile::copy(made_->filePath(name), path);
        return path;
    }
    void open(const QString& name, const QString& page)
    {
        frame_.resize(1366, 768);
        frame_.begin(copy_of(name), page);
        frame_.show();
        frame_.activateWindow();
        ASSERT_TRUE(QTest::qWaitForWindowActive(&frame_, patience));
        ASSERT_TRUE(settle(workplace_));
        QTest::qWait(20);
    }
    void key(Qt::Key code, Qt::KeyboardModifiers modifiers = Qt::NoModifier)
    {
        QWidget* focus = QApplication::focusWidget();
        QTest::keyClick(focus ? focus : &frame_, code, modifiers);
        QTest::qWait(1);
    }

    static inline std::unique_ptr<QTemporaryDir> made_;
    QTemporaryDir folder_;
    Workplace workplace_;
    Frame frame_{workplace_};
    const bool pages_ = (add_all_pages(frame_), true);
};

TEST_F(Desk, BeginsWithThePageThatSaysHowToBegin)
{
    frame_.begin({}, {});
    ASSERT_NE(frame_.current_page(), nullptr);
    EXPECT_EQ(frame_.current_page()->name(), QStringLiteral("history"));
    EXPECT_EQ(frame_.sentence(), QStringLiteral("No history is open."));
    EXPECT_FALSE(frame_.show_page(QStringLiteral("board"))) << "there is nothing to show yet";
    frame_.show();
    keep_picture(frame_, QStringLiteral("desk_empty"));
}

TEST_F(Desk, RefusesAFileThatIsNoHistoryInWordsOnThePage)
{
    const QString path = folder_.filePath(QStringLiteral("letter.evenstroke"));
    QFile file(path);
    ASSERT_TRUE(file.open(QIODevice::WriteOnly));
    file.write("Dear chief engineer,");
    file.close();
    frame_.begin(path, {});
    frame_.show();
    const auto* words = frame_.current_page()->findChild<QLabel*>(QStringLiteral("problem"));
    ASSERT_NE(words, nullptr);
    EXPECT_TRUE(words->isVisible());
    EXPECT_FALSE(words->text().isEmpty());
    EXPECT_FALSE(workplace_.is_open());
}

TEST_F(Desk, LettersTurnThePagesAndTheSelectionGoesAlong)
{
    open(QStringLiteral("sample.evenstroke"), QStringLiteral("fleet"));
    key(Qt::Key_B);
    EXPECT_EQ(workplace_.page(), QStringLiteral("board"));
    auto& board = static_cast<BoardPage*>(frame_.current_page())->view();
    board.setFocus();
    board.setCurrentIndex(board.board_model().index(0, 0));
    key(Qt::Key_Down);
    key(Qt::Key_Right);
    const BoardCell* cell = board.board_model().cell(board.currentIndex());
    ASSERT_NE(cell, nullptr);
    const auto quantity_in_hand = cell->quantity;
    const Place place_in_hand = cell->place;
    key(Qt::Key_Return);
    EXPECT_EQ(workplace_.page(), QStringLiteral("trend"));
    EXPECT_EQ(workplace_.selection().quantity, quantity_in_hand);
    EXPECT_EQ(workplace_.selection().place, place_in_hand);
    EXPECT_TRUE(frame_.sentence().contains(QStringLiteral("cylinder 2"))) << frame_.sentence().toStdString();
    key(Qt::Key_Left, Qt::AltModifier);
    EXPECT_EQ(workplace_.page(), QStringLiteral("board"));
    key(Qt::Key_Right, Qt::AltModifier);
    EXPECT_EQ(workplace_.page(), QStringLiteral("trend"));
}

TEST_F(Desk, ReturnPressesTheButtonInHandAndF6AlwaysLandsOnSomethingInSight)
{
    open(QStringLiteral("sample.evenstroke"), QStringLiteral("enter"));
    for (int press = 0; press < 7; ++press) {
        key(Qt::Key_F6);
        const QWidget* focus = QApplication::focusWidget();
        ASSERT_NE(focus, nullptr);
        EXPECT_TRUE(focus->isVisible() && focus->focusPolicy() != Qt::NoFocus) << focus->metaObject()->className();
    }
    RailButton* events = nullptr;
    for (RailButton* button : frame_.findChildren<RailButton*>())
        if (button->text() == QStringLiteral("Events"))
            events = button;
    ASSERT_NE(events, nullptr);
    events->setFocus();
    key(Qt::Key_Return);
    QTest::qWait(20);
    EXPECT_EQ(workplace_.page(), QStringLiteral("events"));
}

TEST_F(Desk, APartOfTheSentenceIsChosenByItsLetter)
{
    open(QStringLiteral("sample.evenstroke"), QStringLiteral("board"));
    Selection selection = workplace_.selection();
    selection.range = TimeRange::since_overhaul;
    workplace_.select(selection);
    key(Qt::Key_P);
    auto* chooser = frame_.findChild<Chooser*>();
    ASSERT_NE(chooser, nullptr);
    auto* list = chooser->findChild<QListView*>();
    QTest::keyClick(list, Qt::Key_Down);
    QTest::keyClick(list, Qt::Key_Return);
    QTest::qWait(1);
    EXPECT_EQ(workplace_.selection().range, TimeRange::three_years);
    EXPECT_TRUE(frame_.sentence().contains(QStringLiteral("last three years")));
    key(Qt::Key_N);
    chooser = frame_.findChild<Chooser*>();
    ASSERT_NE(chooser, nullptr);
    const QString before = workplace_.selection().engine;
    QTest::keyClick(chooser->findChild<QListView*>(), Qt::Key_Escape);
    EXPECT_EQ(workplace_.selection().engine, before);
}

TEST_F(Desk, APageThatIsNotOnTheRailLeavesNoLineMarked)
{
    open(QStringLiteral("sample.evenstroke"), QStringLiteral("trend"));
    const auto marked = [this] {
        const auto buttons = frame_.findChild<Rail*>()->findChildren<QAbstractButton*>();
        return std::count_if(buttons.begin(), buttons.end(), [](const QAbstractButton* button) { return button->isChecked(); });
    };
    EXPECT_EQ(marked(), 1);
    key(Qt::Key_Y);
    EXPECT_EQ(frame_.current_page()->name(), QStringLiteral("causes"));
    EXPECT_EQ(marked(), 0);
    key(Qt::Key_B);
    EXPECT_EQ(marked(), 1);
}

TEST_F(Desk, WhatWasFoundIsKeptWithItsFlag)
{
    open(QStringLiteral("sample.evenstroke"), QStringLiteral("board"));
    const auto judgement = workplace_.judgement();
    const auto standing = judgement->standing_flags();
    ASSERT_FALSE(standing.empty());
    Selection selection = workplace_.selection();
    selection.quantity = standing.front()->quantity;
    selection.place = standing.front()->subject;
    workplace_.select(selection);
    workplace_.open_page(QStringLiteral("trend"));
    QTest::qWait(1);
    auto* page = static_cast<TrendPage*>(frame_.current_page());
    ASSERT_TRUE(page->plot().picture().flag_index);
    FlagNoteDialog dialog(*judgement->record, judgement->flags[*page->plot().picture().flag_index], QString());
    auto* missing = dialog.findChild<QLabel*>(QStringLiteral("missing"));
    ASSERT_NE(missing, nullptr);
    EXPECT_TRUE(missing->text().contains(QStringLiteral("your name"))) << missing->text().toStdString();
    dialog.write(QStringLiteral("rings looked at through the ports"), QStringLiteral("A. Chief"));
    EXPECT_TRUE(missing->text().trimmed().isEmpty()) << missing->text().toStdString();
    dialog.press(FlagNote::Said::seen);
    ASSERT_TRUE(dialog.note());
    EXPECT_TRUE(page->keep_note(*dialog.note()));
    ASSERT_TRUE(QTest::qWaitFor(
        [&] {
            const auto now = workplace_.judgement();
            return now && !now->record->notes.empty() && !page->plot().picture().note_words.isEmpty();
        },
        patience));
    EXPECT_TRUE(page->plot().picture().note_words.contains(QStringLiteral("rings looked at through the ports")));
    EXPECT_TRUE(page->plot().picture().level_words.contains(QStringLiteral("seen")));
}

TEST_F(Desk, DigitsChangeTheViewOfTheTrendAndArrowsWalkThroughIt)
{
    open(QStringLiteral("sample.evenstroke"), QStringLiteral("trend"));
    auto* page = static_cast<TrendPage*>(frame_.current_page());
    page->setFocus();
    Selection selection = workplace_.selection();
    selection.quantity = find_quantity("exhaust_temperature");
    selection.place = Place::cylinder(2);
    workplace_.select(selection);
    QTest::qWait(1);
    key(Qt::Key_1);
    EXPECT_EQ(page->plot().picture().view, ValueView::raw);
    key(Qt::Key_4);
    EXPECT_EQ(page->plot().picture().view, ValueView::apart);
    key(Qt::Key_Down);
    EXPECT_EQ(workplace_.selection().place, Place::cylinder(3));
    key(Qt::Key_Left);
    EXPECT_FALSE(workplace_.selection().reading.isEmpty());
    key(Qt::Key_5);
    EXPECT_TRUE(page->plot().extras().load);
    EXPECT_FALSE(page->plot().extras().uncertainty);
    key(Qt::Key_6);
    EXPECT_TRUE(page->plot().extras().uncertainty);
    key(Qt::Key_A);
    EXPECT_FALSE(page->plot().isVisible());
    for (int i = 0; i < 30; ++i)
        key(Qt::Key_PageDown);
    EXPECT_EQ(workplace_.selection().quantity, find_quantity("exhaust_temperature")) << "the end of the table is no way to another quantity";
    EXPECT_EQ(workplace_.selection().place, Place::cylinder(3));
    key(Qt::Key_Escape);
    EXPECT_TRUE(page->plot().isVisible());
    page->copy();
    EXPECT_TRUE(QApplication::clipboard()->text().contains(u'\t'));
    EXPECT_TRUE(page->save_as(folder_.filePath(QStringLiteral("trend.csv"))));
    EXPECT_TRUE(page->save_as(folder_.filePath(QStringLiteral("trend.pdf"))));
    EXPECT_FALSE(page->save_as(folder_.filePath(QStringLiteral("trend.doc"))));
}

TEST_F(Desk, EveryPageShowsSomethingByDayAndByNight)
{
    open(QStringLiteral("sample.evenstroke"), QStringLiteral("board"));
    for (const ThemeKind kind : {ThemeKind::day, ThemeKind::night}) {
        frame_.use_theme(kind);
        for (const QString& name : frame_.page_names()) {
            workplace_.open_page(name);
            ASSERT_TRUE(settle(workplace_));
            QTest::qWait(30);
            ASSERT_EQ(frame_.current_page()->name(), name);
            EXPECT_TRUE(shows_something(frame_.current_page()->grab().toImage())) << name.toStdString();
            keep_picture(frame_, QStringLiteral("desk_%1_%2").arg(name, kind == ThemeKind::day ? "day" : "night"));
        }
    }
    frame_.use_theme(ThemeKind::day);
}

TEST_F(Desk, TurnsPagesOfTwelveCylindersAndTenYears)
{
    open(QStringLiteral("large.evenstroke"), QStringLiteral("board"));
    std::vector<double> times;
    QStringList names = frame_.page_names();
    names.removeAll(QStringLiteral("history"));
    for (int round = 0; round < 12; ++round)
        for (const QString& name : names) {
            Selection selection = workplace_.selection();
            selection.place = Place::cylinder(round % 12 + 1);
            selection.quantity = find_quantity("compression_pressure");
            QElapsedTimer timer;
            timer.start();
            workplace_.open_page(name, selection);
            QApplication::processEvents();
            frame_.grab(); // drawn as well
            if (round > 1)
                times.push_back(static_cast<double>(timer.nsecsElapsed()) / 1e6);
        }
    std::sort(times.begin(), times.end());
    std::cout << "page switch: median " << times[times.size() / 2] << " ms, 95 of 100 within "
              << times[times.size() * 95 / 100] << " ms\n";
    EXPECT_EQ(times.size(), static_cast<std::size_t>(10 * names.size()));
}

TEST_F(Desk, OpensItsFirstPageFromStoredJudgements)
{
    const QString path = copy_of(QStringLiteral("large.evenstroke"));
    {
        Workplace first;
        ASSERT_FALSE(first.open(path).has_value());
        ASSERT_TRUE(settle(first));
    }
    QElapsedTimer timer;
    timer.start();
    frame_.begin(path, QStringLiteral("fleet"));
    frame_.show();
    QApplication::processEvents();
    frame_.grab();
    std::cout << "history to first page: " << timer.elapsed() << " ms\n";
    ASSERT_EQ(workplace_.fleet().size(), 1U);
    EXPECT_FALSE(workplace_.fleet().front().out_of_date);
    EXPECT_EQ(workplace_.fleet().front().summary.readings, 120);
}

TEST_F(Desk, NoticesWhatAnotherWindowWrote)
{
    open(QStringLiteral("sample.evenstroke"), QStringLiteral("board"));
    const std::string engine = workplace_.selection().engine.toStdString();
    QSignalSpy changed(&workplace_, &Workplace::history_changed);
    {
        auto other = storage::History::open(workplace_.path(), storage::OpenMode::read_write);
        ASSERT_TRUE(other.has_value());
        Event event;
        event.kind = "overhaul";
        event.date.utc = std::chrono::sys_days{std::chrono::year{2026} / 5 / 2};
        event.place = Place::cylinder(1);
        const auto added = storage::EventStore(*other.value()).add(engine, event, {"another window", ""});
        ASSERT_TRUE(added.has_value()) << (added ? "" : added.error().text());
    }
    ASSERT_TRUE(QTest::qWaitFor([&] { return changed.count() > 0; }, patience));
    ASSERT_TRUE(QTest::qWaitFor(
        [&] {
            const auto judgement = workplace_.judgement();
            return judgement && std::any_of(judgement->record->events.begin(), judgement->record->events.end(),
                                            [](const Event& e) { return e.kind == "overhaul" && e.place == Place::cylinder(1); });
        },
        patience));
}

TEST_F(Desk, MakesTheSampleVesselFromNothing)
{
    HistoryPage page(workplace_);
    QSignalSpy done(&page, &HistoryPage::work_done);
    ASSERT_TRUE(page.make_sample(folder_.filePath(QStringLiteral("new.evenstroke"))));
    ASSERT_TRUE(done.wait(patience));
    EXPECT_EQ(workplace_.vessels().size(), 1U);
    EXPECT_EQ(workplace_.vessels().front().engines.size(), 3U);
    EXPECT_FALSE(page.make_history(folder_.filePath(QStringLiteral("new.evenstroke")))) << "a history is never written over";
    EXPECT_EQ(recent_histories().size(), 1);
}

TEST_F(Desk, PrintsBoardAndTrend)
{
    open(QStringLiteral("sample.evenstroke"), QStringLiteral("board"));
    for (const QString& name : {QStringLiteral("board"), QStringLiteral("trend")}) {
        workplace_.open_page(name);
        ASSERT_TRUE(frame_.current_page()->can_print());
        const QString path = folder_.filePath(name + QStringLiteral(".pdf"));
        QPrinter printer(QPrinter::HighResolution);
        printer.setOutputFormat(QPrinter::PdfFormat);
        printer.setOutputFileName(path);
        printer.setPageOrientation(QPageLayout::Landscape);
        frame_.current_page()->print(printer);
        EXPECT_GT(QFileInfo(path).size(), 5000) << name.toStdString();
        if (const QString keep = qEnvironmentVariable("EVENSTROKE_PICTURES"); !keep.isEmpty())
            QFile::copy(path, keep + u'/' + name + QStringLiteral("_paper.pdf"));
    }
}

TEST_F(Desk, RemembersThePageAndTheSelection)
{
    open(QStringLiteral("sample.evenstroke"), QStringLiteral("trend"));
    Selection selection = workplace_.selection();
    selection.quantity = find_quantity("exhaust_temperature");
    selection.place = Place::cylinder(5);
    workplace_.select(selection);
    const QString path = workplace_.path();
    workplace_.close();
    Workplace again;
    ASSERT_FALSE(again.open(path).has_value());
    EXPECT_EQ(again.page(), QStringLiteral("trend"));
    EXPECT_EQ(again.selection().place, Place::cylinder(5));
    EXPECT_EQ(again.selection().quantity, selection.quantity);
}

} // namespace
} // namespace evenstroke
