// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "app/batch/command.h"

namespace evenstroke::batch {

int run_explain(const QCommandLineParser& parser, Streams& streams); ///< what may lie behind one reading

} // namespace evenstroke::batch
