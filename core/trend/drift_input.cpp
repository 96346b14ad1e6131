// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/trend/drift_input.h"

#include "core/trend/drift_catalogue.h"
#include "core/trend/flag_notes.h"
#include "core/trend/limits_ahead.h"
#include "core/trend/robust.h"
#include "core/trend/work_marks.h"

#include <algorithm>
#include <cmath>
#include <set>
#include <utility>

namespace evenstroke {
namespace {

bool is_percent(const drift::CatalogueChannel& channel) { return channel.form == drift::DeviationForm::percent; }

drift::Cell make_cell(const Value& typed, const JudgedValue& value, const OwnValue& own, const DeviationForm& form)
{
    drift::Cell cell;
    cell.present = std::isfinite(value.raw);
    cell.deviation = form.of(value.raw);
    cell.scale = form.scale * own.scale;
    cell.typed_number = *typed.number;
    cell.typed_text = typed.typed;
    cell.confirmed = typed.confirmed;
    cell.held_out = own.outside_hard && !typed.confirmed;
    return cell;
}

/// Median over the cylinders of the corrected values of one quantity at one reading.
std::optional<double> corrected_median(const Engine& engine, const PreparedReading& prepared, QuantityId id)
{
    std::vector<double> row;
    for (const JudgedValue& value : prepared.values) {
        if (value.quantity != id || value.place.kind != Place::Kind::cylinder)
            continue;
        const Correction c = find_correction(engine, quantity(id), value.raw, prepared.conditions);
        row.push_back(c.scale * value.raw + c.shift);
    }
    return drift::median(std::move(row));
}

class InputMaker
{
public:
    InputMaker(const EngineRecord& record, const Baseline& baseline, const std::vector<PreparedReading>& prepared)
        : record_(record), baseline_(baseline), prepared_(prepared)
    {
        cylinders_ = static_cast<std::size_t>(record.engine.cylinders);
    }

    drift::Channel cylinder_channel(const drift::CatalogueChannel& from, QuantityId id) const
    {
        drift::Channel channel;
        channel.quantity = from.quantity;
        channel.noise = from.noise;
        channel.offset_spread = from.offset_spread;
        channel.marks = customary_marks(record_.engine, baseline_, from);
        if (const auto* median = drift::find_channel(from.quantity, drift::Subject::cylinder_median))
            channel.median_marks = customary_marks(record_.engine, baseline_, *median);
        channel.cells.resize(prepared_.size() * cylinders_);
        channel.expected_typed.resize(prepared_.size());
        for (std::size_t i = 0; i < prepared_.size(); ++i) {
            const auto row_median = is_percent(from) && !baseline_.has(from.quantity)
                                        ? corrected_median(record_.engine, prepared_[i], id)
                                        : std::nullopt;
            std::set<std::pair<UnitId, PressureKind>> units;
            for (const JudgedValue& value : prepared_[i].values)
                if (value.quantity == id && value.place.kind == Place::Kind::cylinder) {
                    put(channel, i, value, is_percent(from), row_median);
                    const Value& typed = record_.readings[i].values[value.value_index];
                    units.emplace(typed.unit, typed.kind);
                }
            if (units.size() > 1) // no one unit in which the whole row could have been meant
                channel.expected_typed[i].reset();
        }
        return channel;
    }

    /// Worked out of values that are checked where they were typed.
    drift::Channel derived_cylinder_channel(const drift::CatalogueChannel& from, const DerivedQuantity& quantity) const
    {
        drift::Channel channel;
        channel.quantity = from.quantity;
        channel.noise = from.noise;
        channel.offset_spread = from.offset_spread;
        channel.in_scan = from.evidence;
        channel.checked = false;
        channel.cells.resize(prepared_.size() * cylinders_);
        for (std::size_t i = 0; i < prepared_.size(); ++i)
            for (const DerivedValue& row : prepared_[i].derived)
                if (row.id == quantity.id && row.place.kind == Place::Kind::cylinder)
                    channel.cells[i * cylinders_ + static_cast<std::size_t>(row.place.number) - 1] = derived_cell(from, row);
        return channel;
    }

    drift::EngineChannel engine_channel(const drift::CatalogueChannel& from) const
    {
        drift::EngineChannel channel;
        channel.in_scan = from.evidence;
        channel.quantity = from.quantity;
        channel.typed_quantity = from.typed_quantity;
        channel.noise = from.noise;
        channel.cells.resize(prepared_.size());
        channel.marks = customary_marks(record_.engine, baseline_, from);
        const auto id = find_quantity(from.quantity);
        for (std::size_t i = 0; i < prepared_.size(); ++i) {
            channel.cells[i] = engine_cell(from, i);
            if (const auto form = id && channel.cells[i].present && baseline_.has(from.quantity)
                                      ? deviation_form(record_.engine, baseline_, quantity(*id), 0.0,
                                                       prepared_[i].conditions, is_percent(from), std::nullopt)
                                      : std::nullopt)
                add_own_marks(channel.marks, record_.engine, from.quantity, i, prepared_.size(), *form);
        }
        return channel;
    }

private:
    void put(drift::Channel& channel, std::size_t reading, const JudgedValue& value, bool percent,
             std::optional<double> row_median) const
    {
        const PreparedReading& prepared = prepared_[reading];
        const Value& typed = record_.readings[reading].values[value.value_index];
        const auto own = own_value(typed, prepared.conditions);
        const auto form = deviation_form(record_.engine, baseline_, quantity(value.quantity), value.raw,
                                         prepared.conditions, percent, row_median);
        if (!own || !form)
            return;
        const std::size_t cylinder = static_cast<std::size_t>(value.place.number) - 1;
        channel.cells[reading * cylinders_ + cylinder] = make_cell(typed, value, *own, *form);
        add_own_marks(channel.marks, record_.engine, channel.quantity, reading, prepared_.size(), *form);
        if (value.expected && own->scale != 0.0) // own = scale * typed + shift
            channel.expected_typed[reading] = *typed.number + (*value.expected - own->value) / own->scale;
    }

    /// The one value of the engine, or the mean over turbochargers or coolers.
    drift::Cell engine_cell(const drift::CatalogueChannel& from, std::size_t reading) const
    {
        if (from.quantity == "specific_fuel_consumption")
            return consumption_cell(reading);
        if (from.quantity == "cooler_temperature_difference")
            return temperature_difference_cell(reading);
        if (find_derived(from.quantity)) {
            for (const DerivedValue& row : prepared_[reading].derived)
                if (row.quantity == from.quantity && row.place == Place::engine())
                    return derived_cell(from, row);
            return {};
        }
        if (!baseline_.has(from.quantity))
            return {};
        return mean_cell(from.quantity, reading, [&](const Quantity& q, double own) {
            return deviation_form(record_.engine, baseline_, q, own, prepared_[reading].conditions, is_percent(from),
                                  std::nullopt);
        });
    }

    template <typename Form>
    drift::Cell mean_cell(std::string_view name, std::size_t reading, const Form& form_of) const
    {
        drift::Cell mean;
        int count = 0;
        for (const JudgedValue& value : prepared_[reading].values) {
            const Quantity& q = quantity(value.quantity);
            if (q.name != name || value.place.kind == Place::Kind::cylinder || value.place.kind == Place::Kind::ship)
                continue;
            const Value& typed = record_.readings[reading].values[value.value_index];
            const auto own = own_value(typed, prepared_[reading].conditions);
            const auto form = form_of(q, value.raw);
            if (!own || !form)
                continue;
            const drift::Cell cell = make_cell(typed, value, *own, *form);
            if (value.place.kind == Place::Kind::engine)
                return cell;
            if (count > 0 && cell.held_out && !mean.held_out)
                continue; // an impossible one of several: the others stand for it
            if (mean.held_out && !cell.held_out)
                count = 0;
            ++count;
            mean = count == 1 ? cell : merged(mean, cell, count);
        }
        return mean;
    }

    /// Several parallel values: their mean; there is no one text in which a digit could be exchanged.
    static drift::Cell merged(drift::Cell mean, const drift::Cell& next, int count)
    {
        mean.deviation += (next.deviation - mean.deviation) / count;
        mean.typed_number += (next.typed_number - mean.typed_number) / count;
        mean.typed_text.clear();
        mean.confirmed = mean.confirmed && next.confirmed;
        mean.held_out = mean.held_out || next.held_out;
        return mean;
    }

    /// Nobody typed it: there is no text to look for a slip in. Where the baseline speaks of it and does not reach,
    /// it is left out.
    drift::Cell derived_cell(const drift::CatalogueChannel& from, const DerivedValue& row) const
    {
        const std::optional<double> compared = row.compared;
        drift::Cell cell;
        if (!compared || !std::isfinite(*compared) || (!row.expected && (is_percent(from) || baseline_.has(from.quantity))))
            return cell;
        cell.present = true;
        cell.deviation = *compared - row.expected.value_or(0.0);
        if (is_percent(from))
            cell.deviation *= 100.0 / *row.expected;
        cell.typed_number = *compared;
        cell.scale = 1.0;
        cell.confirmed = true;
        return cell;
    }

    /// A derived quantity of the engine, whether the reading is judged or a draft.
    std::optional<DerivedValue> derived_of_engine(std::string_view name, std::size_t reading) const
    {
        for (const DerivedValue& row : prepared_[reading].derived)
            if (row.quantity == name && row.place == Place::engine())
                return row;
        if (!prepared_[reading].derived.empty())
            return std::nullopt;
        const DerivedReading of(record_.engine, baseline_, record_.readings[reading], prepared_[reading].conditions);
        DerivedInputs inputs(of);
        return derive_one(inputs, *find_derived(name), Place::engine());
    }

    drift::Cell temperature_difference_cell(std::size_t reading) const
    {
        const auto over = derived_of_engine("cooler_temperature_difference", reading);
        const auto air = engine_mean(record_.readings[reading], "scavenge_temperature", prepared_[reading].conditions);
        if (!over || !air)
            return {};
        return mean_cell("scavenge_temperature", reading, [&](const Quantity&, double) {
            return std::optional<DeviationForm>({1.0, over->value - *air});
        });
    }

    drift::Cell consumption_cell(std::size_t reading) const
    {
        const auto row = derived_of_engine("specific_fuel_consumption", reading);
        const auto fuel = engine_mean(record_.readings[reading], "fuel_consumption", prepared_[reading].conditions);
        const auto compared = row ? row->compared : std::nullopt;
        if (!compared || !row->expected || !fuel || !(*fuel > 0.0))
            return {};
        return mean_cell("fuel_consumption", reading, [&](const Quantity&, double) {
            return std::optional<DeviationForm>({*compared / *fuel, -*row->expected});
        });
    }

    const EngineRecord& record_;
    const Baseline& baseline_;
    const std::vector<PreparedReading>& prepared_;
    std::size_t cylinders_ = 0;
};

/// Whether any reading has a value of the quantity at a cylinder.
bool ever_read(const std::vector<PreparedReading>& prepared, QuantityId id)
{
    return std::any_of(prepared.begin(), prepared.end(), [&](const PreparedReading& p) {
        return std::any_of(p.values.begin(), p.values.end(), [&](const JudgedValue& v) { return v.quantity == id; });
    });
}

bool any_present(const drift::EngineChannel& channel)
{
    return std::any_of(channel.cells.begin(), channel.cells.end(), [](const drift::Cell& c) { return c.present; });
}

} // namespace

double months_of(TimePoint time)
{
    return static_cast<double>(time.time_since_epoch().count()) / 86400.0 / days_in_month;
}

std::optional<DeviationForm> deviation_form(const Engine& engine, const Baseline& baseline, const Quantity& q,
                                            double own, const Conditions& conditions, bool percent,
                                            std::optional<double> row_median)
{
    const Correction c = find_correction(engine, q, own, conditions);
    std::optional<double> expected;
    if (const BaselineCurve* curve = baseline.curve(conditions.mode, q.name); curve && conditions.load_percent)
        expected = curve->at(*conditions.load_percent);
    if (!expected && baseline.has(q.name))
        return std::nullopt;
    const std::optional<double> whole = expected ? expected : row_median;
    if (!percent)
        return DeviationForm{c.scale, c.shift - expected.value_or(0.0)};
    if (!whole || !(std::abs(*whole) > 0.0))
        return std::nullopt;
    return DeviationForm{100.0 * c.scale / *whole, 100.0 * (c.shift / *whole - 1.0)};
}

drift::Input make_drift_input(const EngineRecord& record, const Baseline& baseline,
                              const std::vector<PreparedReading>& prepared, const std::vector<char>& unsteady)
{
    drift::Input input;
    input.cylinders = static_cast<std::size_t>(record.engine.cylinders);
    for (std::size_t i = 0; i < prepared.size(); ++i) {
        input.months.push_back(months_of(record.readings[i].taken_at.utc));
        input.load_percent.push_back(prepared[i].conditions.load_percent);
        input.excluded.push_back(unsteady[i] || prepared[i].outside_baseline ? 1 : 0);
    }
    const InputMaker maker(record, baseline, prepared);
    for (const drift::CatalogueChannel& channel : drift::channel_catalogue()) {
        if (channel.subject == drift::Subject::cylinder) {
            const auto id = find_quantity(channel.quantity, Place::Kind::cylinder);
            if (id && ever_read(prepared, *id)) {
                input.channels.push_back(maker.cylinder_channel(channel, *id));
            } else if (const DerivedQuantity* derived = id ? nullptr : find_derived(channel.quantity)) {
                drift::Channel made = maker.derived_cylinder_channel(channel, *derived);
                if (std::any_of(made.cells.begin(), made.cells.end(), [](const drift::Cell& c) { return c.present; }))
                    input.channels.push_back(std::move(made));
            }
        } else if (channel.subject == drift::Subject::engine) {
            drift::EngineChannel made = maker.engine_channel(channel);
            if (any_present(made))
                input.engine_channels.push_back(std::move(made));
        }
    }
    mark_recorded_work(record, input);
    input.answers = answers_from_notes(record);
    return input;
}

} // namespace evenstroke
