// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/engine/engine.h"
#include "storage/card_store.h"

#include <optional>
#include <string>
#include <string_view>
#include <vector>

/// Files of indicating instruments: text in columns, whatever their order, units and angles. How a file is to
/// be read is said once by the engineer and remembered for the engine.
namespace evenstroke::storage {

enum class ColumnSeparator { automatic, comma, semicolon, tab, space };

/// Where the crank angle of a sample comes from.
enum class AngleFrom {
    column,        ///< degrees stand in a column
    sample_number, ///< the rows are evenly spaced in angle
    time,          ///< a column of times at even speed
};

struct PressureColumn
{
    int column = 2;              ///< counts from 1
    std::optional<int> cylinder; ///< empty: the file's name says it, or nobody yet
};

/// A signal in volts or counts, and the pressures at two of its values.
struct TwoPointCalibration
{
    double signal_1 = 0.0, pressure_1 = 0.0;
    double signal_2 = 1.0, pressure_2 = 1.0;
};

/// How a file is laid out. Columns count from 1.
struct TraceLayout
{
    ColumnSeparator separator = ColumnSeparator::automatic;
    char decimal_sign = '.'; ///< or ','
    int header_lines = 1;

    AngleFrom angle_from = AngleFrom::column;
    int angle_column = 1; ///< of degrees, or of times; for `sample_number` the one that counts them, 0: none
    double counts_per_revolution = 720.0; ///< samples, for `sample_number`
    double seconds_per_count = 1.0;       ///< of the time column: 1 for seconds, 0.001 for milliseconds
    double speed = 0.0;                   ///< r/min, for `time`
    double first_angle = 0.0;             ///< degrees at the first sample, for `sample_number` and `time`
    double dead_centre_at = 0.0;          ///< what the file calls firing dead centre, degrees
    bool backwards = false;               ///< the file's angles fall while the engine runs

    std::optional<int> cycle_column;
    std::vector<PressureColumn> pressures = {{}};
    std::optional<UnitId> unit; ///< of the pressures; empty: not chosen yet, and nothing is read
    bool gauge = false;         ///< over the barometer; else absolute
    std::optional<TwoPointCalibration>
        calibration; ///< the columns hold a signal; its pressures are in `unit`
    std::vector<std::string> missing_words = {"nan",
                                              "-"}; ///< whatever their case; an empty field is missing too
};

/// One cylinder's trace out of a file, angles brought to firing dead centre = 0 and within one period,
/// pressures in bar rounded to a millionth. Samples that are missing are left out.
struct ReadTrace
{
    int column = 0;
    std::optional<int> cylinder;
    CardTrace trace;
    int missing = 0;
};

/// Reads all pressure columns of a file. What the evaluation could not begin with is refused here, so that
/// nothing of it is stored: angles that stand still or step back, pressures that no cylinder has, a
/// compression that is not there.
/// @par Problems invalid_input naming file, line and value; not_found; storage
Result<std::vector<ReadTrace>> read_traces(const QString& path, const TraceLayout& layout,
                                           const Engine& engine);
/// The same from the text of a file; `name` is for the sentences.
Result<std::vector<ReadTrace>> read_traces_text(std::string_view text, const std::string& name,
                                                const TraceLayout& layout, const Engine& engine);
/// What is wrong with a layout by itself; `columns` of the file, 0 where they are not known.
std::optional<Problem> find_layout_problem(const TraceLayout& layout, int columns = 0);

/// What the first lines of a file look like. A proposal for the engineer, never a decision: the unit is only
/// named, and a column titled as a signal gets a calibration whose points are yet to be written.
struct ProposedLayout
{
    TraceLayout layout;              ///< without a unit
    std::optional<WrittenUnit> unit; ///< that the header names; empty: it names none
    std::vector<std::string> titles; ///< of the columns, where a header line has them
    int columns = 0;
};
/// @param first_lines  the more of them, the better an index of samples is told from whole degrees
/// @param cycle_degrees  of the engine's working cycle, 360 or 720
ProposedLayout guess_layout(std::string_view first_lines, double cycle_degrees = 360.0);

/// The fields of one line; quotation marks and blanks around them are taken off.
std::vector<std::string> split_line(std::string_view line, ColumnSeparator separator);
/// What `automatic` means for these lines.
ColumnSeparator find_separator(std::string_view first_lines);
/// The beginning of a file, at most so many lines. @par Problems not_found; storage; invalid_input: it is no
/// text
Result<std::string> first_lines_of(const QString& path, int lines);

/// The cylinder that a file's name or a column's title speaks of: the number behind "cyl", "cylinder", "c" or
/// "no", else the only number that is a cylinder, else a cylinder's own name.
std::optional<int> guess_cylinder(std::string_view text, const Engine& engine);

/// How an engine's files were laid out the last time. @return nothing where that is not known
Result<std::optional<TraceLayout>> load_trace_layout(History& history, const std::string& engine_id);
Done save_trace_layout(History& history, const std::string& engine_id, const TraceLayout& layout);

} // namespace evenstroke::storage
