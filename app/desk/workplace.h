// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "app/desk/selection.h"
#include "app/fleet/fleet_summary.h"
#include "core/problem.h"
#include "core/trend/judgement.h"

#include <QObject>
#include <QString>

#include <memory>
#include <optional>
#include <vector>

namespace evenstroke {

namespace storage {
class History;
}
struct WorkplaceState;
struct JudgingOutcome;

struct EngineChoice
{
    QString id, name;
};
struct VesselChoice
{
    QString id, name;
    std::vector<EngineChoice> engines;
};

/// One engine as the fleet page shows it, from the stored judgement: nothing is judged to draw it.
struct FleetRow
{
    QString vessel_id, vessel_name, engine_id, engine_name;
    FleetSummary summary;
    bool out_of_date = false; ///< newer readings are there than were judged; a judgement is under way
};

/// The history that is open, what is looked at, and what is known about it. All pages share the one.
///
/// Lives on the window's thread. Judging runs on worker threads with connections of their own; whoever asks for
/// a judgement gets what is there at once and hears `judgement_ready` when there is a newer one.
class Workplace : public QObject
{
    Q_OBJECT

public:
    explicit Workplace(QObject* parent = nullptr);
    ~Workplace() override;

    // ------------------------------------------------------------------------------------ the history
    /// Opens a history; the one before is closed only if this one can be read. A refusal is in words.
    std::optional<Problem> open(const QString& path);
    /// Makes a new, empty history there and opens it. Refuses to write over a file that is there.
    std::optional<Problem> create(const QString& path);
    void close();
    bool is_open() const;
    QString path() const;
    /// The window thread's own connection, for stores that read or write; null while nothing is open.
    storage::History* history();
    /// The file can only be read: it is on a medium or has rights that allow no writing.
    bool read_only() const;
    /// Call after writing anything to the history: what is judged is brought up to date and
    /// `history_changed` is sent. Changes made by another window are noticed without it.
    void changed();

    const std::vector<VesselChoice>& vessels() const;
    const VesselChoice* find_vessel(const QString& id) const;
    const EngineChoice* find_engine(const QString& id) const;

    // ---------------------------------------------------------------------------------- the selection
    const Selection& selection() const;
    /// Looks at something else. What was looked at before can be had back with `go_back`.
    void select(const Selection& selection);
    /// The same for steps by arrow keys, which leave no trace in what `go_back` walks through.
    void step_to(const Selection& selection);
    const QString& page() const; ///< name of the page that is up
    void open_page(const QString& name);
    /// Both at once, so that one step back undoes both.
    void open_page(const QString& name, const Selection& selection);
    bool can_go_back() const;
    bool can_go_forward() const;
    void go_back();
    void go_forward();

    // --------------------------------------------------------------------------------- the judgements
    /// The judgement of the engine that is looked at, or of the one named. Null while the first one is still
    /// being made, or when the readings could not be read (`problem` says why).
    std::shared_ptr<const Judgement> judgement() const;
    std::shared_ptr<const Judgement> judgement(const QString& engine_id) const;
    /// Whether the judgement of this engine is being made just now.
    bool judging(const QString& engine_id) const;
    /// What stood in the way of reading or judging, in words.
    std::optional<Problem> problem() const;
    /// From stored judgements, worst first (`trouble_rank`).
    const std::vector<FleetRow>& fleet() const;
    /// Judges every engine whose stored judgement is out of date, in the background.
    void judge_fleet();
    void stop_work();
    /// "judging Quiet Barley, main engine · 3 of 40"; empty when idle.
    QString activity() const;

signals:
    void history_changed();                         ///< opened, closed, written to
    void selection_changed();
    void page_changed();
    void judgement_ready(const QString& engine_id); ///< a newer one, or the problem that stood in its way
    void fleet_changed();
    void activity_changed();

private:
    std::optional<Problem> start_with(std::unique_ptr<storage::History> history);
    void look_for_changes();
    void take_outcome(const JudgingOutcome& outcome);
    void settle_selection();
    void settle_on_worst();
    void announce(const QString& page_before, const Selection& selection_before);

    std::unique_ptr<WorkplaceState> state_;
};

} // namespace evenstroke
