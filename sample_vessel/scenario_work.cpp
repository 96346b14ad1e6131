// SPDX-License-Identifier: GPL-3.0-or-later
#include "sample_vessel/scenario_work.h"

namespace evenstroke::sample {
namespace {

void add_main_engine_cylinders(std::vector<Work>& work)
{
    work.push_back({0,
                    "2023-03-06",
                    1,
                    "overhaul",
                    "new piston rings, exhaust valve ground in",
                    "second engineer",
                    "",
                    {}});
    work.push_back(
        {0, "2023-06-11", 3, "fuel_valves", "both nozzles at their hours", "third engineer", "", {}});
    work.push_back({0, "2023-07-19", 5, "overhaul", "new piston rings", "second engineer", "", {}});
    work.push_back(
        {0, "2023-11-04", 2, "exhaust_valve", "spindle exchanged, seat ground", "second engineer", "", {}});
    work.push_back({0,
                    "2024-01-28",
                    3,
                    "overhaul",
                    "new piston rings, liner gauged: wear within limits",
                    "second engineer",
                    "",
                    {}});
    work.push_back({0, "2024-03-17", 6, "fuel_valves", "", "third engineer", "", {}});
    work.push_back({0,
                    "2024-06-02",
                    6,
                    "sensor_replaced",
                    "thermometer read nothing since April",
                    "electrician",
                    "piston_coolant_outlet_temperature",
                    {{"piston_coolant_outlet_temperature", -1.1}}});
    work.push_back({0,
                    "2024-09-08",
                    4,
                    "overhaul",
                    "in the yard: new piston rings, exhaust valve ground in",
                    "yard",
                    "",
                    {}});
    work.push_back({0, "2024-09-09", 4, "fuel_valves", "in the yard", "yard", "", {}});
    work.push_back({0, "2024-09-11", 6, "overhaul", "in the yard: new piston rings", "yard", "", {}});
    work.push_back(
        {0,
         "2025-03-09",
         2,
         "overhaul",
         "new piston rings",
         "second engineer",
         "",
         {{"maximum_pressure", 0.3}, {"compression_pressure", 0.2}, {"exhaust_temperature", 1.5}}});
    work.push_back({0,
                    "2025-04-27",
                    6,
                    "timing_adjusted",
                    "half a mark earlier, within the technical file; entered in the record book",
                    "chief engineer",
                    "",
                    {{"maximum_pressure", 2.1}, {"exhaust_temperature", -2.0}}});
    work.push_back(
        {0, "2025-10-26", 5, "fuel_valves", "both nozzles at their hours", "third engineer", "", {}});
    work.push_back({0,
                    "2026-02-22",
                    1,
                    "overhaul",
                    "new piston rings, exhaust valve exchanged",
                    "second engineer",
                    "",
                    {}});
}

void add_main_engine_rest(std::vector<Work>& work)
{
    for (const char* date :
         {"2023-01-22", "2023-05-20", "2023-09-16", "2024-01-13", "2024-05-11", "2024-12-07", "2025-04-12",
          "2025-08-09", "2025-12-06", "2026-04-11", "2026-08-15"})
        work.push_back({0,
                        date,
                        0,
                        "turbocharger_wash",
                        "dry wash of the turbine side, water wash of the compressor",
                        "third engineer",
                        "",
                        {}});
    work.push_back({0, "2023-12-10", 0, "air_filter_cleaned", "", "third engineer", "", {}});
    work.push_back({0, "2024-09-05", 0, "docking", "in the yard until 20 September", "yard", "", {}});
    work.push_back({0, "2024-09-07", 0, "hull_cleaned", "washed and painted", "yard", "", {}});
    work.push_back({0, "2024-09-10", 0, "propeller_polished", "", "yard", "", {}});
    work.push_back(
        {0, "2024-09-13", 0, "cooler_cleaning", "air side in the bath, water side brushed", "yard", "", {}});
}

void add_auxiliary_engine_1(std::vector<Work>& work)
{
    for (const int cylinder : {1, 2, 3})
        work.push_back(
            {1, "2023-06-14", cylinder, "fuel_valves", "nozzles at their hours", "third engineer", "", {}});
    for (const int cylinder : {4, 5, 6})
        work.push_back(
            {1, "2023-12-09", cylinder, "fuel_valves", "nozzles at their hours", "third engineer", "", {}});
    work.push_back({1,
                    "2024-05-18",
                    6,
                    "exhaust_valve",
                    "both valves exchanged after a burnt seat was seen",
                    "second engineer",
                    "",
                    {}});
    for (const int cylinder : {1, 2, 3})
        work.push_back(
            {1, "2024-12-19", cylinder, "fuel_valves", "nozzles at their hours", "third engineer", "", {}});
    for (const int cylinder : {4, 5, 6})
        work.push_back(
            {1, "2025-08-23", cylinder, "fuel_valves", "nozzles at their hours", "third engineer", "", {}});
    for (const char* date :
         {"2023-04-03", "2023-10-21", "2024-04-20", "2024-11-09", "2025-05-17", "2025-11-22", "2026-05-16"})
        work.push_back({1, date, 0, "turbocharger_wash", "", "third engineer", "", {}});
    work.push_back({1, "2024-09-12", 0, "cooler_cleaning", "in the yard", "yard", "", {}});
}

void add_auxiliary_engine_2(std::vector<Work>& work)
{
    work.push_back(
        {2, "2023-07-08", 3, "exhaust_valve", "one valve leaked when tested", "second engineer", "", {}});
    work.push_back({2,
                    "2024-02-02",
                    0,
                    "overhaul",
                    "all pistons, valves and nozzles at their hours",
                    "second engineer",
                    "",
                    {}});
    work.push_back({2, "2024-09-14", 0, "cooler_cleaning", "in the yard", "yard", "", {}});
    work.push_back({2,
                    "2025-03-22",
                    4,
                    "sensor_replaced",
                    "element broken at the terminal",
                    "electrician",
                    "exhaust_temperature",
                    {{"exhaust_temperature", -9.0}}});
    for (const int cylinder : {1, 2})
        work.push_back(
            {2, "2025-06-07", cylinder, "fuel_valves", "nozzles at their hours", "third engineer", "", {}});
    for (const int cylinder : {3, 4, 5})
        work.push_back(
            {2, "2025-10-18", cylinder, "fuel_valves", "nozzles at their hours", "third engineer", "", {}});
    for (const char* date :
         {"2023-05-06", "2023-11-25", "2024-06-15", "2025-01-18", "2025-07-19", "2026-02-07", "2026-08-22"})
        work.push_back({2, date, 0, "turbocharger_wash", "", "third engineer", "", {}});
}

} // namespace

std::vector<Work> recorded_work()
{
    std::vector<Work> work;
    add_main_engine_cylinders(work);
    add_main_engine_rest(work);
    add_auxiliary_engine_1(work);
    add_auxiliary_engine_2(work);
    return work;
}

} // namespace evenstroke::sample
