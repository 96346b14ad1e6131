// SPDX-License-Identifier: GPL-3.0-or-later
#include "storage/trace_layout.h"

#include "core/plain_text.h"
#include "storage/card_file.h"
#include "storage/named_file.h"
#include "storage/sql.h"
#include "storage/trace_samples.h"
#include "storage/trace_titles.h"

#include <QFile>

#include <algorithm>
#include <cmath>
#include <functional>

// What a file of an instrument looks like: the proposal that the engineer then confirms or changes.
namespace evenstroke::storage {
namespace {

constexpr int looked_at = 60;                 // lines
constexpr qint64 longest_beginning = 2 << 20; // bytes: a cycle of six fine columns

std::vector<std::string_view> lines_of(std::string_view text)
{
    std::vector<std::string_view> lines;
    while (!text.empty() && lines.size() < looked_at)
        lines.push_back(take_text_line(text));
    return lines;
}

bool is_number(std::string_view field)
{
    return parse_number(field).has_value();
}

/// A row of numbers, a few of which may be missing.
bool is_row(const std::vector<std::string>& fields)
{
    const auto numbers = std::count_if(fields.begin(), fields.end(),
                                       [](const std::string& field) { return is_number(field); });
    return numbers >= 1 && 2 * numbers >= static_cast<std::ptrdiff_t>(fields.size()) &&
           is_number(fields.front());
}

/// The numbers of a column over the rows that were looked at.
std::vector<double> column_of(const std::vector<std::vector<std::string>>& rows, std::size_t column)
{
    std::vector<double> numbers;
    for (const auto& row : rows)
        if (column < row.size())
            if (const auto number = parse_number(row[column]))
                numbers.push_back(number.value());
    return numbers;
}

bool rises(const std::vector<double>& numbers)
{
    return numbers.size() > 3 &&
           std::adjacent_find(numbers.begin(), numbers.end(), std::greater_equal<>()) == numbers.end();
}

/// Steps evenly up or down, as angles and times do.
bool is_even(const std::vector<double>& numbers)
{
    if (numbers.size() < 4)
        return false;
    const double step = numbers[1] - numbers[0];
    int even = 0;
    for (std::size_t i = 1; i < numbers.size(); ++i)
        even += std::abs(numbers[i] - numbers[i - 1] - step) <= 0.02 * std::abs(step) + 1e-12 ? 1 : 0;
    return step != 0.0 && even + 1 >= static_cast<int>(numbers.size()) - 1;
}

bool is_counter(const std::vector<double>& numbers)
{
    const bool whole =
        std::all_of(numbers.begin(), numbers.end(), [](double n) { return n == std::floor(n); });
    return !numbers.empty() && whole && numbers.back() - numbers.front() >= 0.0 &&
           numbers.back() - numbers.front() <= 1.0;
}

/// Looks at one file's first lines.
class Guess
{
public:
    Guess(std::string_view text, double cycle_degrees);
    ProposedLayout answer();

private:
    void find_titles();
    void find_decimal_sign();
    void find_angle();
    bool find_index_by_title();
    void find_even_column();
    void choose_index(int column);
    bool is_index(int column) const;
    void find_cycle();
    void find_pressures();
    void find_counts();
    void name_unit();
    std::string title(int column) const;

    ProposedLayout proposed_;
    std::string_view text_;
    double cycle_degrees_;
    std::vector<std::string_view> lines_;
    std::vector<std::vector<std::string>> rows_;
    std::string header_;
};

Guess::Guess(std::string_view text, double cycle_degrees)
    : text_(text), cycle_degrees_(cycle_degrees), lines_(lines_of(text))
{
    TraceLayout& layout = proposed_.layout;
    layout.separator = find_separator(text);
    layout.header_lines = 0;
    layout.pressures.clear();
    bool in_header = true;
    for (const std::string_view line : lines_) {
        std::vector<std::string> fields = split_line(line, layout.separator);
        const bool row = is_row(fields);
        if (in_header && !row) {
            ++layout.header_lines;
            header_ += std::string(line) + "\n";
            continue;
        }
        in_header = false;
        if (row)
            rows_.push_back(std::move(fields));
    }
    if (rows_.empty())
        layout.header_lines = 0;
    else
        proposed_.columns = static_cast<int>(rows_.front().size());
}

std::string Guess::title(int column) const
{
    const auto index = static_cast<std::size_t>(column - 1);
    return index < proposed_.titles.size() ? proposed_.titles[index] : std::string();
}

/// The last line above the numbers that has as many columns.
void Guess::find_titles()
{
    for (int line = proposed_.layout.header_lines - 1; line >= 0; --line) {
        auto fields = split_line(lines_[static_cast<std::size_t>(line)], proposed_.layout.separator);
        if (static_cast<int>(fields.size()) != proposed_.columns)
            continue;
        proposed_.titles = std::move(fields);
        return;
    }
}

void Guess::find_decimal_sign()
{
    int commas = 0, points = 0;
    for (const auto& row : rows_)
        for (const std::string& field : row) {
            commas += field.find(',') != std::string::npos ? 1 : 0;
            points += field.find('.') != std::string::npos ? 1 : 0;
        }
    proposed_.layout.decimal_sign = commas > points ? ',' : '.';
}

void Guess::find_angle()
{
    TraceLayout& layout = proposed_.layout;
    layout.angle_column = 0;
    if (find_index_by_title())
        return;
    for (int column = 1; column <= proposed_.columns && layout.angle_column == 0; ++column)
        if (names_angle(title(column)))
            layout.angle_column = column;
    if (layout.angle_column == 0)
        find_even_column();
    if (layout.angle_column == 0)
        layout.angle_from = AngleFrom::sample_number;
    if (layout.angle_from != AngleFrom::column)
        return;
    const auto angles = column_of(rows_, static_cast<std::size_t>(layout.angle_column - 1));
    layout.backwards = angles.size() > 1 && angles[1] < angles[0];
}

bool Guess::find_index_by_title()
{
    for (int column = 1; column <= proposed_.columns; ++column) {
        const std::string words = title(column);
        if (names_angle(words) || !names_any(words, {"index", "sample", "point", "count"}))
            continue;
        if (!steps_by_one(column_of(rows_, static_cast<std::size_t>(column - 1))))
            continue;
        choose_index(column);
        return true;
    }
    return false;
}

void Guess::choose_index(int column)
{
    proposed_.layout.angle_from = AngleFrom::sample_number;
    proposed_.layout.angle_column = column;
}

/// Without a title that says it: what steps evenly is the angle, a time, or counts the samples.
void Guess::find_even_column()
{
    TraceLayout& layout = proposed_.layout;
    for (int column = 1; column <= proposed_.columns; ++column) {
        const auto numbers = column_of(rows_, static_cast<std::size_t>(column - 1));
        const auto seconds = time_unit_of(title(column));
        const bool time = seconds && rises(numbers); // written with few digits it does not step evenly
        if (!time && !is_even(numbers))
            continue;
        layout.angle_column = column;
        if (time) {
            layout.angle_from = AngleFrom::time;
            layout.seconds_per_count = *seconds;
        } else if (is_index(column)) {
            choose_index(column);
        }
        return;
    }
}

/// Whole numbers from 0 or 1 that step by one beyond what angles of one cycle do.
bool Guess::is_index(int column) const
{
    constexpr double last_angle = 720.0;
    const auto index = static_cast<std::size_t>(column - 1);
    const auto begun = column_of(rows_, index);
    if (begun.empty() || (begun.front() != 0.0 && begun.front() != 1.0) || !steps_by_one(begun))
        return false;
    auto numbers = column_of_text(text_, proposed_.layout, index);
    if (numbers.size() > begun.size() && !text_.ends_with('\n'))
        numbers.pop_back(); // the beginning of a long file ends within a line
    return steps_by_one(numbers) &&
           (static_cast<double>(numbers.size()) > cycle_degrees_ + 1.0 || numbers.back() > last_angle);
}

/// How many samples a revolution has, where the rows are evenly spaced in angle: whole cycles fit the file.
void Guess::find_counts()
{
    TraceLayout& layout = proposed_.layout;
    if (layout.angle_from != AngleFrom::sample_number)
        return;
    const auto column = static_cast<std::size_t>(layout.pressures.front().column - 1);
    const double a_cycle = samples_a_cycle(column_of_text(text_, layout, column));
    const double counts = a_cycle * 360.0 / cycle_degrees_;
    if (counts >= 60.0 && counts <= 36000.0)
        layout.counts_per_revolution = counts;
}

void Guess::find_cycle()
{
    for (int column = 1; column <= proposed_.columns; ++column)
        if (column != proposed_.layout.angle_column && names_any(title(column), {"cycle"}) &&
            is_counter(column_of(rows_, static_cast<std::size_t>(column - 1))))
            proposed_.layout.cycle_column = column;
}

void Guess::find_pressures()
{
    TraceLayout& layout = proposed_.layout;
    const auto names_pressure = [](const std::string& words) {
        return names_any(words, {"press", "bar", "pa]", "pa)", "psi", "cyl"});
    };
    enum Asked { of_pressures, of_signals, of_all };
    for (const Asked asked : {of_pressures, of_signals, of_all}) {
        for (int column = 1; column <= proposed_.columns; ++column) {
            if (column == layout.angle_column || column == layout.cycle_column)
                continue;
            const std::string words = title(column);
            if (asked == of_all || (asked == of_pressures ? names_pressure(words) : names_signal(words)))
                layout.pressures.push_back({column, std::nullopt});
        }
        if (layout.pressures.empty())
            continue;
        const std::string first = title(layout.pressures.front().column);
        if (has_word(first, {"v", "mv", "volt", "volts", "voltage"}) || asked == of_signals)
            layout.calibration = TwoPointCalibration{0.0, 0.0, 0.0, 0.0}; // what it means is to be written
        return;
    }
    layout.pressures = {{std::min(2, std::max(1, proposed_.columns)), std::nullopt}};
}

/// A word of the header that is a unit of pressure. Only named: an instrument may write another unit than it
/// says.
void Guess::name_unit()
{
    std::string word;
    for (const char letter : header_ + "\n") {
        if (std::isalnum(static_cast<unsigned char>(letter)) || letter == '/' || (letter & 0x80) != 0) {
            word += letter;
            continue;
        }
        const auto found = find_unit(word);
        if (!proposed_.unit && word.size() > 1 && found &&
            unit(found.value().id).dimension == Dimension::pressure)
            proposed_.unit = found.value();
        word.clear();
    }
    const std::string plain = lower(header_);
    if (proposed_.unit && proposed_.unit->kind == PressureKind::none &&
        plain.find("gauge") != std::string::npos)
        proposed_.unit->kind = PressureKind::gauge;
    if (proposed_.unit && proposed_.unit->kind == PressureKind::none &&
        plain.find("abs") != std::string::npos)
        proposed_.unit->kind = PressureKind::absolute;
}

ProposedLayout Guess::answer()
{
    if (rows_.empty()) {
        proposed_.layout.pressures = {{}};
        return std::move(proposed_);
    }
    find_titles();
    find_decimal_sign();
    find_angle();
    find_cycle();
    find_pressures();
    find_counts();
    name_unit();
    return std::move(proposed_);
}

} // namespace

ProposedLayout guess_layout(std::string_view first_lines, double cycle_degrees)
{
    if (first_lines.starts_with("\xEF\xBB\xBF"))
        first_lines.remove_prefix(3);
    return Guess(first_lines, cycle_degrees).answer();
}

ColumnSeparator find_separator(std::string_view first_lines)
{
    using enum ColumnSeparator;
    ColumnSeparator best = comma;
    std::size_t most = 0;
    // A semicolon or a tab is never a decimal sign; a blank also stands in titles.
    for (const ColumnSeparator separator : {semicolon, tab, comma, space}) {
        std::size_t rows = 0;
        for (const std::string_view line : lines_of(first_lines)) {
            const auto fields = split_line(line, separator);
            rows += fields.size() > 1 && is_row(fields) ? 1 : 0;
        }
        if (rows > most) {
            most = rows;
            best = separator;
        }
    }
    return best;
}

std::vector<std::string> split_line(std::string_view line, ColumnSeparator separator)
{
    const char sign = separator == ColumnSeparator::semicolon ? ';'
                      : separator == ColumnSeparator::tab     ? '\t'
                      : separator == ColumnSeparator::space   ? ' '
                                                              : ',';
    std::vector<std::string> fields;
    while (true) {
        if (sign == ' ')
            line = trimmed(line);
        const std::size_t end = sign == ' ' ? line.find_first_of(" \t") : line.find(sign);
        std::string_view field = trimmed(line.substr(0, end));
        if (field.size() > 1 && field.front() == '"' && field.back() == '"')
            field = field.substr(1, field.size() - 2);
        fields.emplace_back(field);
        if (end == std::string_view::npos)
            return fields;
        line.remove_prefix(end + 1);
    }
}

Result<std::string> first_lines_of(const QString& path, int lines)
{
    QFile file(path);
    if (const auto problem = open_named(file))
        return *problem;
    const QByteArray beginning = file.read(longest_beginning);
    std::string_view rest(beginning.constData(), static_cast<std::size_t>(beginning.size()));
    if (rest.find('\0') != std::string_view::npos)
        return invalid_input("\"" + from_qt(path) + "\" is no text: it holds bytes that no writing has.",
                             "Let the instrument write the card as text, in columns.");
    const std::string_view whole = rest;
    for (int line = 0; line < lines && !rest.empty(); ++line)
        take_text_line(rest);
    return std::string(whole.substr(0, whole.size() - rest.size()));
}

} // namespace evenstroke::storage
