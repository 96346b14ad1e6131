// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "sample_vessel/cylinder_state.h"
#include "sample_vessel/sheet.h"
#include "sample_vessel/voyage.h"

namespace evenstroke::sample {

/// Everything one sheet of an engine is made from.
struct SheetInputs
{
    EngineMoment moment;
    Surroundings around;
    double typed_power_kw = 0.0; ///< at the shaft, as torsion meter or switchboard show
    FuelBatch fuel;
    bool quick_lines = true, rough = false;
};

void write_heading(Sheet& sheet, const SheetInputs& in);
void write_control(Sheet& sheet, const SheetInputs& in);
void write_cylinders(Sheet& sheet, const SheetInputs& in);
void write_air_side(Sheet& sheet, const SheetInputs& in);
void write_cooling_and_oil(Sheet& sheet, const SheetInputs& in);
void write_fuel(Sheet& sheet, const SheetInputs& in);
/// The lines just before and just after the walk.
void write_quick_lines(Sheet& sheet, const SheetInputs& in);

/// Cylinder value as its gauge shows it under the surroundings of the day.
double cylinder_as_read(const SheetInputs& in, const std::string& quantity, int cylinder);
/// Engine value as its instrument shows it under the surroundings of the day.
double as_read(const SheetInputs& in, const std::string& quantity);

} // namespace evenstroke::sample
