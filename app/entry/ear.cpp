// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/entry/ear.h"

#include "app/desk/number_text.h"
#include "app/entry/row_number.h"
#include "core/reading/typed_number.h"
#include "ui_ear.h"

#include <array>
#include <utility>

namespace evenstroke {
namespace {

/// What the text means so far, in the quantity's own unit; none while it means nothing.
std::optional<double> own_number(const LogSheetModel& model, const LogBox& box,
                                 const std::optional<QString>& typing)
{
    const auto barometer = barometer_of(model.sheet().whole());
    if (!typing) {
        const Value* value = model.sheet().value(box);
        return value ? number_in_own_unit(*value, barometer) : std::nullopt;
    }
    const auto value = read_box(box, to_std(*typing), model.sheet().row_unit(box.quantity));
    return value ? number_in_own_unit(value.value(), barometer) : std::nullopt;
}

/// The last words or choice that stood in this box, with their reading; null where there are none.
std::pair<const Reading*, const Value*> words_before(const EntryOpinions& opinions, const LogBox& box,
                                                     TimePoint before)
{
    if (!opinions.judgement() || !opinions.judgement()->record)
        return {nullptr, nullptr};
    const auto& readings = opinions.judgement()->record->readings;
    for (auto reading = readings.rbegin(); reading != readings.rend(); ++reading)
        if (reading->taken_at.utc < before)
            for (const Value& value : reading->values)
                if (box_of(value) == box && value.missing == MissingReason::none && !value.words.empty())
                    return {&*reading, &value};
    return {nullptr, nullptr};
}

} // namespace

Ear::Ear(QWidget* parent) : QWidget(parent), ui_(std::make_unique<Ui::Ear>())
{
    ui_->setupUi(this);
    connect(ui_->take_button, &QPushButton::clicked, this, &Ear::take_suggestion);
    connect(ui_->second_button, &QPushButton::clicked, this, &Ear::take_second);
    connect(ui_->confirm_button, &QPushButton::clicked, this, &Ear::confirm);
    connect(ui_->newest_button, &QPushButton::clicked, this, &Ear::newest_wanted);
    show_nothing();
    show_newest({});
}

Ear::~Ear() = default;

QString Ear::sentence() const
{
    return ui_->sentence->text();
}

void Ear::show_newest(const QString& sentence)
{
    ui_->newest->setText(sentence);
    ui_->newest->setVisible(!sentence.isEmpty());
    ui_->newest_button->setVisible(!sentence.isEmpty());
    fit();
}

void Ear::resizeEvent(QResizeEvent* event)
{
    QWidget::resizeEvent(event);
    fit();
}

void Ear::fit()
{
    if (fitting_) // showing a part lays out what is around it at once
        return;
    fitting_ = true;
    // What is said of the reading so far stands on the closed page too, and the doubt elsewhere under the sheet.
    const std::array<std::pair<QWidget*, bool>, 5> least_first{
        {{ui_->keys, true},
         {ui_->steadiness, true},
         {ui_->completeness, true},
         {ui_->whole_label, true},
         {ui_->newest, !ui_->newest->text().isEmpty()}}};
    for (const auto& [part, wanted] : least_first)
        part->setVisible(wanted);
    for (const auto& [part, wanted] : least_first) {
        layout()->invalidate();
        if (layout()->totalHeightForWidth(width()) <= height())
            break;
        part->hide();
    }
    layout()->invalidate(); // so that the parts take their new places at once
    layout()->activate();
    fitting_ = false;
}

QString Ear::newest() const
{
    return ui_->newest->text();
}

void Ear::show_nothing()
{
    suggestion_.clear();
    second_suggestion_.clear();
    ui_->second_button->hide();
    ui_->box_name->clear();
    for (QWidget* part : {static_cast<QWidget*>(ui_->numbers), static_cast<QWidget*>(ui_->scale),
                          static_cast<QWidget*>(ui_->sentence), static_cast<QWidget*>(ui_->take_button),
                          static_cast<QWidget*>(ui_->confirm_button)})
        part->hide();
}

void Ear::show_box(const LogSheetModel& model, const LogBox& box, const EntryOpinions& opinions,
                   const std::optional<QString>& typing)
{
    show_nothing();
    ui_->box_name->setText(model.box_name(box));
    if (quantity(box.quantity).type == ValueType::number)
        show_numbers(model, box, opinions, own_number(model, box, typing));
    QStringList sentences = choices_of(model, box, opinions);
    if (!typing)
        show_doubt(model, box, opinions, sentences);
    if (!sentences.isEmpty()) {
        ui_->sentence->setText(sentences.join(QStringLiteral("\n\n")));
        ui_->sentence->show();
    }
    fit();
}

/// What may be written where it is no number, and the words that stood there last time.
QStringList Ear::choices_of(const LogSheetModel& model, const LogBox& box, const EntryOpinions& opinions)
{
    const Quantity& meant = quantity(box.quantity);
    QStringList sentences;
    if (meant.type == ValueType::choice) {
        QStringList choices;
        for (const std::string& choice : meant.choices)
            choices << to_qstring(choice_text(choice));
        sentences << tr("One of: %1. The first letters are enough.").arg(choices.join(QStringLiteral(", ")));
    } else if (meant.type == ValueType::yes_no) {
        sentences << tr("Yes or no; the first letter is enough.");
    }
    if (meant.type == ValueType::number || box.phase != Phase::reading)
        return sentences;
    const auto [last, before] = words_before(opinions, box, model.sheet().reading().taken_at.utc);
    if (!before)
        return sentences;
    const QString words = to_qstring(box_text(*before, model.sheet().row_unit(box.quantity)));
    if (words.isEmpty())
        return sentences;
    sentences << tr("Last time, %1: %2").arg(day_text(last->taken_at.utc), words);
    if (!model.sheet().value(box)) {
        suggestion_ = words;
        ui_->take_button->setText(tr("F3  take %1").arg(words));
        ui_->take_button->show();
    }
    return sentences;
}

void Ear::show_numbers(const LogSheetModel& model, const LogBox& box, const EntryOpinions& opinions,
                       std::optional<double> typed)
{
    const WrittenUnit row_unit = model.sheet().row_unit(box.quantity);
    const auto barometer = barometer_of(model.sheet().whole());
    const int decimals = decimals_in(box.quantity, row_unit);
    const auto in_row = [&](std::optional<double> own) {
        return own ? in_row_unit(box.quantity, *own, row_unit, barometer) : std::nullopt;
    };
    const ValueOpinion* opinion = opinions.of(box);
    UsualScale::Content content;
    content.decimals = decimals;
    content.typed = in_row(typed);
    if (opinion) {
        content.previous = in_row(opinion->previous);
        content.expected = in_row(opinion->expected);
        content.low = in_row(opinion->usual_low);
        content.high = in_row(opinion->usual_high);
    }
    const QString unit_words = to_qstring(row_unit_text(box.quantity, row_unit));
    const auto shown = [&](std::optional<double> number) {
        return number ? with_unit(number_text(*number, decimals), unit_words) : QStringLiteral("–");
    };
    ui_->previous->setText(shown(content.previous));
    ui_->expected->setText(shown(content.expected));
    const Reading* last = opinions.previous_reading(box, model.sheet().reading().taken_at.utc);
    ui_->previous_label->setText(last ? tr("last time, %1").arg(day_text(last->taken_at.utc))
                                      : tr("last time"));
    ui_->expected_label->setText(content.low ? tr("expected now") : tr("expected"));
    ui_->numbers->setVisible(content.previous || content.expected);
    if (content.low)
        ui_->scale->show_content(content);
}

void Ear::show_doubt(const LogSheetModel& model, const LogBox& box, const EntryOpinions& opinions,
                     QStringList& sentences)
{
    const Value* value = model.sheet().value(box);
    if (const auto refusal = model.refusal(box))
        sentences << to_qstring(refusal->text());
    const ValueOpinion* opinion = opinions.of(box);
    const bool confirmed = value && value->confirmed;
    const bool doubts = opinion && value && !opinion->sentence.empty();
    if (doubts && !confirmed)
        sentences << to_qstring(opinion->sentence);
    for (const SheetNote* note : opinions.notes_of(box))
        sentences << note->sentence;
    if (value && value->origin == Origin::card)
        sentences << tr("From the indicator card; a number typed here takes its place.");
    if (confirmed)
        sentences << tr("Read again and confirmed.");
    else if (model.sheet().lent(box))
        sentences << tr(
            "Entered for the ship with another engine. What you type here counts for this engine only.");
    else if (value && value->missing != MissingReason::none)
        sentences << tr("Left empty: %1.").arg(to_qstring(missing_text(value->missing)));
    else if (sentences.isEmpty() && !opinions.has_history())
        sentences << tr(
            "There is no earlier reading of this engine to compare with. Ranges are checked all the same.");
    if (doubts && !confirmed && opinion->suggestion) {
        suggestion_ = to_qstring(*opinion->suggestion);
        ui_->take_button->setText(tr("F3  take %1 instead").arg(suggestion_));
        ui_->take_button->show();
    }
    if (doubts && !confirmed && opinion->suggestion && opinion->second_suggestion) {
        second_suggestion_ = to_qstring(*opinion->second_suggestion);
        ui_->second_button->setText(tr("Shift+F3  take %1 instead").arg(second_suggestion_));
        ui_->second_button->show();
    }
    const bool asked = (doubts || !opinions.notes_of(box).empty()) && value && !confirmed;
    ui_->confirm_button->setVisible(asked);
}

void Ear::show_whole(const EntrySheet& sheet, const EntryOpinions& opinions)
{
    const Completeness state = find_completeness(sheet.sections(), sheet.whole());
    ui_->completeness->setText(
        tr("%1 of %2 required boxes answered").arg(state.answered).arg(state.required));
    ui_->steadiness->setText(to_qstring(opinions.steadiness().sentence));
    fit();
}

} // namespace evenstroke
