// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/reading/log_sheet.h"
#include "core/reading/typed_box.h"

#include <QObject>
#include <QString>

#include <map>
#include <optional>
#include <set>
#include <vector>

namespace evenstroke {

/// What the log sheet needs to know of an engine before the first box is shown.
struct SheetStart
{
    Engine engine;
    EngineLayout layout;
    std::set<QuantityId> used;               ///< quantities that earlier readings held
    std::map<QuantityId, WrittenUnit> units; ///< rows written in another than the quantity's own unit
    Reading reading;                         ///< its own values
    std::vector<Value> ship;                 ///< what the whole ship shares
    bool ship_open = true; ///< false: the ship's values are closed; typing over them is this engine's own
    std::map<LogBox, QString> unreadable; ///< texts typed before that could not be read and wait in their boxes
};

/// The log sheet that is being filled in, in memory: the reading's own values, what the ship lends, the rows'
/// units. Whoever keeps it on disk listens to `value_put`.
class EntrySheet : public QObject
{
    Q_OBJECT

public:
    enum class Owner { reading, ship };

    explicit EntrySheet(QObject* parent = nullptr) : QObject(parent) {}

    void start(SheetStart start);

    const Engine& engine() const { return start_.engine; }
    EngineLayout layout() const { return start_.layout; }
    const std::vector<LogSection>& sections() const { return sections_; }
    const std::set<QuantityId>& used() const { return start_.used; }

    const Reading& reading() const { return start_.reading; }
    const std::vector<Value>& ship_values() const { return start_.ship; }
    /// Identity, name and time; the values stay.
    void set_head(const std::string& id, const std::string& name, StampedTime taken_at);

    bool ship_open() const { return start_.ship_open; }
    /// Other values of the ship, because the time changed.
    void set_ship(std::vector<Value> values, bool open);

    WrittenUnit row_unit(QuantityId quantity) const;
    void set_row_unit(QuantityId quantity, WrittenUnit unit);

    /// What stands in a box: the reading's own value, else what the ship lends; null where it is empty.
    const Value* value(const LogBox& box) const;
    /// Whether the box shows what was entered for the ship with another engine's reading.
    bool lent(const LogBox& box) const;
    /// Puts a value in its box; one without number, words or reason empties the box.
    void put(const Value& value);
    /// Texts that could not be read and wait in their boxes to be put right.
    const std::map<LogBox, QString>& unreadable() const { return start_.unreadable; }
    void keep_unreadable(const LogBox& box, const QString& text);
    /// False where none waited.
    bool forget_unreadable(const LogBox& box);
    /// Whether there is anything in the reading, apart from what was lent.
    bool empty() const;

    /// Own and lent values together, then an empty value for each box that has none: what is judged.
    Reading whole() const;

signals:
    void restarted();
    void value_put(const evenstroke::LogBox& box, evenstroke::EntrySheet::Owner owner);
    void row_unit_changed(evenstroke::QuantityId quantity);
    void unreadable_changed(const evenstroke::LogBox& box);
    void head_changed();
    void ship_changed();

private:
    std::vector<Value>& values_of(Owner owner);
    Owner owner_of(const LogBox& box) const;

    SheetStart start_;
    std::vector<LogSection> sections_;
};

LogBox box_of(const Value& value);
/// Whether a value says anything at all.
bool says_something(const Value& value);
bool same_value(const Value& a, const Value& b);

} // namespace evenstroke
