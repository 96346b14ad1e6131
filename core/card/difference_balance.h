// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/card/true_curve.h"

#include <vector>

/// How uncertain the difference of one cylinder's cards is, where the cards are partly off alike.
namespace evenstroke::indicator {

/// A card's part in the difference: 1 for the card in hand, minus its share for a healthy one.
struct DifferenceMember
{
    DifferenceMember(const Evaluation& evaluated, double weighs);

    const Evaluation* card;
    TrueCurve curve;
    double weight;
    double charge_ratio = 1.0; ///< scavenge pressure of the card in hand over this card's
    double fuel_ratio = 1.0;   ///< by which what combustion adds is taken to have grown
    double cycle_scatter = 0.0; ///< of what combustion adds to the mean cycle, relative, one standard deviation
    UnknownCovariance own{};    ///< of the unknowns, without what all cards of the cylinder share
    std::array<Unknowns, 2> shared{}; ///< what one standard deviation of ratio and film formula moves the unknowns by

    /// bar abs: this card's pressure brought to the charge pressure and load of the card in hand.
    double brought(double true_angle) const;
    /// bar: what combustion adds, brought likewise. 0 while the cylinder is open or without a line.
    double combustion(double true_angle) const;
    /// What the unknowns move the pressure by.
    Unknowns pressure_slopes(double true_angle) const;
};

/// Variance of Σ weight · slopes · unknowns.
/// @param slopes one a member
double shared_variance(const std::vector<DifferenceMember>& members, const std::vector<Unknowns>& slopes);

inline constexpr double heated_spread = 0.08; ///< bar by which the flame moves the zero (as results.cpp)

} // namespace evenstroke::indicator
