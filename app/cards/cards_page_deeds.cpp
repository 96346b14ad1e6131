// SPDX-License-Identifier: GPL-3.0-or-later
// What the page Cards writes: results into the reading, and which cards are the healthy ones.
#include "app/cards/card_words.h"
#include "app/cards/cards_page.h"
#include "app/desk/number_text.h"
#include "app/desk/reading_in_hand.h"
#include "app/desk/workplace.h"
#include "app/entry/signature_dialog.h"
#include "app/settings/person.h"
#include "storage/card_store.h"
#include "storage/healthy_cards.h"
#include "storage/reading_store.h"
#include "ui_cards_page.h"

#include <QPushButton>

#include <algorithm>

namespace evenstroke {

namespace {

std::vector<storage::ValueFromCard> values_of(const CardsInHand& cards)
{
    std::vector<storage::ValueFromCard> values;
    for (const indicator::ReviewedCard& card : cards.review.cards)
        for (const indicator::CardValue& value : card.values)
            values.push_back({value.quantity, Place::cylinder(card.cylinder), value.number, {quantity(value.quantity).unit, PressureKind::none}});
    return values;
}

} // namespace

bool CardsPage::called_healthy() const
{
    return reading_ && std::find(stored_.called_healthy.begin(), stored_.called_healthy.end(), *reading_) != stored_.called_healthy.end();
}

void CardsPage::show_deeds()
{
    const bool writable = !workplace().read_only();
    ui_->accept_button->setVisible(writable && cards_ && !values_of(*cards_).empty());
    ui_->healthy_button->setVisible(writable && cards_);
    ui_->healthy_button->setText(called_healthy() ? tr("no longer healthy… (J)") : tr("these cards are healthy… (J)"));
    ui_->bring_button->setVisible(writable);
    ui_->withdraw_button->setVisible(writable && (card_in_hand() || withdrawn_in_hand()));
    ui_->withdraw_button->setText(card_in_hand() ? tr("withdraw this card… (Del)") : tr("bring its card back… (Del)"));
}

/// The card of the cylinder that is shown; null where the reading has none of it.
const CardsStored::Entry* CardsPage::card_in_hand() const { return cards_ && reading_ ? stored_.find({*reading_, cylinder_}) : nullptr; }

/// What could be brought back: the withdrawn card of the cylinder that is shown, or, of a reading without cards, the one
/// that was withdrawn last.
const CardsStored::Withdrawn* CardsPage::withdrawn_in_hand() const
{
    const auto reading = judgement_ ? reading_in_hand(*judgement_, workplace().selection()) : std::nullopt;
    if (!reading || card_in_hand() || (!cards_ && run_.busy()))
        return nullptr;
    if (cards_)
        return stored_.find_withdrawn({*reading, cylinder_});
    const CardsStored::Withdrawn* last = nullptr;
    for (const CardsStored::Withdrawn& card : stored_.withdrawn)
        if (card.card.place.reading == *reading && !stored_.find(card.card.place) && (!last || card.at >= last->at))
            last = &card;
    return last;
}

void CardsPage::ask_withdraw()
{
    const CardsStored::Entry* const card = card_in_hand();
    const CardsStored::Withdrawn* const withdrawn = withdrawn_in_hand();
    if (workplace().read_only() || (!card && !withdrawn))
        return;
    const indicator::CardPlace place = card ? card->place : withdrawn->card.place;
    const QString of = tr("The card of %1 from %2").arg(place_title(judgement_->record->engine, Place::cylinder(place.cylinder), false),
                                                        reading_title(*judgement_, place.reading));
    const QString healthy = card && called_healthy() ? u' ' + tr("It is one of the healthy cards: others are compared with it.") : QString();
    SignatureDialog dialog(card ? tr("Withdraw this card") : tr("Bring the card back"),
                           card ? tr("%1 is taken out of use: of the wrong cylinder, say, or taken through a choked cock. It stays in the history and "
                                     "can be brought back. What it gave the reading is taken out too, each value as a correction.").arg(of) + healthy
                                : tr("%1 is used again. Its results go into the reading with key Z.").arg(of),
                           card ? tr("Withdraw") : tr("Bring back"), {to_std(person_name()), {}}, this);
    if (dialog.exec() == QDialog::Accepted)
        withdraw_or_bring_back(dialog.signature());
}

bool CardsPage::withdraw_or_bring_back(const storage::Signature& by)
{
    const CardsStored::Entry* const card = card_in_hand();
    const CardsStored::Withdrawn* const withdrawn = withdrawn_in_hand();
    if (!workplace().history() || (!card && !withdrawn))
        return false;
    storage::CardStore store(*workplace().history());
    QString words;
    if (card) {
        const auto values = store.withdraw(card->id, by);
        if (!values) {
            say(to_qstring(values.error().text()));
            return false;
        }
        words = tr("The card is withdrawn.") +
                (values.value() > 0 ? u' ' + tr("%n value(s) it gave the reading are taken out.", nullptr, values.value()) : QString());
    } else {
        if (const auto back = store.restore(withdrawn->card.id, by); !back) {
            say(to_qstring(back.error().text()));
            return false;
        }
        words = tr("The card is used again. Its results go into the reading with key Z.");
    }
    set_person_name(to_qstring(by.who));
    workplace().changed();
    refresh();
    say(words);
    return true;
}

void CardsPage::ask_accept()
{
    if (!cards_ || !reading_ || workplace().read_only())
        return;
    SignatureDialog dialog(tr("Results into the reading"),
                           tr("Mean indicated, maximum, compression and expansion pressure and the angle of the maximum of all cards go into the "
                              "reading of %1, marked as from the card. What was read by hand stays as it is.")
                               .arg(reading_title(*judgement_, *reading_)),
                           tr("Put them in"), {to_std(person_name()), to_std(tr("from the cards"))}, this);
    if (dialog.exec() == QDialog::Accepted)
        accept_results(dialog.signature());
}

bool CardsPage::accept_results(const storage::Signature& by)
{
    if (!cards_ || !reading_ || !workplace().history())
        return false;
    const auto accepted = storage::ReadingStore(*workplace().history())
                              .accept_card_values(judgement_->record->readings[*reading_].id, values_of(*cards_), by);
    if (!accepted) {
        say(to_qstring(accepted.error().text()));
        return false;
    }
    set_person_name(to_qstring(by.who));
    const storage::AcceptedFromCards& result = accepted.value();
    QStringList words;
    if (result.added > 0)
        words.append(tr("%n value(s) put in", nullptr, result.added));
    if (result.corrected > 0)
        words.append(tr("%n earlier value(s) of a card corrected", nullptr, result.corrected));
    if (result.same > 0)
        words.append(tr("%n stood there already", nullptr, result.same));
    if (!result.left_alone.empty())
        words.append(tr("%n read by hand left as they are", nullptr, static_cast<int>(result.left_alone.size())));
    say(words.join(QStringLiteral(", ")) + u'.');
    workplace().changed();
    return true;
}

void CardsPage::ask_healthy()
{
    if (!cards_ || !reading_ || workplace().read_only())
        return;
    const QString day = reading_title(*judgement_, *reading_);
    const bool take_back = called_healthy();
    QStringList remarked;
    for (const indicator::ReviewedCard& card : cards_->review.cards)
        if (card.problem || !card.remarks.empty())
            remarked.append(place_title(cards_->engine(), Place::cylinder(card.cylinder), false));
    const QString doubts = remarked.isEmpty() ? QString()
                                              : u' ' + tr("There are remarks on %1: read them first.").arg(remarked.join(QStringLiteral(", ")));
    SignatureDialog dialog(take_back ? tr("No longer the healthy cards") : tr("The healthy cards"),
                           take_back ? tr("The cards of %1 are no longer what others are compared with. They stay with their reading.").arg(day)
                                     : tr("Later cards at nearly this load are compared with those of %1, and dead centre of the installation is "
                                          "taken from them. Choose a reading at steady load with every cylinder in order; the shop trial's or the "
                                          "first after an overhaul are usual.").arg(day) + doubts,
                           take_back ? tr("Take back") : tr("Call them healthy"), {to_std(person_name()), {}}, this);
    if (dialog.exec() == QDialog::Accepted)
        call_healthy(!take_back, dialog.signature());
}

bool CardsPage::call_healthy(bool healthy, const storage::Signature& by)
{
    if (!reading_ || !workplace().history())
        return false;
    const auto said = storage::HealthyCardStore(*workplace().history()).say(judgement_->record->readings[*reading_].id, healthy, by.why, by);
    if (!said) {
        say(to_qstring(said.error().text()));
        return false;
    }
    set_person_name(to_qstring(by.who));
    say(healthy ? tr("Later cards are compared with these.") : tr("These cards are no longer compared with."));
    workplace().changed();
    refresh();
    return true;
}

} // namespace evenstroke
