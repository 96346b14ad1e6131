// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/trends/trend_picture.h"
#include "app/trends/trend_plot.h"
#include "tests/app/invented_judgement.h"

#include <gtest/gtest.h>

namespace evenstroke {
namespace {

TEST(TrendPlotPictures, Kept)
{
    const QString folder = qEnvironmentVariable("EVENSTROKE_PICTURES");
    if (folder.isEmpty())
        GTEST_SKIP() << "EVENSTROKE_PICTURES names no folder";
    const auto judgement = invented::judgement();
    Selection selection;
    selection.quantity = find_quantity("compression_pressure");
    selection.place = Place::cylinder(4);
    selection.range = TimeRange::all;
    for (int view = 0; view < 4; ++view) {
        selection.view = static_cast<ValueView>(view);
        TrendPlot plot;
        plot.resize(950, 520);
        plot.show_picture(make_trend_picture(*judgement, selection), theme());
        plot.show_load(view == 1);
        plot.show();
        plot.choose(20);
        plot.grab().save(folder + QStringLiteral("/trend_plot_%1.png").arg(view));
    }
}

} // namespace
} // namespace evenstroke
