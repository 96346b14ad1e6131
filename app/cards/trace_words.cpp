// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/cards/trace_words.h"

#include "app/desk/number_text.h"

#include <QCoreApplication>

#include <algorithm>
#include <cmath>
#include <map>
#include <string_view>

namespace evenstroke {
namespace {

using indicator::CardResult;

QString tr_(const char* words, int n = -1)
{
    return QCoreApplication::translate("evenstroke::CardFilesPage", words, nullptr, n);
}

QString estimate_text(const std::optional<indicator::Estimate>& estimate, int decimals)
{
    return estimate ? with_uncertainty(estimate->value, estimate->half_width, decimals) : QString();
}

bool remarks(const indicator::Evaluation& card, std::string_view code)
{
    return std::any_of(card.remarks.begin(), card.remarks.end(),
                       [code](const indicator::Remark& remark) { return remark.code == code; });
}

/// An engine without a compression ratio gives no card's dead centre: that is no fault of the card.
bool has_no_dead_centre(const indicator::Evaluation& card)
{
    return remarks(card, "tdc_not_determined") || remarks(card, "wrong_cylinder_or_mark") ||
           !card[CardResult::mean_indicated_pressure] ||
           (remarks(card, "tdc_assumed") && !remarks(card, "compression_ratio_not_known"));
}

/// Standard deviation of the cycles' mean indicated pressure in per cent; empty where that is usual.
std::optional<double> absurd_scatter(const indicator::Evaluation& card)
{
    constexpr double most = 20.0; // per cent; sound cycles differ by one or two (common practice, no source)
    if (!card.spread)
        return std::nullopt;
    const auto& result = card[CardResult::mean_indicated_pressure];
    const double mean = std::abs(result ? result->value : card.plain_mean_indicated);
    if (!(mean > 0.0))
        return std::nullopt;
    const double share = 100.0 * card.spread->mean_indicated / mean;
    return share > most ? std::optional(share) : std::nullopt;
}

} // namespace

QString unit_in_words(const WrittenUnit& written)
{
    const QString kind = written.kind == PressureKind::gauge      ? tr_(" gauge")
                         : written.kind == PressureKind::absolute ? tr_(" absolute")
                                                                  : QString();
    return to_qstring(unit(written.id).symbol) + kind;
}

QString trace_doubt(const FileTrace& trace)
{
    if (trace.header_unit)
        return tr_("its header speaks of %1, and it is read otherwise").arg(unit_in_words(*trace.header_unit));
    if (!trace.card)
        return {};
    if (const auto scatter = absurd_scatter(*trace.card))
        return tr_("its cycles scatter by %1 % in mean indicated pressure, which no engine's do")
            .arg(whole_text(*scatter));
    if (has_no_dead_centre(*trace.card))
        return tr_("its dead centre is not determined");
    return {};
}

QString trace_results_text(const FileTrace& trace)
{
    if (!trace.card)
        return trace.problem ? to_qstring(trace.problem->text()) : QString();
    const indicator::Evaluation& card = *trace.card;
    QStringList parts;
    if (const QString mean = estimate_text(card[CardResult::mean_indicated_pressure], 2); !mean.isEmpty())
        parts << tr_("MIP %1 bar").arg(mean);
    if (const QString most = estimate_text(card[CardResult::maximum_pressure], 1); !most.isEmpty()) {
        const QString at = estimate_text(card[CardResult::maximum_pressure_angle], 1);
        parts << (at.isEmpty() ? tr_("maximum %1 bar abs").arg(most)
                               : tr_("maximum %1 bar abs at %2°").arg(most, at));
    }
    return parts.isEmpty() ? tr_("The evaluation gives no result.") : parts.join(QStringLiteral(", "));
}

QString trace_sentences(const FileTrace& trace)
{
    QStringList lines{trace_results_text(trace)};
    if (trace.card) {
        if (const QString late = estimate_text((*trace.card)[CardResult::offset], 2); !late.isEmpty())
            lines << tr_("Dead centre lies %1° from where the file has it.").arg(late);
        for (const indicator::Remark& remark : trace.card->remarks)
            lines << to_qstring(remark.text);
        lines << tr_(
            "This is the card taken by itself. The page Cards also weighs in what the other cylinders' "
            "and the healthy cards say of dead centre: where the two differ, its numbers are the surer "
            "ones.");
    }
    if (trace.missing > 0)
        lines << tr_("%n sample(s) are missing.", trace.missing);
    if (!trace.card && may_be_kept(trace))
        lines << tr_("It can be kept all the same; it is only not evaluated.");
    return lines.join(QStringLiteral("\n"));
}

QString trace_size_text(const FileTrace& trace)
{
    if (!trace.trace)
        return {};
    const QString samples = whole_text(static_cast<double>(trace.trace->crank_angle_deg.size()));
    const auto& cycle = trace.trace->cycle;
    if (cycle.empty())
        return tr_("1 cycle, %1").arg(samples);
    int cycles = 1;
    for (std::size_t i = 1; i < cycle.size(); ++i)
        cycles += cycle[i] != cycle[i - 1] ? 1 : 0;
    return tr_("%1 cycles, %2").arg(cycles).arg(samples);
}

QString cylinders_twice(const std::vector<FileTrace>& traces, const Engine& engine)
{
    std::map<int, int> count;
    for (const FileTrace& trace : traces)
        if (can_be_taken(trace) && ++count[*trace.cylinder] == 2)
            return tr_("Two of them are said to be of %1. Choose for each which cylinder it is of.")
                .arg(place_title(engine, Place::cylinder(*trace.cylinder), false));
    return {};
}

} // namespace evenstroke
