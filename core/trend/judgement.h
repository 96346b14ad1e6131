// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/engine/engine.h"
#include "core/reading/reading.h"
#include "core/reading/steadiness.h"

#include <functional>
#include <memory>
#include <optional>
#include <string>
#include <vector>

/// What the program makes of one engine's readings: the whole way from the typed value to the flag.
/// Everything in here can be recomputed at any time from readings, events and engine, and carries
/// `method_version`. Numbers are in the quantity's own unit (`quantity(id).unit`) unless said; a pressure
/// is of the quantity's own kind, whatever kind was typed.
namespace evenstroke {

inline constexpr int method_version = 3;

/// Worst last. A level is always shown as word and mark, never as colour alone.
enum class Level { no_data, learning, quiet, note, ask, watch, act };
std::string level_word(Level level); ///< "watch"

enum class Applied { none, linear, extrapolated, similarity, heating_value, not_correctable };

/// One value on its way: raw, corrected, expected, deviation, apart.
struct JudgedValue
{
    QuantityId quantity = 0;
    Place place;
    std::size_t value_index = 0;     ///< in Reading::values
    double raw = 0.0;                ///< as read, in the quantity's own unit and kind
    std::optional<double> corrected; ///< empty: no coefficients, or a condition missing (`missing_input` says which)
    std::optional<double> expected;  ///< baseline at the typed load
    std::optional<double> deviation; ///< corrected - expected (raw where there is nothing to correct)
    std::optional<double> apart;     ///< deviation - median of the others' deviations
    std::optional<double> uncertainty; ///< half-width at 95 % of the deviation; empty: the instrument's is not known
    Applied applied = Applied::none;
    std::string missing_input;       ///< the condition that was not taken, in words
    bool doubtful = false;           ///< held out of drift until the engineer answers
};

struct Doubt
{
    enum class Verdict { decimal_slip, digits_swapped, unit_slip, cylinders_swapped, implausible, copied, unsteady };
    Verdict verdict = Verdict::implausible;
    std::size_t reading = 0;               ///< index in time order
    std::optional<QuantityId> quantity;    ///< none: all of the place
    std::optional<Place> place;            ///< none: all places
    std::optional<std::string> suggestion; ///< the value probably meant, as it would be typed
    std::string sentence;
};
std::string verdict_name(Doubt::Verdict verdict); ///< "decimal_slip", as in files

struct ReadingJudgement
{
    std::size_t reading = 0; ///< index in Judgement::readings
    Steadiness steadiness = Steadiness::not_judged;
    std::string steadiness_sentence;
    bool poor = false;       ///< the scatter over all cells says that the load was not steady
    std::optional<double> load_percent;
    std::string mode;
    std::vector<JudgedValue> values; ///< walking order
};

/// One point of a trend. Points that were not read are not there.
struct TrendPoint
{
    std::size_t reading = 0;
    double raw = 0.0;
    std::optional<double> corrected, expected, deviation, apart;
    std::optional<double> uncertainty;
    bool unsteady = false; ///< hollow on plots
    bool doubtful = false; ///< crossed on plots
    int stretch = 0;       ///< counts up at recorded work: comparable points share it
};

/// One quantity at one place over time.
struct Trend
{
    QuantityId quantity = 0;
    Place place;
    std::vector<TrendPoint> points;
    Level level = Level::no_data; ///< now
    int learned = 0, needed = 8;  ///< usable readings since the last work
    std::optional<double> usual_low, usual_high; ///< of `apart` (cylinders) or `deviation` (engine): own level +- 2 noise
    bool own_level = false; ///< `expected` is its own usual level, since the baseline does not speak of it
    std::optional<double> noise;  ///< one standard deviation, the engine's own
    std::optional<std::size_t> current_start; ///< reading at which the present stretch began
};

/// Evidence for a change at one subject, reading by reading.
struct Evidence
{
    Place place;                               ///< a cylinder, or the engine
    std::vector<std::optional<double>> amount; ///< one a reading; none where nothing could be said
    double threshold = 0.0;
};

struct MovedQuantity
{
    QuantityId quantity = 0;
    double amount = 0.0;   ///< a month (ramp) or once (step), in the unit of the deviation
    double strength = 0.0; ///< in standard deviations
    bool percent = false;  ///< the amount is per cent of the baseline
};

struct TimeToLimit
{
    double limit = 0.0; ///< in the unit of the deviation, from the cylinder's own level
    std::string limit_text;
    std::optional<double> months_5, months_50, months_95; ///< none: not within ten years
};

/// What people on board said of one flag or question. Notes are only added, never changed; of several about one
/// flag the newest counts. A note takes nothing out of the record: it says that somebody has looked.
struct FlagNote
{
    enum class Said : unsigned char {
        seen,    ///< known and dealt with; the flag comes up again on new evidence
        no_work, ///< the answer to a question: no work was done, so the change is the engine's
        withdrawn ///< what was said before counts no more
    };
    std::string id;
    Place subject;          ///< a cylinder, or the engine
    TimePoint flagged_at{}; ///< of the reading that raised the flag
    Said said = Said::seen;
    double evidence = 0.0;  ///< of the flag when it was said
    Level level = Level::quiet; ///< of the flag when it was said
    std::string words;      ///< "fuel valve changed, looked at again next month"
    std::string event_id;   ///< work that it is tied to; empty: none
    TimePoint written_at{};
    std::string who;
};

/// A flag or a question. It starts once and is never taken back; it may close.
struct Flag
{
    std::size_t reading = 0;        ///< whose evidence first passed the threshold
    Place subject;                  ///< a cylinder, or the engine
    QuantityId quantity = 0;        ///< the one that moved most
    Level severity = Level::watch;  ///< when it started: watch, act or ask
    Level level_now = Level::quiet; ///< at the last reading
    std::optional<std::size_t> raised_at; ///< reading at which a standing flag rose to `level_now`; none: it did not rise
    std::string pattern;            ///< catalogue name of the signature, empty for a single quantity
    std::string pattern_words;      ///< "blow-by (rings or exhaust valve)"
    bool ramp = false;
    TimePoint since{};              ///< estimated onset
    double months = 0.0;            ///< from onset to the last reading that carries it
    std::vector<MovedQuantity> moved; ///< strongest first
    double evidence = 0.0, threshold = 0.0; ///< at the last reading that carries it
    std::string sentence;           ///< what moved, how much, since when, compared with what: as known now
    std::string first_sentence;     ///< the same as it stood when the flag started: later readings never change it
    QuantityId first_quantity = 0;  ///< the one that had moved most then
    std::string chance_sentence;    ///< how likely by chance
    std::string first_chance_sentence; ///< the same as it stood when the flag started
    std::string next_check;         ///< what to look at
    std::vector<std::string> cautions; ///< catalogue names, most urgent first
    std::optional<TimeToLimit> time_to_limit;
    bool absolute_limit = false;    ///< raised by a limit of the maker, not by drift
    std::vector<std::size_t> carrying; ///< readings from the onset on
    std::optional<FlagNote> note;   ///< what was last said of it, if anything that still counts
    bool reopened = false;          ///< new evidence came after it was seen
    /// Somebody has looked, and nothing new has come since.
    bool seen() const { return note && note->said == FlagNote::Said::seen && !reopened; }
};

/// Everything the judging needs about one engine.
struct EngineRecord
{
    Vessel vessel;
    Engine engine;
    std::vector<Reading> readings; ///< closed ones, in order of time, the ship's shared values merged in
    std::vector<Event> events;     ///< in order of time; whole-ship ones included
    std::vector<FlagNote> notes;   ///< in the order in which they were written
};

struct Judgement
{
    int version = method_version;
    std::shared_ptr<const EngineRecord> record;
    std::vector<ReadingJudgement> readings; ///< same order as record->readings
    std::vector<Trend> trends;              ///< walking order, then place
    std::vector<Evidence> evidence;         ///< one a cylinder, then the engine
    std::vector<Flag> flags;                ///< in order of their start
    std::vector<Doubt> doubts;              ///< in order of reading
    Level level = Level::no_data;           ///< the worst of now

    const Trend* find_trend(QuantityId quantity, Place place) const;
    const Evidence* find_evidence(Place place) const;
    /// Flags that stand at the last reading: first those that nobody has seen to; worst first, then the strongest.
    std::vector<const Flag*> standing_flags() const;
    Level level_of(Place subject) const;
};

/// Judges all readings of one engine, causally: what later readings bring changes no earlier row.
/// A cancelled run (the callback answers false) gives an empty judgement with level no_data.
Judgement judge(std::shared_ptr<const EngineRecord> record, const std::function<bool()>& go_on = {});

/// What to say of one typed value of a draft, with the readings before it.
struct ValueOpinion
{
    enum class Verdict { nothing_to_compare, usual, unlikely, impossible, doubtful };
    std::optional<double> previous;  ///< the same place at the last reading, own unit
    std::optional<double> expected;  ///< raw value with which the deviation would be the place's own usual one
    std::optional<double> usual_low, usual_high; ///< raw values inside the usual scatter
    Verdict verdict = Verdict::nothing_to_compare;
    std::optional<std::string> suggestion; ///< the value probably meant, in the typed unit
    std::optional<std::string> second_suggestion; ///< what else it may be: the same number in yet another unit
    std::string sentence;                  ///< empty where there is nothing to say
};
struct DraftOpinion
{
    std::vector<ValueOpinion> values; ///< one for each value of the draft, same order
    std::vector<std::string> between; ///< relations between values that look wrong, a sentence each
    Steadiness steadiness = Steadiness::not_judged;
    std::string steadiness_sentence;
    std::vector<Doubt> doubts;        ///< of the whole draft: rows in another unit, exchanged cylinders
};
/// @param draft  the values may be partly filled; a value without a number still gets previous and expected
DraftOpinion judge_draft(const Judgement& history, const Reading& draft);

} // namespace evenstroke
