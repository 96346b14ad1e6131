// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/desk/number_text.h"
#include "app/reading/side_views.h"

#include <QCoreApplication>

#include <algorithm>
#include <limits>

namespace evenstroke {

namespace {

constexpr double room_for_words = 1.5;  // of the span, at the right of the dots
constexpr double least_span = 0.04;     // of the mean, so that good agreement looks like agreement

QString tr_(const char* text) { return QCoreApplication::translate("evenstroke", text); }

QString per_cent_of_rating(double power, double rated)
{
    return rated > 0.0 ? with_unit(number_text(100.0 * power / rated, 1), u"%") : QString();
}

/// "9 012 ± 180"
QString power_text(double power, const std::optional<double>& half_width)
{
    return half_width ? QStringLiteral("%1%2±%2%3").arg(whole_text(power), QChar(0x00A0), whole_text(*half_width)) : whole_text(power);
}

QString remark_of(const PowerEstimate& estimate, bool doubtful)
{
    if (!estimate.power)
        return estimate.missing.empty() ? tr_("not known") : to_qstring(estimate.missing);
    if (!estimate.remark.empty())
        return to_qstring(estimate.remark);
    return doubtful ? tr_("stands apart from the others") : !estimate.in_mean ? tr_("left out of the mean") : QString();
}

FigureTable power_table(const PowerAgreement& power, double rated)
{
    FigureTable table{{tr_("Estimate"), tr_("Power, kW"), QStringLiteral("±"), tr_("of the rating"), tr_("Remark")}, {}};
    for (std::size_t i = 0; i < power.estimates.size(); ++i) {
        const PowerEstimate& estimate = power.estimates[i];
        table.rows.push_back({to_qstring(estimate.words), estimate.power ? whole_text(*estimate.power) : QString(),
                              estimate.half_width ? whole_text(*estimate.half_width) : QString(),
                              estimate.power ? per_cent_of_rating(*estimate.power, rated) : QString(),
                              remark_of(estimate, power.doubtful == i)});
    }
    if (power.mean)
        table.rows.push_back({tr_("Weighted mean"), whole_text(*power.mean),
                              power.mean_half_width ? whole_text(*power.mean_half_width) : QString(),
                              per_cent_of_rating(*power.mean, rated), QString()});
    if (power.typed_power)
        table.rows.push_back({tr_("Typed load"), whole_text(*power.typed_power), QString(),
                              per_cent_of_rating(*power.typed_power, rated), tr_("all is compared at this")});
    return table;
}

class Builder
{
public:
    Builder(const PowerAgreement& power, double rated) : power_(power), rated_(rated) {}

    Figure figure()
    {
        figure_.name = tr_("Power by every way that the reading offers");
        figure_.y_grid = true;
        for (std::size_t i = 0; i < power_.estimates.size(); ++i)
            if (power_.estimates[i].power)
                add_estimate(power_.estimates[i], power_.doubtful == i);
        if (power_.mean)
            add(tr_("Weighted mean"), {*power_.mean, 0.0, FigureRole::in_hand, power_.mean_half_width,
                                       label(*power_.mean, power_.mean_half_width), false, 0.0, {}});
        if (power_.typed_power) {
            widen(*power_.typed_power, 0.0);
            figure_.marks.push_back({*power_.typed_power, true, FigureRole::guide, tr_("typed load %1").arg(whole_text(*power_.typed_power))});
        }
        set_ranges();
        return figure_;
    }

private:
    QString label(double power, const std::optional<double>& half_width) const
    {
        const QString share = per_cent_of_rating(power, rated_);
        return share.isEmpty() ? power_text(power, half_width) : QStringLiteral("%1 · %2").arg(power_text(power, half_width), share);
    }
    void widen(double power, double half)
    {
        low_ = std::min(low_, power - half);
        high_ = std::max(high_, power + half);
    }
    void add(const QString& words, FigureDot dot)
    {
        widen(dot.x, dot.x_half.value_or(0.0));
        dot.y = -static_cast<double>(figure_.y_ticks.size());
        figure_.y_ticks.push_back({dot.y, words});
        figure_.dots.push_back(dot);
    }
    void add_estimate(const PowerEstimate& estimate, bool doubtful)
    {
        const QString number = power_text(*estimate.power, estimate.half_width);
        const QString words = doubtful          ? tr_("%1 · in doubt").arg(number)
                              : !estimate.in_mean ? tr_("%1 · left out").arg(number)
                                                  : label(*estimate.power, estimate.half_width);
        add(to_qstring(estimate.words), {*estimate.power, 0.0, FigureRole::other, estimate.half_width, words, !estimate.in_mean || doubtful, 0.0, {}});
    }
    void set_ranges()
    {
        const double middle = 0.5 * (low_ + high_), span = std::max(high_ - low_, least_span * middle);
        figure_.x_low = middle - 0.55 * span;
        figure_.x_high = middle + (0.55 + room_for_words) * span;
        figure_.y_high = 0.7;
        figure_.y_low = 0.3 - static_cast<double>(figure_.y_ticks.size());
        figure_.x_title = tr_("kW");
        figure_.lines_high = static_cast<int>(figure_.y_ticks.size()) + 2;
    }

    const PowerAgreement& power_;
    double rated_;
    double low_ = std::numeric_limits<double>::max(), high_ = std::numeric_limits<double>::lowest();
    Figure figure_;
};

} // namespace

SideView power_view(const PowerAgreement& power, const Engine& engine)
{
    SideView view;
    const double rated = engine.rated_power.value() / 1000.0;
    const bool any = std::any_of(power.estimates.begin(), power.estimates.end(), [](const PowerEstimate& e) { return e.power.has_value(); });
    view.table = power_table(power, rated);
    QStringList unknown;
    for (const PowerEstimate& estimate : power.estimates)
        if (!estimate.power)
            unknown.append(tr_("%1: %2").arg(to_qstring(estimate.words), remark_of(estimate, false)));
    if (!any) {
        view.empty = tr_("This reading offers no way to the power. Read the torque meter or the switchboard, mean indicated "
                         "pressures, turbocharger speed, fuel index or fuel consumption.");
        view.second_sentence = unknown.join(u'\n');
        return view;
    }
    view.sentence = to_qstring(power.sentence);
    view.figures.push_back(Builder(power, rated).figure());
    view.second_sentence = unknown.join(u'\n');
    return view;
}

} // namespace evenstroke
