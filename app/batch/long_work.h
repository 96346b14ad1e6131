// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "app/batch/command.h"
#include "storage/common.h"

namespace evenstroke::batch {

/// Makes Ctrl-C ask for a stop instead of ending the program: the work in hand is taken back whole.
void listen_for_stop();
bool stop_asked();

/// A line that counts up on a terminal, and nothing in a pipe. False once a stop was asked for.
storage::Progress progress_line(Streams& streams, const QString& what);

} // namespace evenstroke::batch
