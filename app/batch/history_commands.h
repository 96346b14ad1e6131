// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "app/batch/command.h"

namespace evenstroke::batch {

int run_take(const QCommandLineParser& parser, Streams& streams);   ///< folders into a history
int run_verify(const QCommandLineParser& parser, Streams& streams); ///< file and audit chain
int run_backup(const QCommandLineParser& parser, Streams& streams); ///< a whole copy
int run_sample(const QCommandLineParser& parser, Streams& streams); ///< the invented vessel's files

} // namespace evenstroke::batch
