// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <span>
#include <string>
#include <string_view>
#include <vector>

/// Warnings shown where the hand is about to do something dangerous: resources/catalogue/cautions.csv.
/// They are common practice in words of this program; the maker, the ship's safety system and the class
/// society come first, which each `authority` says.
namespace evenstroke {

struct Caution
{
    std::string name;       ///< "scavenge_fire"
    std::string title;      ///< "Fire in the scavenge space"
    std::string short_text; ///< one or two sentences, for the side of a page
    std::string long_text;  ///< the whole of it, for the report and the caution's own view
    std::string authority;  ///< who decides
    bool emergency = false; ///< an alarm matter: shown first and never folded away
};

/// Most urgent first.
std::span<const Caution> all_cautions();
/// Null where no caution has this name.
const Caution* find_caution(std::string_view name);

/// Names of the cautions that belong to a finding, most urgent first; none where the catalogue has no entry.
/// @param pattern  name of the signature or of the cause; empty for a single quantity
/// @param quantity name of the quantity that moved most; empty where only the pattern is known
/// @par Source resources/catalogue/finding_cautions.csv (common practice)
std::vector<std::string> cautions_for(std::string_view pattern, std::string_view quantity, bool two_stroke);

} // namespace evenstroke
