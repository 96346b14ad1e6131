// SPDX-License-Identifier: GPL-3.0-or-later
#include "tests/app/large_engine.h"

#include <QDate>
#include <QDir>
#include <QFile>

#include <random>

namespace evenstroke {

namespace {

struct Invented
{
    const char* name;
    const char* unit;
    double level, per_load, noise;
    int decimals;
};

// All numbers are invented; they only have to be possible.
constexpr Invented of_cylinders[] = {
    {"maximum_pressure", "bar", 150, 0.9, 0.8, 1},          {"compression_pressure", "bar", 122, 0.9, 0.8, 1},
    {"mean_indicated_pressure", "bar", 16.8, 0.12, 0.1, 2}, {"exhaust_temperature", "degC", 350, 1.6, 5, 0},
    {"fuel_index", "%", 74, 0.5, 0.4, 1},                   {"jacket_outlet_temperature", "degC", 84, 0, 0.7, 0},
    {"piston_coolant_outlet_temperature", "degC", 58, 0.05, 0.7, 0}};
constexpr Invented of_engine[] = {
    {"speed", "r/min", 98, 0.35, 0.2, 1},          {"scavenge_pressure", "bar", 2.4, 0.03, 0.02, 2},
    {"scavenge_temperature", "degC", 38, 0, 1, 0}, {"inlet_air_temperature", "degC", 30, 0, 4, 0},
    {"fuel_consumption", "kg/h", 3300, 38, 15, 0}, {"lube_oil_inlet_pressure", "bar", 2.8, 0, 0.05, 2}};

QByteArray engine_json(int cylinders)
{
    QByteArray baseline;
    for (const double load : {50.0, 65.0, 75.0, 85.0, 100.0}) {
        baseline += baseline.isEmpty() ? "\n  {" : ",\n  {";
        baseline += "\"load_percent\": " + QByteArray::number(load);
        for (const Invented& each : of_cylinders)
            baseline += ", \"" + QByteArray(each.name) + "\": " + QByteArray::number(each.level + each.per_load * (load - 75.0));
        for (const char* name : {"scavenge_pressure", "fuel_consumption"})
            for (const Invented& each : of_engine)
                if (QByteArray(each.name) == name)
                    baseline += ", \"" + QByteArray(name) + "\": " + QByteArray::number(each.level + each.per_load * (load - 75.0));
        baseline += '}';
    }
    return "{\"vessel\": \"Long Furrow\", \"engine\": \"main engine\", \"cycle\": \"two-stroke\", \"cylinders\": "
           + QByteArray::number(cylinders)
           + ", \"bore_mm\": 600, \"stroke_mm\": 2400, \"rod_length_mm\": 2500, \"rated_power_kw\": 24000, "
             "\"rated_speed_rpm\": 105, \"reference\": {\"inlet_air_c\": 25, \"cooler_coolant_c\": 25, "
             "\"barometric_mbar\": 1000}, \"baseline\": ["
           + baseline + "]}\n";
}

void write(const QString& path, const QByteArray& content)
{
    QFile file(path);
    if (!file.open(QIODevice::WriteOnly) || file.write(content) != content.size())
        throw std::runtime_error("the invented engine could not be written");
}

} // namespace

void write_large_engine(const QString& folder, int cylinders, int months)
{
    std::mt19937 random(12061);
    std::normal_distribution<double> normal;
    QByteArray readings = "reading,taken_at,quantity,cylinder,value,unit\n";
    QByteArray events = "date,cylinder,kind,note\n";
    for (int month = 0; month < months; ++month) {
        const QDate day = QDate(2021, 1, 14).addMonths(month);
        const QByteArray start =
            day.toString(QStringLiteral("yyyy-MM")).toUtf8() + ',' + day.toString(Qt::ISODate).toUtf8() + "T08:00Z,";
        const double load = 75.0 + 6.0 * normal(random);
        const auto add = [&](const Invented& each, int cylinder, double drift) {
            const double value = each.level + each.per_load * (load - 75.0) + each.noise * normal(random) + drift;
            readings += start + each.name + ',' + (cylinder > 0 ? QByteArray::number(cylinder) : QByteArray()) + ','
                        + QByteArray::number(value, 'f', each.decimals) + ',' + each.unit + '\n';
        };
        readings += start + "load_percent,," + QByteArray::number(load, 'f', 1) + ",%\n";
        for (const Invented& each : of_engine)
            add(each, 0, 0.0);
        for (const Invented& each : of_cylinders)
            for (int cylinder = 1; cylinder <= cylinders; ++cylinder) {
                const bool drifts = cylinder == 4 && QByteArray(each.name) == "compression_pressure";
                add(each, cylinder, drifts ? -0.7 * std::max(0, month - (months - 12)) : 0.0);
            }
        if (month % 2 == 1) {
            const int cylinder = month / 2 % cylinders + 1;
            if (cylinder != 4 || month < months - 24)
                events += day.addDays(3).toString(Qt::ISODate).toUtf8() + ',' + QByteArray::number(cylinder) + ",overhaul,\n";
        }
    }
    QDir().mkpath(folder);
    write(folder + QStringLiteral("/engine.json"), engine_json(cylinders));
    write(folder + QStringLiteral("/readings.csv"), readings);
    write(folder + QStringLiteral("/events.csv"), events);
}

} // namespace evenstroke
