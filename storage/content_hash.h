// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "storage/common.h"

#include <optional>
#include <string>
#include <string_view>

namespace evenstroke::storage {

/// SHA-256 (FIPS 180-4) over fields, so that what a thing holds can be compared without keeping it twice.
/// Each field goes in with its length: no two lists of fields give the same bytes.
class ContentHash
{
public:
    ContentHash& add(std::string_view field);
    ContentHash& add(qint64 number);
    /// The exact bits of a number; a missing one differs from every number.
    ContentHash& add(const std::optional<double>& number);
    std::string hex() const; ///< 64 digits

private:
    std::string content_;
};

} // namespace evenstroke::storage
