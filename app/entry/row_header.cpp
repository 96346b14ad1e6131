// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/entry/row_header.h"

#include "app/desk/theme.h"
#include "app/entry/log_sheet_model.h"

#include <QMouseEvent>
#include <QPainter>

#include <algorithm>

namespace evenstroke {
namespace {

constexpr int header_width = 284, unit_width = 54, room = 8;

} // namespace

RowHeader::RowHeader(QWidget* parent) : QHeaderView(Qt::Vertical, parent)
{
    setSectionsClickable(true);
    setHighlightSections(false);
    setSectionResizeMode(QHeaderView::Fixed);
    setDefaultSectionSize(24);
    setMinimumSectionSize(20);
    setFixedWidth(header_width);
}

QSize RowHeader::sizeHint() const
{
    return {header_width, 24};
}

void RowHeader::set_current(int section)
{
    current_ = section;
    viewport()->update();
}

void RowHeader::paintSection(QPainter* painter, const QRect& rect, int section) const
{
    painter->save();
    painter->fillRect(rect, theme().page);
    const QString text = model()->headerData(section, Qt::Vertical).toString();
    if (model()->headerData(section, Qt::Vertical, LogSheetModel::heading_role).toBool()) {
        // A heading may be wider than the labels; it stands on the line that runs on under the columns'
        // heads.
        painter->setFont(type(TypeSize::body, true));
        painter->setPen(theme().ink);
        const QRect area = rect.adjusted(0, 0, -room, -4);
        painter->drawText(area, Qt::AlignLeft | Qt::AlignBottom,
                          painter->fontMetrics().elidedText(text, Qt::ElideRight, area.width()));
        painter->setPen(QPen(theme().muted, 1));
        painter->drawLine(rect.bottomLeft(), rect.bottomRight());
        painter->restore();
        return;
    }
    const QRect unit_area(rect.right() - unit_width - room, rect.top(), unit_width, rect.height());
    // A short unit leaves its room to a long title, bold in the row in hand: "Hours since cylinder overhaul".
    const QString unit_words = model()->headerData(section, Qt::Vertical, Qt::UserRole).toString();
    const int unit_room = QFontMetrics(type(TypeSize::label)).horizontalAdvance(unit_words);
    const int title_end = std::max(unit_area.left(), unit_area.right() - unit_room - room);
    const QRect title_area(rect.left(), rect.top(), title_end - rect.left() - 4, rect.height());
    painter->setFont(type(TypeSize::body, section == current_));
    painter->setPen(theme().ink);
    painter->drawText(title_area, Qt::AlignLeft | Qt::AlignVCenter,
                      painter->fontMetrics().elidedText(text, Qt::ElideRight, title_area.width()));
    painter->setFont(type(TypeSize::label));
    painter->setPen(theme().muted);
    painter->drawText(unit_area, Qt::AlignRight | Qt::AlignVCenter, unit_words);
    painter->restore();
}

void RowHeader::mouseReleaseEvent(QMouseEvent* event)
{
    QHeaderView::mouseReleaseEvent(event);
    const int section = logicalIndexAt(event->pos());
    if (section >= 0 && event->pos().x() > header_width - unit_width - room)
        emit unit_wanted(section);
}

} // namespace evenstroke
