// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "app/desk/page.h"
#include "app/desk/theme.h"

#include <QTimer>
#include <QWidget>

#include <functional>
#include <vector>

class QStackedWidget;

namespace evenstroke {

class FootLine;
class Rail;
class SentenceBar;

/// How a page is made known to the frame. It is made on its first visit.
struct PageEntry
{
    QString name;  ///< as on the command line: "board"
    QString title; ///< as on the rail
    QChar key;
    std::function<Page*(Workplace&)> make;
    std::function<int(const Workplace&)> count_new = {}; ///< shown on the rail; none: never a count
    /// Shown small on the rail, asked for when the page or the history changes: "draft of 1 Dec".
    std::function<QString(Workplace&)> remark = {};
    bool without_history = false; ///< can be shown while no history is open
    bool on_rail = true;          ///< else it is reached from where its subject stands
};

/// The window: rail, sentence bar, the page, foot line. It lays out and connects; the pages do the work.
///
/// Keys: a page's letter (with Alt where letters are typed), a part's letter of the sentence bar, Alt+Left and
/// Alt+Right back and forward, W the workings of the number in hand, F8 day or night, Ctrl+P print, Ctrl+C copy, F6 from rail to sentence to page.
class Frame : public QWidget
{
    Q_OBJECT

public:
    explicit Frame(Workplace& workplace, QWidget* parent = nullptr);
    void add_page(PageEntry entry);
    /// Shows the page of this name; unknown names leave the one that is up. False if it could not be shown.
    bool show_page(const QString& name);
    Page* current_page() const { return current_; }
    QStringList page_names() const;
    void use_theme(ThemeKind kind);
    /// Opens the history if there is one at the path, and the page; else the page that says how to begin.
    void begin(const QString& history_path, const QString& page);
    QString sentence() const;

    /// Size, theme and place of the window, kept in the user's settings.
    void recall();
    void remember() const;

protected:
    bool eventFilter(QObject* watched, QEvent* event) override;
    void closeEvent(QCloseEvent* event) override;

private:
    struct Entry
    {
        PageEntry about;
        Page* page = nullptr;
    };
    Entry* find(const QString& name);
    void lay_out();
    void add_keys();
    Page* made(Entry& entry);
    bool take_letter(QChar letter);
    bool show_workings();
    void refresh_soon();
    void refresh_now();
    void refresh_frame();
    void follow_workplace();
    void print_page();
    void walk_focus();

    Workplace& workplace_;
    Rail* rail_;
    SentenceBar* sentence_;
    QStackedWidget* stack_;
    FootLine* foot_;
    std::vector<Entry> entries_;
    Page* current_ = nullptr;
    QTimer refresh_;
};

} // namespace evenstroke
