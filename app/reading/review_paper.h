// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "app/desk/theme.h"
#include "core/trend/judgement.h"

#include <QString>

class QTextDocument;

namespace evenstroke {

class ReviewModel;

/// The judged reading on paper: its sections with their sentences, every line with its numbers.
void fill_review_paper(QTextDocument& document, const Judgement& judgement, const ReviewModel& model);

/// A title with what is said about it and a muted hint, where there is no number to work out.
void fill_words(QTextDocument& document, const QString& title, const QString& said, const QString& hint, const Theme& colours);

} // namespace evenstroke
