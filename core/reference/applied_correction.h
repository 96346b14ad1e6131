// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <string_view>

namespace evenstroke {

/// Which correction for ambient air a value has been through. The linear form and ISO 3046-1 answer for the
/// same effect of the same air, so for one value at most one of them is ever applied.
enum class AppliedCorrection : unsigned char {
    none,       ///< as measured
    linear,     ///< the engine's own coefficients per kelvin (linear_correction.h)
    similarity, ///< turbocharger speed, by the root of the inlet temperature
    iso3046,    ///< power and fuel adjustment of ISO 3046-1 (iso_3046.h)
};

/// "linear", "ISO 3046-1": as a page says beside the corrected value.
std::string_view correction_text(AppliedCorrection applied);

/// A value at reference conditions, with the correction that brought it there.
///
/// Corrections take the bare type and give this one, and it turns into no other by itself: correcting a value
/// a second time does not compile.
template <typename Quantity> struct Corrected
{
    Quantity value{};
    AppliedCorrection applied = AppliedCorrection::none;
    bool extrapolated = false; ///< the ambient lay outside the range the correction is good for: show it grey
};

} // namespace evenstroke
