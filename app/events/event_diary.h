// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/engine/engine.h"
#include "core/reading/reading.h"
#include "storage/common.h"

#include <QHash>
#include <QObject>
#include <QUndoStack>

#include <optional>
#include <vector>

namespace evenstroke {

namespace storage {
class History;
}

/// The events of one engine as they stand in the history, and every change to them with its way back.
///
/// Nothing is erased: a removed event is withdrawn with its reason and stays in the audit trail; undoing that
/// enters it again.
class EventDiary : public QObject
{
    Q_OBJECT

public:
    explicit EventDiary(QObject* parent = nullptr);

    /// Looks at an engine's events. Changing to another engine forgets what could be undone.
    void open(storage::History* history, const QString& engine_id);
    void reload();
    const std::vector<Event>& events() const { return events_; } ///< newest first
    const Event* find(const QString& id) const;
    const std::optional<Problem>& problem() const { return problem_; }

    void add(const Event& event);
    void change(const Event& event, const QString& why);
    void remove(const QString& id, const QString& why);
    QUndoStack& undo() { return undo_; }
    const QString& last_added() const { return last_added_; }

signals:
    void changed();                ///< after every attempt; `problem` says what stood in the way, if anything
    void history_written();

private:
    friend class EventCommand;
    std::optional<Event> stored(const QString& id) const;
    QString newest_id(const QString& id) const;
    bool write_add(const Event& event, const QString& old_id, const QString& why, QString* new_id);
    bool write_change(const Event& event, const QString& why);
    bool write_remove(const QString& id, const QString& why);
    bool note(const std::optional<Problem>& problem);

    storage::History* history_ = nullptr;
    QString engine_id_, last_added_;
    std::vector<Event> events_;
    std::optional<Problem> problem_;
    QUndoStack undo_;
    QHash<QString, QString> renamed_; ///< an event entered again after its removal has a new identifier
};

} // namespace evenstroke
