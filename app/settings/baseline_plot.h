// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/trend/judgement.h"

#include <QWidget>

#include <memory>

class QCustomPlot;

namespace evenstroke {

/// One quantity of the baseline over load, with its points and what was read since as quiet dots.
class BaselinePlot : public QWidget
{
    Q_OBJECT

public:
    explicit BaselinePlot(QWidget* parent = nullptr);
    ~BaselinePlot() override;
    /// @param judgement for the readings; may be null
    void show_quantity(const Engine& engine, const std::string& quantity, std::shared_ptr<const Judgement> judgement);

protected:
    void changeEvent(QEvent* event) override;

private:
    void draw();
    void draw_curve();
    void draw_readings();
    QCustomPlot* plot_;
    Engine engine_;
    std::string quantity_;
    std::shared_ptr<const Judgement> judgement_;
};

} // namespace evenstroke
