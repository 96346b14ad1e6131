// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/trend/judgement.h"

#include <QFrame>
#include <QVariant>

#include <functional>
#include <vector>

class QLineEdit;
class QListView;
class QSortFilterProxyModel;
class QStandardItemModel;

namespace evenstroke {

struct Choice
{
    QString text;
    QVariant value;
    Level level = Level::quiet; ///< drawn as its mark before the text
    bool chosen = false;        ///< what is in force
};

/// A list that drops down from a part of the sentence. Typing narrows a long one; Enter takes, Escape leaves.
class Chooser : public QFrame
{
    Q_OBJECT

public:
    using Take = std::function<void(const QVariant&)>;
    Chooser(const std::vector<Choice>& choices, Take take, QWidget* parent = nullptr);
    /// Opens below `anchor`, which gets the focus back. The chooser deletes itself when it closes.
    void open_below(QWidget* anchor);

protected:
    bool eventFilter(QObject* watched, QEvent* event) override;
    void keyPressEvent(QKeyEvent* event) override;

private:
    void fill(const std::vector<Choice>& choices);
    void take_current();
    Take take_;
    QStandardItemModel* model_;
    QSortFilterProxyModel* narrowed_;
    QLineEdit* filter_;
    QListView* list_;
};

} // namespace evenstroke
