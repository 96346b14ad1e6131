// SPDX-License-Identifier: GPL-3.0-or-later
#include "storage/reading_change.h"
#include "storage/reading_store.h"

#include "core/plain_text.h"

#include <cmath>

// Results of indicator cards becoming values of their reading.
namespace evenstroke::storage {
namespace {

const std::string not_saved = "the cards' values were not put into the reading";
constexpr std::size_t longest_detail = 2000; // bytes of one row of the trail

/// As it will stand in the log sheet: a card's last digits are noise.
std::string typed_number(double number, int decimals)
{
    const double scale = std::pow(10.0, decimals + 1);
    return number_text(std::round(number * scale) / scale + 0.0);
}

Result<Value> value_from(const ValueFromCard& given)
{
    Value value;
    value.quantity = given.quantity;
    value.place = given.place;
    value.origin = Origin::card;
    const Quantity& q = quantity(given.quantity);
    value.unit = given.unit.id;
    value.kind = given.unit.kind == PressureKind::none ? q.kind : given.unit.kind;
    if (q.type != ValueType::number || q.derived() || unit(given.unit.id).dimension != unit(q.unit).dimension)
        return invalid_input("A card cannot give " + q.name + " in " +
                                 std::string(unit(given.unit.id).symbol) + ".",
                             "Put in another of its results.");
    if (!std::isfinite(given.number))
        return invalid_input("The card gives no number for " + value_name(value) + ".",
                             "Leave this result out.");
    value.typed = typed_number(given.number, q.decimals);
    const auto value_si = to_si_checked(parse_number(value.typed).value(), {value.unit, value.kind});
    if (!value_si)
        return value_si.error();
    return completed(std::move(value));
}

/// Values of cards on their way into one reading.
class CardValues
{
public:
    CardValues(History& history, Signature by)
        : history_(history), by_(std::move(by)), change_(history, not_saved)
    {
    }
    Done begin(const std::string& reading_id);
    Done put(const ValueFromCard& given);
    Result<AcceptedFromCards> finish();

private:
    Done write(const ValueRow& before, const ValueRow& after, const Value& value);

    History& history_;
    Signature by_;
    ReadingChange change_;
    AcceptedFromCards accepted_;
    std::string detail_;
};

Done CardValues::begin(const std::string& reading_id)
{
    return change_.begin_unless_withdrawn(reading_id);
}

Done CardValues::put(const ValueFromCard& given)
{
    const auto value = value_from(given);
    if (!value)
        return value.error();
    const auto row = row_of(history_.names(), value.value());
    if (!row)
        return row.error();
    ValueRow before;
    before.missing = static_cast<int>(MissingReason::not_read);
    const ValueRow* const there = change_.find(row.value());
    if (there)
        before = *there;
    const bool from_card = there && there->origin == static_cast<int>(Origin::card);
    // A box with a reason for being empty holds no number either: the card is another instrument.
    if (there && !from_card && there->missing == 0) {
        accepted_.left_alone.push_back({given.quantity, given.place, Phase::reading});
        return done();
    }
    if (from_card && there->typed == row.value().typed && there->unit_key == row.value().unit_key) {
        ++accepted_.same;
        return done();
    }
    ++(from_card ? accepted_.corrected : accepted_.added);
    return write(before, row.value(), value.value());
}

Done CardValues::write(const ValueRow& before, const ValueRow& after, const Value& value)
{
    if (!change_.is_draft()) {
        BOOST_OUTCOME_TRYV(keep_correction(history_, change_.reading().key, before, after, by_));
    }
    BOOST_OUTCOME_TRYV(change_.add_value(after));
    if (detail_.size() < longest_detail)
        detail_ += (detail_.empty() ? "" : "; ") + value_name(value) + ": " +
                   value_text(history_.names(), before) + " -> " + value_text(history_.names(), after);
    return done();
}

Result<AcceptedFromCards> CardValues::finish()
{
    if (accepted_.added + accepted_.corrected == 0)
        return std::move(accepted_); // nothing to commit
    if (change_.is_draft()) {
        AuditWriter audit(history_, by_);
        BOOST_OUTCOME_TRYV(audit.add({"taken from cards", "reading", change_.reading().id, detail_, ""}));
        BOOST_OUTCOME_TRYV(change_.finish());
    } else {
        BOOST_OUTCOME_TRYV(change_.finish("corrected from cards", detail_, by_));
    }
    return std::move(accepted_);
}

} // namespace

Result<AcceptedFromCards> ReadingStore::accept_card_values(const std::string& reading_id,
                                                           const std::vector<ValueFromCard>& values,
                                                           const Signature& by)
{
    const Signature signed_by{by.who, by.why.empty() ? "from the card" : by.why};
    BOOST_OUTCOME_TRYV(check_signature(signed_by, true));
    CardValues reading(history_, signed_by);
    BOOST_OUTCOME_TRYV(reading.begin(reading_id));
    for (const ValueFromCard& value : values) {
        BOOST_OUTCOME_TRYV(reading.put(value));
    }
    return reading.finish();
}

} // namespace evenstroke::storage
