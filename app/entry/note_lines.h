// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <QString>
#include <QWidget>

#include <functional>
#include <vector>

class QVBoxLayout;

namespace evenstroke {

/// The sentences under the log sheet: what stands in the way, what does not fit, what can be done about it.
class NoteLines : public QWidget
{
    Q_OBJECT

public:
    struct Action
    {
        QString words;
        std::function<void()> act;
    };
    struct Line
    {
        QString sentence;
        bool pressing = false; ///< something was refused, or cannot be
        std::vector<Action> actions;
    };

    explicit NoteLines(QWidget* parent = nullptr);
    void show_lines(const std::vector<Line>& lines);
    /// All sentences, a line each.
    QString text() const;
    /// Does what the first action of that name does; false where there is none.
    bool act(const QString& words);

private:
    void build();
    bool act_on(std::size_t number, const QString& words);
    QVBoxLayout* column_;
    std::vector<Line> lines_;
};

} // namespace evenstroke
