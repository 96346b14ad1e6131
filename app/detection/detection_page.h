// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "app/desk/sheet_page.h"
#include "app/detection/detection_run.h"
#include "app/detection/detection_text.h"

namespace evenstroke {

struct Judgement;

/// How good the flags are on the engine that is looked at: measured on simulated engines like it.
///
/// Keys: Return measures, Escape stops a measurement or goes back.
class DetectionPage : public SheetPage
{
    Q_OBJECT

public:
    explicit DetectionPage(Workplace& workplace, QWidget* parent = nullptr);
    QString name() const override { return QStringLiteral("detection"); }
    QString title() const override { return tr("How good is this?"); }
    QString sentence() const override { return tr("How good are the flags of {engine} of {vessel}?"); }
    void refresh() override;

    void measure(const simulation::Effort& effort);
    const DetectionText& text() const { return text_; }
    bool busy() const { return run_.busy(); }

protected:
    void fill(QTextDocument& document, const Theme& colours) const override;
    QString plain_text() const override { return detection_plain(text_); }
    bool take_key(int key) override;

private:
    void show_text();
    void show_run();

    DetectionRun run_;
    QPushButton* measure_button_;
    std::shared_ptr<const Judgement> judgement_;
    std::optional<simulation::Likeness> likeness_;
    std::optional<simulation::DetectionPower> power_; ///< of `judgement_`
    DetectionText text_;
};

} // namespace evenstroke
