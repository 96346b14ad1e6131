// SPDX-License-Identifier: GPL-3.0-or-later
#include "fixture.h"

#include "storage/audit.h"
#include "storage/backup.h"
#include "storage/event_store.h"
#include "storage/judgement_store.h"
#include "storage/preference_store.h"

#include <QFile>
#include <QFileInfo>

namespace evenstroke::storage {
namespace {

class Stores : public StorageTest
{
protected:
    std::string add_engine(History& history, const char* vessel = "Quiet Barley",
                           const char* engine = "main engine")
    {
        return value_of_result(
                   VesselStore(history).save_document(engine_json(vessel, engine).toStdString(), chief_))
            .engine_id;
    }
};

TEST_F(Stores, FindAnEngineByNameAndNameTheCandidates)
{
    const auto history = memory();
    add_engine(*history, "Quiet Barley", "main engine");
    add_engine(*history, "Amber Mist", "main engine");
    const std::string auxiliary = add_engine(*history, "Amber Mist", "auxiliary engine 1");
    const VesselStore store(*history);
    EXPECT_EQ(value_of_result(store.find_engine("auxiliary engine 1")).id, auxiliary);
    const auto several = store.find_engine("main engine");
    ASSERT_FALSE(several.has_value());
    EXPECT_EQ(several.error().kind, Problem::Kind::invalid_input);
    EXPECT_EQ(several.error().what_to_do, "Name the vessel too: \"Amber Mist\", \"Quiet Barley\".");
    EXPECT_TRUE(store.find_engine("main engine", "Amber Mist").has_value());
    EXPECT_EQ(store.find_engine("engine").error().kind, Problem::Kind::not_found);
    EXPECT_EQ(store.find_engine("main engine", "Nobody").error().kind, Problem::Kind::not_found);
}

TEST_F(Stores, KeepEveryRevisionOfAnEngine)
{
    const auto history = memory();
    const std::string id = add_engine(*history);
    VesselStore store(*history);
    StoredEngine stored = value_of_result(store.engine(id));
    stored.engine.limits = {{"exhaust_temperature", {}, 430.0, "manual, page 12"}};
    now_ += std::chrono::hours(1);
    const SavedEngine saved = value_of_result(
        store.save_engine(stored.vessel.id, stored.engine, {"S. Shore", "limit from the manual"}));
    EXPECT_EQ(saved.revision, 2);
    EXPECT_EQ(value_of_result(store.save_engine(stored.vessel.id, stored.engine, chief_)).outcome,
              SavedEngine::Outcome::same);
    const auto revisions = value_of_result(store.revisions(id));
    ASSERT_EQ(revisions.size(), 2U);
    EXPECT_EQ(revisions[1].by.why, "limit from the manual");
    EXPECT_EQ(revisions[1].at, now_);
    EXPECT_EQ(value_of_result(store.engine(id)).engine.limits.front().source, "manual, page 12");
    EXPECT_EQ(value_of_result(store.engines()).front().input_revision, 2);
    EXPECT_TRUE(value_of_result(verify(*history)).sound());
}

TEST_F(Stores, RefuseAnEngineThatCannotBe)
{
    const auto history = memory();
    const std::string id = add_engine(*history);
    VesselStore store(*history);
    StoredEngine stored = value_of_result(store.engine(id));
    stored.engine.rod_length = millimetres(100.0);
    EXPECT_FALSE(store.save_engine(stored.vessel.id, stored.engine, chief_).has_value());
    EXPECT_EQ(value_of_result(store.engine(id)).revision, 1);
}

TEST_F(Stores, AddAVesselAndAnEngineByHand)
{
    const auto history = memory();
    VesselStore store(*history);
    Vessel vessel;
    vessel.name = "Quiet Barley";
    vessel.id = value_of_result(store.save_vessel(vessel, chief_));
    EXPECT_FALSE(store.save_vessel(Vessel{"", "Quiet Barley", "", "", "", ""}, chief_).has_value());
    Engine engine;
    engine.name = "main engine";
    engine.cylinders = 6;
    engine.bore = millimetres(600);
    engine.stroke = millimetres(2400);
    engine.rod_length = millimetres(2460);
    engine.rated_power = kilowatts(13600);
    engine.rated_speed = per_minute(105);
    const SavedEngine saved = value_of_result(store.save_engine(vessel.id, engine, chief_));
    EXPECT_EQ(value_of_result(store.engine(saved.engine_id)).vessel.name, "Quiet Barley");

    vessel.name = "Loud Barley";
    value_of_result(store.save_vessel(vessel, chief_));
    const std::string document = value_of_result(store.engine(saved.engine_id)).document;
    EXPECT_NE(document.find("Loud Barley"), std::string::npos)
        << "the engine's document follows the vessel's name";
    EXPECT_TRUE(value_of_result(verify(*history)).sound());
}

TEST_F(Stores, AddChangeAndRemoveEvents)
{
    const auto history = memory();
    const std::string engine = add_engine(*history);
    EventStore store(*history);
    Event event;
    event.date = parse_date("2029-05-01").value();
    event.kind = "overhaul";
    event.place = Place::cylinder(3);
    event.note = " rings ";
    event.id = value_of_result(store.add(engine, event, chief_));
    EXPECT_EQ(value_of_result(store.load(engine)).front().note, "rings");
    event.note = "rings and liner";
    event.running_hours = 12000.0;
    expect_done(store.change(event, chief_));
    EXPECT_EQ(value_of_result(store.load(engine)).front().running_hours, 12000.0);
    EXPECT_TRUE(value_of_result(verify(*history)).sound());

    event.place = Place::cylinder(7);
    EXPECT_FALSE(store.change(event, chief_).has_value());
    event.kind = "painted";
    EXPECT_FALSE(store.add(engine, event, chief_).has_value());
    const qint64 before = value_of_result(VesselStore(*history).engines()).front().input_revision;
    expect_done(store.remove(event.id, chief_));
    EXPECT_GT(value_of_result(VesselStore(*history).engines()).front().input_revision, before);
    EXPECT_TRUE(value_of_result(store.load(engine)).empty());
    EXPECT_EQ(value_of_result(audit_entries(*history, event.id)).size(), 3U)
        << "what it was stays in the trail";
    EXPECT_TRUE(value_of_result(verify(*history)).sound());
}

TEST_F(Stores, RememberTheUnitOfEachInstrument)
{
    const auto history = memory();
    const std::string engine = add_engine(*history);
    PreferenceStore store(*history);
    const QuantityId engine_index = *find_quantity("fuel_index", Place::Kind::engine),
                     cylinder_index = *find_quantity("fuel_index", Place::Kind::cylinder);
    const QuantityId scavenge = *find_quantity("scavenge_pressure");
    expect_done(store.set_unit(engine, scavenge,
                               ChosenUnit{find_unit("kgf/cm2").value().id, PressureKind::absolute}));
    expect_done(
        store.set_unit(engine, cylinder_index, ChosenUnit{find_unit("mm").value().id, PressureKind::none}));
    auto units = value_of_result(store.units(engine));
    EXPECT_EQ(units.size(), 2U);
    EXPECT_EQ(unit(units.at(scavenge).unit).symbol, "kgf/cm²");
    EXPECT_EQ(units.at(scavenge).kind, PressureKind::absolute);
    EXPECT_EQ(units.count(engine_index), 0U);
    expect_done(store.set_unit(engine, scavenge, std::nullopt));
    EXPECT_EQ(value_of_result(store.units(engine)).size(), 1U);
}

TEST_F(Stores, RememberChoices)
{
    const auto history = memory();
    PreferenceStore store(*history);
    EXPECT_EQ(value_of_result(store.choice("", "theme")), std::nullopt);
    expect_done(store.set_choice("", "theme", std::string("night")));
    expect_done(store.set_choice("", "theme", std::string("")));
    EXPECT_EQ(value_of_result(store.choice("", "theme")), "");
    EXPECT_EQ(value_of_result(store.choice("engine", "theme")), std::nullopt);
    expect_done(store.set_choice("", "theme", std::nullopt));
    EXPECT_EQ(value_of_result(store.choice("", "theme")), std::nullopt);
}

TEST_F(Stores, KeepJudgementsAndKnowWhichAreStale)
{
    const auto history = memory();
    const std::string first = add_engine(*history, "Amber Mist", "one"),
                      second = add_engine(*history, "Amber Mist", "two");
    JudgementStore store(*history);
    const auto revision = [&](int index) {
        return value_of_result(VesselStore(*history).engines())[static_cast<std::size_t>(index)]
            .input_revision;
    };
    EXPECT_EQ(value_of_result(store.stale_engines(1)).size(), 2U);
    expect_done(store.save_all(
        {{first, 1, revision(0), now_, 3, "summary", "detail"}, {second, 1, revision(1), now_, 0, {}, {}}}));
    EXPECT_TRUE(value_of_result(store.stale_engines(1)).empty());
    EXPECT_EQ(value_of_result(store.stale_engines(2)).size(), 2U) << "another method judges anew";
    EXPECT_EQ(value_of_result(store.load(first)).detail, QByteArray("detail"));
    EXPECT_EQ(value_of_result(store.load(second)).summary, QByteArray());

    Event event;
    event.date = parse_date("2029-05-01").value();
    event.kind = "overhaul";
    value_of_result(EventStore(*history).add(second, event, chief_));
    const auto all = value_of_result(store.all(1));
    ASSERT_EQ(all.size(), 2U);
    EXPECT_TRUE(all[0].current);
    EXPECT_EQ(all[0].judgement.worst_level, 3);
    EXPECT_TRUE(all[1].stored);
    EXPECT_FALSE(all[1].current) << "an event was added since";
    event.kind = "docking";
    value_of_result(EventStore(*history).add(second, event, chief_));
    EXPECT_FALSE(value_of_result(store.all(1))[0].current) << "a docking concerns both engines";
}

TEST_F(Stores, AShipEventKeepsTheRunningHoursOfItsOwnEngine)
{
    const auto history = memory();
    const std::string main = add_engine(*history, "Amber Mist", "one"), auxiliary = add_engine(*history, "Amber Mist", "two");
    const EventStore store(*history);
    Event event;
    event.date = parse_date("2029-05-01").value();
    event.kind = "docking";
    event.running_hours = 41000.0;
    value_of_result(EventStore(*history).add(main, event, chief_));
    EXPECT_EQ(value_of_result(store.load(main)).front().running_hours, 41000.0);
    Event seen = value_of_result(store.load(auxiliary)).front();
    EXPECT_FALSE(seen.running_hours) << "the other engine's counter says nothing of this one";
    seen.note = "dry dock";
    expect_done(EventStore(*history).change(seen, {"second engineer", "note added"}));
    EXPECT_EQ(value_of_result(store.load(main)).front().running_hours, 41000.0) << "a change from there does not lose them";
}

TEST_F(Stores, CopyTheHistoryWhole)
{
    const auto history = create();
    add_engine(*history);
    expect_done(back_up(*history, path(QStringLiteral("copy.evenstroke"))));
    EXPECT_FALSE(back_up(*history, path(QStringLiteral("copy.evenstroke"))).has_value())
        << "no file is overwritten";
    EXPECT_FALSE(back_up(*history, path(QStringLiteral("no/such/folder.evenstroke"))).has_value());
    EXPECT_FALSE(QFile::exists(path(QStringLiteral("copy.evenstroke.part"))));
    const auto copy = open(QStringLiteral("copy.evenstroke"), OpenMode::read_only);
    EXPECT_EQ(value_of_result(VesselStore(*copy).engines()).size(), 1U);
    EXPECT_EQ(copy->id(), history->id());
    EXPECT_TRUE(value_of_result(verify(*copy)).sound());
}

TEST_F(Stores, CopyTheHistoryBeforeTheFirstChangeOfADay)
{
    create();
    HistorySettings with_backups = settings();
    with_backups.automatic_backups = true;
    with_backups.backups_kept = 3;
    const QString file = path(QStringLiteral("ship.evenstroke"));
    for (int day = 0; day < 5; ++day) {
        now_ += std::chrono::hours(24);
        const auto history = value_of_result(History::open(file, OpenMode::read_write, with_backups));
        EXPECT_EQ(automatic_backups(file).size(), std::min(day, 3)) << "looking is no change";
        for (int change = 0; change < 3; ++change)
            add_engine(*history, "Quiet Barley", ("engine " + std::to_string(day * 10 + change)).c_str());
    }
    const QStringList copies = automatic_backups(file);
    ASSERT_EQ(copies.size(), 3);
    EXPECT_TRUE(copies.front().contains(QStringLiteral("ship backups/ship ") +
                                        QString::fromStdString(date_text(now_))));
    const auto newest = value_of_result(History::open(copies.front(), OpenMode::read_only, settings()));
    EXPECT_EQ(value_of_result(VesselStore(*newest).engines()).size(), 12U)
        << "as it was before the day's first change";
}

} // namespace
} // namespace evenstroke::storage
