// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/trend/judgement.h"

#include <QByteArray>
#include <QString>

#include <optional>
#include <vector>

namespace evenstroke {

/// How many strips a row of the fleet page has: the lines of core/trend/fleet_strips.h, which a test compares.
inline constexpr int fleet_strip_count = 6;

/// One strip: the trend of its group that stands out most, in its own standard deviations from its own level.
struct FleetStrip
{
    Level level = Level::no_data;
    QString title;             ///< which it is: "Compression pressure, cylinder 4"
    std::vector<float> values; ///< oldest first; the usual range is -2 to +2
};

/// What the fleet page shows of one engine. Made once from the judgement and kept beside it.
struct FleetSummary
{
    Level level = Level::no_data;
    bool seen = false;         ///< somebody has looked at every flag that stands, and nothing new came since
    bool limit_passed = false; ///< an absolute limit stands
    bool worsening = false;    ///< the worst flag grows from month to month
    double excess = 0.0;       ///< its evidence over its threshold
    int places_concerned = 0;  ///< cylinders, or the engine, that carry a flag
    int readings = 0;
    std::optional<TimePoint> last_reading, last_usable;
    QString sentence;          ///< the one that matters; empty while quiet
    std::vector<FleetStrip> strips; ///< in the order of the catalogue
};

FleetSummary summarise(const Judgement& judgement);
QByteArray pack(const FleetSummary& summary);
/// Nothing where the bytes are of another version of the program: then it is made anew.
std::optional<FleetSummary> unpack(const QByteArray& bytes);

/// Longer without a usable reading is said in words. Common practice, no source.
inline constexpr int late_after_days = 45;
/// Days since the last usable reading where that is more than `late_after_days`.
std::optional<int> days_late(const FleetSummary& summary, TimePoint now);
/// Place in the order of trouble, lower first: limit passed, act and worsening, act, watch and worsening, no
/// usable reading for 45 days, watch, ask, note and what was seen, quiet.
int trouble_rank(const FleetSummary& summary, TimePoint now);

} // namespace evenstroke
