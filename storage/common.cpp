// SPDX-License-Identifier: GPL-3.0-or-later
#include "storage/common.h"

namespace evenstroke::storage {

TimePoint system_time()
{
    return std::chrono::floor<std::chrono::seconds>(std::chrono::system_clock::now());
}

} // namespace evenstroke::storage
