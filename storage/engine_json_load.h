// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "storage/json_reader.h"

/// The keys of engine.json about load diagram, walls, generator, moving masses and the way the consumption is
/// corrected. All of them may be left out.
namespace evenstroke::storage {

/// What cannot be is refused with its key; keys inside that nobody knows are kept aside in `top`.
void read_load_and_heat(JsonReader& top, Engine& engine);
/// Only what the engine has, and nothing that only says the default again.
void put_load_and_heat(QJsonObject& object, const Engine& engine);

/// A number as the document holds it: twelve digits, all that anybody types, and none of the noise of converting
/// to SI and back.
QJsonValue rounded_number(double number);

} // namespace evenstroke::storage
