// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/survey/report_type.h"

#include <QFontMetricsF>

namespace evenstroke {
namespace {

QFont make_font(int points, bool bold)
{
    QFont font(QStringLiteral("DejaVu Sans"));
    font.setPixelSize(points);
    font.setBold(bold);
    font.setKerning(false);
    font.setHintingPreference(QFont::PreferNoHinting);
    return font;
}

std::size_t index_of(ReportFont font) { return static_cast<std::size_t>(font); }

} // namespace

const QFont& report_font(ReportFont font)
{
    static const std::array<QFont, report_fonts> fonts{make_font(9, false), make_font(9, true), make_font(11, true), make_font(16, true)};
    return fonts[index_of(font)];
}

double line_height(ReportFont font)
{
    static constexpr std::array<double, report_fonts> heights{11.5, 11.5, 14.0, 20.0};
    return heights[index_of(font)];
}

double ascent(ReportFont font)
{
    static constexpr std::array<double, report_fonts> ascents{8.8, 8.8, 10.8, 15.5}; // DejaVu Sans rises 0.93 to 0.96 of its size
    return ascents[index_of(font)];
}

TextMeasure::TextMeasure() = default;

double TextMeasure::letter(QChar c, ReportFont font) const
{
    auto& known = letters_[index_of(font)];
    const auto found = known.find(c.unicode());
    if (found != known.end())
        return found->second;
    const double width = QFontMetricsF(report_font(font)).horizontalAdvance(c);
    known.emplace(c.unicode(), width);
    return width;
}

double TextMeasure::width(const QString& text, ReportFont font) const
{
    double sum = 0.0;
    for (const QChar c : text)
        sum += letter(c, font);
    return sum;
}

QStringList TextMeasure::wrapped(const QString& text, double width_allowed, ReportFont font) const
{
    QStringList lines;
    QString line;
    double used = 0.0;
    const double space = letter(QLatin1Char(' '), font);
    const auto add_word = [&](const QString& word) {
        const double wide = width(word, font);
        if (!line.isEmpty() && used + space + wide > width_allowed) {
            lines.append(line);
            line.clear();
            used = 0.0;
        }
        used += wide + (line.isEmpty() ? 0.0 : space);
        line += (line.isEmpty() ? QString() : QStringLiteral(" ")) + word;
    };
    for (const QString& word : text.split(QLatin1Char(' '), Qt::SkipEmptyParts)) {
        QString rest = word;
        while (width(rest, font) > width_allowed && rest.size() > 1) {
            qsizetype fits = 1;
            while (fits < rest.size() && width(rest.left(fits + 1), font) <= width_allowed)
                ++fits;
            add_word(rest.left(fits));
            rest.remove(0, fits);
        }
        add_word(rest);
    }
    if (!line.isEmpty() || lines.isEmpty())
        lines.append(line);
    return lines;
}

double TextMeasure::widest_word(const QString& text, ReportFont font) const
{
    double widest = 0.0;
    for (const QString& word : text.split(QLatin1Char(' '), Qt::SkipEmptyParts))
        widest = std::max(widest, width(word, font));
    return widest;
}

} // namespace evenstroke
