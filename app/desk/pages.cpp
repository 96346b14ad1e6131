// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/desk/pages.h"

#include "app/desk/frame.h"
#include "app/desk/history_page.h"
#include "app/desk/workplace.h"

namespace evenstroke {

namespace {

template <typename PageType>
std::function<Page*(Workplace&)> maker()
{
    return [](Workplace& workplace) { return new PageType(workplace); };
}

} // namespace

void add_all_pages(Frame& frame)
{
    frame.add_page({QStringLiteral("history"), Frame::tr("History"), u'H', maker<HistoryPage>(), {}, true});
}

} // namespace evenstroke
