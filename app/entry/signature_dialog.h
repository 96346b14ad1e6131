// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "storage/reading_store.h"

#include <QDialog>

class QLineEdit;

namespace evenstroke {

/// Asks who does something that the history keeps with a name and a reason.
class SignatureDialog : public QDialog
{
    Q_OBJECT

public:
    /// @param action words of the button that goes on; it can be pressed once both lines hold something
    /// @param before what was written last time
    SignatureDialog(const QString& title, const QString& words, const QString& action,
                    const storage::Signature& before, QWidget* parent = nullptr);

    storage::Signature signature() const;

private:
    QLineEdit* who_;
    QLineEdit* why_;
};

} // namespace evenstroke
