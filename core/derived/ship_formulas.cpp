// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/derived/derived_formulas.h"

#include "core/engine/propeller.h"

#include <cmath>

namespace evenstroke {

bool drives_fixed_propeller(DerivedInputs& of)
{
    if (!of.engine().two_stroke()) {
        of.not_known("Nothing is said of the propeller, because a four-stroke engine drives it through a gear, or a generator.", "");
        return false;
    }
    const Number setting = of.optional_mean("propeller_pitch"); // % of the built pitch
    if (setting && std::abs(*setting - 100.0) >= 0.5) {
        of.not_known("Nothing is said of the propeller, because its pitch is not the built one.", "Read again at the built pitch.");
        return false;
    }
    return true;
}

namespace {

Number slip(DerivedInputs& of, Place)
{
    const Number ship = of.mean("speed_through_water"), shaft = of.mean("speed");
    if (!ship || !shaft || !drives_fixed_propeller(of))
        return std::nullopt;
    if (!of.engine().propeller_pitch)
        return of.not_known("The apparent slip is not known, because the engine's particulars have no pitch of the propeller.",
                            "Enter the propeller's pitch.");
    of.particular("Pitch of the propeller", "p", of.engine().propeller_pitch->value(), "m");
    return of.known(apparent_slip(knots(*ship), of.engine().propeller_pitch, per_minute(*shaft)), 100.0);
}

Number margin(DerivedInputs& of, Place)
{
    const Number power = shaft_kilowatts(of), speed = of.mean("speed");
    if (!power || !speed || !drives_fixed_propeller(of))
        return std::nullopt;
    const Engine& engine = of.engine();
    of.particular("Rated power", "P_rated", engine.rated_power.value() / 1000.0, "kW");
    of.particular("Rated speed", "n_rated", engine.rated_speed.value() * 60.0, "1/min");
    const PropellerPoint rating{engine.rated_power, engine.rated_speed};
    const auto curve = speed_on_propeller_curve(kilowatts(*power), rating);
    if (!of.holds(curve))
        return std::nullopt;
    of.step("Speed on the curve at this power", curve.value().value() * 60.0, "1/min");
    return of.known(light_running_margin(kilowatts(*power), per_minute(*speed), rating), 100.0);
}

Number admiralty(DerivedInputs& of, Place)
{
    const Number displacement = of.mean("displacement"), ship = of.mean("speed_through_water");
    const Number power = shaft_kilowatts(of);
    if (!displacement || !ship || !power || !drives_fixed_propeller(of))
        return std::nullopt;
    of.remark("The power is that of this engine; on a ship with several it is not the ship's.");
    return of.known(admiralty_coefficient(*displacement * 1000.0 * si::kilogrammes, knots(*ship), kilowatts(*power)));
}

} // namespace

std::span<const DerivedFormula> ship_formulas()
{
    static const DerivedFormula formulas[] = {
        {"apparent_slip", slip}, {"light_running_margin", margin}, {"admiralty_coefficient", admiralty}};
    return formulas;
}

} // namespace evenstroke
