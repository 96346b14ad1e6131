// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/causes/causes_page.h"
#include "app/cards/card_shelf.h"
#include "app/causes/causes_text.h"
#include "core/explanation/cautions.h"
#include "tests/app/invented_judgement.h"
#include "tests/app/page_desk.h"
#include "tests/app/pictures.h"

#include <gtest/gtest.h>

#include <algorithm>

using namespace evenstroke;

namespace {

TEST(CausesText, ACautionStandsBeforeWhatItWarnsOfAndTheLastWordIsNotOurs)
{
    const Explanation explanation = explain(*invented::judgement());
    const auto lines = causes_lines(explanation, {});
    ASSERT_FALSE(lines.empty());
    for (const SubjectExplanation& subject : explanation.subjects)
        for (const Hypothesis& cause : subject.causes) {
            const auto at = std::find_if(lines.begin(), lines.end(), [&](const CausesLine& line) {
                return line.kind == CausesLine::Kind::cause && line.words.contains(QString::fromStdString(cause.what));
            });
            ASSERT_NE(at, lines.end()) << cause.what;
            for (const std::string& name : cause.cautions) {
                const QString caution = QString::fromStdString(find_caution(name)->title);
                const auto reach = at + std::min<std::ptrdiff_t>(lines.end() - at, 1 + static_cast<std::ptrdiff_t>(cause.cautions.size()));
                EXPECT_TRUE(std::any_of(lines.begin(), reach, [&](const CausesLine& line) {
                    return line.kind == CausesLine::Kind::caution && line.words.startsWith(caution);
                })) << cause.what << ", " << name;
            }
        }
    if (!explanation.subjects.empty()) {
        EXPECT_EQ(lines.back().kind, CausesLine::Kind::last);
    }
}

using CausesDesk = test::PageDesk;

TEST_F(CausesDesk, ShowsTheNewestReadingInWordsAndCopiesThem)
{
    open(14);
    CausesPage page(*workplace_);
    page.resize(1180, 640);
    page.refresh();
    page.show();
    EXPECT_TRUE(page.can_print());
    EXPECT_FALSE(page.text().isEmpty());
    keep_picture(page, QStringLiteral("causes"));
}

} // namespace
