// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "app/desk/chooser.h"
#include "app/desk/page.h"
#include "app/desk/selection.h"

#include <optional>
#include <vector>

/// What the underlined parts of the sentence say, what can be chosen for each, and what a choice changes.
namespace evenstroke {

class Workplace;

/// The part a template names in braces; nothing for an unknown name.
std::optional<SentencePart> find_sentence_part(QStringView name);
/// The letter that opens the part's chooser; none of them is a page's letter.
QChar sentence_letter(SentencePart part);
/// "Cylinder 4" at the start of a sentence, "cylinder 4" within it.
QString sentence_text(SentencePart part, const Workplace& workplace, bool starts_sentence);
std::vector<Choice> sentence_choices(SentencePart part, const Workplace& workplace);
Selection with_choice(SentencePart part, const Workplace& workplace, const QVariant& value);

/// The selection with a quantity and a place that the engine's readings have: the worst flag's where nothing
/// was chosen yet, else the first ones in walking order.
Selection settled(const Selection& selection, const Judgement& judgement);

QString range_text(TimeRange range);
QString view_text(ValueView view);

} // namespace evenstroke
