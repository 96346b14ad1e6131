// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/plain_text.h"
#include "core/units/unit_list.h"

#include <algorithm>
#include <array>

namespace evenstroke {
namespace {

using unit_list::no_unit;

struct Replacement
{
    std::string_view written, plain;
};

/// Typographic forms and look-alikes, and the plain form the catalogue knows.
constexpr Replacement replacements[] = {
    {"°", "deg"},  {"º", "deg"},  {"˚", "deg"},                 // degree, masculine ordinal, ring above
    {"℃", "degC"}, {"℉", "degF"}, {"\u212A", "K"}, {"％", "%"}, // single characters for a whole unit
    {"²", "2"},    {"³", "3"},    {"¹", "1"},      {"⁻", "-"},      {"₂", "2"}, // superscripts, subscripts
    {"·", ""},     {"⋅", ""},     {"∙", ""},       {"•", ""},                   // multiplication dots
    {"−", "-"},    {"–", "-"},    {"‐", "-"},      {"\u2011", "-"},             // minus, en dash, hyphens
    {"∕", "/"},    {"⁄", "/"},                                                  // division and fraction slash
};

/// A unit's text in plain ASCII without blanks, in a place of fixed size.
class PlainUnit
{
public:
    explicit PlainUnit(std::string_view text)
    {
        for (std::size_t position = 0; position < text.size() && fits_;) {
            position += take(text, position);
        }
    }
    bool fits() const { return fits_; }
    std::string_view text() const { return {letters_.data(), size_}; }

private:
    /// Takes one character (or blank) and says how many bytes it had.
    std::size_t take(std::string_view text, std::size_t position)
    {
        const char letter = text[position];
        if (static_cast<unsigned char>(letter) < 0x80) {
            const bool dropped = letter == '*' || letter == '^' ||
                                 letter == '.' || // kN*m, cm^2, "kN.m", "deg."
                                 blank_length(text.substr(0, position + 1), position) != 0;
            if (!dropped) {
                append({&letter, 1});
            }
            return 1;
        }
        for (const Replacement& replacement : replacements) {
            if (text.substr(position, replacement.written.size()) == replacement.written) {
                append(replacement.plain);
                return replacement.written.size();
            }
        }
        const std::size_t blank = blank_length(text, position);
        if (blank == 0) {
            append({&letter, 1}); // kept, so that the text stays unknown
        }
        return blank == 0 ? 1 : blank;
    }

    void append(std::string_view plain)
    {
        fits_ = size_ + plain.size() <= letters_.size();
        if (fits_) {
            std::copy(plain.begin(), plain.end(), letters_.begin() + static_cast<std::ptrdiff_t>(size_));
            size_ += plain.size();
        }
    }

    std::array<char, 31> letters_{}; // the longest spelling has 8
    std::size_t size_ = 0;
    bool fits_ = true;
};

struct KindEnding
{
    std::string_view text;
    PressureKind kind;
    bool word; ///< says without doubt that a kind is meant
};

/// Longer endings first, so that "(abs)" is not taken for "abs" behind a bracket.
constexpr KindEnding kind_endings[] = {
    {"(absolute)", PressureKind::absolute, true}, {"absolute", PressureKind::absolute, true},
    {"(abs)", PressureKind::absolute, true},      {"abs", PressureKind::absolute, true},
    {"(gauge)", PressureKind::gauge, true},       {"gauge", PressureKind::gauge, true},
    {"(a)", PressureKind::absolute, false},       {"(g)", PressureKind::gauge, false},
    {"a", PressureKind::absolute, false},         {"g", PressureKind::gauge, false},
};

char lower(char letter)
{
    return letter >= 'A' && letter <= 'Z' ? static_cast<char>(letter + 32) : letter;
}

bool ends_in(std::string_view text, std::string_view ending)
{
    return text.size() >= ending.size() &&
           std::equal(ending.begin(), ending.end(), text.end() - static_cast<std::ptrdiff_t>(ending.size()),
                      [](char wanted, char written) { return wanted == lower(written); });
}

UnitId find_plain(std::string_view text)
{
    const UnitId exact = unit_list::find_exact(text);
    return exact != no_unit ? exact : unit_list::find_other_case(text);
}

std::string symbols_of(Dimension dimension)
{
    std::string list;
    for (const Unit& candidate : all_units()) {
        if (candidate.dimension == dimension) {
            list += list.empty() ? "" : ", ";
            list += candidate.symbol;
        }
    }
    return list;
}

Problem refused(std::string_view text, std::string_view plain)
{
    const UnitId same_letters = unit_list::find_any_case(plain);
    const UnitId near = same_letters != no_unit ? same_letters : unit_list::find_nearest(plain);
    std::string what = "The unit " + quoted(text) + " is not known.";
    if (same_letters != no_unit) {
        what = "The unit " + quoted(text) + " is not known in this mixture of upper and lower case.";
    }
    if (near == no_unit || unit(near).dimension == Dimension::number) {
        return invalid_input(
            std::move(what),
            "Write a unit such as bar, °C, kW, r/min, kg/h or %, or leave it empty for a bare number.");
    }
    const Dimension dimension = unit(near).dimension;
    return invalid_input(std::move(what),
                         "Write " + std::string(unit(near).symbol) + " if that is meant; the units of " +
                             std::string(dimension_text(dimension)) + " are " + symbols_of(dimension) + ".");
}

Problem refused_kind(std::string_view text, UnitId found)
{
    return invalid_input("The unit " + quoted(text) +
                             " says gauge or absolute, and only pressures have that.",
                         unit(found).dimension == Dimension::number
                             ? "Write the unit of pressure before it, such as \"bar abs\"."
                             : "Write " + std::string(unit(found).symbol) + " alone.");
}

} // namespace

Result<WrittenUnit> find_unit(std::string_view text)
{
    if (const UnitId as_listed = unit_list::find_exact(text); as_listed != no_unit) {
        return WrittenUnit{as_listed, PressureKind::none}; // nearly every row of a file ends here
    }
    const PlainUnit plain_unit(text);
    if (!plain_unit.fits()) {
        return refused(text, {});
    }
    const std::string_view plain = plain_unit.text();
    if (const UnitId whole = find_plain(plain); whole != no_unit) {
        return WrittenUnit{whole, PressureKind::none};
    }
    for (const KindEnding& ending : kind_endings) {
        if (!ends_in(plain, ending.text)) {
            continue;
        }
        const UnitId found = find_plain(plain.substr(0, plain.size() - ending.text.size()));
        if (found != no_unit && unit(found).dimension == Dimension::pressure) {
            return WrittenUnit{found, ending.kind};
        }
        if (found != no_unit && ending.word) {
            return refused_kind(text, found);
        }
    }
    return refused(text, plain);
}

} // namespace evenstroke
