// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <boost/outcome.hpp>
#include <string>
#include <utility>

namespace evenstroke {

/// Why something could not be done, in words the chief engineer can act on.
struct Problem
{
    enum class Kind {
        invalid_input, ///< the data say something that cannot be
        not_found,     ///< what was asked for is not there
        damaged_file,  ///< the file is not what it claims to be
        newer_file,    ///< made by a later version of the program
        storage,       ///< the disk or the file system refused
    };
    Kind kind = Kind::invalid_input;
    std::string what_happened; ///< one sentence, with the value, its unit and where it was found
    std::string what_to_do;    ///< one sentence that starts with a verb

    /// Both sentences, for a terminal or a line under a field.
    std::string text() const { return what_to_do.empty() ? what_happened : what_happened + " " + what_to_do; }
};

/// A value, or the Problem that stood in its way. Reading the value of a failed result throws,
/// so that a missed check cannot pass for a number.
template <typename T>
using Result = BOOST_OUTCOME_V2_NAMESPACE::checked<T, Problem>;

inline Problem invalid_input(std::string what_happened, std::string what_to_do)
{
    return {Problem::Kind::invalid_input, std::move(what_happened), std::move(what_to_do)};
}

} // namespace evenstroke
