// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/workings/typed_workings.h"

#include "core/plain_text.h"
#include "core/trend/deviations.h"
#include "core/workings/working_words.h"

#include <algorithm>
#include <cmath>

namespace evenstroke {
namespace {

class TypedSheet
{
public:
    TypedSheet(const Judgement& judgement, const Baseline& baseline, std::size_t reading, const Quantity& q, Place place)
        : engine_(judgement.record->engine), baseline_(baseline), reading_(judgement.record->readings[reading]), q_(q),
          place_(place), conditions_(find_conditions(engine_, reading_))
    {
        sheet_.title = q.title;
        sheet_.place = place;
        sheet_.unit = unit_words(q);
        sheet_.decimals = q.decimals;
        for (const JudgedValue& value : judgement.readings[reading].values)
            if (value.quantity == q.id && value.place == place)
                judged_ = &value;
    }

    Workings made()
    {
        typed_ = reading_.find(q_.id, place_);
        const auto own = typed_ ? own_value(*typed_, conditions_) : std::nullopt;
        if (!judged_ || !own) {
            say_missing();
            return std::move(sheet_);
        }
        correction_ = find_correction(engine_, q_, own->value, conditions_);
        budget_ = deviation_budget(engine_, baseline_, q_, own->value, conditions_, judged_->expected.has_value());
        sheet_.value = judged_->raw;
        sheet_.corrected = judged_->corrected;
        sheet_.expected = judged_->expected;
        sheet_.deviation = judged_->deviation;
        sheet_.apart = judged_->apart;
        sheet_.half_width = instrument_uncertainty(engine_, q_, judged_->raw);
        if (sheet_.deviation || sheet_.corrected)
            sheet_.deviation_half_width = budget_.half_width();
        add_typed(*own);
        add_correction();
        add_expected();
        add_rest();
        say_what_was_assumed(*own);
        return std::move(sheet_);
    }

private:
    void say_missing()
    {
        const std::string place = part_words(engine_, place_);
        const std::string of = place.empty() ? "" : " of " + place;
        if (typed_ && typed_->number) {
            sheet_.missing = q_.title + of + " is not known, because " + words_as_typed(*typed_) +
                             " cannot be brought to " + unit_words(q_) +
                             ". Enter fuel density and fuel temperature for a volume, or type it in another unit.";
            return;
        }
        sheet_.missing = q_.title + of + " is not known, because it " + why_missing(reading_, q_.name, place_) + ". Read " +
                         lower_first(q_.title) + of + ".";
    }

    WorkingInput& input(std::string_view quantity_name, double value, std::optional<double> half, double moved)
    {
        const Quantity& q = quantity(*find_quantity(quantity_name));
        WorkingInput in{q.title, symbol_of(q), Place::engine(), value, unit_words(q), half, moved, {}, {}};
        for (const Value& each : reading_.values)
            if (each.phase == Phase::reading && each.number && quantity(each.quantity).name == quantity_name) {
                in.origin = in.origin.empty() ? words_as_typed(each) : "mean of what was read";
                in.place = each.place;
            }
        if (in.origin == "mean of what was read")
            in.place = Place::engine();
        if (const auto half_width = budget_.half_width(); half_width && *half_width > 0.0)
            in.share = moved * moved / (*half_width * *half_width);
        sheet_.inputs.push_back(std::move(in));
        return sheet_.inputs.back();
    }

    void step(std::string words, double value, std::string unit) { sheet_.steps.push_back({std::move(words), value, std::move(unit)}); }

    void add_typed(const OwnValue& own)
    {
        WorkingInput& in = input(q_.name, judged_->raw, instrument_uncertainty(engine_, q_, judged_->raw), budget_.instrument.value_or(0.0));
        in.place = place_;
        in.origin = words_as_typed(*typed_);
        const bool as_it_is = typed_->unit == q_.unit && typed_->kind == q_.kind;
        if (!as_it_is)
            step("In " + unit_words(q_), judged_->raw, unit_words(q_));
        if (own.shift != 0.0 && typed_->kind != q_.kind)
            sheet_.remarks.push_back("Gauge and absolute differ by the barometer of this reading.");
    }

    void add_barometer()
    {
        WorkingInput& in = input("barometric_pressure", conditions_.barometer_or_one_bar(), std::nullopt, 0.0);
        in.unit = "bar abs";
        in.share.reset();
        if (!conditions_.barometer)
            in.origin = "no barometer was read: 1 bar taken";
    }

    void add_correction()
    {
        switch (judged_->applied) {
        case Applied::linear:
        case Applied::extrapolated: add_linear(); break;
        case Applied::similarity: add_similarity(); break;
        case Applied::none:
        case Applied::heating_value:
        case Applied::not_correctable: say_why_not_corrected(); break;
        }
        if (sheet_.corrected && judged_->applied != Applied::none)
            step("Corrected to reference conditions", *sheet_.corrected, unit_words(q_));
    }

    void add_linear()
    {
        const CorrectionCoefficients& by = *correction_coefficients(engine_, q_);
        const bool is_pressure = q_.kind == PressureKind::gauge;
        const bool is_temperature = q_.correction_form != CorrectionForm::pressure;
        sheet_.formula = is_pressure      ? "p_corr = (p + p_b)(1 + a ΔT + b ΔTc) − p_b"
                         : is_temperature ? "t_corr = (t + 273.15)(1 + a ΔT + b ΔTc) − 273.15"
                                          : "corrected = value (1 + a ΔT + b ΔTc)";
        sheet_.validity = "|ΔT| ≤ 25 K, |ΔTc| ≤ 15 K (common practice); beyond, it is extrapolated";
        sheet_.source = by.source.empty() ? "coefficients without a source" : "coefficients: " + by.source;
        if (is_pressure)
            add_barometer();
        add_condition("inlet_air_temperature", conditions_.inlet_air, in_celsius(engine_.reference.inlet_air), "ΔT", "a",
                      by.per_inlet_air, budget_.inlet_air);
        add_condition("cooler_coolant_inlet_temperature", conditions_.cooler_coolant,
                      in_celsius(engine_.reference.cooler_coolant), "ΔTc", "b", by.per_coolant, budget_.cooler_coolant);
        step("Factor 1 + a ΔT + b ΔTc", correction_.scale, "");
        if (judged_->applied == Applied::extrapolated)
            sheet_.remarks.push_back("Air or coolant lie outside the range that the correction is good for: extrapolated.");
    }

    void add_condition(std::string_view name, std::optional<double> degrees, double reference, const std::string& difference,
                       const std::string& coefficient, double per_kelvin, double moved)
    {
        if (!degrees && per_kelvin == 0.0)
            return;
        const auto half = degrees ? instrument_uncertainty(engine_, quantity(*find_quantity(name)), *degrees) : std::nullopt;
        input(name, degrees.value_or(reference), half, moved);
        step(difference + ", over the reference of " + short_number_text(reference) + " °C", degrees.value_or(reference) - reference, "K");
        sheet_.inputs.push_back({"Coefficient of " + lower_first(quantity(*find_quantity(name)).title), coefficient,
                                 Place::engine(), per_kelvin, "1/K", {}, 0.0, {}, "engine's particulars"});
    }

    void add_similarity()
    {
        sheet_.formula = "n_corr = n √(T_ref / T_1), in kelvin";
        sheet_.source = "similarity of turbomachines (equal Mach number); common practice";
        sheet_.validity = "the same pressure ratio; |T_1 − T_ref| up to 25 K (common practice)";
        const auto half = instrument_uncertainty(engine_, quantity(*find_quantity("inlet_air_temperature")), *conditions_.inlet_air);
        input("inlet_air_temperature", *conditions_.inlet_air, half, budget_.inlet_air);
        step("Factor √(T_ref / T_1)", correction_.scale, "");
    }

    void say_why_not_corrected()
    {
        if (!judged_->missing_input.empty())
            sheet_.remarks.push_back("Not corrected, because no " + judged_->missing_input + " was read.");
        else if (judged_->applied == Applied::not_correctable)
            sheet_.remarks.push_back("Not corrected, because the engine has no coefficients for it.");
        else if (q_.name == "maximum_pressure" && engine_.maximum_pressure_controlled)
            sheet_.remarks.push_back("Not corrected, because the engine's control holds the maximum pressure.");
        else if (q_.correction_form == CorrectionForm::none)
            sheet_.remarks.push_back("Not corrected: ambient air does not move it, or nobody knows how far.");
    }

    void add_expected()
    {
        if (!sheet_.expected) {
            say_why_not_expected();
            return;
        }
        const auto half = instrument_uncertainty(engine_, quantity(*find_quantity("load_percent")), *conditions_.load_percent);
        WorkingInput& in = input("load_percent", *conditions_.load_percent, half, budget_.load);
        if (conditions_.load_from_power)
            in.origin = "shaft power over rated power";
        step("Expected: baseline at " + short_number_text(*conditions_.load_percent) + " % load", *sheet_.expected, unit_words(q_));
        say_between_which_points();
        const std::string from = engine_.baseline_source.empty() ? "baseline without a source" : "baseline: " + engine_.baseline_source;
        sheet_.source += (sheet_.source.empty() ? "" : "; ") + from;
    }

    void say_why_not_expected()
    {
        if (!baseline_.has(q_.name))
            sheet_.remarks.push_back("Nothing is expected: the engine's baseline does not speak of it.");
        else if (!conditions_.load_percent)
            sheet_.remarks.push_back("Nothing is expected, because neither load nor shaft power was read.");
        else if (!baseline_.curve(conditions_.mode, q_.name))
            sheet_.remarks.push_back("Nothing is expected: the baseline has no points of this mode of running.");
        else
            sheet_.remarks.push_back("Nothing is expected: the baseline does not reach " +
                                     short_number_text(*conditions_.load_percent) + " % load.");
    }

    void say_between_which_points()
    {
        const BaselinePoint *below = nullptr, *above = nullptr;
        for (const BaselinePoint& point : engine_.baseline) {
            if (point.mode != conditions_.mode || !point.values.count(q_.name))
                continue;
            if (point.load_percent <= *conditions_.load_percent)
                below = &point;
            else if (!above)
                above = &point;
        }
        const auto words = [&](const BaselinePoint& point) {
            return short_number_text(point.load_percent) + " % (" + short_number_text(point.values.at(q_.name)) + ")";
        };
        const std::string mode = conditions_.mode.empty() ? "" : " of mode " + evenstroke::quoted(conditions_.mode);
        if (below && below->load_percent == *conditions_.load_percent)
            sheet_.remarks.push_back("The load is that of the baseline's point" + mode + " at " + words(*below) + ".");
        else if (below && above)
            sheet_.remarks.push_back("Between the baseline's points" + mode + " at " + words(*below) + " and " + words(*above) + ".");
        else if (below || above)
            sheet_.remarks.push_back("Beyond the baseline's last point" + mode + " at " + words(below ? *below : *above) +
                                     ", whose value holds for 5 % of load.");
    }

    void add_rest()
    {
        if (sheet_.deviation) {
            step("Deviation", *sheet_.deviation, difference_unit(q_));
            sheet_.formula += std::string(sheet_.formula.empty() ? "" : "; ") + "deviation = " +
                              (judged_->applied == Applied::none ? "value" : "corrected") + " − expected";
        }
        if (!sheet_.apart)
            return;
        const std::optional<double> compared = sheet_.deviation ? sheet_.deviation : sheet_.corrected;
        if (compared)
            step(sheet_.deviation ? "Median of the other cylinders' deviations" : "Median of the other cylinders",
                 *compared - *sheet_.apart, sheet_.deviation ? difference_unit(q_) : unit_words(q_));
        step("Apart from the others", *sheet_.apart, difference_unit(q_));
        sheet_.formula += std::string(sheet_.formula.empty() ? "" : "; ") + "apart = deviation − median of the others' deviations";
    }

    void say_what_was_assumed(const OwnValue& own)
    {
        if (own.outside_hard)
            sheet_.remarks.push_back("The value is outside what is possible: it is used for nothing until it is changed or confirmed.");
        if (judged_->doubtful)
            sheet_.remarks.push_back("The value is doubted, and held out of the comparison until it is answered.");
        if (!sheet_.half_width)
            sheet_.remarks.push_back("How sure the number is cannot be said: nobody states it of this instrument.");
    }

    const Engine& engine_;
    const Baseline& baseline_;
    const Reading& reading_;
    const Quantity& q_;
    Place place_;
    Conditions conditions_;
    const JudgedValue* judged_ = nullptr;
    const Value* typed_ = nullptr;
    Correction correction_;
    DeviationBudget budget_;
    Workings sheet_;
};

} // namespace

Workings typed_workings(const Judgement& judgement, const Baseline& baseline, std::size_t reading, const Quantity& quantity,
                        Place place)
{
    return TypedSheet(judgement, baseline, reading, quantity, place).made();
}

} // namespace evenstroke
