// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <QString>
#include <QStringList>

namespace evenstroke {

/// Where a file that is to be saved is proposed to go: in the user's documents, named by what it holds.
/// @param words   ship, engine, day: as on the screen; joined by underscores, in lower case
/// @param ending  with its dot
QString suggested_file(const QStringList& words, const QString& ending);

} // namespace evenstroke
