// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "app/desk/workplace.h"
#include "app/entry/ear.h"
#include "app/entry/entry_page.h"
#include "app/entry/log_sheet_view.h"
#include "storage/reading_store.h"
#include "tests/app/entry_history.h"

#include <QApplication>
#include <QTemporaryDir>
#include <QTest>
#include <gtest/gtest.h>

namespace evenstroke::test {

inline LogBox box(const char* name, Place place = Place::engine())
{
    return {*find_quantity(name, place.kind), place, Phase::reading};
}
inline const Place ship{Place::Kind::ship, 0};

/// The entry page on a history in a file, worked by keys.
class EntryDesk : public testing::Test
{
protected:
    void open(int readings)
    {
        write_entry_history(file(), readings);
        workplace = std::make_unique<Workplace>();
        const auto problem = workplace->open(file());
        ASSERT_FALSE(problem.has_value()) << problem->text();
        look_at("main engine");
        make_page();
    }
    QString file() const { return folder.filePath(QStringLiteral("ship.evenstroke")); }
    void look_at(const char* engine_name)
    {
        Selection selection = workplace->selection();
        for (const VesselChoice& vessel : workplace->vessels())
            for (const EngineChoice& engine : vessel.engines)
                if (engine.name == QLatin1String(engine_name)) {
                    selection.vessel = vessel.id;
                    selection.engine = engine.id;
                }
        workplace->select(selection);
        ASSERT_TRUE(QTest::qWaitFor(
            [&] { return workplace->judgement() && !workplace->judging(selection.engine); }, 20000));
    }
    void make_page()
    {
        page = std::make_unique<EntryPage>(*workplace);
        page->resize(1190, 680);
        page->refresh();
        page->show();
        QApplication::setActiveWindow(page.get());
        page->view().setFocus();
        QApplication::processEvents();
    }
    QWidget* keys() const
    {
        QWidget* focus = QApplication::focusWidget();
        return focus && page->isAncestorOf(focus) ? focus : &page->view();
    }
    void type(const QString& text)
    {
        for (const QChar c : text)
            QTest::keyClick(keys(), c.toLatin1());
    }
    void press(Qt::Key key, Qt::KeyboardModifiers modifiers = Qt::NoModifier)
    {
        QTest::keyClick(keys(), key, modifiers);
    }
    void enter(const LogBox& at, const QString& text)
    {
        page->view().go_to(at);
        type(text);
        press(Qt::Key_Return);
    }
    QString shown(const LogBox& at) const { return page->model().index_of(at).data().toString(); }
    std::vector<storage::ReadingEntry> listed(storage::ReadingState state) const
    {
        std::vector<storage::ReadingEntry> found;
        const std::vector<storage::ReadingEntry> all =
            storage::ReadingStore(*workplace->history()).list(owner()).value();
        for (const auto& entry : all)
            if (entry.state == state)
                found.push_back(entry);
        return found;
    }
    storage::Owner owner() const
    {
        return storage::Owner::engine(workplace->selection().engine.toStdString());
    }
    Reading stored(const std::string& id) const
    {
        return storage::ReadingStore(*workplace->history()).reading(id).value();
    }

    QTemporaryDir folder;
    std::unique_ptr<Workplace> workplace;
    std::unique_ptr<EntryPage> page;
};

} // namespace evenstroke::test
