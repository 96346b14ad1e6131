// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/desk/number_text.h"
#include "app/desk/workplace.h"
#include "app/settings/engine_page.h"
#include "app/settings/quantity_delegate.h"
#include "ui_engine_page.h"

#include <QClipboard>
#include <QPushButton>

#include <cmath>
#include <QGuiApplication>
#include <QShortcut>

/// The engine page's baseline: table and curve beside each other, and shop tests pasted from a spreadsheet.
namespace evenstroke {

void EnginePage::connect_baseline()
{
    QTableView& table = *ui_->baseline_table;
    table.setModel(&baseline_);
    table.verticalHeader()->setDefaultSectionSize(24);
    table.verticalHeader()->setDefaultAlignment(Qt::AlignLeft | Qt::AlignVCenter);
    table.horizontalHeader()->setDefaultSectionSize(84);
    table.setEditTriggers(QAbstractItemView::AllEditTriggers);
    auto* cells = new BaselineDelegate(&table);
    table.setItemDelegate(cells);
    connect(cells, &BaselineDelegate::table_pasted, this, &EnginePage::paste, Qt::QueuedConnection); // when the cell is closed
    for (const Quantity& of : all_quantities())
        if (of.type == ValueType::number && ui_->quantity_box->findData(to_qstring(of.name)) < 0)
            ui_->quantity_box->addItem(to_qstring(of.title), to_qstring(of.name));
    connect(&baseline_, &BaselineModel::refused, this, &EnginePage::say);
    connect(table.selectionModel(), &QItemSelectionModel::currentChanged, this, &EnginePage::show_plot);
    connect(new QShortcut(QKeySequence::Paste, ui_->baseline_page, nullptr, nullptr, Qt::WidgetWithChildrenShortcut), &QShortcut::activated, this, &EnginePage::paste);
    connect(ui_->paste_button, &QPushButton::clicked, this, &EnginePage::paste);
    connect(ui_->trial_take_button, &QPushButton::clicked, this, &EnginePage::take_trial);
    connect(ui_->trial_drop_button, &QPushButton::clicked, this, &EnginePage::drop_trial);
    const auto add_load = [this] {
        const auto problem = baseline_.add_load(ui_->load_field->text());
        say(problem ? to_qstring(problem->text()) : QString());
        if (!problem)
            ui_->load_field->clear();
    };
    connect(ui_->add_load_button, &QPushButton::clicked, this, add_load);
    connect(ui_->load_field, &QLineEdit::returnPressed, this, add_load);
    connect(ui_->remove_load_button, &QPushButton::clicked, this, [this] { baseline_.remove_load(ui_->baseline_table->currentIndex().column()); });
    connect(ui_->add_quantity_button, &QPushButton::clicked, this, [this] { baseline_.add_quantity(ui_->quantity_box->currentData().toString().toStdString()); });
    connect(ui_->remove_quantity_button, &QPushButton::clicked, this, [this] { baseline_.remove_quantity(ui_->baseline_table->currentIndex().row()); });
    connect(ui_->baseline_source_field, &QLineEdit::editingFinished, this, [this] {
        EngineDraft::State state = draft_.state();
        const std::string source = ui_->baseline_source_field->text().trimmed().toStdString();
        if (source == state.engine.baseline_source)
            return;
        state.engine.baseline_source = source;
        draft_.change(state, tr("source of the baseline"));
    });
}

void EnginePage::show_plot()
{
    if (ui_->stack->currentWidget() != ui_->baseline_page)
        return;
    const int row = ui_->baseline_table->currentIndex().row();
    std::string name = baseline_.quantity_of(row);
    if (!name.empty())
        plotted_ = to_qstring(name);
    else if (baseline_.row_of(plotted_.toStdString()) < 0)
        plotted_ = to_qstring(baseline_.quantity_of(1));
    ui_->baseline_plot->setVisible(!plotted_.isEmpty());
    ui_->baseline_plot->show_quantity(draft_.state().engine, plotted_.toStdString(), draft_.is_new() ? nullptr : workplace().judgement());
}

void EnginePage::paste()
{
    const QString text = QGuiApplication::clipboard()->text();
    if (text.trimmed().isEmpty())
        return say(tr("There is nothing on the clipboard. Copy the cells of the sheet with their headings first."));
    show_trial(text);
}

bool EnginePage::show_trial(const QString& text)
{
    const auto read = read_shop_trial(text.toStdString(), draft_.state().engine);
    if (!read.has_value()) {
        drop_trial();
        say(to_qstring(read.error().text()));
        return false;
    }
    say({});
    trial_ = read.value();
    QStringList loads, lines;
    for (const BaselinePoint& point : trial_->points)
        loads.append(number_text(point.load_percent, point.load_percent == std::floor(point.load_percent) ? 0 : 1));
    for (const TrialQuantity& one : trial_->understood)
        lines.append(tr("%1: %2").arg(to_qstring(one.header), to_qstring(one.words)));
    for (const TrialQuantity& one : trial_->left_out)
        lines.append(tr("Left out: %1: %2").arg(to_qstring(one.header), to_qstring(one.words)));
    for (const std::string& one : trial_->refused)
        lines.append(tr("Not taken: %1").arg(to_qstring(one)));
    ui_->trial_heading->setText(tr("Understood: %1 quantities at loads of %2 %. Is that right?").arg(trial_->understood.size()).arg(loads.join(QStringLiteral(", "))));
    ui_->trial_text->setPlainText(lines.join(QLatin1Char('\n')));
    ui_->trial->show();
    ui_->trial_take_button->setFocus();
    return true;
}

void EnginePage::take_trial()
{
    if (!trial_)
        return;
    EngineDraft::State state = draft_.state();
    state.engine.baseline = merged_baseline(std::move(state.engine.baseline), trial_->points);
    state.engine.baseline_source = tr("pasted on %1, source not given").arg(day_text(time_now())).toStdString();
    trial_.reset();
    draft_.change(state, tr("pasted shop test"));
    ui_->baseline_source_field->setFocus();
    ui_->baseline_source_field->selectAll();
}

void EnginePage::drop_trial()
{
    trial_.reset();
    ui_->trial->hide();
}

} // namespace evenstroke
