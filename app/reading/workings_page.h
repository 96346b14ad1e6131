// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "app/desk/page.h"
#include "core/review/reading_review.h"

#include <memory>

namespace Ui {
class WorkingsPage;
}

namespace evenstroke {

struct Judgement;
struct SheetHeading;

/// The sheet of workings of one number, reached by key W from wherever a number is in hand.
///
/// Keys: Escape or W back to where it was asked for, Page Up and Page Down (or left and right) the same number of
/// the reading before and after, up and down scroll.
class WorkingsPage : public Page
{
    Q_OBJECT

public:
    explicit WorkingsPage(Workplace& workplace, QWidget* parent = nullptr);
    ~WorkingsPage() override;
    QString name() const override { return QStringLiteral("workings"); }
    QString title() const override { return tr("Workings"); }
    QString sentence() const override;
    void refresh() override;
    QWidget* first_focus() override;
    bool can_print() const override { return true; }
    void print(QPrinter& printer) override;
    void copy() override;

    /// The sheet as plain text, as it is copied.
    QString text() const;

protected:
    void keyPressEvent(QKeyEvent* event) override;
    bool eventFilter(QObject* watched, QEvent* event) override;

private:
    std::optional<Workings> wanted(std::size_t reading) const;
    SheetHeading heading() const;
    bool take_key(const QKeyEvent& event);
    void go_back();
    void walk_readings(int step);
    void show_nothing(const QString& words);

    std::unique_ptr<Ui::WorkingsPage> ui_;
    std::shared_ptr<const Judgement> judgement_;
    std::optional<std::size_t> reading_;
    std::optional<Workings> workings_;
};

} // namespace evenstroke
