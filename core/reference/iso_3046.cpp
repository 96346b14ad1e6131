// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/reference/iso_3046.h"

#include "core/input_check.h"
#include "core/plain_text.h"

#include <cmath>
#include <stdexcept>

namespace evenstroke {
namespace {

constexpr double smallest_k = 0.6, largest_k = 1.1; // common practice

Problem not_read(const std::string& what)
{
    return {Problem::Kind::not_found,
            "The adjustment to ISO 3046-1 is not known, because the " + what + " is missing.",
            "Enter the " + what + "."};
}

std::optional<Problem> find_problem(const Iso3046Ambient& ambient, const Iso3046Exponents& exponents,
                                    const std::string& where)
{
    if (!is_positive(ambient.barometer.value())) {
        return invalid_input("The barometer " + where + " is " +
                                 short_number_text(ambient.barometer.value() / 100.0) +
                                 " mbar, which is not above 0.",
                             "Check the barometer and its unit.");
    }
    if (!is_positive(ambient.inlet_air.value())) {
        return invalid_input("The inlet air " + where + " is " +
                                 short_number_text(in_celsius(ambient.inlet_air)) +
                                 " °C, which is not above absolute zero.",
                             "Check the inlet air temperature and its unit.");
    }
    if (exponents.s != 0.0 && !ambient.coolant) {
        return not_read("coolant temperature into the air cooler " + where);
    }
    if (exponents.s != 0.0 && !is_positive(ambient.coolant->value())) {
        return invalid_input("The coolant " + where + " is " +
                                 short_number_text(in_celsius(*ambient.coolant)) +
                                 " °C, which is not above absolute zero.",
                             "Check the coolant temperature and its unit.");
    }
    if (exponents.a != 0.0 && !ambient.water_vapour) {
        return not_read("humidity " + where);
    }
    if (exponents.a != 0.0 && !(ambient.water_vapour->value() >= 0.0 &&
                                ambient.water_vapour->value() < ambient.barometer.value())) {
        return invalid_input(
            "The steam in the air " + where + " has " +
                short_number_text(ambient.water_vapour->value() / 100.0) + " mbar of the barometer's " +
                short_number_text(ambient.barometer.value() / 100.0) + " mbar, which cannot be.",
            "Check humidity, air temperature and barometer.");
    }
    return std::nullopt;
}

/// The pressure that counts, Pa: all of it, or that of the dry air alone.
double counted_pressure(const Iso3046Ambient& ambient, double a)
{
    return ambient.barometer.value() - (a != 0.0 ? a * ambient.water_vapour->value() : 0.0);
}

} // namespace

Iso3046Exponents iso_3046_exponents(AspirationClass aspiration)
{
    // ISO 3046-1, table of clause 10, from memory. That of the naturally aspirated class and of the
    // charge-air cooled one agree with Mathur and Sharma, examples 27.1 and 27.2.
    switch (aspiration) {
    case AspirationClass::charge_air_cooled:
        return {.a = 0.0, .m = 0.7, .n = 1.2, .s = 1.0};
    case AspirationClass::turbocharged:
        return {.a = 0.0, .m = 0.7, .n = 2.0, .s = 0.0};
    case AspirationClass::naturally_aspirated:
        return {.a = 1.0, .m = 1.0, .n = 0.75, .s = 0.0};
    }
    throw std::logic_error("class of engine without exponents");
}

Result<Iso3046Adjustment> adjust_iso_3046(AspirationClass aspiration, const Iso3046Ambient& site,
                                          const Iso3046Ambient& reference, double mechanical_efficiency)
{
    const Iso3046Exponents exponents = iso_3046_exponents(aspiration);
    if (auto problem = find_problem(site, exponents, "at site")) {
        return *std::move(problem);
    }
    if (auto problem = find_problem(reference, exponents, "of the reference")) {
        return *std::move(problem);
    }
    if (!(mechanical_efficiency > 0.0 && mechanical_efficiency <= 1.0)) {
        return invalid_input("A mechanical efficiency of " + short_number_text(mechanical_efficiency) +
                                 " is not above 0 and at most 1.",
                             "Enter it as a fraction, such as 0.9.");
    }
    Iso3046Adjustment result;
    result.k = std::pow(counted_pressure(site, exponents.a) / counted_pressure(reference, exponents.a),
                        exponents.m) *
               std::pow(reference.inlet_air.value() / site.inlet_air.value(), exponents.n);
    if (exponents.s != 0.0) {
        result.k *= std::pow(reference.coolant->value() / site.coolant->value(), exponents.s);
    }
    result.alpha = result.k - 0.7 * (1.0 - result.k) * (1.0 / mechanical_efficiency - 1.0);
    result.beta = result.k / result.alpha;
    if (!(result.k >= smallest_k && result.k <= largest_k && result.alpha > 0.0)) {
        return Problem{Problem::Kind::not_found,
                       "The adjustment to ISO 3046-1 is not known: k would be " +
                           short_number_text(result.k) + ", and it is good from 0.6 to 1.1 only.",
                       "Check barometer and temperatures, or compare at ambients that are nearer."};
    }
    return result;
}

Corrected<SpecificConsumption> correct_iso_3046(SpecificConsumption measured,
                                                const Iso3046Adjustment& adjustment)
{
    return {measured / adjustment.beta, AppliedCorrection::iso3046, false};
}

} // namespace evenstroke
