// SPDX-License-Identifier: GPL-3.0-or-later
// Pictures of the entry page on the frame, kept where EVENSTROKE_PICTURES names a folder.
#include "app/desk/frame.h"
#include "app/desk/theme.h"
#include "app/desk/workplace.h"
#include "app/entry/entry_page.h"
#include "app/entry/log_sheet_view.h"
#include "storage/take_in.h"

#include <QApplication>
#include <QFileInfo>
#include <QTemporaryDir>
#include <QTest>
#include <gtest/gtest.h>

#include <cmath>

using namespace evenstroke;

namespace {

QString data_folder()
{
    const QString named = qEnvironmentVariable("EVENSTROKE_CHECK_DATA");
    return named.isEmpty() ? QStringLiteral(EVENSTROKE_SOURCE_DIR "/../shared/data") : named;
}

/// Last month's values as if read again, with a few slips.
void fill(EntryPage& page, const Reading& last)
{
    for (const Value& value : last.values) {
        Value again = value;
        again.confirmed = false;
        if (again.number && *again.number > 20) {
            // As one reads it a month later: a little off, with as many digits.
            const auto point = again.typed.find('.');
            const int decimals =
                point == std::string::npos ? 0 : static_cast<int>(again.typed.size() - point) - 1;
            const double moved =
                *again.number * (1.0 + 0.004 * std::sin(3.0 * value.place.number + value.quantity));
            again.typed = QString::number(moved, 'f', decimals).toStdString();
            again.number = std::stod(again.typed);
            again.value_si = unit(again.unit).to_si(*again.number);
        }
        page.model().put(again, QStringLiteral("enter"));
    }
    const auto slip = [&](const char* name, int cylinder, const char* text) {
        const Place place = cylinder > 0 ? Place::cylinder(cylinder) : Place::engine();
        page.model().setData(page.model().index_of({*find_quantity(name, place.kind), place, Phase::reading}),
                             QString::fromUtf8(text));
    };
    slip("exhaust_temperature", 4, "3o5");
    slip("exhaust_temperature", 4, "531");
    slip("maximum_pressure", 2, "1412");
    slip("scavenge_temperature", 0, "19,5");
    slip("compression_pressure", 6, "out of order");
}

TEST(EntryPictures, OfRealData)
{
    const QString folder = qEnvironmentVariable("EVENSTROKE_PICTURES");
    if (folder.isEmpty())
        GTEST_SKIP() << "EVENSTROKE_PICTURES names no folder";
    const QString engine = data_folder() + QStringLiteral("/example_fleet/engine-01");
    if (!QFileInfo::exists(engine))
        GTEST_SKIP() << "the example fleet is not there: " << engine.toStdString();
    const QTemporaryDir place;
    const QString path = place.filePath(QStringLiteral("ship.evenstroke"));
    {
        const auto history = storage::History::create(path);
        ASSERT_TRUE(history) << history.error().text();
        ASSERT_TRUE(storage::take(*history.value(), {engine}));
    }
    Workplace workplace;
    ASSERT_FALSE(workplace.open(path).has_value());
    Frame frame(workplace);
    frame.add_page({QStringLiteral("enter"), QStringLiteral("Enter"), u'E',
                    [](Workplace& w) { return new EntryPage(w); }});
    frame.resize(1366, 768);
    frame.show();
    workplace.open_page(QStringLiteral("enter"));
    auto* page = frame.findChild<EntryPage*>();
    ASSERT_NE(page, nullptr);
    ASSERT_TRUE(
        QTest::qWaitFor([&] { return workplace.judgement() && workplace.activity().isEmpty(); }, 60000));
    const auto keep = [&](const char* name) {
        page->judge_now();
        QApplication::setActiveWindow(&frame);
        page->view().setFocus();
        QTest::qWait(100);
        frame.grab().save(folder + QLatin1Char('/') + QLatin1String(name) + QStringLiteral(".png"));
    };
    keep("entry_empty");
    const auto& readings = workplace.judgement()->record->readings;
    page->set_time(QStringLiteral("2026-11-04"), QStringLiteral("09:10"), QStringLiteral("+02:00"));
    fill(*page, readings.back());
    page->view().go_to(LogBox{*find_quantity("exhaust_temperature"), Place::cylinder(4), Phase::reading});
    keep("entry_day");
    page->view().go_to(LogBox{*find_quantity("maximum_pressure"), Place::cylinder(1), Phase::reading});
    set_theme(ThemeKind::night);
    keep("entry_night");
    set_theme(ThemeKind::day);
    page->close_reading();
    keep("entry_before_closing");
    page->close_reading();
    ASSERT_TRUE(QTest::qWaitFor([&] { return workplace.activity().isEmpty(); }, 60000));
    page->refresh();
    keep("entry_closed");
    page->correct(QString::fromStdString(workplace.judgement()->record->readings.back().id));
    page->save_blank_sheet(folder + QStringLiteral("/entry_blank.pdf"));
    keep("entry_correct");
}

} // namespace
