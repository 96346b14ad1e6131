// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "app/desk/page.h"

#include <memory>

class QPushButton;
class QTextDocument;
namespace Ui {
class SheetPage;
}

namespace evenstroke {

struct Theme;

/// A page that is one sheet of words and tables, with what can be done beneath it. Work that takes longer shows its
/// progress there. Escape goes back to where the page was asked for.
class SheetPage : public Page
{
    Q_OBJECT

public:
    explicit SheetPage(Workplace& workplace, QWidget* parent = nullptr);
    ~SheetPage() override;
    QWidget* first_focus() override;
    bool can_print() const override;
    void print(QPrinter& printer) override;
    void copy() override;

protected:
    /// Writes the sheet in these colours.
    virtual void fill(QTextDocument& document, const Theme& colours) const = 0;
    /// The same as plain lines, tables with tabs.
    virtual QString plain_text() const = 0;
    /// A key of the page's own, asked for before Escape goes back.
    virtual bool take_key(int) { return false; }
    /// Where Escape leads when nothing was looked at before.
    virtual QString page_before() const { return QStringLiteral("board"); }
    /// Whether another sheet stays scrolled to where the one before was; else it begins at its top.
    virtual bool keeps_place() const { return false; }

    void show_sheet();
    void show_instead(const QString& words); ///< where there is nothing for the sheet
    QPushButton* add_action(const QString& words = {}); ///< before the others, in the order of the calls
    void go_back();
    void show_progress(int done, int total, const QString& words);
    void hide_progress();

    void keyPressEvent(QKeyEvent* event) override;
    bool eventFilter(QObject* watched, QEvent* event) override;
    void changeEvent(QEvent* event) override;

private:
    bool key_taken(const QKeyEvent& event);

    std::unique_ptr<Ui::SheetPage> ui_;
    int actions_ = 0;    ///< of the page's own
    QString words_;      ///< of the sheet as it was filled last: the same again stays where it was scrolled to
    bool shown_ = false; ///< the sheet, and not words instead
};

/// For sheets: the colours of the theme and the sizes of letters.
QString sheet_style(const Theme& colours);
QString sheet_paragraph(const QString& words, const char* kind = "");
/// A table of words; an empty one where there are no rows. The last column is small where `small_last`.
QString sheet_table(const QStringList& heads, const std::vector<QStringList>& rows, bool small_last = false);

} // namespace evenstroke
