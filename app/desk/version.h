// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <QString>

namespace evenstroke {

/// "0.1.0"
QString program_version();

} // namespace evenstroke
