// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/fleet/fleet_page.h"

#include "app/desk/theme.h"
#include "app/desk/workplace.h"
#include "app/fleet/fleet_view.h"

#include <QClipboard>
#include <QGuiApplication>
#include <QLabel>
#include <QVBoxLayout>

namespace evenstroke {

FleetPage::FleetPage(Workplace& place, QWidget* parent)
    : Page(place, parent), view_(new FleetView(this)), empty_(new QLabel(this))
{
    auto* layout = new QVBoxLayout(this);
    layout->setContentsMargins(20, 8, 24, 0);
    layout->addWidget(view_);
    layout->addWidget(empty_, 1);
    empty_->setProperty("muted", true);
    empty_->setWordWrap(true);
    empty_->setAlignment(Qt::AlignLeft | Qt::AlignTop);
    empty_->setContentsMargins(4, 8, 0, 0);
    connect(view_, &FleetView::asked_for, this, [this](const QString& vessel, const QString& engine) {
        Selection selection = workplace().selection();
        if (selection.engine != engine) { // another engine: begin at what matters there
            selection.quantity.reset();
            selection.reading.clear();
        }
        selection.vessel = vessel;
        selection.engine = engine;
        workplace().open_page(QStringLiteral("board"), selection);
    });
}

void FleetPage::refresh()
{
    const std::vector<FleetRow>& fleet = workplace().fleet();
    view_->setVisible(!fleet.empty());
    empty_->setVisible(fleet.empty());
    empty_->setText(tr("No engine is described yet. Describe it on the page Engine (key G), or take in a folder on the "
                       "page History (key H)."));
    view_->show_fleet(fleet, time_now());
    emit foot_changed();
}

QString FleetPage::foot_text() const
{
    const FleetModel& model = view_->fleet_model();
    if (model.engines() == 0)
        return {};
    return tr("%n engine(s)", nullptr, model.engines()) + QStringLiteral(" · ")
           + (model.quiet() > 0 ? model.fold_text() : tr("none quiet")) + QStringLiteral(" · ") + tr("shaded: usual range");
}

QWidget* FleetPage::first_focus() { return view_; }

void FleetPage::copy()
{
    const FleetModel& model = view_->fleet_model();
    QStringList lines;
    for (int number = 0; number < model.rowCount(); ++number)
        if (const FleetRow* row = model.row(number))
            lines.append(QStringList{row->vessel_name, row->engine_name, level_text(row->summary.level),
                                     model.last_reading_words(*row), model.sentence_words(*row)}
                             .join(u'\t'));
        else
            lines.append(model.fold_text());
    QGuiApplication::clipboard()->setText(lines.join(u'\n'));
}

} // namespace evenstroke
