// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/reading/reading.h"
#include "core/trend/judgement.h"

#include <optional>
#include <string>
#include <variant>
#include <vector>

/// What a printed page is made of, as plain data: whoever draws it decides fonts and places, never words or
/// numbers. All text is UTF-8 and already rounded.
namespace evenstroke::report {

struct Paragraph
{
    enum class Style { body, strong, muted, boxed };
    std::string text;
    Style style = Style::body;
};

/// Stands in a paragraph for ", page 3": the page on which the section of that title begins, which only who lays the
/// pages out can know. Nothing is printed where there is no such section.
std::string page_reference(const std::string& section_title);
/// The text with `words_for(title)` in place of each reference.
template <typename WordsFor>
std::string with_page_references(std::string text, WordsFor words_for)
{
    constexpr char open = '\x01', close = '\x02';
    for (std::size_t begin = text.find(open); begin != std::string::npos; begin = text.find(open, begin)) {
        const std::size_t end = text.find(close, begin);
        if (end == std::string::npos)
            break;
        text.replace(begin, end - begin + 1, words_for(text.substr(begin + 1, end - begin - 1)));
    }
    return text;
}

/// A small heading inside a section; kept together with what follows.
struct Heading
{
    std::string text;
};

/// Names and values. Short ones may stand in two columns beside each other.
struct FieldList
{
    struct Field
    {
        std::string name, value;
    };
    std::vector<Field> fields;
    bool short_ones = false;
};

struct Column
{
    enum class Kind { words, number, remark }; ///< a remark is wide and may wrap
    std::string title;
    Kind kind = Kind::words;
};

struct Row
{
    std::vector<std::string> cells;
    bool starts_group = true; ///< a rule is drawn above it
};

struct Table
{
    std::string caption;
    std::vector<Column> columns;
    std::vector<Row> rows;
    int key_columns = 1; ///< repeated where a table is too wide for one page and is cut
    std::string note;
};

struct PlotPoint
{
    enum class Mark { filled, hollow, crossed };
    double across = 0.0; ///< seconds since 1970 UTC, load in per cent, or degrees after firing dead centre
    double value = 0.0;
    Mark mark = Mark::filled;
};

struct PlotLine
{
    std::string label;
    std::vector<PlotPoint> points;
    bool in_question = false; ///< drawn strong and labelled; the others are quiet
    bool points_only = false;
    bool without_marks = false; ///< a curve of many points
};

/// A curve over time, load or crank angle with what belongs to it.
struct Plot
{
    enum class Across { time, load, angle };
    struct At
    {
        double across = 0.0;
        std::string text;
    };
    struct Limit
    {
        double value = 0.0;
        std::string text;
    };
    struct Band
    {
        double low = 0.0, high = 0.0;
        std::string text;
    };
    struct FlagMark
    {
        double across = 0.0, value = 0.0;
        Level level = Level::watch;
    };
    struct Stretch
    {
        double from = 0.0, to = 0.0;
    };

    Across across = Across::time;
    std::string title, value_title; ///< "Compression pressure", "bar, apart from the other cylinders"
    double from = 0.0, to = 0.0;    ///< the period, so that plots of one report stand under each other
    std::vector<PlotLine> lines;
    std::vector<At> events;
    std::vector<Limit> limits;
    std::optional<Band> band;
    std::vector<FlagMark> flags;
    std::vector<Stretch> learning;  ///< hatched: no flag is possible there yet
    bool from_zero = false;         ///< the scale shows zero
};

/// Small multiples: one column a cylinder, one row a quantity.
struct Strips
{
    struct Cell
    {
        PlotLine line;
        std::optional<Plot::Band> band;
        Level level = Level::no_data;
        std::string newest, remark; ///< "+0.3"; "◐ watch", "learning 4 of 8"
    };
    struct Row
    {
        std::string title, unit;
        std::vector<Cell> cells; ///< one a column
    };
    double from = 0.0, to = 0.0;
    std::vector<std::string> columns;
    std::vector<Row> rows;
};

/// A block to be signed by hand; fields that are empty stay blank for the pen.
struct SignOff
{
    std::string role, statement;
    std::vector<FieldList::Field> fields;
};

using Block = std::variant<Paragraph, Heading, FieldList, Table, Plot, Strips, SignOff>;

struct Section
{
    std::string title;
    bool new_page = false;
    std::vector<Block> blocks;
};

} // namespace evenstroke::report
