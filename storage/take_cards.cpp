// SPDX-License-Identifier: GPL-3.0-or-later
#include "storage/take_folder.h"

#include "storage/card_rows.h"

#include "core/plain_text.h"

#include <QDir>
#include <QFileInfo>

namespace evenstroke::storage {
namespace {

Result<qint64> find_reading_key(History& history, qint64 engine_key, const std::string& name)
{
    Query row(history.database(), "SELECT reading_key FROM reading WHERE engine_key = ? AND name = ?",
              "the cards were not taken in");
    BOOST_OUTCOME_TRYV(row.run(engine_key, name));
    const qint64 key = row.next() ? row.integer(0) : 0;
    BOOST_OUTCOME_TRYV(row.finished());
    return key;
}

} // namespace

/// @param reading_key  0 where the history has no such reading
Done FolderTaking::take_card(const QFileInfo& file, const std::string& reading, qint64 reading_key,
                             const Engine& engine, Refusals& refusals)
{
    const std::string name = from_qt(file.completeBaseName());
    const bool is_in_refused_file = unwritten_readings_.count(reading) > 0;
    const auto cylinder = engine.find_cylinder(name);
    if (reading_key == 0 && !is_in_refused_file) {
        refusals.add(0, reading,
                     "There is no reading " + evenstroke::quoted(reading) + " to which the card belongs.",
                     "Name the folder as the reading in readings.csv.");
        return done();
    }
    if (!cylinder) {
        refusals.add(0, name, "The engine has no cylinder " + evenstroke::quoted(name) + ".",
                     "Name the file after the cylinder, such as 4.csv.");
        return done();
    }
    qint64 line = 0;
    const auto trace = read_card_file(file.filePath(), line);
    if (!trace) {
        refusals.add(line, "", trace.error());
        return done();
    }
    if (reading_key == 0) {
        ++report_.cards.fresh;
        return done();
    }
    const auto added = add_card(history_, reading_key, *cylinder, trace.value(), writers_.audit);
    if (!added)
        return added.error();
    if (added.value().outcome == AddedCard::Outcome::differs)
        refusals.add(0, "", "The history has another card of this cylinder in this reading.",
                     "Keep the card to the reading it was taken with.");
    else // one that was withdrawn stays so: the file says nothing new
        ++(added.value().outcome == AddedCard::Outcome::added ? report_.cards.fresh : report_.cards.same);
    return done();
}

Done FolderTaking::take_cards(const QString& path, const std::string& shown, const Engine& engine,
                              const OwnerKeys& owner)
{
    for (const QFileInfo& folder : QDir(path).entryInfoList(QDir::Dirs | QDir::NoDotAndDotDot, QDir::Name)) {
        const std::string reading = from_qt(folder.fileName());
        const auto key = find_reading_key(history_, owner.engine, reading);
        if (!key)
            return key.error();
        for (const QFileInfo& file : QDir(folder.filePath()).entryInfoList(QDir::Files, QDir::Name)) {
            Refusals refusals(shown + "/cards/" + reading + "/" + from_qt(file.fileName()), report_.refused);
            if (file.suffix() != QStringLiteral("csv")) {
                report_.remarks.push_back(refusals.file() + " was ignored");
                continue;
            }
            BOOST_OUTCOME_TRYV(take_card(file, reading, key.value(), engine, refusals));
            report_.cards.refused += refusals.count();
            if (!meter_.add(file.size()))
                return done();
        }
    }
    return report_.cards.fresh > 0 ? count_change(history_, owner) : done();
}

} // namespace evenstroke::storage
