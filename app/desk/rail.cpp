// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/desk/rail.h"

#include "app/desk/theme.h"

#include <QButtonGroup>
#include <QLabel>
#include <QPainter>
#include <QVBoxLayout>

namespace evenstroke {

namespace {
constexpr int rail_width = 176, line_height = 34, bar_width = 3, left_margin = 20, title_left = 42;
}

RailButton::RailButton(QChar key, const QString& title, QWidget* parent)
    : QAbstractButton(parent), key_(key), title_(title)
{
    setCheckable(true);
    setFocusPolicy(Qt::TabFocus);
    setAttribute(Qt::WA_Hover);
    setText(title);
    setToolTip(tr("%1, key %2").arg(title, QString(key)));
    set_count(0);
}

void RailButton::set_count(int count)
{
    count_ = count;
    setAccessibleName(count > 0 ? tr("%1, %n new", nullptr, count).arg(title_) : title_);
    update();
}

void RailButton::set_remark(const QString& remark)
{
    remark_ = remark;
    setAccessibleDescription(remark);
    setToolTip(remark.isEmpty() ? tr("%1, key %2").arg(title_, QString(key_)) : tr("%1, key %2: %3").arg(title_, QString(key_), remark));
    update();
}

QSize RailButton::sizeHint() const { return {rail_width, line_height}; }

void RailButton::paintEvent(QPaintEvent*)
{
    const Theme& t = theme();
    QPainter painter(this);
    if (isChecked()) {
        painter.fillRect(rect(), t.sheet);
        painter.fillRect(QRect(0, 0, bar_width, height()), t.line);
    } else if (underMouse() && isEnabled()) {
        painter.fillRect(rect(), t.sheet);
    }
    painter.setFont(type(TypeSize::label));
    painter.setPen(isEnabled() ? t.muted : t.others);
    painter.drawText(QRect(left_margin, 0, 20, height()), Qt::AlignVCenter | Qt::AlignLeft, QString(key_));
    painter.setPen(!isEnabled() ? t.others : isChecked() ? t.ink : t.muted);
    painter.setFont(type(TypeSize::body, isChecked()));
    painter.drawText(QRect(title_left, 0, width() - title_left, height()), Qt::AlignVCenter | Qt::AlignLeft, title_);
    if (count_ > 0) {
        painter.setFont(type(TypeSize::label));
        painter.setPen(t.ink);
        painter.drawText(rect().adjusted(0, 0, -20, 0), Qt::AlignVCenter | Qt::AlignRight, QString::number(count_));
    }
    if (count_ == 0 && !remark_.isEmpty()) {
        const int title_right = title_left + QFontMetrics(painter.font()).horizontalAdvance(title_) + 8;
        painter.setFont(type(TypeSize::label));
        painter.setPen(t.ink);
        const QRect area = rect().adjusted(title_right, 0, -8, 0);
        painter.drawText(area, Qt::AlignVCenter | Qt::AlignRight, painter.fontMetrics().elidedText(remark_, Qt::ElideRight, area.width()));
    }
    if (hasFocus()) {
        painter.setPen(t.line);
        painter.drawRect(rect().adjusted(1, 1, -2, -2));
    }
}

Rail::Rail(QWidget* parent) : QWidget(parent), layout_(new QVBoxLayout(this)), group_(new QButtonGroup(this))
{
    setFixedWidth(rail_width);
    setAccessibleName(tr("Pages"));
    layout_->setContentsMargins(0, 0, 1, 0);
    layout_->setSpacing(0);
    auto* name = new QLabel(QStringLiteral("Evenstroke"), this);
    QFont font = type(TypeSize::body, true);
    font.setPointSizeF(11.5);
    name->setFont(font);
    name->setContentsMargins(left_margin, 0, 0, 0);
    name->setFixedHeight(56);
    layout_->addWidget(name);
    layout_->addStretch(1);
    group_->setExclusive(true);
}

void Rail::add(const QString& name, QChar key, const QString& title)
{
    auto* button = new RailButton(key, title, this);
    group_->addButton(button);
    layout_->insertWidget(layout_->count() - 1, button);
    lines_.push_back({name, button});
    connect(button, &QAbstractButton::clicked, this, [this, name] { emit chosen(name); });
}

void Rail::add_space() { layout_->insertSpacing(layout_->count() - 1, 24); }

RailButton* Rail::find(const QString& name) const
{
    for (const Line& line : lines_)
        if (line.name == name)
            return line.button;
    return nullptr;
}

void Rail::set_current(const QString& name)
{
    if (RailButton* button = find(name)) {
        button->setChecked(true);
    } else if (QAbstractButton* before = group_->checkedButton()) {
        group_->setExclusive(false); // a group that is exclusive keeps one checked
        before->setChecked(false);
        group_->setExclusive(true);
    }
}

void Rail::set_count(const QString& name, int count)
{
    if (RailButton* button = find(name))
        button->set_count(count);
}

void Rail::set_remark(const QString& name, const QString& remark)
{
    if (RailButton* button = find(name))
        button->set_remark(remark);
}

void Rail::set_enabled(const QString& name, bool enabled)
{
    if (RailButton* button = find(name))
        button->setEnabled(enabled);
}

void Rail::paintEvent(QPaintEvent*)
{
    QPainter painter(this);
    painter.fillRect(rect(), theme().page);
    painter.setPen(theme().rule);
    painter.drawLine(width() - 1, 0, width() - 1, height());
}

} // namespace evenstroke
