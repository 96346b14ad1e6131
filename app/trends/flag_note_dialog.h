// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/trend/judgement.h"

#include <QDialog>

#include <optional>

class QComboBox;
class QLineEdit;

namespace evenstroke {

/// Asks what was found about a flag, or answers a question. Nothing is taken out of the record by it.
class FlagNoteDialog : public QDialog
{
    Q_OBJECT

public:
    /// @param record gives the diary, for the work that a note can be tied to; @param who signed the last note
    FlagNoteDialog(const EngineRecord& record, const Flag& flag, const QString& who, QWidget* parent = nullptr);

    /// What is to be kept; its subject, flag and level are filled in. Nothing before a button was pressed.
    const std::optional<FlagNote>& note() const { return note_; }

    // What keys and the mouse do, for tests.
    void write(const QString& words, const QString& who);
    void press(FlagNote::Said said);

private:
    void fill_events(const EngineRecord& record, const Flag& flag);

    FlagNote wanted_;
    std::optional<FlagNote> note_;
    QLineEdit* words_;
    QComboBox* event_;
    QLineEdit* who_;
};

} // namespace evenstroke
