// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "app/fleet/fleet_model.h"

#include <QTableView>

namespace evenstroke {

/// The fleet on the screen. Up and down move, Enter opens an engine or unfolds the quiet ones.
class FleetView : public QTableView
{
    Q_OBJECT

public:
    explicit FleetView(QWidget* parent = nullptr);
    void show_fleet(std::vector<FleetRow> rows, TimePoint now);
    FleetModel& fleet_model() { return model_; }
    const FleetModel& fleet_model() const { return model_; }

signals:
    void asked_for(const QString& vessel_id, const QString& engine_id);

protected:
    void resizeEvent(QResizeEvent* event) override;
    void focusInEvent(QFocusEvent* event) override;
    void keyPressEvent(QKeyEvent* event) override;
    void mouseReleaseEvent(QMouseEvent* event) override;

private:
    void set_sizes();
    int height_of(int row) const;
    void take(int row);
    FleetModel model_;
    bool chosen_ = false; ///< somebody moved in the list
};

} // namespace evenstroke
