// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/reading/reading.h"

#include <QString>

namespace evenstroke {

/// Date, ship's clock and its offset from UTC as they stand in the three fields above the sheet.
struct TimeText
{
    QString date, clock, offset; ///< "2031-03-14", "09:10", "+02:00"
};

TimeText time_text(const StampedTime& time);
/// Takes also "14.3.2031", "9.10", "0910", "+2", "-3:30", "UTC".
/// @par Problems invalid_input naming the field, its text and a right one
Result<StampedTime> read_time(const TimeText& text);

} // namespace evenstroke
