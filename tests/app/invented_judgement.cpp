// SPDX-License-Identifier: GPL-3.0-or-later
#include "tests/app/invented_judgement.h"

#include <cmath>
#include <random>

namespace evenstroke::invented {

namespace {

using std::chrono::days;
using std::chrono::sys_days;

constexpr double days_a_month = 30.4375;

TimePoint month(int number)
{
    const sys_days start{std::chrono::year{2028} / 3 / 14};
    return TimePoint(start) + days(static_cast<int>(number * days_a_month)) + std::chrono::hours(6);
}

struct Kind
{
    const char* name;
    double level, noise;
};

/// What one place reads: its own level, noise, and the drift of cylinder 4.
class Maker
{
public:
    explicit Maker(const Wishes& wishes) : wishes_(wishes) {}

    std::shared_ptr<const Judgement> make()
    {
        record_->vessel = {"vessel-1", "Quiet Barley", "", "", "", ""};
        record_->engine.id = "engine-1";
        record_->engine.name = "Main engine";
        record_->engine.cylinders = wishes_.cylinders;
        for (int i = 0; i < wishes_.readings; ++i)
            add_reading(i);
        for (const Kind& kind : {Kind{"maximum_pressure", 140, 0.9}, Kind{"compression_pressure", 112, 0.9},
                                 Kind{"mean_indicated_pressure", 17, 0.1}, Kind{"exhaust_temperature", 345, 5},
                                 Kind{"fuel_index", 72, 0.4}, Kind{"jacket_outlet_temperature", 84, 0.8},
                                 Kind{"piston_coolant_outlet_temperature", 58, 0.8}})
            for (int cylinder = 1; cylinder <= wishes_.cylinders; ++cylinder)
                add_trend(*find_quantity(kind.name, Place::Kind::cylinder), Place::cylinder(cylinder), kind);
        if (wishes_.engine_values)
            add_engine();
        add_evidence();
        add_flags();
        judgement_.record = record_;
        return std::make_shared<const Judgement>(judgement_);
    }

private:
    void add_reading(int index)
    {
        Reading reading;
        reading.id = "reading-" + std::to_string(index);
        reading.name = "R" + std::to_string(index);
        reading.taken_at.utc = month(index);
        const auto hours = find_quantity("cylinder_running_hours", Place::Kind::cylinder);
        for (int cylinder = 1; hours && cylinder <= wishes_.cylinders; ++cylinder) {
            Value value;
            value.quantity = *hours;
            value.place = Place::cylinder(cylinder);
            value.number = 640.0 + 450.0 * index + 2700.0 * ((cylinder * 5) % 7);
            value.value_si = 3600.0 * *value.number;
            value.typed = std::to_string(*value.number);
            reading.values.push_back(value);
        }
        record_->readings.push_back(reading);
        ReadingJudgement judged;
        judged.reading = static_cast<std::size_t>(index);
        judged.steadiness = index == 9 ? Steadiness::unsteady : Steadiness::steady;
        judged.load_percent = 76.0 + 4.0 * std::sin(index);
        judgement_.readings.push_back(judged);
    }

    bool drifts(QuantityId id, const Place& place) const
    {
        return wishes_.drifting && place == Place::cylinder(std::min(4, wishes_.cylinders))
               && (quantity(id).name == "compression_pressure" || quantity(id).name == "maximum_pressure");
    }

    void add_trend(QuantityId id, const Place& place, const Kind& kind)
    {
        Trend trend;
        trend.quantity = id;
        trend.place = place;
        trend.noise = kind.noise;
        const double own = kind.noise * 0.8 * normal_(random_);
        const int fresh = place == Place::cylinder(6) ? wishes_.readings - 4 : place == Place::cylinder(2) ? 20 : -1;
        for (int i = 0; i < wishes_.readings; ++i) {
            if (normal_(random_) > 1.9)
                continue; // not read
            TrendPoint point;
            point.reading = static_cast<std::size_t>(i);
            const double months_of_drift = std::max(0, i - (wishes_.readings - 10));
            const double drift = drifts(id, place) ? -0.6 * kind.noise * months_of_drift : 0.0;
            point.deviation = own + kind.noise * normal_(random_) + drift;
            point.corrected = kind.level + *point.deviation;
            point.expected = kind.level;
            point.raw = *point.corrected + 0.5 * kind.noise * std::sin(0.5 * i);
            if (place.kind == Place::Kind::cylinder)
                point.apart = *point.deviation;
            point.uncertainty = kind.noise * 1.5;
            point.unsteady = i == 9;
            point.doubtful = i == 14 && place == Place::cylinder(4);
            point.stretch = i >= fresh && fresh >= 0 ? 1 : 0;
            trend.points.push_back(point);
        }
        const int last = static_cast<int>(trend.points.size());
        trend.learned = place == Place::cylinder(6) ? 4 : std::min(last, 8);
        trend.level = place == Place::cylinder(6) ? Level::learning : Level::quiet;
        if (trend.level != Level::learning) {
            trend.usual_low = own - 2.0 * kind.noise;
            trend.usual_high = own + 2.0 * kind.noise;
        }
        if (drifts(id, place))
            trend.level = quantity(id).name == "compression_pressure" ? Level::watch : Level::note;
        if (quantity(id).name == "piston_coolant_outlet_temperature" && place == Place::cylinder(2))
            trend.level = Level::ask;
        judgement_.trends.push_back(trend);
    }

    void add_engine()
    {
        const auto add = [this](const char* name, Place place, double level, double noise) {
            if (const auto id = find_quantity(name, place.kind))
                add_trend(*id, place, {name, level, noise});
        };
        add("turbocharger_speed", Place::turbocharger(1), 14200, 60);
        add("exhaust_before_turbine", Place::turbocharger(1), 410, 5);
        add("exhaust_after_turbine", Place::turbocharger(1), 255, 4);
        add("scavenge_pressure", Place::engine(), 2.6, 0.03);
        add("scavenge_temperature", Place::engine(), 38, 0.8);
        add("cooler_pressure_drop", Place::cooler(1), 14, 0.6);
        add("fuel_consumption", Place::engine(), 1720, 12);
        add("lube_oil_inlet_pressure", Place::engine(), 2.9, 0.05);
    }

    void add_evidence()
    {
        for (int cylinder = 1; cylinder <= wishes_.cylinders; ++cylinder) {
            Evidence evidence;
            evidence.place = Place::cylinder(cylinder);
            evidence.threshold = 4.8;
            for (int i = 0; i < wishes_.readings; ++i) {
                const double grown = wishes_.drifting && cylinder == std::min(4, wishes_.cylinders)
                                         ? 0.55 * std::max(0, i - (wishes_.readings - 10))
                                         : 0.0;
                evidence.amount.push_back(i < 7 ? std::nullopt
                                                : std::optional(1.4 + 0.4 * std::sin(1.7 * i + cylinder) + grown));
            }
            judgement_.evidence.push_back(evidence);
        }
    }

    void add_flags()
    {
        judgement_.level = Level::quiet;
        if (!wishes_.drifting)
            return;
        judgement_.level = Level::watch;
        Flag flag;
        flag.subject = Place::cylinder(std::min(4, wishes_.cylinders));
        flag.quantity = *find_quantity("compression_pressure");
        flag.reading = static_cast<std::size_t>(wishes_.readings - 5);
        flag.severity = flag.level_now = Level::watch;
        flag.pattern = "ring_blow_by";
        flag.pattern_words = "charge leak (rings or exhaust valve)";
        flag.ramp = true;
        flag.since = month(wishes_.readings - 10);
        flag.months = 9.0;
        flag.evidence = 6.1;
        flag.threshold = 4.8;
        flag.moved = {{flag.quantity, -0.54, 5.2, false}, {*find_quantity("maximum_pressure"), -0.5, 3.1, false}};
        flag.sentence = "Cylinder 4 compression pressure has fallen 0.6 bar a month for 9 months against the other cylinders.";
        flag.chance_sentence = "So strong a drift comes by chance on a sound engine about once in 400 engine-years.";
        flag.next_check = "compression with the indicator, scavenge-port inspection.";
        flag.cautions = {"scavenge_space"};
        flag.time_to_limit = TimeToLimit{-8.0, "8 bar below its own level", 3.0, 6.0, 11.0};
        for (std::size_t i = flag.reading - 4; i < judgement_.readings.size(); ++i)
            flag.carrying.push_back(i);
        judgement_.flags.push_back(flag);
        Event overhaul;
        overhaul.date.utc = month(4);
        overhaul.place = flag.subject;
        overhaul.kind = "overhaul";
        Event valves = overhaul;
        valves.date.utc = month(21);
        valves.kind = "fuel_valves";
        record_->events = {overhaul, valves};
    }

    Wishes wishes_;
    std::shared_ptr<EngineRecord> record_ = std::make_shared<EngineRecord>();
    Judgement judgement_;
    std::mt19937 random_{20310314};
    std::normal_distribution<double> normal_;
};

} // namespace

std::shared_ptr<const Judgement> judgement(const Wishes& wishes) { return Maker(wishes).make(); }

} // namespace evenstroke::invented
