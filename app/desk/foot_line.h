// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <QWidget>

class QLabel;
class QPushButton;

namespace evenstroke {

/// One line under everything: state of the history or of a draft, what is in force, the theme.
class FootLine : public QWidget
{
    Q_OBJECT

public:
    explicit FootLine(QWidget* parent = nullptr);
    void set_state(const QString& text);
    /// Long work can be stopped here.
    void set_stoppable(bool stoppable);
    void set_middle(const QString& text);
    void set_theme_word(const QString& word);

signals:
    void theme_asked();
    void stop_asked();

protected:
    void paintEvent(QPaintEvent* event) override;

private:
    QLabel* state_;
    QPushButton* stop_;
    QLabel* middle_;
    QPushButton* theme_;
};

} // namespace evenstroke
