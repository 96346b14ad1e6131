// SPDX-License-Identifier: GPL-3.0-or-later
#include "tests/sample/sample_record.h"

#include "sample_vessel/reading_maker.h"

#include <algorithm>
#include <stdexcept>

namespace sample = evenstroke::sample;

namespace {

using namespace evenstroke;

Engine engine_of(const sample::EngineDesign& design)
{
    Engine engine;
    engine.name = design.name;
    engine.kind = design.two_stroke ? EngineKind::two_stroke : EngineKind::four_stroke;
    engine.cylinders = design.cylinders;
    engine.bore = millimetres(design.bore_mm);
    engine.stroke = millimetres(design.stroke_mm);
    engine.rod_length = millimetres(design.rod_length_mm);
    engine.rated_power = kilowatts(design.rated_power_kw);
    engine.rated_speed = per_minute(design.rated_speed_rpm);
    engine.mechanical_efficiency = design.mechanical_efficiency;
    for (const auto& [quantity, pair] : design.correction)
        engine.correction[quantity] = {pair.per_inlet_air, pair.per_coolant, "invented"};
    for (const sample::DesignLimit& limit : design.limits)
        engine.limits.push_back({limit.quantity, limit.low, limit.high, "invented"});
    for (const sample::DesignPoint& point : design.baseline)
        engine.baseline.push_back({point.load_percent, "", point.values});
    return engine;
}

Value value_of(const sample::Line& line)
{
    Value value;
    value.place = line.cylinder.empty() ? Place::engine() : Place::cylinder(std::stoi(line.cylinder));
    auto quantity_id = find_quantity(line.quantity, value.place.kind);
    if (!quantity_id) {
        value.place = {Place::Kind::ship, 0};
        quantity_id = find_quantity(line.quantity, Place::Kind::ship);
    }
    if (!quantity_id)
        throw std::runtime_error("no such quantity: " + line.quantity);
    value.quantity = *quantity_id;
    value.phase = line.phase == "before"  ? Phase::before
                  : line.phase == "after" ? Phase::after
                                          : Phase::reading;
    value.typed = line.value;
    value.words = line.text;
    value.missing = line.missing_reason.empty() ? MissingReason::none : MissingReason::not_read;
    value.unit = quantity(value.quantity).unit;
    value.kind = quantity(value.quantity).kind;
    if (line.value.empty())
        return value;
    const WrittenUnit written = find_unit(line.unit).value();
    value.unit = written.id;
    value.number = parse_number(line.value).value();
    value.value_si = unit(written.id).to_si(*value.number);
    return value;
}

Reading reading_of(const sample::Sheet& sheet, const std::vector<sample::Sheet>& ship)
{
    Reading reading;
    reading.name = sheet.name;
    reading.taken_at = {sheet.time.utc, sheet.time.offset_minutes};
    for (const sample::Line& line : sheet.lines)
        reading.values.push_back(value_of(line));
    for (const sample::Sheet& shared : ship)
        if (sheet.time.utc >= shared.time.utc && sheet.time.utc - shared.time.utc <= std::chrono::hours(6))
            for (const sample::Line& line : shared.lines)
                reading.values.push_back(value_of(line));
    return reading;
}

Event event_of(const sample::Work& work)
{
    Event event;
    event.date = {std::chrono::sys_seconds(sample::day(work.date)), 0};
    event.place = work.cylinder > 0 ? Place::cylinder(work.cylinder) : Place::engine();
    event.kind = work.kind;
    event.note = work.note;
    event.part = work.part;
    return event;
}

} // namespace

std::shared_ptr<const EngineRecord> sample_record(const sample::Scenario& scenario, std::uint64_t seed,
                                                  int engine)
{
    auto record = std::make_shared<EngineRecord>();
    record->vessel.name = scenario.vessel;
    record->engine = engine_of(scenario.engines[static_cast<std::size_t>(engine)]);
    const std::vector<sample::Sheet> ship = sample::ship_sheets(scenario, seed);
    for (const sample::Sheet& sheet : sample::engine_sheets(scenario, seed, engine))
        record->readings.push_back(reading_of(sheet, ship));
    for (const sample::Work& work : scenario.work)
        if (work.engine == engine)
            record->events.push_back(event_of(work));
    std::stable_sort(record->events.begin(), record->events.end(),
                     [](const Event& a, const Event& b) { return a.date.utc < b.date.utc; });
    return record;
}
