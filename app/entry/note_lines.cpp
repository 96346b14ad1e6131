// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/entry/note_lines.h"

#include <QHBoxLayout>
#include <QLabel>
#include <QPushButton>
#include <QStringList>
#include <QVBoxLayout>

#include <algorithm>

namespace evenstroke {

namespace {

bool same_words(const std::vector<NoteLines::Line>& a, const std::vector<NoteLines::Line>& b)
{
    return std::equal(
        a.begin(), a.end(), b.begin(), b.end(), [](const NoteLines::Line& x, const NoteLines::Line& y) {
            return x.sentence == y.sentence && x.pressing == y.pressing &&
                   std::equal(x.actions.begin(), x.actions.end(), y.actions.begin(), y.actions.end(),
                              [](const NoteLines::Action& p, const NoteLines::Action& q) {
                                  return p.words == q.words;
                              });
        });
}

} // namespace

NoteLines::NoteLines(QWidget* parent) : QWidget(parent), column_(new QVBoxLayout(this))
{
    setSizePolicy(QSizePolicy::Preferred, QSizePolicy::Maximum);
    column_->setContentsMargins(0, 4, 16, 0); // room for a scroll bar
    column_->setSpacing(4);
}

void NoteLines::show_lines(const std::vector<Line>& lines)
{
    // Asked after every change: what already stands there is left standing, or it would flicker.
    const bool same = same_words(lines_, lines);
    lines_ = lines;
    if (!same)
        build();
}

void NoteLines::build()
{
    while (QLayoutItem* item = column_->takeAt(0)) {
        if (QWidget* old = item->widget()) {
            old->hide();
            old->deleteLater();
        }
        delete item;
    }
    for (const Line& line : lines_) {
        auto* row = new QWidget(this);
        auto* layout = new QHBoxLayout(row);
        layout->setContentsMargins(0, 0, 0, 0);
        layout->setSpacing(16);
        auto* sentence = new QLabel(line.sentence, row);
        sentence->setWordWrap(true);
        sentence->setTextInteractionFlags(Qt::TextSelectableByMouse);
        if (line.pressing)
            sentence->setProperty("caution", true);
        layout->addWidget(sentence, 1);
        for (const Action& action : line.actions) {
            auto* button = new QPushButton(action.words, row);
            button->setProperty("worded", true);
            // The action may rebuild these lines, and with them this button and its closure: it runs
            // afterwards.
            const std::size_t number = static_cast<std::size_t>(&line - lines_.data());
            connect(
                button, &QPushButton::clicked, this,
                [this, number, words = action.words] { act_on(number, words); }, Qt::QueuedConnection);
            layout->addWidget(button, 0, Qt::AlignTop);
        }
        column_->addWidget(row);
        row->show();
    }
    column_->addStretch();
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
    for (std::size_t number = 0; number < lines_.size(); ++number)
        if (act_on(number, words))
            return true;
    return false;
}

bool NoteLines::act_on(std::size_t number, const QString& words)
{
    if (number >= lines_.size())
        return false;
    for (const Action& action : lines_[number].actions)
        if (action.words == words) {
            const auto doing = action.act;
            doing();
            return true;
        }
    return false;
}

} // namespace evenstroke
