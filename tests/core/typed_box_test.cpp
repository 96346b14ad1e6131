// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/reading/typed_box.h"

#include <gtest/gtest.h>

using namespace evenstroke;

namespace {

LogBox box(std::string_view name, Place place = Place::engine())
{
    return {*find_quantity(name, place.kind), place, Phase::reading};
}
LogBox scavenge()
{
    return box("scavenge_pressure");
}

Result<Value> read(const LogBox& where, std::string_view text)
{
    return read_box(where, text, own_unit(where.quantity));
}

TEST(TypedBox, TakesDecimalCommaAndPointAndKeepsTheText)
{
    for (const char* text : {"2.95", "2,95", " 2,95 "}) {
        const Value value = read(scavenge(), text).value();
        EXPECT_DOUBLE_EQ(*value.number, 2.95);
        EXPECT_DOUBLE_EQ(*value.value_si, 2.95e5);
        EXPECT_EQ(value.typed, text[1] == '.' ? "2.95" : "2,95");
    }
}

TEST(TypedBox, TakesAUnitWrittenBehindTheNumber)
{
    const Value value = read(scavenge(), "3,0 kgf/cm2").value();
    EXPECT_EQ(value.typed, "3,0");
    EXPECT_DOUBLE_EQ(*value.value_si, 3.0 * 98066.5); // 1 kgf/cm² = 98 066.5 Pa exactly
    EXPECT_EQ(value.kind, PressureKind::gauge) << "of the quantity's kind where the text does not say";
    EXPECT_EQ(box_text(value, own_unit(value.quantity)), "3,0 kgf/cm²");
    const Value absolute = read(scavenge(), "3.95 bar abs").value();
    EXPECT_EQ(absolute.kind, PressureKind::absolute);
    EXPECT_EQ(box_text(absolute, own_unit(absolute.quantity)), "3.95 bar abs");
}

TEST(TypedBox, TakesTheRowsUnitAndKind)
{
    const WrittenUnit row = find_unit("MPa abs").value();
    const Value value = read_box(scavenge(), "0.39", row).value();
    EXPECT_DOUBLE_EQ(*value.value_si, 0.39e6);
    EXPECT_EQ(value.kind, PressureKind::absolute);
    EXPECT_EQ(box_text(value, row), "0.39");
}

TEST(TypedBox, RefusesAUnitThatMeasuresSomethingElse)
{
    const auto refused = read(scavenge(), "38 °C");
    ASSERT_FALSE(refused.has_value());
    EXPECT_NE(refused.error().what_happened.find("scavenge pressure"), std::string::npos)
        << refused.error().text();
    EXPECT_FALSE(refused.error().what_to_do.empty());
}

TEST(TypedBox, RefusesWhatIsNoNumberAndWhatIsBelowAbsoluteZero)
{
    for (const char* text : {"abc", "12..5", "1.234.567", "--"})
        EXPECT_FALSE(read(box("load_percent"), text).has_value()) << text;
    EXPECT_FALSE(read(box("exhaust_temperature", Place::cylinder(1)), "-300").has_value());
    EXPECT_FALSE(read(scavenge(), "-0.1 bar abs").has_value());
}

TEST(TypedBox, KeepsImpossibleNumbersAsTyped)
{
    EXPECT_TRUE(read(box("exhaust_temperature", Place::cylinder(1)), "4120").has_value());
}

TEST(TypedBox, AnEmptyTextEmptiesTheBox)
{
    const Value value = read(scavenge(), "  ").value();
    EXPECT_FALSE(value.number);
    EXPECT_EQ(value.missing, MissingReason::none);
    EXPECT_EQ(box_text(value, own_unit(value.quantity)), "");
}

TEST(TypedBox, TakesReasonsInWords)
{
    EXPECT_EQ(read(scavenge(), "not fitted").value().missing, MissingReason::not_fitted);
    EXPECT_EQ(read(scavenge(), "Not read").value().missing, MissingReason::not_read);
    EXPECT_EQ(read(scavenge(), "out of order").value().missing, MissingReason::out_of_order);
    EXPECT_FALSE(read(scavenge(), "out of order").value().value_si);
}

TEST(TypedBox, TakesShortenedChoicesThatMeanOne)
{
    EXPECT_EQ(read(box("power_source"), "tors").value().words, "torsion_meter");
    EXPECT_EQ(read(box("power_source"), "Torsion meter").value().words, "torsion_meter");
    EXPECT_EQ(box_text(read(box("power_source"), "tors").value(), own_unit(box("power_source").quantity)),
              "torsion meter");
    const auto two = read(box("power_source"), "t"); // torsion meter, turbocharger speed, typed
    ASSERT_FALSE(two.has_value());
    EXPECT_NE(two.error().what_to_do.find("turbocharger speed"), std::string::npos);
    EXPECT_EQ(read(box("auxiliary_blower_running"), "y").value().words, "yes");
    EXPECT_EQ(read(box("auxiliary_blower_running"), "off").value().words, "no");
    EXPECT_FALSE(read(box("auxiliary_blower_running"), "perhaps").has_value());
}

TEST(TypedBox, TakesPositionsInDegreesAndMinutes)
{
    // 34.5 / 60 = 0.575
    const LogBox latitude = box("latitude", {Place::Kind::ship, 0});
    EXPECT_NEAR(*read(latitude, "12 34.5 S").value().number, -12.575, 1e-9);
    EXPECT_NEAR(*read(latitude, "12°34,5'N").value().number, 12.575, 1e-9);
    EXPECT_NEAR(*read(latitude, "-12.575").value().number, -12.575, 1e-9);
    EXPECT_FALSE(read(latitude, "12 64.5 S").has_value());
}

TEST(TypedBox, ShowsOwnNumbersInTheRowsUnit)
{
    const QuantityId id = scavenge().quantity;
    EXPECT_NEAR(*in_row_unit(id, 2.0, find_unit("MPa").value(), {}), 0.2, 1e-12);
    EXPECT_NEAR(*in_row_unit(id, 2.0, find_unit("bar abs").value(), bar_absolute(1.01)), 3.01, 1e-12);
    EXPECT_FALSE(in_row_unit(id, 2.0, find_unit("bar abs").value(), {})) << "the barometer is not known";
    EXPECT_NEAR(*in_row_unit(box("scavenge_temperature").quantity, 100, find_unit("degF").value(), {}), 212,
                1e-9);
}

TEST(TypedBox, OffersUnitsThatMeasureTheSame)
{
    const auto units = possible_units(scavenge().quantity);
    EXPECT_EQ(unit(units.front().id).symbol, "bar");
    bool absolute = false;
    for (const WrittenUnit& written : units) {
        EXPECT_EQ(unit(written.id).dimension, Dimension::pressure);
        absolute = absolute || written.kind == PressureKind::absolute;
    }
    EXPECT_TRUE(absolute);
    EXPECT_EQ(possible_units(box("power_source").quantity).size(), 1u);
}

} // namespace
