// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/heat/coolant_film.h"
#include "core/heat/gas_film.h"
#include "tests/core/refusal.h"

#include <cmath>
#include <gtest/gtest.h>
#include <limits>
#include <vector>

namespace evenstroke {
namespace {

using Kind = Problem::Kind;
constexpr double not_a_number = std::numeric_limits<double>::quiet_NaN();

Temperature kelvin(double degrees)
{
    return Temperature::from_value(degrees);
}
Velocity metres_per_second(double speed)
{
    return Velocity::from_value(speed);
}

const Length bore = 0.6 * si::metres;
const GasState compressed{bar_absolute(100.0), kelvin(900.0)};
const Velocity piston = metres_per_second(8.4);
const WoschniCharge charge{bar_absolute(3.72), kelvin(342.0), Volume::from_value(0.4),
                           Volume::from_value(0.678584)};

// Worked out separately from the stated equations (a check of the arithmetic, not of the physics): hold to
// 1e-4 relative.
void expect_film(const Result<HeatTransferCoefficient>& film, double expected)
{
    ASSERT_TRUE(film.has_value()) << film.error().text();
    EXPECT_NEAR(film.value().value() / expected, 1.0, 1e-6);
}

TEST(GasFilm, FormulaeAgreeWithASeparateCalculation)
{
    const Velocity w = woschni_gas_velocity(CyclePart::compression, piston).value();
    EXPECT_DOUBLE_EQ(w.value(), 2.28 * 8.4);
    expect_film(woschni_film(bore, compressed, w), 1653.240);
    expect_film(woschni_kilopascal_film(bore, compressed, w), 1440.540);
    expect_film(hohenberg_film(Volume::from_value(0.03), compressed, piston), 2609.756);
    expect_film(eichelberg_film(compressed, piston), 1504.018);
}

TEST(GasFilm, WoschniWithCombustionAgreesWithASeparateCalculation)
{
    const Velocity w = woschni_gas_velocity(CyclePart::combustion_and_expansion, piston, charge,
                                            bar_absolute(150.0), bar_absolute(120.0))
                           .value();
    EXPECT_NEAR(w.value(), 34.311785, 5e-7); // half of the last digit
    expect_film(woschni_film(bore, {bar_absolute(150.0), kelvin(1700.0)}, w), 2602.572);
}

TEST(GasFilm, GasVelocityFollowsThePartOfTheCycle)
{
    EXPECT_DOUBLE_EQ(woschni_gas_velocity(CyclePart::gas_exchange, piston).value().value(), 6.18 * 8.4);
    // A pressure below the motored one adds nothing.
    const double w = woschni_gas_velocity(CyclePart::combustion_and_expansion, piston, charge,
                                          bar_absolute(20.0), bar_absolute(25.0))
                         .value()
                         .value();
    EXPECT_DOUBLE_EQ(w, 2.28 * 8.4);
}

TEST(GasFilm, NamesWhatLiesOutsideTheFormulae)
{
    const Velocity w = metres_per_second(19.0);
    expect_problem(woschni_film(bore, {bar_absolute(0.0), kelvin(900.0)}, w), Kind::not_found,
                   "gas pressure of 0 bar abs");
    expect_problem(woschni_film(bore, {bar_absolute(100.0), kelvin(not_a_number)}, w), Kind::not_found,
                   "gas temperature");
    expect_problem(woschni_film(Length{}, compressed, w), Kind::not_found, "bore of 0 m");
    expect_problem(woschni_kilopascal_film(bore, compressed, Velocity{}), Kind::not_found,
                   "gas velocity of 0");
    expect_problem(hohenberg_film(Volume{}, compressed, piston), Kind::not_found, "gas volume of 0");
    expect_problem(hohenberg_film(Volume::from_value(0.03), compressed, Velocity{}), Kind::not_found,
                   "mean piston speed of 0 m/s");
    expect_problem(eichelberg_film({bar_absolute(400.0), kelvin(900.0)}, piston), Kind::not_found,
                   "400 bar abs");
    expect_problem(woschni_gas_velocity(CyclePart::combustion_and_expansion, piston), Kind::invalid_input,
                   "charge when the cylinder closes");
    expect_problem(
        woschni_gas_velocity(CyclePart::combustion_and_expansion, piston, charge, bar_absolute(100.0)),
        Kind::not_found, "motored pressure of 0");
}

TEST(GasFilm, EveryFormulaIsDescribed)
{
    for (const GasFilm film : every_gas_film) {
        EXPECT_FALSE(describe(film).name.empty());
        EXPECT_NE(describe(film).equation.find("h = "), std::string_view::npos);
        EXPECT_FALSE(describe(film).source.empty());
    }
}

TEST(MeanGasFilm, WeighsTheTemperatureByTheFilm)
{
    // Film and temperature linear: the trapezoids of h are exact, those of h T are 200 * 1000, 300 * 1250,
    // 400 * 1500 in halves.
    const std::vector<double> angle{0.0, 1.0, 2.0}, film{200.0, 300.0, 400.0},
        temperature{1000.0, 1250.0, 1500.0};
    const MeanGasFilm mean = mean_gas_film(angle, film, temperature).value();
    EXPECT_DOUBLE_EQ(mean.film.value(), 300.0);
    EXPECT_DOUBLE_EQ(mean.gas.value(), (0.5 * 200e3 + 375e3 + 0.5 * 600e3) / 600.0);
    EXPECT_DOUBLE_EQ(mean.angle_covered, 2.0);
}

TEST(MeanGasFilm, NamesTheFirstUnusableSample)
{
    const std::vector<double> angle{0.0, 1.0, 1.0}, film{200.0, 300.0, 400.0},
        temperature{1000.0, -5.0, 1500.0};
    expect_problem(mean_gas_film(angle, film, film), Kind::invalid_input, "Sample 3");
    expect_problem(mean_gas_film(angle, film, temperature), Kind::invalid_input, "Sample 2");
    expect_problem(mean_gas_film(angle, film, std::vector<double>{1.0}), Kind::invalid_input, "3, 3 and 1");
}

// Water of 80 °C and 4 bar abs by IF97 and IAPWS.
const LiquidProperties water{Density::from_value(971.94), conductivity(0.66717),
                             DynamicViscosity::from_value(3.5414e-4), 2.2267};

TEST(CoolantFilm, DittusBoelterAgreesWithASeparateCalculation)
{
    EXPECT_NEAR(reynolds_number(water, metres_per_second(1.5), millimetres(20.0)).value(), 82335.0, 0.5);
    EXPECT_NEAR(dittus_boelter_film(water, metres_per_second(1.5), millimetres(20.0)).value().value(), 9046.0,
                0.5);
    EXPECT_NEAR(dittus_boelter_film(water, metres_per_second(0.5), millimetres(30.0)).value().value(), 3464.0,
                0.5);
}

TEST(CoolantFilm, IsNotKnownInSlowFlowOrOtherLiquids)
{
    expect_problem(dittus_boelter_film(water, metres_per_second(0.05), millimetres(20.0)), Kind::not_found,
                   "Reynolds number of 2744");
    expect_problem(dittus_boelter_film(water, Velocity{}, millimetres(20.0)), Kind::invalid_input,
                   "velocity");
    expect_problem(dittus_boelter_film(water, metres_per_second(1.0), Length{}), Kind::invalid_input,
                   "passage");
    LiquidProperties oil = water;
    oil.prandtl = 500.0;
    expect_problem(dittus_boelter_film(oil, metres_per_second(1.5), millimetres(20.0)), Kind::not_found,
                   "Prandtl number of 500");
    expect_problem(dittus_boelter_film(LiquidProperties{}, metres_per_second(1.5), millimetres(20.0)),
                   Kind::invalid_input, "density of the coolant");
}

// Worked out separately, printed with three and four decimals.
TEST(Boiling, JensLottesAgreesWithASeparateCalculationAndSaysWhereItWasNotFitted)
{
    const auto low = jens_lottes_superheat(megawatts_per_square_metre(0.3), bar_absolute(4.0)).value();
    EXPECT_NEAR(low.value.value(), 17.346, 5e-4);
    EXPECT_TRUE(low.extrapolated);
    const auto high = jens_lottes_superheat(megawatts_per_square_metre(1.0), bar_absolute(70.0)).value();
    EXPECT_NEAR(high.value.value(), 8.0837, 5e-5);
    EXPECT_FALSE(high.extrapolated);
    const auto back = jens_lottes_flux(low.value, bar_absolute(4.0)).value();
    EXPECT_NEAR(back.value.value(), 0.3e6, 1e-3); // rounding
    EXPECT_EQ(jens_lottes_flux(kelvin_difference(-3.0), bar_absolute(4.0)).value().value.value(), 0.0);
}

TEST(Boiling, IsNotKnownOutsideTheFormula)
{
    const HeatFlux flux = megawatts_per_square_metre(0.3);
    expect_problem(jens_lottes_superheat(flux, bar_absolute(0.9)), Kind::not_found, "0.9 bar abs");
    expect_problem(jens_lottes_superheat(flux, bar_absolute(173.0)), Kind::not_found, "173 bar abs");
    expect_problem(jens_lottes_superheat(-flux, bar_absolute(4.0)), Kind::invalid_input, "-0.3 MW");
    expect_problem(jens_lottes_superheat(megawatts_per_square_metre(13.0), bar_absolute(4.0)),
                   Kind::not_found, "13 MW");
    expect_problem(jens_lottes_flux(kelvin_difference(60.0), bar_absolute(4.0)), Kind::not_found, "60 K");
    expect_problem(jens_lottes_flux(kelvin_difference(not_a_number), bar_absolute(4.0)), Kind::not_found,
                   "K");
    expect_problem(rohsenow_flux(BoilingProperties{}, kelvin_difference(5.0)), Kind::invalid_input,
                   "viscosity");
}

} // namespace
} // namespace evenstroke
