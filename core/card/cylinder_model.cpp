// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/card/cylinder_model.h"

#include "core/heat/gas_film.h"

namespace evenstroke::indicator {

WallLoss::WallLoss(const Cylinder& cylinder) : wall_kelvin_(cylinder.wall_kelvin)
{
    const double bore = std::sqrt(cylinder.gear.area() * 4.0 / 3.14159265358979323846);
    ends_ = 2.15 * cylinder.gear.area();
    around_ = 3.14159265358979323846 * bore;
    // One value in the middle of the formula's range; pressure and temperature scale it by its own exponents.
    constexpr double bar = 50.0, kelvin = 700.0;
    const auto piston = cylinder.gear.mean_piston_speed(per_minute(cylinder.speed_rpm));
    if (!piston)
        return;
    const auto velocity = woschni_gas_velocity(CyclePart::compression, piston.value());
    if (!velocity)
        return;
    const auto film = woschni_film(bore * si::metres, {bar_absolute(bar), Temperature::from_value(kelvin)}, velocity.value());
    if (!film)
        return;
    film_ = film.value().value() / std::exp(0.8 * std::log(bar) - 0.53 * std::log(kelvin)) / (6.0 * cylinder.speed_rpm);
}

} // namespace evenstroke::indicator
