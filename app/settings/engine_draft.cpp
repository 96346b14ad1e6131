// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/settings/engine_draft.h"

#include "app/settings/engine_fields.h"
#include "storage/vessel_store.h"

#include <QSignalBlocker>
#include <QUndoCommand>

namespace evenstroke {

class EngineStep : public QUndoCommand
{
public:
    EngineStep(EngineDraft& draft, EngineDraft::State before, EngineDraft::State after, const QString& what)
        : QUndoCommand(what), draft_(draft), before_(std::move(before)), after_(std::move(after))
    {
    }
    void redo() override { draft_.put(after_); }
    void undo() override { draft_.put(before_); }

private:
    EngineDraft& draft_;
    EngineDraft::State before_, after_;
};

EngineDraft::EngineDraft(QObject* parent) : QObject(parent)
{
    // Not from within a step: the list of steps must have moved on before anybody asks whether there is one to undo.
    connect(&undo_, &QUndoStack::indexChanged, this, &EngineDraft::changed);
}

void EngineDraft::begin(const State& state)
{
    const QSignalBlocker one_signal(undo_);
    undo_.clear();
    put(state);
    emit changed();
}

void EngineDraft::put(const State& state)
{
    // Identity is given by the history when it is first saved; a step taken back does not take it away.
    const std::string vessel_id = state_.vessel.id, engine_id = state_.engine.id;
    const bool same = state.engine.id.empty() && !engine_id.empty() && undo_.count() > 0;
    state_ = state;
    if (same) {
        state_.vessel.id = vessel_id;
        state_.engine.id = engine_id;
    }
}

void EngineDraft::change(const State& state, const QString& what)
{
    undo_.push(new EngineStep(*this, state_, state, what));
}

std::optional<Problem> EngineDraft::problem() const
{
    if (const QStringList needed = still_needed(state_); !needed.isEmpty())
        return invalid_input(tr("Still needed: %1.").arg(needed.join(QStringLiteral(", "))).toStdString(),
                             tr("Fill in the boxes marked with a star under \u201cParticulars\u201d.").toStdString());
    return find_problem(state_.engine);
}

Result<void> EngineDraft::save(storage::History& history, const storage::Signature& by)
{
    if (const auto stands_in_the_way = problem())
        return *stands_in_the_way;
    storage::VesselStore store(history);
    const auto vessel_id = store.save_vessel(state_.vessel, by);
    if (!vessel_id.has_value())
        return vessel_id.error();
    const auto saved = store.save_engine(vessel_id.value(), state_.engine, by);
    if (!saved.has_value())
        return saved.error();
    state_.vessel.id = vessel_id.value();
    state_.engine.id = saved.value().engine_id;
    undo_.setClean();
    emit changed();
    return BOOST_OUTCOME_V2_NAMESPACE::success();
}

Result<EngineDraft::State> load_engine_state(storage::History& history, const QString& engine_id)
{
    const auto stored = storage::VesselStore(history).engine(engine_id.toStdString());
    if (!stored.has_value())
        return stored.error();
    return EngineDraft::State{stored.value().vessel, stored.value().engine};
}

EngineDraft::State new_engine_state(const Vessel& vessel)
{
    EngineDraft::State state;
    state.vessel = vessel;
    state.engine.reference.source = "ISO 3046-1:2002 standard reference conditions (from memory)";
    return state;
}

} // namespace evenstroke
