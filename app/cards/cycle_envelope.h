// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/card/evaluation.h"

#include <qcustomplot.h>

#include <memory>
#include <vector>

namespace evenstroke {

/// What lies between the lowest and the highest of a card's cycles, on steps that double from level to level: whatever
/// the zoom, about one step a pixel is drawn. Angles true, pressures bar absolute.
class CycleEnvelope
{
public:
    explicit CycleEnvelope(std::shared_ptr<const indicator::Evaluation> card);

    const indicator::Evaluation& card() const { return *card_; }
    double angle(std::size_t index) const { return first_ + step_ * static_cast<double>(index); }
    double step() const { return step_; }
    std::size_t size() const { return levels_.front().low.size(); }
    std::size_t cycles() const { return card_->trace.cycles.size(); }
    float pressure(std::size_t cycle, std::size_t index) const
    {
        return static_cast<float>(card_->trace.cycles[cycle].pressure[index] - zero_);
    }

    /// NaN where no cycle has a sample.
    struct Level
    {
        std::vector<float> low, high;
    };
    /// The coarsest level with at least one step a pixel. @param exponent steps of 2^exponent grid places
    const Level& level_for(double places_a_pixel, int& exponent) const;

private:
    std::shared_ptr<const indicator::Evaluation> card_;
    double first_ = 0.0, step_ = 1.0, zero_ = 0.0;
    std::vector<Level> levels_;
};

/// Draws an envelope column by column of pixels, and the cycles themselves once they can be told apart.
class CycleBand : public QCPAbstractPlottable
{
    Q_OBJECT

public:
    CycleBand(QCPAxis* key, QCPAxis* value, std::shared_ptr<const CycleEnvelope> envelope);

    double selectTest(const QPointF&, bool, QVariant*) const override { return -1.0; }
    QCPRange getKeyRange(bool& found, QCP::SignDomain) const override;
    QCPRange getValueRange(bool& found, QCP::SignDomain, const QCPRange&) const override;

protected:
    void draw(QCPPainter* painter) override;
    void drawLegendIcon(QCPPainter*, const QRectF&) const override {}

private:
    void draw_columns(QCPPainter* painter, std::size_t from, std::size_t to, double places_a_pixel) const;
    void draw_cycles(QCPPainter* painter, std::size_t from, std::size_t to) const;
    std::shared_ptr<const CycleEnvelope> envelope_;
};

} // namespace evenstroke
