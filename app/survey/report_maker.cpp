// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/survey/report_maker.h"

#include "app/cards/card_shelf.h"
#include "app/survey/report_sources.h"
#include "storage/history.h"

#include <QPointer>

namespace evenstroke {
namespace {

Result<std::shared_ptr<const ReportLayout>> make_layout(const ReportWish& wish)
{
    const auto history = storage::History::open(wish.history_path, storage::OpenMode::read_only);
    if (!history.has_value())
        return history.error();
    auto sources = load_report_sources(*history.value(), wish.engine_id.toStdString());
    if (!sources.has_value())
        return sources.error();
    ReportDetails details = with_found(wish.details, sources.value().details);
    const Judgement judgement = judge(sources.value().record);
    details.cards = review_newest_cards(*history.value(), judgement, wish.period.from, wish.period.to);
    auto report = std::make_shared<const SurveyReport>(make_survey_report(judgement, wish.period, details));
    return std::make_shared<const ReportLayout>(lay_out(std::move(report)));
}

} // namespace

ReportMaker::ReportMaker(QObject* parent) : QObject(parent)
{
    pool_.setMaxThreadCount(1);
}

ReportMaker::~ReportMaker()
{
    pool_.clear();
    pool_.waitForDone();
}

void ReportMaker::make(const ReportWish& wish)
{
    const int number = ++asked_;
    pool_.clear(); // wishes that have not begun are no longer wanted
    const QPointer<ReportMaker> self(this);
    pool_.start([self, wish, number] {
        auto made = make_layout(wish);
        QMetaObject::invokeMethod(self, [self, made, number] {
            if (!self || number != self->asked_)
                return;
            self->delivered_ = number;
            self->layout_ = made.has_value() ? made.value() : nullptr;
            self->problem_ = made.has_value() ? std::nullopt : std::optional<Problem>(made.error());
            emit self->ready();
        }, Qt::QueuedConnection);
    });
}

void ReportMaker::forget()
{
    pool_.clear();
    delivered_ = ++asked_;
}

} // namespace evenstroke
