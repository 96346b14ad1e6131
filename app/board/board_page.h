// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "app/board/board.h"
#include "app/desk/page.h"

#include <memory>

namespace Ui {
class BoardPage;
}

namespace evenstroke {

class BoardView;

/// Strip board: which cylinder and which quantity, at one glance.
class BoardPage : public Page
{
    Q_OBJECT

public:
    explicit BoardPage(Workplace& workplace, QWidget* parent = nullptr);
    ~BoardPage() override;
    QString name() const override { return QStringLiteral("board"); }
    QString title() const override { return tr("Strip board"); }
    QString sentence() const override { return tr("{engine} of {vessel}, all cylinders, {range}."); }
    void refresh() override;
    QString foot_text() const override;
    QWidget* first_focus() override;
    bool can_print() const override { return true; }
    void print(QPrinter& printer) override;
    void copy() override;
    std::optional<Selection> number_in_hand() const override;

    BoardView& view();

protected:
    void changeEvent(QEvent* event) override;

private:
    void show_words(const Board& board);
    void show_nothing();
    std::unique_ptr<Ui::BoardPage> ui_;
    std::shared_ptr<const Judgement> shown_;
    std::optional<TimeRange> shown_range_;
};

/// What a page says while there is nothing to show of the engine: judging, no reading yet, or what stood in the way.
QString empty_words(const Workplace& workplace);

} // namespace evenstroke
