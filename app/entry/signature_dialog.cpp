// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/entry/signature_dialog.h"

#include "app/desk/number_text.h"

#include <QDialogButtonBox>
#include <QFormLayout>
#include <QLabel>
#include <QLineEdit>
#include <QPushButton>

namespace evenstroke {

SignatureDialog::SignatureDialog(const QString& title, const QString& words, const QString& action,
                                 const storage::Signature& before, QWidget* parent)
    : QDialog(parent), who_(new QLineEdit(to_qstring(before.who), this)), why_(new QLineEdit(to_qstring(before.why), this))
{
    setWindowTitle(title);
    auto* explained = new QLabel(words, this);
    explained->setWordWrap(true);
    explained->setMinimumWidth(420); // two lines of words at the desk's letter size
    auto* buttons = new QDialogButtonBox(QDialogButtonBox::Cancel, this);
    QPushButton* go_on = buttons->addButton(action, QDialogButtonBox::AcceptRole);
    auto* form = new QFormLayout(this);
    form->addRow(explained);
    form->addRow(tr("Name"), who_);
    form->addRow(tr("Reason"), why_);
    form->addRow(buttons);
    const auto look = [this, go_on] {
        go_on->setEnabled(!who_->text().trimmed().isEmpty() && !why_->text().trimmed().isEmpty());
    };
    connect(who_, &QLineEdit::textChanged, this, look);
    connect(why_, &QLineEdit::textChanged, this, look);
    connect(buttons, &QDialogButtonBox::accepted, this, &QDialog::accept);
    connect(buttons, &QDialogButtonBox::rejected, this, &QDialog::reject);
    look();
    (before.who.empty() ? static_cast<QWidget*>(who_) : before.why.empty() ? static_cast<QWidget*>(why_) : go_on)->setFocus();
}

storage::Signature SignatureDialog::signature() const
{
    storage::Signature by;
    by.who = to_std(who_->text().trimmed());
    by.why = to_std(why_->text().trimmed());
    return by;
}

} // namespace evenstroke
