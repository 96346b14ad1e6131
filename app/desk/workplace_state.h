// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "app/desk/judging.h"
#include "app/desk/trail.h"
#include "app/desk/workplace.h"
#include "storage/history.h"

#include <QTimer>

#include <algorithm>
#include <list>
#include <map>

/// What stands behind the Workplace; for its own source files only.
namespace evenstroke {

constexpr std::size_t judgements_kept = 8; // some megabytes each at 12 cylinders and 10 years

struct KnownJudgement
{
    QString engine_id;
    qint64 revision = 0;
    std::shared_ptr<const Judgement> judgement;
};

struct WorkplaceState
{
    std::unique_ptr<storage::History> history;
    std::unique_ptr<Judging> judging;
    std::vector<VesselChoice> vessels;
    std::map<QString, qint64> revisions; ///< by engine
    std::vector<FleetRow> fleet;
    std::list<KnownJudgement> known; ///< newest use first
    std::optional<Problem> problem;
    std::map<QString, qint64> refused; ///< engines whose readings could not be read at this revision: not asked again
    Trail trail;
    qint64 seen_change = 0;
    bool nobody_chose = false;    ///< the engine in hand was settled before the fleet was judged
    bool wrote_summaries = false; ///< our own workers committed since the last look
    QTimer poll, fleet_delay;

    KnownJudgement* find(const QString& engine_id)
    {
        const auto found = std::find_if(known.begin(), known.end(),
                                        [&](const KnownJudgement& k) { return k.engine_id == engine_id; });
        if (found == known.end())
            return nullptr;
        known.splice(known.begin(), known, found);
        return &known.front();
    }
    void keep(const JudgingOutcome& outcome)
    {
        known.remove_if([&](const KnownJudgement& k) { return k.engine_id == outcome.engine_id; });
        known.push_front({outcome.engine_id, outcome.revision, outcome.judgement});
        if (known.size() > judgements_kept)
            known.pop_back();
    }
    void sort_fleet(TimePoint now)
    {
        std::stable_sort(fleet.begin(), fleet.end(), [now](const FleetRow& a, const FleetRow& b) {
            const int rank_a = trouble_rank(a.summary, now), rank_b = trouble_rank(b.summary, now);
            return rank_a != rank_b ? rank_a < rank_b : a.summary.excess > b.summary.excess;
        });
    }
    std::optional<Problem> read_lists();
    void read_fleet();
};

} // namespace evenstroke
