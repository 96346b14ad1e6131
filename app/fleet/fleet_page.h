// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "app/desk/page.h"

class QLabel;

namespace evenstroke {

class FleetView;

/// Fleet: all engines of the history, worst first; the quiet ones take one line.
class FleetPage : public Page
{
    Q_OBJECT

public:
    explicit FleetPage(Workplace& workplace, QWidget* parent = nullptr);
    QString name() const override { return QStringLiteral("fleet"); }
    QString title() const override { return tr("Fleet"); }
    QString sentence() const override { return tr("All engines of this history, the worst first."); }
    void refresh() override;
    QString foot_text() const override;
    QWidget* first_focus() override;
    void copy() override;
    FleetView& view() { return *view_; }

private:
    FleetView* view_;
    QLabel* empty_;
};

} // namespace evenstroke
