// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/airside/charge_air_cooler.h"
#include "core/airside/turbocharger.h"

#include <gtest/gtest.h>

#include <cmath>

namespace evenstroke {
namespace {

template <typename T> std::string refusal(const Result<T>& result)
{
    return result.has_value() ? std::string() : result.error().what_happened;
}

TurbochargerState sound_state()
{
    return {celsius(25.0), Ratio(3.0), celsius(380.0), bar_absolute(2.8), bar_absolute(1.02)};
}

TEST(Compressor, NamesTheInputThatIsMissing)
{
    EXPECT_EQ(refusal(compressor_pressure_ratio(bar_absolute(1.0), std::nullopt)),
              "The pressure ratio of the compressor is not known, because the pressure after the compressor is missing.");
    EXPECT_EQ(refusal(compressor_efficiency(std::nullopt, celsius(150.0), Ratio(3.0))),
              "The efficiency of the compressor is not known, because the inlet air temperature is missing.");
}

TEST(Compressor, IsNotKnownFromWhatCannotBe)
{
    EXPECT_FALSE(compressor_pressure_ratio(bar_absolute(0.0), bar_absolute(3.0)).has_value());
    EXPECT_FALSE(compressor_efficiency(celsius(25.0), celsius(150.0), Ratio(1.0)).has_value()) << "no compression";
    EXPECT_FALSE(compressor_efficiency(celsius(25.0), celsius(25.0), Ratio(3.0)).has_value()) << "no rise";
    EXPECT_FALSE(compressor_efficiency(celsius(25.0), celsius(60.0), Ratio(3.0)).has_value()) << "better than ideal";
    EXPECT_FALSE(compressor_efficiency(celsius(-300.0), celsius(60.0), Ratio(3.0)).has_value());
}

// The ideal compressor's own outlet temperature, worked out backwards.
TEST(Compressor, IsPerfectAtTheIdealTemperature)
{
    const double ideal = 300.0 * std::pow(3.0, usual_air_exponent);
    EXPECT_NEAR(compressor_efficiency(Temperature::from_value(300.0), Temperature::from_value(ideal + 1e-9), Ratio(3.0))
                    .value()
                    .value(),
                1.0, 1e-9);
}

TEST(Turbocharger, NamesTheInputThatIsMissing)
{
    TurbochargerState state = sound_state();
    state.outlet.reset();
    EXPECT_EQ(refusal(turbocharger_efficiency(state, air_over_gas_heat_flow().value())),
              "The efficiency of the turbocharger is not known, because the back pressure after the turbine is missing.");
}

TEST(Turbocharger, IsNotKnownWithoutExpansionOrBeyondOne)
{
    const Ratio heat_flow = air_over_gas_heat_flow().value();
    TurbochargerState state = sound_state();
    state.receiver = bar_absolute(1.0);
    EXPECT_FALSE(turbocharger_efficiency(state, heat_flow).has_value());
    state = sound_state();
    state.before_turbine = celsius(50.0); // would be 1.3
    EXPECT_FALSE(turbocharger_efficiency(state, heat_flow).has_value());
    EXPECT_FALSE(air_over_gas_heat_flow(Ratio(-0.01)).has_value());
    EXPECT_FALSE(air_over_gas_heat_flow(Ratio(0.1)).has_value());
}

TEST(Turbine, IsWhatTheCompressorLeaves)
{
    EXPECT_NEAR(turbine_efficiency(Ratio(0.68), Ratio(0.85)).value().value(), 0.8, 1e-12);
    EXPECT_FALSE(turbine_efficiency(Ratio(0.8), Ratio(0.7)).has_value());
    EXPECT_FALSE(turbine_efficiency(std::nullopt, Ratio(0.7)).has_value());
}

TEST(ChargeAirCooler, IsNotKnownFromTemperaturesThatCannotStandTogether)
{
    const auto effectiveness = [](double air_in, double air_out, double coolant_in) {
        return cooler_effectiveness({celsius(air_in), celsius(air_out), celsius(coolant_in), {}}).has_value();
    };
    EXPECT_TRUE(effectiveness(150.0, 40.0, 30.0));
    EXPECT_FALSE(effectiveness(150.0, 29.0, 30.0)) << "colder than the coolant";
    EXPECT_FALSE(effectiveness(40.0, 45.0, 30.0)) << "heated";
    EXPECT_FALSE(effectiveness(30.0, 30.0, 30.0)) << "nothing to cool";
    EXPECT_NE(refusal(cooler_effectiveness({celsius(150.0), {}, celsius(30.0), {}})).find("after the cooler is missing"),
              std::string::npos);
}

TEST(ChargeAirCooler, MeanDifferenceOfEqualEndsIsTheirDifference)
{
    EXPECT_NEAR(mean_temperature_difference({celsius(60.0), celsius(40.0), celsius(30.0), celsius(50.0)}).value().value(),
                10.0, 1e-9);
    EXPECT_FALSE(mean_temperature_difference({celsius(60.0), celsius(40.0), celsius(30.0), celsius(61.0)}).has_value());
}

TEST(PressureDrop, IsNotKnownFarFromTheReferenceFlow)
{
    const auto known = [](double flow) {
        return drop_at_reference_flow(bar_difference(0.02), {bar_absolute(3.0), celsius(40.0), flow},
                                      {bar_absolute(3.0), celsius(40.0), 1.0})
            .has_value();
    };
    EXPECT_TRUE(known(0.6));
    EXPECT_FALSE(known(0.4));
    EXPECT_FALSE(known(0.0));
    const auto without = drop_at_reference_flow(bar_difference(0.02), {bar_absolute(3.0), celsius(40.0), {}},
                                                {bar_absolute(3.0), celsius(40.0), 1.0});
    EXPECT_NE(refusal(without).find("the air flow is missing"), std::string::npos);
}

TEST(AirFlow, IsFiguredFromTheTurbineAsANozzle)
{
    const double one = flow_figure(bar_absolute(2.0), Temperature::from_value(600.0)).value();
    const double other = flow_figure(bar_absolute(3.0), Temperature::from_value(660.0)).value();
    EXPECT_NEAR(other / one, 1.5 / std::sqrt(1.1), 1e-12);
    EXPECT_FALSE(flow_figure(bar_absolute(2.0), std::nullopt).has_value());
}

} // namespace
} // namespace evenstroke
