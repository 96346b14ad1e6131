// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/plain_text.h"
#include "core/reading/reading.h"

#include <array>
#include <cstdint>

namespace evenstroke {
namespace {

using namespace std::chrono;

constexpr int first_year = 1900, last_year = 2200;       // beyond, a year is a slip of typing
constexpr int west_most = -12 * 60, east_most = 14 * 60; // minutes; the offsets in use on earth
constexpr std::string_view month_names[] = {"Jan", "Feb", "Mar", "Apr", "May", "Jun",
                                            "Jul", "Aug", "Sep", "Oct", "Nov", "Dec"};

/// What is the matter with a text that is no time. `none` keeps the good path free of strings.
enum class Fault : unsigned char {
    none,
    other_writing,
    no_time,
    no_zone,
    no_such_date,
    no_such_year,
    no_such_clock,
    no_such_offset
};

/// Reads a text from left to right; every step says whether it found what it wanted.
class Scanner
{
public:
    explicit Scanner(std::string_view text) : rest_(text) {}

    bool at_end() const { return rest_.empty(); }

    bool take(std::string_view wanted)
    {
        const bool found = rest_.starts_with(wanted);
        rest_.remove_prefix(found ? wanted.size() : 0);
        return found;
    }

    /// Exactly `digits` digits.
    bool take_number(std::size_t digits, int& number)
    {
        if (rest_.size() < digits) {
            return false;
        }
        number = 0;
        for (std::size_t index = 0; index < digits; ++index) {
            if (!is_digit(rest_[index])) {
                return false;
            }
            number = 10 * number + (rest_[index] - '0');
        }
        rest_.remove_prefix(digits);
        return true;
    }

    bool next_is_digit() const { return !rest_.empty() && is_digit(rest_.front()); }

    void skip_digits()
    {
        while (next_is_digit()) {
            rest_.remove_prefix(1);
        }
    }

private:
    static bool is_digit(char character) { return character >= '0' && character <= '9'; }

    std::string_view rest_;
};

Fault scan_date(Scanner& scanner, sys_days& day)
{
    int year_number = 0, month_number = 0, day_number = 0;
    if (!(scanner.take_number(4, year_number) && scanner.take("-") && scanner.take_number(2, month_number) &&
          scanner.take("-") && scanner.take_number(2, day_number)) ||
        scanner.next_is_digit()) {
        return Fault::other_writing;
    }
    const year_month_day date{year(year_number), month(static_cast<unsigned>(month_number)),
                              std::chrono::day(static_cast<unsigned>(day_number))};
    if (!date.ok()) {
        return Fault::no_such_date;
    }
    if (year_number < first_year || year_number > last_year) {
        return Fault::no_such_year;
    }
    day = sys_days(date);
    return Fault::none;
}

Fault scan_clock(Scanner& scanner, seconds& since_midnight)
{
    int hour = 0, minute = 0, second = 0;
    if (!(scanner.take_number(2, hour) && scanner.take(":") && scanner.take_number(2, minute))) {
        return Fault::other_writing;
    }
    if (scanner.take(":")) {
        if (!scanner.take_number(2, second)) {
            return Fault::other_writing;
        }
        if (scanner.take(".") || scanner.take(",")) { // parts of a second are cut off
            if (!scanner.next_is_digit()) {
                return Fault::other_writing;
            }
            scanner.skip_digits();
        }
    }
    if (hour > 23 || minute > 59 || second > 59) {
        return Fault::no_such_clock;
    }
    since_midnight = hours(hour) + minutes(minute) + seconds(second);
    return Fault::none;
}

Fault scan_zone(Scanner& scanner, int& offset_minutes)
{
    if (scanner.take("Z") || scanner.take("z")) {
        offset_minutes = 0;
        return Fault::none;
    }
    const bool west = scanner.take("-") || scanner.take("\u2212"); // the typographic minus is ISO 8601's own
    if (!west && !scanner.take("+")) {
        return scanner.at_end() ? Fault::no_zone : Fault::other_writing;
    }
    int hour = 0, minute = 0;
    if (!scanner.take_number(2, hour)) {
        return Fault::other_writing;
    }
    if ((scanner.take(":") || !scanner.at_end()) && !scanner.take_number(2, minute)) {
        return Fault::other_writing;
    }
    offset_minutes = (west ? -1 : 1) * (60 * hour + minute);
    const bool known = minute < 60 && offset_minutes >= west_most && offset_minutes <= east_most;
    return known ? Fault::none : Fault::no_such_offset;
}

/// The whole of it: date, time, zone, and nothing behind.
Fault scan_time(std::string_view text, StampedTime& stamped, bool& date_only)
{
    Scanner scanner(text);
    sys_days day;
    date_only = false;
    if (const Fault fault = scan_date(scanner, day); fault != Fault::none) {
        return fault;
    }
    if (scanner.at_end()) {
        date_only = true;
        stamped = {day, 0};
        return Fault::none;
    }
    if (!(scanner.take("T") || scanner.take("t") || scanner.take(" "))) {
        return Fault::other_writing;
    }
    seconds since_midnight{};
    if (const Fault fault = scan_clock(scanner, since_midnight); fault != Fault::none) {
        return fault;
    }
    int offset_minutes = 0;
    if (const Fault fault = scan_zone(scanner, offset_minutes); fault != Fault::none) {
        return fault;
    }
    stamped = {day + since_midnight - minutes(offset_minutes), offset_minutes};
    return scanner.at_end() ? Fault::none : Fault::other_writing;
}

Problem refused(Fault fault, std::string_view text, bool date_will_do)
{
    const std::string it = quoted(text);
    const std::string example =
        date_will_do ? "Write it as 2026-03-14."
                     : "Write it as 2026-03-14T06:30Z or with the ship's offset, 2026-03-14T08:30+02:00.";
    switch (fault) {
    case Fault::no_time:
        return invalid_input(it + " is a date without time and zone.", example);
    case Fault::no_zone:
        return invalid_input(it + " does not say which clock it was read from.",
                             "Add Z for UTC or the ship's offset, such as +02:00.");
    case Fault::no_such_date:
        return invalid_input(it + " has a day that is not in the calendar.",
                             "Check day and month; "
                             "the order is year, month, day.");
    case Fault::no_such_year:
        return invalid_input(it + " lies outside the years 1900 to 2200.", "Check the year.");
    case Fault::no_such_clock:
        return invalid_input(it + " has a time that no clock shows.",
                             "Write hours from 00 to 23 and minutes and seconds from 00 to 59.");
    case Fault::no_such_offset:
        return invalid_input(it + " has an offset from UTC that no zone has.",
                             "Write an offset from -12:00 to +14:00.");
    case Fault::none:
    case Fault::other_writing:
        break;
    }
    if (text.empty()) {
        return invalid_input(date_will_do ? "There is no date." : "There is no date and time.", example);
    }
    return invalid_input(it + (date_will_do ? " is not a date this program reads."
                                            : " is not a date and time this program reads."),
                         example);
}

void append_two(std::string& text, unsigned number)
{
    text += static_cast<char>('0' + number / 10 % 10);
    text += static_cast<char>('0' + number % 10);
}

year_month_day date_of(TimePoint time)
{
    return year_month_day(floor<days>(time));
}

std::string year_text(year_month_day date)
{
    std::string digits = std::to_string(int(date.year()));
    return std::string(digits.size() < 4 ? 4 - digits.size() : 0, '0') + digits;
}

} // namespace

Result<StampedTime> parse_time(std::string_view text)
{
    const std::string_view written = trimmed(text);
    StampedTime stamped;
    bool date_only = false;
    Fault fault = scan_time(written, stamped, date_only);
    if (fault == Fault::none && date_only) {
        fault = Fault::no_time;
    }
    if (fault != Fault::none) {
        return refused(fault, written, false);
    }
    return stamped;
}

Result<StampedTime> parse_date(std::string_view text)
{
    const std::string_view written = trimmed(text);
    StampedTime stamped;
    bool date_only = false;
    if (const Fault fault = scan_time(written, stamped, date_only); fault != Fault::none) {
        return refused(fault, written, true);
    }
    return stamped;
}

std::string utc_text(TimePoint time)
{
    const hh_mm_ss clock(floor<minutes>(time) - floor<days>(time));
    std::string text = date_text(time) + "T";
    append_two(text, static_cast<unsigned>(clock.hours().count()));
    text += ':';
    append_two(text, static_cast<unsigned>(clock.minutes().count()));
    return text + "Z";
}

std::string date_text(TimePoint time)
{
    const year_month_day date = date_of(time);
    std::string text = year_text(date) + "-";
    append_two(text, unsigned(date.month()));
    text += '-';
    append_two(text, unsigned(date.day()));
    return text;
}

std::string short_date(TimePoint time)
{
    const year_month_day date = date_of(time);
    return std::to_string(unsigned(date.day())) + " " + std::string(month_names[unsigned(date.month()) - 1]) +
           " " + year_text(date);
}

} // namespace evenstroke
