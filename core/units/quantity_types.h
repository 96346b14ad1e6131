// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <boost/units/absolute.hpp>
#include <boost/units/quantity.hpp>
#include <boost/units/systems/si.hpp>
#include <boost/units/systems/si/io.hpp>

/// The types at the public edges of the core. SI throughout; the numbers inside are plain doubles.
///
/// Three pressures that must never be mixed are three types: `AbsolutePressure` (over vacuum),
/// `GaugePressure` (over the barometer of its reading) and `PressureDifference`. Temperatures are
/// points (`Temperature`, kelvin over absolute zero) or differences (`TemperatureDifference`), so that
/// a coefficient "per °C" can never be shifted by 273.15.
namespace evenstroke {

namespace si = boost::units::si;
using boost::units::absolute;

/// A number of SI units, checked by the compiler. (`quantity` itself is the word for what a reading holds.)
template <typename SiUnit>
using Measured = boost::units::quantity<SiUnit>;

using Ratio = Measured<si::dimensionless>;
using Length = Measured<si::length>;
using Area = Measured<si::area>;
using Volume = Measured<si::volume>;
using Mass = Measured<si::mass>;
using Duration = Measured<si::time>;
using Velocity = Measured<si::velocity>;
using Frequency = Measured<si::frequency>; ///< revolutions a second, never radians a second
using Power = Measured<si::power>;
using Energy = Measured<si::energy>;
using Torque = Measured<si::torque>;
using Density = Measured<si::mass_density>;
using MassFlow = Measured<boost::units::unit<
    boost::units::derived_dimension<boost::units::mass_base_dimension, 1, boost::units::time_base_dimension, -1>::type,
    si::system>>;
using VolumeFlow = Measured<boost::units::unit<
    boost::units::derived_dimension<boost::units::length_base_dimension, 3, boost::units::time_base_dimension, -1>::type,
    si::system>>;
using SpecificEnergy = Measured<boost::units::unit<
    boost::units::derived_dimension<boost::units::length_base_dimension, 2, boost::units::time_base_dimension, -2>::type,
    si::system>>; ///< joule a kilogram, the unit of heating values
using SpecificConsumption = Measured<boost::units::unit<
    boost::units::derived_dimension<boost::units::length_base_dimension, -2, boost::units::time_base_dimension, 2>::type,
    si::system>>; ///< kilogram a joule, the unit of fuel over work
using KinematicViscosity = Measured<si::kinematic_viscosity>;
using PlaneAngle = Measured<si::plane_angle>;

using Temperature = Measured<absolute<si::temperature>>;
using TemperatureDifference = Measured<si::temperature>;
using PressureDifference = Measured<si::pressure>;
using AbsolutePressure = Measured<absolute<si::pressure>>;

/// A pressure over the barometer. Becomes an absolute one only where the barometer is named.
class GaugePressure
{
public:
    constexpr GaugePressure() = default;
    constexpr explicit GaugePressure(PressureDifference above_barometer) : above_barometer_(above_barometer) {}
    constexpr PressureDifference above_barometer() const { return above_barometer_; }
    friend constexpr auto operator<=>(const GaugePressure& a, const GaugePressure& b)
    {
        return a.above_barometer_.value() <=> b.above_barometer_.value();
    }
    friend constexpr bool operator==(const GaugePressure& a, const GaugePressure& b)
    {
        return a.above_barometer_.value() == b.above_barometer_.value();
    }

private:
    PressureDifference above_barometer_{};
};

inline AbsolutePressure to_absolute(GaugePressure gauge, AbsolutePressure barometer)
{
    return barometer + gauge.above_barometer();
}
inline GaugePressure to_gauge(AbsolutePressure pressure, AbsolutePressure barometer)
{
    return GaugePressure(pressure - barometer);
}

/// Makers from the trade's units, for code and tests that state a value.
inline PressureDifference bar_difference(double bar) { return bar * 1e5 * si::pascals; }
inline GaugePressure bar_gauge(double bar) { return GaugePressure(bar_difference(bar)); }
inline AbsolutePressure bar_absolute(double bar) { return bar * 1e5 * absolute<si::pressure>(); }
inline Temperature celsius(double degrees) { return (degrees + 273.15) * absolute<si::temperature>(); }
inline TemperatureDifference kelvin_difference(double kelvin) { return kelvin * si::kelvins; }
inline double in_bar(PressureDifference pressure) { return pressure.value() / 1e5; }
inline double in_bar(GaugePressure pressure) { return pressure.above_barometer().value() / 1e5; }
inline double in_bar(AbsolutePressure pressure) { return pressure.value() / 1e5; }
inline double in_celsius(Temperature temperature) { return temperature.value() - 273.15; }
inline Power kilowatts(double kilowatt) { return kilowatt * 1e3 * si::watts; }
inline Frequency per_minute(double revolutions) { return revolutions / 60.0 * si::hertz; }
inline MassFlow kilograms_per_hour(double flow) { return MassFlow::from_value(flow / 3600.0); }
inline SpecificEnergy megajoules_per_kilogram(double energy) { return SpecificEnergy::from_value(energy * 1e6); }
inline SpecificConsumption grams_per_kilowatt_hour(double consumption)
{
    return SpecificConsumption::from_value(consumption / 3.6e9);
}
inline double in_grams_per_kilowatt_hour(SpecificConsumption consumption) { return consumption.value() * 3.6e9; }
inline Length millimetres(double length) { return length / 1000.0 * si::metres; }

} // namespace evenstroke
