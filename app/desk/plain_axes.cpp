// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/desk/plain_axes.h"

#include "app/desk/theme.h"

#include <qcustomplot.h>

namespace evenstroke {

void style_plain_axes(QCustomPlot& plot, int ticks)
{
    for (QCPAxis* axis : {plot.xAxis, plot.yAxis}) {
        axis->setTickLabelFont(type(TypeSize::label));
        axis->setLabelFont(type(TypeSize::label));
        axis->setTickLabelColor(theme().muted);
        axis->setLabelColor(theme().muted);
        axis->setBasePen(axis == plot.xAxis ? QPen(theme().muted) : QPen(Qt::NoPen));
        axis->setTickPen(axis->basePen());
        axis->setSubTicks(false);
        axis->setTickLengthIn(0);
        axis->setTickLengthOut(axis == plot.xAxis ? 4 : 0);
        axis->ticker()->setTickCount(ticks);
        axis->setNumberFormat(QStringLiteral("gb"));
        axis->grid()->setPen(QPen(theme().rule));
        axis->grid()->setZeroLinePen(QPen(theme().rule));
    }
    plot.xAxis->grid()->setVisible(false);
}

} // namespace evenstroke
