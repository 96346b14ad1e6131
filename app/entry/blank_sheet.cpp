// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/entry/blank_sheet.h"

#include "app/desk/number_text.h"
#include "app/desk/theme.h"
#include "core/explanation/cautions.h"

#include <QCoreApplication>
#include <QPainter>
#include <QPrinter>

#include <algorithm>

namespace evenstroke {
namespace {

QString tr_(const char* text)
{
    return QCoreApplication::translate("evenstroke::blank_sheet", text);
}

// All lengths in points (1/72 inch).
constexpr double margin = 34, label_width = 158, unit_width = 44, row_height = 17, heading_height = 22;
constexpr double widest_box = 62, narrowest_box = 26;
constexpr double half_width = 268, half_label = 142, half_unit = 40, half_box = 46; // sections of lone boxes
constexpr double under_height = 8, beside_width = 30; // last time's value, under a box or beside a lone one
const QColor ink(Qt::black), grey(0x70, 0x70, 0x70);

QFont face(int points, bool bold = false)
{
    QFont font(QStringLiteral("DejaVu Sans"));
    font.setPixelSize(points); // the painter counts in points
    font.setBold(bold);
    return font;
}

/// What the walk takes people to. Fires and mist are alarm matters, but they must be known at the engine.
std::vector<const Caution*> cautions_of_the_walk(bool two_stroke)
{
    std::vector<const Caution*> found;
    for (const char* name : {"indicator_cocks", "high_pressure_fuel", "hot_surfaces", "overload",
                             "starting_air", "scavenge_fire", "crankcase"}) {
        const Caution* caution = find_caution(name);
        if (caution && (two_stroke || caution->name != "scavenge_fire"))
            found.push_back(caution);
    }
    return found;
}

/// Lays the sheet out from top to bottom; measuring and drawing are the same pass, so that they cannot
/// differ.
class SheetPrinter
{
public:
    SheetPrinter(const BlankSheet& sheet, QPrinter* printer, QPainter& painter, QSizeF page, int pages)
        : sheet_(sheet), printer_(printer), painter_(painter), page_(page), pages_(pages)
    {
    }
    int run();

private:
    bool draws() const { return printer_ != nullptr; }
    double bottom() const { return page_.height() - margin - 12; }
    void begin_page();
    void make_room(double height, const LogSection* continued = nullptr);
    void cautions();
    void section(const LogSection& section, bool again);
    void row(const LogSection& section, const LogRow& row);
    void single_rows(const LogSection& section);
    void single_row(const LogRow& row, double left, double y);
    bool in_two_columns(const LogRow& row) const;
    void boxes(const LogSection& section, const LogRow& row, std::size_t from, std::size_t count,
               double width);
    void box(const QRectF& area);
    void before(const LogBox& box, const QRectF& area, int flags);
    QString before_text(const LogBox& box) const;
    double line_height(const LogRow& row) const;
    void text(const QRectF& area, int flags, const QString& words, const QFont& font, const QColor& colour);
    double box_width(const LogSection& section) const;
    std::size_t boxes_a_line(const LogSection& section) const;
    double room() const { return page_.width() - 2 * margin - label_width - unit_width; }

    const BlankSheet& sheet_;
    QPrinter* printer_;
    QPainter& painter_;
    QSizeF page_;
    int pages_, page_number_ = 0;
    double y_ = 0.0;
};

void SheetPrinter::text(const QRectF& area, int flags, const QString& words, const QFont& font,
                        const QColor& colour)
{
    if (!draws())
        return;
    painter_.setFont(font);
    painter_.setPen(colour);
    painter_.drawText(area, flags, words);
}

int SheetPrinter::run()
{
    begin_page();
    cautions();
    for (const LogSection& each : sheet_.rows) {
        make_room(heading_height + 2 * row_height);
        section(each, false);
        if (each.columns.size() == 1)
            single_rows(each);
        for (const LogRow& each_row : each.rows) {
            if (each.columns.size() == 1 && in_two_columns(each_row))
                continue;
            const auto lines = (each_row.boxes.size() + boxes_a_line(each) - 1) / boxes_a_line(each);
            make_room(line_height(each_row) * static_cast<double>(lines), &each);
            row(each, each_row);
        }
        y_ += 6;
    }
    return page_number_;
}

void SheetPrinter::begin_page()
{
    if (draws() && page_number_ > 0)
        printer_->newPage();
    ++page_number_;
    y_ = margin;
    const double width = page_.width() - 2 * margin;
    const QString title = tr_("Log sheet: %1 of %2").arg(to_qstring(sheet_.engine->name), sheet_.vessel);
    text({margin, y_, width, 18}, Qt::AlignLeft | Qt::AlignVCenter, title, face(13, true), ink);
    y_ += 20;
    text({margin, y_, width, 18}, Qt::AlignLeft | Qt::AlignBottom,
         tr_("Date ____________   Ship's time ________   Offset from UTC ________"), face(9), ink);
    QString foot = tr_("Page %1 of %2").arg(page_number_).arg(pages_);
    if (sheet_.last)
        foot += QStringLiteral("  ·  ") + tr_("small grey: %1").arg(day_text(sheet_.last->taken_at.utc));
    foot += QStringLiteral("  ·  ") + tr_("* once for the whole ship");
    foot +=
        QStringLiteral("  ·  ") + tr_("leave a box empty rather than guess; write – where nothing is fitted");
    text({margin, page_.height() - margin - 8, width, 12}, Qt::AlignLeft | Qt::AlignVCenter, foot, face(7),
         grey);
    y_ += 24;
}

void SheetPrinter::make_room(double height, const LogSection* continued)
{
    if (y_ + height <= bottom())
        return;
    begin_page();
    if (continued)
        section(*continued, true);
}

void SheetPrinter::cautions()
{
    const double width = page_.width() - 2 * margin;
    const double top = y_;
    y_ += 4;
    text({margin + 6, y_, width - 12, 12}, Qt::AlignLeft | Qt::AlignVCenter, tr_("Before you go"),
         face(9, true), ink);
    y_ += 13;
    const QFontMetricsF metrics(face(7));
    const auto paragraph = [&](const QString& words) {
        const QRectF area(margin + 6, y_, width - 12, 200);
        const double height = metrics.boundingRect(area, Qt::TextWordWrap, words).height();
        text({area.left(), area.top(), area.width(), height + 2}, Qt::TextWordWrap, words, face(7), ink);
        y_ += height + 2;
    };
    const auto all = cautions_of_the_walk(sheet_.engine->two_stroke());
    for (const Caution* caution : all)
        paragraph(to_qstring(caution->title) + QStringLiteral(". ") + to_qstring(caution->short_text));
    if (!all.empty())
        paragraph(to_qstring(all.front()->authority));
    y_ += 3;
    if (draws()) {
        painter_.setPen(QPen(ink, 1));
        painter_.setBrush(Qt::NoBrush);
        painter_.drawRect(QRectF(margin, top, width, y_ - top));
    }
    y_ += 8;
}

/// Engines with many cylinders take two lines a row, as many boxes on each: a bank a line.
std::size_t SheetPrinter::boxes_a_line(const LogSection& section) const
{
    const auto fitting = std::max<std::size_t>(1, static_cast<std::size_t>(room() / narrowest_box));
    const std::size_t all = std::max<std::size_t>(1, section.columns.size()),
                      lines = (all + fitting - 1) / fitting;
    return (all + lines - 1) / lines;
}

double SheetPrinter::box_width(const LogSection& section) const
{
    return std::min(widest_box, room() / static_cast<double>(boxes_a_line(section)));
}

void SheetPrinter::section(const LogSection& section, bool again)
{
    const double width = page_.width() - 2 * margin;
    const QString title = to_qstring(section.title);
    text({margin, y_, width, heading_height - 4}, Qt::AlignLeft | Qt::AlignBottom,
         again ? tr_("%1 …").arg(title) : title, face(10, true), ink);
    const double each = box_width(section);
    double x = margin + label_width + unit_width;
    if (section.columns.size() <= boxes_a_line(section))
        for (const std::string& column : section.columns) {
            text({x, y_, each, heading_height - 4}, Qt::AlignHCenter | Qt::AlignBottom, to_qstring(column),
                 face(8), ink);
            x += each;
        }
    y_ += heading_height - 2;
    if (draws()) {
        painter_.setPen(QPen(ink, 0.8));
        painter_.drawLine(QPointF(margin, y_), QPointF(margin + width, y_));
    }
    y_ += 2;
}

void SheetPrinter::row(const LogSection& section, const LogRow& row)
{
    const Quantity& meant = quantity(row.quantity);
    QString label = to_qstring(meant.title);
    if (row.shared)
        label += QStringLiteral(" *");
    text({margin, y_, label_width - 4, row_height}, Qt::AlignLeft | Qt::AlignVCenter, label, face(8), ink);
    text({margin + label_width, y_, unit_width - 5, row_height}, Qt::AlignRight | Qt::AlignVCenter,
         to_qstring(row_unit_text(row.quantity, sheet_.row_unit(row.quantity))), face(7), grey);
    if (section.columns.size() == 1 && row.boxes.size() == 1) {
        // Words take the rest of the line, from where the boxes of the two columns above begin.
        const double left = margin + half_label + half_unit;
        box({left, y_, page_.width() - margin - left, row_height});
        y_ += row_height;
        return;
    }
    if (row.boxes.size() == 1) {
        boxes(section, row, 0, 1, meant.type == ValueType::words ? room() : widest_box);
        y_ += line_height(row);
        return;
    }
    const std::size_t a_line = boxes_a_line(section);
    for (std::size_t from = 0; from < row.boxes.size(); from += a_line) {
        boxes(section, row, from, std::min(a_line, row.boxes.size() - from), box_width(section));
        y_ += line_height(row);
    }
}

bool SheetPrinter::in_two_columns(const LogRow& row) const
{
    return quantity(row.quantity).type != ValueType::words;
}

/// Sections of lone boxes stand in two columns, down the left one first, so that the walk fits few sheets.
void SheetPrinter::single_rows(const LogSection& section)
{
    std::vector<const LogRow*> rows;
    for (const LogRow& row : section.rows)
        if (in_two_columns(row))
            rows.push_back(&row);
    const auto lines = (rows.size() + 1) / 2;
    make_room(row_height * static_cast<double>(lines), &section);
    for (std::size_t line = 0; line < lines; ++line) {
        single_row(*rows[line], margin, y_);
        if (line + lines < rows.size())
            single_row(*rows[line + lines], margin + half_width, y_);
        y_ += row_height;
    }
}

void SheetPrinter::single_row(const LogRow& row, double left, double y)
{
    const Quantity& meant = quantity(row.quantity);
    text({left, y, half_label - 4, row_height}, Qt::AlignLeft | Qt::AlignVCenter,
         to_qstring(meant.title) + (row.shared ? QStringLiteral(" *") : QString()), face(8), ink);
    text({left + half_label, y, half_unit - 5, row_height}, Qt::AlignRight | Qt::AlignVCenter,
         to_qstring(row_unit_text(row.quantity, sheet_.row_unit(row.quantity))), face(7), grey);
    box({left + half_label + half_unit, y, half_box, row_height});
    before(row.boxes.front(), {left + half_label + half_unit + half_box + 2, y, beside_width, row_height},
           Qt::AlignLeft | Qt::AlignVCenter);
}

void SheetPrinter::boxes(const LogSection& section, const LogRow& row, std::size_t from, std::size_t count,
                         double width)
{
    const bool wrapped = section.columns.size() > boxes_a_line(section); // then each box says whose it is
    double x = margin + label_width + unit_width;
    for (std::size_t i = from; i < from + count; ++i) {
        const QRectF area(x, y_, width, row_height);
        box(area);
        before(row.boxes[i], {x, y_ + row_height - 2, width, under_height}, Qt::AlignHCenter | Qt::AlignVCenter);
        if (wrapped && i < section.columns.size())
            text(area.adjusted(2, 1, -3, -2), Qt::AlignRight | Qt::AlignTop, to_qstring(section.columns[i]),
                 face(6), grey);
        x += width;
    }
}

void SheetPrinter::box(const QRectF& area)
{
    if (!draws())
        return;
    painter_.setPen(QPen(ink, 0.5));
    painter_.setBrush(Qt::NoBrush);
    painter_.drawRect(area.adjusted(1, 1, -1, -1));
}

/// Last time's value as it was typed; empty where there was none, or no number.
QString SheetPrinter::before_text(const LogBox& box) const
{
    const Value* before =
        sheet_.last && box.phase == Phase::reading ? sheet_.last->find(box.quantity, box.place) : nullptr;
    if (!before || quantity(box.quantity).type != ValueType::number || before->missing != MissingReason::none)
        return {};
    return to_qstring(box_text(*before, sheet_.row_unit(box.quantity)));
}

/// Outside the box, or it could be taken for this time's.
void SheetPrinter::before(const LogBox& box, const QRectF& area, int flags)
{
    text(area, flags, before_text(box), face(6), grey);
}

/// With room for last time's values under the boxes where there are any.
double SheetPrinter::line_height(const LogRow& row) const
{
    const bool any = std::any_of(row.boxes.begin(), row.boxes.end(),
                                 [this](const LogBox& box) { return !before_text(box).isEmpty(); });
    return row_height + (any ? under_height - 2 : 0);
}

} // namespace

int print_blank_sheet(const BlankSheet& sheet, QPrinter& printer)
{
    const double dots_a_point = printer.resolution() / 72.0;
    const QRectF paper = printer.paperRect(QPrinter::Point), printable = printer.pageRect(QPrinter::Point);
    QPainter painter(&printer);
    if (!painter.isActive())
        return 0;
    painter.scale(dots_a_point, dots_a_point);
    painter.translate(-printable.topLeft()); // counted from the paper's corner, so that the margins are ours
    const int pages = SheetPrinter(sheet, nullptr, painter, paper.size(), 0).run();
    return SheetPrinter(sheet, &printer, painter, paper.size(), pages).run();
}

} // namespace evenstroke
