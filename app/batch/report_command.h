// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "app/batch/command.h"

namespace evenstroke::batch {

int run_report(const QCommandLineParser& parser, Streams& streams); ///< the survey report of one engine as PDF

} // namespace evenstroke::batch
