// SPDX-License-Identifier: GPL-3.0-or-later
#include "storage/names.h"

#include "storage/sql.h"
#include "storage/written_unit.h"

#include <algorithm>
#include <numeric>

namespace evenstroke::storage {
namespace {

const std::string not_numbered = "the names of quantities and units were not read";
constexpr int most_names = 65535; // a file with more is damaged; the bulk reading packs a key in 16 bits

} // namespace

Done History::Names::make_ready()
{
    return loaded_ && seen_ == history_.seen_change() ? done() : refresh();
}

Done History::Names::refresh()
{
    seen_ = history_.seen_change();
    quantities_.clear();
    units_.clear();
    quantity_keys_.clear();
    unit_keys_.clear();
    Query names(history_.database(),
                "SELECT quantity_key, name FROM quantity_name WHERE quantity_key BETWEEN 1 AND 65535",
                not_numbered);
    BOOST_OUTCOME_TRYV(names.run());
    while (names.next())
        add_quantity(names.small(0), names.text(1));
    BOOST_OUTCOME_TRYV(names.finished());
    Query written(history_.database(),
                  "SELECT unit_key, written FROM unit_name WHERE unit_key BETWEEN 1 AND 65535", not_numbered);
    BOOST_OUTCOME_TRYV(written.run());
    while (written.next())
        add_unit(written.small(0), written.text(1));
    BOOST_OUTCOME_TRYV(written.finished());
    rank_quantities();
    loaded_ = true;
    return done();
}

void History::Names::add_quantity(int key, std::string name)
{
    if (static_cast<std::size_t>(key) >= quantities_.size())
        quantities_.resize(static_cast<std::size_t>(key) + 1);
    QuantityInFile& entry = quantities_[static_cast<std::size_t>(key)];
    for (int kind = 0; kind < place_kinds; ++kind)
        entry.id[static_cast<std::size_t>(kind)] =
            find_quantity(name, static_cast<Place::Kind>(kind)).value_or(-1);
    quantity_keys_.emplace(name, key);
    entry.name = std::move(name);
}

void History::Names::add_unit(int key, std::string written)
{
    if (static_cast<std::size_t>(key) >= units_.size())
        units_.resize(static_cast<std::size_t>(key) + 1);
    UnitInFile& entry = units_[static_cast<std::size_t>(key)];
    if (const auto found = find_unit(written); found.has_value())
        entry.unit = found.value();
    for (std::size_t kind = 0; entry.unit && kind < entry.as_catalogue.size(); ++kind) {
        const auto usual = static_cast<PressureKind>(kind);
        const PressureKind meant = entry.unit->kind == PressureKind::none ? usual : entry.unit->kind;
        entry.as_catalogue[kind] = written == written_unit({entry.unit->id, meant}, usual);
    }
    unit_keys_.emplace(written, key);
    entry.written = std::move(written);
}

void History::Names::rank_quantities()
{
    std::vector<std::size_t> order(quantities_.size());
    std::iota(order.begin(), order.end(), std::size_t{0});
    std::sort(order.begin(), order.end(),
              [&](std::size_t a, std::size_t b) { return quantities_[a].name < quantities_[b].name; });
    for (std::size_t rank = 0; rank < order.size(); ++rank)
        quantities_[order[rank]].rank = static_cast<int>(rank);
}

Result<int> History::Names::quantity_key(std::string_view name)
{
    if (const auto known = quantity_keys_.find(name); loaded_ && known != quantity_keys_.end())
        return known->second;
    BOOST_OUTCOME_TRYV(make_ready());
    if (const auto known = quantity_keys_.find(name); known != quantity_keys_.end())
        return known->second;
    Query add(history_.database(), "INSERT INTO quantity_name (name) VALUES (?)",
              "the quantity was not added to the history");
    BOOST_OUTCOME_TRYV(add.run(name));
    const int key = static_cast<int>(add.inserted_key());
    if (key > most_names)
        return Problem{Problem::Kind::damaged_file, "The history names more quantities than there can be.",
                       "Open the newest backup beside it."};
    add_quantity(key, std::string(name));
    rank_quantities();
    return key;
}

Result<int> History::Names::unit_key(std::string_view written)
{
    if (const auto known = unit_keys_.find(written); loaded_ && known != unit_keys_.end())
        return known->second;
    BOOST_OUTCOME_TRYV(make_ready());
    if (const auto known = unit_keys_.find(written); known != unit_keys_.end())
        return known->second;
    Query add(history_.database(), "INSERT INTO unit_name (written) VALUES (?)",
              "the unit was not added to the history");
    BOOST_OUTCOME_TRYV(add.run(written));
    const int key = static_cast<int>(add.inserted_key());
    if (key > most_names)
        return Problem{Problem::Kind::damaged_file, "The history names more units than there can be.",
                       "Open the newest backup beside it."};
    add_unit(key, std::string(written));
    return key;
}

const QuantityInFile* History::Names::quantity(int key) const
{
    if (key < 1 || static_cast<std::size_t>(key) >= quantities_.size() ||
        quantities_[static_cast<std::size_t>(key)].name.empty())
        return nullptr;
    return &quantities_[static_cast<std::size_t>(key)];
}

const UnitInFile* History::Names::unit(int key) const
{
    // An empty text is a written unit too (a bare number), so only the range is asked.
    if (key < 1 || static_cast<std::size_t>(key) >= units_.size())
        return nullptr;
    return &units_[static_cast<std::size_t>(key)];
}

} // namespace evenstroke::storage
