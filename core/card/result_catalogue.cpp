// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/card/result_catalogue.h"

#include "core/catalogue_table.h"
#include "core/catalogue_text.h"

#include <map>
#include <stdexcept>

namespace evenstroke::indicator {
namespace {

struct ResultRow
{
    CardResultDescription description;
    ResultSpread spread;
};

const std::vector<ResultRow>& result_rows()
{
    static const std::vector<ResultRow> rows = [] {
        const CatalogueTable table(catalogue_text::card_results);
        if (table.rows() != result_count)
            throw std::logic_error("card_results.csv does not list every result");
        std::vector<ResultRow> made;
        for (std::size_t row = 0; row < table.rows(); ++row)
            made.push_back({{table.cell(row, "key"), table.cell(row, "title"), table.cell(row, "unit")},
                            {table.number(row, "own_spread_two_stroke").value(),
                             table.number(row, "own_spread_four_stroke").value(), table.cell(row, "relative") == "yes"}});
        return made;
    }();
    return rows;
}

const std::map<std::string, std::string, std::less<>>& remark_texts()
{
    static const auto texts = [] {
        const CatalogueTable table(catalogue_text::card_remarks);
        std::map<std::string, std::string, std::less<>> made;
        for (std::size_t row = 0; row < table.rows(); ++row)
            made.emplace(table.cell(row, "code"), table.cell(row, "text"));
        return made;
    }();
    return texts;
}

} // namespace

const CardResultDescription& describe(CardResult result) { return result_rows().at(static_cast<std::size_t>(result)).description; }
const ResultSpread& result_spread(CardResult result) { return result_rows().at(static_cast<std::size_t>(result)).spread; }

Remark make_remark(std::string_view code, const std::vector<std::string>& words, std::optional<double> angle)
{
    const auto found = remark_texts().find(code);
    if (found == remark_texts().end())
        throw std::logic_error("no remark " + std::string(code));
    std::string text = found->second;
    for (std::size_t i = 0; i < words.size(); ++i) {
        const std::string mark = "{" + std::to_string(i) + "}";
        if (const auto at = text.find(mark); at != std::string::npos)
            text.replace(at, mark.size(), words[i]);
    }
    return {std::string(code), text, angle};
}

} // namespace evenstroke::indicator
