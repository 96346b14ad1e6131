// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <QFont>
#include <QString>
#include <QStringList>

#include <array>
#include <unordered_map>

/// Type of the printed report. One unit is one point (1/72 inch) on every device: fonts are set by pixel size
/// and the device or its painter is scaled, so that a picture and the PDF break lines alike.
namespace evenstroke {

enum class ReportFont { body, bold, heading, title };
inline constexpr int report_fonts = 4;

const QFont& report_font(ReportFont font);
/// Distance between two lines of text, and from the top of a line to its baseline, in points.
double line_height(ReportFont font);
double ascent(ReportFont font);

/// Widths of text. Kerning is off in the report's fonts, so a text is as wide as its letters together;
/// that is looked up instead of laid out. Not shared between threads: each layout makes its own.
class TextMeasure
{
public:
    TextMeasure();
    double width(const QString& text, ReportFont font) const;
    /// Lines no wider than `width`; words that are wider themselves are cut.
    QStringList wrapped(const QString& text, double width, ReportFont font) const;
    /// Of the longest single word: a column cannot well be narrower.
    double widest_word(const QString& text, ReportFont font) const;

private:
    double letter(QChar c, ReportFont font) const;
    mutable std::array<std::unordered_map<char16_t, double>, report_fonts> letters_;
};

} // namespace evenstroke
