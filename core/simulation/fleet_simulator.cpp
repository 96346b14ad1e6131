// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/simulation/fleet_simulator.h"

#include "core/simulation/fleet_noise.h"
#include "core/simulation/fleet_tables.h"

#include "core/trend/drift_catalogue.h"

#include <algorithm>
#include <array>
#include <cmath>
#include <cstdio>
#include <numbers>
#include <random>

namespace evenstroke::simulation {

namespace {

std::string text_of(double number, int decimals)
{
    std::array<char, 64> buffer{};
    std::snprintf(buffer.data(), buffer.size(), "%.*f", decimals, number);
    return buffer.data();
}

/// Writes a number into a cell as it would be typed, and the deviation that follows from what was typed.
void type_in(drift::Cell& cell, const std::string& text)
{
    const double number = std::strtod(text.c_str(), nullptr);
    cell.deviation += cell.scale * (number - cell.typed_number);
    cell.typed_number = number;
    cell.typed_text = text;
}

class Simulator
{
public:
    Simulator(const Recipe& recipe, std::uint64_t seed) : recipe_(recipe), dice_(seed) {}

    SimulatedEngine run()
    {
        engine_.fault = recipe_.fault;
        input().cylinders =
            recipe_.fewest_cylinders + dice_.below(recipe_.most_cylinders - recipe_.fewest_cylinders + 1);
        make_dates();
        choose_fault();
        make_work();
        for (const auto& channel : drift::channel_catalogue()) {
            if (channel.subject == drift::Subject::cylinder && wanted(channel, recipe_.cylinder_quantities))
                add_channel(channel);
            if (channel.subject == drift::Subject::engine && wanted(channel, recipe_.engine_quantities))
                add_engine_channel(channel);
        }
        fill_cylinders();
        for (drift::EngineChannel& channel : input().engine_channels)
            fill_engine(channel);
        if (recipe_.typing_errors > 0.0)
            for (std::size_t i = 0; i < readings(); ++i)
                make_typing_errors(i);
        return std::move(engine_);
    }

private:
    drift::Input& input() { return engine_.input; }
    std::size_t readings() const { return recipe_.readings; }
    std::size_t cylinders() { return input().cylinders; }

    static bool wanted(const drift::CatalogueChannel& channel, const std::vector<std::string>& chosen)
    {
        return chosen.empty() ? channel.counted
                              : std::find(chosen.begin(), chosen.end(), channel.quantity) != chosen.end();
    }

    void make_dates()
    {
        double month = 0.0;
        while (input().months.size() < readings()) {
            const double gap = recipe_.months_between_readings * dice_.uniform(0.5, 1.5);
            month += gap;
            if (!dice_.chance(0.06)) { // otherwise nobody took the reading
                input().months.push_back(month);
                input().load_percent.push_back(std::clamp(75.0 + 10.0 * dice_.normal(), 45.0, 95.0));
            }
        }
        spread_.assign(readings(), 1.0);
        for (std::size_t i = 0; i < readings(); ++i)
            if (dice_.chance(recipe_.unsteady_share)) {
                spread_[i] = dice_.uniform(1.8, 3.6);
                engine_.unsteady.push_back(i);
            }
    }

    void choose_fault()
    {
        if (recipe_.fault == Fault::none)
            return;
        engine_.onset = 16 + dice_.below(std::max<std::size_t>(readings() / 2, 18) - 14);
        if (!is_of_engine(recipe_.fault))
            engine_.cylinder = dice_.below(cylinders());
        for (const Effect& effect : effects) {
            const double spread = std::exp(recipe_.size_spread * dice_.normal());
            size_.push_back(effect.amount * (is_of_sensor(effect.fault) ? 1.0 : spread));
            if (effect.fault == recipe_.fault)
                engine_.growth[effect.quantity] = size_.back();
        }
    }

    double fault_effect(const std::string& quantity, std::size_t reading)
    {
        if (recipe_.fault == Fault::none || reading < engine_.onset)
            return 0.0;
        const double months = input().months[reading] - input().months[engine_.onset - 1];
        double sum = 0.0;
        for (std::size_t e = 0; e < std::size(effects); ++e)
            if (effects[e].fault == recipe_.fault && quantity == effects[e].quantity)
                sum += size_[e] * (is_step(recipe_.fault) ? 1.0 : months);
        return sum;
    }

    void make_work()
    {
        work_.assign(readings() * cylinders(), 0);
        input().cylinder_work.assign(readings() * cylinders(), 0);
        for (std::size_t j = 0; j < cylinders(); ++j) {
            const double mean = recipe_.months_between_work;
            double next = dice_.uniform(0.0, mean);
            for (std::size_t i = 1; i < readings(); ++i) {
                if (input().months[i] < next)
                    continue;
                next = input().months[i] + dice_.uniform(0.4 * mean, 1.6 * mean);
                // Work on the faulty cylinder would end the fault, or hide its beginning in the new level.
                if (engine_.cylinder == j && i + recipe_.readings_since_work > engine_.onset)
                    continue;
                work_[i * cylinders() + j] = 1;
                if (dice_.chance(recipe_.unrecorded_share))
                    engine_.unrecorded.push_back({j, i});
                else
                    input().cylinder_work[i * cylinders() + j] = 1;
            }
        }
    }

    void add_channel(const drift::CatalogueChannel& known)
    {
        drift::Channel channel;
        channel.quantity = known.quantity;
        channel.noise = known.noise;
        channel.offset_spread = known.offset_spread;
        const Look& look = look_of(known.quantity);
        for (std::size_t i = 0; i < readings(); ++i)
            channel.expected_typed.push_back(look.at_no_load + look.per_percent * *input().load_percent[i]);
        channel.cells.resize(readings() * cylinders());
        input().channels.push_back(std::move(channel));
    }

    void add_engine_channel(const drift::CatalogueChannel& known)
    {
        drift::EngineChannel channel;
        channel.quantity = known.quantity;
        channel.typed_quantity = known.typed_quantity;
        channel.noise = known.noise;
        channel.cells.resize(readings());
        input().engine_channels.push_back(std::move(channel));
    }

    static double noise_of(const std::string& quantity, double usual, const std::map<std::string, double>& own)
    {
        const auto found = own.find(quantity);
        return found == own.end() ? usual : found->second;
    }

    /// The season that the correction leaves over: small, of the quantity's own phase.
    std::vector<double> season(double amplitude)
    {
        const double phase = dice_.uniform(0.0, 2.0 * std::numbers::pi);
        std::vector<double> values;
        for (const double month : input().months)
            values.push_back(amplitude * std::cos(2.0 * std::numbers::pi * month / 12.0 + phase));
        return values;
    }

    double gap_before(std::size_t reading)
    {
        return reading == 0 ? 1.0 : input().months[reading] - input().months[reading - 1];
    }

    void fill_cylinders()
    {
        const std::size_t quantities = input().channels.size();
        std::vector<NoiseSource> noise(quantities * cylinders()), common(quantities);
        std::vector<double> offset(quantities * cylinders());
        std::vector<std::vector<double>> seasons;
        for (const drift::Channel& channel : input().channels)
            seasons.push_back(season(0.3 * look_of(channel.quantity).common));
        for (std::size_t i = 0; i < readings(); ++i) {
            std::vector<double> shared(quantities);
            for (std::size_t k = 0; k < quantities; ++k) {
                const Look& look = look_of(input().channels[k].quantity);
                shared[k] =
                    seasons[k][i] + look.common * common[k].next(dice_, gap_before(i), dice_.normal(), 1.0);
            }
            for (std::size_t j = 0; j < cylinders(); ++j) {
                const std::vector<double> white = white_noise();
                for (std::size_t k = 0; k < quantities; ++k) {
                    drift::Channel& channel = input().channels[k];
                    const double factor = is_coolant(channel.quantity) ? recipe_.coolant_factor : 1.0;
                    double& own = offset[k * cylinders() + j];
                    if (i == 0)
                        own = factor * channel.offset_spread * dice_.normal();
                    else if (work_[i * cylinders() + j])
                        own = 0.4 * own +
                              std::sqrt(1.0 - 0.16) * factor * channel.offset_spread * dice_.normal();
                    const double random =
                        noise[k * cylinders() + j].next(dice_, gap_before(i), white[k], spread_[i]);
                    double deviation =
                        shared[k] + own + recipe_.noise_factor * factor * noise_of(channel.quantity, channel.noise, recipe_.cylinder_noise) * random;
                    if (is_of_engine(recipe_.fault) || engine_.cylinder == j)
                        deviation += fault_effect(channel.quantity, i);
                    write(channel.cells[i * cylinders() + j], channel.quantity, *channel.expected_typed[i],
                          deviation);
                }
            }
        }
    }

    /// One cylinder's new noise at one reading, with the correlations of the catalogue.
    std::vector<double> white_noise()
    {
        const auto& channels = input().channels;
        if (factor_.empty())
            factor_ = correlation_factor();
        const std::size_t n = channels.size();
        std::vector<double> independent(n), white(n, 0.0);
        for (double& value : independent)
            value = dice_.normal();
        for (std::size_t k = 0; k < n; ++k)
            for (std::size_t l = 0; l <= k; ++l)
                white[k] += factor_[k * n + l] * independent[l];
        return white;
    }

    std::vector<double> correlation_factor()
    {
        const auto& channels = input().channels;
        const std::size_t n = channels.size();
        std::vector<double> factor(n * n, 0.0);
        for (std::size_t k = 0; k < n; ++k)
            for (std::size_t l = 0; l <= k; ++l) {
                double sum = drift::noise_correlation(channels[k].quantity, channels[l].quantity);
                for (std::size_t m = 0; m < l; ++m)
                    sum -= factor[k * n + m] * factor[l * n + m];
                factor[k * n + l] = k == l ? std::sqrt(sum) : sum / factor[l * n + l];
            }
        return factor;
    }

    void fill_engine(drift::EngineChannel& channel)
    {
        NoiseSource noise;
        const std::vector<double> seasonal = season(0.3 * channel.noise);
        const Look& look = look_of(channel.quantity);
        for (std::size_t i = 0; i < readings(); ++i) {
            const double random = noise.next(dice_, gap_before(i), dice_.normal(), 0.5 * (1.0 + spread_[i]));
            double deviation = seasonal[i] + recipe_.noise_factor * noise_of(channel.quantity, channel.noise, recipe_.engine_noise) * random;
            if (is_of_engine(recipe_.fault))
                deviation += fault_effect(channel.quantity, i);
            const double expected = look.at_no_load + look.per_percent * *input().load_percent[i];
            write(channel.cells[i], channel.quantity, expected, deviation);
        }
    }

    void write(drift::Cell& cell, const std::string& quantity, double expected, double deviation)
    {
        if (dice_.chance(0.02))
            return; // not read
        const drift::CatalogueChannel* known = drift::find_channel(quantity, drift::Subject::cylinder);
        if (!known)
            known = drift::find_channel(quantity, drift::Subject::engine);
        cell.present = true;
        cell.scale = known->form == drift::DeviationForm::percent ? 100.0 / expected : 1.0;
        cell.typed_number = expected;
        const bool coarse = recipe_.integer_thermometers && is_coolant(quantity);
        type_in(cell, text_of(expected + deviation / cell.scale, coarse ? 0 : look_of(quantity).decimals));
    }

    void make_typing_errors(std::size_t reading)
    {
        const double rate = recipe_.typing_errors;
        if (dice_.chance(0.015 * rate))
            slip(reading, drift::Verdict::decimal_slip);
        if (dice_.chance(0.026 * rate))
            slip(reading, drift::Verdict::digits_swapped);
        if (dice_.chance(0.008 * rate))
            row_in_other_unit(reading);
        if (dice_.chance(0.02 * rate))
            exchange_cylinders(reading);
    }

    void slip(std::size_t reading, drift::Verdict kind)
    {
        const bool of_engine = dice_.chance(0.1) && !input().engine_channels.empty();
        const std::size_t k =
            dice_.below(of_engine ? input().engine_channels.size() : input().channels.size());
        const std::size_t j = dice_.below(cylinders());
        if (!of_engine && input().channels.empty())
            return;
        drift::Cell& cell = of_engine ? input().engine_channels[k].cells[reading]
                                      : input().channels[k].cells[reading * cylinders() + j];
        if (!cell.present)
            return;
        const double before = cell.deviation;
        std::string text = cell.typed_text;
        if (kind == drift::Verdict::decimal_slip) {
            const std::string& quantity =
                of_engine ? input().engine_channels[k].quantity : input().channels[k].quantity;
            text = text_of(cell.typed_number * (dice_.chance(0.5) ? 10.0 : 0.1), look_of(quantity).decimals);
        } else {
            const std::size_t at = dice_.below(text.size() - 1);
            std::size_t next = text[at + 1] == '.' ? at + 2 : at + 1;
            if (text[at] == '.' || text[at] == '-' || next >= text.size() || text[at] == text[next])
                return;
            std::swap(text[at], text[next]);
        }
        type_in(cell,
                text_of(std::strtod(text.c_str(), nullptr),
                        static_cast<int>(
                            text.find('.') == std::string::npos ? 0 : text.size() - text.find('.') - 1)));
        const double noise = of_engine ? input().engine_channels[k].noise : input().channels[k].noise;
        const std::string quantity =
            of_engine ? input().engine_channels[k].typed_quantity : input().channels[k].quantity;
        engine_.errors.push_back({kind, reading, quantity,
                                  of_engine ? std::vector<std::size_t>{} : std::vector<std::size_t>{j},
                                  std::abs(cell.deviation - before) / noise});
    }

    void row_in_other_unit(std::size_t reading)
    {
        std::vector<drift::Channel*> pressures;
        for (drift::Channel& channel : input().channels)
            if (channel.quantity == "maximum_pressure" || channel.quantity == "compression_pressure")
                pressures.push_back(&channel);
        if (pressures.empty())
            return;
        drift::Channel& channel = *pressures[dice_.below(pressures.size())];
        for (std::size_t j = 0; j < cylinders(); ++j)
            if (drift::Cell& cell = channel.cells[reading * cylinders() + j]; cell.present)
                type_in(cell, text_of(cell.typed_number / 10.0, 2)); // MPa
        engine_.errors.push_back({drift::Verdict::unit_slip, reading, channel.quantity, {}, 0.0});
    }

    void exchange_cylinders(std::size_t reading)
    {
        const std::size_t p = dice_.below(cylinders());
        const std::size_t q = (p + 1 + dice_.below(cylinders() - 1)) % cylinders();
        for (drift::Channel& channel : input().channels)
            std::swap(channel.cells[reading * cylinders() + p], channel.cells[reading * cylinders() + q]);
        engine_.errors.push_back({drift::Verdict::cylinders_swapped, reading, "", {p, q}, 0.0});
    }

    Recipe recipe_;
    Dice dice_;
    SimulatedEngine engine_;
    std::vector<double> spread_, size_, factor_;
    std::vector<char> work_;
};

} // namespace

const char* fault_name(Fault fault)
{
    constexpr const char* names[] = {"none",
                                     "slow ring wear",
                                     "fast ring wear",
                                     "fuel pump wear",
                                     "fuel nozzle",
                                     "exhaust valve",
                                     "exhaust sensor drift",
                                     "jacket sensor step",
                                     "turbocharger fouling",
                                     "air cooler fouling"};
    return names[static_cast<std::size_t>(fault)];
}

SimulatedEngine simulate_engine(const Recipe& recipe, std::uint64_t seed)
{
    return Simulator(recipe, seed).run();
}

} // namespace evenstroke::simulation
