// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "app/desk/sheet_page.h"
#include "core/review/reading_review.h"

namespace evenstroke {

struct Judgement;
struct SheetHeading;

/// The sheet of workings of one number, reached by key W from wherever a number is in hand.
///
/// Keys: Escape or W back to where it was asked for, Page Up and Page Down (or left and right) the same number of
/// the reading before and after, up and down scroll.
class WorkingsPage : public SheetPage
{
    Q_OBJECT

public:
    explicit WorkingsPage(Workplace& workplace, QWidget* parent = nullptr);
    QString name() const override { return QStringLiteral("workings"); }
    QString title() const override { return tr("Workings"); }
    QString sentence() const override;
    void refresh() override;

    /// The sheet as plain text, as it is copied.
    QString text() const { return plain_text(); }

protected:
    void fill(QTextDocument& document, const Theme& colours) const override;
    QString plain_text() const override;
    bool take_key(int key) override;
    QString page_before() const override { return QStringLiteral("reading"); }
    bool keeps_place() const override { return true; } // the next reading's sheet has the same lines

private:
    std::optional<Workings> wanted(std::size_t reading) const;
    SheetHeading heading() const;
    void walk_readings(int step);

    QPushButton* earlier_button_;
    QPushButton* later_button_;
    std::shared_ptr<const Judgement> judgement_;
    std::optional<std::size_t> reading_;
    std::optional<Workings> workings_;
};

} // namespace evenstroke
