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
                                    Value& value)
{
    const auto read = read_box(box, to_std(text), model.sheet().row_unit(box.quantity));
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

PastePlan plan_paste(const LogSheetModel& model, const QModelIndex& from, const QString& text)
{
    PastePlan plan;
    int row = from.row();
    const auto block = split_block(text);
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
                problem = cell_problem(model, *box, cell, value);
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
}

QString refusal_text(const PastePlan& plan)
{
    if (plan.refused.empty())
        return {};
    const RefusedCell& first = plan.refused.front();
    QString text = tr_("Row %1, column %2 of the block: %3 %4")
                       .arg(first.row)
                       .arg(first.column)
                       .arg(to_qstring(first.problem.what_happened), to_qstring(first.problem.what_to_do));
    const int more = static_cast<int>(plan.refused.size()) - 1;
    if (more > 0)
        text += u' ' + (more == 1 ? tr_("One more cell cannot be read.")
                                  : tr_("%1 more cells cannot be read.").arg(more));
    return text + u' ' + tr_("Nothing was pasted.");
}

} // namespace evenstroke
