// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "app/survey/report_layout.h"

#include <QPixmap>
#include <QWidget>

#include <memory>

namespace evenstroke {

class ReportPainter;

/// One page of a report as it will be printed. PgUp and PgDn turn the pages, Home and End go to the ends, plus
/// and minus make it larger and smaller.
class PagePreview : public QWidget
{
    Q_OBJECT

public:
    explicit PagePreview(QWidget* parent = nullptr);
    ~PagePreview() override;

    void show_layout(std::shared_ptr<const ReportLayout> layout);
    int page() const { return page_; }
    int pages() const;
    void turn_to(int page);

signals:
    void page_turned();

protected:
    void paintEvent(QPaintEvent* event) override;
    void keyPressEvent(QKeyEvent* event) override;
    void wheelEvent(QWheelEvent* event) override;
    void resizeEvent(QResizeEvent* event) override;
    void changeEvent(QEvent* event) override;

private:
    void draw_page();
    void zoom(double factor);

    std::shared_ptr<const ReportLayout> layout_;
    std::unique_ptr<ReportPainter> painter_;
    QPixmap picture_;
    int page_ = 0;
    double zoom_ = 1.0;   ///< 1: the whole page is seen
    double offset_ = 0.0; ///< how far down, in pixels, where it is larger than the window
};

} // namespace evenstroke
