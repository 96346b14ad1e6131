// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/sisters/sisters_page.h"
#include "tests/app/page_desk.h"
#include "tests/app/pictures.h"

#include <gtest/gtest.h>

using namespace evenstroke;

namespace {

using SistersDesk = test::PageDesk;

TEST_F(SistersDesk, AnEngineWithoutSistersIsToldSo)
{
    open(4);
    SistersPage page(*workplace_);
    page.resize(1180, 640);
    page.refresh();
    page.show();
    ASSERT_TRUE(QTest::qWaitFor([&] { return !page.busy(); }, 60000));
    EXPECT_TRUE(page.text().isEmpty());
    EXPECT_FALSE(page.can_print()) << "there is no sheet";
    keep_picture(page, QStringLiteral("sisters_none"));
}

} // namespace
