// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/trend/judgement.h"

#include <string>

/// What is to be said while recorded work and the readings do not yet meet: work that no reading has followed, and work
/// after which the cylinder reads as it did before. The comparison begins anew at the work, so nothing else would say it.
namespace evenstroke {

/// "Entered since the newest reading: overhaul of cylinder 4 on 2 Dec 2026. What stands here is from before it." Empty
/// where every reading that work could be seen in is there.
std::string work_not_read_yet(const Judgement& judgement);

/// "Cylinder 4 compression pressure reads as before (overhaul on 27 Nov 2026): 5.9 bar below its earlier level, 5.8
/// before the work. ..." for a cylinder's flag that the work closed, while too few readings have come since to learn what is
/// usual. Empty where the work has mended it, or where that cannot be said.
std::string work_without_effect(const Judgement& judgement, const Flag& flag);
/// The same of all flags of a cylinder. @param subject a cylinder; the engine stands for all of them
std::string work_without_effect(const Judgement& judgement, Place subject = Place::engine());

} // namespace evenstroke
