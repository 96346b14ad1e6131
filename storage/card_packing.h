// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "storage/card_store.h"

#include <QByteArray>

#include <optional>

namespace evenstroke::storage {

/// A trace in few bytes, without losing a digit. Each column is kept as whole numbers of its last decimal
/// place (up to six) where every sample is exactly such a number, and as plain doubles where not; of whole
/// numbers the second differences are written with seven bits a byte, then all of it is compressed.
QByteArray pack_card(const CardTrace& trace);
/// None where the bytes are no trace.
std::optional<CardTrace> unpack_card(const QByteArray& packed);

} // namespace evenstroke::storage
