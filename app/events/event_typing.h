// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/engine/engine.h"
#include "core/reading/reading.h"

#include <QString>

#include <optional>

namespace evenstroke {

/// An event in three keys: a letter for what was done, a digit for the cylinder, Enter for today. Holds what has
/// been typed so far; knows no widget.
class EventTyping
{
public:
    void set_engine(const Engine& engine) { engine_ = engine; }
    /// The day that Enter means; arrow keys move it.
    void set_day(TimePoint day) { day_ = day; }
    TimePoint day() const { return day_; }
    void move_day(int days) { day_ += std::chrono::days(days); }

    /// A letter, a digit, or Backspace (as '\b'). False where the key means nothing here.
    bool take(QChar key);
    void clear();
    bool empty() const { return kind_ == nullptr; }
    const EventKind* kind() const { return kind_; }
    std::optional<int> number() const { return number_; }

    /// "Fuel valves changed · cylinder 4 · today, 14 Mar 2031": what Enter would write.
    QString line(TimePoint today) const;
    /// The event as typed. @par Problems invalid_input: no kind yet, the number missing or not of this engine
    Result<Event> event() const;
    /// What stood in the way of the last key, in words.
    const QString& complaint() const { return complaint_; }

private:
    bool take_digit(int digit);

    Engine engine_;
    TimePoint day_{};
    const EventKind* kind_ = nullptr;
    std::optional<int> number_;
    QString complaint_;
};

} // namespace evenstroke
