// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/review/reading_review.h"

#include "core/explanation/cautions.h"
#include "core/review/review_context.h"

#include <algorithm>
#include <cmath>

namespace evenstroke {
namespace {

using reviewing::ReviewContext;

constexpr double half_width_in_noise = 2.0; ///< about 95 of 100 sound values

void suspect_moved(std::vector<SuspectedQuantity>& suspected, const ReviewContext& context)
{
    for (const Flag* flag : context.standing) {
        if (flag->absolute_limit || flag->severity == Level::ask)
            continue;
        const std::string why = "a flag says that it has moved";
        suspected.push_back({flag->quantity, flag->subject, why});
        for (const MovedQuantity& moved : flag->moved)
            if (moved.quantity != flag->quantity && reviewing::speaks_of(*flag, moved.quantity))
                suspected.push_back({moved.quantity, flag->subject, why});
    }
}

std::vector<SuspectedQuantity> find_suspected(const ReviewContext& context)
{
    std::vector<SuspectedQuantity> suspected;
    for (const JudgedValue& value : context.judged.values)
        if (value.doubtful && !context.reading.values[value.value_index].confirmed)
            suspected.push_back({value.quantity, value.place, "the value typed is in doubt"});
    suspect_moved(suspected, context);
    return suspected;
}

/// The engine's own scatter about its baseline, where drift judging has learned it.
BaselineScatter find_scatter(const Judgement& judgement)
{
    BaselineScatter scatter;
    for (const Trend& trend : judgement.trends) {
        if (!trend.noise || trend.place.kind == Place::Kind::cylinder || trend.own_level)
            continue;
        const std::string& name = quantity(trend.quantity).name;
        if (name == "turbocharger_speed" || name == "fuel_index" || name == "specific_fuel_consumption")
            scatter[name] = half_width_in_noise * *trend.noise;
    }
    return scatter;
}

std::vector<std::string> find_cautions(const ReviewContext& context, const PowerAgreement& power)
{
    std::vector<std::string> named;
    for (const Flag* flag : context.standing)
        named.insert(named.end(), flag->cautions.begin(), flag->cautions.end());
    if (const auto state = reviewing::load_state(context, power); state && state->beyond)
        named.emplace_back("overload");
    std::vector<std::string> ordered;
    for (const Caution& caution : all_cautions())
        if (std::find(named.begin(), named.end(), caution.name) != named.end())
            ordered.push_back(caution.name);
    return ordered;
}

} // namespace

ReadingReview review_reading(const Judgement& judgement, std::size_t reading)
{
    ReviewContext context(judgement, reading);
    ReadingReview review;
    review.reading = reading;
    review.power = agree_on_power(context.engine, context.baseline, context.reading, find_suspected(context),
                                  find_scatter(judgement));
    context.power_in_doubt = !review.power.agrees;
    for (ReviewSection& section :
         std::vector{reviewing::entry_section(context), reviewing::steadiness_section(context),
                     reviewing::power_section(context, review.power), reviewing::air_side_section(context),
                     reviewing::means_section(context), reviewing::cylinders_section(context),
                     reviewing::ship_section(context, review.power), reviewing::fuel_section(context)})
        if (!section.lines.empty() || !section.sentence.empty())
            review.sections.push_back(std::move(section));
    review.cautions = find_cautions(context, review.power);
    return review;
}

} // namespace evenstroke
