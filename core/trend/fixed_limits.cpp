// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/trend/fixed_limits.h"

#include "core/catalogue_table.h"
#include "core/catalogue_text.h"

#include <cmath>
#include <map>

namespace evenstroke {
namespace {

struct Custom
{
    double limit;
    std::string unit, source;
};

const Custom* custom_for(const std::string& quantity_name)
{
    static const std::map<std::string, Custom> customs = [] {
        std::map<std::string, Custom> loaded;
        const CatalogueTable table(catalogue_text::fixed_limits);
        for (std::size_t row = 0; row < table.rows(); ++row)
            loaded[table.cell(row, "quantity")] = {table.number(row, "limit").value(), table.cell(row, "unit"),
                                                   table.cell(row, "source")};
        return loaded;
    }();
    const auto found = customs.find(quantity_name);
    return found == customs.end() ? nullptr : &found->second;
}

/// One reading: this cylinder's value and the others' sum, as corrected as they are.
struct Row
{
    std::optional<double> own, apart;
    double sum = 0.0;
    int others = 0;
};

} // namespace

std::optional<FixedLimitOpinion> fixed_limit_opinion(const Judgement& judgement, QuantityId id, Place place)
{
    const Custom* custom = custom_for(quantity(id).name);
    if (!custom || place.kind != Place::Kind::cylinder || !judgement.find_trend(id, place))
        return std::nullopt;
    std::vector<Row> rows(judgement.readings.size());
    for (const Trend& trend : judgement.trends) {
        if (trend.quantity != id || trend.place.kind != Place::Kind::cylinder)
            continue;
        for (const TrendPoint& point : trend.points) {
            if (point.doubtful || point.reading >= rows.size())
                continue;
            Row& row = rows[point.reading];
            const double value = point.corrected.value_or(point.raw);
            if (trend.place == place) {
                row.own = value;
                row.apart = point.apart;
            } else {
                row.sum += value;
                ++row.others;
            }
        }
    }
    FixedLimitOpinion opinion;
    opinion.limit = custom->limit;
    opinion.unit = custom->unit;
    opinion.percent = custom->unit == "%" && quantity(id).name != "fuel_index"; // an index is in per cent itself
    opinion.source = custom->source;
    bool speaking = false;
    for (std::size_t i = 0; i < rows.size(); ++i) {
        if (!rows[i].own || rows[i].others == 0)
            continue;
        const double mean = rows[i].sum / rows[i].others;
        const double limit = opinion.percent ? custom->limit / 100.0 * std::abs(mean) : custom->limit;
        const bool beyond = limit > 0.0 && std::abs(*rows[i].own - mean) > limit;
        if (beyond) {
            ++opinion.beyond;
            if (!speaking)
                opinion.began.push_back(i);
        }
        speaking = beyond;
        if (const auto& apart = rows[i].apart) {
            const double of_mean = mean - (*rows[i].own - *apart);
            opinion.edges.push_back({i, of_mean - limit, of_mean + limit});
        }
    }
    opinion.now = speaking;
    return opinion;
}

} // namespace evenstroke
