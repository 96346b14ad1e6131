// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <cstddef>
#include <optional>
#include <string>
#include <string_view>
#include <vector>

/// Finds the cylinder, or the engine, that leaves its own level: plain numbers in, evidence and flags out.
///
/// Input are deviations (corrected minus expected). The common part of all cylinders is taken out, a
/// likelihood-ratio scan looks for a step or a ramp of unknown onset in each quantity and in fault
/// signatures, and a second explanation, work that nobody wrote down, turns a flag into a question.
///
/// Shapes: T readings in order of time, N cylinders. Per-cell vectors are row-major: cell of reading i and
/// cylinder j at [i * N + j]. Flag vectors (`std::vector<char>`, 1 = yes) may be left empty for "never".
/// Causal: a row of the output depends on readings up to its own and never changes when more come in.
/// Source of method and figures: own simulations (core/simulation/fleet_simulator.h); where a published
/// result backs a part, it is named there.
namespace evenstroke::drift {

// ---------------------------------------------------------------------------------------------- input

/// One typed value with its deviation.
struct Cell
{
    bool present = false;
    double deviation = 0.0;    ///< x, in the deviation's unit: bar, °C, %, ...
    double scale = 1.0;        ///< change of `deviation` per unit of the typed number (they are affine)
    double typed_number = 0.0; ///< in the typed unit
    std::string typed_text;    ///< as typed: needed to try a lost point or two exchanged digits
    bool confirmed = false;    ///< read again by the engineer: never doubted, never left out
    bool held_out = false;     ///< known to be impossible (outside its hard range): never used
};

/// How far a quantity may go.
struct Marks
{
    /// The trade's custom: from the place's own level before the change, deviation's unit, > 0 each.
    std::optional<double> allowed_rise, allowed_fall;
    /// (T) or empty: the engine's own limits as deviations at each reading's load. Where there is one it counts
    /// in place of the custom.
    std::vector<std::optional<double>> own_high, own_low;
};

/// One per-cylinder quantity.
struct Channel
{
    std::string quantity;       ///< name in the quantity catalogue
    double noise = 1.0;         ///< prior one sigma of a reading, deviation's unit
    double offset_spread = 1.0; ///< prior one sigma between cylinders' lasting offsets
    std::vector<std::optional<double>>
        expected_typed;               ///< (T) expected in the typed unit: for a row in another unit
    std::vector<Cell> cells;          ///< (T x N)
    std::vector<char> segment_starts; ///< (T x N) work on this instrument only, before this reading
    bool in_scan = true;              ///< false: typing check and apart only
    bool checked = true;              ///< false: worked out of values that are checked where they were typed
    Marks marks;                      ///< of one cylinder
    Marks median_marks;               ///< of the median over the cylinders
};

/// One engine-level quantity. The medians over the cylinders are made by `judge` itself.
struct EngineChannel
{
    std::string quantity;       ///< what it is called in flags, e.g. "cooler_temperature_difference"
    std::string typed_quantity; ///< the value a doubt names, e.g. "scavenge_temperature"; empty: `quantity`
    double noise = 1.0;         ///< prior one sigma, deviation's unit
    std::vector<Cell> cells;    ///< (T)
    std::vector<char> segment_starts; ///< (T) work on this instrument only
    bool in_scan = true;
    Marks marks;
};

/// An engineer's answer to a question: known from the reading that raised it on.
struct Answer
{
    std::size_t reading = 0; ///< the reading at which the question started
    std::size_t cylinder = 0;
    bool work_was_done = false;
};

struct Input
{
    std::vector<double> months;                      ///< (T) ascending; days since any fixed day / 30.4375
    std::size_t cylinders = 0;                       ///< N
    std::vector<std::optional<double>> load_percent; ///< (T) or empty
    std::vector<Channel> channels;
    std::vector<EngineChannel> engine_channels;
    std::vector<char> cylinder_work; ///< (T x N) recorded work since the reading before: opens all quantities
    std::vector<char> engine_work; ///< (T) the same for the engine level; the caller marks the cylinders too
                                   ///< where they are meant
    std::vector<char>
        excluded; ///< (T) takes no part in drift (not steady by the quick lines, outside the baseline)
    std::vector<Answer> answers;

    std::size_t readings() const { return months.size(); }
};

// ------------------------------------------------------------------------------------- typing check

enum class Verdict {
    decimal_slip,
    digits_swapped,
    unit_slip,
    cylinders_swapped,
    implausible,
    copied,
    unsteady
};
std::string_view verdict_name(Verdict verdict); ///< "decimal_slip"

/// Something that looks mistyped. It is a question to the engineer; the program changes no value.
struct Doubt
{
    std::size_t reading = 0;
    Verdict verdict = Verdict::implausible;
    std::string quantity;                   ///< empty: all
    bool engine_level = false;              ///< `quantity` is one of the engine
    std::vector<std::size_t> cylinders;     ///< empty: all (or engine level); one, or the two exchanged
    std::optional<double> suggested_number; ///< in the typed unit
    std::string suggested_text;             ///< as it would be typed
    double size = 0.0; ///< distance from the usual in standard deviations; scatter ratio for unsteady
    std::optional<double> deviation; ///< of the typed value
    std::optional<double> usual_low,
        usual_high; ///< about 95 of 100 sound values lie within, deviation's unit
};

/// The usual band of one place, typed or not, in the deviation's unit.
struct UsualBand
{
    double centre = 0.0, low = 0.0, high = 0.0; ///< low and high: about 95 of 100 sound values lie within
    bool from_others =
        true; ///< false: from the place's own last readings only (fewer than three others were read)
};

/// What the typing check says of the last reading.
struct ReadingCheck
{
    std::vector<std::vector<std::optional<UsualBand>>> cylinder_bands; ///< [channel][cylinder]
    std::vector<std::optional<UsualBand>> engine_bands;                ///< [engine channel]
    std::optional<double> scatter;                                     ///< see ReadingResult
    std::vector<Doubt> doubts;                                         ///< of this reading only
};

/// Judges the last reading of the input as a draft: it may be partly filled. The same rules as in `judge`.
ReadingCheck check_last_reading(const Input& input);

// --------------------------------------------------------------------------------------------- output

enum class Level { quiet, note, ask, watch, act };
enum class Shape { step, ramp };

struct ReadingResult
{
    bool unsteady = false; ///< the typing check found all values scattered: a row `unsteady` among the doubts
    bool poor = false; ///< takes no part in the scan: scatter against the cylinders' own levels, or excluded
    std::optional<double> scatter; ///< robust sigma of all cells over the usual one; above 1.7 it is unsteady
};

struct CellResult
{
    std::optional<double> apart; ///< r: deviation without what all cylinders share (own lasting offset kept)
    double own_offset = 0.0;     ///< a: usual difference from the others
    bool doubtful = false;       ///< left out by the typing check
    bool used = false;           ///< took part in the scan
    double clipped = 0.0;        ///< v: what the scan saw when this reading came in
    double noise = 0.0;          ///< s: one sigma in force at this reading
    std::size_t usable = 0;      ///< values of the segment up to here; below 8 "learning, k of 8"
    std::size_t segment_start = 0; ///< first reading that counts
};

struct SubjectResult
{
    std::optional<double> evidence; ///< the largest standardised change; nothing where nothing can be said
    Level level = Level::quiet;
    std::string candidate; ///< quantity or signature with the largest evidence
    bool is_signature = false;
    int direction = 0; ///< +1 or -1 for a quantity
    Shape shape = Shape::step;
    std::size_t onset = 0;    ///< the first changed reading; the change is dated to the reading before
    double unexplained = 0.0; ///< chi-square of "every quantity took a new level", F (cylinders)
    bool question_open = false;
};

/// One quantity's part in a flag, with |strength| of at least 1.5.
struct QuantityChange
{
    std::string quantity;
    double strength = 0.0; ///< in standard deviations, signed
    double size = 0.0;     ///< a month (ramp) or once (step), in the deviation's unit
};

struct Escalation
{
    std::size_t reading = 0;
    Level level = Level::act;
};

struct Flag
{
    std::size_t reading = 0;             ///< whose evidence first passed the threshold
    std::optional<std::size_t> cylinder; ///< none: the engine
    Level level = Level::watch;          ///< watch, act or ask, when it started
    std::vector<Escalation> escalations;
    std::size_t last_reading = 0; ///< the last one that carries it
    bool active = false;          ///< stands at the last reading
    bool lasting_level = false;   ///< a step open for 12 readings: now taken as the new level
    // What it looked like at `last_reading`; `at_start` keeps what it looked like when it started.
    struct View
    {
        std::string candidate;
        bool is_signature = false;
        int direction = 0;
        Shape shape = Shape::step;
        std::size_t onset = 0; ///< first changed reading
        std::size_t since = 0; ///< the reading before: "since"
        double months = 0.0;   ///< from `since` to the reading of this view
        double evidence = 0.0;
        double years_by_chance = 0.0;        ///< once in so many years on a sound engine, all work recorded
        std::vector<QuantityChange> changes; ///< strongest first
    } at_start, now;
    std::optional<std::size_t> work_before; ///< questions: work is supposed before this reading
    std::optional<bool> answered;           ///< questions: what the engineer said
};

struct Output
{
    double cylinder_threshold = 0.0, engine_threshold = 0.0, note_threshold = 4.0;
    std::vector<ReadingResult> readings;        ///< (T)
    std::vector<std::vector<CellResult>> cells; ///< [channel](T x N)
    std::vector<SubjectResult> cylinders;       ///< (T x N)
    std::vector<SubjectResult> engine;          ///< (T)
    std::vector<std::string>
        engine_quantities; ///< the engine level's channels: the input's, then "median <quantity>"
    std::vector<std::vector<CellResult>>
        engine_cells;          ///< [engine quantity](T); apart = deviation without load and season
    std::vector<Flag> flags;   ///< in order of their start; questions among them
    std::vector<Doubt> doubts; ///< in order of reading
};

/// Judges all readings. Never throws for odd data: values that are not finite count as not taken, a vector
/// of the wrong length as empty, and where there is too little nothing is flagged.
Output judge(const Input& input);

/// How often so strong a drift appears by chance on a sound engine with all work recorded.
/// @return years between two such flags, two digits, never above 1000
double years_by_chance(double evidence, std::size_t cylinders);

// -------------------------------------------------------------------------------------- time to a limit

/// Months from the last point to the limit; none where it is not reached within ten years.
struct TimeToLimit
{
    std::optional<double> months_5, months_50, months_95;
    bool may_be_reached = false; ///< the 5 % point is now
};

/// Averages straight lines over all onsets that the values allow.
/// @param months  times of the values of one segment, ascending, shape (n)
/// @param values  clipped values of one quantity there, shape (n)
/// @param noise   one sigma of a value
/// @param limit   signed: how far from the level before the change, in the values' unit
/// @return nothing with fewer than 8 values
std::optional<TimeToLimit> time_to_limit(const std::vector<double>& months, const std::vector<double>& values,
                                         double noise, double limit);

/// Index of a quantity as `mark_ahead` takes it; past the end where there is none of this name.
std::size_t channel_of(const Input& input, const Output& output, const std::string& quantity, bool of_cylinders);
/// The mark that a drift runs towards.
struct MarkAhead
{
    double distance = 0.0; ///< signed: from the place's level before the change, deviation's unit
    bool own = false;      ///< a limit of the engine, at the load of the reading; else the trade's custom
};
/// @param channel  of the input; for the engine an index into `Output::engine_quantities`
/// @param cylinder nothing: the engine
/// @param onset    the first changed reading
/// @return nothing where there is no mark on that side, or an own limit lies behind the level before already
std::optional<MarkAhead> mark_ahead(const Input& input, const Output& output, std::size_t channel,
                                    std::optional<std::size_t> cylinder, std::size_t reading, std::size_t onset,
                                    bool rising);
/// The time to a limit from a judged engine, as known at `reading`.
std::optional<TimeToLimit> time_to_limit(const Input& input, const Output& output, std::size_t channel,
                                         std::optional<std::size_t> cylinder, std::size_t reading, double limit);

} // namespace evenstroke::drift
