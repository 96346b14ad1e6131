// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <QHeaderView>

namespace evenstroke {

/// The labels at the left of the log sheet: quantity and, muted at the right, the unit of its row. Headings
/// of sections stand here too. Clicking a unit asks for another.
class RowHeader : public QHeaderView
{
    Q_OBJECT

public:
    explicit RowHeader(QWidget* parent);
    void set_current(int section);

    QSize sizeHint() const override;

signals:
    void unit_wanted(int section);

protected:
    void paintSection(QPainter* painter, const QRect& rect, int section) const override;
    void mouseReleaseEvent(QMouseEvent* event) override;

private:
    int current_ = -1;
};

} // namespace evenstroke
