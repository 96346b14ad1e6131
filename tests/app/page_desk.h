// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "app/desk/workplace.h"
#include "storage/history.h"
#include "tests/app/entry_history.h"

#include <gtest/gtest.h>

#include <QApplication>
#include <QTemporaryDir>
#include <QTest>

#include <memory>

namespace evenstroke::test {

/// A workplace on a history in a file, looking at the main engine of the invented ship.
class PageDesk : public testing::Test
{
protected:
    void open(int readings)
    {
        write_entry_history(file(), readings);
        workplace_ = std::make_unique<Workplace>();
        const auto problem = workplace_->open(file());
        ASSERT_FALSE(problem.has_value()) << problem->text();
        for (const VesselChoice& vessel : workplace_->vessels())
            for (const EngineChoice& engine : vessel.engines)
                if (engine.name == QLatin1String("main engine")) {
                    Selection selection;
                    selection.vessel = vessel.id;
                    selection.engine = engine.id;
                    workplace_->select(selection);
                }
        ASSERT_TRUE(QTest::qWaitFor([&] { return workplace_->judgement() && !workplace_->judging(engine()); }, 20000));
    }
    QString file() const { return folder_.filePath(QStringLiteral("ship.evenstroke")); }
    QString engine() const { return workplace_->selection().engine; }

    template <typename PageType>
    std::unique_ptr<PageType> make_page()
    {
        auto page = std::make_unique<PageType>(*workplace_);
        page->resize(1190, 660);
        page->refresh();
        page->show();
        QApplication::setActiveWindow(page.get());
        QApplication::processEvents();
        return page;
    }

    QTemporaryDir folder_;
    std::unique_ptr<Workplace> workplace_;
};

} // namespace evenstroke::test
