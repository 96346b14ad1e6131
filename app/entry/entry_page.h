// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "app/desk/page.h"
#include "app/entry/block_text.h"
#include "app/entry/entry_opinions.h"
#include "app/entry/entry_session.h"
#include "app/entry/log_sheet_model.h"
#include "app/entry/note_lines.h"
#include "app/entry/open_matters.h"
#include "app/entry/walk.h"

#include <QStringList>
#include <QTimer>

#include <memory>

class QMenu;

namespace Ui {
class EntryPage;
}

namespace evenstroke {

class LogSheetView;
class Ear;

/// Where a reading is written down: the log sheet in walking order with the ear beside it.
class EntryPage : public Page
{
    Q_OBJECT

public:
    explicit EntryPage(Workplace& workplace, QWidget* parent = nullptr);
    ~EntryPage() override;

    QString name() const override { return QStringLiteral("enter"); }
    QString title() const override { return tr("Enter"); }
    QString sentence() const override;
    void refresh() override;
    QString foot_text() const override;
    QString draft_text() const override;
    bool takes_letters() const override;
    QWidget* first_focus() override;
    bool may_leave() override;
    bool can_print() const override;
    void print(QPrinter& printer) override; ///< the blank sheet
    void copy() override;

    EntrySession& session() { return session_; }
    LogSheetModel& model() { return model_; }
    LogSheetView& view();
    Ear& ear();
    const NoteLines& notes() const;
    /// What the core says of the sheet, asked now instead of a moment later.
    const EntryOpinions& judge_now();

    void correct(const QString& reading_id);
    /// Stops once for what is open and lists it; told again, what is kept is kept as confirmed.
    void close_reading();
    /// The newest doubt that has no answer yet, else the next one behind the box in hand.
    void go_to_doubt();
    void go_to_date();
    void take_suggestion() { take_offered(false); }
    void take_second() { take_offered(true); } ///< where a number may have been read in either of two units
    void confirm_boxes();
    void take_paste_that_can_be_read();
    void copy_all();
    void set_walk_order(WalkOrder order);
    bool save_blank_sheet(const QString& path);
    void set_time(const QString& date, const QString& clock, const QString& offset);

protected:
    void hideEvent(QHideEvent* event) override;

private:
    void take_offered(bool second);
    void connect_sheet();
    void connect_actions();
    void show_state();
    void show_head();
    void show_box();
    void show_notes();
    void show_words();
    void show_closed();
    void show_previous();
    void read_time_fields();
    void read_signature();
    void choose_unit(int row);
    void fill_readings_menu(QMenu& menu);
    void fill_layout_menu(QMenu& menu);
    void ask_blank_sheet(QMenu& menu);
    void recall_walk_order();
    void go_to_unreadable();
    void connect_keys();
    void leave_sheet(bool forward);
    void show_newest();
    std::optional<LogBox> newest_doubt(bool with_remedy) const;
    void go_to_matter(const OpenMatter& matter);
    bool may_close();
    void keep_doubts();
    void add_paste_line(std::vector<NoteLines::Line>& lines);
    void add_closing_line(std::vector<NoteLines::Line>& lines);
    void add_matter_lines(std::vector<NoteLines::Line>& lines);
    void withdraw_reading();
    void ask_bring_back(const QString& reading_id);
    void say(const QString& notice);

    std::unique_ptr<Ui::EntryPage> ui_;
    EntrySession session_;
    LogSheetModel model_;
    EntryOpinions opinions_;
    QTimer judge_soon_;
    std::optional<PastePlan> paste_plan_;
    std::optional<Problem> time_problem_, close_problem_;
    std::vector<OpenMatter> asked_at_closing_; ///< empty: closing was not asked for, or nothing was open
    bool closing_wanted_ = false;              ///< closing was asked for: what is empty is listed from then on
    QStringList kept_doubtful_;                ///< what the last closing kept although it was doubted
    std::vector<LogBox> typed_lately_;         ///< newest last
    QString notice_;                           ///< what was just done, until the next change
    QString shown_history_;
};

} // namespace evenstroke
