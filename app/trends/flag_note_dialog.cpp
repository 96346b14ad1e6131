// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/trends/flag_note_dialog.h"

#include "app/desk/number_text.h"
#include "core/reading/reading.h"

#include <QComboBox>
#include <QDialogButtonBox>
#include <QFormLayout>
#include <QLabel>
#include <QLineEdit>
#include <QPushButton>

#include <algorithm>

namespace evenstroke {
namespace {

constexpr std::size_t events_offered = 12;
constexpr int words_width = 460; // two lines of a flag's sentence at the desk's letter size

QString explanation(const Flag& flag)
{
    if (flag.severity == Level::ask)
        return FlagNoteDialog::tr("If work was done, write it into the events (Alt+D) with its day: the comparison then "
                                  "starts anew from it. If none was done, say so here: the change is then the engine's.");
    return FlagNoteDialog::tr("The flag stays in the record with what is written here. It comes up again when its evidence "
                              "grows or its level rises.");
}

} // namespace

FlagNoteDialog::FlagNoteDialog(const EngineRecord& record, const Flag& flag, const QString& who, QWidget* parent)
    : QDialog(parent), words_(new QLineEdit(this)), event_(new QComboBox(this)), who_(new QLineEdit(who, this)) // order of Tab
{
    wanted_.subject = flag.subject;
    wanted_.flagged_at = record.readings.at(flag.reading).taken_at.utc;
    wanted_.evidence = flag.evidence;
    wanted_.level = flag.level_now;
    const bool question = flag.severity == Level::ask;
    setWindowTitle(question ? tr("Answer the question") : tr("What was found"));
    auto* form = new QFormLayout(this);
    for (const QString& text : {to_qstring(flag.sentence), explanation(flag)}) {
        auto* label = new QLabel(text, this);
        label->setWordWrap(true);
        label->setTextFormat(Qt::PlainText);
        label->setMinimumWidth(words_width);
        form->addRow(label);
    }
    form->addRow(question ? tr("Remark") : tr("Found or done"), words_);
    fill_events(record, flag);
    if (event_->count() > 1 && !question)
        form->addRow(tr("Belongs to"), event_);
    else
        event_->hide();
    form->addRow(tr("Name"), who_);
    auto* missing = new QLabel(this);
    missing->setObjectName(QStringLiteral("missing"));
    form->addRow(missing);
    auto* buttons = new QDialogButtonBox(QDialogButtonBox::Cancel, this);
    const FlagNote::Said said = question ? FlagNote::Said::no_work : FlagNote::Said::seen;
    QPushButton* keep = buttons->addButton(question ? tr("No work was done") : tr("Keep the note"), QDialogButtonBox::ActionRole);
    connect(keep, &QPushButton::clicked, this, [this, said] { press(said); });
    if (flag.note) {
        QPushButton* back = buttons->addButton(tr("Take back what was said"), QDialogButtonBox::ActionRole);
        connect(back, &QPushButton::clicked, this, [this] { press(FlagNote::Said::withdrawn); });
        words_->setText(to_qstring(flag.note->words));
    }
    connect(buttons, &QDialogButtonBox::rejected, this, &QDialog::reject);
    form->addRow(buttons);
    const auto look = [this, keep, missing, question] {
        const bool no_words = !question && words_->text().trimmed().isEmpty(), no_name = who_->text().trimmed().isEmpty();
        missing->setText(no_words && no_name ? tr("Still needed: what was found or done, and your name.")
                         : no_words          ? tr("Still needed: what was found or done.")
                         : no_name           ? tr("Still needed: your name.")
                                             : QStringLiteral(" ")); // the dialog keeps its height
        keep->setEnabled(!no_words && !no_name);
    };
    connect(words_, &QLineEdit::textChanged, this, look);
    connect(who_, &QLineEdit::textChanged, this, look);
    look();
    keep->setDefault(true);
    words_->setFocus();
}

/// The newest work at the subject or the whole engine, newest first.
void FlagNoteDialog::fill_events(const EngineRecord& record, const Flag& flag)
{
    event_->addItem(tr("no event of the diary"));
    std::size_t offered = 0;
    for (auto event = record.events.rbegin(); event != record.events.rend() && offered < events_offered; ++event) {
        if (event->place.kind == Place::Kind::cylinder && event->place != flag.subject)
            continue;
        const EventKind* kind = find_event_kind(event->kind);
        event_->addItem(tr("%1, %2").arg(day_text(event->date.utc), to_qstring(kind ? kind->title : event->kind)),
                        to_qstring(event->id));
        ++offered;
    }
    if (flag.note)
        event_->setCurrentIndex(std::max(0, event_->findData(to_qstring(flag.note->event_id))));
}

void FlagNoteDialog::write(const QString& words, const QString& who)
{
    words_->setText(words);
    who_->setText(who);
}

void FlagNoteDialog::press(FlagNote::Said said)
{
    note_ = wanted_;
    note_->said = said;
    note_->words = to_std(words_->text().trimmed());
    note_->who = to_std(who_->text().trimmed());
    if (said == FlagNote::Said::seen)
        note_->event_id = to_std(event_->currentData().toString());
    accept();
}

} // namespace evenstroke
