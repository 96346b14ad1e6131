// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/reading/reading.h"
#include "core/units/unit_catalogue.h"

#include <cmath>
#include <gtest/gtest.h>
#include <iterator>
#include <random>

namespace evenstroke {
namespace {

/// Texts out of pieces that numbers, units and times are made of, with raw bytes in between. The same seed
/// gives the same texts, so that a finding can be repeated.
class TextMaker
{
public:
    explicit TextMaker(std::uint32_t seed) : random_(seed) {}

    std::string next()
    {
        if (pick(8) == 0)
            return next_time();
        std::string text;
        const std::size_t pieces = pick(9);
        for (std::size_t piece = 0; piece < pieces; ++piece) {
            switch (pick(4)) {
            case 0:
                text += std::to_string(pick(2000));
                break;
            case 1:
                text += static_cast<char>(pick(256));
                break;
            case 2: {
                const Unit& unit_of_catalogue = all_units()[pick(all_units().size())];
                text += unit_of_catalogue.symbol.substr(0, 1 + pick(unit_of_catalogue.symbol.size()));
                break;
            }
            default:
                text += fragments[pick(std::size(fragments))];
                break;
            }
        }
        if (pick(50) == 0)
            text += std::string(pick(5000), text.empty() ? '7' : text.back());
        return text;
    }

private:
    static constexpr std::string_view fragments[] = {".",
                                                     ",",
                                                     "-",
                                                     "+",
                                                     "e",
                                                     "E",
                                                     "\u2212",
                                                     "\u2013",
                                                     " ",
                                                     "\u00A0",
                                                     "\u202F",
                                                     "nan",
                                                     "inf",
                                                     "0x",
                                                     "1e99",
                                                     "e-999",
                                                     "NaN",
                                                     "abs",
                                                     "gauge",
                                                     "(a)",
                                                     "²",
                                                     "³",
                                                     "·",
                                                     "°",
                                                     "/",
                                                     "1/",
                                                     "T",
                                                     "Z",
                                                     ":",
                                                     "+02:00",
                                                     "2026-03-14",
                                                     "06:30",
                                                     "2026-03-14T06:30",
                                                     "-",
                                                     "00",
                                                     "\t",
                                                     "\xC2",
                                                     "%",
                                                     "24h",
                                                     "\xE2\x80",
                                                     "\xF0\x9F",
                                                     "infinity",
                                                     "1.234.567",
                                                     "99999999999999999999"};

    /// Date, clock and zone, each of them mostly sound.
    std::string next_time()
    {
        constexpr std::string_view dates[] = {"2026-03-14", "1899-12-31", "2024-02-29",
                                              "2026-02-29", "2026-3-14",  ""};
        constexpr std::string_view marks[] = {"T", "T", " ", "t", "", "TT"};
        constexpr std::string_view clocks[] = {"06:30", "06:30:15", "24:00", "06:30:15.5", "6:30", "06:", ""};
        constexpr std::string_view zones[] = {"Z",
                                              "+02:00",
                                              "-0530",
                                              "+14",
                                              "+15:00",
                                              "\u2212"
                                              "03:00",
                                              "UTC",
                                              ""};
        std::string text(dates[pick(std::size(dates))]);
        if (pick(4) == 0)
            return text;
        text += marks[pick(std::size(marks))];
        text += clocks[pick(std::size(clocks))];
        return text += zones[pick(std::size(zones))];
    }

    std::size_t pick(std::size_t count) { return random_() % count; }

    std::mt19937 random_;
};

bool is_sound(const Problem& problem)
{
    return problem.kind == Problem::Kind::invalid_input && !problem.what_happened.empty() &&
           !problem.what_to_do.empty() && problem.text().size() < 600;
}

TEST(TypedTextFuzz, NeverTakesNanOrInfinityAndAlwaysSaysWhy)
{
    int numbers = 0, units = 0, values = 0, times = 0;
    for (std::uint32_t seed = 1; seed <= 10; ++seed) {
        TextMaker maker(seed);
        for (int trial = 0; trial < 10000; ++trial) {
            const std::string text = maker.next();
            const auto number = parse_number(text);
            ASSERT_TRUE(number ? std::isfinite(number.value()) : is_sound(number.error())) << text;
            const auto written = find_unit(text);
            ASSERT_TRUE(written ? written.value().id < static_cast<UnitId>(all_units().size())
                                : is_sound(written.error()))
                << text;
            const auto value = parse_typed_value(text);
            ASSERT_TRUE(value ? std::isfinite(value.value().value_si) && std::isfinite(value.value().number)
                              : is_sound(value.error()))
                << text;
            const auto time = parse_time(text);
            ASSERT_TRUE(time ? std::abs(time.value().offset_minutes) <= 14 * 60 : is_sound(time.error()))
                << text;
            const auto date = parse_date(text);
            ASSERT_TRUE(date || is_sound(date.error())) << text;
            numbers += number ? 1 : 0;
            units += written ? 1 : 0;
            values += value ? 1 : 0;
            times += date ? 1 : 0;
        }
    }
    // The texts are of use only if some of each kind are taken.
    EXPECT_GT(numbers, 1000);
    EXPECT_GT(units, 1000);
    EXPECT_GT(values, 100);
    EXPECT_GT(times, 1000);
}

/// A good text with one character lost, doubled, exchanged or replaced must be taken as a finite value or
/// refused.
TEST(TypedTextFuzz, SurvivesEverySingleSlipOnGoodTexts)
{
    const std::string_view good[] = {"7,5 kgf/cm2", "0.85 MPa", "112 bar abs",
                                     "385 °C",      "725 F",    "180 mmH2O",
                                     "1.2 t/h",     "98 1/min", "2026-03-14T08:30:00+02:00"};
    for (const std::string_view text : good) {
        for (std::size_t position = 0; position < text.size(); ++position) {
            for (int byte = 0; byte < 256; ++byte) {
                std::string replaced(text), inserted(text), lost(text);
                replaced[position] = static_cast<char>(byte);
                inserted.insert(position, 1, static_cast<char>(byte));
                lost.erase(position, 1);
                for (const std::string& slip : {replaced, inserted, lost}) {
                    const auto value = parse_typed_value(slip);
                    ASSERT_TRUE(value ? std::isfinite(value.value().value_si) : is_sound(value.error()))
                        << slip;
                    const auto time = parse_time(slip);
                    ASSERT_TRUE(time || is_sound(time.error())) << slip;
                }
            }
        }
    }
}

} // namespace
} // namespace evenstroke
