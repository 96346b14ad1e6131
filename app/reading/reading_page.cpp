// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/reading/reading_page.h"

#include "app/board/board_page.h"
#include "app/desk/number_text.h"
#include "app/desk/reading_in_hand.h"
#include "app/desk/workplace.h"
#include "app/reading/figure_plot.h"
#include "app/reading/review_view.h"
#include "core/explanation/cautions.h"
#include "ui_reading_page.h"

#include <QHeaderView>
#include <QKeyEvent>

#include <array>

namespace evenstroke {

namespace {

std::array<QLineEdit*, 5> trial_boxes(const Ui::ReadingPage& ui)
{
    return {ui.coolant_box, ui.deposit_box, ui.deposit_lambda_box, ui.scale_box, ui.scale_lambda_box};
}

} // namespace

ReadingPage::ReadingPage(Workplace& place, QWidget* parent) : Page(place, parent), ui_(std::make_unique<Ui::ReadingPage>())
{
    ui_->setupUi(this);
    ui_->sheet->setAccessibleName(tr("Workings of the row in hand"));
    ui_->side_table->setModel(&table_);
    ui_->side_table->verticalHeader()->hide();
    ui_->side_table->verticalHeader()->setDefaultSectionSize(24);
    ui_->side_table->horizontalHeader()->setSectionResizeMode(QHeaderView::ResizeToContents);
    ui_->side_table->hide();
    connect_all();
    keep_room_for_bold(*this);
}

ReadingPage::~ReadingPage() = default;

void ReadingPage::connect_all()
{
    const auto buttons = side_buttons();
    for (std::size_t i = 0; i < buttons.size(); ++i)
        connect(buttons[i], &QPushButton::clicked, this, [this, i] { choose_side(static_cast<Side>(i)); });
    connect(&workplace(), &Workplace::history_changed, this, [this] { cards_of_.clear(); }); // cards come and go
    connect(ui_->view, &ReviewView::row_chosen, this, &ReadingPage::take_row);
    connect(ui_->view, &ReviewView::trend_asked, this, &ReadingPage::open_trend);
    connect(ui_->view, &ReviewView::workings_asked, this, &ReadingPage::open_workings);
    connect(ui_->open_button, &QPushButton::clicked, this, &ReadingPage::open_workings);
    connect(ui_->copy_data_button, &QPushButton::clicked, this, &ReadingPage::copy);
    connect(ui_->copy_picture_button, &QPushButton::clicked, this, &ReadingPage::copy_picture);
    connect(ui_->table_button, &QPushButton::toggled, this, [this] { show_side(); });
    connect(ui_->iron_button, &QPushButton::toggled, this, [this] { show_side(); });
    connect(ui_->part_button, &QPushButton::clicked, this, [this] {
        ++wall_;
        show_side();
    });
    ui_->deposit_lambda_box->setPlaceholderText(number_text(usual_deposit_conductivity, 1));
    ui_->scale_lambda_box->setPlaceholderText(number_text(usual_scale_conductivity, 1));
    for (QLineEdit* box : trial_boxes(*ui_)) {
        connect(box, &QLineEdit::textChanged, this, [this] { show_side(); });
        box->installEventFilter(this);
        box->setMaximumWidth(72);
    }
    for (FigurePlot* plot : {ui_->upper_plot, ui_->lower_plot})
        connect(plot, &FigurePlot::dot_chosen, this, [this, plot](std::size_t dot) {
            if (side_ == Side::load && plot->figure().dots[dot].reading)
                workplace().select(with_reading(workplace().selection(), *judgement_, *plot->figure().dots[dot].reading));
        });
}

ReviewView& ReadingPage::view() { return *ui_->view; }

QWidget* ReadingPage::first_focus() { return ui_->view->isHidden() ? static_cast<QWidget*>(this) : ui_->view; }

void ReadingPage::refresh()
{
    const auto judgement = workplace().judgement();
    const auto reading = judgement ? reading_in_hand(*judgement, workplace().selection()) : std::nullopt;
    if (!reading) {
        judgement_ = judgement;
        reading_.reset();
        show_nothing();
        return;
    }
    if (judgement != judgement_ || reading != reading_ || !review_) {
        // The model holds on to the old review until it has the new one.
        judgement_ = judgement;
        reading_ = reading;
        review_ = std::make_shared<const ReadingReview>(review_reading(*judgement_, *reading_));
        ui_->view->show_review(review_, judgement_, corrections_here());
        emit foot_changed();
    }
    QStringList cautions;
    for (const std::string& name : review_->cautions)
        if (const Caution* caution = find_caution(name))
            cautions.append(to_qstring(caution->title));
    ui_->cautions->setText(tr("Caution: %1").arg(cautions.join(QStringLiteral(" · "))));
    ui_->cautions->setVisible(!cautions.isEmpty());
    const bool came_up = ui_->body->isHidden();
    ui_->body->show();
    ui_->empty->hide();
    if (came_up) // the keys go to the list as soon as there is one
        ui_->view->setFocus();
    const Selection& selection = workplace().selection();
    const auto named = selection.quantity ? std::optional(std::pair(*selection.quantity, selection.place)) : std::nullopt;
    if (named && named != seen_) // somebody chose it elsewhere: the row in hand follows
        if (const int row = ui_->view->review_model().row_of(*selection.quantity, selection.place); row >= 0)
            ui_->view->go_to(row);
    seen_ = named;
    show_side();
}

/// Of this engine's own reading; what the ship shares is corrected with the ship's.
std::vector<storage::Correction> ReadingPage::corrections_here() const
{
    if (!workplace().history())
        return {};
    auto corrections = storage::ReadingStore(*workplace().history()).corrections(judgement_->record->readings[*reading_].id);
    return corrections ? std::move(corrections).value() : std::vector<storage::Correction>();
}

void ReadingPage::show_nothing()
{
    review_.reset();
    sheet_ = {};
    ui_->view->show_review(nullptr, nullptr);
    ui_->body->hide();
    ui_->cautions->hide();
    ui_->empty->setText(empty_words(workplace()));
    ui_->empty->show();
}

/// The row in hand is what the other pages look at too.
void ReadingPage::take_row()
{
    const ReviewRow* row = ui_->view->row_in_hand();
    if (row && row->line && row->line->quantity && !row->line->spread) {
        Selection selection = workplace().selection();
        selection.quantity = row->line->quantity;
        selection.place = row->line->place;
        seen_ = std::pair(*selection.quantity, selection.place);
        workplace().step_to(selection);
    }
    show_side();
}

void ReadingPage::open_trend()
{
    const ReviewRow* row = ui_->view->row_in_hand();
    if (!row || !row->line || !row->line->quantity || !judgement_)
        return;
    Selection selection = workplace().selection();
    selection.quantity = row->line->quantity;
    if (!row->line->spread)
        selection.place = row->line->place;
    selection = with_reading(selection, *judgement_, *reading_);
    selection.view = selection.place.kind == Place::Kind::cylinder ? ValueView::apart : ValueView::deviation;
    workplace().open_page(QStringLiteral("trend"), selection);
}

std::optional<Selection> ReadingPage::number_in_hand() const
{
    const ReviewRow* row = ui_->view->row_in_hand();
    if (!row || !row->line || !row->line->has_workings || !reading_)
        return std::nullopt;
    Selection selection = with_reading(workplace().selection(), *judgement_, *reading_);
    selection.estimate.clear();
    if (row->line->estimate && *row->line->estimate < review_->power.estimates.size())
        selection.estimate = to_qstring(review_->power.estimates[*row->line->estimate].name);
    else if (row->line->quantity) {
        selection.quantity = row->line->quantity;
        selection.place = row->line->place;
    } else
        return std::nullopt;
    return selection;
}

void ReadingPage::open_workings()
{
    if (const auto wanted = number_in_hand())
        workplace().open_page(QStringLiteral("workings"), *wanted);
}

void ReadingPage::walk_readings(int step)
{
    if (judgement_)
        workplace().step_to(with_reading_step(workplace().selection(), *judgement_, step));
}

void ReadingPage::choose_side(Side side)
{
    side_ = side;
    show_side();
}

void ReadingPage::keyPressEvent(QKeyEvent* event)
{
    if (event->modifiers() & ~Qt::KeypadModifier) {
        Page::keyPressEvent(event);
        return;
    }
    switch (event->key()) {
    case Qt::Key_1:
    case Qt::Key_2:
    case Qt::Key_3:
    case Qt::Key_4:
    case Qt::Key_5: choose_side(static_cast<Side>(event->key() - Qt::Key_1)); return;
    case Qt::Key_PageUp: walk_readings(-1); return;
    case Qt::Key_PageDown: walk_readings(1); return;
    case Qt::Key_A: ui_->table_button->toggle(); return;
    case Qt::Key_Z: ui_->iron_button->toggle(); return;
    case Qt::Key_J: ui_->part_button->click(); return;
    default: Page::keyPressEvent(event);
    }
}

/// Escape and Enter leave a box of the trial for the list.
bool ReadingPage::eventFilter(QObject* watched, QEvent* event)
{
    if (event->type() == QEvent::KeyPress) {
        const int key = static_cast<QKeyEvent*>(event)->key();
        if (key == Qt::Key_Escape || key == Qt::Key_Return || key == Qt::Key_Enter) {
            ui_->view->setFocus();
            return true;
        }
    }
    return Page::eventFilter(watched, event);
}

void ReadingPage::changeEvent(QEvent* event)
{
    if (event->type() == QEvent::StyleChange && review_ && isVisible())
        show_side();
    Page::changeEvent(event);
}

QString ReadingPage::foot_text() const
{
    return judgement_ && reading_ ? tr("%1 · Page Up and Page Down: other readings").arg(reading_words(*judgement_, *reading_)) : QString();
}

} // namespace evenstroke
