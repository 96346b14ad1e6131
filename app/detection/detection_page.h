// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "app/desk/page.h"
#include "app/detection/detection_run.h"
#include "app/detection/detection_text.h"

#include <memory>

namespace Ui {
class DetectionPage;
}

namespace evenstroke {

struct Judgement;

/// How good the flags are on the engine that is looked at: measured on simulated engines like it.
///
/// Keys: Return measures, Escape stops a measurement or goes back.
class DetectionPage : public Page
{
    Q_OBJECT

public:
    explicit DetectionPage(Workplace& workplace, QWidget* parent = nullptr);
    ~DetectionPage() override;
    QString name() const override { return QStringLiteral("detection"); }
    QString title() const override { return tr("How good is this?"); }
    QString sentence() const override { return tr("How good are the flags of {engine} of {vessel}?"); }
    void refresh() override;
    QWidget* first_focus() override;
    bool can_print() const override { return true; }
    void print(QPrinter& printer) override;
    void copy() override;

    void measure(const simulation::Effort& effort);
    const DetectionText& text() const { return text_; }
    bool busy() const { return run_.busy(); }

protected:
    void keyPressEvent(QKeyEvent* event) override;
    bool eventFilter(QObject* watched, QEvent* event) override;
    void changeEvent(QEvent* event) override;

private:
    void show_text();
    void show_progress();
    bool take_key(int key);
    void go_back();

    std::unique_ptr<Ui::DetectionPage> ui_;
    DetectionRun run_;
    std::shared_ptr<const Judgement> judgement_;
    std::optional<simulation::Likeness> likeness_;
    std::optional<simulation::DetectionPower> power_; ///< of `judgement_`
    DetectionText text_;
};

} // namespace evenstroke
