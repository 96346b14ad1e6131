// SPDX-License-Identifier: GPL-3.0-or-later
#include "storage/preference_store.h"

#include "storage/transaction.h"
#include "storage/value_rows.h"
#include "storage/written_unit.h"

namespace evenstroke::storage {
namespace {

const std::string not_saved = "the choice was not saved";
const std::string not_read = "the choices were not read";

} // namespace

Result<std::map<QuantityId, ChosenUnit>> PreferenceStore::units(const std::string& engine_id) const
{
    const ReadTransaction same_state(history_);
    BOOST_OUTCOME_TRYV(history_.names().make_ready());
    Query rows(history_.database(),
               "SELECT c.quantity_key, c.place_kind, c.unit_key FROM chosen_unit c JOIN engine e USING "
               "(engine_key) WHERE e.id = ?",
               not_read);
    BOOST_OUTCOME_TRYV(rows.run(engine_id));
    std::map<QuantityId, ChosenUnit> chosen;
    while (rows.next()) {
        const QuantityInFile* const quantity_name = history_.names().quantity(rows.small(0));
        const UnitInFile* const written = history_.names().unit(rows.small(2));
        const auto kind = static_cast<std::size_t>(rows.small(1));
        if (quantity_name && written && written->unit && kind < quantity_name->id.size() &&
            quantity_name->id[kind] >= 0)
            chosen[quantity_name->id[kind]] = {written->unit->id, written->unit->kind};
    }
    BOOST_OUTCOME_TRYV(rows.finished());
    return chosen;
}

Done PreferenceStore::set_unit(const std::string& engine_id, QuantityId id,
                               const std::optional<ChosenUnit>& chosen)
{
    Transaction transaction(history_, not_saved);
    BOOST_OUTCOME_TRYV(transaction.begin());
    const auto keys = owner_keys(history_, Owner::engine(engine_id));
    const auto quantity_key = history_.names().quantity_key(quantity(id).name);
    if (!keys || !quantity_key)
        return keys ? quantity_key.error() : keys.error();
    const int kind = static_cast<int>(quantity(id).per);
    Query forget(history_.database(),
                 "DELETE FROM chosen_unit WHERE engine_key = ? AND quantity_key = ? AND place_kind = ?",
                 not_saved);
    BOOST_OUTCOME_TRYV(forget.run(keys.value().engine, quantity_key.value(), kind));
    if (chosen) {
        const auto unit_key =
            history_.names().unit_key(written_unit({chosen->unit, chosen->kind}, PressureKind::none));
        if (!unit_key)
            return unit_key.error();
        Query add(
            history_.database(),
            "INSERT INTO chosen_unit (engine_key, quantity_key, place_kind, unit_key) VALUES (?, ?, ?, ?)",
            not_saved);
        BOOST_OUTCOME_TRYV(add.run(keys.value().engine, quantity_key.value(), kind, unit_key.value()));
    }
    return transaction.commit();
}

Result<std::optional<std::string>> PreferenceStore::choice(const std::string& engine_id,
                                                           const std::string& name) const
{
    Query row(history_.database(), "SELECT content FROM choice WHERE engine_id = ? AND name = ?", not_read);
    BOOST_OUTCOME_TRYV(row.run(engine_id, name));
    if (row.next())
        return std::optional(row.text(0));
    BOOST_OUTCOME_TRYV(row.finished());
    return std::optional<std::string>();
}

Done PreferenceStore::set_choice(const std::string& engine_id, const std::string& name,
                                 const std::optional<std::string>& value)
{
    Transaction transaction(history_, not_saved);
    BOOST_OUTCOME_TRYV(transaction.begin());
    Query forget(history_.database(), "DELETE FROM choice WHERE engine_id = ? AND name = ?", not_saved);
    BOOST_OUTCOME_TRYV(forget.run(engine_id, name));
    if (value) {
        Query add(history_.database(), "INSERT INTO choice (engine_id, name, content) VALUES (?, ?, ?)",
                  not_saved);
        BOOST_OUTCOME_TRYV(add.run(engine_id, name, *value));
    }
    return transaction.commit();
}

} // namespace evenstroke::storage
