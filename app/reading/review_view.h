// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "app/reading/review_columns.h"
#include "app/reading/review_model.h"

#include <QTableView>

namespace evenstroke {

/// The judged reading on the screen: sections with their sentence over the whole width, numbers on their decimal
/// sign. Up and down move the row in hand; Enter asks for its trend, Space for its workings.
class ReviewView : public QTableView
{
    Q_OBJECT

public:
    explicit ReviewView(QWidget* parent = nullptr);
    void show_review(std::shared_ptr<const ReadingReview> review, std::shared_ptr<const Judgement> judgement,
                     std::vector<storage::Correction> corrections = {});
    ReviewModel& review_model() { return model_; }
    const ReviewRow* row_in_hand() const { return model_.row(currentIndex().row()); }
    void go_to(int row);
    /// How the columns share the width, and which verdicts stand under their rows.
    const ReviewColumns& columns() const { return columns_; }

signals:
    void row_chosen();
    void trend_asked();
    void workings_asked();

protected:
    void keyPressEvent(QKeyEvent* event) override;
    void resizeEvent(QResizeEvent* event) override;
    void currentChanged(const QModelIndex& current, const QModelIndex& previous) override;
    void changeEvent(QEvent* event) override;

private:
    void set_sizes();
    ReviewModel model_;
    ReviewColumns columns_;
    bool filling_ = false;
};

} // namespace evenstroke
