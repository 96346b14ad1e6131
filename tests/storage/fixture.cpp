// SPDX-License-Identifier: GPL-3.0-or-later
#include "fixture.h"

#include <QDir>
#include <QFile>
#include <QFileInfo>

namespace evenstroke::storage {

void StorageTest::write(const QString& name, const QByteArray& content) const
{
    QDir().mkpath(QFileInfo(path(name)).path());
    QFile file(path(name));
    ASSERT_TRUE(file.open(QIODevice::WriteOnly));
    ASSERT_EQ(file.write(content), content.size());
}

QByteArray StorageTest::read(const QString& name) const
{
    QFile file(path(name));
    return file.open(QIODevice::ReadOnly) ? file.readAll() : QByteArray();
}

QByteArray StorageTest::engine_json(const QByteArray& vessel, const QByteArray& engine,
                                    const QByteArray& further)
{
    return "{\"vessel\": \"" + vessel + "\", \"engine\": \"" + engine +
           "\", \"cycle\": \"two-stroke\", \"cylinders\": 6, \"bore_mm\": 600, \"stroke_mm\": 2400, "
           "\"rod_length_mm\": 2460, "
           "\"rated_power_kw\": 13600, \"rated_speed_rpm\": 105" +
           further + "}\n";
}

void StorageTest::write_engine(const QString& folder, const QByteArray& readings,
                               const QByteArray& events) const
{
    write(folder + QStringLiteral("/engine.json"), engine_json());
    write(folder + QStringLiteral("/readings.csv"), readings);
    if (!events.isEmpty())
        write(folder + QStringLiteral("/events.csv"), events);
}

void StorageTest::write_ship() const
{
    write(QStringLiteral("ship/main/engine.json"),
          engine_json("Quiet Barley", "main engine",
                      R"(, "cylinder_names": ["A1", "A2", "A3", "B1", "B2", "B3"], "colour": "grey")"));
    write(QStringLiteral("ship/main/readings.csv"),
          "reading,taken_at,quantity,cylinder,value,unit,phase,text,missing_reason\n"
          "2029-01,2029-01-12T10:30+02:00,maximum_pressure,A1,140.5,bar,,,\n"
          "2029-01,2029-01-12T10:30+02:00,maximum_pressure,2,\"141,5\",bar abs,,,\n"
          "2029-01,2029-01-12T10:30+02:00,exhaust_temperature,B3,640,degF,,,\n"
          "2029-01,2029-01-12T10:30+02:00,exhaust_temperature,B2,,,,,out_of_order\n"
          "2029-01,2029-01-12T10:30+02:00,speed,,95.4,r/min,,,\n"
          "2029-01,2029-01-12T10:30+02:00,speed,,95.0,r/min,before,,\n"
          "2029-01,2029-01-12T10:30+02:00,turbocharger_speed,tc2,14210,1/min,,,\n"
          "2029-01,2029-01-12T10:30+02:00,cooler_pressure_drop,,120,mmWC,,,\n"
          "2029-01,2029-01-12T10:30+02:00,barometric_pressure,,1012,hPa,,,\n"
          "2029-01,2029-01-12T10:30+02:00,power_source,,,,,torsion_meter,\n"
          "2029-01,2029-01-12T10:30+02:00,auxiliary_blower_running,,0,,,,\n"
          "2029-01,2029-01-12T10:30+02:00,reading_remark,,,,,\"calm, \"\"steady\"\"\",\n"
          "2029-02,2029-02-12T08:30:15Z,fuel_consumption,,1900,l/h,,,\n");
    write(QStringLiteral("ship/main/events.csv"), "date,cylinder,kind,note,running_hours,done_by,part\n"
                                                  "2029-01-20,A2,overhaul,\"rings, liner\",12000.5,yard,\n"
                                                  "2029-01-21T06:00+02:00,tc1,turbocharger_wash,,,,\n"
                                                  "2029-01-22,,docking,,,,\n");
    write(QStringLiteral("ship/main/cards/2029-01/A1.csv"),
          "crank_angle_deg,pressure_bar\n-1,100.25\n0,101.5\n1,100.75\n");
    write(QStringLiteral("ship/auxiliary/engine.json"), engine_json("Quiet Barley", "auxiliary engine"));
    write(QStringLiteral("ship/auxiliary/readings.csv"),
          header + "2029-01,2029-01-13T08:30Z,speed,,720,r/min\n");
    write(QStringLiteral("ship/ship_readings.csv"),
          "reading,taken_at,quantity,value,unit\n"
          "noon 12,2029-01-12T12:00Z,sea_water_temperature,18,degC\n"
          "noon 12,2029-01-12T12:00Z,barometric_pressure,1020,mbar\n"
          "noon 13,2029-01-13T16:00Z,sea_water_temperature,19,degC\n");
}

HistorySettings StorageTest::settings()
{
    HistorySettings settings;
    settings.clock = [this] { return now_; };
    settings.automatic_backups = false;
    return settings;
}

std::unique_ptr<History> StorageTest::create(const QString& name)
{
    return value_of_result(History::create(path(name), settings()));
}
std::unique_ptr<History> StorageTest::open(const QString& name, OpenMode mode)
{
    return value_of_result(History::open(path(name), mode, settings()));
}
std::unique_ptr<History> StorageTest::memory()
{
    return value_of_result(History::in_memory(settings()));
}

TakeReport StorageTest::take_folder(History& history, const QString& folder, bool keep_good)
{
    TakeOptions options;
    options.keep_good = keep_good;
    return value_of_result(take(history, {path(folder)}, options));
}

std::string StorageTest::only_engine(History& history)
{
    const auto engines = value_of_result(VesselStore(history).engines());
    EXPECT_EQ(engines.size(), 1U);
    return engines.empty() ? std::string() : engines.front().id;
}

std::vector<Reading> StorageTest::readings_of(History& history)
{
    return value_of_result(ReadingStore(history).load(only_engine(history)));
}

const Value* find_value(const Reading& reading, const char* name, const Place& place)
{
    for (const Value& value : reading.values)
        if (quantity(value.quantity).name == name && value.place == place && value.phase == Phase::reading)
            return &value;
    return nullptr;
}

} // namespace evenstroke::storage
