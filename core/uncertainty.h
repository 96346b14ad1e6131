// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <functional>
#include <optional>
#include <span>
#include <vector>

/// How the half-widths of instruments become that of a computed number.
namespace evenstroke {

/// A read number and its half-width at 95 %.
struct UncertainInput
{
    double value = 0.0;
    std::optional<double> half_width; ///< empty: not stated
    int instrument = own;             ///< inputs of one instrument share its number, and its one unknown slip
    static constexpr int own = -1;
};

/// The formula in plain numbers, in the order of the inputs; nothing where the result is not known.
using Formula = std::function<std::optional<double>(std::span<const double>)>;

struct Propagated
{
    double value = 0.0;
    std::optional<double> half_width; ///< empty where an input that counts states none
    std::vector<double> parts;        ///< what each input alone moves the result by, with its sign; 0 where unknown
};

/// Linear propagation: U² = Σ (∂f/∂x U_x)², inputs of one instrument added with their signs first.
///
/// The derivatives are central differences over a thousandth of the half-width through the formula itself
/// (over a millionth of the number where no half-width is stated, only to see whether the input counts).
/// @return nothing where the formula knows no value at the inputs
/// @par Source JCGM 100:2008, 5.1.2 and 5.2.2; half-widths in place of standard uncertainties, all with one
///      coverage factor
/// @par Validity results that are near to straight lines over the half-widths
std::optional<Propagated> propagate(std::span<const UncertainInput> inputs, const Formula& formula);

/// Share of each input in the squared half-width, 0 to 1 in sum: slips of one instrument are added before they are
/// squared, and each of its inputs has its part of the sum. Nothing where the half-width is not known, or 0.
/// @param instruments of the inputs, in the order of the parts
std::vector<std::optional<double>> budget_shares(const Propagated& solved, std::span<const int> instruments);

} // namespace evenstroke
