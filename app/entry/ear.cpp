// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/entry/ear.h"

#include "app/desk/number_text.h"
#include "app/entry/row_number.h"
#include "core/reading/typed_number.h"
#include "ui_ear.h"

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

} // namespace

Ear::Ear(QWidget* parent) : QWidget(parent), ui_(std::make_unique<Ui::Ear>())
{
    ui_->setupUi(this);
    connect(ui_->take_button, &QPushButton::clicked, this, &Ear::take_suggestion);
    connect(ui_->confirm_button, &QPushButton::clicked, this, &Ear::confirm);
    show_nothing();
}

Ear::~Ear() = default;

QString Ear::sentence() const
{
    return ui_->sentence->text();
}

void Ear::show_nothing()
{
    suggestion_.clear();
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
    if (quantity(box.quantity).type == ValueType::choice) {
        QStringList choices;
        for (const std::string& choice : quantity(box.quantity).choices)
            choices << to_qstring(choice_text(choice));
        ui_->sentence->setText(
            tr("One of: %1. The first letters are enough.").arg(choices.join(QStringLiteral(", "))));
        ui_->sentence->show();
    }
    if (!typing)
        show_doubt(model, box, opinions);
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

void Ear::show_doubt(const LogSheetModel& model, const LogBox& box, const EntryOpinions& opinions)
{
    const Value* value = model.sheet().value(box);
    QStringList sentences;
    const auto unreadable = model.unreadable().find(box);
    if (unreadable != model.unreadable().end() && model.refusal())
        sentences << to_qstring(model.refusal()->text());
    const ValueOpinion* opinion = opinions.of(box);
    const bool confirmed = value && value->confirmed;
    const bool doubts = opinion && value && !opinion->sentence.empty();
    if (doubts && !confirmed)
        sentences << to_qstring(opinion->sentence);
    for (const SheetNote* note : opinions.notes_of(box))
        sentences << note->sentence;
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
    if (!sentences.isEmpty()) {
        ui_->sentence->setText(sentences.join(QStringLiteral("\n\n")));
        ui_->sentence->show();
    }
    if (doubts && !confirmed && opinion->suggestion) {
        suggestion_ = to_qstring(*opinion->suggestion);
        ui_->take_button->setText(tr("F3  take %1 instead").arg(suggestion_));
        ui_->take_button->show();
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
}

} // namespace evenstroke
