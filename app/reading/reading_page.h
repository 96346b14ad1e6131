// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "app/desk/page.h"
#include "app/desk/theme.h"
#include "app/reading/figure_table_model.h"
#include "app/reading/side_views.h"
#include "core/review/reading_review.h"
#include "storage/reading_store.h"

#include <array>
#include <memory>

class QPushButton;
namespace Ui {
class ReadingPage;
}

namespace evenstroke {

class ReviewView;

/// One reading judged from top to bottom in the order in which an engineer would, and beside it what belongs to the
/// row in hand.
///
/// Keys: up and down the row, Enter its trend, W or Space its workings, Page Up and Page Down the reading before and
/// after, 1 to 5 what stands beside it, A its numbers as a table, J the next part of the wall, Z the wall as iron.
class ReadingPage : public Page
{
    Q_OBJECT

public:
    enum class Side { workings, power, load, wall, crank };

    explicit ReadingPage(Workplace& workplace, QWidget* parent = nullptr);
    ~ReadingPage() override;
    QString name() const override { return QStringLiteral("reading"); }
    QString title() const override { return tr("One reading"); }
    QString sentence() const override { return tr("{engine} of {vessel}, reading of {reading}."); }
    void refresh() override;
    QString foot_text() const override;
    QWidget* first_focus() override;
    bool can_print() const override { return true; }
    void print(QPrinter& printer) override;
    void copy() override;
    std::optional<Selection> number_in_hand() const override;

    ReviewView& view();
    void choose_side(Side side);
    Side side() const { return side_; }
    const SideView& side_view() const { return shown_; } ///< empty while the workings stand there
    WallTrial wall_trial() const;

protected:
    void keyPressEvent(QKeyEvent* event) override;
    void changeEvent(QEvent* event) override;
    bool eventFilter(QObject* watched, QEvent* event) override;

private:
    void connect_all();
    std::vector<storage::Correction> corrections_here() const;
    void show_nothing();
    void take_row();
    void open_trend();
    void open_workings();
    void walk_readings(int step);
    void show_side();
    void show_workings();
    void show_view(const SideView& view);
    SideView make_view();
    const Cards& cards();
    std::optional<CardPair> card_pair();
    int cylinder_in_hand() const;
    void copy_picture();
    std::array<QPushButton*, 5> side_buttons() const; ///< in the order of Side

    /// What the sheet beside the reading was filled from.
    struct ShownSheet
    {
        std::shared_ptr<const ReadingReview> review;
        int row = -1;
        ThemeKind theme = ThemeKind::day;
        friend bool operator==(const ShownSheet&, const ShownSheet&) = default;
    };

    std::unique_ptr<Ui::ReadingPage> ui_;
    std::shared_ptr<const Judgement> judgement_;
    std::shared_ptr<const ReadingReview> review_;
    std::optional<std::size_t> reading_;
    FigureTableModel table_;
    SideView shown_;
    ShownSheet sheet_;
    Side side_ = Side::workings;
    std::optional<std::pair<QuantityId, Place>> seen_; ///< what the selection named when this page last followed it
    std::size_t wall_ = 0;
    Cards cards_;
    std::string cards_of_; ///< reading whose cards are in hand
};

} // namespace evenstroke
