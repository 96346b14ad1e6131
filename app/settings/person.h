// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "storage/common.h"

#include <QString>

namespace evenstroke {

/// Who signs for changes on this computer: a person's name as typed once, kept in the user's settings.
QString person_name();
void set_person_name(const QString& name);
/// With the reason of the change; "not named" where nobody has typed a name yet.
storage::Signature signature(const QString& why = {});

} // namespace evenstroke
