// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "app/desk/theme.h"

#include <qcustomplot.h>

namespace evenstroke {

/// A level's mark at a point, drawn as lines so that it stays sharp on paper.
class MarkItem : public QCPAbstractItem
{
    Q_OBJECT

public:
    MarkItem(QCustomPlot* plot, Level level, const Theme& theme);
    double selectTest(const QPointF& position, bool only_selectable, QVariant* details = nullptr) const override;
    QCPItemPosition* const position;

protected:
    void draw(QCPPainter* painter) override;

private:
    Level level_;
    const Theme& theme_;
};

/// A small flag that stands on the time axis, with its word beside it where there is room.
class EventItem : public QCPAbstractItem
{
    Q_OBJECT

public:
    EventItem(QCustomPlot* plot, QCPAxisRect* rect, const Theme& theme, QString word);
    double selectTest(const QPointF& position, bool only_selectable, QVariant* details = nullptr) const override;
    void set_word_shown(bool shown) { word_shown_ = shown; }
    /// Where flag and word stand, in pixels of the plot.
    QRectF area() const;
    QCPItemPosition* const position; ///< x in time, y on the axis rect's bottom

protected:
    void draw(QCPPainter* painter) override;

private:
    const Theme& theme_;
    QString word_;
    bool word_shown_ = true;
};

} // namespace evenstroke
