// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/desk/pages.h"

#include "app/board/board_page.h"
#include "app/cards/card_files_page.h"
#include "app/cards/cards_page.h"
#include "app/causes/causes_page.h"
#include "app/desk/frame.h"
#include "app/desk/history_page.h"
#include "app/desk/number_text.h"
#include "app/desk/workplace.h"
#include "app/detection/detection_page.h"
#include "app/entry/entry_page.h"
#include "app/events/events_page.h"
#include "app/fleet/fleet_page.h"
#include "app/reading/reading_page.h"
#include "app/reading/workings_page.h"
#include "app/settings/engine_page.h"
#include "app/sisters/sisters_page.h"
#include "app/survey/survey_page.h"
#include "app/trends/trend_page.h"
#include "storage/reading_store.h"

#include <algorithm>

namespace evenstroke {

namespace {

template <typename PageType>
std::function<Page*(Workplace&)> maker()
{
    return [](Workplace& workplace) { return new PageType(workplace); };
}

/// Flags and questions that started at the newest reading of the engine that is looked at.
int new_flags(const Workplace& workplace)
{
    const auto judgement = workplace.judgement();
    if (!judgement || judgement->readings.empty())
        return 0;
    const std::size_t newest = judgement->readings.back().reading;
    return static_cast<int>(std::count_if(judgement->flags.begin(), judgement->flags.end(),
                                          [newest](const Flag& flag) { return flag.reading == newest; }));
}

/// The newest reading of the engine that was begun and is not closed.
QString open_draft(Workplace& workplace)
{
    if (!workplace.history() || workplace.selection().engine.isEmpty())
        return {};
    const auto readings = storage::ReadingStore(*workplace.history()).list(storage::Owner::engine(to_std(workplace.selection().engine)));
    if (!readings.has_value())
        return {};
    const auto& all = readings.value();
    const auto draft = std::find_if(all.rbegin(), all.rend(), [](const storage::ReadingEntry& entry) {
        return entry.state == storage::ReadingState::draft;
    });
    return draft == all.rend() ? QString() : Frame::tr("draft of %1").arg(day_text(draft->taken_at.utc).section(QLatin1Char(' '), 0, 1));
}

} // namespace

void add_all_pages(Frame& frame)
{
    frame.add_page({QStringLiteral("fleet"), Frame::tr("Fleet"), u'F', maker<FleetPage>()});
    frame.add_page({QStringLiteral("board"), Frame::tr("Strip board"), u'B', maker<BoardPage>(), new_flags});
    frame.add_page({QStringLiteral("trend"), Frame::tr("Trend"), u'T', maker<TrendPage>()});
    frame.add_page({QStringLiteral("reading"), Frame::tr("One reading"), u'R', maker<ReadingPage>()});
    frame.add_page({QStringLiteral("enter"), Frame::tr("Enter"), u'E', maker<EntryPage>(), {}, open_draft});
    frame.add_page({QStringLiteral("cards"), Frame::tr("Cards"), u'C', maker<CardsPage>()});
    frame.add_page({QStringLiteral("events"), Frame::tr("Events"), u'D', maker<EventsPage>()});
    frame.add_page({QStringLiteral("engine"), Frame::tr("Engine"), u'G', maker<EnginePage>()});
    frame.add_page({QStringLiteral("survey"), Frame::tr("Survey"), u'S', maker<SurveyPage>()});
    frame.add_page({QStringLiteral("workings"), Frame::tr("Workings"), u'W', maker<WorkingsPage>(), {}, {}, false, false});
    frame.add_page({QStringLiteral("causes"), Frame::tr("Possible causes"), u'Y', maker<CausesPage>(), {}, {}, false, false});
    frame.add_page({QStringLiteral("card-files"), Frame::tr("Bring in cards"), u'X', maker<CardFilesPage>(), {}, {}, false, false});
    frame.add_page({QStringLiteral("detection"), Frame::tr("How good is this?"), u'I', maker<DetectionPage>(), {}, {}, false, false});
    frame.add_page({QStringLiteral("sisters"), Frame::tr("Sister engines"), u'U', maker<SistersPage>(), {}, {}, false, false});
    frame.add_page({QStringLiteral("history"), Frame::tr("History"), u'H', maker<HistoryPage>(), {}, {}, true});
}

} // namespace evenstroke
