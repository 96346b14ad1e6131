// SPDX-License-Identifier: GPL-3.0-or-later
#include "sample_vessel/calendar.h"

namespace evenstroke::sample {
namespace {

constexpr int first_year = 2022, first_month = 12;

int number_at(std::string_view text, std::size_t from, std::size_t count)
{
    int number = 0;
    for (const char digit : text.substr(from, count))
        number = number * 10 + (digit - '0');
    return number;
}

std::string padded(unsigned number, std::size_t width)
{
    std::string text = std::to_string(number);
    return text.size() < width ? std::string(width - text.size(), '0') + text : text;
}

} // namespace

std::string ShipTime::text() const
{
    const auto local = utc + std::chrono::minutes(offset_minutes);
    const auto date = std::chrono::floor<std::chrono::days>(local);
    const auto minute = static_cast<unsigned>(std::chrono::floor<std::chrono::minutes>(local - date).count());
    const auto shift = static_cast<unsigned>(offset_minutes < 0 ? -offset_minutes : offset_minutes);
    return day_text(date) + "T" + padded(minute / 60, 2) + ":" + padded(minute % 60, 2) +
           (offset_minutes < 0 ? "-" : "+") + padded(shift / 60, 2) + ":" + padded(shift % 60, 2);
}

Day first_day(int month)
{
    const int months = first_month - 1 + month;
    return Day(std::chrono::year(first_year + months / 12) /
               std::chrono::month(static_cast<unsigned>(months % 12 + 1)) / 1);
}

std::string month_name(int month)
{
    return day_text(first_day(month)).substr(0, 7);
}

int month_number(std::string_view name)
{
    return (number_at(name, 0, 4) - first_year) * 12 + number_at(name, 5, 2) - first_month;
}

Day day(std::string_view text)
{
    return Day(std::chrono::year(number_at(text, 0, 4)) /
               std::chrono::month(static_cast<unsigned>(number_at(text, 5, 2))) /
               std::chrono::day(static_cast<unsigned>(number_at(text, 8, 2))));
}

std::string day_text(Day when)
{
    const std::chrono::year_month_day date(when);
    return padded(static_cast<unsigned>(static_cast<int>(date.year())), 4) + "-" +
           padded(static_cast<unsigned>(date.month()), 2) + "-" +
           padded(static_cast<unsigned>(date.day()), 2);
}

double months_between(Day from, std::chrono::sys_seconds to)
{
    constexpr double seconds_a_month = 30.4375 * 86400.0;
    return static_cast<double>((to - std::chrono::sys_seconds(from)).count()) / seconds_a_month;
}

} // namespace evenstroke::sample
