// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

class QLocale;

namespace evenstroke {

/// Loads the words of a language; English, with its singular and plural, where there is none. Once, at the start.
void use_language(const QLocale& locale);

} // namespace evenstroke
