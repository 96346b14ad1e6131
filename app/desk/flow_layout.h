// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <QLayout>

#include <vector>

class QHBoxLayout;

namespace evenstroke {

/// Sets its items side by side like words, on the next line where the width is used up.
class FlowLayout : public QLayout
{
    Q_OBJECT

public:
    /// @param gap between neighbours of a line, pixels
    explicit FlowLayout(QWidget* parent = nullptr, int gap = 0) : QLayout(parent), gap_(gap) {}
    ~FlowLayout() override;
    void addItem(QLayoutItem* item) override { items_.push_back(item); }
    int count() const override { return static_cast<int>(items_.size()); }
    QLayoutItem* itemAt(int index) const override;
    QLayoutItem* takeAt(int index) override;
    Qt::Orientations expandingDirections() const override { return {}; }
    bool hasHeightForWidth() const override { return true; }
    int heightForWidth(int width) const override { return lay_out(QRect(0, 0, width, 0), false); }
    void setGeometry(const QRect& area) override;
    QSize sizeHint() const override { return minimumSize(); }
    QSize minimumSize() const override;

private:
    int lay_out(const QRect& area, bool place) const;
    std::vector<QLayoutItem*> items_;
    int gap_;
};

/// On a narrow window the words of a row go on in the next line.
void let_flow(QHBoxLayout& row);

} // namespace evenstroke
