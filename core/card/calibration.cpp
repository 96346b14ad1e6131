// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/card/calibration.h"

#include <algorithm>

namespace evenstroke::indicator {
namespace {

constexpr double model_scatter = 5e-4;   // of ln p: what the balance leaves beside noise (common practice, no source)
constexpr double lowest_pressure = 0.2;  // bar; keeps the logarithm alive while the zero is still wrong
constexpr int most_rounds = 12;

/// What the difference quotients step by.
constexpr Unknowns quotient_step{0.02, 0.02, 0.05, 1.0, 0.002, 2.0, 0.02};
constexpr Unknowns largest_step{1.0, 3.0, 0.5, 1e9, 0.02, 20.0, 0.3};
constexpr Unknowns small_enough{1e-4, 1e-4, 1e-3, 1e9, 1e-5, 0.02, 1e-4};

/// Where the crank gear stands at every sample, with dead centre as of x.
void follow_crank(const Cylinder& cylinder, const CompressionWindow& window, const Unknowns& x, std::vector<CrankMotion>& crank)
{
    crank.clear();
    for (const double angle : window.angle)
        crank.push_back(cylinder.gear.motion((angle - x[offset]) * radians_per_degree));
}

/// f of every sample, without the constant.
void balance_of(const Cylinder& cylinder, const WallLoss& walls, const CompressionWindow& window, const Unknowns& x,
                const std::vector<CrankMotion>& crank, std::vector<double>& f)
{
    const double clearance = cylinder.clearance(cylinder.compression_ratio * (1.0 + x[ratio]));
    const UnfiredBalance balance(cylinder, walls, clearance, trapped_mass(cylinder, window.closing_pressure, x), x[wall_loss]);
    f.resize(window.angle.size());
    double sum = 0.0, before = 0.0;
    for (std::size_t i = 0; i < f.size(); ++i) {
        const double pressure = std::max(window.pressure[i] - zero_at(cylinder, x, window.angle[i] - x[offset]), lowest_pressure);
        const double log_pressure = std::log(pressure);
        const double slope = balance.slope(crank[i], pressure, log_pressure).per_degree;
        if (i > 0)
            sum += 0.5 * (slope + before) * (window.angle[i] - window.angle[i - 1]);
        before = slope;
        f[i] = log_pressure + sum;
    }
}

class Fit
{
public:
    Fit(const Cylinder& cylinder, const WallLoss& walls, const CompressionWindow& window, const Beliefs& beliefs)
        : cylinder_(cylinder), walls_(walls), window_(window), beliefs_(beliefs)
    {
    }
    std::optional<Calibration> run(const Unknowns& start);

private:
    bool free(std::size_t unknown) const { return !beliefs_[unknown].held; }
    bool counts(std::size_t unknown) const { return free(unknown) || beliefs_[unknown].spread.value_or(0.0) > 0.0; }
    void find_balance(const Unknowns& x);
    void find_slopes(const Unknowns& x, bool held_too);
    void find_weights(const Unknowns& x);
    std::optional<LeastSquares<unknown_count>::Solution> solve(const Unknowns& x) const;
    void widen_and_carry(Calibration& found) const;

    const Cylinder& cylinder_;
    const WallLoss& walls_;
    const CompressionWindow& window_;
    const Beliefs& beliefs_;
    std::vector<CrankMotion> crank_, moved_crank_;
    std::vector<double> f_, moved_, weight_;
    std::array<std::vector<double>, unknown_count> slope_; // of f, by unknown
};

void Fit::find_balance(const Unknowns& x)
{
    follow_crank(cylinder_, window_, x, crank_);
    balance_of(cylinder_, walls_, window_, x, crank_, f_);
}

void Fit::find_slopes(const Unknowns& x, bool held_too)
{
    for (std::size_t unknown = 0; unknown < unknown_count; ++unknown) {
        if (unknown == level || !(held_too ? counts(unknown) : free(unknown)))
            continue;
        Unknowns beside = x;
        beside[unknown] += quotient_step[unknown];
        if (unknown == offset)
            follow_crank(cylinder_, window_, beside, moved_crank_);
        balance_of(cylinder_, walls_, window_, beside, unknown == offset ? moved_crank_ : crank_, moved_);
        slope_[unknown].resize(f_.size());
        for (std::size_t i = 0; i < f_.size(); ++i)
            slope_[unknown][i] = (moved_[i] - f_[i]) / quotient_step[unknown];
    }
    slope_[level].assign(f_.size(), -1.0);
}

void Fit::find_weights(const Unknowns& x)
{
    weight_.resize(f_.size());
    for (std::size_t i = 0; i < weight_.size(); ++i) {
        const double pressure =
            std::max(window_.pressure[i] - zero_at(cylinder_, x, window_.angle[i] - x[offset]), lowest_pressure);
        const double share = window_.noise / pressure;
        weight_[i] = 1.0 / std::sqrt(share * share + model_scatter * model_scatter);
    }
}

std::optional<LeastSquares<unknown_count>::Solution> Fit::solve(const Unknowns& x) const
{
    LeastSquares<unknown_count> rows;
    for (std::size_t i = 0; i < f_.size(); ++i) {
        Row<unknown_count> row{};
        for (std::size_t unknown = 0; unknown < unknown_count; ++unknown)
            if (free(unknown))
                row[unknown] = weight_[i] * slope_[unknown][i];
        rows.add(row, -weight_[i] * (f_[i] - x[level]));
    }
    for (std::size_t unknown = 0; unknown < unknown_count; ++unknown) {
        if (!free(unknown))
            rows.hold(unknown);
        else if (beliefs_[unknown].spread)
            rows.believe(unknown, beliefs_[unknown].mean - x[unknown], *beliefs_[unknown].spread);
    }
    return rows.solve();
}

/// Where the samples scatter more than noise and model say, or the beliefs are strained, the samples say less of the
/// unknowns. The spread of what is held moves what is free: δ free = -C Aᵀ W slope δ held.
void Fit::widen_and_carry(Calibration& found) const
{
    constexpr double usual_strain = 3.0;
    const UnknownCovariance own = found.covariance;
    const double widen = std::max({1.0, found.misfit * found.misfit, found.strain / usual_strain});
    found.widened = widen;
    for (auto& row : found.covariance)
        for (double& entry : row)
            entry *= widen;
    for (std::size_t held = 0; held < unknown_count; ++held) {
        if (free(held) || !counts(held))
            continue;
        Unknowns pull{}, moves{};
        for (std::size_t unknown = 0; unknown < unknown_count; ++unknown)
            if (free(unknown))
                for (std::size_t i = 0; i < f_.size(); ++i)
                    pull[unknown] -= weight_[i] * weight_[i] * slope_[unknown][i] * slope_[held][i];
        for (std::size_t i = 0; i < unknown_count; ++i)
            for (std::size_t j = 0; j < unknown_count; ++j)
                moves[i] += own[i][j] * pull[j];
        moves[held] = 1.0;
        const double variance = *beliefs_[held].spread * *beliefs_[held].spread;
        for (std::size_t i = 0; i < unknown_count; ++i)
            for (std::size_t j = 0; j < unknown_count; ++j)
                found.covariance[i][j] += variance * moves[i] * moves[j];
    }
}

std::optional<Calibration> Fit::run(const Unknowns& start)
{
    Calibration found;
    found.values = start;
    for (std::size_t unknown = 0; unknown < unknown_count; ++unknown)
        if (!free(unknown))
            found.values[unknown] = beliefs_[unknown].mean;
    for (int round = 0; round < most_rounds && !found.converged; ++round) {
        find_balance(found.values);
        if (round == 0) {
            found.values[level] = 0.0;
            for (const double f : f_)
                found.values[level] += f / static_cast<double>(f_.size());
        }
        find_weights(found.values);
        find_slopes(found.values, false);
        const auto step = solve(found.values);
        if (!step)
            return std::nullopt;
        found.converged = true;
        for (std::size_t unknown = 0; unknown < unknown_count; ++unknown) {
            const double move = std::clamp(step->values[unknown], -largest_step[unknown], largest_step[unknown]);
            found.values[unknown] += move;
            found.converged = found.converged && std::abs(move) < small_enough[unknown];
        }
        found.covariance = step->covariance;
    }
    find_balance(found.values);
    double squares = 0.0;
    for (std::size_t i = 0; i < f_.size(); ++i) {
        const double residual = weight_[i] * (f_[i] - found.values[level]);
        squares += residual * residual;
    }
    found.misfit = std::sqrt(squares / static_cast<double>(f_.size()));
    for (std::size_t unknown = 0; unknown < unknown_count; ++unknown)
        if (free(unknown) && beliefs_[unknown].spread) {
            const double away = (found.values[unknown] - beliefs_[unknown].mean) / *beliefs_[unknown].spread;
            found.strain += away * away;
        }
    find_slopes(found.values, true);
    widen_and_carry(found);
    return found;
}

} // namespace

double trapped_mass(const Cylinder& cylinder, const Parabola& closing_pressure, const Unknowns& x)
{
    constexpr double after = 4.0, exponent = 1.37;
    const double clearance = cylinder.clearance(cylinder.compression_ratio * (1.0 + x[ratio]));
    const double there = cylinder.closes + after;
    const double pressure =
        std::max(closing_pressure.at(there + x[offset]) - zero_at(cylinder, x, there), lowest_pressure);
    const double volume = cylinder.gear.volume(there * radians_per_degree, clearance);
    const double closed = cylinder.gear.volume(cylinder.closes * radians_per_degree, clearance);
    return pressure * 1e5 * closed * std::pow(volume / closed, exponent) /
           (WorkingGas(cylinder.residual_share).gas_constant() * x[closing]);
}

std::optional<Calibration> calibrate(const Cylinder& cylinder, const WallLoss& walls, const CompressionWindow& window,
                                     const Beliefs& beliefs, const Unknowns& start)
{
    constexpr std::size_t fewest = 20;
    if (window.angle.size() < fewest)
        return std::nullopt;
    return Fit(cylinder, walls, window, beliefs).run(start);
}

std::vector<double> carry_line(const Cylinder& cylinder, const WallLoss& walls, const Unknowns& x,
                               const Parabola& closing_pressure, double from_angle, double from_log_pressure,
                               std::span<const double> true_angle)
{
    constexpr double longest_step = 0.25; // degrees; the midpoint rule leaves 1e-6 of p
    const double clearance = cylinder.clearance(cylinder.compression_ratio * (1.0 + x[ratio]));
    const UnfiredBalance balance(cylinder, walls, clearance, trapped_mass(cylinder, closing_pressure, x), x[wall_loss]);
    std::vector<double> line;
    line.reserve(true_angle.size());
    double angle = from_angle, log_pressure = from_log_pressure;
    for (const double target : true_angle) {
        const int steps = std::max(1, static_cast<int>(std::ceil(std::abs(target - angle) / longest_step - 1e-9)));
        const double step = (target - angle) / steps;
        for (int i = 0; i < steps; ++i) {
            const double first = balance.slope(angle, std::exp(log_pressure), log_pressure).per_degree;
            const double middle = log_pressure - 0.5 * step * first;
            log_pressure -= step * balance.slope(angle + 0.5 * step, std::exp(middle), middle).per_degree;
            angle += step;
        }
        angle = target;
        line.push_back(log_pressure);
    }
    return line;
}

LineEnd line_end(const Cylinder& cylinder, const WallLoss& walls, const CompressionWindow& window, const Unknowns& x)
{
    std::vector<CrankMotion> crank;
    follow_crank(cylinder, window, x, crank);
    std::vector<double> f;
    balance_of(cylinder, walls, window, x, crank, f);
    const double last = window.angle.back() - x[offset];
    const double pressure = std::max(window.pressure.back() - zero_at(cylinder, x, last), lowest_pressure);
    // f = ln p + integral and f = level on the line: the integral up to the end is f - ln p.
    return {last, x[level] - (f.back() - std::log(pressure))};
}

} // namespace evenstroke::indicator
