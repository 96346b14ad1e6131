// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "app/desk/theme.h"
#include "app/reading/figure.h"

#include <qcustomplot.h>

namespace evenstroke {

/// Draws a Figure: lines one pixel wide, words at the lines' ends instead of a legend, few ticks on round numbers.
class FigurePlot : public QCustomPlot
{
    Q_OBJECT

public:
    explicit FigurePlot(QWidget* parent = nullptr);
    void show_figure(const Figure& figure, const Theme& colours);
    const Figure& figure() const { return figure_; }
    QSize minimumSizeHint() const override { return {160, 80}; }
    /// The same figure on paper.
    static void paint(const Figure& figure, QCPPainter& painter, const QSize& size);

signals:
    void dot_chosen(std::size_t dot); ///< index in Figure::dots

protected:
    void mousePressEvent(QMouseEvent* event) override;
    void resizeEvent(QResizeEvent* event) override;

private:
    void draw_all();
    void style_axes();
    void set_margins();
    void add_layers();
    void add_curve(const FigureCurve& curve);
    void add_dots();
    void add_dot_label(const FigureDot& dot);
    void add_mark(const FigureMark& mark);
    void add_titles();
    QCPItemText* add_text(const QString& text, const QColor& colour, Qt::Alignment alignment, bool bold = false);
    QColor colour_of(FigureRole role) const;
    int label_width(const QString& label, bool bold = false) const;

    Figure figure_;
    const Theme* theme_;
};

} // namespace evenstroke
