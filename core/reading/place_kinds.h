// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/reading/reading.h"

#include <map>
#include <string>

namespace evenstroke {

/// The kind of place that a catalogue names: "cylinder". Any other word is a mistake of the catalogue.
inline Place::Kind place_kind_named(const std::string& name)
{
    static const std::map<std::string, Place::Kind> kinds{{"engine", Place::Kind::engine},
                                                          {"ship", Place::Kind::ship},
                                                          {"cylinder", Place::Kind::cylinder},
                                                          {"turbocharger", Place::Kind::turbocharger},
                                                          {"cooler", Place::Kind::cooler}};
    return kinds.at(name);
}

} // namespace evenstroke
