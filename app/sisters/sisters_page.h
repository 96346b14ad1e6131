// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "app/desk/sheet_page.h"
#include "app/sisters/sister_run.h"

namespace evenstroke {

/// The engine that is looked at beside its sisters: which of them is apart at the same power.
class SistersPage : public SheetPage
{
    Q_OBJECT

public:
    explicit SistersPage(Workplace& workplace, QWidget* parent = nullptr);
    QString name() const override { return QStringLiteral("sisters"); }
    QString title() const override { return tr("Sister engines"); }
    QString sentence() const override { return tr("{engine} of {vessel} beside engines of its kind."); }
    void refresh() override;
    QString text() const { return plain_text(); }
    bool busy() const { return run_.busy(); }

protected:
    void fill(QTextDocument& document, const Theme& colours) const override;
    QString plain_text() const override;

private:
    void show_found();
    QStringList sentences() const;
    QStringList heads() const;
    std::vector<QStringList> rows() const;
    QString below() const;

    SisterRun run_{this};
    std::shared_ptr<const Judgement> asked_for_; ///< the judgement at which the sisters were looked for
};

} // namespace evenstroke
