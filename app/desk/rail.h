// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <QAbstractButton>
#include <QWidget>

#include <vector>

class QButtonGroup;
class QVBoxLayout;

namespace evenstroke {

/// One line of the rail: key letter, title, count of what is new.
class RailButton : public QAbstractButton
{
    Q_OBJECT

public:
    RailButton(QChar key, const QString& title, QWidget* parent = nullptr);
    void set_count(int count);
    void set_remark(const QString& remark); ///< "draft of 1 Dec": small, at the right; a count goes before
    QSize sizeHint() const override;

protected:
    void paintEvent(QPaintEvent* event) override;

private:
    QChar key_;
    QString title_, remark_;
    int count_ = 0;
};

/// The pages in the order of the work, at the left of everything; one level only.
class Rail : public QWidget
{
    Q_OBJECT

public:
    explicit Rail(QWidget* parent = nullptr);
    void add(const QString& name, QChar key, const QString& title);
    /// Room before the next line: it is not part of the daily work.
    void add_space();
    /// A page that has no line here leaves none marked.
    void set_current(const QString& name);
    void set_count(const QString& name, int count);
    void set_remark(const QString& name, const QString& remark);
    void set_enabled(const QString& name, bool enabled);

signals:
    void chosen(const QString& name);

protected:
    void paintEvent(QPaintEvent* event) override;

private:
    struct Line
    {
        QString name;
        RailButton* button;
    };
    RailButton* find(const QString& name) const;
    std::vector<Line> lines_;
    QVBoxLayout* layout_;
    QButtonGroup* group_;
};

} // namespace evenstroke
