// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/trend/drift.h"
#include "core/trend/scan.h"

#include <array>
#include <cstddef>
#include <optional>
#include <string>
#include <vector>

namespace evenstroke::drift {

/// One engine-level quantity over time. No other cylinder can be subtracted here, so its level, the load and
/// the season are taken out of values and shapes by least squares instead.
class EngineSeries
{
public:
    EngineSeries(std::string quantity, bool is_median, double noise, bool in_scan);

    /// A new segment begins at the next reading that is added.
    void open_segment();
    /// @param value nothing where it was not read, is doubtful, or the reading takes no part
    void add(double month, double load_percent, std::optional<double> value);
    /// Readies `fit` and `residual` for the values so far.
    void prepare();

    /// Nothing with fewer than 8 values before or 3 after the onset, or without a value at the last reading.
    std::optional<Fit> fit(std::size_t onset, Shape shape) const;
    /// A value without level, load and season.
    std::optional<double> residual(std::size_t reading) const;

    const std::string& quantity() const { return quantity_; }
    bool is_median() const { return median_; }
    bool in_scan() const { return in_scan_; }
    double noise() const { return noise_; }
    std::size_t first() const { return first_; } ///< reading of the segment's start
    std::size_t usable() const;                  ///< values in the segment
    std::optional<double> clipped(std::size_t reading) const { return values_[reading]; }

private:
    static constexpr std::size_t columns = 4; ///< 1, load, cosine and sine of the year
    using PerColumn = std::array<double, columns>;
    struct Sums
    {
        PerColumn column{}, column_time{}, column_value{};
        double time_squared = 0.0, value_time = 0.0;
    };
    using Products = std::array<PerColumn, columns>;
    void add_sorted(double difference);
    void learn_noise(double value);
    double clip(double value) const;
    std::size_t columns_that_count() const;
    PerColumn columns_at(std::size_t reading) const;
    PerColumn reduce(PerColumn moments) const;
    Sums between(std::size_t first, std::size_t last) const;

    std::string quantity_;
    bool median_, in_scan_;
    double prior_, noise_;
    std::size_t first_ = 0;
    std::vector<double> months_, loads_;
    std::vector<double> differences_;           ///< between readings, ascending
    std::vector<std::optional<double>> values_; ///< clipped
    std::optional<double> last_unclipped_;
    std::vector<Sums> cumulated_{Sums{}}; ///< [i]: over the readings before i
    Products products_{};                 ///< of the columns, over the segment
    // Set by prepare():
    Sums segment_;
    /// Cholesky factor of the columns' products, with one over the diagonal on it; an empty row: left out.
    Products triangle_{};
    PerColumn reduced_values_{};
};

} // namespace evenstroke::drift
