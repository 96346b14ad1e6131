// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/reference/applied_correction.h"

#include <stdexcept>

namespace evenstroke {

std::string_view correction_text(AppliedCorrection applied)
{
    switch (applied) {
    case AppliedCorrection::none:
        return "none";
    case AppliedCorrection::linear:
        return "linear";
    case AppliedCorrection::similarity:
        return "similarity";
    case AppliedCorrection::iso3046:
        return "ISO 3046-1";
    }
    throw std::logic_error("correction without a name");
}

} // namespace evenstroke
