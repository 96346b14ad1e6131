// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/cards/cards_page.h"

#include "app/board/board_page.h"
#include "app/cards/card_plot.h"
#include "app/cards/card_words.h"
#include "app/cards/cylinder_strip.h"
#include "app/desk/flow_layout.h"
#include "app/desk/number_text.h"
#include "app/desk/reading_in_hand.h"
#include "app/desk/sheet_page.h"
#include "app/desk/workplace.h"
#include "ui_cards_page.h"

#include <QHeaderView>
#include <QKeyEvent>
#include <QPushButton>
#include <QTextDocument>

#include <algorithm>

namespace evenstroke {

namespace {

constexpr int result_row = 20, narrow_left = 488, widest_left = 600;
constexpr double zoom_step = 0.7;

} // namespace

CardsPage::CardsPage(Workplace& place, QWidget* parent) : Page(place, parent), ui_(std::make_unique<Ui::CardsPage>())
{
    ui_->setupUi(this);
    make_views();
    ui_->results->setModel(&rows_);
    ui_->table->setModel(&table_);
    for (QTableView* view : {ui_->results, ui_->table}) {
        view->verticalHeader()->hide();
        view->verticalHeader()->setMinimumSectionSize(result_row);
        view->verticalHeader()->setDefaultSectionSize(result_row);
        view->horizontalHeader()->setSectionResizeMode(QHeaderView::ResizeToContents);
        view->horizontalHeader()->setDefaultAlignment(Qt::AlignRight | Qt::AlignVCenter);
    }
    ui_->results->horizontalHeader()->setSectionResizeMode(CardRowsModel::title, QHeaderView::Stretch);
    ui_->results->horizontalHeader()->setHighlightSections(false);
    ui_->results->setWordWrap(false);
    ui_->table->hide();
    ui_->done->hide();
    for (QHBoxLayout* row : {ui_->deeds, ui_->views, ui_->actions})
        let_flow(*row);
    connect_all();
    keep_room_for_bold(*this);
}

CardsPage::~CardsPage() = default;

void CardsPage::make_views()
{
    for (int i = 0; i < card_view_count; ++i) {
        auto* button = new QPushButton(QStringLiteral("%1 %2").arg(i + 1).arg(card_view_name(static_cast<CardView>(i))), this);
        button->setProperty("worded", true);
        button->setCheckable(true);
        ui_->views->addWidget(button);
        view_buttons_[static_cast<std::size_t>(i)] = button;
        connect(button, &QPushButton::clicked, this, [this, i] { choose_view(static_cast<CardView>(i)); });
    }
}

void CardsPage::connect_all()
{
    connect(&run_, &CardRun::finished, this, &CardsPage::take_found);
    connect(&run_, &CardRun::progressed, this, &CardsPage::show_progress);
    connect(ui_->strip, &CylinderStrip::cylinder_chosen, this, &CardsPage::choose_cylinder);
    connect(ui_->plot, &CardPlot::cursor_moved, this, [this] { ui_->cursor_words->setText(ui_->plot->cursor_words()); });
    connect(ui_->trust, &QTextBrowser::anchorClicked, this, [this](const QUrl& link) { open_remark(link.path().toInt()); });
    connect(ui_->table_button, &QPushButton::toggled, this, [this] { show_view(); });
    connect(ui_->copy_picture_button, &QPushButton::clicked, this, &CardsPage::copy_picture);
    connect(ui_->copy_data_button, &QPushButton::clicked, this, &CardsPage::copy);
    connect(ui_->save_button, &QPushButton::clicked, this, &CardsPage::ask_file);
    connect(ui_->accept_button, &QPushButton::clicked, this, &CardsPage::ask_accept);
    connect(ui_->healthy_button, &QPushButton::clicked, this, &CardsPage::ask_healthy);
    for (QPushButton* button : {ui_->withdraw_button, ui_->empty_restore_button})
        connect(button, &QPushButton::clicked, this, &CardsPage::ask_withdraw);
    connect(ui_->newest_button, &QPushButton::clicked, this, &CardsPage::open_newest);
    for (QPushButton* button : {ui_->bring_button, ui_->empty_bring_button})
        connect(button, &QPushButton::clicked, this, &CardsPage::bring_in);
}

CardPlot& CardsPage::plot() { return *ui_->plot; }

QString CardsPage::sentence() const
{
    return cards_ ? tr("Cards of {reading}, {place}, {engine} of {vessel}.") : tr("Cards of {reading}, {engine} of {vessel}.");
}

/// The reading that is chosen; where none is, the newest one that has cards.
std::optional<std::size_t> CardsPage::settle_reading()
{
    const Selection& selection = workplace().selection();
    const auto with_cards = stored_.readings();
    if (selection.reading.isEmpty() && !with_cards.empty())
        workplace().step_to(with_reading(selection, *judgement_, with_cards.back()));
    return reading_in_hand(*judgement_, workplace().selection());
}

void CardsPage::refresh()
{
    const auto judgement = workplace().judgement();
    if (!judgement || judgement->readings.empty() || !workplace().history()) {
        judgement_ = judgement;
        show_instead(empty_words(workplace()), false);
        return;
    }
    const auto stored = find_cards(*workplace().history(), *judgement);
    if (!stored) {
        show_instead(to_qstring(stored.error().text()), false);
        return;
    }
    const bool same = judgement == judgement_ && stored.value() == stored_;
    judgement_ = judgement;
    stored_ = stored.value();
    const auto reading = settle_reading();
    const auto with_cards = stored_.readings();
    if (!reading || std::find(with_cards.begin(), with_cards.end(), *reading) == with_cards.end()) {
        run_.stop();
        reading_.reset();
        show_instead(withdrawn_in_hand() ? tr("This reading has no cards in use.") + u' ' + withdrawn_words(*judgement_, *withdrawn_in_hand())
                     : stored_.cards.empty()
                         ? tr("Here stand the indicator cards of a reading: pressure over crank angle, one a cylinder. No cards of this "
                              "engine are stored yet. Bring in the files of the indicator with key X, or put them as "
                              "cards/READING/CYLINDER.csv into the engine's folder and take it in on the page History (key H).")
                         : tr("This reading has no cards. Page Up leads to earlier ones that have."),
                     !stored_.cards.empty());
        return;
    }
    if (same && reading_ == reading && (cards_ || run_.busy())) {
        if (cards_)
            show_cards(); // another cylinder, or another theme
        return;
    }
    // The same cards judged anew stay up until the new evaluation is there.
    if (reading_ != reading || (cards_ && cards_->engine().id != judgement_->record->engine.id))
        cards_.reset();
    if (reading_ != reading)
        say({}); // what was said of another reading
    reading_ = reading;
    run_.start(workplace().path(), judgement_, *reading, stored_);
    show_progress();
    show_deeds();
}

void CardsPage::show_progress()
{
    if (cards_)
        return;
    ui_->body->hide();
    ui_->empty->hide();
    ui_->newest_button->hide();
    ui_->empty_bring_button->hide();
    ui_->empty_restore_button->hide();
    ui_->cautions->hide();
    ui_->progress->setMaximum(std::max(1, run_.total()));
    ui_->progress->setValue(run_.done());
    ui_->progress_words->setText(run_.total() > 0 ? tr("evaluating card %1 of %2").arg(run_.done()).arg(run_.total()) : tr("reading the cards"));
    ui_->progress->show();
    ui_->progress_words->show();
}

void CardsPage::take_found()
{
    cards_ = run_.found();
    if (!cards_) {
        show_instead(run_.problem() ? to_qstring(run_.problem()->text()) : tr("The cards could not be read."), false);
        return;
    }
    show_cards();
    emit sentence_changed();
    emit foot_changed();
}

void CardsPage::show_instead(const QString& words, bool offer_newest)
{
    cards_.reset();
    for (QWidget* widget : std::initializer_list<QWidget*>{ui_->body, ui_->progress, ui_->progress_words, ui_->cautions})
        widget->hide();
    ui_->empty->setText(words);
    ui_->empty->show();
    ui_->newest_button->setVisible(offer_newest);
    ui_->empty_bring_button->setVisible(judgement_ && !judgement_->readings.empty() && !workplace().read_only());
    ui_->empty_restore_button->setVisible(!workplace().read_only() && withdrawn_in_hand());
}

void CardsPage::show_cards()
{
    for (QWidget* widget : std::initializer_list<QWidget*>{ui_->empty, ui_->newest_button, ui_->empty_bring_button,
                                                           ui_->empty_restore_button, ui_->progress, ui_->progress_words})
        widget->hide();
    ui_->body->show();
    const Place place = workplace().selection().place;
    if (place.kind == Place::Kind::cylinder)
        cylinder_ = place.number;
    else if (cylinder_ == 0 || !cards_->find(cylinder_))
        cylinder_ = worst_cylinder(*cards_).value_or(cards_->review.cards.empty() ? 1 : cards_->review.cards.front().cylinder);
    if (place != Place::cylinder(cylinder_)) { // the sentence names the one in hand
        Selection selection = workplace().selection();
        selection.place = Place::cylinder(cylinder_);
        workplace().step_to(selection);
    }
    show_cylinder();
}

void CardsPage::show_cylinder()
{
    ui_->strip->show_cards(cards_, cylinder_);
    const indicator::ReviewedCard* card = cards_->find(cylinder_);
    QFont font = type(TypeSize::body);
    font.setPointSizeF(11.0);
    ui_->headline->setFont(font);
    ui_->headline->setText(card ? trust_headline(*cards_, *card)
                           : withdrawn_in_hand()
                               ? withdrawn_words(*judgement_, *withdrawn_in_hand())
                               : tr("%1 has no card with this reading.").arg(place_title(cards_->engine(), Place::cylinder(cylinder_))));
    ui_->trust->document()->setDocumentMargin(0);
    ui_->trust->document()->setDefaultStyleSheet(sheet_style(theme()) + QStringLiteral("a { color: %1; }").arg(theme().watch.name()));
    ui_->trust->setHtml(card ? QStringLiteral("<body>%1</body>").arg(trust_html(*cards_, *card)) : QString());
    ui_->trust->setAccessibleDescription(card ? trust_text(*cards_, *card) : QString());
    rows_.show_rows(card ? card_rows(*card) : std::vector<CardRow>());
    ui_->results->setVisible(rows_.rowCount() > 0);
    const bool by_hand = card && std::any_of(card->values.begin(), card->values.end(), [](const indicator::CardValue& value) { return value.hand_read; });
    ui_->results->setColumnHidden(CardRowsModel::hand_read, !by_hand);
    const bool compared = card && card->comparison;
    ui_->results->setColumnHidden(CardRowsModel::healthy, !compared);
    ui_->results->setColumnHidden(CardRowsModel::difference, !compared);
    ui_->results->setFixedHeight(ui_->results->horizontalHeader()->sizeHint().height() + rows_.rowCount() * result_row + 2);
    show_view();
    show_deeds();
}

void CardsPage::show_view()
{
    if (!cards_)
        return;
    for (int i = 0; i < card_view_count; ++i)
        view_buttons_[static_cast<std::size_t>(i)]->setChecked(view_ == static_cast<CardView>(i));
    const CardPicture picture = make_card_picture(*cards_, cylinder_, view_);
    const bool as_table = ui_->table_button->isChecked(), empty = !picture.empty.isEmpty();
    ui_->plot->show_picture(picture, theme());
    ui_->plot->setVisible(!as_table && !empty);
    ui_->table->setVisible(as_table);
    ui_->no_plot->setVisible(!as_table && empty);
    ui_->no_plot->setText(picture.empty);
    ui_->sentence->setText(picture.sentence);
    ui_->sentence->setVisible(!picture.sentence.isEmpty() && !empty);
    ui_->cursor_words->setVisible(!as_table && !empty);
    ui_->difference_question->setText(view_ == CardView::difference ? tr("What differs from the healthy card?")
                                                                    : tr("This card: %1").arg(card_view_name(view_)));
    if (as_table)
        table_.show_table(card_table(*cards_, cylinder_));
    emit foot_changed();
}

void CardsPage::say(const QString& words)
{
    ui_->done->setText(words);
    ui_->done->setVisible(!words.isEmpty());
}

void CardsPage::choose_cylinder(int cylinder)
{
    cylinder_ = cylinder;
    Selection selection = workplace().selection();
    selection.place = Place::cylinder(cylinder);
    workplace().step_to(selection);
    if (cards_)
        show_cylinder();
}

void CardsPage::walk_cylinders(int step)
{
    if (!cards_)
        return;
    const int count = cards_->engine().cylinders;
    choose_cylinder((cylinder_ - 1 + step + count) % count + 1);
}

void CardsPage::walk_readings(int step)
{
    if (!judgement_ || stored_.cards.empty())
        return;
    const auto with_cards = stored_.readings();
    const auto here = reading_in_hand(*judgement_, workplace().selection());
    const auto at = std::lower_bound(with_cards.begin(), with_cards.end(), here.value_or(0));
    auto to = (at - with_cards.begin()) + step;
    if (step > 0 && at != with_cards.end() && here && *at != *here) // stood between two that have cards
        --to;
    to = std::clamp<std::ptrdiff_t>(to, 0, static_cast<std::ptrdiff_t>(with_cards.size()) - 1);
    workplace().step_to(with_reading(workplace().selection(), *judgement_, with_cards[static_cast<std::size_t>(to)]));
}

void CardsPage::open_newest()
{
    if (judgement_ && !stored_.cards.empty())
        workplace().select(with_reading(workplace().selection(), *judgement_, stored_.readings().back()));
}

void CardsPage::choose_view(CardView view)
{
    view_ = view;
    show_view();
}

/// The remark's place on the curve, near enough to see it.
void CardsPage::open_remark(int number)
{
    ui_->table_button->setChecked(false);
    choose_view(CardView::pressure);
    ui_->plot->show_spot(number);
}

void CardsPage::bring_in() { workplace().open_page(QStringLiteral("card-files")); }

void CardsPage::keyPressEvent(QKeyEvent* event)
{
    if (event->modifiers() & ~(Qt::KeypadModifier | Qt::ShiftModifier)) {
        Page::keyPressEvent(event);
        return;
    }
    const double steps = event->modifiers() & Qt::ShiftModifier ? 10.0 : 1.0;
    if (event->key() >= Qt::Key_1 && event->key() < Qt::Key_1 + card_view_count)
        return choose_view(static_cast<CardView>(event->key() - Qt::Key_1));
    switch (event->key()) {
    case Qt::Key_Left:
    case Qt::Key_Up: walk_cylinders(-1); return;
    case Qt::Key_Right:
    case Qt::Key_Down: walk_cylinders(1); return;
    case Qt::Key_PageUp: walk_readings(-1); return;
    case Qt::Key_PageDown: walk_readings(1); return;
    case Qt::Key_Comma:
    case Qt::Key_Less:
    case Qt::Key_Semicolon: ui_->plot->move_cursor(-steps); return;
    case Qt::Key_Period:
    case Qt::Key_Greater:
    case Qt::Key_Colon: ui_->plot->move_cursor(steps); return;
    case Qt::Key_Plus:
    case Qt::Key_Equal: ui_->plot->zoom(zoom_step); return;
    case Qt::Key_Minus: ui_->plot->zoom(1.0 / zoom_step); return;
    case Qt::Key_0: ui_->plot->show_all(); return;
    case Qt::Key_A: ui_->table_button->toggle(); return;
    case Qt::Key_Z: ask_accept(); return;
    case Qt::Key_J: ask_healthy(); return;
    case Qt::Key_X: bring_in(); return;
    case Qt::Key_Delete: ask_withdraw(); return;
    default: Page::keyPressEvent(event);
    }
}

void CardsPage::changeEvent(QEvent* event)
{
    if (event->type() == QEvent::StyleChange && cards_ && isVisible())
        show_cards();
    Page::changeEvent(event);
}

void CardsPage::resizeEvent(QResizeEvent* event)
{
    Page::resizeEvent(event);
    ui_->left->setFixedWidth(std::clamp(narrow_left + (width() - 1190) * 4 / 10, 400, widest_left));
}

QString CardsPage::foot_text() const
{
    return judgement_ && reading_ ? tr("%1 · Page Up and Page Down: other cards · comma and full stop: cursor · + − 0: zoom").arg(reading_words(*judgement_, *reading_))
                                  : QString();
}

} // namespace evenstroke
