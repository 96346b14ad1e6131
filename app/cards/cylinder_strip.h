// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "app/cards/card_run.h"
#include "app/desk/theme.h"

#include <QWidget>

#include <memory>

namespace evenstroke {

/// One small picture of differences a cylinder, all on one scale: which cylinder, and where in its cycle. The one in
/// hand is framed; a click or the arrows of the page take another.
class CylinderStrip : public QWidget
{
    Q_OBJECT

public:
    explicit CylinderStrip(QWidget* parent = nullptr);
    void show_cards(const std::shared_ptr<const CardsInHand>& cards, int cylinder);
    int rows() const; ///< of pictures, at this number of cylinders
    QSize sizeHint() const override;
    static void paint(const CardsInHand& cards, int cylinder, QPainter& painter, const QRectF& area, const Theme& theme);

signals:
    void cylinder_chosen(int cylinder);

protected:
    void paintEvent(QPaintEvent* event) override;
    void mousePressEvent(QMouseEvent* event) override;
    void changeEvent(QEvent* event) override;

private:
    std::shared_ptr<const CardsInHand> cards_;
    int cylinder_ = 0;
};

} // namespace evenstroke
