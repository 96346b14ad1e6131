// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "app/cards/card_files_run.h"
#include "app/desk/page.h"

#include <QTimer>

#include <memory>
#include <optional>
#include <vector>

namespace Ui {
class CardFilesPage;
}

namespace evenstroke {

struct Judgement;

/// Cards out of the files of an indicating instrument, whatever their layout, into the reading that is looked
/// at; and cards drawn on paper.
///
/// The files are read and evaluated on worker threads at every change, so that what is seen is what would be
/// taken in; storing is one transaction.
class CardFilesPage : public Page
{
    Q_OBJECT

public:
    explicit CardFilesPage(Workplace& workplace, QWidget* parent = nullptr);
    ~CardFilesPage() override;
    QString name() const override { return QStringLiteral("card-files"); }
    QString title() const override { return tr("Bring in cards"); }
    QString sentence() const override
    {
        return tr("Bring cards in for {engine} of {vessel}, reading of {reading}.");
    }
    void refresh() override;
    QString foot_text() const override;
    QWidget* first_focus() override;

    /// As if they were dropped onto the page.
    void add_files(const QStringList& paths);
    void forget_files();
    const storage::TraceLayout& layout_in_hand() const { return layout_; }
    void set_layout_in_hand(const storage::TraceLayout& layout); ///< as if the boxes said so
    const std::vector<FileTrace>& traces() const { return traces_; }
    bool busy() const { return run_.busy() || soon_.isActive(); }
    void set_cylinder(std::size_t trace, std::optional<int> cylinder);
    /// Puts all traces that can be taken into the reading in hand. False: nothing was stored, `outcome` says
    /// why.
    bool take_in(const storage::Signature& by);
    bool put_paper_card(int cylinder, double mean_indicated_bar, const storage::Signature& by);
    QString outcome() const;

protected:
    void dragEnterEvent(QDragEnterEvent* event) override;
    void dropEvent(QDropEvent* event) override;
    void keyPressEvent(QKeyEvent* event) override;

private:
    void connect_parts();
    void choose_files();
    bool read_first_file();
    void begin_layout();
    void propose_layout();
    void look_anew();
    double speed_to_propose() const;
    void follow_choice();
    void show_first_lines();
    void take_boxes();
    void preview_soon() { soon_.start(); }
    void preview();
    void take_traces(const std::vector<FileTrace>& traces);
    void show_all();
    QString problem_words() const;
    void show_unit_words();
    void show_traces();
    void show_trace_in_hand();
    void show_into();
    QString doubt_of(const FileTrace& trace) const;
    bool is_wanted(const FileTrace& trace) const;
    void find_stored();
    void show_doubtful(QStringList& lines);
    std::vector<storage::NewCard> cards_to_take() const;
    bool says_already();
    void ask_and_take();
    QString read_value_stays(int cylinder) const;
    void ask_and_put(int cylinder, double mean_indicated_bar);
    std::optional<storage::Signature> ask_signature(const QString& title, const QString& words,
                                                    const QString& action);
    void say(const QString& words, bool caution = false);
    const Reading* reading_in_hand_here() const;
    const Engine* engine() const;

    std::unique_ptr<Ui::CardFilesPage> ui_;
    CardFilesRun run_{this};
    QTimer soon_; ///< the preview waits for the end of typing
    std::shared_ptr<const Judgement> judgement_;
    QString shown_engine_;
    std::string shown_reading_; ///< id of the last one that was looked at
    std::vector<CardFile> files_;
    storage::TraceLayout layout_;
    storage::ProposedLayout proposed_; ///< of the first file
    bool remembered_ = false;          ///< `layout_` is the engine's own
    double proposed_speed_ = 0.0;      ///< r/min: follows the reading until somebody writes another
    bool all_the_same_ = false;        ///< doubtful cards are wanted too, somebody said
    std::string first_lines_;
    std::optional<Problem> problem_; ///< of the layout or the first file
    std::vector<FileTrace> traces_;
};

} // namespace evenstroke
