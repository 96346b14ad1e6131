// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "app/cards/card_files_run.h"

#include <QWidget>

class QCustomPlot;

namespace evenstroke {

/// One trace out of a file, small: pressure over crank angle, with the unfired line where it was found.
class TracePreview : public QWidget
{
    Q_OBJECT

public:
    explicit TracePreview(QWidget* parent = nullptr);
    /// Null: nothing is drawn.
    void show_trace(const FileTrace* trace);

protected:
    void changeEvent(QEvent* event) override;

private:
    void draw();
    void add_line(const std::vector<double>& x, const std::vector<double>& y, const QColor& colour,
                  int style);

    QCustomPlot* plot_;
    std::optional<FileTrace> trace_;
};

} // namespace evenstroke
