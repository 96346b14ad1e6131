// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "app/desk/selection.h"

#include <QChar>
#include <QString>
#include <QWidget>

#include <optional>

class QPrinter;

namespace evenstroke {

class Workplace;

/// The underlined parts of the sentence bar.
enum class SentencePart { engine, vessel, quantity, place, range, view, reading };

/// One page of the desk. It shows what the workplace's selection says and never keeps a selection of its own.
///
/// The frame owns the pages, makes them on their first visit, and calls `refresh` before it shows one and
/// whenever the selection, the history or the judgement changed while it is shown.
class Page : public QWidget
{
    Q_OBJECT

public:
    explicit Page(Workplace& workplace, QWidget* parent = nullptr);

    /// As on the command line and in the settings: "board". Plain ASCII, never translated.
    virtual QString name() const = 0;
    /// As on the rail: tr("Strip board").
    virtual QString title() const = 0;

    /// The sentence bar, with the choosable parts in braces:
    /// tr("{engine} of {vessel}, {quantity} of {place}, {range}"). Names are those of SentencePart.
    virtual QString sentence() const = 0;

    /// Brings the page up to the workplace's state. Must return within some milliseconds: what takes longer
    /// is asked of the workplace, which answers by a signal and a further refresh.
    virtual void refresh() = 0;

    /// What the foot line says for this page: "shaded: usual range of this engine · last reading 14 Mar 2031".
    virtual QString foot_text() const { return {}; }
    /// State of something half done: "draft saved 09:41". Empty: the history's own state is shown.
    virtual QString draft_text() const { return {}; }

    /// Whether plain letters are typed into this page just now, so that they must not change pages (Alt and the
    /// letter always does). Text fields in focus are recognised without this.
    virtual bool takes_letters() const { return false; }
    /// Where keys go when the page comes up; the page itself unless overridden.
    virtual QWidget* first_focus() { return this; }
    /// Asked before another page comes up or the window closes; false keeps this one up (it says why itself).
    virtual bool may_leave() { return true; }

    virtual bool can_print() const { return false; }
    virtual void print(QPrinter& printer);
    /// What Ctrl+C puts on the clipboard when no text is selected.
    virtual void copy() {}

    /// The number in hand, with the reading it belongs to: key W opens its sheet of workings. Nothing where no
    /// number is in hand.
    virtual std::optional<Selection> number_in_hand() const { return std::nullopt; }

protected:
    Workplace& workplace() const { return workplace_; }

signals:
    void foot_changed();     ///< foot_text or draft_text has something new
    void sentence_changed(); ///< the sentence has other parts now

private:
    Workplace& workplace_;
};

} // namespace evenstroke
