// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/desk/workplace.h"

#include "app/desk/number_text.h"
#include "app/desk/workplace_state.h"
#include "storage/judgement_store.h"
#include "storage/vessel_store.h"

#include <algorithm>
#include <utility>

namespace evenstroke {

namespace {

constexpr int poll_milliseconds = 2000;  // how soon another window's change is seen
constexpr int fleet_milliseconds = 300;  // the fleet page is redrawn at most so often while judging

} // namespace

/// Vessels, engines and their revisions, as they stand in the file now.
std::optional<Problem> WorkplaceState::read_lists()
{
    const auto engines = storage::VesselStore(*history).engines();
    if (!engines)
        return engines.error();
    const auto all_vessels = storage::VesselStore(*history).vessels();
    if (!all_vessels)
        return all_vessels.error();
    vessels.clear();
    revisions.clear();
    for (const Vessel& vessel : all_vessels.value())
        vessels.push_back({to_qstring(vessel.id), to_qstring(vessel.name), {}});
    for (const storage::EngineEntry& engine : engines.value()) {
        const auto vessel = std::find_if(vessels.begin(), vessels.end(), [&](const VesselChoice& v) {
            return v.id == to_qstring(engine.vessel_id);
        });
        if (vessel != vessels.end())
            vessel->engines.push_back({to_qstring(engine.id), to_qstring(engine.name)});
        revisions[to_qstring(engine.id)] = engine.input_revision;
    }
    return std::nullopt;
}

void WorkplaceState::read_fleet()
{
    fleet.clear();
    const auto entries = storage::JudgementStore(*history).all(method_version);
    if (!entries) {
        problem = entries.error();
        return;
    }
    for (const storage::JudgementEntry& entry : entries.value()) {
        FleetRow row{to_qstring(entry.vessel_id), to_qstring(entry.vessel_name), to_qstring(entry.engine_id),
                     to_qstring(entry.engine_name), {}, true};
        if (entry.stored)
            if (const auto summary = unpack(entry.judgement.summary)) {
                row.summary = *summary;
                row.out_of_date = !entry.current;
            }
        fleet.push_back(std::move(row));
    }
    sort_fleet(history->now());
}

Workplace::Workplace(QObject* parent) : QObject(parent), state_(std::make_unique<WorkplaceState>())
{
    state_->poll.setInterval(poll_milliseconds);
    connect(&state_->poll, &QTimer::timeout, this, &Workplace::look_for_changes);
    state_->fleet_delay.setInterval(fleet_milliseconds);
    state_->fleet_delay.setSingleShot(true);
    connect(&state_->fleet_delay, &QTimer::timeout, this, [this] {
        if (state_->history)
            state_->sort_fleet(state_->history->now());
        emit fleet_changed();
    });
}

Workplace::~Workplace() { state_->trail.remember(path()); }

std::optional<Problem> Workplace::open(const QString& path)
{
    auto history = storage::History::open(path, storage::OpenMode::read_write);
    if (!history && history.error().kind == Problem::Kind::storage) {
        // A write-protected stick or a file of somebody else's: it can still be looked at.
        auto reading = storage::History::open(path, storage::OpenMode::read_only);
        if (reading)
            history = std::move(reading);
    }
    if (!history) {
        if (!is_open())
            state_->problem = history.error();
        return history.error();
    }
    return start_with(std::move(history.value()));
}

std::optional<Problem> Workplace::create(const QString& path)
{
    auto history = storage::History::create(path);
    if (!history)
        return history.error();
    return start_with(std::move(history.value()));
}

std::optional<Problem> Workplace::start_with(std::unique_ptr<storage::History> history)
{
    auto before = std::exchange(state_->history, std::move(history));
    if (auto problem = state_->read_lists()) {
        state_->history = std::move(before);
        if (state_->history)
            static_cast<void>(state_->read_lists());
        return problem;
    }
    if (before)
        state_->trail.remember(before->path());
    state_->known.clear();
    state_->refused.clear();
    state_->problem.reset();
    state_->judging = std::make_unique<Judging>(this->path(), !read_only(),
                                                [this](const JudgingOutcome& o) { take_outcome(o); });
    connect(state_->judging.get(), &Judging::progress, this, &Workplace::activity_changed);
    connect(state_->judging.get(), &Judging::fleet_finished, this, &Workplace::activity_changed);
    state_->seen_change = state_->history->seen_change();
    state_->poll.start();
    state_->read_fleet();
    state_->trail.recall(this->path());
    settle_selection();
    emit history_changed();
    emit fleet_changed();
    emit page_changed();
    emit selection_changed();
    judge_fleet();
    return std::nullopt;
}

void Workplace::close()
{
    if (!state_->history)
        return;
    state_->trail.remember(path());
    state_->poll.stop();
    state_->judging.reset();
    state_->history.reset();
    state_->vessels.clear();
    state_->revisions.clear();
    state_->fleet.clear();
    state_->known.clear();
    state_->trail = {};
    emit history_changed();
    emit fleet_changed();
    emit selection_changed();
}

bool Workplace::is_open() const { return state_->history != nullptr; }
QString Workplace::path() const { return state_->history ? state_->history->path() : QString(); }
storage::History* Workplace::history() { return state_->history.get(); }

bool Workplace::read_only() const
{
    return state_->history && state_->history->mode() == storage::OpenMode::read_only;
}

void Workplace::changed()
{
    if (!state_->history)
        return;
    state_->problem = state_->read_lists();
    state_->read_fleet();
    settle_selection();
    emit history_changed();
    emit fleet_changed();
    judge_fleet();
}

/// Another window, or our own workers, committed something.
void Workplace::look_for_changes()
{
    const qint64 seen = state_->history->seen_change();
    if (seen == state_->seen_change)
        return;
    state_->seen_change = seen;
    const auto before = state_->revisions;
    const bool ours = std::exchange(state_->wrote_summaries, false);
    if (ours && !state_->read_lists() && state_->revisions == before)
        return; // only summaries were kept
    changed();
}

void Workplace::take_outcome(const JudgingOutcome& outcome)
{
    state_->wrote_summaries = true;
    if (outcome.problem) {
        state_->problem = outcome.problem;
        state_->refused[outcome.engine_id] = state_->revisions[outcome.engine_id];
    }
    if (outcome.judgement) {
        const bool wanted = outcome.engine_id == selection().engine || state_->find(outcome.engine_id);
        if (wanted)
            state_->keep(outcome);
        for (FleetRow& row : state_->fleet)
            if (row.engine_id == outcome.engine_id) {
                row.summary = outcome.summary;
                row.out_of_date = false;
            }
    }
    settle_on_worst();
    if (!state_->fleet_delay.isActive())
        state_->fleet_delay.start();
    emit judgement_ready(outcome.engine_id);
}

const std::vector<VesselChoice>& Workplace::vessels() const { return state_->vessels; }

const VesselChoice* Workplace::find_vessel(const QString& id) const
{
    for (const VesselChoice& vessel : state_->vessels)
        if (vessel.id == id)
            return &vessel;
    return nullptr;
}

const EngineChoice* Workplace::find_engine(const QString& id) const
{
    for (const VesselChoice& vessel : state_->vessels)
        for (const EngineChoice& engine : vessel.engines)
            if (engine.id == id)
                return &engine;
    return nullptr;
}

std::shared_ptr<const Judgement> Workplace::judgement() const { return judgement(selection().engine); }

std::shared_ptr<const Judgement> Workplace::judgement(const QString& engine_id) const
{
    const auto revision = state_->revisions.find(engine_id);
    if (!state_->judging || revision == state_->revisions.end())
        return nullptr;
    const KnownJudgement* known = state_->find(engine_id);
    const auto refused = state_->refused.find(engine_id);
    const bool known_to_fail = refused != state_->refused.end() && refused->second == revision->second;
    if ((!known || known->revision != revision->second) && !known_to_fail)
        state_->judging->ask(engine_id);
    return known ? known->judgement : nullptr;
}

bool Workplace::judging(const QString& engine_id) const
{
    return state_->judging && state_->judging->busy_with(engine_id);
}

std::optional<Problem> Workplace::problem() const { return state_->problem; }
const std::vector<FleetRow>& Workplace::fleet() const { return state_->fleet; }

void Workplace::judge_fleet()
{
    QStringList engines;
    for (const FleetRow& row : state_->fleet)
        if (row.out_of_date)
            engines.append(row.engine_id);
    if (state_->judging)
        state_->judging->ask_all(engines);
}

void Workplace::stop_work()
{
    if (state_->judging)
        state_->judging->stop_fleet();
}

QString Workplace::activity() const
{
    if (!state_->judging || !state_->judging->busy())
        return {};
    if (state_->judging->fleet_done() < state_->judging->fleet_total())
        return tr("judging %1 of %2").arg(state_->judging->fleet_done() + 1).arg(state_->judging->fleet_total());
    return tr("judging");
}

} // namespace evenstroke
