// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/entry/note_lines.h"

#include <QHBoxLayout>
#include <QLabel>
#include <QPushButton>
#include <QStringList>
#include <QVBoxLayout>

namespace evenstroke {

NoteLines::NoteLines(QWidget* parent) : QWidget(parent), column_(new QVBoxLayout(this))
{
    column_->setContentsMargins(0, 4, 0, 0);
    column_->setSpacing(4);
}

void NoteLines::show_lines(const std::vector<Line>& lines)
{
    while (QLayoutItem* item = column_->takeAt(0)) {
        if (item->widget())
            item->widget()->deleteLater();
        delete item;
    }
    lines_ = lines;
    for (const Line& line : lines_) {
        auto* row = new QWidget(this);
        auto* layout = new QHBoxLayout(row);
        layout->setContentsMargins(0, 0, 0, 0);
        layout->setSpacing(16);
        auto* sentence = new QLabel(line.sentence, row);
        sentence->setWordWrap(true);
        sentence->setTextInteractionFlags(Qt::TextSelectableByMouse);
        sentence->setProperty(line.pressing ? "caution" : "muted", line.pressing);
        layout->addWidget(sentence, 1);
        for (const Action& action : line.actions) {
            auto* button = new QPushButton(action.words, row);
            button->setProperty("worded", true);
            // The action may rebuild these lines, and with them this button and its closure: it runs
            // afterwards.
            connect(
                button, &QPushButton::clicked, this, [this, words = action.words] { act(words); },
                Qt::QueuedConnection);
            layout->addWidget(button, 0, Qt::AlignTop);
        }
        column_->addWidget(row);
    }
    column_->addStretch();
    setVisible(!lines_.empty());
}

QString NoteLines::text() const
{
    QStringList sentences;
    for (const Line& line : lines_)
        sentences << line.sentence;
    return sentences.join(u'\n');
}

bool NoteLines::act(const QString& words)
{
    for (const Line& line : lines_)
        for (const Action& action : line.actions)
            if (action.words == words) {
                const auto doing = action.act;
                doing();
                return true;
            }
    return false;
}

} // namespace evenstroke
