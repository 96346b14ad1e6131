// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "app/entry/log_sheet_model.h"
#include "core/reading/relations.h"
#include "core/trend/judgement.h"

#include <map>
#include <memory>
#include <optional>
#include <vector>

namespace evenstroke {

/// One sentence about the sheet as a whole, and the boxes it speaks of.
struct SheetNote
{
    QString sentence;
    std::vector<LogBox> boxes;
    bool impossible = false;
    bool whole = false; ///< last time's whole sheet seems to stand here again
    bool time = false;  ///< the reading's own time
};

/// What the core says of the sheet as it stands: asked after every change, kept until the next.
class EntryOpinions
{
public:
    /// @param judgement of the engine's closed readings; null while it is not there: then only what needs no
    ///                  history is said
    void ask(const EntrySheet& sheet, std::shared_ptr<const Judgement> judgement, TimePoint now);
    void forget();

    bool has_history() const { return judgement_ && !judgement_->readings.empty(); }
    const std::shared_ptr<const Judgement>& judgement() const { return judgement_; }
    /// Null where nothing is known of the box.
    const ValueOpinion* of(const LogBox& box) const;
    const std::vector<SheetNote>& notes() const { return notes_; }
    /// Notes that speak of this box.
    std::vector<const SheetNote*> notes_of(const LogBox& box) const;
    const SteadinessVerdict& steadiness() const { return steadiness_; }
    const std::map<LogBox, BoxMark>& marks() const { return marks_; }
    /// The reading the previous values come from, for its date; null before the first one.
    const Reading* previous_reading(const LogBox& box, TimePoint before) const;

private:
    void note_doubts(const EntrySheet& sheet, const std::vector<Doubt>& doubts);
    void mark(const EntrySheet& sheet);

    std::shared_ptr<const Judgement> judgement_;
    std::map<LogBox, ValueOpinion> opinions_;
    std::vector<SheetNote> notes_;
    std::map<LogBox, BoxMark> marks_;
    SteadinessVerdict steadiness_;
};

} // namespace evenstroke
