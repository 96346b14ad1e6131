// SPDX-License-Identifier: GPL-3.0-or-later
#include "storage/trace_layout.h"

#include "core/card/card_values.h"
#include "core/card/trace.h"
#include "core/plain_text.h"
#include "storage/card_file.h"
#include "storage/plain_number.h"
#include "storage/sql.h"
#include "storage/trace_angles.h"
#include "storage/trace_titles.h"

#include <QFileInfo>

#include <algorithm>
#include <cmath>

// From the text of an instrument's file to one trace a cylinder.
namespace evenstroke::storage {
namespace {

constexpr int most_columns = 200;

char sign_of(ColumnSeparator separator)
{
    switch (separator) {
    case ColumnSeparator::semicolon:
        return ';';
    case ColumnSeparator::tab:
        return '\t';
    case ColumnSeparator::space:
        return ' ';
    default:
        return ',';
    }
}

/// The samples of a file as its layout says them, before they are traces.
class TraceText
{
public:
    TraceText(std::string_view text, const TraceLayout& layout, bool two_stroke);
    Done read();
    Result<std::vector<ReadTrace>> traces(const Engine& engine);
    qint64 line() const { return line_; }

private:
    struct Column
    {
        std::size_t index = 0;
        std::vector<double> pressure; ///< bar; NaN where it is missing
    };

    Done find_columns();
    Done read_row(std::string_view row);
    void take_fields(std::string_view row);
    Result<double> number(std::size_t index, const char* what) const;
    bool is_missing(std::string_view field) const;
    Done read_angle();
    Done read_pressure(Column& column);
    Result<ReadTrace> trace_of(const PressureColumn& wanted, const Column& column,
                               const Engine& engine) const;

    std::string_view rest_;
    const TraceLayout& layout_;
    char separator_ = ',';
    std::size_t fields_needed_ = 0;
    std::vector<std::string_view> fields_;
    std::vector<std::string> missing_words_;
    TraceAngles angles_;
    std::vector<Column> columns_;
    double offset_ = 0.0, factor_ = 1.0; ///< bar = offset + factor * field
    qint64 line_ = 0;
};

TraceText::TraceText(std::string_view text, const TraceLayout& layout, bool two_stroke)
    : rest_(text), layout_(layout), angles_(layout, two_stroke ? 360.0 : 720.0)
{
    if (rest_.starts_with("\xEF\xBB\xBF"))
        rest_.remove_prefix(3);
    separator_ =
        sign_of(layout.separator == ColumnSeparator::automatic ? find_separator(rest_.substr(0, 20000))
                                                               : layout.separator);
    for (const std::string& word : layout.missing_words)
        missing_words_.push_back(lower(trimmed(word)));
    const Unit& chosen = unit(*layout.unit);
    factor_ = chosen.factor / 1e5;
    if (const auto& two = layout.calibration) {
        const double slope = (two->pressure_2 - two->pressure_1) / (two->signal_2 - two->signal_1);
        offset_ = factor_ * (two->pressure_1 - slope * two->signal_1);
        factor_ *= slope;
    }
    const auto need = [this](int column) {
        fields_needed_ = std::max(fields_needed_, static_cast<std::size_t>(column));
    };
    if (layout.angle_from != AngleFrom::sample_number)
        need(layout.angle_column);
    if (layout.cycle_column)
        need(*layout.cycle_column);
    for (const PressureColumn& column : layout.pressures) {
        need(column.column);
        columns_.push_back({static_cast<std::size_t>(column.column - 1), {}});
    }
}

/// Blanks as separator may stand in rows.
void TraceText::take_fields(std::string_view row)
{
    fields_.clear();
    const char* at = row.data();
    const char* const end = at + row.size();
    while (fields_.size() < fields_needed_) {
        if (separator_ == ' ')
            while (at != end && (*at == ' ' || *at == '\t'))
                ++at;
        const char* stop = at;
        while (stop != end && *stop != separator_ && !(separator_ == ' ' && *stop == '\t'))
            ++stop;
        if (separator_ == ' ' && stop == at)
            return;
        fields_.emplace_back(at, static_cast<std::size_t>(stop - at));
        if (stop == end)
            return;
        at = stop + 1;
    }
}

bool TraceText::is_missing(std::string_view field) const
{
    return field.empty() ||
           std::find(missing_words_.begin(), missing_words_.end(), lower(field)) != missing_words_.end();
}

/// @param what  begins a sentence: "The crank angle"
Result<double> TraceText::number(std::size_t index, const char* what) const
{
    std::string_view field = fields_[index];
    double value = 0.0;
    const char* at = field.data();
    const char* const end = at + field.size();
    if (read_plain_number(at, end, layout_.decimal_sign, value) && at == end)
        return value;
    field = trimmed(field);
    if (field.size() > 1 && field.front() == '"' && field.back() == '"')
        field = trimmed(field.substr(1, field.size() - 2));
    const auto read = parse_number(field);
    const bool other_sign = field.find(layout_.decimal_sign == '.' ? ',' : '.') != std::string_view::npos;
    if (!read)
        return invalid_input(std::string(what) + " is not readable: " + read.error().what_happened,
                             "Check the column, the separator and how many lines stand above the numbers.");
    if (other_sign)
        return invalid_input(std::string(what) + " " + quoted(field) +
                                 " has another decimal sign than was chosen.",
                             layout_.decimal_sign == '.' ? "Choose the comma as decimal sign."
                                                         : "Choose the point as decimal sign.");
    return read;
}

Done TraceText::read_angle()
{
    double value = static_cast<double>(angles_.samples());
    if (layout_.angle_from != AngleFrom::sample_number) {
        const auto read = number(static_cast<std::size_t>(layout_.angle_column - 1),
                                 layout_.angle_from == AngleFrom::time ? "The time" : "The crank angle");
        if (!read)
            return read.error();
        value = read.value();
    }
    std::optional<int> cycle;
    if (layout_.cycle_column) {
        const auto read = number(static_cast<std::size_t>(*layout_.cycle_column - 1), "The cycle");
        if (!read)
            return read.error();
        if (read.value() != std::floor(read.value()) || std::abs(read.value()) > 1e6)
            return invalid_input("The cycle " + number_text(read.value()) + " is no whole number.",
                                 "Choose the column that counts the cycles, or none.");
        cycle = static_cast<int>(read.value());
    }
    return angles_.add(value, cycle);
}

Done TraceText::read_pressure(Column& column)
{
    const std::string_view field = fields_[column.index];
    double value = 0.0;
    const char* at = field.data();
    const char* const end = at + field.size();
    if (!(read_plain_number(at, end, layout_.decimal_sign, value) && at == end)) {
        if (is_missing(trimmed(field))) {
            column.pressure.push_back(std::nan(""));
            return done();
        }
        const auto read = number(column.index, layout_.calibration ? "The signal" : "The pressure");
        if (!read)
            return read.error();
        value = read.value();
    }
    column.pressure.push_back(offset_ + factor_ * value);
    return done();
}

Done TraceText::read_row(std::string_view row)
{
    take_fields(row);
    if (fields_.size() < fields_needed_)
        return invalid_input(
            "The row " + quoted(row) + " has " + std::to_string(fields_.size()) +
                (fields_.size() == 1 ? " column" : " columns") + ", and column " +
                std::to_string(fields_needed_) + " is asked for.",
            "Check the separator and the columns, and how many lines stand above the numbers.");
    BOOST_OUTCOME_TRYV(read_angle());
    for (Column& column : columns_) {
        BOOST_OUTCOME_TRYV(read_pressure(column));
    }
    return done();
}

Done TraceText::read()
{
    const auto rows = static_cast<std::size_t>(std::count(rest_.begin(), rest_.end(), '\n'));
    if (rows > indicator::most_samples)
        return invalid_input("The file has " + std::to_string(rows) + " rows, more than the " +
                                 std::to_string(indicator::most_samples) + " of the longest record.",
                             "Write fewer cycles; twenty are enough.");
    angles_.reserve(rows + 1);
    for (Column& column : columns_)
        column.pressure.reserve(rows + 1);
    while (!rest_.empty()) {
        ++line_;
        const std::string_view row = take_text_line(rest_);
        if (line_ > layout_.header_lines && !trimmed(row).empty()) {
            BOOST_OUTCOME_TRYV(read_row(row));
        }
    }
    line_ = 0;
    if (angles_.samples() == 0)
        return invalid_input("It has no row of numbers.",
                             "Choose the file of a card, and how many lines stand above its numbers.");
    return done();
}

Result<ReadTrace> TraceText::trace_of(const PressureColumn& wanted, const Column& column,
                                      const Engine& engine) const
{
    ReadTrace read;
    read.column = wanted.column;
    read.cylinder = wanted.cylinder;
    read.trace = angles_.trace(column.pressure, read.missing);
    read.trace.gauge = layout_.gauge;
    indicator::Trace record{read.trace.cycle, read.trace.crank_angle_deg, read.trace.pressure_bar};
    if (layout_.gauge)
        for (double& pressure : record.pressure)
            pressure += indicator::usual_barometer; // only to look whether a gauge pressure can be
    const auto clean = indicator::clean(record, {engine.kind == EngineKind::two_stroke,
                                                 engine.cylinder_closes_deg, engine.cylinder_opens_deg});
    if (!clean)
        return clean.error();
    return read;
}

Result<std::vector<ReadTrace>> TraceText::traces(const Engine& engine)
{
    std::vector<ReadTrace> found;
    for (std::size_t i = 0; i < columns_.size(); ++i) {
        auto read = trace_of(layout_.pressures[i], columns_[i], engine);
        if (!read) {
            Problem problem = read.error();
            problem.what_happened =
                "Column " + std::to_string(layout_.pressures[i].column) + ": " + problem.what_happened;
            return problem;
        }
        found.push_back(std::move(read.value()));
    }
    return found;
}

Problem in_file(Problem problem, const std::string& name, qint64 line)
{
    problem.what_happened =
        name + (line > 0 ? ", line " + std::to_string(line) : std::string()) + ": " + problem.what_happened;
    return problem;
}

} // namespace

Result<std::vector<ReadTrace>> read_traces_text(std::string_view text, const std::string& name,
                                                const TraceLayout& layout, const Engine& engine)
{
    if (auto problem = find_layout_problem(layout))
        return in_file(*std::move(problem), name, 0);
    if (trimmed(text).empty())
        return in_file(invalid_input("It is empty.", "Write the card from the instrument again."), name, 0);
    if (const std::size_t zero = text.find('\0'); zero != std::string_view::npos)
        return in_file(invalid_input("It is no text: it holds bytes that no writing has.",
                                     "Let the instrument write the card as text, in columns."),
                       name,
                       1 + std::count(text.begin(), text.begin() + static_cast<std::ptrdiff_t>(zero), '\n'));
    TraceText file(text, layout, engine.kind == EngineKind::two_stroke);
    if (const auto read = file.read(); !read)
        return in_file(read.error(), name, file.line());
    auto traces = file.traces(engine);
    if (!traces)
        return in_file(traces.error(), name, 0);
    return traces;
}

Result<std::vector<ReadTrace>> read_traces(const QString& path, const TraceLayout& layout,
                                           const Engine& engine)
{
    const auto content = card_file_content(path);
    if (!content)
        return content.error();
    return read_traces_text({content.value().constData(), static_cast<std::size_t>(content.value().size())},
                            from_qt(QFileInfo(path).fileName()), layout, engine);
}

std::optional<Problem> find_layout_problem(const TraceLayout& layout, int columns)
{
    const int last = columns > 0 ? columns : most_columns;
    const auto is_column = [&](int column) { return column >= 1 && column <= last; };
    if (layout.pressures.empty())
        return invalid_input("No column is named as pressure.", "Choose the column of the pressure.");
    if (!layout.unit)
        return invalid_input("The unit of the pressures is not chosen.",
                             "Choose it; a wrong one makes every number wrong.");
    if (unit(*layout.unit).dimension != Dimension::pressure)
        return invalid_input(quoted(unit(*layout.unit).symbol) + " is no unit of pressure.",
                             "Choose a pressure, such as bar.");
    for (const PressureColumn& pressure : layout.pressures)
        if (!is_column(pressure.column))
            return invalid_input("There is no column " + std::to_string(pressure.column) +
                                     " for the pressure.",
                                 "Choose one of columns 1 to " + std::to_string(last) + ".");
    if ((layout.angle_from != AngleFrom::sample_number && !is_column(layout.angle_column)) ||
        (layout.cycle_column && !is_column(*layout.cycle_column)))
        return invalid_input("The column of the angle, the time or the cycle is not in the file.",
                             "Choose one of columns 1 to " + std::to_string(last) + ".");
    if (layout.angle_from == AngleFrom::sample_number &&
        !(layout.counts_per_revolution >= 60.0 && layout.counts_per_revolution <= 36000.0))
        return invalid_input(number_text(layout.counts_per_revolution) + " samples a revolution cannot be.",
                             "Write how many the instrument takes, 60 to 36000.");
    if (layout.angle_from == AngleFrom::time &&
        !(layout.speed >= 10.0 && layout.speed <= 3000.0 && layout.seconds_per_count > 0.0))
        return invalid_input("Times become angles only with the speed, and it is " +
                                 number_text(layout.speed) + " r/min.",
                             "Write the speed of the engine, 10 to 3000 r/min.");
    if (!std::isfinite(layout.first_angle) || !std::isfinite(layout.dead_centre_at) ||
        std::abs(layout.first_angle) > 720.0 || std::abs(layout.dead_centre_at) > 720.0)
        return invalid_input("The angle of the first sample or of dead centre is beyond one working cycle.",
                             "Write -720 to 720 degrees.");
    if (const auto& two = layout.calibration; two && two->signal_1 == 0.0 && two->pressure_1 == 0.0 &&
                                              two->signal_2 == 0.0 && two->pressure_2 == 0.0)
        return invalid_input("The file holds a signal, and what pressure it stands for is not written yet.",
                             "Write two values of the signal and the pressure at each.");
    if (const auto& two = layout.calibration)
        if (!(two->signal_1 != two->signal_2) || !(two->pressure_1 != two->pressure_2) ||
            !std::isfinite(two->signal_1 + two->signal_2 + two->pressure_1 + two->pressure_2))
            return invalid_input("The two points of the calibration are one and the same.",
                                 "Write two different signals and the pressure at each.");
    return std::nullopt;
}

} // namespace evenstroke::storage
