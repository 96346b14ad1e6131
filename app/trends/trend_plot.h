// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "app/desk/theme.h"
#include "app/trends/trend_picture.h"

#include <qcustomplot.h>

#include <optional>

namespace evenstroke {

class EventItem;

/// What is drawn besides the line itself.
struct TrendExtras
{
    bool load = false;
    bool fixed_limits = false; ///< the customary distance from the others, as a second opinion
    bool uncertainty = false; ///< of every reading; that of the reading in hand is drawn always
};

/// Draws a TrendPicture: values above, evidence below, one time axis. Lines are one pixel wide and solid colours
/// only, which keeps drawing fast and survives PDF/A.
class TrendPlot : public QCustomPlot
{
    Q_OBJECT

public:
    explicit TrendPlot(QWidget* parent = nullptr);
    void show_picture(const TrendPicture& picture, const Theme& theme);
    void show_extras(const TrendExtras& extras);
    const TrendExtras& extras() const { return extras_; }
    /// The reading in hand is ringed.
    void choose(std::optional<std::size_t> reading);
    const TrendPicture& picture() const { return picture_; }
    /// What lies under the pointer, in words; empty where nothing does.
    QString words_at(const QPointF& place) const;
    std::optional<std::size_t> reading_at(const QPointF& place) const;

    /// The same plot on paper or in a file, in black and grey.
    static bool save(const TrendPicture& picture, const TrendExtras& extras, const QString& path, const QSize& size);
    static void paint(const TrendPicture& picture, const TrendExtras& extras, QCPPainter& painter, const QSize& size);

signals:
    void reading_chosen(std::size_t reading);

protected:
    void mousePressEvent(QMouseEvent* event) override;
    void mouseMoveEvent(QMouseEvent* event) override;
    bool event(QEvent* event) override;

private:
    void make_rects();
    void set_margins();
    int label_gap() const;
    QString newest_label() const;
    int threshold_label_width() const;
    void draw_all();
    void style_axes();
    void add_band();
    void add_others();
    void add_line();
    void add_points();
    QCPErrorBars* add_whiskers(QCPGraph* graph);
    void add_uncertainty();
    void add_fixed_limits();
    void add_marks();
    void add_labels();
    void add_evidence();
    void add_load();
    void add_chosen();
    void set_ranges();
    void thin_event_words();
    QCPItemText* add_text(const QString& text, QCPAxisRect* rect, const QColor& colour, bool bold);

    TrendPicture picture_;
    const Theme* theme_;
    TrendExtras extras_;
    std::optional<std::size_t> chosen_;
    QCPAxisRect* values_;
    QCPAxisRect* evidence_;
    std::vector<EventItem*> event_items_;
    QCPGraph* ring_ = nullptr;
    QCPErrorBars* ring_whiskers_ = nullptr;
    double low_ = 0.0, high_ = 1.0;
};

} // namespace evenstroke
