// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/survey/typesetter.h"

namespace evenstroke {

void Typesetter::new_page(bool landscape)
{
    pages_.push_back({landscape, {}});
    y_ = top;
}

void Typesetter::need(double height)
{
    if (height > room() && !at_page_top())
        new_page(landscape());
}

void Typesetter::text(double x, double below, const QString& words, ReportFont font, bool muted)
{
    if (!words.isEmpty())
        item(TextItem{x, y_ + below + ascent(font), font, muted, words});
}

void Typesetter::text_right(double right_edge, double below, const QString& words, ReportFont font, bool muted)
{
    text(right_edge - measure_.width(words, font), below, words, font, muted);
}

void Typesetter::rule(double x1, double x2, double below, double line_width, bool strong)
{
    item(RuleItem{x1, y_ + below, x2, y_ + below, line_width, strong});
}

void Typesetter::paragraph(const QString& words, ReportFont font, double x, double wide, bool muted)
{
    const QStringList lines = measure_.wrapped(words, wide, font);
    need(line_height(font) * static_cast<double>(std::min<qsizetype>(lines.size(), 3)));
    for (const QString& line : lines) {
        need(line_height(font));
        text(x, 0.0, line, font, muted);
        move_down(line_height(font));
    }
}

} // namespace evenstroke
