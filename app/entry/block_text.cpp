// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/entry/block_text.h"

#include "app/desk/number_text.h"

#include <QCoreApplication>

#include <algorithm>
#include <map>

namespace evenstroke {
namespace {

QString tr_(const char* text)
{
    return QCoreApplication::translate("evenstroke::block", text);
}

/// Numbers go out with the sign the spreadsheet reads; words stay as they are.
QString cell_text(const EntrySheet& sheet, const LogBox& box, QChar decimal_sign)
{
    const Value* value = sheet.value(box);
    if (!value)
        return {};
    QString text = to_qstring(box_text(*value, sheet.row_unit(box.quantity)));
    if (value->number && value->missing == MissingReason::none)
        for (QChar& c : text)
            if (c == u'.' || c == u',')
                c = decimal_sign;
    if (text.contains(u'\t') || text.contains(u'\n') || text.startsWith(u'"'))
        text = u'"' + text.replace(u'"', QStringLiteral("\"\"")) + u'"';
    return text;
}

std::optional<Problem> cell_problem(const LogSheetModel& model, const LogBox& box, const QString& text,
                                    Value& value, WrittenUnit unit)
{
    const auto read = read_box(box, to_std(text), unit);
    if (!read) {
        Problem problem = read.error();
        problem.what_happened = to_std(model.box_name(box)) + ": " + problem.what_happened;
        return problem;
    }
    value = read.value();
    return std::nullopt;
}

} // namespace

std::vector<QStringList> split_block(const QString& text)
{
    std::vector<QStringList> rows(1, QStringList{QString()});
    bool quoted = false;
    for (qsizetype i = 0; i < text.size(); ++i) {
        const QChar c = text[i];
        QString& cell = rows.back().back();
        if (quoted && c == u'"' && i + 1 < text.size() && text[i + 1] == u'"') {
            cell += c;
            ++i;
        } else if (c == u'"' && (quoted || cell.isEmpty())) {
            quoted = !quoted;
        } else if (!quoted && c == u'\t') {
            rows.back().append(QString());
        } else if (!quoted && (c == u'\n' || c == u'\r')) {
            if (c == u'\r' && i + 1 < text.size() && text[i + 1] == u'\n')
                ++i;
            rows.push_back(QStringList{QString()});
        } else {
            cell += c;
        }
    }
    if (rows.size() > 1 && rows.back() == QStringList{QString()})
        rows.pop_back();
    return rows;
}

QString block_of(const LogSheetModel& model, const QItemSelection& selection, QChar decimal_sign)
{
    std::map<int, std::map<int, LogBox>> boxes; // row, column
    int first = model.columnCount(), last = -1;
    for (const QModelIndex& index : selection.indexes()) {
        if (const auto box = model.box(index)) {
            boxes[index.row()][index.column()] = *box;
            first = std::min(first, index.column());
            last = std::max(last, index.column());
        }
    }
    QStringList lines;
    for (const auto& [row, columns] : boxes) {
        QStringList cells;
        for (int column = first; column <= last; ++column) {
            const auto box = columns.find(column);
            cells << (box == columns.end() ? QString() : cell_text(model.sheet(), box->second, decimal_sign));
        }
        lines << cells.join(u'\t');
    }
    return lines.isEmpty() ? QString() : lines.join(u'\n') + u'\n';
}

QString whole_block(const EntrySheet& sheet, QChar decimal_sign)
{
    QStringList lines;
    for (const LogSection& section : sheet.sections()) {
        QStringList head{to_qstring(section.title), tr_("unit")};
        for (const std::string& column : section.columns)
            head << to_qstring(column);
        QStringList rows;
        for (const LogRow& row : section.rows) {
            QStringList cells{quantity_title(row.quantity),
                              to_qstring(row_unit_text(row.quantity, sheet.row_unit(row.quantity)))};
            bool any = false;
            for (const LogBox& box : row.boxes) {
                cells << cell_text(sheet, box, decimal_sign);
                any = any || !cells.last().isEmpty();
            }
            if (any)
                rows << cells.join(u'\t');
        }
        if (!rows.isEmpty())
            lines << head.join(u'\t') << rows;
    }
    return lines.isEmpty() ? QString() : lines.join(u'\n') + u'\n';
}

namespace {

bool same_words(const QString& a, const QString& b)
{
    return a.trimmed().compare(b.trimmed(), Qt::CaseInsensitive) == 0;
}

const LogSection* section_titled(const EntrySheet& sheet, const QStringList& cells)
{
    for (const LogSection& section : sheet.sections())
        if (cells.size() > 1 && same_words(cells[0], to_qstring(section.title)) && same_words(cells[1], tr_("unit")))
            return &section;
    return nullptr;
}

/// The row of that title: in the section named last, else anywhere but in the quick lines.
const LogRow* row_titled(const EntrySheet& sheet, const LogSection* in, const QString& title)
{
    const auto search = [&](const LogSection& section) -> const LogRow* {
        for (const LogRow& row : section.rows)
            if (same_words(title, quantity_title(row.quantity)))
                return &row;
        return nullptr;
    };
    if (const LogRow* row = in ? search(*in) : nullptr)
        return row;
    for (const LogSection& section : sheet.sections())
        if (const LogRow* row = search(section); row && row->boxes.front().phase == Phase::reading)
            return row;
    return nullptr;
}

/// The unit that stands behind a row's title; the row's own where none does, none where it cannot be read.
std::optional<WrittenUnit> titled_unit(const EntrySheet& sheet, QuantityId id, const QString& words)
{
    for (const WrittenUnit& written : possible_units(id))
        if (same_words(words, to_qstring(row_unit_text(id, written))))
            return written;
    if (words.trimmed().isEmpty())
        return sheet.row_unit(id);
    const auto found = find_unit(to_std(words.trimmed()));
    return found ? std::optional(found.value()) : std::nullopt;
}

/// One row of a block whose first cells are the row's title and unit.
void plan_titled_row(const LogSheetModel& model, const LogRow* target, const QStringList& cells, int row_number,
                     PastePlan& plan)
{
    const auto unit = target ? titled_unit(model.sheet(), target->quantity, cells[1]) : std::nullopt;
    for (int c = 2; c < cells.size(); ++c) {
        const QString cell = cells[c].trimmed();
        if (cell.isEmpty())
            continue;
        std::optional<Problem> problem;
        Value value;
        const auto at = static_cast<std::size_t>(c - 2);
        if (!target)
            problem = invalid_input(to_std(tr_("This sheet has no row “%1”.").arg(cells[0].trimmed())),
                                    to_std(tr_("Write its title as it stands on the sheet, or type the values.")));
        else if (!unit)
            problem = invalid_input(to_std(tr_("%1: the unit “%2” is not known.").arg(cells[0].trimmed(), cells[1])),
                                    to_std(tr_("Put the unit in the second column right, or empty it.")));
        else if (at >= target->boxes.size())
            problem = invalid_input(to_std(tr_("%1 has no box for “%2”.").arg(cells[0].trimmed(), cell)),
                                    to_std(tr_("The block has more columns than this engine's sheet.")));
        else
            problem = cell_problem(model, target->boxes[at], cell, value, *unit);
        if (problem) {
            plan.refused.push_back({row_number, c + 1, cell, *problem});
        } else {
            plan.values.push_back(value);
            plan.boxes << model.index_of(target->boxes[at]);
        }
    }
}

/// A block of whole rows with their titles, as `whole_block` writes it: laid out by the titles, wherever the
/// cursor stands. None where the block is no such one.
std::optional<PastePlan> plan_titled(const LogSheetModel& model, const std::vector<QStringList>& block)
{
    const EntrySheet& sheet = model.sheet();
    PastePlan plan;
    const LogSection* section = nullptr;
    bool recognised = false;
    for (std::size_t r = 0; r < block.size(); ++r) {
        if (const LogSection* named = section_titled(sheet, block[r])) {
            section = named;
            recognised = true;
            continue;
        }
        if (block[r].size() < 3)
            continue;
        const LogRow* row = row_titled(sheet, section, block[r][0]);
        recognised = recognised || row;
        plan_titled_row(model, row, block[r], static_cast<int>(r) + 1, plan);
    }
    return recognised ? std::optional(plan) : std::nullopt;
}

} // namespace

PastePlan plan_paste(const LogSheetModel& model, const QModelIndex& from, const QString& text)
{
    const auto block = split_block(text);
    if (auto titled = plan_titled(model, block))
        return std::move(*titled);
    PastePlan plan;
    int row = from.row();
    for (std::size_t r = 0; r < block.size(); ++r) {
        while (row < model.rowCount() && !model.row(row))
            ++row;
        for (int c = 0; c < block[r].size(); ++c) {
            const QString cell = block[r][c].trimmed();
            if (cell.isEmpty())
                continue;
            const QModelIndex target = model.index(row, from.column() + c);
            const auto box = model.box(target);
            Value value;
            std::optional<Problem> problem;
            if (box)
                problem = cell_problem(model, *box, cell, value, model.sheet().row_unit(box->quantity));
            else
                problem = invalid_input(to_std(tr_("There is no box here for “%1”.").arg(cell)),
                                        to_std(tr_("Begin the paste further to the left or higher up.")));
            if (problem) {
                plan.refused.push_back({static_cast<int>(r) + 1, c + 1, cell, *problem});
            } else {
                plan.values.push_back(value);
                plan.boxes << target;
            }
        }
        ++row;
    }
    return plan;
}

void apply_paste(LogSheetModel& model, const PastePlan& plan)
{
    if (plan.values.empty())
        return;
    QUndoStack& undo = model.undo_stack();
    undo.beginMacro(plan.values.size() == 1 ? tr_("paste one value")
                                            : tr_("paste %1 values").arg(plan.values.size()));
    for (const Value& value : plan.values)
        model.put(value, {});
    undo.endMacro();
    if (std::any_of(plan.boxes.begin(), plan.boxes.end(), [](const QModelIndex& box) { return !box.isValid(); }))
        model.unfold_filled();
}

QString refusal_text(const PastePlan& plan)
{
    if (plan.refused.empty())
        return {};
    constexpr std::size_t named = 4; // more do not fit the line
    QStringList cells;
    for (std::size_t i = 0; i < plan.refused.size() && i < named; ++i) {
        const RefusedCell& cell = plan.refused[i];
        cells << tr_("Row %1, column %2 of the block: %3 %4")
                     .arg(cell.row)
                     .arg(cell.column)
                     .arg(to_qstring(cell.problem.what_happened), to_qstring(cell.problem.what_to_do));
    }
    QString text = cells.join(u' ');
    const std::size_t more = plan.refused.size() - static_cast<std::size_t>(cells.size());
    if (more > 0)
        text += u' ' + (more == 1 ? tr_("One more cell cannot be read.")
                                  : tr_("%1 more cells cannot be read.").arg(more));
    const std::size_t good = plan.values.size();
    if (good > 0)
        text += u' ' + (good == 1 ? tr_("The other cell can be read.")
                                  : tr_("The other %1 cells can be read.").arg(good));
    return text + u' ' + tr_("Nothing was pasted.");
}

} // namespace evenstroke
