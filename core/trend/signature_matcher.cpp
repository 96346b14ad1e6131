// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/trend/scan.h"

#include <algorithm>
#include <cmath>

namespace evenstroke::drift {

namespace {

/// Inverse of a small symmetric positive definite matrix, Gauss-Jordan. A catalogue whose correlations do
/// not fit together gives the unit matrix: then every quantity stands for itself.
std::vector<double> inverse(std::vector<double> matrix, std::size_t n)
{
    std::vector<double> unit(n * n, 0.0);
    for (std::size_t i = 0; i < n; ++i)
        unit[i * n + i] = 1.0;
    std::vector<double> result = unit;
    for (std::size_t column = 0; column < n; ++column) {
        const double pivot = matrix[column * n + column];
        if (!(pivot > 1e-6))
            return unit;
        for (std::size_t k = 0; k < n; ++k) {
            matrix[column * n + k] /= pivot;
            result[column * n + k] /= pivot;
        }
        for (std::size_t row = 0; row < n; ++row) {
            const double factor = row == column ? 0.0 : matrix[row * n + column];
            for (std::size_t k = 0; k < n && factor != 0.0; ++k) {
                matrix[row * n + k] -= factor * matrix[column * n + k];
                result[row * n + k] -= factor * result[column * n + k];
            }
        }
    }
    return result;
}

} // namespace

SignatureMatcher::SignatureMatcher(std::span<const std::string> quantities)
{
    const std::size_t n = quantities.size();
    std::vector<double> correlation(n * n);
    for (std::size_t k = 0; k < n; ++k)
        for (std::size_t l = 0; l < n; ++l)
            correlation[k * n + l] = noise_correlation(quantities[k], quantities[l]);
    const std::vector<double> inverted = inverse(correlation, n);
    for (std::size_t k = 0; k < n; ++k)
        for (std::size_t l = 0; l <= k; ++l)
            if (inverted[k * n + l] != 0.0)
                inverse_terms_.push_back({k, l, (k == l ? 1.0 : 2.0) * inverted[k * n + l]});
    for (const Signature& signature : signature_catalogue()) {
        if (signature.subject != Subject::cylinder)
            continue;
        Prepared prepared = prepare(signature, quantities, inverted);
        if (prepared.named.size() >= 2)
            signatures_.push_back(std::move(prepared));
    }
}

SignatureMatcher::Prepared SignatureMatcher::prepare(const Signature& signature,
                                                     std::span<const std::string> quantities,
                                                     const std::vector<double>& inverse) const
{
    const std::size_t n = quantities.size();
    Prepared prepared{&signature, {}, {}, {}, 2.0 * std::log(signature.weight), 0.0};
    std::vector<double> weight(n, 0.0);
    for (const Signature::Move& move : signature.moves) {
        const auto found = std::find(quantities.begin(), quantities.end(), move.quantity);
        if (found == quantities.end())
            continue;
        const std::size_t named = static_cast<std::size_t>(found - quantities.begin());
        prepared.named.push_back(named);
        for (std::size_t k = 0; k < n; ++k)
            weight[k] += inverse[k * n + named] * move.amount;
    }
    for (std::size_t k = 0; k < n; ++k) {
        if (weight[k] == 0.0)
            continue;
        prepared.weights.emplace_back(k, weight[k]);
        for (std::size_t l = 0; l <= k; ++l)
            if (const double term = (k == l ? 1.0 : 2.0) * weight[k] *
                                    noise_correlation(quantities[k], quantities[l]) * weight[l];
                term != 0.0)
                prepared.variance.push_back({k, l, term});
    }
    double variance = 0.0;
    for (const Term& term : prepared.variance)
        variance += term.weight;
    prepared.alike_deviation = std::sqrt(std::max(variance, 0.0));
    return prepared;
}

FitRow::FitRow(std::span<const FitEntry> fits) : entries(fits)
{
    for (const FitEntry& entry : fits)
        alike = alike && entry.taken && entry.root == fits.front().root;
}

double SignatureMatcher::strength(std::size_t index, const FitRow& fits, double worth_more) const
{
    const Prepared& signature = signatures_[index];
    if (fits.alike) { // the root is in the sum and in its deviation
        double sum = 0.0;
        for (const auto& [k, weight] : signature.weights)
            sum += weight * fits.entries[k].strength;
        if (signature.weights.size() < 2 || sum <= 0.0 || !(signature.alike_deviation > 0.0))
            return 0.0;
        return sum / signature.alike_deviation;
    }
    double sum = 0.0, variance = 0.0;
    std::size_t taking_part = 0;
    for (const auto& [k, weight] : signature.weights) {
        taking_part += fits.entries[k].taken ? 1 : 0;
        sum += weight * fits.entries[k].root * fits.entries[k].strength;
    }
    if (taking_part < 2 || sum <= 0.0)
        return 0.0;
    for (const Term& term : signature.variance)
        variance += term.weight * fits.entries[term.row].root * fits.entries[term.column].root;
    constexpr double rounding = 1e-9; // a bound that is met to the last digits is left to the caller
    if (!(variance > 0.0) || sum * sum < (1.0 - rounding) * worth_more * variance)
        return 0.0;
    return sum / std::sqrt(variance);
}

double SignatureMatcher::any_change(const FitRow& fits) const
{
    double sum = 0.0;
    for (const Term& term : inverse_terms_)
        sum += term.weight * fits.entries[term.row].strength * fits.entries[term.column].strength;
    return sum;
}

} // namespace evenstroke::drift
