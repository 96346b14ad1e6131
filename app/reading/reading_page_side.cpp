// SPDX-License-Identifier: GPL-3.0-or-later
// What stands beside the judged reading, and what leaves the page: copies and paper.
#include "app/desk/number_text.h"
#include "app/desk/reading_in_hand.h"
#include "app/desk/workplace.h"
#include "app/reading/figure_plot.h"
#include "app/reading/reading_page.h"
#include "app/reading/review_paper.h"
#include "app/reading/review_view.h"
#include "app/reading/workings_sheet.h"
#include "core/workings/find_workings.h"
#include "ui_reading_page.h"

#include <QClipboard>
#include <QGuiApplication>
#include <QMimeData>
#include <QPainter>
#include <QPrinter>
#include <QTextDocument>

#include <cmath>

namespace evenstroke {

namespace {

constexpr int line_height = 28, title_room = 30; // pixels of a figure's row and of its axis

/// A number typed into a box, with decimal point or comma; nothing where there is none.
std::optional<double> typed(const QLineEdit& box)
{
    bool good = false;
    const double value = QString(box.text()).trimmed().replace(u',', u'.').toDouble(&good);
    return good ? std::optional(value) : std::nullopt;
}

} // namespace

std::array<QPushButton*, 5> ReadingPage::side_buttons() const
{
    return {ui_->workings_button, ui_->power_button, ui_->load_button, ui_->wall_button, ui_->crank_button};
}

WallTrial ReadingPage::wall_trial() const
{
    return {typed(*ui_->coolant_box),       typed(*ui_->deposit_box), typed(*ui_->scale_box), typed(*ui_->deposit_lambda_box),
            typed(*ui_->scale_lambda_box), ui_->iron_button->isChecked()};
}

int ReadingPage::cylinder_in_hand() const
{
    const ReviewRow* row = ui_->view->row_in_hand();
    if (row && row->line && row->line->place.kind == Place::Kind::cylinder && !row->line->spread)
        return row->line->place.number;
    const Place& place = workplace().selection().place;
    return place.kind == Place::Kind::cylinder ? place.number : 1;
}

const Cards& ReadingPage::cards()
{
    const std::string& id = judgement_->record->readings[*reading_].id;
    storage::History* history = workplace().history();
    if (cards_of_ == id || !history)
        return cards_;
    cards_.clear();
    cards_of_ = id;
    const storage::CardStore store(*history);
    const auto entries = store.list(judgement_->record->engine.id);
    if (!entries)
        return cards_;
    for (const storage::CardEntry& entry : entries.value())
        if (entry.reading_id == id)
            if (auto trace = store.load(entry.id))
                cards_.emplace(entry.cylinder, std::move(trace).value());
    return cards_;
}

/// The earliest card of this cylinder within 5 % of this load (common practice, no source) stands for the healthy one.
std::optional<CardPair> ReadingPage::card_pair()
{
    const int cylinder = cylinder_in_hand();
    const auto& load = judgement_->readings[*reading_].load_percent;
    if (!load || !workplace().history() || !cards().contains(cylinder))
        return std::nullopt;
    const storage::CardStore store(*workplace().history());
    const auto entries = store.list(judgement_->record->engine.id); // by time
    if (!entries)
        return std::nullopt;
    for (const storage::CardEntry& entry : entries.value()) {
        if (entry.cylinder != cylinder)
            continue;
        for (std::size_t i = 0; i < *reading_; ++i) {
            const auto& then = judgement_->readings[i].load_percent;
            constexpr double same_load = 5.0; // per cent of rated power
            if (judgement_->record->readings[i].id != entry.reading_id || !then || std::abs(*then - *load) > same_load)
                continue;
            if (auto trace = store.load(entry.id))
                return CardPair{cylinder, cards().at(cylinder), std::move(trace).value(), i};
        }
    }
    return std::nullopt;
}

SideView ReadingPage::make_view()
{
    const Engine& engine = judgement_->record->engine;
    switch (side_) {
    case Side::load: return load_view(*judgement_, *reading_);
    case Side::wall:
        return wall_view(*judgement_, *reading_, engine.walls.empty() ? 0 : wall_ % engine.walls.size(), wall_trial(), card_pair());
    case Side::crank: return crank_view(*judgement_, *reading_, cards(), cylinder_in_hand());
    case Side::power:
    case Side::workings: break;
    }
    return power_view(review_->power, engine);
}

void ReadingPage::show_side()
{
    if (!review_ || !reading_)
        return;
    const auto buttons = side_buttons();
    for (std::size_t i = 0; i < buttons.size(); ++i)
        buttons[i]->setChecked(side_ == static_cast<Side>(i));
    const ReviewRow* row = ui_->view->row_in_hand();
    // The section on power has no number of its own: all its estimates stand beside it.
    const bool all_estimates = side_ == Side::workings && row && !row->line && row->section->topic == ReviewTopic::power;
    const bool sheet = side_ == Side::workings && !all_estimates;
    ui_->sheet->setVisible(sheet);
    ui_->open_button->setVisible(sheet && number_in_hand().has_value());
    const bool wall = side_ == Side::wall && !judgement_->record->engine.walls.empty();
    ui_->trial->setVisible(wall);
    ui_->part_button->setVisible(wall && judgement_->record->engine.walls.size() > 1);
    if (sheet)
        show_workings();
    else
        show_view(make_view());
}

/// The sheet of the row in hand, narrower than its page; of a heading, what the section says.
void ReadingPage::show_workings()
{
    shown_ = SideView{};
    for (QWidget* widget : std::initializer_list<QWidget*>{ui_->side_sentence, ui_->side_second, ui_->upper_plot, ui_->lower_plot,
                                                           ui_->side_table, ui_->copy_picture_button, ui_->copy_data_button,
                                                           ui_->table_button})
        widget->hide();
    // A step to another row changes the selection too, and so asks for the same sheet a second time.
    const ShownSheet wanted{review_, ui_->view->currentIndex().row(), theme().kind};
    if (wanted == sheet_)
        return;
    sheet_ = wanted;
    const ReviewRow* row = ui_->view->row_in_hand();
    std::optional<Workings> workings;
    if (row && row->line && row->line->estimate && *row->line->estimate < review_->power.estimates.size())
        workings = review_->power.estimates[*row->line->estimate].workings;
    else if (row && row->line && row->line->quantity && row->line->has_workings)
        workings = find_workings(*judgement_, *reading_, *row->line->quantity, row->line->place);
    if (workings) {
        QString title = to_qstring(workings->title);
        if (workings->place.kind != Place::Kind::engine)
            title = tr("%1, %2").arg(title, place_title(judgement_->record->engine, workings->place, false));
        fill_sheet(*ui_->sheet->document(), *workings, {title, {}}, theme(), true);
        ui_->sheet->setAccessibleDescription(to_qstring(workings_text(*workings, to_std(title))));
        return;
    }
    Workings words; // a line of words alone, or a heading
    words.title = row ? row->line ? row->line->words : row->section->title : std::string();
    const std::string said = row ? row->line ? row->line->verdict : row->section->sentence : std::string();
    fill_words(*ui_->sheet->document(), to_qstring(words.title), to_qstring(said),
               row && row->line ? tr("Here is nothing to work out.") : tr("Down arrow: the numbers of this section and their workings."), theme());
    ui_->sheet->setAccessibleDescription(to_qstring(said));
}

void ReadingPage::show_view(const SideView& view)
{
    shown_ = view;
    const bool empty = !view.empty.isEmpty(), as_table = !empty && ui_->table_button->isChecked();
    ui_->side_sentence->setText(empty ? view.empty : view.sentence);
    ui_->side_sentence->setVisible(!ui_->side_sentence->text().isEmpty());
    ui_->side_second->setText(view.second_sentence);
    ui_->side_second->setVisible(!view.second_sentence.isEmpty());
    FigurePlot* plots[] = {ui_->upper_plot, ui_->lower_plot};
    for (std::size_t i = 0; i < std::size(plots); ++i) {
        const bool shown = !empty && !as_table && i < view.figures.size();
        plots[i]->setVisible(shown);
        if (!shown)
            continue;
        const int lines = view.figures[i].lines_high;
        plots[i]->setMaximumHeight(lines > 0 ? lines * line_height + title_room : QWIDGETSIZE_MAX);
        plots[i]->setMinimumHeight(lines > 0 ? lines * line_height : 120);
        plots[i]->show_figure(view.figures[i], theme());
    }
    table_.show_table(view.table);
    ui_->side_table->setVisible(as_table);
    for (QWidget* widget : std::initializer_list<QWidget*>{ui_->copy_picture_button, ui_->copy_data_button, ui_->table_button})
        widget->setVisible(!empty);
}

/// What is in hand: the sheet of workings, or the figure with its numbers; with nothing beside it, the whole reading.
void ReadingPage::copy()
{
    auto* copied = new QMimeData;
    if (!shown_.figures.empty()) {
        copied->setText(shown_.sentence + u'\n' + shown_.table.as_text() + shown_.second_sentence);
        if (ui_->upper_plot->isVisible())
            copied->setImageData(ui_->upper_plot->toPixmap(0, 0, 2.0).toImage());
    } else {
        copied->setText(ui_->view->review_model().as_text());
    }
    QGuiApplication::clipboard()->setMimeData(copied);
}

void ReadingPage::copy_picture()
{
    QPixmap upper = ui_->upper_plot->toPixmap(0, 0, 2.0);
    if (ui_->lower_plot->isVisible()) {
        const QPixmap lower = ui_->lower_plot->toPixmap(0, 0, 2.0);
        QPixmap both(std::max(upper.width(), lower.width()), upper.height() + lower.height());
        both.fill(theme().page);
        QPainter painter(&both);
        upper.setDevicePixelRatio(1.0);
        painter.drawPixmap(0, 0, upper);
        QPixmap below = lower;
        below.setDevicePixelRatio(1.0);
        painter.drawPixmap(0, upper.height(), below);
        painter.end();
        upper = both;
    }
    QGuiApplication::clipboard()->setPixmap(upper);
}

void ReadingPage::print(QPrinter& printer)
{
    if (!review_ || !judgement_)
        return;
    QTextDocument paper;
    fill_review_paper(paper, *judgement_, ui_->view->review_model());
    paper.print(&printer);
}

} // namespace evenstroke
