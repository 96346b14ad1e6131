// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/card/least_squares.h"

namespace evenstroke::indicator {

std::optional<Parabola> fit_parabola(std::span<const double> x, std::span<const double> y, double center)
{
    if (x.size() < 3)
        return std::nullopt;
    LeastSquares<3> rows;
    for (std::size_t i = 0; i < x.size(); ++i) {
        const double from = x[i] - center;
        rows.add({1.0, from, from * from}, y[i]);
    }
    const auto solution = rows.solve();
    if (!solution)
        return std::nullopt;
    const auto& [constant, linear, square] = solution->values;
    return Parabola{center, constant, linear, square};
}

} // namespace evenstroke::indicator
