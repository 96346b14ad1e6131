// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/sisters/sisters_page.h"

#include "app/board/board_page.h"
#include "app/desk/number_text.h"
#include "app/desk/theme.h"
#include "app/desk/workplace.h"

#include <QTextDocument>

#include <cmath>

namespace evenstroke {
namespace {

QString engine_words(const Judgement& judgement)
{
    return SistersPage::tr("%1, %2").arg(to_qstring(judgement.record->vessel.name), to_qstring(judgement.record->engine.name));
}

} // namespace

SistersPage::SistersPage(Workplace& place, QWidget* parent) : SheetPage(place, parent)
{
    connect(&run_, &SisterRun::progressed, this, [this] {
        show_progress(run_.done(), run_.total(), tr("judged %1 of %2 engines").arg(run_.done()).arg(run_.total()));
    });
    connect(&run_, &SisterRun::finished, this, &SistersPage::show_found);
}

void SistersPage::refresh()
{
    const auto judgement = workplace().judgement();
    if (!judgement || judgement->readings.empty()) {
        run_.stop();
        asked_for_.reset();
        show_instead(empty_words(workplace()));
        return;
    }
    if (judgement != asked_for_) {
        asked_for_ = judgement;
        run_.start(workplace().path(), workplace().selection().engine);
        show_instead(tr("Looking for engines of the same kind…"));
    } else if (!run_.busy()) {
        show_found();
    }
}

void SistersPage::show_found()
{
    hide_progress();
    if (run_.problem())
        return show_instead(to_qstring(run_.problem()->text()));
    if (!run_.found())
        return;
    if (run_.found()->engines.size() < 2)
        return show_instead(tr("This history holds no other engine of this kind: the same cycle, cylinders, bore, stroke, power "
                               "and speed. Ashore, take in the ships' files into one history to compare them."));
    show_sheet();
}

/// Who has left the others, worst first; or why nobody can be said to have.
QStringList SistersPage::sentences() const
{
    const SistersFound& found = *run_.found();
    QStringList said;
    for (const SisterFlag& flag : found.comparison.flags)
        if (flag.standing)
            said.prepend(tr("%1 (%2): %3").arg(level_text(flag.level), to_qstring(found.engines[flag.engine]->record->vessel.name),
                                               to_qstring(flag.sentence)));
    if (!found.comparison.judged)
        said.append(tr("With fewer than %1 engines nobody can say which of them has moved: what follows is only shown.")
                        .arg(fewest_sisters_to_judge));
    else if (said.isEmpty())
        said.append(tr("None of them has left the others."));
    return said;
}

QStringList SistersPage::heads() const
{
    QStringList heads{tr("apart from the sisters")};
    for (const auto& engine : run_.found()->engines)
        heads.append(engine_words(*engine));
    heads.append(tr("usual within"));
    return heads;
}

std::vector<QStringList> SistersPage::rows() const
{
    std::vector<QStringList> all;
    for (const SisterRow& row : run_.found()->comparison.rows) {
        const int decimals = row.percent ? 1 : decimals_of(row.quantity);
        const QString unit = row.percent ? QStringLiteral("%") : unit_text(row.quantity);
        QString title = quantity_title(row.quantity);
        if (row.over_cylinders)
            title = tr("%1, mean over the cylinders").arg(title);
        QStringList cells{title};
        for (const SisterCell& cell : row.cells) {
            // Beyond the usual a mark stands with the number, which is read without colour.
            const bool beyond = cell.apart && std::abs(*cell.apart) > row.usual;
            cells.append(cell.apart ? with_unit(signed_text(*cell.apart, decimals), unit) + (beyond ? QStringLiteral(" ▸") : QString())
                                    : QStringLiteral("–"));
        }
        cells.append(QStringLiteral("± ") + with_unit(number_text(row.usual, decimals), unit));
        all.push_back(std::move(cells));
    }
    return all;
}

QString SistersPage::below() const
{
    return tr("Each engine against its own baseline at its own power; the median of its last three usable readings, minus that of "
              "the others. ▸ beyond twice the usual scatter (common practice, no source). What all sisters share is not seen here.");
}

void SistersPage::fill(QTextDocument& document, const Theme& colours) const
{
    QString html = QStringLiteral("<body>") + sheet_paragraph(title(), "title");
    for (const QString& sentence : sentences())
        html += sheet_paragraph(sentence);
    document.setDefaultStyleSheet(sheet_style(colours));
    document.setHtml(html + sheet_table(heads(), rows(), true) + sheet_paragraph(below(), "small") + QStringLiteral("</body>"));
}

QString SistersPage::plain_text() const
{
    if (!run_.found() || run_.found()->engines.size() < 2)
        return {};
    QString plain = title() + u'\n' + sentences().join(u'\n') + u'\n' + heads().join(u'\t') + u'\n';
    for (const QStringList& row : rows())
        plain += row.join(u'\t') + u'\n';
    return plain + below() + u'\n';
}

} // namespace evenstroke
