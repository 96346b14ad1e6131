// SPDX-License-Identifier: GPL-3.0-or-later
#include "sample_vessel/scenario_work.h"

#include <initializer_list>
#include <utility>

namespace evenstroke::sample {
namespace {

using Change = std::map<std::string, double>;

/// The event list of one engine while it is written.
class WorkBook
{
public:
    WorkBook(std::vector<Work>& work, int engine) : work_(work), engine_(engine) {}

    void cylinder(const char* date, int cylinder, const char* kind, const char* note, const char* done_by,
                  Change change = {})
    {
        work_.push_back({engine_, date, cylinder, kind, note, done_by, "", std::move(change)});
    }
    void thermometer(const char* date, int cylinder, const char* quantity, const char* note, double change)
    {
        work_.push_back({engine_, date, cylinder, "sensor_replaced", note, "electrician", quantity,
                         Change{{quantity, change}}});
    }
    void engine(const char* date, const char* kind, const char* note, const char* done_by)
    {
        work_.push_back({engine_, date, 0, kind, note, done_by, "", {}});
    }
    void nozzles(const char* date, std::initializer_list<int> cylinders)
    {
        for (const int one : cylinders)
            cylinder(date, one, "fuel_valves", "nozzles at their hours", "third engineer");
    }
    void washes(std::initializer_list<const char*> dates, const char* note)
    {
        for (const char* date : dates)
            engine(date, "turbocharger_wash", note, "third engineer");
    }

private:
    std::vector<Work>& work_;
    int engine_;
};

void write_main_engine(WorkBook book)
{
    const char* const second = "second engineer";
    book.cylinder("2023-03-06", 1, "overhaul", "new piston rings, exhaust valve ground in", second);
    book.nozzles("2023-06-11", {3});
    book.cylinder("2023-07-19", 5, "overhaul", "new piston rings", second);
    book.cylinder("2023-11-04", 2, "exhaust_valve", "spindle exchanged, seat ground", second);
    book.engine("2023-12-10", "air_filter_cleaned", "", "third engineer");
    book.cylinder("2024-01-28", 3, "overhaul", "new piston rings, liner gauged: wear within limits", second);
    book.nozzles("2024-03-17", {6});
    book.thermometer("2024-06-02", 6, "piston_coolant_outlet_temperature", "no reading since April", -1.1);
    book.engine("2024-09-05", "docking", "in the yard until 20 September", "yard");
    book.engine("2024-09-07", "hull_cleaned", "washed and painted", "yard");
    book.cylinder("2024-09-08", 4, "overhaul", "new piston rings, exhaust valve ground in", "yard");
    book.cylinder("2024-09-09", 4, "fuel_valves", "", "yard");
    book.engine("2024-09-10", "propeller_polished", "", "yard");
    book.cylinder("2024-09-11", 6, "overhaul", "new piston rings", "yard");
    book.engine("2024-09-13", "cooler_cleaning", "air side in the bath, water side brushed", "yard");
    book.cylinder("2025-03-09", 2, "overhaul", "new piston rings", second,
                  {{"maximum_pressure", 0.3}, {"compression_pressure", 0.2}, {"exhaust_temperature", 1.5}});
    book.cylinder("2025-04-27", 6, "timing_adjusted",
                  "half a mark earlier, within the technical file; entered in the record book",
                  "chief engineer", {{"maximum_pressure", 2.1}, {"exhaust_temperature", -2.0}});
    book.nozzles("2025-10-26", {5});
    book.cylinder("2026-02-22", 1, "overhaul", "new piston rings, exhaust valve exchanged", second);
    book.washes({"2023-01-22", "2023-05-20", "2023-09-16", "2024-01-13", "2024-05-11", "2024-12-07",
                 "2025-04-12", "2025-08-09", "2025-12-06", "2026-04-11", "2026-08-15"},
                "turbine dry, compressor with water");
}

void write_auxiliary_engine_1(WorkBook book)
{
    book.nozzles("2023-06-14", {1, 2, 3});
    book.nozzles("2023-12-09", {4, 5, 6});
    book.cylinder("2024-05-18", 6, "exhaust_valve", "both exchanged after a burnt seat was seen",
                  "second engineer");
    book.engine("2024-09-12", "cooler_cleaning", "", "yard");
    book.nozzles("2024-12-19", {1, 2, 3});
    book.nozzles("2025-08-23", {4, 5, 6});
    book.washes(
        {"2023-04-03", "2023-10-21", "2024-04-20", "2024-11-09", "2025-05-17", "2025-11-22", "2026-05-16"},
        "");
}

void write_auxiliary_engine_2(WorkBook book)
{
    book.cylinder("2023-07-08", 3, "exhaust_valve", "one valve leaked when tested", "second engineer");
    book.engine("2024-02-02", "overhaul", "all pistons, valves and nozzles at their hours",
                "second engineer");
    book.engine("2024-09-14", "cooler_cleaning", "", "yard");
    book.thermometer("2025-03-22", 4, "exhaust_temperature", "element broken at the terminal", -9.0);
    book.nozzles("2025-06-07", {1, 2});
    book.nozzles("2025-10-18", {3, 4, 5});
    book.washes(
        {"2023-05-06", "2023-11-25", "2024-06-15", "2025-01-18", "2025-07-19", "2026-02-07", "2026-08-22"},
        "");
}

} // namespace

std::vector<Work> recorded_work()
{
    std::vector<Work> work;
    write_main_engine(WorkBook(work, 0));
    write_auxiliary_engine_1(WorkBook(work, 1));
    write_auxiliary_engine_2(WorkBook(work, 2));
    return work;
}

} // namespace evenstroke::sample
