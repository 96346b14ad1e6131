// SPDX-License-Identifier: GPL-3.0-or-later
// The column beside the plot, and what leaves the page: copies, files, paper.
#include "app/desk/number_text.h"
#include "app/desk/suggested_file.h"
#include "app/desk/workplace.h"
#include "app/trends/flag_note_dialog.h"
#include "app/trends/trend_page.h"
#include "app/trends/trend_plot.h"
#include "storage/flag_note_store.h"
#include "storage/preference_store.h"
#include "ui_trend_page.h"

#include <QClipboard>
#include <QFileDialog>
#include <QFileInfo>
#include <QGuiApplication>
#include <QMimeData>
#include <QPrinter>
#include <QSaveFile>

namespace evenstroke {

namespace {

const std::string note_signed_by = "trend.note_signed_by";
constexpr int dots_per_inch = 96; // paper is drawn in the same measure as the screen
constexpr double plot_height_on_paper = 0.62;

struct SideBlock
{
    QString heading, first, second;
    bool caution = false, figure = false;
};

std::vector<SideBlock> side_blocks(const TrendPicture& picture)
{
    std::vector<SideBlock> blocks;
    const auto add_cautions = [&](bool emergencies) {
        for (const TrendPicture::CautionWords& caution : picture.cautions)
            if (caution.emergency == emergencies)
                blocks.push_back({TrendPage::tr("Caution"), caution.title, caution.text, true, false});
    };
    add_cautions(true); // an alarm matter stands first, in full
    QStringList mind;
    for (const TrendPicture::CautionWords& caution : picture.cautions)
        if (!caution.emergency)
            mind.append(caution.title);
    if (!mind.isEmpty()) // before what to do; the words in full follow below it
        blocks.push_back({TrendPage::tr("Caution"), mind.join(u'\n'), TrendPage::tr("in full below"), true, false});
    if (!picture.next_check.isEmpty())
        blocks.push_back({TrendPage::tr("Check next"), picture.next_check, {}, false, false});
    if (!picture.note_words.isEmpty())
        blocks.push_back({TrendPage::tr("What was said"), picture.note_words, {}, false, false});
    if (!picture.limit_figure.isEmpty())
        blocks.push_back({TrendPage::tr("Until the limit"), picture.limit_figure, picture.limit_words, false, true});
    if (!picture.fits.isEmpty() || !picture.moved.isEmpty())
        blocks.push_back({picture.fits.isEmpty() ? TrendPage::tr("What moved") : TrendPage::tr("What fits"), picture.fits,
                          picture.moved.join(u'\n'), false, false});
    add_cautions(false);
    return blocks;
}

void add_label(QVBoxLayout& layout, const QString& text, const char* property, int space_above)
{
    if (text.isEmpty())
        return;
    auto* label = new QLabel(text);
    label->setWordWrap(true);
    label->setTextFormat(Qt::PlainText);
    label->setTextInteractionFlags(Qt::TextSelectableByMouse);
    label->setContentsMargins(0, space_above, 0, 0);
    if (property)
        label->setProperty(property, true);
    if (property && QLatin1String(property) == QLatin1String("muted"))
        label->setProperty("small", true);
    layout.addWidget(label);
}

} // namespace

void TrendPage::show_side(const TrendPicture& picture)
{
    while (QLayoutItem* item = ui_->side_lines->takeAt(0)) {
        delete item->widget();
        delete item;
    }
    std::vector<SideBlock> blocks = side_blocks(picture);
    if (ui_->opinions_button->isChecked())
        blocks.push_back({tr("Second opinions"),
                          picture.second_opinions.isEmpty() ? tr("Too few values for any.") : picture.second_opinions.join(QStringLiteral("\n")),
                          tr("They are only shown, and raise nothing: lasting differences, a common change or one slip make them speak "
                             "without cause."), false, false});
    for (const SideBlock& block : blocks) {
        const bool first = ui_->side_lines->count() == 0;
        add_label(*ui_->side_lines, block.heading, block.caution ? "cautionhead" : "muted", first ? 0 : 16);
        add_label(*ui_->side_lines, block.first, block.figure ? "sidefigure" : nullptr, 2);
        add_label(*ui_->side_lines, block.second, "muted", 2);
    }
    ui_->side_lines->addStretch(1);
}

void TrendPage::ask_note()
{
    const auto index = ui_->plot->picture().flag_index;
    if (!index || !judgement_ || !workplace().history() || workplace().read_only())
        return;
    storage::PreferenceStore preferences(*workplace().history());
    const auto who = preferences.choice({}, note_signed_by);
    FlagNoteDialog dialog(*judgement_->record, judgement_->flags[*index],
                          who && who.value() ? to_qstring(*who.value()) : QString(), this);
    if (dialog.exec() == QDialog::Accepted && dialog.note())
        keep_note(*dialog.note());
}

bool TrendPage::keep_note(const FlagNote& note)
{
    const auto kept = storage::FlagNoteStore(*workplace().history()).add(judgement_->record->engine.id, note);
    if (!kept) {
        ui_->saved->setText(to_qstring(kept.error().text()));
        ui_->saved->show();
        return false;
    }
    static_cast<void>(storage::PreferenceStore(*workplace().history()).set_choice({}, note_signed_by, note.who)); // a convenience only
    workplace().changed();
    return true;
}

void TrendPage::copy_picture()
{
    QGuiApplication::clipboard()->setPixmap(ui_->plot->toPixmap(0, 0, 2.0));
}

void TrendPage::copy()
{
    auto* copied = new QMimeData;
    copied->setText(table_.as_text());
    copied->setData(QStringLiteral("text/csv"), table_.as_csv());
    if (ui_->plot->isVisible())
        copied->setImageData(ui_->plot->toPixmap(0, 0, 2.0).toImage());
    QGuiApplication::clipboard()->setMimeData(copied);
}

void TrendPage::ask_file()
{
    const auto judgement = workplace().judgement();
    if (!judgement)
        return;
    const EngineRecord& record = *judgement->record;
    const Selection& selection = workplace().selection();
    const QString proposed = suggested_file({to_qstring(record.vessel.name), to_qstring(record.engine.name), selection.quantity ? to_qstring(quantity(*selection.quantity).name) : tr("trend"),
                                             place_title(record.engine, selection.place)}, QStringLiteral(".pdf"));
    const QString path = QFileDialog::getSaveFileName(this, tr("Save the trend"), proposed,
                                                      tr("Picture for paper (*.pdf);;Picture (*.png);;Table (*.csv)"));
    if (!path.isEmpty())
        save_as(path);
}

bool TrendPage::save_as(const QString& path)
{
    bool saved = false;
    const QString ending = QFileInfo(path).suffix().toLower();
    if (ending == QLatin1String("csv")) {
        QSaveFile file(path);
        saved = file.open(QIODevice::WriteOnly) && file.write(table_.as_csv()) >= 0 && file.commit();
    } else if (ending == QLatin1String("pdf") || ending == QLatin1String("png")) {
        saved = TrendPlot::save(ui_->plot->picture(), ui_->plot->extras(), path, QSize(1000, 560));
    } else {
        ui_->saved->setText(tr("The ending of %1 is not known here. Use .pdf, .png or .csv.").arg(path));
        ui_->saved->show();
        return false;
    }
    ui_->saved->setText(saved ? tr("Saved as %1.").arg(path)
                              : tr("%1 could not be written. Choose a folder that allows writing.").arg(path));
    ui_->saved->show();
    return saved;
}

void TrendPage::print(QPrinter& printer)
{
    if (!judgement_)
        return;
    printer.setResolution(dots_per_inch);
    QCPPainter painter(&printer);
    const Theme& t = theme_of(ThemeKind::print);
    const TrendPicture& picture = ui_->plot->picture();
    const QSize page = printer.pageRect(QPrinter::DevicePixel).size().toSize();
    const auto write = [&](double& top, const QString& text, TypeSize size, bool muted) {
        if (text.isEmpty())
            return;
        painter.setFont(type(size));
        painter.setPen(muted ? t.muted : t.ink);
        QRectF used;
        painter.drawText(QRectF(0, top, page.width(), page.height()), Qt::TextWordWrap, text, &used);
        top = used.bottom() + 4.0;
    };
    double top = 0.0;
    write(top, tr("%1, %2").arg(quantity_title(picture.quantity), picture.place_name), TypeSize::title, false);
    write(top, tr("%1, %2").arg(to_qstring(judgement_->record->engine.name), to_qstring(judgement_->record->vessel.name)),
          TypeSize::body, true);
    write(top, picture.level_words.isEmpty() ? picture.headline
                                             : QStringLiteral("%1: %2").arg(picture.level_words, picture.headline),
          TypeSize::body, false);
    write(top, picture.second_line, TypeSize::label, true);
    const QSize plot_size(page.width(), static_cast<int>(plot_height_on_paper * page.height()));
    painter.save();
    painter.translate(0, top + 4.0);
    TrendPlot::paint(picture, ui_->plot->extras(), painter, plot_size);
    painter.restore();
    top += plot_size.height() + 8.0;
    write(top, ui_->reading->text(), TypeSize::label, false);
    for (const SideBlock& block : side_blocks(picture)) {
        QStringList words{block.heading + u':'};
        words.append(block.first);
        words.append(QString(block.second).replace(u'\n', QStringLiteral("; ")));
        words.removeAll(QString());
        write(top, words.join(u' '), TypeSize::label, false);
    }
}

} // namespace evenstroke
