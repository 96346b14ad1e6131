// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "app/cards/card_picture.h"
#include "app/cards/card_rows_model.h"
#include "app/cards/card_run.h"
#include "app/desk/page.h"
#include "app/reading/figure_table_model.h"
#include "storage/common.h"

#include <array>
#include <memory>

class QPushButton;
namespace Ui {
class CardsPage;
}

namespace evenstroke {

class CardPlot;

/// Cards: the indicator cards of one reading by the questions that are asked of them: can this one be trusted, what
/// differs from the healthy one, where in the cycle and on which cylinders.
///
/// Keys: 1 to 7 the views; arrows the cylinders; Page Up and Page Down the readings that have cards; comma and full stop
/// the cursor; + - 0 the zoom; A the table; Z the results into the reading; J calls the cards healthy; X brings in cards;
/// Delete withdraws the card in hand, or brings back the one that was withdrawn.
class CardsPage : public Page
{
    Q_OBJECT

public:
    explicit CardsPage(Workplace& workplace, QWidget* parent = nullptr);
    ~CardsPage() override;
    QString name() const override { return QStringLiteral("cards"); }
    QString title() const override { return tr("Cards"); }
    QString sentence() const override;
    void refresh() override;
    QString foot_text() const override;
    bool can_print() const override { return cards_ != nullptr; }
    void print(QPrinter& printer) override;
    void copy() override;
    void copy_picture();
    /// Puts the results of all cards into their reading; says under the results what came of it.
    bool accept_results(const storage::Signature& by);
    /// Calls the cards that are shown healthy, or takes that back.
    bool call_healthy(bool healthy, const storage::Signature& by);
    /// Takes the card in hand out of use, or brings the one withdrawn last back where the cylinder has none.
    bool withdraw_or_bring_back(const storage::Signature& by);
    /// By the file's ending: png, pdf or csv. Says under the results what stood in the way.
    bool save_as(const QString& path);

    CardPlot& plot();
    int cylinder() const { return cylinder_; }
    bool evaluating() const { return run_.busy(); }
    const std::shared_ptr<const CardsInHand>& cards() const { return cards_; }

protected:
    void keyPressEvent(QKeyEvent* event) override;
    void changeEvent(QEvent* event) override;
    void resizeEvent(QResizeEvent* event) override;

private:
    void make_views();
    void connect_all();
    std::optional<std::size_t> settle_reading();
    void take_found();
    void show_progress();
    void show_instead(const QString& words, bool offer_newest);
    void show_cards();
    void show_cylinder();
    void show_view();
    void show_deeds();
    void say(const QString& words);
    void choose_cylinder(int cylinder);
    void walk_cylinders(int step);
    void walk_readings(int step);
    void choose_view(CardView view);
    void open_newest();
    void open_remark(int number);
    void bring_in();
    void ask_accept();
    void ask_healthy();
    bool called_healthy() const;
    void ask_withdraw();
    const CardsStored::Entry* card_in_hand() const;
    const CardsStored::Withdrawn* withdrawn_in_hand() const;
    void ask_file();

    std::unique_ptr<Ui::CardsPage> ui_;
    std::array<QPushButton*, card_view_count> view_buttons_{};
    CardRowsModel rows_;
    FigureTableModel table_;
    CardRun run_{this};
    std::shared_ptr<const Judgement> judgement_;
    CardsStored stored_;
    std::optional<std::size_t> reading_;       ///< that is shown or being evaluated
    std::shared_ptr<const CardsInHand> cards_; ///< null while they are being evaluated
    CardView view_ = CardView::difference;
    int cylinder_ = 0;
};

} // namespace evenstroke
