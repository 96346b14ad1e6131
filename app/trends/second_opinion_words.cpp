// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/trends/second_opinion_words.h"

#include "app/board/board.h"
#include "app/desk/number_text.h"
#include "core/trend/second_opinions.h"

#include <QCoreApplication>

#include <algorithm>

namespace evenstroke {
namespace {

QString tr_(const char* text, int n = -1) { return QCoreApplication::translate("evenstroke", text, nullptr, n); }

QString day_of(const Judgement& judgement, std::size_t reading)
{
    return day_text(judgement.record->readings.at(reading).taken_at.utc);
}

QString fixed_words(const FixedLimitOpinion& opinion, const Judgement& judgement)
{
    const QString limit = with_unit(number_text(opinion.limit, 0), to_qstring(opinion.unit));
    const QString rule = tr_("A fixed limit of %1 from the mean of the others (%2)").arg(limit, to_qstring(opinion.source));
    if (opinion.began.empty())
        return tr_("%1 would never have spoken.").arg(rule);
    QStringList days;
    constexpr std::size_t days_named = 3;
    for (std::size_t i = 0; i < std::min(days_named, opinion.began.size()); ++i)
        days.append(day_of(judgement, judgement.readings[opinion.began[i]].reading));
    return tr_("%1 would have spoken at %n reading(s)", static_cast<int>(opinion.beyond)).arg(rule) +
           tr_(", first on %1").arg(days.join(QStringLiteral(", "))) +
           (opinion.began.size() > days_named ? tr_(" and later again") : QString()) +
           (opinion.now ? tr_("; it speaks now.") : QStringLiteral("."));
}

QString slope_words(const TrendPicture& picture, const SecondOpinions& opinions)
{
    const int decimals = picture.decimals + 1; // a month's share is smaller than a value
    const auto amount = [&](double a_month) { return signed_text(a_month, decimals); };
    QString words = tr_("Slope since the last work by Theil and Sen: %1 a month (%2 to %3, 95 of 100)")
                        .arg(with_unit(amount(opinions.slope->slope), picture.unit_symbol), amount(opinions.slope->low),
                             amount(opinions.slope->high));
    if (opinions.order)
        words += tr_("; by Mann and Kendall so clear an order comes by chance in %1 of 100")
                     .arg(number_text(100.0 * opinions.order->p_two_sided, opinions.order->p_two_sided < 0.1 ? 1 : 0));
    return words + u'.';
}

QString chart_words(const SecondOpinions& opinions, const Judgement& judgement)
{
    const auto spoke = [&](const std::optional<std::size_t>& alarm) {
        return alarm ? tr_("would have spoken on %1").arg(day_of(judgement, *alarm)) : tr_("would not have spoken");
    };
    return tr_("A chart of the weighted mean (EWMA, λ %1, %2 σ) %3; one of cumulative sums (CUSUM, %4 σ, %5 σ) %6.")
        .arg(number_text(ewma_weight, 1), number_text(ewma_factor, 0), spoke(opinions.ewma_alarm),
             number_text(cusum_slack, 1), number_text(cusum_decision, 0), spoke(opinions.cusum_alarm));
}

} // namespace

void add_second_opinions(TrendPicture& picture, const Judgement& judgement)
{
    const SecondOpinions opinions = second_opinions(judgement, picture.quantity, picture.place);
    if (opinions.fixed) {
        picture.fixed_high.name = tr_("fixed limit of %1 from the mean of the others")
                                      .arg(with_unit(number_text(opinions.fixed->limit, 0), to_qstring(opinions.fixed->unit)));
        if (picture.view == ValueView::apart)
            for (const FixedLimitOpinion::Edge& edge : opinions.fixed->edges) {
                const auto time = static_cast<double>(
                    judgement.record->readings.at(judgement.readings[edge.reading].reading).taken_at.utc.time_since_epoch().count());
                if (time < picture.first_time)
                    continue;
                for (PictureLine* line : {&picture.fixed_low, &picture.fixed_high}) {
                    line->times.push_back(time);
                    line->values.push_back(line == &picture.fixed_low ? edge.low : edge.high);
                }
            }
        picture.second_opinions.append(fixed_words(*opinions.fixed, judgement));
    }
    if (opinions.slope && opinions.values >= 3)
        picture.second_opinions.append(slope_words(picture, opinions));
    if (opinions.charted)
        picture.second_opinions.append(chart_words(opinions, judgement));
}

} // namespace evenstroke
