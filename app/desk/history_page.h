// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "app/desk/page.h"
#include "app/desk/taking_in.h"

#include <memory>

class QTemporaryDir;

namespace Ui {
class HistoryPage;
}

namespace evenstroke {

/// Where a history is opened, made, or filled from files; the first page while nothing is open.
class HistoryPage : public Page
{
    Q_OBJECT

public:
    explicit HistoryPage(Workplace& workplace, QWidget* parent = nullptr);
    ~HistoryPage() override;
    QString name() const override { return QStringLiteral("history"); }
    QString title() const override { return tr("History"); }
    QString sentence() const override;
    void refresh() override;
    QWidget* first_focus() override;

    // What the buttons do once a file or folder is known; each answers whether it began.
    bool open_history(const QString& path);
    bool make_history(const QString& path);
    /// Takes folders into the open history.
    bool take_in(const QStringList& folders);
    /// Makes a history with the invented vessel in it.
    bool make_sample(const QString& path);
    bool working() const { return taking_.running(); }

signals:
    void work_done();

private:
    void say(const std::optional<Problem>& problem);
    void show_report();
    void show_recent();
    void ask_open();
    void ask_new();
    void ask_folder();
    void ask_sample();
    std::unique_ptr<Ui::HistoryPage> ui_;
    TakingIn taking_;
    std::unique_ptr<QTemporaryDir> sample_files_;
};

/// Histories opened before, newest first, those that are still there.
QStringList recent_histories();
void note_recent_history(const QString& path);

} // namespace evenstroke
