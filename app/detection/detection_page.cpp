// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/detection/detection_page.h"

#include "app/board/board_page.h"
#include "app/desk/number_text.h"
#include "app/desk/theme.h"
#include "app/desk/workplace.h"
#include "ui_detection_page.h"

#include <QClipboard>
#include <QGuiApplication>
#include <QKeyEvent>
#include <QPrinter>
#include <QTextDocument>

namespace evenstroke {
namespace {

QString paragraph(const QString& words, const char* kind)
{
    return words.isEmpty() ? QString()
                           : QStringLiteral("<p class=\"%1\">%2</p>").arg(QLatin1String(kind), words.toHtmlEscaped());
}

QString table(const std::vector<DetectionRow>& rows, const QStringList& heads)
{
    if (rows.empty())
        return {};
    QString html = QStringLiteral("<table cellspacing=\"0\" cellpadding=\"3\"><tr>");
    for (const QString& head : heads)
        html += QStringLiteral("<td class=\"small\" style=\"padding-right: 24px;\">%1</td>").arg(head.toHtmlEscaped());
    html += QStringLiteral("</tr>");
    for (const DetectionRow& row : rows) {
        html += QStringLiteral("<tr>");
        for (const QString& words : {row.what, row.measured, row.interval, row.half_found})
            html += QStringLiteral("<td style=\"padding-right: 24px;\">%1</td>").arg(words.toHtmlEscaped());
        html += QStringLiteral("<td class=\"small\">%1</td></tr>").arg(row.remark.toHtmlEscaped());
    }
    return html + QStringLiteral("</table>");
}

void fill(QTextDocument& document, const DetectionText& text, const Theme& t)
{
    document.setDefaultStyleSheet(
        QStringLiteral("body { color: %1; font-size: 10.5pt; } p { margin: 0px 0px 8px 0px; } .muted { color: %2; } "
                       ".small { font-size: 9pt; color: %2; } .title { font-size: 14pt; }")
            .arg(t.ink.name(), t.muted.name()));
    document.setHtml(
        QStringLiteral("<body>") + paragraph(text.title, "title") + paragraph(text.engine, "muted") + paragraph(text.sound, "") +
        table(text.alarms, {DetectionPage::tr("without a cause"), DetectionPage::tr("measured"),
                            DetectionPage::tr("95 of 100 such runs lie within"), QString(), QString()}) +
        paragraph(text.faults.empty() ? QString() : QStringLiteral(" "), "") +
        table(text.faults, {DetectionPage::tr("fault that begins"), DetectionPage::tr("found within 12 readings"),
                            DetectionPage::tr("95 of 100 such runs"), DetectionPage::tr("half are found within"),
                            DetectionPage::tr("what it does")}) +
        paragraph(text.meaning.isEmpty() ? QString() : QStringLiteral(" "), "") + paragraph(text.meaning, "") +
        paragraph(text.assumptions, "small") + QStringLiteral("</body>"));
}

} // namespace

DetectionPage::DetectionPage(Workplace& place, QWidget* parent)
    : Page(place, parent), ui_(std::make_unique<Ui::DetectionPage>())
{
    ui_->setupUi(this);
    ui_->sheet->installEventFilter(this);
    ui_->sheet->setAccessibleName(title());
    connect(ui_->back_button, &QPushButton::clicked, this, &DetectionPage::go_back);
    connect(ui_->copy_button, &QPushButton::clicked, this, &DetectionPage::copy);
    connect(ui_->measure_button, &QPushButton::clicked, this, [this] { run_.busy() ? run_.stop() : measure({}); show_progress(); });
    connect(&run_, &DetectionRun::progressed, this, &DetectionPage::show_progress);
    connect(&run_, &DetectionRun::finished, this, [this](const simulation::DetectionPower& power) {
        power_ = power;
        show_text();
        show_progress();
    });
}

DetectionPage::~DetectionPage() = default;

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
    show_progress();
}

void DetectionPage::measure(const simulation::Effort& effort)
{
    if (likeness_)
        run_.start(*likeness_, effort);
}

void DetectionPage::show_text()
{
    ui_->sheet->setVisible(likeness_.has_value());
    ui_->empty->setVisible(!likeness_);
    if (!likeness_) {
        text_ = {};
        ui_->empty->setText(judgement_ ? tr("It takes three readings to know how an engine scatters and how often it is read.")
                                       : empty_words(workplace()));
        return;
    }
    const EngineRecord& record = *judgement_->record;
    text_ = detection_text(tr("%1 of %2").arg(to_qstring(record.engine.name), to_qstring(record.vessel.name)), *likeness_, power_);
    fill(*ui_->sheet->document(), text_, theme());
    ui_->sheet->setAccessibleDescription(detection_plain(text_));
}

void DetectionPage::show_progress()
{
    ui_->measure_button->setVisible(likeness_.has_value());
    ui_->measure_button->setText(run_.busy() ? tr("stop (Esc)")
                                 : power_    ? tr("measure again (Return)")
                                             : tr("measure on simulated engines (Return)"));
    ui_->progress->setVisible(run_.busy());
    ui_->progress->setMaximum(std::max(1, run_.total()));
    ui_->progress->setValue(run_.done());
    ui_->progress_words->setVisible(run_.busy());
    ui_->progress_words->setText(tr("%1 of %2 engines").arg(run_.done()).arg(run_.total()));
}

QWidget* DetectionPage::first_focus() { return likeness_ ? static_cast<QWidget*>(ui_->sheet) : this; }

void DetectionPage::go_back()
{
    if (workplace().can_go_back())
        workplace().go_back();
    else
        workplace().open_page(QStringLiteral("trend"));
}

bool DetectionPage::take_key(int key)
{
    if (key == Qt::Key_Escape && !run_.busy()) {
        go_back();
        return true;
    }
    const bool begin = key == Qt::Key_Return || key == Qt::Key_Enter;
    if (!likeness_ || (begin ? run_.busy() : key != Qt::Key_Escape))
        return false;
    ui_->measure_button->click();
    return true;
}

void DetectionPage::keyPressEvent(QKeyEvent* event)
{
    if (!take_key(event->key()))
        Page::keyPressEvent(event);
}

bool DetectionPage::eventFilter(QObject* watched, QEvent* event)
{
    if (watched == ui_->sheet && event->type() == QEvent::KeyPress && take_key(static_cast<QKeyEvent*>(event)->key()))
        return true;
    return Page::eventFilter(watched, event);
}

void DetectionPage::changeEvent(QEvent* event)
{
    if (event->type() == QEvent::StyleChange && isVisible())
        show_text();
    Page::changeEvent(event);
}

void DetectionPage::copy()
{
    QGuiApplication::clipboard()->setText(detection_plain(text_));
}

void DetectionPage::print(QPrinter& printer)
{
    if (!likeness_)
        return;
    QTextDocument paper;
    fill(paper, text_, theme_of(ThemeKind::print));
    paper.print(&printer);
}

} // namespace evenstroke
