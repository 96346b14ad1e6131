// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/explanation/cautions.h"

#include "core/catalogue_table.h"
#include "core/catalogue_text.h"

#include <algorithm>

namespace evenstroke {
namespace {

struct FindingCautions
{
    std::string kind, finding, engine_kind;
    std::vector<std::string> cautions;
};

const std::vector<Caution>& caution_catalogue()
{
    static const std::vector<Caution> catalogue = [] {
        const CatalogueTable table(catalogue_text::cautions);
        std::vector<Caution> cautions;
        for (std::size_t row = 0; row < table.rows(); ++row)
            cautions.push_back({table.cell(row, "name"), table.cell(row, "title"), table.cell(row, "short_text"),
                                table.cell(row, "long_text"), table.cell(row, "authority"),
                                table.cell(row, "emergency") == "yes"});
        return cautions;
    }();
    return catalogue;
}

const std::vector<FindingCautions>& finding_catalogue()
{
    static const std::vector<FindingCautions> catalogue = [] {
        const CatalogueTable table(catalogue_text::finding_cautions);
        std::vector<FindingCautions> findings;
        for (std::size_t row = 0; row < table.rows(); ++row)
            findings.push_back({table.cell(row, "kind"), table.cell(row, "finding"), table.cell(row, "engine_kind"),
                                split_list(table.cell(row, "cautions"))});
        return findings;
    }();
    return catalogue;
}

} // namespace

std::span<const Caution> all_cautions()
{
    return caution_catalogue();
}

const Caution* find_caution(std::string_view name)
{
    for (const Caution& caution : caution_catalogue())
        if (caution.name == name)
            return &caution;
    return nullptr;
}

std::vector<std::string> cautions_for(std::string_view pattern, std::string_view quantity, bool two_stroke)
{
    const std::string_view engine_kind = two_stroke ? "two_stroke" : "four_stroke";
    std::vector<std::string> wanted;
    for (const FindingCautions& entry : finding_catalogue()) {
        const std::string_view finding = entry.kind == "pattern" ? pattern : quantity;
        if (finding.empty() || entry.finding != finding)
            continue;
        if (entry.engine_kind == "any" || entry.engine_kind == engine_kind)
            wanted.insert(wanted.end(), entry.cautions.begin(), entry.cautions.end());
    }
    std::vector<std::string> ordered;
    for (const Caution& caution : caution_catalogue())
        if (std::find(wanted.begin(), wanted.end(), caution.name) != wanted.end())
            ordered.push_back(caution.name);
    return ordered;
}

} // namespace evenstroke
