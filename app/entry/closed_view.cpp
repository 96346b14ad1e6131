// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/entry/closed_view.h"

#include "app/desk/number_text.h"
#include "app/desk/theme.h"
#include "app/desk/workplace.h"
#include "app/entry/note_lines.h"
#include "ui_closed_view.h"

#include <algorithm>

namespace evenstroke {

ClosedView::ClosedView(QWidget* parent) : QWidget(parent), ui_(std::make_unique<Ui::ClosedView>())
{
    ui_->setupUi(this);
    connect(ui_->board_button, &QPushButton::clicked, this, &ClosedView::board_wanted);
    connect(ui_->another_button, &QPushButton::clicked, this, &ClosedView::another_wanted);
    connect(ui_->correct_button, &QPushButton::clicked, this,
            [this] { emit correction_wanted(reading_id_); });
}

ClosedView::~ClosedView() = default;

const NoteLines& ClosedView::findings() const
{
    return *ui_->findings;
}

QString ClosedView::text() const
{
    return QStringList{ui_->heading->text(),     ui_->steadiness->text(), ui_->missing->text(),
                       ui_->found_label->text(), ui_->findings->text(),   ui_->engines->text()}
        .join(u'\n');
}

void ClosedView::show_reading(const EntrySession& session, Workplace& workplace, const QStringList& kept,
                              std::shared_ptr<const Judgement> judgement)
{
    const EntrySheet& sheet = session.sheet();
    const Reading& reading = sheet.reading();
    kept_ = kept;
    reading_id_ = to_qstring(reading.id);
    ui_->heading->setText(tr("The reading of %1 is closed.").arg(day_text(reading.taken_at.utc)));
    const Completeness state = find_completeness(sheet.sections(), sheet.whole());
    QStringList missing;
    for (const std::string& words : missing_words(sheet.engine(), state.missing))
        missing << to_qstring(words);
    ui_->missing->setText(missing.isEmpty() ? tr("All %1 required boxes are answered.").arg(state.required)
                                            : tr("%1 of %2 required boxes are answered. Left empty: %3.")
                                                  .arg(state.answered)
                                                  .arg(state.required)
                                                  .arg(missing.join(QStringLiteral("; "))));
    ui_->steadiness->setText(
        to_qstring(judge_steadiness(sheet.whole(), !sheet.engine().two_stroke()).sentence));
    const auto same = [&](const Reading& other) { return other.id == reading.id; };
    const std::vector<Reading>* readings =
        judgement && judgement->record ? &judgement->record->readings : nullptr;
    const auto found = readings ? std::find_if(readings->begin(), readings->end(), same)
                                : std::vector<Reading>::const_iterator();
    if (!readings || found == readings->end()) {
        ui_->found_label->setText(tr("The reading is being judged…"));
        ui_->findings->show_lines(kept_lines());
    } else {
        show_findings(*judgement, static_cast<std::size_t>(found - readings->begin()));
    }
    show_engines(workplace, session);
}

QWidget* ClosedView::first_focus()
{
    return ui_->board_button;
}

std::vector<NoteLines::Line> ClosedView::kept_lines() const
{
    std::vector<NoteLines::Line> lines;
    for (const QString& sentence : kept_)
        lines.push_back({tr("Kept as it is, in doubt when it was closed: %1").arg(sentence), false, {}});
    return lines;
}

void ClosedView::show_findings(const Judgement& judgement, std::size_t reading)
{
    std::vector<NoteLines::Line> lines;
    for (const Flag& flag : judgement.flags)
        if (flag.reading == reading) {
            QString sentence = level_text(flag.severity) + QStringLiteral(": ") + to_qstring(flag.sentence);
            if (!flag.next_check.empty())
                sentence += u' ' + to_qstring(flag.next_check);
            lines.push_back({sentence, flag.severity == Level::act, {}});
        }
    const std::size_t flags = lines.size();
    for (const Doubt& doubt : judgement.doubts)
        if (doubt.reading == reading && !doubt.sentence.empty())
            lines.push_back({to_qstring(doubt.sentence), false, {}});
    const auto kept = kept_lines();
    lines.insert(lines.end(), kept.begin(), kept.end());
    if (lines.empty())
        ui_->found_label->setText(tr("Nothing new began with this reading."));
    else if (flags > 0)
        ui_->found_label->setText(tr("New with this reading"));
    else
        ui_->found_label->setText(tr("No flag began with this reading, but some values are in doubt"));
    ui_->findings->show_lines(lines);
}

void ClosedView::show_engines(Workplace& workplace, const EntrySession& session)
{
    std::vector<NoteLines::Line> lines;
    if (const VesselChoice* vessel = workplace.find_vessel(session.vessel_id()))
        for (const EngineChoice& engine : vessel->engines)
            if (engine.id != session.engine_id())
                lines.push_back(
                    {engine.name, false, {{tr("Enter %1").arg(engine.name), [this, id = engine.id] {
                                               emit engine_wanted(id);
                                           }}}});
    ui_->engines_label->setText(session.sheet().ship_values().empty()
                                    ? tr("The other engines of this ship:")
                                    : tr("The other engines of this ship; what the ship shares is already entered:"));
    ui_->engines_label->setVisible(!lines.empty());
    ui_->engines->show_lines(lines);
}

} // namespace evenstroke
