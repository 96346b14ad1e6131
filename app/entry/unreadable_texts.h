// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/reading/log_sheet.h"

#include <QString>

#include <map>
#include <string>

/// Texts that stand in boxes and cannot be read, between the sheet and the history's remembered choices.
namespace evenstroke {

/// The name under which the texts of a reading are remembered; an empty id is the sheet not yet begun.
std::string unreadable_choice(const std::string& reading_id);

QString write_unreadable(const std::map<LogBox, QString>& texts);
/// Boxes of quantities that are no longer in the catalogue are left out.
std::map<LogBox, QString> read_unreadable(const QString& written);

} // namespace evenstroke
