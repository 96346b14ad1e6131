// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "app/desk/page.h"
#include "app/events/event_diary.h"
#include "app/events/event_model.h"
#include "app/events/event_typing.h"
#include "core/trend/judgement.h"

#include <memory>
#include <vector>

class QPushButton;

namespace Ui {
class EventsPage;
}

namespace evenstroke {

/// The diary: work done and other happenings beside the running hours. Adding one takes three keys.
class EventsPage : public Page
{
    Q_OBJECT

public:
    explicit EventsPage(Workplace& workplace, QWidget* parent = nullptr);
    ~EventsPage() override;
    QString name() const override { return QStringLiteral("events"); }
    QString title() const override { return tr("Events"); }
    QString sentence() const override;
    void refresh() override;
    QString foot_text() const override;
    bool takes_letters() const override;
    QWidget* first_focus() override;
    void copy() override;

    EventDiary& diary() { return diary_; }
    const EventModel& model() const { return model_; }
    /// Where the event in hand would be entered; tests set the day.
    void set_today(TimePoint today);

private:
    void make_kind_buttons();
    void connect_fields();
    void connect_diary();
    void show_diary();
    void show_questions();
    void answer_with_work(const Flag& flag);
    void answer_without_work(const Flag& flag);
    void take_key(QChar key);
    void accept();
    void save();
    void remove();
    void begin_new();
    void say_added(const Event& event);
    /// What is being typed, else the row in hand.
    bool typing() const { return !typing_.empty(); }
    std::optional<Event> in_hand() const;
    Result<Event> with_fields(Event event) const;
    QString effect_words(const Event& event) const;
    void show_in_hand();
    void show_line();
    void say(const QString& words);

    std::unique_ptr<Ui::EventsPage> ui_;
    EventDiary diary_;
    EventModel model_;
    EventTyping typing_;
    Engine engine_;
    std::vector<QPushButton*> kind_buttons_;
    TimePoint today_{};
    QString shown_engine_;
};

} // namespace evenstroke
