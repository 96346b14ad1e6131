// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "app/settings/engine_draft.h"

#include <QString>

#include <functional>
#include <vector>

namespace evenstroke {

/// One box of the particulars: how it is shown and what typing into it means.
struct EngineField
{
    QString group, title, unit;
    std::function<QString(const EngineDraft::State&)> show;
    /// @return what is the matter with the text, in words; then the state is not changed
    std::function<std::optional<Problem>(EngineDraft::State&, const QString&)> set;
    QStringList choices = {}; ///< where only these can be said
    QString needed_as = {};   ///< "number of cylinders": what is asked for while the box is empty; empty: may stay so
};

/// Vessel, engine, geometry, rating, reference conditions, what only cards need.
const std::vector<EngineField>& engine_fields();

/// What is still empty and must not be: "name of the ship", "bore"; in the order of the boxes.
QStringList still_needed(const EngineDraft::State& state);

/// "0.92", "500": every digit that was typed, a point as decimal sign; empty where nothing is known.
QString plain_text(const std::optional<double>& number);
/// The number of a box: empty is nothing. @par Problems invalid_input naming the text
Result<std::optional<double>> read_box(const QString& text);

} // namespace evenstroke
