// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "app/cards/card_picture.h"
#include "app/desk/theme.h"

#include <qcustomplot.h>

#include <optional>

namespace evenstroke {

/// Draws a CardPicture. The wheel and + and - zoom, dragging moves, a double click or 0 shows all of it again. The
/// cursor is a line with the values of the curves in the order of the picture.
class CardPlot : public QCustomPlot
{
    Q_OBJECT

public:
    explicit CardPlot(QWidget* parent = nullptr);
    void show_picture(const CardPicture& picture, const Theme& theme);
    const CardPicture& picture() const { return picture_; }

    void zoom(double factor); ///< below 1 nearer, about the cursor or the middle
    void show_all();
    bool zoomed() const;
    /// Moves the cursor by steps of a degree (a hundredth of the width over volume). It comes up in the middle.
    void move_cursor(double steps);
    std::optional<double> cursor() const { return cursor_; }
    QString cursor_words() const; ///< "12.5°: this card 132.4 bar, healthy 135.1 bar"
    void set_cursor(std::optional<double> x);
    /// Shows the place of a remark, with the cursor on it.
    void show_spot(int number);

    static void paint(const CardPicture& picture, QCPPainter& painter, const QSize& size);
    static bool save(const CardPicture& picture, const QString& path, const QSize& size);

signals:
    void cursor_moved();

protected:
    void mouseMoveEvent(QMouseEvent* event) override;
    void mouseDoubleClickEvent(QMouseEvent* event) override;
    void leaveEvent(QEvent* event) override;

private:
    void draw_all();
    void style_axes();
    void add_parts();
    void add_band();
    void fill_between(const CardBand& band, const QBrush& brush, const QPen& edge);
    void add_cycles();
    void add_lines();
    void add_marks();
    void add_spots();
    void add_titles();
    void keep_within();
    void place_part_names(); ///< over what is seen of each part
    QColor colour_of(FigureRole role) const;
    void stand_over_x(QCPItemPosition& position); ///< at a value of x, at a share of the plot's height
    QCPItemText* add_text(const QString& text, const QColor& colour, Qt::Alignment alignment);

    CardPicture picture_;
    const Theme* theme_;
    std::optional<double> cursor_;
    QCPItemLine* cursor_line_ = nullptr;
    struct PartName
    {
        QCPItemText* text;
        double from, to;
    };
    std::vector<PartName> part_names_;
    bool keeping_ = false; ///< the ranges are being put back within the picture
};

} // namespace evenstroke
