// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "app/cards/card_files_run.h"

#include <QString>

namespace evenstroke {

/// "MIP 16.23 ± 0.08 bar, maximum 142.1 ± 0.2 bar abs at 12.3°": what the evaluation says of a trace in one
/// line.
QString trace_results_text(const FileTrace& trace);
/// The results, what was left out, and what the evaluation remarks, one paragraph each.
QString trace_sentences(const FileTrace& trace);
/// "720 samples" or "20 cycles, 72 000 samples"; empty where there is no trace.
QString trace_size_text(const FileTrace& trace);

/// "bar gauge"
QString unit_in_words(const WrittenUnit& written);

/// Why a card should not be kept without a second look: its dead centre is not determined, or its cycles
/// scatter absurdly. Empty where nothing speaks against it.
QString trace_doubt(const FileTrace& trace);

/// Why traces cannot be taken in as they are: two of one cylinder. Empty where they can.
QString cylinders_twice(const std::vector<FileTrace>& traces, const Engine& engine);
/// Whether a trace may be kept: it was evaluated, or only the engine's description lacks what that takes.
inline bool may_be_kept(const FileTrace& trace)
{
    return trace.trace && (!trace.problem || trace.problem->kind == Problem::Kind::not_found);
}
/// Whether a trace can be taken in.
inline bool can_be_taken(const FileTrace& trace)
{
    return may_be_kept(trace) && trace.cylinder.has_value();
}

} // namespace evenstroke
