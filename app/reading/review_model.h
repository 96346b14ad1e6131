// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/review/reading_review.h"
#include "core/trend/judgement.h"
#include "storage/reading_store.h"

#include <QAbstractTableModel>

#include <memory>
#include <vector>

namespace evenstroke {

/// A row of the page One reading: the heading of a section, or one of its lines.
struct ReviewRow
{
    const ReviewSection* section = nullptr;
    const ReviewLine* line = nullptr; ///< null: the heading
    bool repeats = false;             ///< the same quantity as the row above, at another place
};

/// One reading judged from top to bottom, as a table: sections with their lines.
class ReviewModel : public QAbstractTableModel
{
    Q_OBJECT

public:
    enum Column { words, place, value, half_width, corrected, expected, deviation, deviation_half_width, from_usual, verdict, column_count };

    using QAbstractTableModel::QAbstractTableModel;
    /// Columns whose numbers stand on the decimal sign, at full size.
    static bool is_number(int column);
    /// @param review as `review_reading` makes it; null: nothing to show
    /// @param corrections of this reading, in order of time: a line says what it was before
    void show_review(std::shared_ptr<const ReadingReview> review, std::shared_ptr<const Judgement> judgement,
                     std::vector<storage::Correction> corrections = {});
    int rowCount(const QModelIndex& parent = {}) const override;
    int columnCount(const QModelIndex& parent = {}) const override;
    QVariant data(const QModelIndex& index, int role = Qt::DisplayRole) const override;
    QVariant headerData(int section, Qt::Orientation orientation, int role = Qt::DisplayRole) const override;

    const ReviewRow* row(int number) const; ///< null where there is none
    const ReadingReview* review() const { return review_.get(); }
    /// The row that shows the same thing as the one given, of whatever reading; 0 where none does.
    int row_like(const ReviewRow& wanted) const;
    int row_of(QuantityId quantity, const Place& where) const; ///< -1 where it is not in the table
    int row_of(ReviewTopic topic) const;                       ///< its heading; -1 where it is not in the table
    /// Tab-separated, for the clipboard.
    QString as_text() const;

private:
    QString text(const ReviewRow& row, int column) const;
    QString place_words(const ReviewLine& line) const;
    /// The newest correction of the value in this line; null where it stands as it was typed.
    const storage::Correction* correction_of(const ReviewLine& line) const;
    std::shared_ptr<const ReadingReview> review_;
    std::shared_ptr<const Judgement> judgement_;
    std::vector<storage::Correction> corrections_;
    std::vector<ReviewRow> rows_;
};

} // namespace evenstroke
