// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/survey/rounding.h"
#include "core/survey/survey_context.h"

/// For the parts of core/survey only: plots that several sections draw.
namespace evenstroke::report {

enum class View { raw, deviation, apart };

double seconds(TimePoint time);
/// A plot over the period with nothing in it yet.
Plot empty_plot(const Context& context);
PlotLine trend_line(const Context& context, const Trend& trend, View view);
/// Events that concern the subject: its own and the whole engine's.
void add_events(const Context& context, const Place& subject, Plot& plot);
/// One quantity at one place with its band, learning stretches and events.
Plot trend_plot(const Context& context, const Trend& trend, View view);

} // namespace evenstroke::report
