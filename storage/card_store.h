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
    /// Adds a cylinder's card to a reading. Answers its id; the same card again is the same id.
    /// @par Problems invalid_input: the reading has another card of this cylinder
    Result<std::string> add(const std::string& reading_id, int cylinder, const CardTrace& trace,
                            const Signature& by);
    /// What `add_all` would answer; nothing is changed and nobody need sign.
    Result<AddedCards> foresee(const std::string& reading_id, const std::vector<NewCard>& cards) const;
    /// Adds the cards of several cylinders to a reading: all of them, or none.
    /// @par Problems invalid_input: the reading has another card of one of the cylinders, or two are of one cylinder
    Result<AddedCards> add_all(const std::string& reading_id, const std::vector<NewCard>& cards, const Signature& by);

private:
    History& history_;
};

} // namespace evenstroke::storage
