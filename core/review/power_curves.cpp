// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/review/power_curves.h"

#include "core/derived/derived_formulas.h"
#include "core/trend/deviations.h"
#include "core/trend/drift_catalogue.h"

#include <algorithm>
#include <cmath>

namespace evenstroke::power_ways {
namespace {

using Numbers = std::span<const double>;
using Index = std::optional<std::size_t>;

constexpr char not_on_curve[] = "the value lies outside the baseline, or the baseline has it at more than one load";

} // namespace

WorkingInput PowerCurves::off_baseline(std::string_view name, const std::string& words, const std::string& unit,
                                       double now) const
{
    WorkingInput input{words + " off the baseline", "d", Place::engine(), 0.0, unit, {}, 0.0, {}, ""};
    if (const auto known = scatter_.find(name); known != scatter_.end()) {
        input.half_width = known->second;
        input.origin = "two of this engine's own scatter";
        return input;
    }
    const auto* channel = drift::find_channel(name, drift::Subject::engine);
    if (!channel)
        channel = drift::find_channel(name, drift::Subject::cylinder);
    if (!channel)
        return input;
    const bool percent = channel->form == drift::DeviationForm::percent;
    input.half_width = 2.0 * channel->noise * (percent ? std::abs(now) / 100.0 : 1.0);
    input.origin = "two of the usual scatter (common practice, no source)";
    return input;
}

Way PowerCurves::turbocharger_speed() const
{
    Way way = begin("turbocharger_speed", "Turbocharger speed",
                    "n_base(L) = n_TC √(T_ref / T_1) - d;  P = L P_rated / 100", {"turbocharger_speed"});
    way.estimate.workings.source = "the engine's own baseline, read backwards";
    way.estimate.workings.validity = "within 5 % of load of the baseline, where one load has this speed";
    const BaselineCurve* curve = baseline_.curve(conditions_.mode, "turbocharger_speed");
    if (!curve)
        return without(std::move(way), "the baseline has no turbocharger speed");
    PowerInputs of = inputs();
    const Index speed = of.mean("turbocharger_speed", "n_TC"), air = of.mean("inlet_air_temperature", "T_1");
    if (!speed || !air)
        return without(std::move(way), speed ? "no inlet air temperature was read" : "no turbocharger speed was read");
    const Quantity& q = quantity(*find_quantity("turbocharger_speed"));
    const auto corrected = [=, this, &q](Numbers x) -> std::optional<double> {
        Conditions now = conditions_;
        now.inlet_air = x[*air];
        const Correction correction = find_correction(engine_, q, x[*speed], now);
        return correction.known() ? std::optional(correction.scale * x[*speed] + correction.shift) : std::nullopt;
    };
    const std::size_t off =
        of.given(off_baseline("turbocharger_speed", "Turbocharger speed", "1/min", of.value(*speed)));
    if (const auto at_reference = of.solve(corrected)) {
        way.estimate.workings.steps.push_back({"Speed at reference inlet air", at_reference->value, "1/min"});
        if (const auto load = curve->load_at(at_reference->value))
            way.estimate.workings.steps.push_back({"Load on the baseline", *load, "%"});
        else
            return without(std::move(way), not_on_curve);
    }
    return finish(std::move(way), of, [=, this](Numbers x) -> std::optional<double> {
        const auto at_reference = corrected(x);
        const auto load = at_reference ? curve->load_at(*at_reference - x[off]) : std::nullopt;
        return load ? std::optional(*load / 100.0 * rated()) : std::nullopt;
    });
}

BaselineCurve PowerCurves::index_times_speed(std::string& words) const
{
    const double rated_speed = engine_.rated_speed.value() * 60.0; // 1/min
    const bool constant = !engine_.two_stroke() && (!engine_.load_limits || engine_.load_limits->constant_speed);
    const bool of_baseline = baseline_.curve(conditions_.mode, "speed") != nullptr;
    std::vector<double> loads, products;
    for (const BaselinePoint& point : engine_.baseline) {
        const auto index = point.values.find("fuel_index"), speed = point.values.find("speed");
        if (point.mode != conditions_.mode || index == point.values.end() ||
            (of_baseline && speed == point.values.end()))
            continue;
        const double at = of_baseline ? speed->second
                          : constant  ? rated_speed
                                      : rated_speed * std::cbrt(point.load_percent / 100.0);
        loads.push_back(point.load_percent);
        products.push_back(index->second * at);
    }
    words = of_baseline ? ""
            : constant  ? "The baseline has no speed: it is taken as measured at the rated speed."
                        : "The baseline has no speed: it is taken as measured on the propeller curve through the rating "
                          "(common practice of shop trials).";
    return {std::move(loads), std::move(products)};
}

Way PowerCurves::fuel_index() const
{
    Way way = begin("fuel_index", "Fuel index and speed", "h_base(L) n_base(L) = (h - d) n;  P = L P_rated / 100",
                    {"fuel_index", "speed"});
    way.estimate.workings.source = "fuel a stroke times strokes a minute, through the engine's own baseline read backwards";
    way.estimate.workings.validity = "within 5 % of load of the baseline; fuel as dense and rich as that of the baseline";
    std::string words;
    BaselineCurve curve = index_times_speed(words);
    if (curve.empty())
        return without(std::move(way), "the baseline has no fuel index");
    PowerInputs of = inputs();
    const Index index = of.mean("fuel_index", "h"), speed = of.mean("speed", "n");
    if (!index || !speed)
        return without(std::move(way), index ? "no speed was read" : "no fuel index was read");
    const auto whole = find_quantity("fuel_index", Place::Kind::engine);
    way.of_cylinders = !whole || !reading_.find(*whole, Place::engine());
    const std::size_t off = of.given(off_baseline("fuel_index", "Fuel index", "%", of.value(*index)));
    if (!words.empty())
        way.estimate.workings.remarks.push_back(words);
    const double product = of.value(*index) * of.value(*speed);
    way.estimate.workings.steps.push_back({"Index times speed", product, "% 1/min"});
    const auto load = curve.load_at(product);
    if (!load)
        return without(std::move(way), not_on_curve);
    way.estimate.workings.steps.push_back({"Load on the baseline", *load, "%"});
    return finish(std::move(way), of, [=, this, curve = std::move(curve)](Numbers x) -> std::optional<double> {
        const auto at = curve.load_at((x[*index] - x[off]) * x[*speed]);
        return at ? std::optional(*at / 100.0 * rated()) : std::nullopt;
    });
}

std::optional<double> PowerCurves::consumption_at_site() const
{
    const DerivedReading reading(engine_, baseline_, reading_, conditions_);
    return DerivedInputs(reading).run(consumption_ambient_factor);
}

Way PowerCurves::fuel_consumption() const
{
    Way way = begin("fuel_consumption", "Fuel consumption", "P = 1000 B (H_u / 42.7) / ((b_base(P) + d) f)",
                    {"fuel_consumption", "fuel_lower_heating_value", "specific_fuel_consumption"});
    way.estimate.workings.source = "definition of the specific consumption, with that of the engine's own baseline";
    way.estimate.workings.validity = "within 5 % of load of the baseline";
    const BaselineCurve* curve = baseline_.curve(conditions_.mode, "specific_fuel_consumption");
    if (!curve)
        return without(std::move(way), "the baseline has no specific consumption");
    PowerInputs of = inputs();
    const Index fuel = of.mean("fuel_consumption", "B"), heat = of.mean("fuel_lower_heating_value", "H_u");
    if (!fuel || !heat)
        return without(std::move(way), fuel ? "no heating value was entered" : "no fuel consumption was read");
    const auto site = consumption_at_site();
    if (!site)
        return without(std::move(way), "the ambient that moves the consumption was not read");
    if (!(rated() > 0.0))
        return without(std::move(way), "no rated power is entered with the engine");
    const std::size_t factor = of.given({"Ambient factor of the consumption", "f", Place::engine(), *site, "", 0.0, 0.0, {},
                                         "consumption at the reading's ambient over that at reference"});
    const std::size_t off = of.given(off_baseline("specific_fuel_consumption", "Specific fuel consumption", "g/kWh",
                                                  curve->at(75.0).value_or(200.0)));
    // The curve is flat, so that putting its value in again and again closes in on the one power that fits.
    const auto power = [=, this](Numbers x) -> std::optional<double> {
        const double work = 1000.0 * x[*fuel] * x[*heat] / reference_heating_value / x[factor];
        double now = std::clamp(work / 180.0, curve->first_load() / 100.0 * rated(), curve->last_load() / 100.0 * rated());
        for (int turn = 0; turn < 200; ++turn) {
            const auto specific = curve->at(100.0 * now / rated());
            if (!specific || !(*specific + x[off] > 0.0))
                return std::nullopt;
            const double next = work / (*specific + x[off]);
            if (std::abs(next - now) <= 1e-13 * next)
                return next;
            now = next;
        }
        return std::nullopt;
    };
    way = finish(std::move(way), of, power);
    if (!way.estimate.power)
        return without(std::move(way), not_on_curve);
    if (const auto specific = curve->at(100.0 * *way.estimate.power / rated()))
        way.estimate.workings.steps.push_back({"Specific consumption of the baseline there", *specific, "g/kWh"});
    return way;
}

} // namespace evenstroke::power_ways
