// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "app/desk/page.h"
#include "app/trends/trend_table_model.h"

#include <memory>
#include <optional>

class QPushButton;
namespace Ui {
class TrendPage;
}

namespace evenstroke {

class TrendPlot;
struct TrendPicture;
struct Selection;

/// Trend: one quantity at one place over time, how the evidence grew, how long it may last, what to check.
///
/// Keys: W the workings of the point in hand; 1 to 4 as read, corrected, deviation, apart; 5 the load; 6 the ±; 7 second opinions; A the
/// table; O says what was found about the flag; left and right walk through the
/// readings, up and down through the places, Page Up and Page Down through the quantities.
class TrendPage : public Page
{
    Q_OBJECT

public:
    explicit TrendPage(Workplace& workplace, QWidget* parent = nullptr);
    ~TrendPage() override;
    QString name() const override { return QStringLiteral("trend"); }
    QString title() const override { return tr("Trend"); }
    QString sentence() const override;
    void refresh() override;
    QString foot_text() const override;
    bool can_print() const override { return true; }
    void print(QPrinter& printer) override;
    void copy() override;
    std::optional<Selection> number_in_hand() const override;
    void copy_picture();
    /// Writes what was said of the flag shown; false, with the reason under the plot, where it was not kept.
    bool keep_note(const FlagNote& note);
    /// By the file's ending: png, pdf or csv. Says under the plot what stood in the way.
    bool save_as(const QString& path);

    TrendPlot& plot();
    TrendTableModel& table() { return table_; }

protected:
    void keyPressEvent(QKeyEvent* event) override;
    void changeEvent(QEvent* event) override;
    void resizeEvent(QResizeEvent* event) override;

private:
    void connect_buttons();
    void show_nothing();
    void show_words(const TrendPicture& picture);
    void show_side(const TrendPicture& picture);
    void show_views(const Trend& trend, const TrendPicture& picture);
    void show_reading();
    void show_note_button(const TrendPicture& picture);
    void choose_view(int number);
    void choose_reading(std::size_t reading);
    void walk_readings(int step);
    void walk_places(int step);
    void walk_quantities(int step);
    void show_table(bool shown);
    void ask_file();
    void ask_note();
    std::optional<std::size_t> chosen_reading() const;
    const Trend* trend() const;

    std::unique_ptr<Ui::TrendPage> ui_;
    TrendTableModel table_;
    std::shared_ptr<const Judgement> judgement_;
    QString shown_instead_; ///< the view shown where the one wished for does not exist
};

} // namespace evenstroke
