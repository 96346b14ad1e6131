// SPDX-License-Identifier: GPL-3.0-or-later
#include "tests/app/entry_history.h"

#include "storage/reading_store.h"
#include "storage/vessel_store.h"
#include "tests/core/reading_maker.h"

#include <stdexcept>

namespace evenstroke::test {
namespace {

constexpr char main_engine[] =
    R"({"vessel": "Quiet Barley", "engine": "main engine", "cycle": "two-stroke", "cylinders": 6,
"bore_mm": 600, "stroke_mm": 2400, "rod_length_mm": 2600, "rated_power_kw": 12000, "rated_speed_rpm": 105,
"reference": {"inlet_air_c": 25, "cooler_coolant_c": 25, "barometric_mbar": 1000}, "correction": {},
"baseline": [{"load_percent": 50, "maximum_pressure": 120, "compression_pressure": 90, "exhaust_temperature": 320},
{"load_percent": 75, "maximum_pressure": 142, "compression_pressure": 118, "exhaust_temperature": 350},
{"load_percent": 100, "maximum_pressure": 165, "compression_pressure": 140, "exhaust_temperature": 390}]})";
constexpr char auxiliary[] =
    R"({"vessel": "Quiet Barley", "engine": "auxiliary engine 1", "cycle": "four-stroke", "cylinders": 5,
"bore_mm": 210, "stroke_mm": 320, "rod_length_mm": 620, "rated_power_kw": 900, "rated_speed_rpm": 900, "baseline": []})";

template <typename T> auto must(T result)
{
    if (!result)
        throw std::runtime_error(result.error().text());
    if constexpr (!std::is_same_v<T, Result<void>>)
        return std::move(result).value();
}

/// A repeatable scatter of about one unit, different for every place and month.
double scatter(int month, int cylinder)
{
    return ((month * 7 + cylinder * 5 + month * cylinder * 3) % 11 - 5) * 0.3;
}

Reading monthly(int month)
{
    ReadingMaker maker;
    maker.number("load_percent", 75)
        .number("shaft_power", 9000)
        .number("speed", 95)
        .number("engine_running_hours", 20000 + 500 * month);
    maker.number("scavenge_pressure", 2.0 + 0.001 * (month % 3))
        .number("barometric_pressure", 1005, at_ship());
    for (int cylinder = 1; cylinder <= 6; ++cylinder) {
        const Place place = Place::cylinder(cylinder);
        maker.number("exhaust_temperature", usual_exhaust(cylinder) + std::round(scatter(month, cylinder)),
                     place);
        maker.number("maximum_pressure", usual_peak(cylinder) + scatter(month + 2, cylinder), place);
        maker.number("compression_pressure", 118 + scatter(month + 4, cylinder), place);
    }
    Reading reading = maker.done();
    for (Value& value : reading.values)
        value.typed = QString::number(*value.number, 'g', 8).toStdString();
    return reading;
}

} // namespace

double usual_exhaust(int cylinder)
{
    return 350 + 3 * (cylinder % 3);
}

double usual_peak(int cylinder)
{
    return 142 + 0.5 * (cylinder % 2);
}

void write_entry_history(const QString& path, int readings)
{
    storage::HistorySettings settings;
    settings.automatic_backups = false;
    const auto history = must(storage::History::create(path, settings));
    const storage::Signature by{"test", ""};
    storage::VesselStore vessels(*history);
    const auto engine = must(vessels.save_document(main_engine, by));
    must(vessels.save_document(auxiliary, by));
    storage::ReadingStore store(*history);
    for (int month = 0; month < readings; ++month) {
        const int back = readings - 1 - month;
        const int number = (2021 * 12 + 2) - back; // March 2021 is the last
        const std::string name =
            std::to_string(number / 12) + (number % 12 < 9 ? "-0" : "-") + std::to_string(number % 12 + 1);
        const StampedTime taken = must(parse_time(name + "-01T08:00+02:00"));
        Reading draft = must(store.make_draft(storage::Owner::engine(engine.engine_id), name, taken, by));
        draft.values = monthly(month).values;
        must(store.save_draft(draft));
        must(store.close(draft.id, by));
    }
}

} // namespace evenstroke::test
