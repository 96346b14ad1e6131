// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/input_check.h"

#include "core/plain_text.h"

namespace evenstroke {
namespace {

std::string with_unit(double number, const char* unit)
{
    return short_number_text(number) + " " + unit;
}

constexpr double metres_a_second_in_knot = 1852.0 / 3600.0; // by definition

} // namespace

std::string shown(Ratio ratio) { return short_number_text(ratio.value()); }
std::string shown(Length length) { return with_unit(length.value(), "m"); }
std::string shown(Volume volume) { return with_unit(volume.value(), "m³"); }
std::string shown(Mass mass) { return with_unit(mass.value() / 1000.0, "t"); }
std::string shown(Velocity velocity) { return with_unit(velocity.value() / metres_a_second_in_knot, "kn"); }
std::string shown(Frequency speed) { return with_unit(speed.value() * 60.0, "1/min"); }
std::string shown(Power power) { return with_unit(power.value() / 1000.0, "kW"); }
std::string shown(Torque torque) { return with_unit(torque.value() / 1000.0, "kNm"); }
std::string shown(MassFlow flow) { return with_unit(flow.value() * 3600.0, "kg/h"); }
std::string shown(Density density) { return with_unit(density.value(), "kg/m³"); }
std::string shown(KinematicViscosity viscosity) { return with_unit(viscosity.value() * 1e6, "mm²/s"); }
std::string shown(Temperature temperature) { return with_unit(in_celsius(temperature), "°C"); }
std::string shown(PressureDifference pressure) { return with_unit(in_bar(pressure), "bar"); }
std::string shown(AbsolutePressure pressure) { return with_unit(in_bar(pressure), "bar abs"); }

Problem missing_input(std::string_view result, std::string_view input)
{
    std::string sentence(result);
    sentence.front() = sentence.front() == 't' ? 'T' : sentence.front();
    return {Problem::Kind::not_found, sentence + " is not known, because " + std::string(input) + " is missing.",
            "Enter " + std::string(input) + "."};
}

Problem InputCheck::impossible(std::string_view name, const std::string& value, std::string_view why) const
{
    std::string sentence(result_);
    sentence.front() = sentence.front() == 't' ? 'T' : sentence.front();
    return invalid_input(sentence + " is not known, because " + std::string(name) + " is " + value +
                             (why.empty() ? "" : ", " + std::string(why)) + ".",
                         "Check " + std::string(name) + " and its unit.");
}

} // namespace evenstroke
