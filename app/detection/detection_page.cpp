// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/detection/detection_page.h"

#include "app/board/board_page.h"
#include "app/desk/number_text.h"
#include "app/desk/workplace.h"

#include <QPushButton>
#include <QTextDocument>

namespace evenstroke {
namespace {

std::vector<QStringList> cells(const std::vector<DetectionRow>& rows)
{
    std::vector<QStringList> all;
    for (const DetectionRow& row : rows)
        all.push_back({row.what, row.measured, row.interval, row.half_found, row.remark});
    return all;
}

} // namespace

DetectionPage::DetectionPage(Workplace& place, QWidget* parent) : SheetPage(place, parent), measure_button_(add_action())
{
    connect(measure_button_, &QPushButton::clicked, this, [this] {
        if (run_.busy())
            run_.stop();
        else
            measure({});
        show_run();
    });
    connect(&run_, &DetectionRun::progressed, this, &DetectionPage::show_run);
    connect(&run_, &DetectionRun::finished, this, [this](const simulation::DetectionPower& power) {
        power_ = power;
        show_text();
        show_run();
    });
}

void DetectionPage::refresh()
{
    const auto judgement = workplace().judgement();
    if (judgement != judgement_) {
        run_.stop();
        power_.reset();
        judgement_ = judgement;
        likeness_ = judgement_ ? simulation::likeness_of(*judgement_) : std::nullopt;
    }
    show_text();
    show_run();
}

void DetectionPage::measure(const simulation::Effort& effort)
{
    if (likeness_)
        run_.start(*likeness_, effort);
}

void DetectionPage::show_text()
{
    text_ = {};
    if (!likeness_) {
        show_instead(judgement_ ? tr("It takes three readings to know how an engine scatters and how often it is read.")
                                : empty_words(workplace()));
        return;
    }
    const EngineRecord& record = *judgement_->record;
    text_ = detection_text(tr("%1 of %2").arg(to_qstring(record.engine.name), to_qstring(record.vessel.name)), *likeness_, power_);
    show_sheet();
}

void DetectionPage::show_run()
{
    measure_button_->setVisible(likeness_.has_value());
    measure_button_->setText(run_.busy() ? tr("stop (Esc)")
                             : power_    ? tr("measure again (Return)")
                                         : tr("measure on simulated engines (Return)"));
    if (run_.busy())
        show_progress(run_.done(), run_.total(), tr("%1 of %2 engines").arg(run_.done()).arg(run_.total()));
    else
        hide_progress();
}

void DetectionPage::fill(QTextDocument& document, const Theme& colours) const
{
    document.setDefaultStyleSheet(sheet_style(colours));
    document.setHtml(
        QStringLiteral("<body>") + sheet_paragraph(text_.title, "title") + sheet_paragraph(text_.engine, "muted") +
        sheet_paragraph(text_.sound) +
        sheet_table({tr("without a cause"), tr("measured"), tr("95 of 100 such runs lie within"), {}, {}}, cells(text_.alarms)) +
        sheet_table({tr("fault that begins"), tr("found within 12 readings"), tr("95 of 100 such runs"),
                     tr("half are found within"), tr("what it does")}, cells(text_.faults), true) +
        sheet_paragraph(text_.meaning) + sheet_paragraph(text_.assumptions, "small") + QStringLiteral("</body>"));
}

bool DetectionPage::take_key(int key)
{
    const bool begin = key == Qt::Key_Return || key == Qt::Key_Enter;
    if (!likeness_ || !(begin ? !run_.busy() : key == Qt::Key_Escape && run_.busy()))
        return false;
    measure_button_->click();
    return true;
}

} // namespace evenstroke
