// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "app/entry/entry_sheet.h"
#include "storage/reading_store.h"

#include <QDateTime>
#include <QObject>
#include <QTimer>
#include <QUndoStack>

#include <set>

namespace evenstroke {

class Workplace;

/// One reading between the history and the sheet: found or begun, kept on disk at every change, closed, and
/// later corrected. The page shows it; the stores write it.
class EntrySession : public QObject
{
    Q_OBJECT

public:
    enum class State {
        nothing,    ///< no history, or no engine chosen
        read_only,  ///< the history can only be read
        writing,    ///< a draft, or the empty sheet before the first value
        correcting, ///< a closed reading
        closed,     ///< just closed; the page says what came of it
    };

    explicit EntrySession(Workplace& workplace, QObject* parent = nullptr);
    ~EntrySession() override;

    State state() const { return state_; }
    EntrySheet& sheet() { return sheet_; }
    const EntrySheet& sheet() const { return sheet_; }
    QUndoStack& undo() { return undo_; }
    const QString& engine_id() const { return engine_id_; }
    const QString& vessel_id() const { return vessel_id_; }

    /// Looks at an engine: its draft if it has one, else an empty sheet. Does nothing where it is shown
    /// already.
    void show_engine(const QString& vessel_id, const QString& engine_id);
    /// Looks again, because another history was opened.
    void forget();
    /// An empty sheet; the draft, if any, is left as it is.
    void begin_new();
    void correct(const QString& reading_id);
    /// Drafts of this engine other than the one shown.
    std::vector<storage::ReadingEntry> other_drafts() const;
    void open_draft(const QString& reading_id);
    /// The last closed readings, newest first.
    std::vector<storage::ReadingEntry> closed_readings(std::size_t at_most) const
    {
        return readings_in(storage::ReadingState::closed, at_most);
    }

    const StampedTime& taken_at() const { return sheet_.reading().taken_at; }
    /// Of a draft at once; of a closed reading as a correction, when name and reason are given.
    void set_taken_at(StampedTime time);
    void set_row_unit(QuantityId quantity, WrittenUnit unit);
    void set_layout(EngineLayout layout);
    /// Who corrects, and why; corrections wait until both are given.
    void set_signature(const QString& who, const QString& why);
    const storage::Signature& signature() const { return signature_; }

    /// Writes what waits. False: something stood in the way (`problem`), or corrections wait for a reason.
    bool flush();
    bool waits() const { return !waiting_reading_.empty() || !waiting_ship_.empty() || waiting_time_; }
    /// When something was last written; none before.
    const QDateTime& saved_at() const { return saved_at_; }
    const std::optional<Problem>& problem() const { return problem_; }

    /// Closes the reading, and the ship's with it. What is missing does not stand in the way.
    /// @param why what was open and is kept as it is; the audit trail keeps it
    std::optional<Problem> close(const QString& why = {});
    /// Throws the draft away; what was typed stays in the audit trail only.
    std::optional<Problem> discard();
    /// Takes the closed reading that is being corrected out of use; it stays in the history with the reason.
    std::optional<Problem> withdraw();
    /// Closed readings that were taken out of use, newest first.
    std::vector<storage::ReadingEntry> withdrawn_readings(std::size_t at_most) const
    {
        return readings_in(storage::ReadingState::withdrawn, at_most);
    }
    std::optional<Problem> bring_back(const QString& reading_id, const storage::Signature& by);

signals:
    void changed();  ///< state, time, saved or problem
    void reloaded(); ///< another reading is on the sheet

private:
    storage::ReadingStore store() const;
    std::vector<storage::ReadingEntry> readings_in(storage::ReadingState state, std::size_t at_most) const;
    bool open_engine();
    void load(Reading reading, State state);
    std::vector<Value> find_ship_values(StampedTime near, bool& open);
    void follow_ship(StampedTime time);
    void remember(const LogBox& box, EntrySheet::Owner owner);
    void keep_unreadable(const std::string& reading_id, const std::map<LogBox, QString>& texts);
    bool make_drafts();
    bool write_drafts();
    bool write_corrections();
    bool write_correction(const LogBox& box);
    storage::Signature signed_by() const;
    bool failed(const Problem& problem);

    Workplace& workplace_;
    EntrySheet sheet_;
    QUndoStack undo_;
    State state_ = State::nothing;
    QString vessel_id_, engine_id_;
    SheetStart engine_start_; ///< what is the same for every reading of this engine
    std::string ship_reading_id_;
    TimePoint ship_taken_at_{};
    Reading stored_; ///< a closed reading as it stands in the history
    std::set<LogBox> waiting_reading_, waiting_ship_;
    bool waiting_time_ = false; ///< a closed reading's time was corrected
    storage::Signature signature_;
    QTimer write_soon_;
    QDateTime saved_at_;
    std::optional<Problem> problem_;
};

} // namespace evenstroke
