// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/events/event_typing.h"

#include "app/desk/number_text.h"
#include "core/explanation/event_effect.h"

#include <QCoreApplication>

namespace evenstroke {
namespace {

QString tr_(const char* text) { return QCoreApplication::translate("evenstroke", text); }

} // namespace

bool EventTyping::take(QChar key)
{
    complaint_.clear();
    if (key == QLatin1Char('\b')) {
        if (number_)
            number_ = *number_ >= 10 ? std::optional<int>(*number_ / 10) : std::nullopt;
        else
            kind_ = nullptr;
        return true;
    }
    if (key.isDigit())
        return take_digit(key.digitValue());
    for (const EventKind& kind : all_event_kinds())
        if (QLatin1Char(kind.key) == key.toUpper()) {
            kind_ = &kind;
            if (!takes_number(kind))
                number_.reset();
            return true;
        }
    return false;
}

bool EventTyping::take_digit(int digit)
{
    if (!kind_) {
        complaint_ = tr_("A number alone says nothing yet. Type the letter for what was done first.");
        return true;
    }
    const int wanted = number_.value_or(0) * 10 + digit;
    const auto place = place_of_event(*kind_, wanted, engine_);
    if (place.has_value())
        number_ = wanted;
    else
        complaint_ = to_qstring(place.error().text());
    return true;
}

void EventTyping::clear()
{
    kind_ = nullptr;
    number_.reset();
    complaint_.clear();
}

QString EventTyping::line(TimePoint today) const
{
    if (!kind_)
        return {};
    QStringList parts{to_qstring(kind_->title)};
    const auto place = place_of_event(*kind_, number_, engine_);
    if (place.has_value() && place.value() != Place::engine())
        parts.append(place_title(engine_, place.value(), false));
    else if (!place.has_value())
        parts.append(tr_("cylinder …"));
    else if (kind_->concerns != "ship")
        parts.append(tr_("the whole engine"));
    const bool is_today = std::chrono::floor<std::chrono::days>(day_) == std::chrono::floor<std::chrono::days>(today);
    parts.append(is_today ? tr_("today, %1").arg(day_text(day_)) : day_text(day_));
    return parts.join(QStringLiteral(" · "));
}

Result<Event> EventTyping::event() const
{
    if (!kind_)
        return invalid_input("It does not say yet what was done.", "Type the letter of one of the kinds below.");
    const auto place = place_of_event(*kind_, number_, engine_);
    if (!place.has_value())
        return place.error();
    Event event;
    event.date = {std::chrono::floor<std::chrono::days>(day_), 0};
    event.date_only = true;
    event.kind = kind_->name;
    event.place = place.value();
    return event;
}

} // namespace evenstroke
