// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/desk/number_text.h"
#include "app/detection/detection_page.h"
#include "app/detection/detection_text.h"
#include "tests/app/pictures.h"
#include "tests/app/page_desk.h"

#include <gtest/gtest.h>

#include <QClipboard>

using namespace evenstroke;

namespace {

using DetectionDesk = test::PageDesk;

TEST_F(DetectionDesk, MeasuresOnAWorkerAndStopsWhenAsked)
{
    open(14);
    DetectionPage page(*workplace_);
    page.resize(1180, 640);
    page.refresh();
    page.show();
    EXPECT_TRUE(page.text().alarms.empty()) << "nothing was measured yet";
    page.measure({3, 1, 7});
    EXPECT_TRUE(page.busy());
    ASSERT_TRUE(QTest::qWaitFor([&] { return !page.busy(); }, 60000));
    EXPECT_EQ(page.text().alarms.size(), 2u);
    EXPECT_FALSE(page.text().faults.empty());
    keep_picture(page, QStringLiteral("detection"));
    page.copy();
    EXPECT_TRUE(QGuiApplication::clipboard()->text().contains(page.text().faults.front().what));
    page.measure({100'000, 1, 7});
    QTest::keyClick(page.first_focus(), Qt::Key_Escape);
    EXPECT_FALSE(page.busy());
    EXPECT_EQ(page.text().alarms.size(), 2u) << "what was measured before stays";
}

} // namespace

TEST(DetectionText, SaysWhatWasMeasuredAndWhatSilenceMeans)
{
    simulation::Likeness likeness;
    likeness.cylinders = 6;
    likeness.readings = 46;
    simulation::DetectionPower power;
    power.engine_years = 500.0;
    power.false_flags = 60;
    power.false_a_year = {0.09, 0.15};
    power.faults = {{simulation::Fault::fast_ring_wear, 40, 40, {0.91, 1.0}, 6},
                    {simulation::Fault::slow_ring_wear, 40, 28, {0.53, 0.83}, 0}};
    const DetectionText text = detection_text(QStringLiteral("main engine"), likeness, power);
    EXPECT_TRUE(text.engine.contains(QStringLiteral("46"))) << text.engine.toStdString();
    ASSERT_EQ(text.alarms.size(), 2u);
    EXPECT_TRUE(text.alarms.front().measured.contains(number_text(0.12, 2)));
    ASSERT_EQ(text.faults.size(), 2u);
    EXPECT_TRUE(text.faults.back().measured.contains(QStringLiteral("28 of 40")));
    EXPECT_TRUE(text.faults.back().half_found.contains(QStringLiteral("never")));
    EXPECT_TRUE(text.meaning.contains(QStringLiteral("against fast ring wear"))) << text.meaning.toStdString();
    EXPECT_TRUE(text.meaning.contains(QStringLiteral("little of slow ring wear"))) << text.meaning.toStdString();
    EXPECT_TRUE(detection_plain(text).contains(QStringLiteral("invented")));
}

TEST(DetectionText, BeforeMeasuringNothingIsClaimed)
{
    const DetectionText text = detection_text(QStringLiteral("main engine"), {}, std::nullopt);
    EXPECT_TRUE(text.alarms.empty());
    EXPECT_TRUE(text.faults.empty());
    EXPECT_TRUE(text.meaning.isEmpty());
}
