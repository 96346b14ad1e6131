// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <QWidget>

namespace evenstroke {

/// A line that takes single keys and shows what they add up to.
class KeyBox : public QWidget
{
    Q_OBJECT

public:
    explicit KeyBox(QWidget* parent = nullptr);
    void show_line(const QString& line, const QString& placeholder);

signals:
    void key_typed(QChar key); ///< a letter, a digit, or '\b'
    void accepted();
    void cancelled();
    void day_moved(int days);
    void left_downwards();     ///< the down key: on to the table

protected:
    void paintEvent(QPaintEvent* event) override;
    void keyPressEvent(QKeyEvent* event) override;
    void focusInEvent(QFocusEvent* event) override;
    void focusOutEvent(QFocusEvent* event) override;
    QSize sizeHint() const override { return {400, 38}; }

private:
    QString line_, placeholder_;
};

} // namespace evenstroke
