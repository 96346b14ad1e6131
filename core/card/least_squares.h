// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <array>
#include <cmath>
#include <cstddef>
#include <optional>
#include <span>

namespace evenstroke::indicator {

template <std::size_t N> using Row = std::array<double, N>;
template <std::size_t N> using Square = std::array<Row<N>, N>;

/// Weighted linear least squares with up to N unknowns, row by row. Unknowns that no row touches must be given a
/// row of their own (a prior), or they make the system singular.
template <std::size_t N> class LeastSquares
{
public:
    void add(const Row<N>& row, double right)
    {
        for (std::size_t i = 0; i < N; ++i) {
            for (std::size_t j = 0; j <= i; ++j)
                normal_[i][j] += row[i] * row[j];
            right_[i] += row[i] * right;
        }
    }
    /// A belief of its own about one unknown.
    void believe(std::size_t unknown, double value, double spread)
    {
        normal_[unknown][unknown] += 1.0 / (spread * spread);
        right_[unknown] += value / (spread * spread);
    }
    /// Keeps an unknown at 0.
    void hold(std::size_t unknown) { held_[unknown] = true; }

    struct Solution
    {
        Row<N> values{};
        Square<N> covariance{}; ///< inverse of the normal equations; 0 for what is held
    };
    /// Nothing where the rows do not determine the unknowns.
    std::optional<Solution> solve() const;

private:
    Square<N> normal_{};
    Row<N> right_{};
    std::array<bool, N> held_{};
};

template <std::size_t N> std::optional<typename LeastSquares<N>::Solution> LeastSquares<N>::solve() const
{
    // Scaled to a diagonal of ones, then Cholesky: unknowns in degrees, bar and kelvin differ by many orders.
    Row<N> scale{};
    Square<N> lower{};
    for (std::size_t i = 0; i < N; ++i)
        scale[i] = held_[i] || !(normal_[i][i] > 0.0) ? 0.0 : 1.0 / std::sqrt(normal_[i][i]);
    for (std::size_t i = 0; i < N; ++i)
        for (std::size_t j = 0; j <= i; ++j) {
            double sum = i == j ? 1.0 : normal_[i][j] * scale[i] * scale[j];
            for (std::size_t k = 0; k < j; ++k)
                sum -= lower[i][k] * lower[j][k];
            if (i == j && !(sum > 1e-14))
                return std::nullopt;
            lower[i][j] = i == j ? std::sqrt(sum) : sum / lower[j][j];
        }
    Solution solution;
    for (std::size_t column = 0; column <= N; ++column) { // the unit vectors, then the right side
        Row<N> x{};
        for (std::size_t i = 0; i < N; ++i) {
            x[i] = column == N ? right_[i] * scale[i] : (column == i ? 1.0 : 0.0);
            for (std::size_t k = 0; k < i; ++k)
                x[i] -= lower[i][k] * x[k];
            x[i] /= lower[i][i];
        }
        for (std::size_t i = N; i-- > 0;) {
            for (std::size_t k = i + 1; k < N; ++k)
                x[i] -= lower[k][i] * x[k];
            x[i] /= lower[i][i];
        }
        for (std::size_t i = 0; i < N; ++i)
            (column == N ? solution.values[i] : solution.covariance[i][column]) =
                x[i] * scale[i] * (column == N ? 1.0 : scale[column]);
    }
    return solution;
}

/// A parabola laid through samples by least squares: a + b x + c x², x from `center`.
struct Parabola
{
    double center = 0.0, constant = 0.0, linear = 0.0, square = 0.0;
    double at(double x) const
    {
        const double from = x - center;
        return constant + from * (linear + from * square);
    }
};
/// @param x,y at least three samples at different places
std::optional<Parabola> fit_parabola(std::span<const double> x, std::span<const double> y, double center);

} // namespace evenstroke::indicator
