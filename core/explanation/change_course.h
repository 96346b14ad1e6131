// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/explanation/change_window.h"

/// What the course of a change tells beside its size: whether it looks like work.
namespace evenstroke {

/// Whether it came at once and everything that clearly moved, two quantities at least, moved as after an overhaul or a
/// cleaning.
bool looks_like_work(const ChangeWindow& window);

/// Clearly out: by one and a half noise units and three of its own standard errors.
bool moved_clearly(const Change& change);

} // namespace evenstroke
