// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/desk/workplace_state.h"

namespace evenstroke {

const Selection& Workplace::selection() const { return state_->trail.here().selection; }
const QString& Workplace::page() const { return state_->trail.here().page; }

void Workplace::announce(const QString& page_before, const Selection& selection_before)
{
    if (page() != page_before)
        emit page_changed();
    if (selection() != selection_before)
        emit selection_changed();
}

void Workplace::select(const Selection& selection) { open_page(page(), selection); }

void Workplace::step_to(const Selection& selection)
{
    const Whereabouts before = state_->trail.here();
    // A page fills in its first quantity by itself; whatever comes after that was somebody's wish.
    state_->nobody_chose = state_->nobody_chose && !before.selection.quantity;
    state_->trail.step({before.page, selection});
    announce(before.page, before.selection);
}

void Workplace::open_page(const QString& name) { open_page(name, selection()); }

void Workplace::open_page(const QString& name, const Selection& selection)
{
    const Whereabouts before = state_->trail.here();
    state_->nobody_chose = state_->nobody_chose && selection == before.selection;
    state_->trail.go({name, selection});
    announce(before.page, before.selection);
}

bool Workplace::can_go_back() const { return state_->trail.can_go_back(); }
bool Workplace::can_go_forward() const { return state_->trail.can_go_forward(); }

void Workplace::go_back()
{
    const Whereabouts before = state_->trail.here();
    state_->trail.go_back();
    announce(before.page, before.selection);
}

void Workplace::go_forward()
{
    const Whereabouts before = state_->trail.here();
    state_->trail.go_forward();
    announce(before.page, before.selection);
}

/// What is looked at must be in the history: else the worst engine of the fleet, else the first one.
void Workplace::settle_selection()
{
    Whereabouts here = state_->trail.here();
    Selection& selection = here.selection;
    if (find_engine(selection.engine))
        return;
    state_->nobody_chose = true;
    const Selection fresh;
    selection.engine.clear();
    selection.reading.clear();
    selection.place = fresh.place;
    selection.quantity.reset();
    if (!state_->fleet.empty()) {
        selection.vessel = state_->fleet.front().vessel_id;
        selection.engine = state_->fleet.front().engine_id;
    } else if (!find_vessel(selection.vessel)) {
        selection.vessel = state_->vessels.empty() ? QString() : state_->vessels.front().id;
    }
    state_->trail.step(here);
}

/// A history opened for the first time is judged after it is shown: once that is done, the worst engine comes in
/// hand, unless somebody has chosen one in the meantime.
void Workplace::settle_on_worst()
{
    const auto waiting = [](const FleetRow& row) { return row.out_of_date; };
    if (!state_->nobody_chose || state_->fleet.empty()
        || std::any_of(state_->fleet.begin(), state_->fleet.end(), waiting))
        return;
    state_->nobody_chose = false;
    state_->sort_fleet(state_->history->now());
    Selection worst;
    worst.vessel = state_->fleet.front().vessel_id;
    worst.engine = state_->fleet.front().engine_id;
    if (worst.engine != selection().engine)
        step_to(worst);
}

} // namespace evenstroke
