// SPDX-License-Identifier: GPL-3.0-or-later
#include "storage/reading_merge.h"

#include "core/plain_text.h"
#include "storage/audit_writer.h"

#include <QUuid>

#include <algorithm>
#include <unordered_map>

namespace evenstroke::storage {
namespace {

const std::string not_taken = "nothing was taken in";

} // namespace

Done ReadingMerge::compare(ReadReadings& read, Refusals& refusals)
{
    counts_.same += read.counts.same;
    const auto stored = load_reading_rows(history_, owner_);
    if (!stored)
        return stored.error();
    std::unordered_map<std::string_view, const ReadingRow*> by_name;
    for (const ReadingRow& row : stored.value())
        by_name.emplace(row.name, &row);
    for (ReadReading& reading : read.readings) {
        const auto known = by_name.find(reading.name);
        BOOST_OUTCOME_TRYV(
            compare_reading(reading, known == by_name.end() ? nullptr : known->second, refusals));
    }
    return done();
}

Done ReadingMerge::compare_reading(ReadReading& read, const ReadingRow* stored, Refusals& refusals)
{
    Target target;
    if (!stored) {
        target.head = {0, {}, read.name, read.taken_at, ReadingState::closed, history_.now()};
        for (ReadValue& value : read.values)
            target.fresh.push_back(std::move(value.row));
        counts_.fresh += static_cast<qint64>(target.fresh.size());
        targets_.push_back(std::move(target));
        return done();
    }
    const bool draft = stored->state == ReadingState::draft;
    if (draft || stored->taken_at.utc != read.taken_at.utc) {
        const std::string reason =
            draft ? "The reading " + evenstroke::quoted(read.name) + " is still being entered in the history."
                  : "The history has the reading " + evenstroke::quoted(read.name) + " at " +
                        utc_text(stored->taken_at.utc) + ", not at " + utc_text(read.taken_at.utc) + ".";
        for (const ReadValue& value : read.values)
            refusals.add(value.line, read.name, reason,
                         draft ? "Close the draft or throw it away first."
                               : "Give the file's reading another name, or its right time.");
        return done();
    }
    auto rows = load_value_rows(history_, stored->key);
    if (!rows)
        return rows.error();
    target.head = *stored;
    target.stored = std::move(rows.value());
    for (ReadValue& value : read.values) {
        const auto is_fresh = compare_value(read, value, target, refusals);
        if (!is_fresh)
            return is_fresh.error();
        if (is_fresh.value())
            target.fresh.push_back(std::move(value.row));
    }
    counts_.fresh += static_cast<qint64>(target.fresh.size());
    if (!target.fresh.empty())
        targets_.push_back(std::move(target));
    return done();
}

Result<bool> ReadingMerge::compare_value(const ReadReading& reading, const ReadValue& read, Target& target,
                                         Refusals& refusals)
{
    const auto before = [](const ValueRow& a, const ValueRow& b) { return a.where() < b.where(); };
    const auto found = std::lower_bound(target.stored.begin(), target.stored.end(), read.row, before);
    if (found == target.stored.end() || found->where() != read.row.where())
        return true;
    const bool file_is_empty = read.row.missing == static_cast<int>(MissingReason::not_read);
    if (file_is_empty || means_the_same(history_.names(), *found, read.row)) {
        ++counts_.same;
        return false;
    }
    if (found->missing == static_cast<int>(MissingReason::not_read)) {
        target.replaced.push_back(*found);
        return true;
    }
    const auto corrected = was_corrected(target.head.key, read.row);
    if (!corrected)
        return corrected.error();
    if (corrected.value()) {
        ++counts_.same; // the file is older than the correction
        return false;
    }
    refusals.add(read.line, read.row.typed,
                 shown_place(history_.names(), read.row) + " of " + evenstroke::quoted(reading.name) +
                     " is " + shown_value(history_.names(), *found) + " in the history and " +
                     shown_value(history_.names(), read.row) + " here.",
                 "Correct the value in the history if the file is right, so that the old one is kept.");
    return false;
}

Result<bool> ReadingMerge::was_corrected(qint64 reading_key, const ValueRow& row)
{
    Query olds(history_.database(),
               "SELECT old_typed, coalesce(old_unit_key, 0), old_value_si, coalesce(old_words, ''), "
               "old_missing FROM correction "
               "WHERE reading_key = ? AND quantity_key = ? AND place = ? AND phase = ?",
               not_taken);
    BOOST_OUTCOME_TRYV(olds.run(reading_key, row.quantity_key, row.place, row.phase));
    while (olds.next()) {
        ValueRow old = row;
        old.typed = olds.text(0);
        old.unit_key = olds.small(1);
        old.value_si = olds.real(2);
        old.words = olds.text(3);
        old.missing = olds.small(4);
        if (means_the_same(history_.names(), old, row))
            return true;
    }
    BOOST_OUTCOME_TRYV(olds.finished());
    return false;
}

Done ReadingMerge::write_target(Target& target, TakeWriters& writers, Query& remove)
{
    if (target.head.key == 0) {
        target.head.id = from_qt(QUuid::createUuid().toString(QUuid::WithoutBraces));
        const auto key = writers.readings.add(owner_, target.head);
        if (!key)
            return key.error();
        target.head.key = key.value();
    }
    for (const ValueRow& row : target.replaced) {
        BOOST_OUTCOME_TRYV(remove.run(target.head.key, row.quantity_key, row.place, row.phase));
        std::erase_if(target.stored, [&](const ValueRow& stored) { return stored.where() == row.where(); });
    }
    for (const ValueRow& row : target.fresh) {
        BOOST_OUTCOME_TRYV(writers.values.add(target.head.key, row));
    }
    return done();
}

Done ReadingMerge::write(TakeWriters& writers, ProgressMeter& meter)
{
    if (targets_.empty())
        return done();
    Query remove(history_.database(),
                 "DELETE FROM value WHERE reading_key = ? AND quantity_key = ? AND place = ? AND phase = ?",
                 not_taken);
    for (Target& target : targets_) {
        const bool is_new = target.head.key == 0;
        BOOST_OUTCOME_TRYV(write_target(target, writers, remove));
        std::vector<const ValueRow*> rows;
        for (const std::vector<ValueRow>* const part : {&target.stored, &target.fresh})
            for (const ValueRow& row : *part)
                rows.push_back(&row);
        const std::string detail = target.head.name + ", " + std::to_string(target.fresh.size()) + " values";
        BOOST_OUTCOME_TRYV(writers.audit.add({is_new ? "taken in" : "added to", "reading", target.head.id,
                                              detail, reading_hash(history_.names(), target.head, rows)}));
        if (!meter.add(0))
            return done();
    }
    BOOST_OUTCOME_TRYV(writers.values.flush());
    return count_change(history_, owner_);
}

} // namespace evenstroke::storage
