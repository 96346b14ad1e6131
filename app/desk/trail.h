// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "app/desk/selection.h"

#include <QString>

#include <vector>

namespace evenstroke {

/// A page and what it looks at.
struct Whereabouts
{
    QString page;
    Selection selection;
    friend bool operator==(const Whereabouts&, const Whereabouts&) = default;
};

/// Where the reader is and has been, as in a book with fingers between the pages.
class Trail
{
public:
    Trail() : places_(1) {}
    const Whereabouts& here() const { return places_[index_]; }
    void go(const Whereabouts& where);   ///< what was ahead is forgotten
    void step(const Whereabouts& where); ///< in place of where we are
    bool can_go_back() const { return index_ > 0; }
    bool can_go_forward() const { return index_ + 1 < places_.size(); }
    void go_back() { index_ -= can_go_back() ? 1U : 0U; }
    void go_forward() { index_ += can_go_forward() ? 1U : 0U; }

    /// The last place, kept in the user's settings for each history.
    void remember(const QString& history_path) const;
    void recall(const QString& history_path);

private:
    std::vector<Whereabouts> places_;
    std::size_t index_ = 0;
};

} // namespace evenstroke
