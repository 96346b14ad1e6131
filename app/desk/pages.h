// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

namespace evenstroke {

class Frame;

/// Makes all pages known to the frame, in the order of the work.
void add_all_pages(Frame& frame);

} // namespace evenstroke
