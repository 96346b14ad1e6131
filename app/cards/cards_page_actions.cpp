// SPDX-License-Identifier: GPL-3.0-or-later
// What leaves the page Cards: copies, files, paper.
#include "app/cards/card_plot.h"
#include "app/cards/card_words.h"
#include "app/cards/cards_page.h"
#include "app/cards/cylinder_strip.h"
#include "app/desk/number_text.h"
#include "app/desk/reading_in_hand.h"
#include "app/desk/sheet_page.h"
#include "app/desk/suggested_file.h"
#include "app/desk/workplace.h"
#include "ui_cards_page.h"

#include <QClipboard>
#include <QFileDialog>
#include <QFileInfo>
#include <QGuiApplication>
#include <QMimeData>
#include <QPrinter>
#include <QSaveFile>
#include <QTextDocument>

namespace evenstroke {

namespace {

constexpr int dots_per_inch = 96;              // paper is drawn in the same measure as the screen
constexpr double plot_on_paper = 0.32, strip_on_paper = 0.13; // of the page's height

QString as_csv(const FigureTable& table)
{
    const auto line = [](const QStringList& cells) {
        QStringList quoted;
        for (QString cell : cells) {
            cell.replace(u'−', u'-'); // a table for other programs
            quoted.append(cell.contains(u',') ? u'"' + cell.replace(u'"', QStringLiteral("\"\"")) + u'"' : cell);
        }
        return quoted.join(u',') + u'\n';
    };
    QString text = line(table.heading);
    for (const QStringList& row : table.rows)
        text += line(row);
    return text;
}

} // namespace

void CardsPage::copy_picture()
{
    if (cards_ && ui_->plot->picture().empty.isEmpty())
        QGuiApplication::clipboard()->setPixmap(ui_->plot->toPixmap(0, 0, 2.0)), say(tr("The picture is copied."));
}

/// Remarks, results and curves of the card in hand, as words and tables.
void CardsPage::copy()
{
    const indicator::ReviewedCard* card = cards_ ? cards_->find(cylinder_) : nullptr;
    if (!card)
        return;
    const FigureTable curves = card_table(*cards_, cylinder_);
    auto* copied = new QMimeData;
    copied->setText(trust_text(*cards_, *card) + u'\n' + rows_.as_text() + u'\n' + curves.as_text());
    copied->setData(QStringLiteral("text/csv"), as_csv(curves).toUtf8());
    if (ui_->plot->isVisible())
        copied->setImageData(ui_->plot->toPixmap(0, 0, 2.0).toImage());
    QGuiApplication::clipboard()->setMimeData(copied);
    say(tr("Copied: remarks, results and curves of this cylinder."));
}

void CardsPage::ask_file()
{
    if (!cards_ || !reading_)
        return;
    const EngineRecord& record = *judgement_->record;
    const QString proposed = suggested_file({to_qstring(record.vessel.name), to_qstring(record.engine.name),
                                             to_qstring(date_text(record.readings[*reading_].taken_at.utc)),
                                             place_title(record.engine, Place::cylinder(cylinder_))},
                                            QStringLiteral(".pdf"));
    const QString path = QFileDialog::getSaveFileName(this, tr("Save the card"), proposed,
                                                      tr("Picture for paper (*.pdf);;Picture (*.png);;Table (*.csv)"));
    if (!path.isEmpty())
        save_as(path);
}

bool CardsPage::save_as(const QString& path)
{
    if (!cards_)
        return false;
    bool saved = false;
    const QString ending = QFileInfo(path).suffix().toLower();
    if (ending == QLatin1String("csv")) {
        QSaveFile file(path);
        saved = file.open(QIODevice::WriteOnly) && file.write(as_csv(card_table(*cards_, cylinder_)).toUtf8()) >= 0 && file.commit();
    } else if (ending == QLatin1String("pdf") || ending == QLatin1String("png")) {
        saved = CardPlot::save(ui_->plot->picture(), path, QSize(1000, 560));
    } else {
        say(tr("The ending of %1 is not known here. Use .pdf, .png or .csv.").arg(path));
        return false;
    }
    say(saved ? tr("Saved as %1.").arg(path) : tr("%1 could not be written. Choose a folder that allows writing.").arg(path));
    return saved;
}

void CardsPage::print(QPrinter& printer)
{
    const indicator::ReviewedCard* card = cards_ ? cards_->find(cylinder_) : nullptr;
    if (!card)
        return;
    printer.setResolution(dots_per_inch);
    QCPPainter painter(&printer);
    const Theme& t = theme_of(ThemeKind::print);
    const QSizeF page = printer.pageRect(QPrinter::DevicePixel).size();
    QTextDocument words;
    words.setDefaultFont(type(TypeSize::body));
    words.setDefaultStyleSheet(sheet_style(t));
    words.setTextWidth(page.width());
    const auto write = [&](const QString& html) {
        words.setHtml(QStringLiteral("<body>%1</body>").arg(html));
        words.drawContents(&painter);
        painter.translate(0.0, words.size().height());
    };
    const auto paragraph = [](const QString& text, const char* kind) { return sheet_paragraph(text, kind); };
    write(paragraph(tr("Indicator card, %1").arg(place_title(cards_->engine(), Place::cylinder(cylinder_), false)), "title")
          + paragraph(tr("%1 of %2, reading of %3").arg(to_qstring(cards_->engine().name), to_qstring(judgement_->record->vessel.name),
                                                        reading_words(*judgement_, cards_->review.reading)), "muted")
          + paragraph(trust_headline(*cards_, *card), "strong") + trust_html(*cards_, *card));
    const CardPicture& picture = ui_->plot->picture();
    if (picture.empty.isEmpty()) {
        const QSize size(static_cast<int>(page.width()), static_cast<int>(plot_on_paper * page.height()));
        CardPlot::paint(picture, painter, size);
        painter.translate(0.0, size.height());
    }
    write(paragraph(picture.empty.isEmpty() ? picture.sentence : picture.empty, ""));
    const QRectF strip(0.0, 0.0, page.width(), strip_on_paper * page.height());
    CylinderStrip::paint(*cards_, cylinder_, painter, strip, t);
    painter.translate(0.0, strip.height() + 8.0);
    std::vector<QStringList> rows;
    for (const CardRow& row : card_rows(*card))
        rows.push_back({row.title, row.now, row.healthy, row.difference, row.hand_read});
    const QString table = sheet_table({tr("Result"), tr("card"), tr("healthy"), tr("difference"), tr("by hand")}, rows);
    words.setHtml(QStringLiteral("<body>%1</body>").arg(table));
    if (painter.transform().dy() + words.size().height() > page.height()) {
        printer.newPage();
        painter.resetTransform();
    }
    write(table);
}

} // namespace evenstroke
