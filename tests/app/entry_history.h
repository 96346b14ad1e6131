// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <QString>

namespace evenstroke::test {

/// Writes a history of an invented ship with a six-cylinder main engine and an auxiliary engine. The main
/// engine has so many monthly readings, the last on 1 March 2021; the auxiliary has none.
void write_entry_history(const QString& path, int readings);

/// The main engine's healthy value in that history, as its own baseline and offsets give it at 75 % load.
double usual_exhaust(int cylinder);
double usual_peak(int cylinder);

} // namespace evenstroke::test
