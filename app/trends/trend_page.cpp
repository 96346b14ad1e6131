// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/trends/trend_page.h"

#include "app/board/board_page.h"
#include "app/desk/flow_layout.h"
#include "app/desk/number_text.h"
#include "app/desk/reading_in_hand.h"
#include "app/desk/sentence_choices.h"
#include "app/desk/theme.h"
#include "app/desk/workplace.h"
#include "app/trends/trend_plot.h"
#include "ui_trend_page.h"

#include <QEvent>
#include <QHeaderView>
#include <QKeyEvent>

#include <algorithm>
#include <utility>
#include <array>

namespace evenstroke {

namespace {

std::array<QPushButton*, 4> view_buttons(const Ui::TrendPage& ui)
{
    return {ui.raw_button, ui.corrected_button, ui.deviation_button, ui.apart_button};
}

} // namespace

TrendPage::TrendPage(Workplace& place, QWidget* parent) : Page(place, parent), ui_(std::make_unique<Ui::TrendPage>())
{
    ui_->setupUi(this);
    ui_->table->setModel(&table_);
    ui_->table->verticalHeader()->hide();
    ui_->table->verticalHeader()->setDefaultSectionSize(24);
    ui_->table->horizontalHeader()->setSectionResizeMode(QHeaderView::ResizeToContents);
    ui_->table->horizontalHeader()->setDefaultAlignment(Qt::AlignRight | Qt::AlignVCenter);
    ui_->table->hide();
    ui_->saved->hide();
    let_flow(*ui_->views);
    let_flow(*ui_->questions);
    connect_buttons();
    keep_room_for_bold(*this);
}

TrendPage::~TrendPage() = default;

void TrendPage::connect_buttons()
{
    const auto buttons = view_buttons(*ui_);
    for (int i = 0; i < 4; ++i)
        connect(buttons[static_cast<std::size_t>(i)], &QPushButton::clicked, this, [this, i] { choose_view(i); });
    for (QPushButton* button : {ui_->load_button, ui_->uncertainty_button, ui_->opinions_button})
        connect(button, &QPushButton::toggled, this, [this] {
            TrendExtras extras;
            extras.load = ui_->load_button->isChecked();
            extras.uncertainty = ui_->uncertainty_button->isChecked();
            extras.fixed_limits = ui_->opinions_button->isChecked();
            ui_->plot->show_extras(extras);
            show_side(ui_->plot->picture());
        });
    connect(ui_->table_button, &QPushButton::toggled, this, &TrendPage::show_table);
    connect(ui_->copy_picture_button, &QPushButton::clicked, this, &TrendPage::copy_picture);
    connect(ui_->copy_data_button, &QPushButton::clicked, this, &TrendPage::copy);
    connect(ui_->save_button, &QPushButton::clicked, this, &TrendPage::ask_file);
    const std::pair<QPushButton*, QString> pages[] = {{ui_->causes_button, QStringLiteral("causes")},
                                                      {ui_->detection_button, QStringLiteral("detection")},
                                                      {ui_->sisters_button, QStringLiteral("sisters")}};
    for (const auto& [button, page] : pages)
        connect(button, &QPushButton::clicked, this, [this, page = page] { workplace().open_page(page); });
    connect(ui_->note_button, &QPushButton::clicked, this, &TrendPage::ask_note);
    connect(ui_->plot, &TrendPlot::reading_chosen, this, &TrendPage::choose_reading);
    connect(ui_->table->selectionModel(), &QItemSelectionModel::currentRowChanged, this,
            [this](const QModelIndex& current) {
                if (current.isValid() && ui_->table->hasFocus())
                    choose_reading(table_.reading_of(current.row()));
            });
}

TrendPlot& TrendPage::plot() { return *ui_->plot; }

QString TrendPage::sentence() const
{
    QString words = workplace().selection().place.kind == Place::Kind::engine
                        ? tr("{quantity} of {engine}, {vessel}, {view}, {range}.")
                        : tr("{quantity} of {place}, {engine} of {vessel}, {view}, {range}.");
    // Where the view wished for does not exist for this quantity, the sentence says what is shown.
    return shown_instead_.isEmpty() ? words : words.replace(QStringLiteral("{view}"), shown_instead_);
}

const Trend* TrendPage::trend() const
{
    const Selection& selection = workplace().selection();
    return judgement_ && selection.quantity ? judgement_->find_trend(*selection.quantity, selection.place) : nullptr;
}

void TrendPage::refresh()
{
    judgement_ = workplace().judgement();
    if (!judgement_ || judgement_->readings.empty()) {
        show_nothing();
        return;
    }
    const Selection wanted = settled(workplace().selection(), *judgement_);
    if (wanted != workplace().selection())
        workplace().step_to(wanted);
    const Trend* shown = trend();
    if (!shown || shown->points.empty()) {
        show_nothing();
        return;
    }
    const TrendPicture picture = make_trend_picture(*judgement_, wanted);
    ui_->empty->hide();
    ui_->body->show();
    ui_->plot->show_picture(picture, theme());
    table_.show_trend(judgement_, shown);
    show_words(picture);
    show_views(*shown, picture);
    show_side(picture);
    show_reading();
    show_note_button(picture);
}

/// Only where a flag stands that something can be said of.
void TrendPage::show_note_button(const TrendPicture& picture)
{
    ui_->note_button->setVisible(picture.flag_index.has_value() && !workplace().read_only());
    if (picture.flag_index)
        ui_->note_button->setText(judgement_->flags[*picture.flag_index].severity == Level::ask ? tr("answer the question… (O)")
                                                                                               : tr("what was found… (O)"));
}

void TrendPage::show_nothing()
{
    table_.show_trend(nullptr, nullptr);
    ui_->body->hide();
    ui_->headline->clear();
    ui_->second_line->clear();
    ui_->level_words->clear();
    ui_->level_mark->clear();
    ui_->empty->setText(judgement_ && !judgement_->readings.empty()
                            ? tr("This value was never read. Choose another quantity (key Q) or place (key L).")
                            : empty_words(workplace()));
    ui_->empty->show();
}

void TrendPage::show_words(const TrendPicture& picture)
{
    QFont font = type(TypeSize::body);
    font.setPointSizeF(11.0);
    ui_->headline->setFont(font);
    ui_->headline->setText(picture.headline);
    ui_->second_line->setText(picture.second_line);
    ui_->second_line->setVisible(!picture.second_line.isEmpty());
    ui_->level_words->setText(picture.level_words);
    ui_->level_words->setStyleSheet(QStringLiteral("color: %1").arg(theme().level_colour(picture.level).name()));
    ui_->level_mark->setPixmap(has_mark(picture.level) ? mark_pixmap(picture.level, 14, devicePixelRatioF())
                                                       : QPixmap());
    QStringList flags;
    for (const PictureFlag& flag : picture.flags)
        if (!flag.standing)
            flags.append(flag.words);
    ui_->flags->setText(flags.join(u'\n'));
    ui_->flags->setVisible(!flags.isEmpty());
}

void TrendPage::show_views(const Trend& shown, const TrendPicture& picture)
{
    const std::vector<ValueView> possible = possible_views(shown);
    const auto buttons = view_buttons(*ui_);
    for (std::size_t i = 0; i < buttons.size(); ++i) {
        const auto view = static_cast<ValueView>(i);
        buttons[i]->setEnabled(std::find(possible.begin(), possible.end(), view) != possible.end());
        buttons[i]->setChecked(picture.view == view);
    }
    const QString instead = picture.view == workplace().selection().view ? QString() : picture.view_words;
    if (std::exchange(shown_instead_, instead) != instead)
        emit sentence_changed();
}

std::optional<std::size_t> TrendPage::chosen_reading() const
{
    const std::string& id = workplace().selection().reading.toStdString();
    if (!judgement_ || id.empty())
        return std::nullopt;
    const std::vector<Reading>& readings = judgement_->record->readings;
    for (std::size_t i = 0; i < readings.size(); ++i)
        if (readings[i].id == id)
            return i;
    return std::nullopt;
}

void TrendPage::show_reading()
{
    const Trend* shown = trend();
    if (!shown)
        return;
    const auto chosen = chosen_reading();
    ui_->plot->choose(chosen);
    QString words = chosen ? point_words(*judgement_, *shown, *chosen) : QString();
    if (words.isEmpty())
        words = point_words(*judgement_, *shown, shown->points.back().reading);
    ui_->reading->setText(words);
    if (chosen)
        if (const int row = table_.row_of(*chosen); row >= 0)
            ui_->table->setCurrentIndex(table_.index(row, 0));
}

/// The point in hand, else the newest one.
std::optional<Selection> TrendPage::number_in_hand() const
{
    const Trend* shown = trend();
    if (!shown || shown->points.empty())
        return std::nullopt;
    const auto chosen = chosen_reading();
    const bool read = chosen && std::any_of(shown->points.begin(), shown->points.end(),
                                            [&](const TrendPoint& point) { return point.reading == *chosen; });
    Selection selection = with_reading(workplace().selection(), *judgement_, read ? *chosen : shown->points.back().reading);
    selection.estimate.clear();
    return selection;
}

void TrendPage::choose_view(int number)
{
    const auto view = static_cast<ValueView>(number);
    Selection selection = workplace().selection();
    if (!view_buttons(*ui_)[static_cast<std::size_t>(number)]->isEnabled())
        return;
    selection.view = view;
    workplace().step_to(selection);
    refresh();
}

void TrendPage::choose_reading(std::size_t reading)
{
    Selection selection = workplace().selection();
    selection.reading = to_qstring(judgement_->record->readings.at(reading).id);
    workplace().step_to(selection);
    show_reading();
}

void TrendPage::walk_readings(int step)
{
    const Trend* shown = trend();
    if (!shown || shown->points.empty())
        return;
    const auto chosen = chosen_reading();
    const auto& points = shown->points;
    auto at = static_cast<std::ptrdiff_t>(points.size()) - 1;
    if (chosen) {
        const auto found = std::find_if(points.begin(), points.end(),
                                        [&](const TrendPoint& point) { return point.reading >= *chosen; });
        at = std::min(found - points.begin(), at) + step;
    }
    at = std::clamp<std::ptrdiff_t>(at, 0, static_cast<std::ptrdiff_t>(points.size()) - 1);
    choose_reading(points[static_cast<std::size_t>(at)].reading);
}

void TrendPage::walk_places(int step)
{
    const Trend* shown = trend();
    if (!shown)
        return;
    std::vector<Place> places;
    for (const Trend& each : judgement_->trends)
        if (each.quantity == shown->quantity)
            places.push_back(each.place);
    const auto here = std::find(places.begin(), places.end(), shown->place) - places.begin();
    const auto count = static_cast<std::ptrdiff_t>(places.size());
    Selection selection = workplace().selection();
    selection.place = places[static_cast<std::size_t>((here + step + count) % count)];
    workplace().step_to(selection);
}

void TrendPage::walk_quantities(int step)
{
    const Trend* shown = trend();
    if (!shown)
        return;
    std::vector<QuantityId> quantities;
    for (const Trend& each : judgement_->trends)
        if (quantities.empty() || quantities.back() != each.quantity)
            quantities.push_back(each.quantity);
    const auto here = std::find(quantities.begin(), quantities.end(), shown->quantity) - quantities.begin();
    const auto count = static_cast<std::ptrdiff_t>(quantities.size());
    Selection selection = workplace().selection();
    selection.quantity = quantities[static_cast<std::size_t>((here + step + count) % count)];
    workplace().step_to(settled(selection, *judgement_));
}

void TrendPage::show_table(bool shown)
{
    ui_->table->setVisible(shown);
    ui_->plot->setVisible(!shown);
    if (shown) {
        ui_->table->setFocus();
        show_reading();
    } else {
        setFocus();
    }
}

void TrendPage::keyPressEvent(QKeyEvent* event)
{
    if (ui_->table->isVisible()) {
        if (event->key() == Qt::Key_Escape)
            return ui_->table_button->setChecked(false);
        for (const int key : {Qt::Key_Left, Qt::Key_Right, Qt::Key_Up, Qt::Key_Down, Qt::Key_PageUp, Qt::Key_PageDown})
            if (event->key() == key)
                return event->accept(); // the table has come to its end; it does not turn to another quantity
    }
    switch (event->key()) {
    case Qt::Key_1:
    case Qt::Key_2:
    case Qt::Key_3:
    case Qt::Key_4: choose_view(event->key() - Qt::Key_1); return;
    case Qt::Key_5: ui_->load_button->toggle(); return;
    case Qt::Key_6: ui_->uncertainty_button->toggle(); return;
    case Qt::Key_7: ui_->opinions_button->toggle(); return;
    case Qt::Key_A: ui_->table_button->toggle(); return;
    case Qt::Key_O: ask_note(); return;
    case Qt::Key_Left: walk_readings(-1); return;
    case Qt::Key_Right: walk_readings(1); return;
    case Qt::Key_Up: walk_places(-1); return;
    case Qt::Key_Down: walk_places(1); return;
    case Qt::Key_PageUp: walk_quantities(-1); return;
    case Qt::Key_PageDown: walk_quantities(1); return;
    default: Page::keyPressEvent(event);
    }
}

void TrendPage::changeEvent(QEvent* event)
{
    if (event->type() == QEvent::StyleChange && judgement_ && isVisible())
        refresh();
    Page::changeEvent(event);
}

void TrendPage::resizeEvent(QResizeEvent* event)
{
    Page::resizeEvent(event);
    ui_->side->setVisible(width() >= 760);
    // 188 px beside the rail at 1366, up to 420 px on wide screens: lines any longer are hard to follow.
    ui_->side->setFixedWidth(std::clamp(188 + (width() - 1190) * 42 / 100, 188, 420));
}

QString TrendPage::foot_text() const
{
    return judgement_ ? tr("shaded: usual range · hollow: not steady, or usable with care · %1").arg(last_reading_text(*judgement_)) : QString();
}

} // namespace evenstroke
