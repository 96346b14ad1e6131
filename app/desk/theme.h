// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "app/desk/number_text.h"
#include "core/trend/judgement.h"

#include <QColor>
#include <QFont>
#include <QPen>
#include <QRectF>
#include <QString>

class QPainter;

/// Colours, type and marks of the whole program in one place. Ink on paper by day, dim and warm by night,
/// black and grey in print. Text colours keep 4.5:1 against page and sheet (tests check it).
namespace evenstroke {

enum class ThemeKind { day, night, print };

struct Theme
{
    ThemeKind kind = ThemeKind::day;
    QColor page, sheet;  ///< behind everything; behind what is typed or chosen
    QColor ink, muted;   ///< text; labels and second lines
    QColor rule;         ///< lines between groups and the grid of plots
    QColor line, others; ///< the line in question; the lines it is compared with
    QColor band;         ///< the usual or expected band, opaque (print: use `band_brush`)
    QColor note, watch, act, ask;

    bool print() const { return kind == ThemeKind::print; }
    /// Colour of a level's mark and word; quiet, learning and no_data have no colour of their own: muted.
    QColor level_colour(Level level) const;
    /// The band: the plain colour on screens, hatching in print.
    QBrush band_brush() const;
    /// One of five grey levels for the lines in the background, 0 = strongest.
    QColor others_level(int index) const;
    /// Solid by day and night. In print the lines differ by their dashes: 0 solid, 1 dashed, ...
    QPen pen(const QColor& colour, int style_index = 0) const;
};

/// A solid colour between two. @param share 0 gives `from`, 1 gives `to`
QColor mixed(const QColor& from, const QColor& to, double share);

const Theme& theme_of(ThemeKind kind);
/// The one in force on the screen (day or night).
const Theme& theme();
/// Puts palette, style sheet and font of the application. Widgets that paint for themselves are told by
/// QEvent::StyleChange and ask `theme()` anew.
void set_theme(ThemeKind kind);

/// Sizes of type in points; digits are tabular in the face used.
enum class TypeSize { label, body, title, figure };
QFont type(TypeSize size, bool bold = false);

/// The mark of a level: note hollow ring, watch half-filled ring, act filled square, ask a question mark in a
/// lozenge; nothing for the others. Drawn into the largest square centred in `area`; 12 px is the usual size.
void draw_mark(QPainter& painter, const QRectF& area, Level level, const Theme& colours = theme());
bool has_mark(Level level);
/// The same as a picture for labels and tables.
QPixmap mark_pixmap(Level level, int size, double device_pixel_ratio, const Theme& colours = theme());

/// "watch": the level's word, translated.
QString level_text(Level level);

/// A worded action where its subject stands, instead of an icon: flat, underlined on hover and focus.
/// Set on a QPushButton: `button->setProperty("worded", true)`. A line that names what is wrong:
/// `label->setProperty("caution", true)`. Second lines: `label->setProperty("muted", true)`; 9 pt labels:
/// `setProperty("small", true)`; page titles: `setProperty("title", true)`; key figures: "figure".
QString style_sheet(const Theme& colours);
/// Chosen words stand in bold: the worded buttons below `within` that can be chosen get room for it, so that
/// nothing is cut off or moves.
void keep_room_for_bold(QWidget& within);

} // namespace evenstroke
