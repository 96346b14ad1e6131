// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "app/batch/command.h"

namespace evenstroke::batch {

/// Evaluates indicator cards; needs no history.
int run_card(const QCommandLineParser& parser, Streams& streams);

} // namespace evenstroke::batch
