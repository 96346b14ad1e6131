// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "storage/history.h"

#include <QByteArray>

#include <optional>
#include <string>
#include <vector>

namespace evenstroke::storage {

/// An indicator-diagram trace as its file says it. Firing dead centre is 0 degrees.
struct CardTrace
{
    std::vector<int> cycle; ///< empty where the file has one cycle
    std::vector<double> crank_angle_deg;
    std::vector<double> pressure_bar;
    bool gauge = false; ///< the header said so; else absolute
};

/// Reads `crank_angle_deg,pressure_bar` or `cycle,crank_angle_deg,pressure_bar`.
/// @par Problems invalid_input naming file and line; not_found; storage
Result<CardTrace> read_card_file(const QString& path);
/// The same from the text of a file; `name` is for the sentences.
Result<CardTrace> read_card_text(std::string_view text, const std::string& name);
std::string card_text(const CardTrace& trace);

struct CardEntry
{
    std::string id, reading_id;
    int cylinder = 0;
    int samples = 0;
};

/// A card that was taken out of use; it stays in the file.
struct WithdrawnCard
{
    CardEntry card;
    TimePoint at{};
    std::string who, why;
};

/// A cylinder's card that is to be added to a reading.
struct NewCard
{
    int cylinder = 0;
    const CardTrace* trace = nullptr;
};
struct AddedCards
{
    int added = 0, same = 0; ///< `same`: the reading had it already
    int in_all = 0;          ///< cards of the reading afterwards
};

/// Cards of readings.
class CardStore
{
public:
    explicit CardStore(History& history) : history_(history) {}

    Result<std::vector<CardEntry>>
    list(const std::string& engine_id) const; ///< by time of reading, then cylinder
    /// @par Problems not_found
    Result<CardTrace> load(const std::string& card_id) const;
    /// Cards of the engine with exactly these samples, wherever they stand: files of another day come in by mistake.
    /// @param packed of `pack_card`, which takes its time: on a worker where there are many
    Result<std::vector<CardEntry>> find_same(const std::string& engine_id, const QByteArray& packed) const;
    /// Adds a cylinder's card to a reading. Answers its id; the same card again is the same id.
    /// @par Problems invalid_input: the reading has another card of this cylinder
    Result<std::string> add(const std::string& reading_id, int cylinder, const CardTrace& trace,
                            const Signature& by);
    /// What `add_all` would answer; nothing is changed and nobody need sign.
    Result<AddedCards> foresee(const std::string& reading_id, const std::vector<NewCard>& cards) const;
    /// Adds the cards of several cylinders to a reading: all of them, or none.
    /// @par Problems invalid_input: the reading has another card of one of the cylinders, or two are of one cylinder
    Result<AddedCards> add_all(const std::string& reading_id, const std::vector<NewCard>& cards, const Signature& by);

    /// Takes a card out of use with a reason: wrong cylinder, choked cock. It stays in the file and can be brought back;
    /// its place is free for another. What it gave its reading is taken out too, as a correction where that is closed.
    /// Answers how many values that were.
    /// @par Problems invalid_input: nobody signed or no reason, the reading is withdrawn; not_found
    Result<int> withdraw(const std::string& card_id, const Signature& by);
    /// Puts a withdrawn card back; its results are put into the reading by whoever wants them there.
    /// @par Problems invalid_input: nobody signed or no reason, the reading has another card of the cylinder by now; not_found
    Done restore(const std::string& card_id, const Signature& by);
    Result<std::vector<WithdrawnCard>>
    withdrawn(const std::string& engine_id) const; ///< by time of reading, cylinder, then when it was withdrawn

private:
    History& history_;
};

} // namespace evenstroke::storage
