// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/desk/foot_line.h"

#include "app/desk/theme.h"

#include <QHBoxLayout>
#include <QLabel>
#include <QPainter>
#include <QPushButton>

namespace evenstroke {

namespace {

QLabel* make_label(QWidget* parent)
{
    auto* label = new QLabel(parent);
    label->setProperty("muted", true);
    label->setProperty("small", true);
    label->setTextFormat(Qt::PlainText);
    return label;
}

QPushButton* make_word(QWidget* parent)
{
    auto* button = new QPushButton(parent);
    button->setProperty("worded", true);
    button->setFont(type(TypeSize::label));
    button->setCursor(Qt::PointingHandCursor);
    return button;
}

} // namespace

FootLine::FootLine(QWidget* parent)
    : QWidget(parent), state_(make_label(this)), stop_(make_word(this)), middle_(make_label(this)),
      theme_(make_word(this))
{
    setFixedHeight(27);
    auto* layout = new QHBoxLayout(this);
    layout->setContentsMargins(20, 1, 20, 0);
    layout->setSpacing(8);
    auto* left = new QWidget(this);
    left->setFixedWidth(172);
    auto* left_layout = new QHBoxLayout(left);
    left_layout->setContentsMargins(0, 0, 0, 0);
    left_layout->addWidget(state_);
    left_layout->addWidget(stop_);
    left_layout->addStretch(1);
    layout->addWidget(left);
    layout->addWidget(middle_, 1);
    layout->addWidget(theme_);
    middle_->setMinimumWidth(1);
    stop_->setText(tr("stop"));
    stop_->hide();
    theme_->setToolTip(tr("Day or night: key F8"));
    connect(theme_, &QPushButton::clicked, this, &FootLine::theme_asked);
    connect(stop_, &QPushButton::clicked, this, &FootLine::stop_asked);
}

void FootLine::set_state(const QString& text) { state_->setText(text); }
void FootLine::set_stoppable(bool stoppable) { stop_->setVisible(stoppable); }

void FootLine::set_middle(const QString& text)
{
    middle_->setText(text);
    middle_->setToolTip(text);
}

void FootLine::set_theme_word(const QString& word)
{
    theme_->setText(word);
    theme_->setAccessibleName(tr("Theme: %1").arg(word));
}

void FootLine::paintEvent(QPaintEvent*)
{
    QPainter painter(this);
    painter.fillRect(rect(), theme().page);
    painter.setPen(theme().rule);
    painter.drawLine(0, 0, width(), 0);
}

} // namespace evenstroke
