// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "app/batch/command.h"

namespace evenstroke::batch {

int run_evaluate(const QCommandLineParser& parser, Streams& streams); ///< every value on its way to the deviation
int run_flags(const QCommandLineParser& parser, Streams& streams);    ///< a row each time a flag starts
int run_doubts(const QCommandLineParser& parser, Streams& streams);   ///< what looks mistyped

} // namespace evenstroke::batch
