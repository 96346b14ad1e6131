// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "storage/history.h"
#include "storage/reading_store.h"
#include "storage/take_in.h"
#include "storage/vessel_store.h"

#include <QByteArray>
#include <QString>
#include <QTemporaryDir>

#include <gtest/gtest.h>

#include <memory>
#include <string>

namespace evenstroke::storage {

/// The value of a result, or the test fails with its words.
template <typename T> T value_of_result(Result<T> result)
{
    if (!result) {
        ADD_FAILURE() << result.error().text();
        throw std::runtime_error(result.error().text());
    }
    return std::move(result.value());
}
inline void expect_done(const Done& done)
{
    EXPECT_TRUE(done.has_value()) << (done ? "" : done.error().text());
}

/// A folder that goes away with the test, files to take in, and histories with a clock that stands still.
class StorageTest : public testing::Test
{
protected:
    QString path(const QString& name) const { return folder_.filePath(name); }
    void write(const QString& name, const QByteArray& content) const;
    QByteArray read(const QString& name) const;

    /// An engine of six cylinders in the folder, with these readings (header included) and events.
    void write_engine(const QString& folder, const QByteArray& readings, const QByteArray& events = {}) const;
    static QByteArray engine_json(const QByteArray& vessel = "Quiet Barley",
                                  const QByteArray& engine = "main engine", const QByteArray& further = {});

    /// In the folder "ship": two engines, readings of every sort, events, a card and the ship's own readings.
    void write_ship() const;

    HistorySettings settings();
    std::unique_ptr<History> create(const QString& name = QStringLiteral("ship.evenstroke"));
    std::unique_ptr<History> open(const QString& name = QStringLiteral("ship.evenstroke"),
                                  OpenMode mode = OpenMode::read_write);
    std::unique_ptr<History> memory();

    TakeReport take_folder(History& history, const QString& folder, bool keep_good = false);
    /// Id of the only engine.
    static std::string only_engine(History& history);
    static std::vector<Reading> readings_of(History& history);

    TimePoint now_ = TimePoint(std::chrono::seconds(1'900'000'000)); ///< 17 March 2030
    const Signature chief_{"A. Chief", "read again"};

private:
    QTemporaryDir folder_;
};

inline const QByteArray header = "reading,taken_at,quantity,cylinder,value,unit\n";
const Value* find_value(const Reading& reading, const char* quantity, const Place& place = Place::engine());

} // namespace evenstroke::storage
