// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/survey/rounding.h"
#include "core/survey/survey_context.h"

#include <algorithm>
#include <set>

namespace evenstroke::report {
namespace {

/// Unit and kind that all typed values of a quantity share; nothing where they differ.
struct SharedUnit
{
    std::optional<std::pair<UnitId, PressureKind>> unit;
    bool mixed = false;

    void add(const Value& value)
    {
        const std::pair<UnitId, PressureKind> typed{value.unit, value.kind};
        mixed = mixed || (unit && *unit != typed);
        unit = typed;
    }
    std::string words(const Quantity& of) const
    {
        if (mixed)
            return "in the unit of each row";
        return unit ? unit_words(unit->first, unit->second) : unit_of(of);
    }
};

enum class Line { read, corrected, deviation, apart };
std::string line_title(Line line)
{
    switch (line) {
    case Line::read: return "read";
    case Line::corrected: return "corrected";
    case Line::deviation: return "deviation";
    case Line::apart: break;
    }
    return "apart";
}

using TypedUnit = std::pair<UnitId, PressureKind>;

/// The unit in which most values of a row were typed: it stands once beside them. Nothing where none was typed.
std::optional<TypedUnit> row_unit(const std::vector<const ValueCell*>& row)
{
    std::map<TypedUnit, int> counts;
    for (const ValueCell* cell : row)
        if (cell && cell->value && cell->value->number)
            ++counts[{cell->value->unit, cell->value->kind}];
    const auto most = std::max_element(counts.begin(), counts.end(), [](const auto& a, const auto& b) { return a.second < b.second; });
    return most == counts.end() ? std::nullopt : std::optional<TypedUnit>(most->first);
}

/// @param unit of the row: a value typed in another one has it behind it
std::string read_text(const ValueCell& cell, const std::optional<TypedUnit>& unit)
{
    if (!cell.value)
        return missing_words(MissingReason::not_read);
    const Value& value = *cell.value;
    if (value.typed.empty() && value.words.empty())
        return missing_words(value.missing);
    std::string text = value.typed.empty() ? value.words : value.typed;
    if (value.number && unit && *unit != TypedUnit{value.unit, value.kind})
        text += " " + unit_words(value.unit, value.kind);
    if (cell.judged && cell.judged->doubtful)
        text += "?";
    return text;
}

std::string cell_text(const Quantity& of, const ValueCell* cell, Line line, const std::optional<TypedUnit>& unit)
{
    if (line == Line::read)
        return read_text(cell ? *cell : ValueCell{}, unit);
    if (!cell || !cell->judged)
        return {};
    const JudgedValue& judged = *cell->judged;
    if (line == Line::corrected)
        return judged.corrected ? rounded_text(*judged.corrected, of.decimals) : "\u2013";
    const auto& amount = line == Line::deviation ? judged.deviation : judged.apart;
    return amount ? rounded_text(*amount, of.decimals, Sign::always) : "\u2013";
}

const ValueCell* find_cell(const Context& context, std::size_t i, QuantityId id, const Place& place)
{
    const auto found = context.cells[i].find({id, place});
    return found == context.cells[i].end() ? nullptr : &found->second;
}

/// What is there to print of one quantity.
struct Extent
{
    bool any = false;                ///< something was typed
    bool any_number = false;
    std::set<Line> lines{Line::read};
    SharedUnit unit;
    std::set<std::string> not_corrected; ///< "2030-05-02: inlet air temperature"
    bool doubtful = false;
};

Extent extent_of(const Context& context, const Quantity& of, const std::vector<std::size_t>& readings)
{
    Extent extent;
    for (const std::size_t i : readings)
        for (const auto& [key, cell] : context.cells[i]) {
            if (key.first != of.id)
                continue;
            if (cell.value && (!cell.value->typed.empty() || !cell.value->words.empty())) {
                extent.any = true;
                if (cell.value->number)
                    extent.unit.add(*cell.value);
                extent.any_number = extent.any_number || cell.value->number.has_value();
            }
            if (!cell.judged)
                continue;
            const JudgedValue& judged = *cell.judged;
            extent.doubtful = extent.doubtful || judged.doubtful;
            if (of.correction_form != CorrectionForm::none && (judged.corrected || !judged.missing_input.empty()))
                extent.lines.insert(Line::corrected);
            if (judged.deviation)
                extent.lines.insert(Line::deviation);
            if (judged.apart)
                extent.lines.insert(Line::apart);
            if (!judged.corrected && !judged.missing_input.empty())
                extent.not_corrected.insert(date_text(context.record.readings[context.readings[i]].taken_at.utc) + ": "
                                            + judged.missing_input);
        }
    return extent;
}

std::string notes(const Quantity& of, const Extent& extent, bool unsteady)
{
    std::string text;
    if (of.correction_form == CorrectionForm::none)
        text += "Not corrected to reference conditions. ";
    if (!extent.not_corrected.empty()) {
        text += "Not corrected for want of a condition: ";
        for (const std::string& line : extent.not_corrected)
            text += (line == *extent.not_corrected.begin() ? "" : "; ") + line;
        text += ". ";
    }
    if (extent.doubtful)
        text += "? = doubted and held out of the comparison. ";
    if (unsteady)
        text += "\u25cb = not usable for comparison. ";
    if (!text.empty())
        text.pop_back();
    return text;
}

/// "2031-03-14"; in narrow headings "14 Mar" over "2031": no date is broken at its hyphens.
std::string date_cell(const Context& context, std::size_t i, bool& unsteady, bool narrow = false)
{
    const std::size_t reading = context.readings[i];
    const TimePoint at = context.record.readings[reading].taken_at.utc;
    std::string date = narrow ? short_date(at) : date_text(at);
    if (narrow)
        date.replace(date.find(' '), 1, "\u00a0");
    if (!usable(context.judgement.readings[reading])) {
        unsteady = true;
        date += narrow ? "\u25cb" : " \u25cb";
    }
    return date;
}

/// Nobody entered anything, not even why not.
bool is_blank(const ValueCell* cell)
{
    return !cell || !cell->value ||
           (cell->value->typed.empty() && cell->value->words.empty() &&
            (cell->value->missing == MissingReason::none || cell->value->missing == MissingReason::not_read));
}

std::vector<const ValueCell*> cells_of(const Context& context, std::size_t i, QuantityId id)
{
    std::vector<const ValueCell*> cells;
    for (int number = 1; number <= context.engine.cylinders; ++number)
        cells.push_back(find_cell(context, i, id, Place::cylinder(number)));
    return cells;
}

/// Readings at which a quantity was read on no cylinder stand in one line under its table instead of a row each.
Table cylinder_table(const Context& context, const Quantity& of, const Extent& extent, const std::vector<std::size_t>& readings)
{
    Table table;
    table.caption = of.title + ", " + extent.unit.words(of) + " as typed; corrected in " + unit_of(of);
    if (extent.lines.size() == 1)
        table.caption = of.title + (extent.unit.words(of).empty() ? "" : ", " + extent.unit.words(of)) + ", as typed";
    else if (extent.lines.count(Line::deviation) + extent.lines.count(Line::apart) > 0)
        table.caption += "; deviation and apart in " + deviation_unit(of);
    table.key_columns = 3;
    table.columns = {{"Reading", Column::Kind::words}, {"Load", Column::Kind::number}, {"", Column::Kind::words}};
    for (int number = 1; number <= context.engine.cylinders; ++number)
        table.columns.push_back({context.engine.cylinder_name(number), Column::Kind::number});
    bool unsteady = false;
    std::string not_read;
    for (const std::size_t i : readings) {
        const std::vector<const ValueCell*> cells = cells_of(context, i, of.id);
        if (std::all_of(cells.begin(), cells.end(), is_blank)) {
            not_read += (not_read.empty() ? "Not read on any cylinder: " : ", ") + date_text(context.record.readings[context.readings[i]].taken_at.utc);
            continue;
        }
        for (const Line line : extent.lines) {
            const bool first = line == Line::read;
            const auto unit = row_unit(cells);
            const std::string in = first && extent.unit.mixed && unit ? ", " + unit_words(unit->first, unit->second) : "";
            Row row{{first ? date_cell(context, i, unsteady) : "",
                     first ? load_words(context.judgement.readings[context.readings[i]].load_percent) : "", line_title(line) + in},
                    first};
            for (const ValueCell* cell : cells)
                row.cells.push_back(cell_text(of, cell, line, unit));
            table.rows.push_back(std::move(row));
        }
    }
    const std::string others = notes(of, extent, unsteady);
    table.note = not_read.empty() ? others : not_read + "." + (others.empty() ? "" : " " + others);
    return table;
}

/// The places of a quantity that were read at all, in order.
std::set<Place> places_of(const Context& context, QuantityId id)
{
    std::set<Place> places;
    for (const auto& row : context.cells)
        for (auto found = row.lower_bound({id, Place{}}); found != row.end() && found->first.first == id; ++found)
            places.insert(found->first.second);
    return places;
}

void add_engine_rows(const Context& context, const Quantity& of, const std::vector<std::size_t>& readings, Table& table, bool& doubtful)
{
    const Extent extent = extent_of(context, of, readings);
    if (!extent.any_number)
        return;
    doubtful = doubtful || extent.doubtful;
    for (const Place& place : places_of(context, of.id))
        for (const Line line : extent.lines) {
            if (line == Line::apart)
                continue;
            const bool first = line == Line::read;
            const bool numbered = place.number > 0;
            const std::string title = of.title + (numbered ? ", " + place_text(place) : "");
            std::vector<const ValueCell*> cells;
            for (const std::size_t i : readings)
                cells.push_back(find_cell(context, i, of.id, place));
            const auto unit = row_unit(cells);
            const std::string read_in = unit ? unit_words(unit->first, unit->second) : unit_of(of);
            Row row{{first ? title : "", first ? read_in : line == Line::deviation ? deviation_unit(of) : unit_of(of), line_title(line)}, first};
            for (const ValueCell* cell : cells)
                row.cells.push_back(cell_text(of, cell, line, unit));
            table.rows.push_back(std::move(row));
        }
}

/// "17:30" of "1730", "17.30" or "17h30"; other words as they stand.
std::string clock_text(const std::string& typed)
{
    std::string digits;
    for (const char c : typed)
        if (c >= '0' && c <= '9')
            digits += c;
        else if (c != ':' && c != '.' && c != 'h' && c != ' ')
            return typed;
    if (digits.size() == 3)
        digits.insert(0, "0");
    return digits.size() == 4 && digits < "2400" && digits[2] < '6' ? digits.substr(0, 2) + ":" + digits.substr(2) : typed;
}

/// Words and choices: printed where they changed, remarks always.
Table words_table(const Context& context, const std::vector<std::size_t>& readings)
{
    Table table{"Words, choices and remarks, where they changed",
                {{"Reading", Column::Kind::words}, {"Quantity", Column::Kind::words}, {"Entry", Column::Kind::remark}}, {}, 1, {}};
    std::map<CellKey, std::string> before;
    for (const std::size_t i : readings) {
        bool first = true;
        for (const auto& [key, cell] : context.cells[i]) {
            const Quantity& of = quantity(key.first);
            if (of.type == ValueType::number || !cell.value)
                continue;
            std::string text = cell.value->words.empty() ? cell.value->typed : cell.value->words;
            if (of.name == "quick_line_time")
                text = clock_text(text);
            if (text.empty() || (before[key] == text && of.name != "reading_remark"))
                continue;
            before[key] = text;
            const std::string place = key.second.number > 0 ? ", " + place_words(context.engine, key.second) : "";
            bool unsteady = false;
            table.rows.push_back({{first ? date_cell(context, i, unsteady) : "", of.title + place, text}, first});
            first = false;
        }
    }
    return table;
}

bool belongs(const Quantity& of, const Engine& engine)
{
    return of.only_for.empty() || (of.only_for == "two-stroke") == engine.two_stroke();
}

/// Why a quantity has no value at all in the period; nothing where it has one.
std::optional<MissingReason> reason_never_read(const Context& context, QuantityId id)
{
    MissingReason reason = MissingReason::not_read;
    for (const auto& row : context.cells)
        for (auto found = row.lower_bound({id, Place{}}); found != row.end() && found->first.first == id; ++found) {
            if (!found->second.value)
                continue;
            if (!found->second.value->typed.empty() || !found->second.value->words.empty())
                return std::nullopt;
            if (found->second.value->missing != MissingReason::none)
                reason = found->second.value->missing;
        }
    return reason;
}

/// What was asked for and is nowhere in the period, so that a gap does not pass unseen.
std::vector<Paragraph> never_read(const Context& context)
{
    std::map<MissingReason, std::string> names;
    for (const Quantity& of : all_quantities()) {
        const auto reason = reason_never_read(context, of.id);
        if (!reason || !belongs(of, context.engine) || (of.need == Need::optional && *reason == MissingReason::not_read))
            continue;
        std::string& list = names[*reason];
        list += (list.empty() ? "" : ", ") + lower_first(of.title) + (of.per == Place::Kind::cylinder ? " (cylinders)" : "");
    }
    std::vector<Paragraph> paragraphs;
    for (const auto& [reason, list] : names)
        paragraphs.push_back({upper_first(missing_words(reason)) + " in this period: " + list + ".", {}});
    return paragraphs;
}

} // namespace

Section cylinder_values_section(const Context& context)
{
    Section section{"Values of the cylinders", true, {}};
    section.blocks.push_back(Paragraph{
        "Read: as typed. Corrected: brought to the reference conditions. Deviation: corrected less the baseline at the "
        "same load, or as read where there is nothing to correct. Apart: the deviation less the median of the other "
        "cylinders' deviations, a cylinder's own lasting offset included.", Paragraph::Style::muted});
    const auto readings = context.printed_readings();
    for (const Quantity& of : all_quantities()) {
        if (of.per != Place::Kind::cylinder || of.type != ValueType::number)
            continue;
        const Extent extent = extent_of(context, of, readings);
        if (extent.any)
            section.blocks.push_back(cylinder_table(context, of, extent, readings));
    }
    return section;
}

Section engine_values_section(const Context& context)
{
    Section section{"Values of the engine, its turbochargers and coolers, and the ship", true, {}};
    const auto readings = context.printed_readings();
    Table table{"Read as typed; corrected; deviation from the baseline at the same load",
                {{"Quantity", Column::Kind::words}, {"Unit", Column::Kind::words}, {"", Column::Kind::words}}, {}, 3, {}};
    bool unsteady = false, doubtful = false;
    for (const std::size_t i : readings)
        table.columns.push_back({date_cell(context, i, unsteady, true), Column::Kind::number});
    for (const Quantity& of : all_quantities())
        if (of.per != Place::Kind::cylinder && of.type == ValueType::number)
            add_engine_rows(context, of, readings, table, doubtful);
    table.note = std::string("A quantity without a line \u201ccorrected\u201d is not corrected to reference conditions.")
                 + (doubtful ? " ? = doubted and held out of the comparison." : "")
                 + (unsteady ? " \u25cb = not usable for comparison." : "");
    if (!table.rows.empty())
        section.blocks.push_back(std::move(table));
    return section;
}

Section words_section(const Context& context)
{
    Section section{"Words, choices and what was not read", false, {}};
    Table words = words_table(context, context.printed_readings());
    if (!words.rows.empty())
        section.blocks.push_back(std::move(words));
    for (Paragraph& paragraph : never_read(context))
        section.blocks.push_back(std::move(paragraph));
    return section;
}

} // namespace evenstroke::report
