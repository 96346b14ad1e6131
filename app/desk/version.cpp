// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/desk/version.h"

namespace evenstroke {

QString program_version() { return QStringLiteral(EVENSTROKE_VERSION); }

} // namespace evenstroke
