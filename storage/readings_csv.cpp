// SPDX-License-Identifier: GPL-3.0-or-later
#include "storage/readings_csv.h"

#include "core/plain_text.h"
#include "storage/csv_table.h"
#include "storage/sql.h"

#include <QFile>

#include <algorithm>
#include <cmath>

namespace evenstroke::storage {
namespace {

enum Column : std::size_t {
    reading,
    taken_at,
    quantity_name,
    cylinder,
    value,
    unit_text,
    phase,
    words,
    missing_reason,
    origin
};

std::vector<CsvColumn> columns_of(bool engine)
{
    return {{"reading"}, {"taken_at"},     {"quantity"},    {"cylinder", engine},     {"value"},
            {"unit"},    {"phase", false}, {"text", false}, {"missing_reason", false},
            {"origin", false}};
}

class ReadingsFile
{
public:
    ReadingsFile(CsvTable& table, const Engine* engine, History::Names& names, Refusals& refusals)
        : table_(table), values_(names, engine), engine_(engine), refusals_(refusals)
    {
    }

    void take_row();
    std::vector<ReadReading>& readings() { return readings_; }

private:
    ReadReading* find_reading();
    ReadReading* begin_reading(std::string_view name, std::string_view time);

    CsvTable& table_;
    ValueReader values_;
    const Engine* engine_;
    Refusals& refusals_;
    std::vector<ReadReading> readings_;
    TextMap<std::size_t> by_name_;
    std::size_t last_ = 0;  ///< most rows belong to the reading of the row before
    std::string last_time_; ///< as it was written there
    ValueRow row_;
};

ReadReading* ReadingsFile::begin_reading(std::string_view name, std::string_view time)
{
    if (name.empty() || name.size() > longest_reading_name) {
        refusals_.add(table_.line(), name,
                      name.empty() ? "The reading has no name."
                                   : "The reading's name is longer than 100 characters.",
                      "Write a name such as the month: 2026-03.");
        return nullptr;
    }
    const auto at = parse_time(time);
    if (!at.has_value()) {
        refusals_.add(table_.line(), time, at.error());
        return nullptr;
    }
    const auto [known, is_new] = by_name_.try_emplace(std::string(name), readings_.size());
    if (is_new)
        readings_.push_back({std::string(name), at.value(), table_.line(), {}});
    ReadReading& reading = readings_[known->second];
    if (reading.taken_at.utc != at.value().utc) {
        refusals_.add(table_.line(), time,
                      "The reading " + evenstroke::quoted(name) + " was taken at " +
                          utc_text(reading.taken_at.utc) + " on line " + std::to_string(reading.line) +
                          ", here at " + utc_text(at.value().utc) + ".",
                      "Write one time for all values of a reading.");
        return nullptr;
    }
    last_ = known->second;
    last_time_ = time;
    return &reading;
}

ReadReading* ReadingsFile::find_reading()
{
    const std::string_view name = table_.cell(reading), time = table_.cell(taken_at);
    if (last_ < readings_.size() && readings_[last_].name == name && last_time_ == time)
        return &readings_[last_];
    return begin_reading(name, time);
}

void ReadingsFile::take_row()
{
    ReadReading* const into = find_reading();
    if (!into)
        return;
    const ValueTexts texts{table_.cell(quantity_name), table_.cell(cylinder), table_.cell(value),
                           table_.cell(unit_text),     table_.cell(phase),    table_.cell(words),
                           table_.cell(missing_reason), table_.cell(origin)};
    if (const auto problem = values_.read(texts, row_))
        refusals_.add(table_.line(), problem->value, problem->reason, problem->expected);
    else
        into->values.push_back({row_, table_.line()});
}

/// Puts the values in order and looks for places that the file names twice.
void settle(ReadReading& reading, const History::Names& names, Refusals& refusals, TakeCounts& counts)
{
    std::stable_sort(reading.values.begin(), reading.values.end(),
                     [](const ReadValue& a, const ReadValue& b) { return a.row.where() < b.row.where(); });
    std::vector<ReadValue> kept;
    kept.reserve(reading.values.size());
    for (ReadValue& next : reading.values) {
        if (kept.empty() || kept.back().row.where() != next.row.where()) {
            kept.push_back(std::move(next));
            continue;
        }
        const ReadValue& first = kept.back();
        if (means_the_same(names, first.row, next.row))
            ++counts.same;
        else
            refusals.add(next.line, next.row.typed,
                         shown_place(names, next.row) + " of " + evenstroke::quoted(reading.name) + " is " +
                             shown_value(names, first.row) + " on line " + std::to_string(first.line) +
                             " and " + shown_value(names, next.row) + " here.",
                         "Keep the right one of the two.");
    }
    reading.values = std::move(kept);
}

} // namespace

std::string shown_value(const History::Names& names, const ValueRow& row)
{
    constexpr const char* missing[] = {"", "not fitted", "not read", "out of order"};
    if (row.missing > 0 && row.missing <= 3)
        return missing[row.missing];
    const UnitInFile* const unit = names.unit(row.unit_key);
    return row.typed + (unit ? " " + unit->written : std::string());
}

std::string shown_place(const History::Names& names, const ValueRow& row)
{
    const QuantityInFile* const quantity = names.quantity(row.quantity_key);
    const Place place = place_of(row.place);
    return (quantity ? quantity->name : std::string("a quantity")) +
           (place.number > 0 ? ", " + place_text(place) + "," : std::string());
}

bool means_the_same(const History::Names& names, const ValueRow& a, const ValueRow& b)
{
    if (a.missing != b.missing || a.words != b.words || a.value_si.has_value() != b.value_si.has_value())
        return false;
    if (!a.value_si)
        return a.typed == b.typed || !a.words.empty();
    if (a.unit_key != b.unit_key) {
        const UnitInFile* const first = names.unit(a.unit_key);
        const UnitInFile* const second = names.unit(b.unit_key);
        // Litres are no kilograms, and absolute is not gauge: the number alone does not say it.
        if (!first || !second || !first->unit || !second->unit || first->unit->kind != second->unit->kind ||
            unit(first->unit->id).dimension != unit(second->unit->id).dimension)
            return false;
    }
    // Converting rounds: two writings of one number may differ in the last bits.
    return std::abs(*a.value_si - *b.value_si) <=
           1e-12 * std::max(std::abs(*a.value_si), std::abs(*b.value_si));
}

ReadReadings read_readings_file(const QString& path, const Engine* engine, History::Names& names,
                                Refusals& refusals, ProgressMeter& meter)
{
    ReadReadings result;
    QFile file(path);
    if (!file.open(QIODevice::ReadOnly)) {
        refusals.add(0, "", "The file cannot be opened.", "Check that you have the right to read it.");
        return result;
    }
    CsvTable table(file, columns_of(engine != nullptr), refusals);
    if (!table.read_header())
        return result;
    result.unread_columns = table.unread_columns();
    ReadingsFile rows(table, engine, names, refusals);
    qint64 reported = 0;
    while (table.next_row()) {
        rows.take_row();
        if (table.bytes_read() != reported &&
            !meter.add(table.bytes_read() - std::exchange(reported, table.bytes_read())))
            return result;
    }
    for (ReadReading& reading : rows.readings()) {
        settle(reading, names, refusals, result.counts);
        if (!reading.values.empty())
            result.readings.push_back(std::move(reading));
    }
    return result;
}

} // namespace evenstroke::storage
