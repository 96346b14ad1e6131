// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "app/entry/entry_opinions.h"

#include <QStringList>
#include <QWidget>

#include <memory>

namespace Ui {
class Ear;
}

namespace evenstroke {

/// Beside the log sheet: for the box in hand last time's value, the expected one, the usual band with the
/// typed value on it, and one sentence where it doubts. It proposes; the engineer decides.
class Ear : public QWidget
{
    Q_OBJECT

public:
    explicit Ear(QWidget* parent = nullptr);
    ~Ear() override;

    /// What is known of a box. `typing` is the text while it is being written, before it is taken.
    void show_box(const LogSheetModel& model, const LogBox& box, const EntryOpinions& opinions,
                  const std::optional<QString>& typing = {});
    void show_nothing();
    /// The newest doubt nobody answered yet, in a box other than the one in hand; empty: none.
    void show_newest(const QString& sentence);
    QString newest() const;
    /// The reading as a whole: steadiness, how many required boxes are answered.
    void show_whole(const EntrySheet& sheet, const EntryOpinions& opinions);

    /// What F3 would type; empty where nothing is offered.
    const QString& suggestion() const { return suggestion_; }
    /// What Shift+F3 would type; empty where no second value is offered.
    const QString& second_suggestion() const { return second_suggestion_; }
    QString sentence() const;

    // What stands in it never asks for more or less room: the height is what the window leaves, and fit() fills it. Else
    // each part shown or hidden would lay the window out anew, and so the ear, for ever.
    QSize sizeHint() const override { return {QWidget::sizeHint().width(), 0}; }
    QSize minimumSizeHint() const override { return {QWidget::minimumSizeHint().width(), 0}; }
    bool hasHeightForWidth() const override { return false; }

signals:
    void take_suggestion();
    void take_second();
    void confirm();
    void newest_wanted(); ///< back to the box of the newest doubt

protected:
    void resizeEvent(QResizeEvent* event) override;

private:
    /// Leaves out what matters least where the height is short, so that no text is cut through its lines.
    void fit();
    void show_numbers(const LogSheetModel& model, const LogBox& box, const EntryOpinions& opinions,
                      std::optional<double> typed);
    QStringList choices_of(const LogSheetModel& model, const LogBox& box, const EntryOpinions& opinions);
    void show_doubt(const LogSheetModel& model, const LogBox& box, const EntryOpinions& opinions,
                    QStringList& sentences);

    std::unique_ptr<Ui::Ear> ui_;
    QString suggestion_, second_suggestion_;
    bool fitting_ = false;
};

} // namespace evenstroke
