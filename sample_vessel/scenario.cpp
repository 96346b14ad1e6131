// SPDX-License-Identifier: GPL-3.0-or-later
#include "sample_vessel/scenario.h"

#include "sample_vessel/scenario_work.h"

namespace evenstroke::sample {
namespace {

using Differences = std::map<std::string, std::vector<double>>;

/// Cylinders 2 and 5 are clearly unlike: their exchange on the form can be seen.
Differences main_engine_differences()
{
    return {
        {"mean_indicated_pressure", {0.6, -1.9, 0.8, 0.3, 2.1, -1.4}},
        {"maximum_pressure", {0.8, 2.6, -0.6, 1.1, -2.9, -1.0}},
        {"compression_pressure", {0.4, 1.3, -0.8, 0.6, -1.6, 0.2}},
        {"exhaust_temperature", {6.0, -13.0, 2.0, -4.0, 12.0, -3.0}},
        {"jacket_outlet_temperature", {0.6, -1.8, 0.4, -0.3, 1.9, -0.7}},
        {"piston_coolant_outlet_temperature", {-0.4, 1.6, 0.8, -0.6, -1.9, 0.5}},
        {"scavenge_box_temperature", {1.1, -0.8, 0.3, -1.2, 1.6, -0.6}},
        {"fuel_index", {0.3, -1.0, 0.2, 0.1, 1.1, -0.6}},
    };
}

Differences auxiliary_engine_1_differences()
{
    return {
        {"mean_indicated_pressure", {-0.8, 0.6, 1.1, -0.4, 0.3, -0.9}},
        {"maximum_pressure", {1.6, -0.7, 0.5, -1.9, 0.9, -0.4}},
        {"compression_pressure", {0.7, -0.3, -0.9, 0.4, 0.8, -0.6}},
        {"exhaust_temperature", {-11.0, 4.0, 9.0, -5.0, 13.0, -8.0}},
        {"jacket_outlet_temperature", {-0.9, 0.2, 0.8, -0.3, 1.0, -0.6}},
        {"fuel_index", {-0.4, 0.5, 0.6, -0.2, 0.1, -0.6}},
    };
}

Differences auxiliary_engine_2_differences()
{
    return {
        {"mean_indicated_pressure", {0.9, -0.6, -1.2, 0.5, 0.3}},
        {"maximum_pressure", {-1.2, 1.5, 0.4, -0.9, 0.3}},
        {"compression_pressure", {0.5, -0.8, 0.7, -0.2, -0.3}},
        {"exhaust_temperature", {9.0, -7.0, 3.0, 11.0, -14.0}},
        {"jacket_outlet_temperature", {0.5, -0.9, 0.1, 0.9, -0.4}},
        {"fuel_index", {0.4, -0.3, -0.6, 0.3, 0.2}},
    };
}

/// Rings: what a leak costs in maximum and mean indicated pressure beside the compression stands in the
/// proportions of a one-zone cycle with a leak (3.4 bar of compression: 4 bar of maximum pressure and somewhat
/// less than 3 % of the work where the governor gives part of it back).
/// Nozzle: half a noise unit a month in the exhaust, the pressures of burning fall, compression stays.
std::vector<Fault> developing_faults()
{
    return {
        {0,
         4,
         "ring_blow_by",
         "2025-12-20",
         {{"compression_pressure", -0.6},
          {"maximum_pressure", -0.7},
          {"exhaust_temperature", 1.3},
          {"mean_indicated_pressure", -0.5},
          {"scavenge_box_temperature", 0.5}}},
        {1,
         2,
         "nozzle_wear",
         "2026-03-27",
         {{"exhaust_temperature", 2.8}, {"maximum_pressure", -0.8}, {"mean_indicated_pressure", -0.38}}},
    };
}

std::vector<TypingError> typing_errors()
{
    return {
        {0, "2023-10", "exhaust_temperature", 1, 0, Slip::digits_swapped},
        {0, "2024-07", "compression_pressure", 0, 0, Slip::unit_slip},
        {0, "2025-09", "", 2, 5, Slip::cylinders_swapped},
        {1, "2024-03", "maximum_pressure", 5, 0, Slip::decimal_slip},
        {1, "2025-06", "fuel_index", 4, 0, Slip::digits_swapped},
        {2, "2023-11", "exhaust_temperature", 1, 0, Slip::digits_swapped},
        {2, "2025-02", "turbocharger_speed", 0, 0, Slip::decimal_slip},
    };
}

/// Heating values by density and sulphur (ISO 8217 annex form), densities and the rest invented.
std::vector<FuelBatch> fuel_batches()
{
    return {
        {"2022-11-08", "residual; batch 14", false, 41.39, 962.4, 0.46, 13.2, 126.0},
        {"2023-04-17", "residual; batch 15", false, 41.56, 948.7, 0.47, 12.8, 121.0},
        {"2023-09-29", "residual; batch 16", false, 41.23, 971.3, 0.44, 13.5, 131.0},
        {"2024-03-20", "distillate; batch 17", true, 42.71, 852.3, 0.07, 3.1, 39.0},
        {"2024-06-25", "residual; batch 18", false, 41.49, 955.2, 0.48, 13.0, 124.0},
        {"2025-01-11", "residual; batch 19", false, 41.34, 966.0, 0.45, 13.3, 128.0},
        {"2025-07-30", "distillate; batch 20", true, 42.78, 846.8, 0.06, 2.9, 38.0},
        {"2025-11-14", "residual; batch 21", false, 41.54, 951.9, 0.46, 12.9, 122.0},
        {"2026-06-19", "residual; batch 22", false, 41.39, 962.4, 0.47, 13.2, 126.0},
    };
}

} // namespace

Scenario sample_scenario()
{
    Scenario scenario;
    scenario.vessel = "Steady Bramble";
    scenario.imo = "0000000";
    scenario.flag = "none (invented)";
    scenario.class_society = "none (invented)";
    scenario.class_number = "invented 0000";
    scenario.engines = {main_engine(), auxiliary_engine_1(), auxiliary_engine_2()};
    scenario.differences = {main_engine_differences(), auxiliary_engine_1_differences(),
                            auxiliary_engine_2_differences()};
    scenario.work = recorded_work();
    scenario.faults = developing_faults();
    scenario.typing_errors = typing_errors();
    scenario.missed = {{0, "2023-08"}, {0, "2025-02"}, {1, "2023-05"}, {1, "2024-10"},
                       {2, "2023-03"}, {2, "2024-07"}, {2, "2026-01"}};
    scenario.unsteady = {{0, "2024-02"}, {2, "2025-12"}};
    scenario.cards = {{0, "2025-06"}, {0, "2026-10"}}; // before the rings began to leak, and near the end
    scenario.out_of_order = {
        {0, "2024-04", "piston_coolant_outlet_temperature", 6, "out_of_order"},
        {0, "2024-05", "piston_coolant_outlet_temperature", 6, "out_of_order"},
        {0, "2023-06", "oil_mist_level", 0, "not_read"},
        {0, "2025-01", "scavenge_box_temperature", 3, "not_read"},
        {1, "2023-09", "jacket_outlet_temperature", 6, "out_of_order"},
        {2, "2024-11", "crankcase_pressure", 0, "not_read"},
    };
    scenario.fuel = fuel_batches();
    scenario.yard_from = "2024-09-04";
    scenario.yard_to = "2024-09-20";
    scenario.rough_month = "2025-01";
    return scenario;
}

Scenario plain_scenario()
{
    Scenario scenario = sample_scenario();
    for (Differences& engine : scenario.differences)
        for (auto& [quantity, values] : engine)
            values.assign(values.size(), 0.0);
    for (Work& work : scenario.work)
        work.change.clear();
    scenario.faults.clear();
    scenario.typing_errors.clear();
    scenario.unsteady.clear();
    scenario.out_of_order.clear();
    scenario.scatter = 0.0;
    scenario.engine_wide_change = false;
    return scenario;
}

std::string verdict_of(Slip slip)
{
    switch (slip) {
    case Slip::decimal_slip:
        return "decimal_slip";
    case Slip::digits_swapped:
        return "digits_swapped";
    case Slip::unit_slip:
        return "unit_slip";
    case Slip::cylinders_swapped:
        return "cylinders_swapped";
    }
    return {};
}

} // namespace evenstroke::sample
