// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/explanation/fault_matching.h"
#include "core/trend/judgement.h"

#include <optional>
#include <set>
#include <vector>

/// The values of one cylinder, or of the engine as a whole, laid out so that a change in them can be sought.
namespace evenstroke {

/// One fault quantity over time, in the unit of its deviation; only the differences over time mean anything.
struct QuantitySeries
{
    std::vector<std::optional<double>> values; ///< one a reading; nothing where not read, doubted or not steady
    double noise = 1.0;       ///< one sigma of a value: the engine's own scatter once it is known
    std::size_t start = 0;    ///< first reading of the stretch since the last recorded work
    bool gauge_of_engine = false; ///< of a cylinder's series: evidence for or against, but never a reason to claim
};

struct SubjectSeries
{
    Place subject;
    std::vector<double> months;
    std::vector<QuantitySeries> quantities; ///< one a fault quantity
};

/// Gathers the series of every cylinder, then of the engine, from a judgement.
class SeriesMaker
{
public:
    explicit SeriesMaker(const Judgement& judgement);
    SubjectSeries cylinder(int number) const;
    /// @param left_out cylinders that have a fault of their own: the middle of the others stands for all
    SubjectSeries engine(const std::set<int>& left_out) const;

    /// Whether a doubted value is believed after all, since others of its cylinder moved with it.
    bool trusts(const Doubt& doubt) const
    {
        return doubt.place && doubt.place->kind == Place::Kind::cylinder && trusted_all_.count(doubt.place->number) != 0;
    }

private:
    struct Row ///< one fault quantity, [place][reading]
    {
        std::vector<std::vector<std::optional<double>>> cylinders; ///< apart
        std::vector<std::vector<std::optional<double>>> whole; ///< of each cylinder, what all share still in it
        std::vector<std::optional<double>> engine;
        std::vector<std::vector<std::size_t>> cylinder_starts; ///< of every stretch, the first of them 0
        std::size_t engine_start = 0;
        double floor = 0.0; ///< half of the instrument's half-width
    };
    void gather(const FaultQuantity& from, Row& row) const;
    void gather_engine(const FaultQuantity& from, Row& row) const;
    void find_starts();
    void take_out_what_all_share(const FaultQuantity& from, Row& row) const;
    std::vector<std::optional<double>> middle_of_cylinders(const Row& row, const std::set<int>& left_out) const;
    std::vector<double> own_offsets(const Row& row, std::size_t cylinder) const;
    bool takes_part(std::size_t reading, const Trend& trend, const TrendPoint& point) const;

    const Judgement& judgement_;
    std::size_t readings_, cylinders_;
    std::set<int> trusted_all_; ///< cylinders doubted in several quantities at once at the last reading
    std::vector<double> months_;
    std::vector<Row> rows_;
};

} // namespace evenstroke
