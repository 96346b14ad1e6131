// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "storage/card_store.h"

namespace evenstroke::storage {

/// Reads a card as `read_card_file` does, and takes a pressure that is empty, `nan` or `-` as a missing sample (NaN): for
/// evaluation, which bridges short gaps. Cards of a history have none.
/// @par Problems as read_card_file
Result<CardTrace> read_card_with_gaps(const QString& path);

} // namespace evenstroke::storage
