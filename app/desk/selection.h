// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/reading/quantity_catalogue.h"

#include <QString>

#include <optional>

namespace evenstroke {

enum class TimeRange { since_overhaul, three_years, all };
enum class ValueView { raw, corrected, deviation, apart };

/// What all pages look at. It goes along from page to page; the sentence bar shows and changes it.
struct Selection
{
    QString vessel, engine;             ///< identifiers in the history; empty where nothing is chosen yet
    std::optional<QuantityId> quantity; ///< none: the page's own first one
    Place place = Place::engine();
    TimeRange range = TimeRange::since_overhaul;
    ValueView view = ValueView::apart;
    QString reading; ///< identifier of one reading; empty: the newest
    /// Catalogue name of the estimate of power whose workings are shown; empty: those of quantity and place.
    QString estimate;

    friend bool operator==(const Selection&, const Selection&) = default;
};

} // namespace evenstroke
