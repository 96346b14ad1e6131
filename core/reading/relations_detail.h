// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/reading/relations.h"
#include "core/reading/typed_number.h"

#include <string_view>

/// Shared by the parts of the relations check; not for other code.
namespace evenstroke::relations_detail {

/// A reading seen as numbers by name and place, each in its quantity's own unit and kind.
class Numbers
{
public:
    explicit Numbers(const Reading& reading) : reading_(reading), barometer_(barometer_of(reading)) {}

    std::optional<double> engine(std::string_view name) const;
    std::optional<double> at(QuantityId quantity, Place place) const;
    std::optional<double> absolute_at(QuantityId quantity, Place place) const;
    std::optional<double> ship(std::string_view name) const;
    /// Every place of this quantity that was read, phase `reading`.
    std::vector<std::pair<Place, double>> all(QuantityId quantity) const;
    const Reading& reading() const { return reading_; }

private:
    const Reading& reading_;
    std::optional<AbsolutePressure> barometer_;
};

/// The quantity of this name at this kind of place; a name that is not in the catalogue is our own mistake.
QuantityId id_of(std::string_view name, Place::Kind kind);

/// "Cylinder 3", "Cylinders 2, 3 and 7": how a sentence begins that speaks of several.
std::string cylinders_words(const Engine& engine, const std::vector<int>& numbers);

/// Shaft power in kW: as noted, else load times rated power.
std::optional<double> power_kw(const Engine& engine, const Numbers& numbers);

void check_cylinders(const Engine& engine, const Numbers& numbers, std::vector<Relation>& found);
void check_compression_ratio(const Engine& engine, const Numbers& numbers, const ReadingContext& context,
                             std::vector<Relation>& found);
void check_air_and_water(const Engine& engine, const Numbers& numbers, std::vector<Relation>& found);
void check_power_and_fuel(const Engine& engine, const Numbers& numbers, std::vector<Relation>& found);
void check_against_earlier(const Numbers& numbers, const ReadingContext& context,
                           std::vector<Relation>& found);

} // namespace evenstroke::relations_detail
