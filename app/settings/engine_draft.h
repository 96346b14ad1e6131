// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/engine/engine.h"
#include "storage/common.h"

#include <QObject>
#include <QUndoStack>

#include <optional>

namespace evenstroke {

namespace storage {
class History;
}

/// An engine and its vessel while they are being described. Each change is one step that can be taken back;
/// saving makes them the revision in force, with who and why.
class EngineDraft : public QObject
{
    Q_OBJECT

public:
    struct State
    {
        Vessel vessel;
        Engine engine;
    };

    explicit EngineDraft(QObject* parent = nullptr);

    void begin(const State& state); ///< forgets what could be undone
    const State& state() const { return state_; }
    bool is_new() const { return state_.engine.id.empty(); }
    bool dirty() const { return !undo_.isClean(); }
    QUndoStack& undo() { return undo_; }

    /// @param what for the undo list: "bore"
    void change(const State& state, const QString& what);
    /// What speaks against saving: boxes that must be filled in and are not, else find_problem's answer.
    std::optional<Problem> problem() const;
    /// Saves vessel and engine. @par Problems those of `problem`; storage
    Result<void> save(storage::History& history, const storage::Signature& by);

signals:
    void changed();

private:
    friend class EngineStep;
    void put(const State& state);

    State state_;
    QUndoStack undo_;
};

/// The one of the history. @par Problems not_found, storage
Result<EngineDraft::State> load_engine_state(storage::History& history, const QString& engine_id);
/// A new engine with nothing in it but the usual reference conditions.
EngineDraft::State new_engine_state(const Vessel& vessel);

} // namespace evenstroke
