// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/reading/quantity_catalogue.h"
#include "storage/history.h"

#include <array>
#include <optional>
#include <string>
#include <string_view>
#include <unordered_map>
#include <vector>

namespace evenstroke::storage {

/// `place` as the file numbers it: kind * 1000 + number.
inline int place_code(const Place& place)
{
    return static_cast<int>(place.kind) * 1000 + place.number;
}
inline Place place_of(int code)
{
    return {static_cast<Place::Kind>(code / 1000), code % 1000};
}
inline constexpr int place_kinds = 5;

/// Lets a hash table keyed by std::string be asked with a string_view.
struct TextHash
{
    using is_transparent = void;
    std::size_t operator()(std::string_view text) const { return std::hash<std::string_view>()(text); }
};
template <typename T> using TextMap = std::unordered_map<std::string, T, TextHash, std::equal_to<>>;

struct QuantityInFile
{
    std::string name;
    int rank = 0; ///< in the order of names: hashes must not depend on this file's numbering
    std::array<QuantityId, place_kinds> id{}; ///< by kind of place; -1: this program does not know it there
};
struct UnitInFile
{
    std::string written;
    std::optional<WrittenUnit> unit; ///< none: this program does not know it
    std::array<bool, 4>
        as_catalogue{}; ///< by the quantity's kind of pressure: the catalogue writes it so too
};

/// The numbers that this history gave to names of quantities and to written units. The catalogue may change
/// its order, and a later program may add names; the file keeps its own numbers.
class History::Names
{
public:
    explicit Names(History& history) : history_(history) {}

    /// Reads the tables anew: after another connection has added to them.
    Done refresh();
    /// What was numbered may have been rolled back.
    void forget() { loaded_ = false; }
    /// Reads them where that was not done yet, or where another connection may have added to them.
    Done make_ready();

    /// Number of a name; a new name gets one, which needs a transaction.
    Result<int> quantity_key(std::string_view name);
    Result<int> unit_key(std::string_view written);

    /// Null for a number that is not known (yet): refresh and ask again.
    const QuantityInFile* quantity(int key) const;
    const UnitInFile* unit(int key) const;

private:
    void add_quantity(int key, std::string name);
    void add_unit(int key, std::string written);
    void rank_quantities();

    History& history_;
    bool loaded_ = false;
    qint64 seen_ = -1;                       ///< state of the file when they were read
    std::vector<QuantityInFile> quantities_; ///< by key; unused keys have an empty name
    std::vector<UnitInFile> units_;
    TextMap<int> quantity_keys_, unit_keys_;
};

} // namespace evenstroke::storage
