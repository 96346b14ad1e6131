// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/card/hand_readings.h"

#include "core/card/result_catalogue.h"
#include "core/plain_text.h"
#include "core/trend/robust.h"

#include <algorithm>
#include <cmath>

namespace evenstroke::indicator {
namespace {

// bar; two peak gauges and indicators of usual class agree within 2 to 3 bar (common practice, no source)
constexpr double worth_asking = 4.0, same_way_from = 2.0;
constexpr std::size_t fewest = 3;
constexpr double nearly_all = 0.75;

struct OffAlike
{
    double middle = 0.0;
    std::size_t alike = 0, all = 0;
};

std::optional<OffAlike> off_alike(const std::vector<ReviewedCard>& cards, CardResult result)
{
    std::vector<double> over;
    for (const ReviewedCard& card : cards)
        for (const CardValue& value : card.values)
            if (value.result == result && value.hand_read)
                over.push_back(value.number - *value.hand_read);
    if (over.size() < fewest)
        return std::nullopt;
    std::vector<double> copy = over;
    OffAlike found;
    found.middle = drift::median_in_place(copy);
    found.all = over.size();
    const double way = found.middle < 0.0 ? -1.0 : 1.0;
    found.alike = static_cast<std::size_t>(std::count_if(over.begin(), over.end(), [&](double d) { return way * d >= same_way_from; }));
    const bool most = static_cast<double>(found.alike) >= nearly_all * static_cast<double>(found.all);
    return most && std::abs(found.middle) >= worth_asking ? std::optional(found) : std::nullopt;
}

} // namespace

std::optional<Remark> remark_on_hand_readings(const std::vector<ReviewedCard>& cards)
{
    const auto maximum = off_alike(cards, CardResult::maximum_pressure);
    const auto compression = off_alike(cards, CardResult::compression_pressure);
    if (!maximum && !compression)
        return std::nullopt;
    const OffAlike& off = maximum ? *maximum : *compression;
    return make_remark("cards_off_readings",
                       {maximum ? "maximum" : "compression", short_number_text(std::round(10.0 * std::abs(off.middle)) / 10.0),
                        off.middle < 0.0 ? "below" : "above", std::to_string(off.alike), std::to_string(off.all)});
}

} // namespace evenstroke::indicator
