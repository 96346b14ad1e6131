// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/explanation/cautions.h"

#include "core/catalogue_table.h"

#include <gtest/gtest.h>
#include <algorithm>
#include <fstream>
#include <sstream>

namespace evenstroke {
namespace {

using Names = std::vector<std::string>;

std::string catalogue_file(const std::string& name)
{
    std::ifstream file(std::string(EVENSTROKE_SOURCE_DIR) + "/resources/catalogue/" + name);
    std::stringstream text;
    text << file.rdbuf();
    return text.str();
}

bool contains(const std::string& text, std::string_view part) { return text.find(part) != std::string::npos; }

TEST(CatalogueTable, ReadsQuotedCellsWithCommasAndDoubledQuotes)
{
    const CatalogueTable table("name,words\na,\"one, \"\"two\"\"\"\r\n\nb,\n");
    ASSERT_EQ(table.rows(), 2u);
    EXPECT_EQ(table.cell(0, "words"), "one, \"two\"");
    EXPECT_EQ(table.cell(1, "words"), "");
    EXPECT_THROW(table.cell(0, "colour"), std::logic_error);
}

TEST(CatalogueTable, RefusesARowOfAnotherLength)
{
    EXPECT_THROW(CatalogueTable("name,words\na\n"), std::logic_error);
}

TEST(CatalogueTable, SplitsListsWithoutBlanks)
{
    EXPECT_EQ(split_list(" a; b b ;;c"), (Names{"a", "b b", "c"}));
    EXPECT_TRUE(split_list("").empty());
}

TEST(Cautions, EveryOneNamesWhoDecides)
{
    ASSERT_GE(all_cautions().size(), 10u);
    for (const Caution& caution : all_cautions()) {
        EXPECT_TRUE(contains(caution.authority, "maker")) << caution.name;
        EXPECT_TRUE(contains(caution.authority, "class society")) << caution.name;
        EXPECT_TRUE(contains(caution.authority, "licensed engineers")) << caution.name;
        EXPECT_FALSE(caution.short_text.empty()) << caution.name;
        EXPECT_GT(caution.long_text.size(), caution.short_text.size()) << caution.name;
    }
}

TEST(Cautions, EmergenciesStandFirst)
{
    bool calm_seen = false;
    for (const Caution& caution : all_cautions()) {
        EXPECT_FALSE(calm_seen && caution.emergency) << caution.name;
        calm_seen = calm_seen || !caution.emergency;
    }
}

TEST(Cautions, CrankcaseAsksForThirtyMinutesBeforeOpening)
{
    const Caution* crankcase = find_caution("crankcase");
    ASSERT_NE(crankcase, nullptr);
    EXPECT_TRUE(contains(crankcase->short_text, "30 minutes"));
    EXPECT_TRUE(contains(crankcase->long_text, "30 minutes"));
}

TEST(Cautions, UnknownNameGivesNothing)
{
    EXPECT_EQ(find_caution("weather"), nullptr);
    EXPECT_TRUE(cautions_for("", "sea_state", true).empty());
}

TEST(Cautions, BlowByOfATwoStrokeWarnsOfTheScavengeSpaceFirst)
{
    const Names names = cautions_for("blow_by", "compression_pressure", true);
    ASSERT_FALSE(names.empty());
    EXPECT_EQ(names.front(), "scavenge_fire");
    EXPECT_EQ(std::count(names.begin(), names.end(), "indicator_cocks"), 1) << "each caution once only";
}

TEST(Cautions, BlowByOfAFourStrokeWarnsOfTheCrankcase)
{
    const Names names = cautions_for("blow_by", "compression_pressure", false);
    ASSERT_FALSE(names.empty());
    EXPECT_EQ(names.front(), "crankcase");
    EXPECT_EQ(std::count(names.begin(), names.end(), "scavenge_fire"), 0);
}

TEST(Cautions, FindingsNameOnlyCautionsThatExist)
{
    const CatalogueTable table(catalogue_file("finding_cautions.csv"));
    ASSERT_GT(table.rows(), 0u);
    for (std::size_t row = 0; row < table.rows(); ++row) {
        const std::string kind = table.cell(row, "kind"), engine_kind = table.cell(row, "engine_kind");
        EXPECT_TRUE(kind == "pattern" || kind == "quantity") << table.cell(row, "finding");
        EXPECT_TRUE(engine_kind == "any" || engine_kind == "two_stroke" || engine_kind == "four_stroke");
        for (const std::string& name : split_list(table.cell(row, "cautions")))
            EXPECT_NE(find_caution(name), nullptr) << table.cell(row, "finding") << ": " << name;
    }
}

} // namespace
} // namespace evenstroke
