// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "app/settings/engine_page.h"
#include "storage/vessel_store.h"
#include "tests/app/page_desk.h"

#include <QLabel>
#include <QLineEdit>

#include <stdexcept>

namespace evenstroke::test {

/// The engine page on the main engine of the invented ship.
class EngineOnDesk : public PageDesk
{
protected:
    void SetUp() override
    {
        open(6);
        page_ = make_page<EnginePage>();
    }
    template <typename Widget>
    Widget& child(const char* name) { return *page_->findChild<Widget*>(QString::fromLatin1(name)); }
    template <typename Box = QLineEdit>
    Box& box(const QString& title)
    {
        for (Box* one : page_->findChildren<Box*>())
            if (one->accessibleName() == title)
                return *one;
        throw std::runtime_error("no box " + title.toStdString());
    }
    QString problem() { return child<QLabel>("problem").text(); }
    static void type_into(QLineEdit& line, const QString& text)
    {
        line.setText(text);
        emit line.editingFinished();
    }
    storage::StoredEngine stored()
    {
        return storage::VesselStore(*workplace_->history()).engine(engine().toStdString()).value();
    }
    std::unique_ptr<EnginePage> page_;
};

} // namespace evenstroke::test
