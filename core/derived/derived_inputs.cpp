// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/derived/derived_inputs.h"

#include "core/trend/deviations.h"

#include <algorithm>

namespace evenstroke {
namespace {

constexpr double litres_per_hour = 3.6e6; // of a m³/s

} // namespace

DerivedReading::DerivedReading(const Engine& of_engine, const Baseline& of_baseline, const Reading& of_reading)
    : DerivedReading(of_engine, of_baseline, of_reading, find_conditions(of_engine, of_reading))
{
}

DerivedReading::DerivedReading(const Engine& of_engine, const Baseline& of_baseline, const Reading& of_reading,
                               Conditions of_conditions)
    : engine(of_engine), baseline(of_baseline), reading(of_reading), conditions(std::move(of_conditions)),
      values(of_reading, conditions)
{
}

Number DerivedReading::expected(std::string_view name, double load_percent) const
{
    const BaselineCurve* curve = baseline.curve(conditions.mode, name);
    return curve ? curve->at(load_percent) : std::nullopt;
}

std::vector<Place> DerivedReading::places(Place::Kind kind) const
{
    const auto numbered = values.numbered(kind);
    return numbered.empty() ? std::vector{Place::engine()} : std::vector<Place>(numbered.begin(), numbered.end());
}

// ---------------------------------------------------------------------------------------- running

void DerivedInputs::begin()
{
    inputs_.clear();
    calls_.clear();
    cursor_ = 0;
    moved_.clear();
    missing_.clear();
    steps_.clear();
    remarks_.clear();
    problem_.reset();
}

void DerivedInputs::again(std::span<const double> moved)
{
    moved_.assign(moved.begin(), moved.end());
    cursor_ = 0;
    problem_.reset();
}

DerivedInputs::Replay::~Replay()
{
    inputs_.moved_.clear();
    inputs_.problem_.reset();
    inputs_.watched_ = watched_;
}

void DerivedInputs::stop(const Problem& problem)
{
    if (!problem_)
        problem_ = problem;
}

Number DerivedInputs::not_known(std::string what_happened, std::string what_to_do)
{
    stop({Problem::Kind::not_found, std::move(what_happened), std::move(what_to_do)});
    return std::nullopt;
}

Number DerivedInputs::step(std::string_view words, Number value, std::string_view unit, Place place)
{
    if (watched_ && value)
        steps_.push_back({words, *value, unit, place});
    return value;
}

void DerivedInputs::remark(std::string_view sentence)
{
    if (watched_ && std::find(remarks_.begin(), remarks_.end(), sentence) == remarks_.end())
        remarks_.emplace_back(sentence);
}

Number DerivedInputs::value_of(int input) const
{
    const auto index = static_cast<std::size_t>(input);
    return index < moved_.size() ? moved_[index] : inputs_[index].value;
}

/// A formula asks in the same order each time it is run, so that the answer to a repeated question mostly stands
/// at the cursor; where a moved input led another way, it is searched for.
template <typename Find>
Number DerivedInputs::ask(std::string_view name, Place place, Asked asked, const Find& find)
{
    const auto is_this = [&](const Call& call) {
        return call.name == name.data() && call.place == place && call.asked == asked;
    };
    if (cursor_ < calls_.size() && is_this(calls_[cursor_])) {
        const int input = calls_[cursor_++].input;
        return input < 0 ? std::nullopt : value_of(input);
    }
    const auto known = std::find_if(calls_.begin(), calls_.end(), is_this);
    int input = known == calls_.end() ? find() : known->input;
    if (cursor_ == calls_.size()) {
        calls_.push_back({name.data(), place, asked, input});
        ++cursor_;
    }
    return input < 0 ? std::nullopt : value_of(input);
}

int DerivedInputs::add(Input input)
{
    inputs_.push_back(input);
    return static_cast<int>(inputs_.size()) - 1;
}

// ----------------------------------------------------------------------------------------- asking

int DerivedInputs::find_at(std::string_view name, Place place, int instrument)
{
    const auto id = find_quantity(name);
    if (!id)
        return -1;
    if (const ReadingValues::Entry* found = of_.values.at(*id, place)) {
        for (std::size_t i = 0; i < inputs_.size(); ++i)
            if (inputs_[i].how == Input::How::typed && inputs_[i].value_index == found->value_index)
                return static_cast<int>(i);
        return add({name, id, place, Input::How::typed, found->value_index, found->own->value, instrument, {}, {}, {}});
    }
    if (place.kind != Place::Kind::turbocharger && place.kind != Place::Kind::cooler)
        return -1;
    for (const ReadingValues::Entry* each = of_.values.first(*id); each; each = of_.values.next(*each))
        if (each->place == Place::engine())
            return find_mean(name);
    return -1;
}

int DerivedInputs::find_mean(std::string_view name)
{
    for (std::size_t i = 0; i < inputs_.size(); ++i)
        if (inputs_[i].how == Input::How::mean && inputs_[i].name == name)
            return static_cast<int>(i);
    const auto id = find_quantity(name);
    const Number mean = id ? of_.values.mean(*id) : std::nullopt;
    return mean ? add({name, id, Place::engine(), Input::How::mean, 0, *mean, UncertainInput::own, {}, {}, {}}) : -1;
}

Number DerivedInputs::miss(Number found, std::string_view name, Place place)
{
    if (!found && moved_.empty())
        missing_.push_back({name, place, false});
    return found;
}

Number DerivedInputs::optional_at(std::string_view name, Place place, int instrument)
{
    return ask(name, place, Asked::at, [&] { return find_at(name, place, instrument); });
}

Number DerivedInputs::at(std::string_view name, Place place, int instrument)
{
    return miss(optional_at(name, place, instrument), name, place);
}

Number DerivedInputs::optional_mean(std::string_view name)
{
    return ask(name, Place::engine(), Asked::mean, [&] { return find_mean(name); });
}

Number DerivedInputs::mean(std::string_view name) { return miss(optional_mean(name), name, Place::engine()); }

Number DerivedInputs::optional_at_or_mean(std::string_view name, Place place)
{
    const Number here = optional_at(name, place);
    return here ? here : optional_mean(name);
}

Number DerivedInputs::at_or_mean(std::string_view name, Place place)
{
    return miss(optional_at_or_mean(name, place), name, place);
}

double DerivedInputs::barometer()
{
    const auto read = ask("barometric_pressure", Place::engine(), Asked::barometer, [&] {
        return add({"barometric_pressure", find_quantity("barometric_pressure"), Place::engine(),
                    of_.conditions.barometer ? Input::How::barometer : Input::How::assumed_barometer, 0,
                    of_.conditions.barometer_or_one_bar(), UncertainInput::own, {}, "bar abs", {}});
    });
    if (!of_.conditions.barometer)
        remark("No barometer was read: 1 bar was taken, and how good that is nobody knows.");
    return *read;
}

Number DerivedInputs::load()
{
    if (const Number typed = optional_mean("load_percent"))
        return typed;
    const double rated = engine().rated_power.value() / 1000.0;
    const Number power = optional_mean("shaft_power");
    if (!power || !(rated > 0.0))
        return miss(std::nullopt, "load_percent", Place::engine());
    return 100.0 * *power / particular("Rated power", "P_rated", rated, "kW");
}

Number DerivedInputs::metered_volume()
{
    return ask("fuel_consumption", Place::engine(), Asked::volume, [&] {
        const auto id = find_quantity("fuel_consumption");
        const ReadingValues::Entry* found = id ? of_.values.at(*id, Place::engine()) : nullptr;
        if (!found)
            return -1;
        const Value& value = of_.reading.values[found->value_index];
        if (unit(value.unit).dimension != Dimension::volume_flow)
            return -1;
        return add({"fuel_consumption", id, Place::engine(), Input::How::volume, found->value_index,
                    *value.value_si * litres_per_hour, UncertainInput::own, "V", "l/h", {}});
    });
}

Number DerivedInputs::optional_baseline(std::string_view name)
{
    const Number at = load();
    const Number expected = at ? of_.expected(name, *at) : std::nullopt;
    if (watched_ && expected)
        inputs_.push_back({name, find_quantity(name), Place::engine(), Input::How::baseline, 0, *expected,
                           UncertainInput::own, {}, {}, {}});
    return expected;
}

Number DerivedInputs::baseline(std::string_view name)
{
    const Number expected = optional_baseline(name);
    if (!expected && moved_.empty())
        missing_.push_back({name, Place::engine(), true});
    return expected;
}

double DerivedInputs::particular(std::string_view words, std::string_view symbol, double value, std::string_view unit)
{
    if (watched_ && std::none_of(inputs_.begin(), inputs_.end(), [&](const Input& each) { return each.name == words; }))
        inputs_.push_back({words, {}, Place::engine(), Input::How::particular, 0, value, UncertainInput::own, symbol, unit, {}});
    return value;
}

double DerivedInputs::assumed(std::string_view words, std::string_view symbol, double value, std::string_view unit,
                              std::string_view origin)
{
    return *ask(words, Place::engine(), Asked::special, [&] {
        return add({words, {}, Place::engine(), Input::How::assumed, 0, value, UncertainInput::own, symbol, unit, origin});
    });
}

// ------------------------------------------------------------------------------------ uncertainty

std::optional<double> DerivedInputs::half_width(const Input& input) const
{
    using How = Input::How;
    switch (input.how) {
    case How::particular:
    case How::baseline: return 0.0;
    case How::assumed:
    case How::assumed_barometer: return std::nullopt;
    case How::barometer: {
        const auto half = instrument_uncertainty(engine(), quantity(*input.quantity), input.value / bar_of_millibar);
        return half ? std::optional(*half * bar_of_millibar) : std::nullopt;
    }
    case How::volume: {
        // The same share of the volume as of the mass that it becomes.
        const Number mass = of_.values.mean(*input.quantity);
        const auto half = mass ? instrument_uncertainty(engine(), quantity(*input.quantity), *mass) : std::nullopt;
        return half && *mass > 0.0 ? std::optional(*half / *mass * input.value) : std::nullopt;
    }
    case How::typed:
    case How::mean: break;
    }
    return input.quantity ? instrument_uncertainty(engine(), quantity(*input.quantity), input.value) : std::nullopt;
}

std::vector<UncertainInput> DerivedInputs::uncertain_inputs() const
{
    std::vector<UncertainInput> list;
    list.reserve(inputs_.size());
    for (const Input& input : inputs_)
        list.push_back({input.value, half_width(input), input.instrument});
    return list;
}

} // namespace evenstroke
