// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/entry/entry_session.h"

#include "app/desk/number_text.h"
#include "app/desk/workplace.h"
#include "app/entry/reading_name.h"
#include "app/entry/unreadable_texts.h"
#include "storage/preference_store.h"
#include "storage/vessel_store.h"

#include <algorithm>

namespace evenstroke {
namespace {

using storage::Owner;
using storage::ReadingState;

constexpr char layout_choice[] = "entry.layout";

std::chrono::seconds apart(TimePoint a, TimePoint b)
{
    return a < b ? b - a : a - b;
}

std::optional<EngineLayout> read_layout(const std::optional<std::string>& text)
{
    if (!text)
        return std::nullopt;
    const QStringList parts = to_qstring(*text).split(u'/');
    if (parts.size() != 2)
        return std::nullopt;
    return EngineLayout{std::clamp(parts[0].toInt(), 0, 8), std::clamp(parts[1].toInt(), 0, 8)};
}

/// The name under which is remembered which reading was the last when a row's unit was chosen.
std::string unit_since(QuantityId id)
{
    return "entry.unit_since." + quantity(id).name;
}

/// The unit in which most boxes of a row were written the last time any was.
std::map<QuantityId, WrittenUnit> units_of_last(std::span<const Reading> readings)
{
    std::map<QuantityId, WrittenUnit> units;
    for (auto reading = readings.rbegin(); reading != readings.rend(); ++reading) {
        std::map<QuantityId, std::map<std::pair<UnitId, PressureKind>, int>> counted;
        for (const Value& value : reading->values)
            if (value.number && quantity(value.quantity).type == ValueType::number &&
                units.count(value.quantity) == 0)
                ++counted[value.quantity][{value.unit, value.kind}];
        for (const auto& [id, written] : counted) {
            const auto most = std::max_element(
                written.begin(), written.end(),
                [](const auto& a, const auto& b) { return a.second < b.second; });
            units[id] = {most->first.first, most->first.second};
        }
    }
    return units;
}

EngineLayout widest(EngineLayout a, EngineLayout b)
{
    return {std::max(a.turbochargers, b.turbochargers), std::max(a.coolers, b.coolers)};
}

} // namespace

EntrySession::EntrySession(Workplace& workplace, QObject* parent) : QObject(parent), workplace_(workplace)
{
    write_soon_.setSingleShot(true);
    write_soon_.setInterval(0); // a pasted block is written in one go
    connect(&write_soon_, &QTimer::timeout, this, &EntrySession::flush);
    connect(&sheet_, &EntrySheet::value_put, this, &EntrySession::remember);
    connect(&sheet_, &EntrySheet::unreadable_changed, this,
            [this] { keep_unreadable(sheet_.reading().id, sheet_.unreadable()); });
}

EntrySession::~EntrySession()
{
    flush();
}

storage::ReadingStore EntrySession::store() const
{
    return storage::ReadingStore(*workplace_.history());
}

bool EntrySession::failed(const Problem& problem)
{
    problem_ = problem;
    emit changed();
    return false;
}

// ------------------------------------------------------------------------------------ which reading

void EntrySession::forget()
{
    waiting_reading_.clear();
    waiting_ship_.clear();
    engine_id_.clear();
    vessel_id_.clear();
    state_ = State::nothing;
}

void EntrySession::show_engine(const QString& vessel_id, const QString& engine_id)
{
    if (engine_id == engine_id_ && vessel_id == vessel_id_ && state_ != State::nothing)
        return;
    flush();
    vessel_id_ = vessel_id;
    engine_id_ = engine_id;
    saved_at_ = {};
    if (!open_engine()) {
        state_ = State::nothing;
        emit changed();
        return;
    }
    const auto readings = store().list(Owner::engine(to_std(engine_id_)));
    if (readings)
        for (auto entry = readings.value().rbegin(); entry != readings.value().rend(); ++entry)
            if (entry->state == ReadingState::draft) {
                open_draft(to_qstring(entry->id));
                return;
            }
    begin_new();
}

/// What all readings of this engine have in common.
bool EntrySession::open_engine()
{
    problem_.reset();
    if (!workplace_.history() || engine_id_.isEmpty())
        return false;
    const auto engine = storage::VesselStore(*workplace_.history()).engine(to_std(engine_id_));
    if (!engine)
        return failed(engine.error());
    const auto readings = store().load(to_std(engine_id_));
    if (!readings)
        return failed(readings.error());
    engine_start_ = {};
    engine_start_.engine = engine.value().engine;
    engine_start_.used = quantities_used(readings.value());
    engine_start_.layout = find_layout(readings.value());
    engine_start_.units = units_of_last(readings.value());
    const std::string last = readings.value().empty() ? std::string() : readings.value().back().id;
    const storage::PreferenceStore preferences(*workplace_.history());
    if (const auto layout = preferences.choice(to_std(engine_id_), layout_choice))
        if (const auto chosen = read_layout(layout.value()))
            engine_start_.layout = widest(engine_start_.layout, *chosen);
    if (const auto units = preferences.units(to_std(engine_id_)))
        for (const auto& [id, chosen] : units.value()) {
            // A choice holds until a later reading was written in another unit.
            const auto since = preferences.choice(to_std(engine_id_), unit_since(id));
            const bool newer = !since || !since.value() || *since.value() == last;
            if (newer || engine_start_.units.count(id) == 0)
                engine_start_.units[id] = {chosen.unit, chosen.kind};
        }
    return true;
}

void EntrySession::begin_new()
{
    flush();
    Reading reading;
    reading.closed = false;
    reading.taken_at.utc = std::chrono::floor<std::chrono::minutes>(workplace_.history()->now());
    reading.taken_at.offset_minutes = last_offset(closed_readings(1));
    load(std::move(reading), workplace_.read_only() ? State::read_only : State::writing);
}

void EntrySession::open_draft(const QString& reading_id)
{
    flush();
    const auto draft = store().reading(to_std(reading_id));
    if (!draft) {
        failed(draft.error());
        return;
    }
    load(draft.value(), workplace_.read_only() ? State::read_only : State::writing);
}

void EntrySession::correct(const QString& reading_id)
{
    flush();
    const auto reading = store().reading(to_std(reading_id));
    if (!reading) {
        failed(reading.error());
        return;
    }
    stored_ = reading.value();
    signature_.why.clear();
    load(reading.value(), workplace_.read_only() ? State::read_only : State::correcting);
}

void EntrySession::load(Reading reading, State state)
{
    undo_.clear();
    waiting_reading_.clear();
    waiting_ship_.clear();
    waiting_time_ = false;
    saved_at_ = {}; // nothing of this one was written yet
    SheetStart start = engine_start_;
    start.layout = widest(start.layout, find_layout(std::span(&reading, 1)));
    start.ship = find_ship_values(reading.taken_at, start.ship_open);
    if (state == State::correcting)
        start.ship_open = false;
    const storage::PreferenceStore preferences(*workplace_.history());
    if (const auto texts = preferences.choice(to_std(engine_id_), unreadable_choice(reading.id)))
        start.unreadable = read_unreadable(to_qstring(texts.value().value_or(std::string())));
    start.reading = std::move(reading);
    state_ = state;
    sheet_.start(std::move(start));
    emit reloaded();
    emit changed();
}

/// What was already entered for the ship about this time: a draft that others fill too, or a closed reading.
std::vector<Value> EntrySession::find_ship_values(StampedTime near, bool& open)
{
    open = true;
    ship_reading_id_.clear();
    const auto entries = store().list(Owner::vessel(to_std(vessel_id_)));
    if (!entries)
        return {};
    const storage::ReadingEntry* nearest = nullptr;
    for (const storage::ReadingEntry& entry : entries.value()) {
        if (entry.state == ReadingState::withdrawn ||
            apart(entry.taken_at.utc, near.utc) > storage::shared_within)
            continue;
        const bool drafted = entry.state == ReadingState::draft;
        const bool was_draft = nearest && nearest->state == ReadingState::draft;
        if (!nearest || (drafted && !was_draft) ||
            (drafted == was_draft &&
             apart(entry.taken_at.utc, near.utc) < apart(nearest->taken_at.utc, near.utc)))
            nearest = &entry;
    }
    if (!nearest)
        return {};
    open = nearest->state == ReadingState::draft;
    ship_reading_id_ = nearest->id;
    ship_taken_at_ = nearest->taken_at.utc;
    const auto ship = store().reading(nearest->id);
    return ship ? ship.value().values : std::vector<Value>();
}

std::vector<storage::ReadingEntry> EntrySession::other_drafts() const
{
    std::vector<storage::ReadingEntry> drafts;
    if (!workplace_.history())
        return drafts;
    if (const auto readings = store().list(Owner::engine(to_std(engine_id_))))
        for (const storage::ReadingEntry& entry : readings.value())
            if (entry.state == ReadingState::draft && entry.id != sheet_.reading().id)
                drafts.push_back(entry);
    return drafts;
}

std::vector<storage::ReadingEntry> EntrySession::readings_in(storage::ReadingState state,
                                                             std::size_t at_most) const
{
    std::vector<storage::ReadingEntry> found;
    if (!workplace_.history())
        return found;
    const auto readings = store().list(Owner::engine(to_std(engine_id_)));
    if (readings)
        for (auto entry = readings.value().rbegin();
             entry != readings.value().rend() && found.size() < at_most; ++entry)
            if (entry->state == state)
                found.push_back(*entry);
    return found;
}

// ------------------------------------------------------------------------------------------- choices

void EntrySession::set_taken_at(StampedTime time)
{
    const Reading& reading = sheet_.reading();
    if ((state_ != State::writing && state_ != State::correcting) ||
        (time.utc == reading.taken_at.utc && time.offset_minutes == reading.taken_at.offset_minutes))
        return;
    if (state_ == State::correcting) {
        waiting_time_ = time.utc != stored_.taken_at.utc || time.offset_minutes != stored_.taken_at.offset_minutes;
        sheet_.set_head(reading.id, reading.name, time);
        write_soon_.start();
        emit changed();
        return;
    }
    std::string name = reading.name;
    if (!reading.id.empty()) {
        name = free_name(store().list(Owner::engine(to_std(engine_id_))), time, reading.id);
        const auto renamed = store().rename_draft(reading.id, name, time);
        if (!renamed) {
            failed(renamed.error());
            return;
        }
        saved_at_ = QDateTime::currentDateTime();
    }
    sheet_.set_head(reading.id, name, time);
    follow_ship(time);
    emit changed();
}

/// Another time may find what was entered for the ship about then. Values typed here go along with the
/// reading.
void EntrySession::follow_ship(StampedTime time)
{
    const bool typed_here = sheet_.ship_open() && !sheet_.ship_values().empty();
    if (!typed_here) {
        bool open = true;
        std::vector<Value> values = find_ship_values(time, open);
        sheet_.set_ship(std::move(values), open);
        return;
    }
    if (ship_reading_id_.empty() || apart(ship_taken_at_, time.utc) <= storage::shared_within)
        return;
    const auto taken = store().list(Owner::vessel(to_std(vessel_id_)));
    const auto moved = store().rename_draft(ship_reading_id_, free_name(taken, time, ship_reading_id_), time);
    if (moved)
        ship_taken_at_ = time.utc;
    else
        failed(moved.error());
}

void EntrySession::set_row_unit(QuantityId quantity, WrittenUnit unit)
{
    engine_start_.units[quantity] = unit;
    sheet_.set_row_unit(quantity, unit);
    if (!workplace_.history() || workplace_.read_only())
        return;
    storage::PreferenceStore preferences(*workplace_.history());
    const auto kept =
        preferences.set_unit(to_std(engine_id_), quantity, storage::ChosenUnit{unit.id, unit.kind});
    const auto last = closed_readings(1);
    const auto dated = preferences.set_choice(to_std(engine_id_), unit_since(quantity),
                                              last.empty() ? std::string() : last.front().id);
    if (!kept)
        failed(kept.error());
    else if (!dated)
        failed(dated.error());
}

void EntrySession::set_layout(EngineLayout layout)
{
    flush();
    engine_start_.layout = layout;
    if (workplace_.history() && !workplace_.read_only()) {
        storage::PreferenceStore preferences(*workplace_.history());
        static_cast<void>(preferences.set_choice(to_std(engine_id_), layout_choice,
                                                 std::to_string(layout.turbochargers) + "/" +
                                                     std::to_string(layout.coolers)));
    }
    load(sheet_.reading(), state_);
}

void EntrySession::set_signature(const QString& who, const QString& why)
{
    signature_ = {to_std(who.trimmed()), to_std(why.trimmed())};
    if (state_ == State::correcting && waits())
        write_soon_.start();
}

} // namespace evenstroke
