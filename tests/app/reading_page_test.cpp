// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/reading/reading_page.h"

#include "app/board/board_page.h"
#include "app/board/board_view.h"
#include "app/desk/chooser.h"
#include "app/desk/frame.h"
#include "app/desk/number_text.h"
#include "app/desk/pages.h"
#include "app/desk/reading_in_hand.h"
#include "app/desk/theme.h"
#include "app/reading/review_view.h"
#include "app/reading/sheet_number.h"
#include "app/reading/workings_page.h"
#include "app/trends/trend_page.h"
#include "tests/app/page_desk.h"
#include "tests/app/pictures.h"

#include <QAbstractItemModelTester>
#include <QClipboard>
#include <QFileInfo>
#include <QListView>
#include <QPainter>
#include <QPrinter>
#include <QTextBrowser>

namespace evenstroke::test {
namespace {

constexpr int patience = 60'000; // milliseconds; a loaded machine is slow

/// The whole window on twelve readings of the invented engine.
class ReadingDesk : public PageDesk
{
protected:
    void begin(const char* page)
    {
        open(12);
        frame_ = std::make_unique<Frame>(*workplace_);
        add_all_pages(*frame_);
        frame_->resize(1366, 768);
        workplace_->open_page(QLatin1String(page));
        frame_->show();
        frame_->activateWindow();
        ASSERT_TRUE(QTest::qWaitForWindowActive(frame_.get(), patience));
        QTest::qWait(10);
    }
    void key(Qt::Key code, Qt::KeyboardModifiers modifiers = Qt::NoModifier)
    {
        QWidget* focus = QApplication::focusWidget();
        QTest::keyClick(focus ? focus : frame_.get(), code, modifiers);
        QTest::qWait(1);
    }
    ReadingPage& page() { return *static_cast<ReadingPage*>(frame_->current_page()); }
    ReviewView& view() { return page().view(); }
    /// Goes to the line of a quantity by the arrow keys.
    bool walk_to(const char* quantity, const Place& place)
    {
        const int wanted = view().review_model().row_of(*find_quantity(quantity, place.kind), place);
        key(Qt::Key_Home);
        for (int step = 0; step < wanted; ++step)
            key(Qt::Key_Down);
        return wanted >= 0 && view().currentIndex().row() == wanted;
    }
    std::size_t reading() const { return *reading_in_hand(*workplace_->judgement(), workplace_->selection()); }

    std::unique_ptr<Frame> frame_;
};

TEST_F(ReadingDesk, NothingIsCutWhereThePageHasRoom)
{
    begin("reading");
    ReviewModel& model = view().review_model();
    const ReviewColumns& columns = view().columns();
    ASSERT_EQ(static_cast<int>(columns.note.size()), model.rowCount());
    const QFontMetrics body(type(TypeSize::body)), label(type(TypeSize::label));
    for (int row = 0; row < model.rowCount(); ++row) {
        const ReviewLine* line = model.row(row)->line;
        if (!line)
            continue;
        const std::string& words = line->words;
        for (const int column : {ReviewModel::value, ReviewModel::corrected, ReviewModel::expected, ReviewModel::deviation,
                                 ReviewModel::from_usual})
            EXPECT_LE(body.horizontalAdvance(model.index(row, column).data().toString()), view().columnWidth(column)) << words;
        for (const int column : {ReviewModel::place, ReviewModel::half_width, ReviewModel::deviation_half_width})
            EXPECT_LE(label.horizontalAdvance(model.index(row, column).data().toString()), view().columnWidth(column)) << words;
        const int name_room = room_of_name(*line, columns) - width_of_unit(*line);
        const QStringList lines = name_lines(QString::fromStdString(words), name_room);
        for (const QString& part : lines)
            EXPECT_LE(body.horizontalAdvance(part), name_room) << words;
        EXPECT_EQ(columns.name[static_cast<std::size_t>(row)],
                  model.row(row)->repeats ? 0 : static_cast<int>(lines.size() - 1) * review_sizes::name_line) << words;
        const int room = columns.between(first_column_of_verdict(*line), ReviewModel::column_count);
        const int verdict = label.horizontalAdvance(model.index(row, ReviewModel::verdict).data().toString());
        EXPECT_TRUE(verdict <= room || columns.note[static_cast<std::size_t>(row)] > 0) << words;
        EXPECT_EQ(view().rowHeight(row), columns.height(row)) << words;
    }
}

TEST_F(ReadingDesk, TheNumberTheMarkGoesByIsSeenOnASmallScreenToo)
{
    begin("reading");
    frame_->resize(1024, 700);
    QTest::qWait(10);
    const int last = ReviewModel::from_usual;
    EXPECT_LE(view().columnViewportPosition(last) + view().columnWidth(last), view().viewport()->width());
    const ReviewColumns& columns = view().columns();
    for (int row = 0; row < view().review_model().rowCount(); ++row) {
        const bool says = view().review_model().row(row)->line &&
                          !view().review_model().index(row, ReviewModel::verdict).data().toString().isEmpty();
        EXPECT_TRUE(!says || columns.width[ReviewModel::verdict] > 0 || columns.note[static_cast<std::size_t>(row)] > 0) << row;
    }
}

TEST_F(ReadingDesk, AValueThatWasCorrectedSaysWhatItWas)
{
    begin("reading");
    const QuantityId exhaust = *find_quantity("exhaust_temperature", Place::Kind::cylinder);
    const int row = view().review_model().row_of(exhaust, Place::cylinder(2));
    ASSERT_GE(row, 0);
    EXPECT_FALSE(view().review_model().index(row, ReviewModel::verdict).data().toString().contains(QStringLiteral("corrected")));
    const Reading& shown = workplace_->judgement()->record->readings[reading()];
    const Value* before = shown.find(exhaust, Place::cylinder(2));
    ASSERT_NE(before, nullptr);
    const std::string typed = before->typed, id = shown.id;
    Value after = *before;
    after.number = *before->number + 3.0;
    after.typed = std::to_string(std::lround(*after.number));
    const auto done = storage::ReadingStore(*workplace_->history()).correct(id, after, {"A. Chief", "gauge read again"});
    ASSERT_TRUE(done.has_value()) << done.error().text();
    workplace_->changed();
    ASSERT_TRUE(QTest::qWaitFor([&] {
        return view().review_model().index(view().review_model().row_of(exhaust, Place::cylinder(2)), ReviewModel::verdict)
            .data().toString().contains(QStringLiteral("corrected, was ") + QString::fromStdString(typed));
    }, patience));
    const QString tip = view().review_model()
                            .index(view().review_model().row_of(exhaust, Place::cylinder(2)), ReviewModel::verdict)
                            .data(Qt::ToolTipRole).toString();
    EXPECT_TRUE(tip.contains(QStringLiteral("A. Chief")) && tip.contains(QStringLiteral("gauge read again"))) << tip.toStdString();
}

TEST_F(ReadingDesk, StandsOnTheRailAndShowsTheNewestReading)
{
    begin("board");
    key(Qt::Key_R);
    ASSERT_EQ(workplace_->page(), QStringLiteral("reading"));
    EXPECT_TRUE(frame_->sentence().contains(reading_title(*workplace_->judgement(), 11))) << frame_->sentence().toStdString();
    ASSERT_NE(view().review_model().review(), nullptr);
    EXPECT_EQ(view().review_model().review()->reading, 11U);
    EXPECT_GT(view().review_model().rowCount(), 5);
    const QAbstractItemModelTester tester(&view().review_model(), QAbstractItemModelTester::FailureReportingMode::Fatal);
    workplace_->step_to(with_reading_step(workplace_->selection(), *workplace_->judgement(), -1));
    QTest::qWait(1);
    EXPECT_EQ(view().review_model().review()->reading, 10U);
}

TEST_F(ReadingDesk, AReadingIsChosenByItsLetterAndWalkedThroughByPageKeys)
{
    begin("reading");
    key(Qt::Key_M);
    auto* chooser = frame_->findChild<Chooser*>();
    ASSERT_NE(chooser, nullptr);
    auto* list = chooser->findChild<QListView*>();
    EXPECT_EQ(list->model()->rowCount(), 12);
    QTest::keyClick(list, Qt::Key_Down);
    QTest::keyClick(list, Qt::Key_Down);
    QTest::keyClick(list, Qt::Key_Return);
    QTest::qWait(1);
    EXPECT_EQ(reading(), 9U) << "the newest stands first";
    key(Qt::Key_PageUp);
    EXPECT_EQ(reading(), 8U);
    key(Qt::Key_PageDown);
    key(Qt::Key_PageDown);
    EXPECT_EQ(reading(), 10U);
    for (int i = 0; i < 5; ++i)
        key(Qt::Key_PageDown);
    EXPECT_EQ(reading(), 11U) << "it stops at the newest";
    EXPECT_EQ(view().review_model().review()->reading, 11U);
}

TEST_F(ReadingDesk, TheRowInHandStaysTheSameQuantityInAnotherReading)
{
    begin("reading");
    ASSERT_TRUE(walk_to("scavenge_pressure", Place::engine()));
    key(Qt::Key_PageUp);
    const ReviewRow* row = view().row_in_hand();
    ASSERT_TRUE(row && row->line);
    EXPECT_EQ(row->line->quantity, find_quantity("scavenge_pressure"));
    EXPECT_EQ(workplace_->selection().quantity, find_quantity("scavenge_pressure"));
}

TEST_F(ReadingDesk, EnterGoesToTheTrendOfTheRow)
{
    begin("reading");
    ASSERT_TRUE(walk_to("scavenge_pressure", Place::engine()));
    key(Qt::Key_Return);
    EXPECT_EQ(workplace_->page(), QStringLiteral("trend"));
    EXPECT_EQ(workplace_->selection().quantity, find_quantity("scavenge_pressure"));
    key(Qt::Key_Left, Qt::AltModifier);
    EXPECT_EQ(workplace_->page(), QStringLiteral("reading"));
}

TEST_F(ReadingDesk, OneKeyOpensTheWorkingsAndEscapeLeadsBack)
{
    begin("reading");
    ASSERT_TRUE(walk_to("scavenge_pressure", Place::engine()));
    for (const Qt::Key opens : {Qt::Key_W, Qt::Key_Space}) {
        key(opens);
        ASSERT_EQ(workplace_->page(), QStringLiteral("workings"));
        auto& sheet = *static_cast<WorkingsPage*>(frame_->current_page());
        EXPECT_TRUE(sheet.text().contains(QStringLiteral("Scavenge"))) << sheet.text().toStdString();
        EXPECT_TRUE(frame_->sentence().startsWith(QStringLiteral("Scavenge pressure"))) << frame_->sentence().toStdString();
        key(Qt::Key_C, Qt::ControlModifier);
        EXPECT_EQ(QApplication::clipboard()->text(), sheet.text());
        EXPECT_EQ(sheet.findChild<QTextBrowser*>()->accessibleDescription(), sheet.text());
        key(Qt::Key_PageUp);
        EXPECT_EQ(reading(), 10U);
        key(Qt::Key_Escape);
        EXPECT_EQ(workplace_->page(), QStringLiteral("reading"));
        EXPECT_EQ(reading(), 11U) << "back where it was asked for";
    }
    key(Qt::Key_W);
    key(Qt::Key_Left, Qt::AltModifier);
    EXPECT_EQ(workplace_->page(), QStringLiteral("reading"));
}

TEST_F(ReadingDesk, TheWorkingsOfAnEstimateOfPowerAreItsOwn)
{
    begin("reading");
    const ReviewModel& model = view().review_model();
    int row = 0;
    while (row < model.rowCount() && !(model.row(row)->line && model.row(row)->line->estimate && model.row(row)->line->has_workings))
        ++row;
    ASSERT_LT(row, model.rowCount()) << "the torque meter's power was typed";
    const std::string words = model.row(row)->line->words;
    view().go_to(row);
    key(Qt::Key_W);
    ASSERT_EQ(workplace_->page(), QStringLiteral("workings"));
    EXPECT_FALSE(workplace_->selection().estimate.isEmpty()) << words;
    EXPECT_TRUE(static_cast<WorkingsPage*>(frame_->current_page())->text().contains(QStringLiteral("kW")));
    key(Qt::Key_W);
    EXPECT_EQ(workplace_->page(), QStringLiteral("reading"));
}

TEST_F(ReadingDesk, TrendAndBoardOpenTheWorkingsOfWhatIsInHand)
{
    begin("trend");
    Selection selection = workplace_->selection();
    selection.quantity = find_quantity("maximum_pressure");
    selection.place = Place::cylinder(2);
    workplace_->select(selection);
    QTest::qWait(1);
    frame_->current_page()->setFocus();
    key(Qt::Key_Left);
    key(Qt::Key_Left);
    const std::size_t chosen = reading();
    EXPECT_LT(chosen, 11U);
    key(Qt::Key_W);
    ASSERT_EQ(workplace_->page(), QStringLiteral("workings"));
    EXPECT_EQ(reading(), chosen);
    EXPECT_TRUE(static_cast<WorkingsPage*>(frame_->current_page())->text().contains(QStringLiteral("Maximum pressure")));
    key(Qt::Key_Escape);
    EXPECT_EQ(workplace_->page(), QStringLiteral("trend"));
    key(Qt::Key_B);
    auto& board = static_cast<BoardPage*>(frame_->current_page())->view();
    board.setFocus();
    board.setCurrentIndex(board.board_model().index(0, 1));
    key(Qt::Key_W);
    ASSERT_EQ(workplace_->page(), QStringLiteral("workings"));
    EXPECT_EQ(reading(), 11U) << "the newest value of the cell";
    EXPECT_EQ(workplace_->selection().place, Place::cylinder(2));
    key(Qt::Key_Escape);
    EXPECT_EQ(workplace_->page(), QStringLiteral("board"));
}

TEST_F(ReadingDesk, DigitsChangeWhatStandsBesideTheReading)
{
    begin("reading");
    key(Qt::Key_2);
    EXPECT_EQ(page().side(), ReadingPage::Side::power);
    EXPECT_FALSE(page().side_view().figures.empty());
    key(Qt::Key_3);
    EXPECT_TRUE(page().side_view().empty.contains(QStringLiteral("load_limits"))) << "none are entered for this engine";
    key(Qt::Key_4);
    EXPECT_TRUE(page().side_view().empty.contains(QStringLiteral("walls")));
    key(Qt::Key_5);
    EXPECT_TRUE(page().side_view().empty.contains(QStringLiteral("cards"))) << page().side_view().empty.toStdString();
    key(Qt::Key_2);
    key(Qt::Key_C, Qt::ControlModifier);
    EXPECT_TRUE(QApplication::clipboard()->text().contains(QStringLiteral("Power, kW")));
    key(Qt::Key_1);
    key(Qt::Key_C, Qt::ControlModifier);
    EXPECT_TRUE(QApplication::clipboard()->text().contains(u'\t'));
}

TEST_F(ReadingDesk, IsPrintedAndSoAreTheWorkings)
{
    begin("reading");
    ASSERT_TRUE(walk_to("scavenge_pressure", Place::engine()));
    for (const char* name : {"reading", "workings"}) {
        if (workplace_->page() != QLatin1String(name))
            key(Qt::Key_W);
        ASSERT_TRUE(frame_->current_page()->can_print());
        const QString path = folder_.filePath(QLatin1String(name) + QStringLiteral(".pdf"));
        QPrinter printer(QPrinter::HighResolution);
        printer.setOutputFormat(QPrinter::PdfFormat);
        printer.setOutputFileName(path);
        frame_->current_page()->print(printer);
        EXPECT_GT(QFileInfo(path).size(), 5000) << name;
        if (const QString keep = qEnvironmentVariable("EVENSTROKE_PICTURES"); !keep.isEmpty())
            QFile::copy(path, keep + u'/' + QLatin1String(name) + QStringLiteral("_paper.pdf"));
    }
}

TEST_F(ReadingDesk, ShowsSomethingByDayByNightAndAtTwiceTheSize)
{
    begin("reading");
    ASSERT_TRUE(walk_to("maximum_pressure", Place::cylinder(1)));
    for (const ThemeKind kind : {ThemeKind::day, ThemeKind::night}) {
        frame_->use_theme(kind);
        QTest::qWait(20);
        const QString theme_name = kind == ThemeKind::day ? QStringLiteral("day") : QStringLiteral("night");
        EXPECT_TRUE(shows_something(frame_->grab().toImage()));
        keep_picture(*frame_, QStringLiteral("reading_") + theme_name);
        key(Qt::Key_W);
        QTest::qWait(20);
        EXPECT_TRUE(shows_something(frame_->grab().toImage()));
        keep_picture(*frame_, QStringLiteral("workings_") + theme_name);
        key(Qt::Key_Escape);
    }
    frame_->use_theme(ThemeKind::day);
    QPixmap twice(frame_->size() * 2);
    twice.setDevicePixelRatio(2.0);
    frame_->render(&twice);
    EXPECT_TRUE(shows_something(twice.toImage()));
    if (const QString keep = qEnvironmentVariable("EVENSTROKE_PICTURES"); !keep.isEmpty())
        twice.save(keep + QStringLiteral("/reading_twice.png"));
}

TEST(ReviewModel, KeepsTheRulesOfItemModelsAndSaysLevelsInWords)
{
    auto judgement = std::make_shared<Judgement>();
    judgement->record = std::make_shared<EngineRecord>();
    auto review = std::make_shared<ReadingReview>();
    ReviewSection section;
    section.title = "Cylinders";
    section.sentence = "Compression of cylinder 4 has fallen.";
    section.level = Level::watch;
    for (int cylinder = 1; cylinder <= 3; ++cylinder) {
        ReviewLine line;
        line.words = "Compression pressure";
        line.quantity = find_quantity("compression_pressure");
        line.place = Place::cylinder(cylinder);
        line.unit = "bar";
        line.value = 112.4;
        line.half_width = 1.52;
        line.deviation = -3.2;
        line.level = cylinder == 2 ? Level::watch : Level::quiet;
        line.verdict = "low";
        section.lines.push_back(line);
    }
    review->sections.push_back(section);
    ReviewModel model;
    const QAbstractItemModelTester tester(&model, QAbstractItemModelTester::FailureReportingMode::Fatal);
    model.show_review(review, judgement);
    ASSERT_EQ(model.rowCount(), 4);
    EXPECT_EQ(model.index(0, 0).data().toString(), QStringLiteral("Cylinders. Compression of cylinder 4 has fallen."));
    EXPECT_EQ(model.index(2, ReviewModel::place).data().toString(), QStringLiteral("2"));
    EXPECT_EQ(model.index(2, ReviewModel::deviation).data().toString(), QStringLiteral("−3.2"));
    EXPECT_EQ(model.index(2, ReviewModel::verdict).data(Qt::AccessibleTextRole).toString(), QStringLiteral("watch: low"));
    EXPECT_FALSE(model.row(1)->repeats);
    EXPECT_TRUE(model.row(2)->repeats);
    EXPECT_EQ(model.row_of(*find_quantity("compression_pressure"), Place::cylinder(3)), 3);
    model.show_review(nullptr, nullptr);
    EXPECT_EQ(model.rowCount(), 0);
}

TEST(SheetNumber, KeepsSixDigitsAndCutsAtTheDecimalSign)
{
    EXPECT_EQ(sheet_number(3.6868712), QStringLiteral("3.68687"));
    EXPECT_EQ(sheet_number(0.286), QStringLiteral("0.286"));
    EXPECT_EQ(sheet_number(-12.5), QStringLiteral("−12.5"));
    EXPECT_EQ(sheet_number(36812.0), whole_text(36812.0));
    EXPECT_EQ(sheet_number(12345678.0), whole_text(12345678.0));
    EXPECT_EQ(at_decimal_sign(QStringLiteral("3.68")), std::pair(QStringLiteral("3"), QStringLiteral(".68")));
    EXPECT_EQ(at_decimal_sign(QStringLiteral("3")), std::pair(QStringLiteral("3"), QString()));
}

} // namespace
} // namespace evenstroke::test
