// SPDX-License-Identifier: GPL-3.0-or-later
#include "storage/card_file.h"
#include "storage/card_rows.h"
#include "storage/card_with_gaps.h"

#include "core/plain_text.h"
#include "core/units/unit_catalogue.h"
#include "storage/plain_number.h"
#include "storage/named_file.h"
#include "storage/sql.h"

#include <QFile>
#include <QFileInfo>

#include <algorithm>
#include <charconv>
#include <cmath>

namespace evenstroke::storage {
namespace {

constexpr qint64 largest_file = 256LL << 20; // bytes; a hundred cycles at 0.1 degree have 18 MB

struct Layout
{
    bool cycles = false, gauge = false;
    char separator = ',';
    char decimal_sign = '.'; ///< of most rows: where it is another, a row takes longer
};

std::string_view take_field(std::string_view& rest, char separator)
{
    const std::size_t end = rest.find(separator);
    const std::string_view field = rest.substr(0, end);
    rest.remove_prefix(end == std::string_view::npos ? rest.size() : end + 1);
    return field;
}

/// One sample as it stands in a row.
struct PlainRow
{
    int cycle = 0;
    double angle = 0.0, pressure = 0.0;
};

std::optional<Layout> read_header(std::string_view line)
{
    Layout layout;
    layout.separator = line.find(';') == std::string_view::npos ? ',' : ';';
    std::string_view first = trimmed(take_field(line, layout.separator));
    if (first == "cycle") {
        layout.cycles = true;
        first = trimmed(take_field(line, layout.separator));
    }
    const std::string_view last = trimmed(line);
    layout.gauge = last == "pressure_bar_gauge";
    if (first != "crank_angle_deg" || (last != "pressure_bar" && last != "pressure_bar_abs" && !layout.gauge))
        return std::nullopt;
    return layout;
}

/// The quick way for plain numbers; anything else is asked of the unit catalogue's reader.
Result<double> read_number(std::string_view field)
{
    double number = 0.0;
    const auto [end, problem] = std::from_chars(field.data(), field.data() + field.size(), number);
    if (problem == std::errc() && end == field.data() + field.size() && std::isfinite(number))
        return number;
    return parse_number(field);
}

/// How recorders write a sample that they did not get.
bool is_missing(std::string_view field)
{
    const std::string_view word = trimmed(field);
    return word.empty() || word == "nan" || word == "NaN" || word == "NAN" || word == "-";
}

class CardText
{
public:
    explicit CardText(std::string_view text, bool gaps = false) : rest_(text), gaps_(gaps) {}
    Result<CardTrace> read();
    qint64 line() const { return line_; } ///< the last one read: where it was refused

private:
    void read_plain_rows();
    Done read_row(std::string_view row);
    void reserve();

    std::string_view rest_;
    bool gaps_; ///< pressures may be missing
    Layout layout_;
    CardTrace trace_;
    qint64 line_ = 1;
};

/// Takes one row. @return behind it; null where it is not written plainly
const char* read_plain_row(const char* at, const char* end, const Layout& layout, PlainRow& row)
{
    if (layout.cycles) {
        const auto read = std::from_chars(at, end, row.cycle);
        if (read.ec != std::errc() || read.ptr == end || *read.ptr != layout.separator)
            return nullptr;
        at = read.ptr + 1;
    }
    if (!read_plain_number(at, end, layout.decimal_sign, row.angle) || at == end || *at != layout.separator ||
        std::abs(row.angle) > 360.0)
        return nullptr;
    ++at;
    if (!read_plain_number(at, end, layout.decimal_sign, row.pressure))
        return nullptr;
    if (at != end && *at == '\r')
        ++at;
    if (at == end)
        return at;
    return *at == '\n' ? at + 1 : nullptr;
}

/// Takes the rows that are written as recorders do, up to the first that is not: that one is left to `read_row`, which
/// takes every writing and knows what to say of the others.
void CardText::read_plain_rows()
{
    const char* at = rest_.data();
    const char* const end = at + rest_.size();
    const Layout layout = layout_;
    CardTrace trace = std::move(trace_); // its own, so that nothing is looked up again at every row
    PlainRow row;
    qint64 rows = 0;
    while (at != end) {
        const char* const next = read_plain_row(at, end, layout, row);
        if (!next)
            break;
        at = next;
        ++rows;
        if (layout.cycles)
            trace.cycle.push_back(row.cycle);
        trace.crank_angle_deg.push_back(row.angle);
        trace.pressure_bar.push_back(row.pressure);
    }
    trace_ = std::move(trace);
    line_ += rows;
    rest_.remove_prefix(static_cast<std::size_t>(at - rest_.data()));
}

/// As many rows as the first ones leave room for: counting all line ends would take as long as reading some of them.
void CardText::reserve()
{
    constexpr std::size_t looked_at = 2000; // bytes
    const std::string_view first = rest_.substr(0, looked_at);
    const auto lines = static_cast<std::size_t>(std::count(first.begin(), first.end(), '\n')) + 1;
    const std::size_t rows = rest_.size() / std::max<std::size_t>(first.size() / lines, 4) + 16;
    trace_.crank_angle_deg.reserve(rows);
    trace_.pressure_bar.reserve(rows);
    if (layout_.cycles)
        trace_.cycle.reserve(rows);
}

Done CardText::read_row(std::string_view row)
{
    if (layout_.cycles) {
        const std::string_view field = trimmed(take_field(row, layout_.separator));
        int cycle = 0;
        const auto [end, problem] = std::from_chars(field.data(), field.data() + field.size(), cycle);
        if (problem != std::errc() || end != field.data() + field.size())
            return invalid_input("The cycle " + quoted(field) + " is no whole number.",
                                 "Write the number of the cycle.");
        trace_.cycle.push_back(cycle);
    }
    const auto angle = read_number(take_field(row, layout_.separator));
    if (!angle.has_value())
        return invalid_input("The crank angle is not readable: " + angle.error().what_happened,
                             angle.error().what_to_do);
    if (std::abs(angle.value()) > 360.0)
        return invalid_input(
            "The crank angle " + number_text(angle.value()) + "° is beyond one working cycle.",
            "Write -180 to 180 degrees, or -360 to 360 for a four-stroke; firing dead centre is 0.");
    const auto pressure = gaps_ && is_missing(row) ? Result<double>(std::nan("")) : read_number(row);
    if (!pressure.has_value())
        return invalid_input("The pressure is not readable: " + pressure.error().what_happened,
                             pressure.error().what_to_do);
    trace_.crank_angle_deg.push_back(angle.value());
    trace_.pressure_bar.push_back(pressure.value());
    return done();
}

Result<CardTrace> CardText::read()
{
    if (rest_.starts_with("\xEF\xBB\xBF"))
        rest_.remove_prefix(3);
    const auto layout = read_header(take_text_line(rest_));
    if (!layout)
        return invalid_input("The header line is not one of a card.",
                             "The first line is expected to be crank_angle_deg,pressure_bar or "
                             "cycle,crank_angle_deg,pressure_bar.");
    layout_ = *layout;
    if (layout_.separator == ';' && rest_.substr(0, rest_.find('\n')).find(',') != std::string_view::npos)
        layout_.decimal_sign = ',';
    trace_.gauge = layout_.gauge;
    reserve();
    while (read_plain_rows(), !rest_.empty()) {
        ++line_;
        const std::string_view row = take_text_line(rest_);
        if (!trimmed(row).empty()) {
            BOOST_OUTCOME_TRYV(read_row(row));
        }
    }
    if (trace_.crank_angle_deg.empty())
        return invalid_input("The card has no samples.", "Write one row a sample below the header line.");
    return std::move(trace_);
}

std::string_view as_text(const QByteArray& content)
{
    return {content.constData(), static_cast<std::size_t>(content.size())};
}

} // namespace

Result<QByteArray> card_file_content(const QString& path)
{
    QFile file(path);
    if (const auto problem = open_named(file))
        return *problem;
    if (file.size() > largest_file)
        return invalid_input("\"" + from_qt(path) + "\" is larger than 256 MB, which no card is.",
                             "Choose the file of one cylinder's card.");
    return file.readAll();
}

Result<CardTrace> read_card_text(std::string_view text, const std::string& name)
{
    CardText card(text);
    auto trace = card.read();
    if (trace)
        return trace;
    Problem problem = trace.error();
    problem.what_happened = name + ", line " + std::to_string(card.line()) + ": " + problem.what_happened;
    return problem;
}

Result<CardTrace> read_card_file(const QString& path, qint64& line)
{
    const auto content = card_file_content(path);
    line = 0;
    if (!content)
        return content.error();
    CardText card(as_text(content.value()));
    auto trace = card.read();
    if (!trace)
        line = card.line();
    return trace;
}

Result<CardTrace> read_card_file(const QString& path)
{
    const auto content = card_file_content(path);
    if (!content)
        return content.error();
    return read_card_text(as_text(content.value()), from_qt(QFileInfo(path).fileName()));
}

Result<CardTrace> read_card_with_gaps(const QString& path)
{
    const auto content = card_file_content(path);
    if (!content)
        return content.error();
    CardText card(as_text(content.value()), true);
    auto trace = card.read();
    if (trace)
        return trace;
    Problem problem = trace.error();
    problem.what_happened =
        from_qt(QFileInfo(path).fileName()) + ", line " + std::to_string(card.line()) + ": " + problem.what_happened;
    return problem;
}

std::string card_text(const CardTrace& trace)
{
    std::string text = trace.cycle.empty() ? "" : "cycle,";
    text += trace.gauge ? "crank_angle_deg,pressure_bar_gauge\n" : "crank_angle_deg,pressure_bar\n";
    for (std::size_t i = 0; i < trace.crank_angle_deg.size(); ++i) {
        if (!trace.cycle.empty())
            text += std::to_string(trace.cycle[i]) + ",";
        text += number_text(trace.crank_angle_deg[i]) + "," + number_text(trace.pressure_bar[i]) + "\n";
    }
    return text;
}

} // namespace evenstroke::storage
