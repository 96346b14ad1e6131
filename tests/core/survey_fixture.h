// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/survey/survey_report.h"

#include <cmath>
#include <memory>
#include <string>

/// A judgement made by hand: an invented vessel with every kind of thing that a report prints. Plain enough to
/// say in a test what must stand where; nothing here was judged.
namespace evenstroke::survey_fixture {

inline TimePoint day(const std::string& text) { return parse_date(text).value().utc; }
inline QuantityId id_of(const char* name, Place::Kind kind = Place::Kind::cylinder) { return find_quantity(name, kind).value(); }

inline Value typed(QuantityId id, Place place, const std::string& text, double number)
{
    Value value;
    value.quantity = id;
    value.place = place;
    value.typed = text;
    value.unit = quantity(id).unit;
    value.kind = quantity(id).kind;
    value.number = number;
    value.value_si = unit(value.unit).to_si(number);
    return value;
}

inline Value missing(QuantityId id, Place place, MissingReason reason)
{
    Value value;
    value.quantity = id;
    value.place = place;
    value.unit = quantity(id).unit;
    value.missing = reason;
    return value;
}

inline Engine make_engine(int cylinders)
{
    Engine engine;
    engine.id = "engine";
    engine.name = "Main engine";
    engine.cylinders = cylinders;
    engine.bore = millimetres(500.0);
    engine.stroke = millimetres(2000.0);
    engine.rod_length = millimetres(2100.0);
    engine.rated_power = kilowatts(9000.0);
    engine.rated_speed = per_minute(120.0);
    engine.reference.source = "shop test, sheet 1";
    engine.correction["compression_pressure"] = {0.002, -0.001, "shop test, sheet 4"};
    engine.limits.push_back({"maximum_pressure", std::nullopt, 165.0, "nameplate"});
    engine.instruments.push_back({"maximum_pressure", "PI-1", "2030-02-11", 1.5, "certificate on board"});
    engine.baseline_source = "shop test, sheet 2";
    for (const double load : {50.0, 75.0, 100.0})
        engine.baseline.push_back({load, "", {{"compression_pressure", 60.0 + 0.6 * load}, {"scavenge_pressure", 0.03 * load - 0.5}}});
    return engine;
}

/// Readings on the 14th of each month; a month in `skipped` has none, one in `unsteady` an unusable one.
struct Scene
{
    int cylinders = 6;
    int months = 12; ///< the last one is March 2031
    std::vector<int> skipped, unsteady; ///< count back from the last: 0 is March 2031
    bool with_flag = true;

    bool has(const std::vector<int>& list, int back) const { return std::find(list.begin(), list.end(), back) != list.end(); }
};

inline TimePoint reading_time(int back)
{
    using namespace std::chrono;
    return sys_days((year(2031) / March - months(back)) / 14) + hours(9) + minutes(30);
}

inline Reading make_reading(const Scene& scene, int back)
{
    Reading reading;
    reading.taken_at = {reading_time(back), 0};
    reading.name = date_text(reading.taken_at.utc).substr(0, 7);
    reading.values.push_back(typed(id_of("load_percent", Place::Kind::engine), Place::engine(), "76", 76.0));
    reading.values.push_back(typed(id_of("engine_running_hours", Place::Kind::engine), Place::engine(), std::to_string(40000 - 500 * back), 40000.0 - 500.0 * back));
    reading.values.push_back(typed(id_of("scavenge_pressure", Place::Kind::engine), Place::engine(), "1.82", 1.82));
    for (int c = 1; c <= scene.cylinders; ++c) {
        const double fall = c == 4 && back < 9 ? -0.6 * (9 - back) : 0.0;
        const double wobble = 0.4 * std::sin(7.0 * c + 3.0 * back);
        char text[16];
        std::snprintf(text, sizeof text, "%.1f", 105.0 + wobble + fall);
        if (c == 2 && back == 1)
            reading.values.push_back(missing(id_of("compression_pressure"), Place::cylinder(c), MissingReason::out_of_order));
        else if (!(c == 3 && back == 1))
            reading.values.push_back(typed(id_of("compression_pressure"), Place::cylinder(c), text, std::stod(text)));
        reading.values.push_back(missing(id_of("liner_temperature"), Place::cylinder(c), MissingReason::not_fitted));
    }
    return reading;
}

inline ReadingJudgement judged(const Reading& reading, std::size_t index, bool unsteady)
{
    ReadingJudgement result;
    result.reading = index;
    result.steadiness = unsteady ? Steadiness::unsteady : Steadiness::steady;
    result.steadiness_sentence = unsteady ? "Speed went from 110 to 104 r/min during the walk." : "";
    result.load_percent = 76.0;
    for (std::size_t i = 0; i < reading.values.size(); ++i) {
        const Value& value = reading.values[i];
        if (!value.number)
            continue;
        JudgedValue one;
        one.quantity = value.quantity;
        one.place = value.place;
        one.value_index = i;
        one.raw = *value.number;
        if (value.place.kind == Place::Kind::cylinder) {
            one.corrected = one.raw + 1.0;
            one.expected = 105.6;
            one.deviation = *one.corrected - *one.expected;
            one.apart = one.raw - 105.0;
            one.applied = Applied::linear;
        }
        result.values.push_back(one);
    }
    return result;
}

inline void add_trends(Judgement& judgement)
{
    const Engine& engine = judgement.record->engine;
    for (int c = 1; c <= engine.cylinders; ++c) {
        Trend trend;
        trend.quantity = id_of("compression_pressure");
        trend.place = Place::cylinder(c);
        trend.level = c == 4 && !judgement.flags.empty() ? Level::watch : Level::quiet;
        trend.learned = 8;
        trend.usual_low = -2.0;
        trend.usual_high = 2.0;
        trend.noise = 1.0;
        for (const ReadingJudgement& reading : judgement.readings)
            for (const JudgedValue& value : reading.values)
                if (value.quantity == trend.quantity && value.place == trend.place)
                    trend.points.push_back({reading.reading, value.raw, value.corrected, value.expected, value.deviation, value.apart, {},
                                            reading.steadiness == Steadiness::unsteady, value.doubtful, 0});
        judgement.trends.push_back(std::move(trend));
    }
}

inline Flag make_flag(std::size_t reading)
{
    Flag flag;
    flag.reading = reading;
    flag.subject = Place::cylinder(4);
    flag.quantity = id_of("compression_pressure");
    flag.severity = flag.level_now = Level::watch;
    flag.pattern = "blow_by";
    flag.pattern_words = "blow-by (rings or exhaust valve)";
    flag.ramp = true;
    flag.since = day("2030-06-14");
    flag.months = 9.0;
    flag.moved = {{flag.quantity, -0.6, -4.1, false}};
    flag.evidence = 6.1;
    flag.threshold = 4.8;
    flag.sentence = "Cylinder 4 compression pressure has fallen 0.6 bar a month for 9 months against the other cylinders.";
    flag.chance_sentence = "So strong a drift comes by chance on a sound engine about once in 400 engine-years.";
    flag.next_check = "Compression with the indicator, scavenge-port inspection.";
    flag.cautions = {"scavenge_fire", "entering_spaces", "indicator_cocks"};
    flag.time_to_limit = TimeToLimit{-8.0, "a fall of 8 bar", 3.0, 6.0, 11.0};
    return flag;
}

inline Judgement make_judgement(const Scene& scene = {})
{
    auto record = std::make_shared<EngineRecord>();
    record->vessel = {"vessel", "Quiet Barley", "9000001", "", "", ""};
    record->engine = make_engine(scene.cylinders);
    Judgement judgement;
    for (int back = scene.months - 1; back >= 0; --back) {
        if (scene.has(scene.skipped, back))
            continue;
        record->readings.push_back(make_reading(scene, back));
        judgement.readings.push_back(judged(record->readings.back(), record->readings.size() - 1, scene.has(scene.unsteady, back)));
    }
    record->events.push_back({"e1", {day("2030-05-20"), 0}, Place::cylinder(2), "overhaul", "new rings", 35000.0, "second engineer", "", true});
    record->events.push_back({"e2", {day("2030-11-02"), 0}, Place::cylinder(5), "fuel_valves", "", 38000.0, "", "", true});
    judgement.record = record;
    const std::size_t last = record->readings.size() - 1;
    if (scene.with_flag) {
        judgement.flags.push_back(make_flag(last > 4 ? last - 4 : 0));
        judgement.level = Level::watch;
    } else {
        judgement.level = Level::quiet;
    }
    Evidence evidence;
    evidence.place = Place::cylinder(4);
    evidence.threshold = 4.8;
    for (std::size_t i = 0; i <= last; ++i)
        evidence.amount.push_back(i < 8 ? std::optional<double>() : 1.0 + static_cast<double>(i) / 2.0);
    judgement.evidence.push_back(evidence);
    judgement.doubts.push_back({Doubt::Verdict::decimal_slip, last, id_of("compression_pressure"), Place::cylinder(1), "104.9",
                                "10.49 bar is a tenth of the usual: was 104.9 meant?"});
    add_trends(judgement);
    return judgement;
}

inline ReportPeriod year_to_march() { return {day("2030-04-01"), day("2031-03-31")}; }

inline ReportDetails make_details()
{
    ReportDetails details;
    details.date = day("2031-04-02");
    details.program_version = "0.1.0";
    details.data_hash = std::string(64, 'a');
    details.chief_engineer = "";
    return details;
}

} // namespace evenstroke::survey_fixture
