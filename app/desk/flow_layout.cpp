// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/desk/flow_layout.h"

#include <QBoxLayout>
#include <QWidget>

#include <algorithm>

namespace evenstroke {

FlowLayout::~FlowLayout()
{
    for (QLayoutItem* item : items_)
        delete item;
}

QLayoutItem* FlowLayout::itemAt(int index) const
{
    return index >= 0 && index < count() ? items_[static_cast<std::size_t>(index)] : nullptr;
}

QLayoutItem* FlowLayout::takeAt(int index)
{
    QLayoutItem* item = itemAt(index);
    if (item)
        items_.erase(items_.begin() + index);
    return item;
}

void FlowLayout::setGeometry(const QRect& area)
{
    QLayout::setGeometry(area);
    lay_out(area, true);
}

QSize FlowLayout::minimumSize() const
{
    QSize size;
    for (const QLayoutItem* item : items_)
        size = size.expandedTo(item->minimumSize());
    const QMargins margins = contentsMargins();
    return size + QSize(margins.left() + margins.right(), margins.top() + margins.bottom());
}

/// Answers the height that the items need in the width of `area`.
int FlowLayout::lay_out(const QRect& area, bool place) const
{
    const QMargins margins = contentsMargins();
    const QRect inner = area.marginsRemoved(margins);
    int x = inner.left(), y = inner.top(), line_height = 0;
    for (QLayoutItem* item : items_) {
        if (item->isEmpty())
            continue; // hidden
        const QSize size = item->sizeHint();
        if (x + size.width() > inner.right() + 1 && x > inner.left()) {
            x = inner.left();
            y += line_height;
            line_height = 0;
        }
        if (place)
            item->setGeometry(QRect(QPoint(x, y), size));
        x += size.width() + gap_;
        line_height = std::max(line_height, size.height());
    }
    return y + line_height - area.top() + margins.bottom();
}

void let_flow(QHBoxLayout& row)
{
    auto* words = new QWidget;
    auto* flow = new FlowLayout(words, row.spacing());
    flow->setContentsMargins(0, 0, 0, 0);
    while (QLayoutItem* item = row.takeAt(0)) {
        if (QWidget* button = item->widget())
            flow->addWidget(button);
        delete item;
    }
    row.addWidget(words);
}

} // namespace evenstroke
