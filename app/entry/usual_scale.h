// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <QWidget>

#include <optional>

namespace evenstroke {

/// A small scale with the usual band, last time's value and the typed one on it. All in the row's unit.
class UsualScale : public QWidget
{
    Q_OBJECT

public:
    struct Content
    {
        std::optional<double> low, high; ///< the usual band
        std::optional<double> previous, expected, typed;
        int decimals = 1;
        bool empty() const { return !low && !previous && !expected && !typed; }
    };

    explicit UsualScale(QWidget* parent = nullptr);
    void show_content(const Content& content);
    const Content& content() const { return content_; }
    QSize sizeHint() const override { return {240, 58}; }

protected:
    void paintEvent(QPaintEvent* event) override;

private:
    void paint_off_scale(QPainter& painter, double typed, double low, double high, int line) const;
    Content content_;
};

} // namespace evenstroke
