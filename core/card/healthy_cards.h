// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/card/card_review.h"

#include <map>

/// Which stored cards stand for the healthy cylinder, and what they say of the installation.
namespace evenstroke::indicator {

/// The places of the healthy cards of one cylinder.
struct HealthyChoice
{
    std::vector<std::size_t> readings; ///< to compare with: one, or two to go between
    std::vector<std::size_t> others;   ///< called healthy too: they count for dead centre
    bool provisional = false;          ///< nobody called one healthy
    std::string none;                  ///< why there is nothing to compare with, in words
};

/// Of the readings called healthy the newest at each load; where none is, the earliest before this reading.
HealthyChoice choose_healthy(const Judgement& judgement, std::size_t reading, int cylinder, const CardShelf& shelf);

/// Dead centre of the installation as one cylinder's cards were recorded with it.
struct KnownOffset
{
    double value = 0.0, spread = 0.0; ///< degrees; one standard deviation of how well it is known for the next card
};

/// What the healthy cards say of dead centre, by cylinder.
class InstallationOffset
{
public:
    void add(int cylinder, const Evaluation& card);

    /// Median over all healthy cards, half-width at 95 % of a single cylinder about it.
    std::optional<Estimate> of_engine() const;
    /// From the cylinder's own cards where there are three, else from the engine's; nothing from fewer than three.
    std::optional<KnownOffset> of_cylinder(int cylinder) const;

private:
    struct Found
    {
        double value = 0.0, spread = 0.0;
    };
    static std::optional<KnownOffset> weigh(const std::vector<Found>& found, bool one_cylinder);

    std::map<int, std::vector<Found>> found_;
    std::vector<Found> all_;
};

} // namespace evenstroke::indicator
