// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/trend/drift_catalogue.h"

#include "core/catalogue_table.h"
#include "core/catalogue_text.h"

#include <stdexcept>

namespace evenstroke::drift {

namespace {

Subject subject_of(const std::string& text)
{
    if (text == "cylinder")
        return Subject::cylinder;
    if (text == "engine")
        return Subject::engine;
    if (text == "cylinder_median")
        return Subject::cylinder_median;
    throw std::logic_error("drift catalogue: no such subject: " + text);
}

std::vector<CatalogueChannel> read_channels()
{
    std::vector<CatalogueChannel> channels;
    const CatalogueTable table(catalogue_text::drift_channels);
    for (std::size_t row = 0; row < table.rows(); ++row) {
        const std::string& quantity = table.cell(row, "quantity");
        const std::string& typed = table.cell(row, "typed_quantity");
        channels.push_back(
            {quantity, typed.empty() ? quantity : typed, subject_of(table.cell(row, "subject")),
             table.number(row, "noise").value(), table.number(row, "offset_spread").value(),
             table.cell(row, "deviation_form") == "percent" ? DeviationForm::percent
                                                            : DeviationForm::difference,
             table.cell(row, "unit"), table.number(row, "row_ratio_low").value_or(0.0),
             table.number(row, "row_ratio_high").value_or(1e9), table.cell(row, "evidence") == "yes", table.cell(row, "counted") == "yes"});
    }
    return channels;
}

/// "median exhaust_temperature 0.5" or "fuel_index 1".
Signature::Move read_move(const std::string& text)
{
    const std::vector<std::string> words = split_list(text, ' ');
    const bool median = words.size() == 3 && words.front() == "median";
    if (words.size() != (median ? 3U : 2U))
        throw std::logic_error("drift catalogue: not a move: " + text);
    return {words[words.size() - 2], median, std::stod(words.back())};
}

std::vector<Signature> read_signatures()
{
    std::vector<Signature> signatures;
    const CatalogueTable table(catalogue_text::drift_signatures);
    for (std::size_t row = 0; row < table.rows(); ++row) {
        Signature signature{table.cell(row, "name"),
                            table.cell(row, "title"),
                            subject_of(table.cell(row, "subject")),
                            table.number(row, "weight").value(),
                            {}};
        for (const std::string& move : split_list(table.cell(row, "moves")))
            signature.moves.push_back(read_move(move));
        signatures.push_back(std::move(signature));
    }
    return signatures;
}

std::vector<CustomaryLimit> read_limits()
{
    std::vector<CustomaryLimit> limits;
    const CatalogueTable table(catalogue_text::drift_limits);
    for (std::size_t row = 0; row < table.rows(); ++row)
        limits.push_back({table.cell(row, "quantity"), subject_of(table.cell(row, "subject")),
                          table.cell(row, "engine_kind"), table.number(row, "rise"), table.number(row, "fall"),
                          table.cell(row, "unit")});
    return limits;
}

struct Correlation
{
    std::string quantity, other;
    double amount;
};

std::vector<Correlation> read_correlations()
{
    std::vector<Correlation> correlations;
    const CatalogueTable table(catalogue_text::drift_correlations);
    for (std::size_t row = 0; row < table.rows(); ++row)
        correlations.push_back({table.cell(row, "quantity"), table.cell(row, "other"),
                                table.number(row, "correlation").value()});
    return correlations;
}

} // namespace

std::span<const CustomaryLimit> customary_limits()
{
    static const std::vector<CustomaryLimit> limits = read_limits();
    return limits;
}

const CustomaryLimit* find_customary_limit(std::string_view quantity, Subject subject, bool two_stroke)
{
    for (const CustomaryLimit& limit : customary_limits())
        if (limit.quantity == quantity && limit.subject == subject &&
            (limit.engine_kind == "any" || (limit.engine_kind == "two_stroke") == two_stroke))
            return &limit;
    return nullptr;
}

std::span<const CatalogueChannel> channel_catalogue()
{
    static const std::vector<CatalogueChannel> channels = read_channels();
    return channels;
}

const CatalogueChannel* find_channel(std::string_view quantity, Subject subject)
{
    for (const CatalogueChannel& channel : channel_catalogue())
        if (channel.quantity == quantity && channel.subject == subject)
            return &channel;
    return nullptr;
}

std::span<const Signature> signature_catalogue()
{
    static const std::vector<Signature> signatures = read_signatures();
    return signatures;
}

const Signature* find_signature(std::string_view name)
{
    for (const Signature& signature : signature_catalogue())
        if (signature.name == name)
            return &signature;
    return nullptr;
}

double noise_correlation(std::string_view quantity, std::string_view other)
{
    static const std::vector<Correlation> correlations = read_correlations();
    if (quantity == other)
        return 1.0;
    for (const Correlation& pair : correlations)
        if ((pair.quantity == quantity && pair.other == other) ||
            (pair.quantity == other && pair.other == quantity))
            return pair.amount;
    return 0.0;
}

} // namespace evenstroke::drift
