// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/survey/survey_page.h"

#include "app/survey/page_preview.h"
#include "tests/app/page_desk.h"

#include <QFileInfo>
#include <QLabel>
#include <QLineEdit>
#include <QPushButton>
#include <QSignalSpy>

namespace evenstroke {
namespace {

class SurveyDesk : public test::PageDesk
{
protected:
    void SetUp() override
    {
        open(14); // the last on 1 March 2031
        make();
    }
    void make()
    {
        page_ = make_page<SurveyPage>();
        page_->set_today(parse_date("2031-03-14").value().utc);
        page_->refresh();
        wait();
    }
    void wait() { ASSERT_TRUE(QTest::qWaitFor([&] { return !page_->maker().busy(); }, 20000)); }
    template <typename Widget>
    Widget& child(const char* name) { return *page_->findChild<Widget*>(QString::fromLatin1(name)); }
    PagePreview& preview() { return *page_->findChild<PagePreview*>(); }

    std::unique_ptr<SurveyPage> page_;
};

TEST_F(SurveyDesk, PreviewsTheLastTwelveMonths)
{
    ASSERT_NE(page_->maker().layout(), nullptr);
    const SurveyReport& report = *page_->maker().layout()->report;
    EXPECT_EQ(date_text(report.period.from), "2030-03-15");
    EXPECT_EQ(report.summary.asked, 12u);
    EXPECT_EQ(report.ship, "Quiet Barley");
    EXPECT_EQ(report.details.data_hash.size(), 64u);
    EXPECT_GT(preview().pages(), 3);
}

TEST_F(SurveyDesk, KeysTurnThePages)
{
    preview().setFocus();
    QTest::keyClick(&preview(), Qt::Key_PageDown);
    EXPECT_EQ(preview().page(), 1);
    QTest::keyClick(&preview(), Qt::Key_End);
    EXPECT_EQ(preview().page(), preview().pages() - 1);
    QTest::keyClick(&preview(), Qt::Key_PageDown);
    EXPECT_EQ(preview().page(), preview().pages() - 1) << "there is nothing behind the last page";
    QTest::keyClick(&preview(), Qt::Key_Home);
    EXPECT_EQ(preview().page(), 0);
    EXPECT_TRUE(child<QLabel>("page_label").text().startsWith("page 1 of"));
}

TEST_F(SurveyDesk, DepthIsRememberedWithTheEngine)
{
    const int full = preview().pages();
    child<QPushButton>("brief_button").click();
    wait();
    EXPECT_LT(preview().pages(), full);
    make();
    EXPECT_TRUE(child<QPushButton>("brief_button").isChecked());
}

TEST_F(SurveyDesk, FreePeriodNeedsTwoDaysInOrder)
{
    child<QPushButton>("free_button").click();
    child<QLineEdit>("from_field").setText("2031-02-01");
    child<QLineEdit>("to_field").setText("2030-01-01");
    emit child<QLineEdit>("to_field").textEdited({});
    ASSERT_TRUE(QTest::qWaitFor([&] { return child<QLabel>("problem").text().contains("earlier one first"); }, 5000));
}

TEST_F(SurveyDesk, SavesThePdfPageByPage)
{
    QSignalSpy saved(page_.get(), &SurveyPage::saved);
    const QString path = folder_.filePath("report.pdf");
    ASSERT_TRUE(page_->save_pdf(path));
    EXPECT_FALSE(page_->save_pdf(path)) << "one at a time";
    ASSERT_TRUE(saved.wait(20000));
    EXPECT_GT(QFileInfo(path).size(), 10000);
    EXPECT_TRUE(child<QLabel>("saved").text().contains("Saved as"));
}

TEST_F(SurveyDesk, StopLeavesNoFile)
{
    const QString path = folder_.filePath("report.pdf");
    ASSERT_TRUE(page_->save_pdf(path));
    child<QPushButton>("stop_button").click();
    EXPECT_FALSE(page_->saving());
    EXPECT_FALSE(QFileInfo::exists(path));
}

TEST_F(SurveyDesk, PictureIsKept)
{
    const QString folder = qEnvironmentVariable("EVENSTROKE_PICTURES");
    if (folder.isEmpty())
        GTEST_SKIP() << "EVENSTROKE_PICTURES names no folder";
    page_->grab().save(folder + "/survey_page.png");
}

} // namespace
} // namespace evenstroke
