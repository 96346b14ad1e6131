// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "app/entry/entry_session.h"
#include "app/entry/note_lines.h"
#include "core/trend/judgement.h"

#include <QStringList>
#include <QWidget>

#include <memory>

namespace Ui {
class ClosedView;
}

namespace evenstroke {

class Workplace;

/// What came of a reading just closed: steadiness, what is missing, what began with it, and where to go next.
class ClosedView : public QWidget
{
    Q_OBJECT

public:
    explicit ClosedView(QWidget* parent = nullptr);
    ~ClosedView() override;

    /// @param kept what was in doubt when it was closed all the same
    /// @param judgement null while it is still being made
    void show_reading(const EntrySession& session, Workplace& workplace, const QStringList& kept,
                      std::shared_ptr<const Judgement> judgement);
    const NoteLines& findings() const;
    QWidget* first_focus();
    QString text() const; ///< everything it says, for readers of the screen and tests

signals:
    void board_wanted();
    void another_wanted(); ///< another reading of this engine
    void engine_wanted(const QString& engine_id);
    void correction_wanted(const QString& reading_id);

private:
    void show_findings(const Judgement& judgement, std::size_t reading);
    std::vector<NoteLines::Line> kept_lines() const;
    void show_engines(Workplace& workplace, const EntrySession& session);

    std::unique_ptr<Ui::ClosedView> ui_;
    QString reading_id_;
    QStringList kept_;
};

} // namespace evenstroke
