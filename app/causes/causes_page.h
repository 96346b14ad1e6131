// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "app/cards/card_shelf.h"
#include "app/desk/sheet_page.h"
#include "core/explanation/explanation.h"

namespace evenstroke {

/// What may lie behind readings that are out of the usual: possible causes with what fits and what speaks against,
/// what to check next, cautions first. Never a verdict.
class CausesPage : public SheetPage
{
    Q_OBJECT

public:
    explicit CausesPage(Workplace& workplace, QWidget* parent = nullptr);
    QString name() const override { return QStringLiteral("causes"); }
    QString title() const override { return tr("Possible causes"); }
    QString sentence() const override { return tr("What may lie behind the newest reading of {engine} of {vessel}."); }
    void refresh() override;
    QString text() const { return plain_text(); }

protected:
    void fill(QTextDocument& document, const Theme& colours) const override;
    QString plain_text() const override;

private:
    std::shared_ptr<const Judgement> judgement_;
    std::optional<Explanation> explanation_; ///< of `judgement_`
    CardsStored cards_;
};

} // namespace evenstroke
