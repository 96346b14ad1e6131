// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/board/board_page.h"

#include "app/board/board_painting.h"
#include "app/board/board_view.h"
#include "app/desk/number_text.h"
#include "app/desk/reading_in_hand.h"
#include "app/desk/sentence_choices.h"
#include "app/desk/workplace.h"
#include "ui_board_page.h"

#include <QClipboard>
#include <QEvent>
#include <QGuiApplication>
#include <QMimeData>
#include <QPainter>
#include <QPrinter>

namespace evenstroke {

namespace {

constexpr int dots_per_inch = 96; // paper is drawn in the same measure as the screen

/// The board as tab-separated text, for a spreadsheet or a message.
QString as_text(const BoardModel& model)
{
    QStringList lines;
    QStringList heading{QString()};
    for (const BoardHeading& cylinder : model.board().cylinders)
        heading.append(cylinder.title);
    lines.append(heading.join(u'\t'));
    for (const BoardRow& row : model.board().rows) {
        QStringList line{QStringLiteral("%1 (%2)").arg(row.title, row.subtitle)};
        for (const BoardCell& cell : row.cells)
            line.append(has_mark(cell.level) ? QStringLiteral("%1 %2").arg(cell.number, cell.word) : cell.number);
        lines.append(line.join(u'\t'));
    }
    for (const BoardCell& cell : model.board().engine)
        lines.append(QStringLiteral("%1\t%2").arg(cell.title, cell.number));
    return lines.join(u'\n');
}

} // namespace

QString empty_words(const Workplace& workplace)
{
    if (workplace.selection().engine.isEmpty())
        return BoardPage::tr("No engine is described yet. Describe it on the page Engine (key G), or take in a folder "
                             "on the page History (key H).");
    if (workplace.judging(workplace.selection().engine))
        return BoardPage::tr("Judging the readings…");
    if (workplace.problem())
        return to_qstring(workplace.problem()->text());
    return BoardPage::tr("No reading is closed yet. Enter the first one on the page Enter (key E).");
}

BoardPage::BoardPage(Workplace& place, QWidget* parent) : Page(place, parent), ui_(std::make_unique<Ui::BoardPage>())
{
    ui_->setupUi(this);
    connect(ui_->view, &BoardView::asked_for, this, [this](QuantityId quantity, const Place& where) {
        Selection selection = workplace().selection();
        selection.quantity = quantity;
        selection.place = where;
        selection.view = where.kind == Place::Kind::cylinder ? ValueView::apart : ValueView::deviation;
        workplace().open_page(QStringLiteral("trend"), selection);
    });
    connect(ui_->view, &BoardView::moved_to, this, [this](QuantityId quantity, const Place& where) {
        Selection selection = workplace().selection();
        selection.quantity = quantity;
        selection.place = where;
        workplace().step_to(selection);
    });
}

BoardPage::~BoardPage() = default;

BoardView& BoardPage::view() { return *ui_->view; }

void BoardPage::refresh()
{
    const auto judgement = workplace().judgement();
    const Selection& selection = workplace().selection();
    if (!judgement || judgement->readings.empty()) {
        show_nothing();
        return;
    }
    if (judgement != shown_ || selection.range != shown_range_) {
        ui_->view->show_board(make_board(*judgement, selection.range));
        shown_ = judgement;
        shown_range_ = selection.range;
        show_words(ui_->view->board_model().board());
        emit foot_changed();
    }
    ui_->view->show();
    ui_->empty->hide();
    const Selection where = settled(selection, *judgement);
    if (where.quantity)
        ui_->view->go_to(*where.quantity, where.place);
}

void BoardPage::show_nothing()
{
    shown_.reset();
    ui_->view->hide();
    ui_->headline->clear();
    ui_->second_line->clear();
    ui_->level_words->clear();
    ui_->level_mark->clear();
    ui_->empty->setText(empty_words(workplace()));
    ui_->empty->show();
}

void BoardPage::show_words(const Board& board)
{
    QFont font = type(TypeSize::body);
    font.setPointSizeF(11.0);
    ui_->headline->setFont(font);
    ui_->headline->setText(board.headline);
    ui_->second_line->setText(board.second_line);
    ui_->second_line->setVisible(!board.second_line.isEmpty());
    ui_->level_words->setText(board.level_words);
    ui_->level_words->setStyleSheet(QStringLiteral("color: %1").arg(theme().level_colour(board.level).name()));
    ui_->level_mark->setPixmap(has_mark(board.level) ? mark_pixmap(board.level, 14, devicePixelRatioF()) : QPixmap());
}

void BoardPage::changeEvent(QEvent* event)
{
    if (event->type() == QEvent::StyleChange && shown_)
        show_words(ui_->view->board_model().board());
    Page::changeEvent(event);
}

QString BoardPage::foot_text() const
{
    const QString last = ui_->view->board_model().board().last_reading;
    return last.isEmpty() ? QString() : tr("number: the last reading alone · shaded: usual range · %1").arg(last);
}

QWidget* BoardPage::first_focus() { return ui_->view; }

/// The newest value of the cell in hand.
std::optional<Selection> BoardPage::number_in_hand() const
{
    const BoardCell* cell = ui_->view->board_model().cell(ui_->view->currentIndex());
    const Trend* trend = cell && shown_ ? shown_->find_trend(cell->quantity, cell->place) : nullptr;
    if (!trend || trend->points.empty())
        return std::nullopt;
    Selection selection = with_reading(workplace().selection(), *shown_, trend->points.back().reading);
    selection.quantity = cell->quantity;
    selection.place = cell->place;
    selection.estimate.clear();
    return selection;
}

void BoardPage::print(QPrinter& printer)
{
    printer.setResolution(dots_per_inch);
    QPainter painter(&printer);
    const EngineChoice* engine = workplace().find_engine(workplace().selection().engine);
    const VesselChoice* vessel = workplace().find_vessel(workplace().selection().vessel);
    const QString what = tr("%1 of %2, all cylinders, %3")
                             .arg(engine ? engine->name : QString(), vessel ? vessel->name : QString(),
                                  range_text(workplace().selection().range));
    paint_board_page(painter, QRectF(QPointF(0, 0), printer.pageRect(QPrinter::DevicePixel).size()),
                     ui_->view->board_model().board(), what);
}

void BoardPage::copy()
{
    auto* copied = new QMimeData;
    copied->setText(as_text(ui_->view->board_model()));
    copied->setImageData(ui_->view->grab().toImage());
    QGuiApplication::clipboard()->setMimeData(copied);
}

} // namespace evenstroke
