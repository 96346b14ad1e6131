// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/problem.h"

#include <gtest/gtest.h>
#include <string_view>

namespace evenstroke {

/// The result is a Problem of this kind, its first sentence has the part, and a second says what to do.
template <typename T> void expect_problem(const Result<T>& result, Problem::Kind kind, std::string_view part)
{
    ASSERT_FALSE(result.has_value()) << part;
    EXPECT_EQ(result.error().kind, kind) << result.error().text();
    EXPECT_NE(result.error().what_happened.find(part), std::string::npos) << result.error().text();
    EXPECT_FALSE(result.error().what_to_do.empty());
}

} // namespace evenstroke
