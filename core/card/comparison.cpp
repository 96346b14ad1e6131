// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/card/comparison.h"

#include "core/card/compared_results.h"
#include "core/card/difference_balance.h"

#include <algorithm>
#include <cmath>
#include <numeric>

namespace evenstroke::indicator {
namespace {

constexpr double coverage = 2.0;
constexpr double finest = 0.5; // degrees

/// The healthy cards to go between, with their shares; empty where there are none.
std::vector<std::pair<const HealthyCard*, double>> choose(double load, const std::vector<HealthyCard>& healthy)
{
    constexpr double same_point = 0.5; // per cent of load: nothing to go between
    const HealthyCard *below = nullptr, *above = nullptr;
    for (const HealthyCard& card : healthy) {
        if (!card.card || !can_be_compared(*card.card))
            continue;
        if (card.load_percent <= load && (!below || card.load_percent > below->load_percent))
            below = &card;
        if (card.load_percent > load && (!above || card.load_percent < above->load_percent))
            above = &card;
    }
    const HealthyCard* near = !below ? above : !above ? below
                              : load - below->load_percent <= above->load_percent - load ? below : above;
    if (!near)
        return {};
    if (below && above && std::abs(near->load_percent - load) > same_point) {
        const double share = (load - below->load_percent) / (above->load_percent - below->load_percent);
        return {{below, 1.0 - share}, {above, share}};
    }
    if (std::abs(near->load_percent - load) > same_load)
        return {};
    return {{near, 1.0}};
}

struct Part
{
    CyclePart part;
    double from, to;
};

/// Whether the compression pressure itself is another one.
bool compression_differs(const Comparison& comparison)
{
    const auto& difference = comparison.differences[static_cast<std::size_t>(CardResult::compression_pressure)];
    return difference && difference->is_clear();
}

std::vector<Part> lay_out_parts(const Evaluation& now, const Comparison& comparison, double period)
{
    // Just after dead centre the flame has hardly lifted the pressure yet: what the compression lacks still shows most there.
    constexpr double compression_shows_to = 3.0; // degrees; common practice, no source
    const Estimates& healthy = comparison.healthy_results;
    constexpr double usual_end = 40.0, longest_end = 80.0, unknown_close = -90.0, unknown_open = 100.0;
    const double close = now.closes.value_or(unknown_close), open = now.opens.value_or(unknown_open);
    double start = 0.0, end = usual_end;
    const auto& of_now = now[CardResult::start_of_combustion];
    const auto& of_healthy = healthy[static_cast<std::size_t>(CardResult::start_of_combustion)];
    if (of_now || of_healthy)
        start = std::min(of_now ? of_now->value : 1e9, of_healthy ? of_healthy->value : 1e9);
    if (compression_differs(comparison))
        start = std::max(start, compression_shows_to);
    if (const auto& late = healthy[static_cast<std::size_t>(CardResult::ca90)])
        end = std::clamp(late->value, start + 10.0, std::min(longest_end, open - 10.0));
    std::vector<Part> parts{{CyclePart::compression, close, start}, {CyclePart::combustion, start, end},
                            {CyclePart::expansion, end, open}};
    if (now.closes && now.opens)
        parts.push_back({CyclePart::gas_exchange, open, close + period});
    return parts;
}

class Comparer
{
public:
    Comparer(std::vector<DifferenceMember> members, const LoadsAndCharges& known) : members_(std::move(members)), known_(known) {}
    void fill_curves(Comparison& comparison) const;
    void fill_parts(Comparison& comparison) const;

private:
    const DifferenceMember& now() const { return members_.front(); }
    double healthy_at(double angle) const;
    /// What all angles near each other are off alike, as a linear part of the difference at one angle.
    struct Moves
    {
        std::vector<Unknowns> slopes;
        std::vector<double> cycles;               ///< bar, one standard deviation, by member
        std::vector<double> heated;
        double load = 0.0, charge = 0.0, between = 0.0; ///< bar, one standard deviation
    };
    Moves moves_at(double angle) const;
    void add(Moves& sum, const Moves& here) const;
    void divide(Moves& sum, double by) const;
    bool look_about(double angle, const Comparison& comparison, PartDifference& found) const;
    std::optional<PartDifference> over_part(const Part& part, const Comparison& comparison) const;
    double variance(const Moves& moves) const;
    double noise_variance() const;

    std::vector<DifferenceMember> members_;
    LoadsAndCharges known_;
};

double Comparer::healthy_at(double angle) const
{
    double sum = 0.0;
    for (std::size_t m = 1; m < members_.size(); ++m)
        sum -= members_[m].weight * members_[m].brought(angle);
    return sum;
}

Comparer::Moves Comparer::moves_at(double angle) const
{
    Moves moves;
    double combustion = 0.0, line = 0.0;
    for (const DifferenceMember& member : members_) {
        moves.slopes.push_back(member.pressure_slopes(angle));
        const double burnt = member.combustion(angle);
        moves.cycles.push_back(member.cycle_scatter * burnt);
        moves.heated.push_back(heated_spread * hot_share(std::remainder(angle, now().curve.period())));
        if (&member == &now())
            continue;
        combustion -= member.weight * burnt;
        line -= member.weight * (member.curve.has_line() ? member.curve.unfired(angle) : member.curve.pressure(angle));
    }
    moves.load = known_.load_spread * combustion;
    moves.charge = known_.charge_spread * line;
    if (members_.size() > 2)
        moves.between = known_.between * (members_[1].brought(angle) - members_[2].brought(angle));
    return moves;
}

double Comparer::variance(const Moves& moves) const
{
    double sum = shared_variance(members_, moves.slopes);
    for (std::size_t m = 0; m < members_.size(); ++m) {
        const double square = members_[m].weight * members_[m].weight;
        sum += square * (moves.cycles[m] * moves.cycles[m] + moves.heated[m] * moves.heated[m]);
    }
    return sum + moves.load * moves.load + moves.charge * moves.charge + moves.between * moves.between;
}

double Comparer::noise_variance() const
{
    double sum = 0.0;
    for (const DifferenceMember& member : members_)
        sum += member.weight * member.weight * member.card->trace.noise_mean * member.card->trace.noise_mean;
    return sum;
}

void Comparer::fill_curves(Comparison& comparison) const
{
    const double period = now().curve.period(), step = std::max(now().curve.step(), finest);
    const auto count = static_cast<std::size_t>(std::lround(period / step));
    const double noise = noise_variance();
    for (std::size_t i = 0; i < count; ++i) {
        const double angle = -0.5 * period + static_cast<double>(i) * step;
        comparison.angle.push_back(angle);
        comparison.now.push_back(now().curve.pressure(angle));
        comparison.healthy.push_back(healthy_at(angle));
        comparison.difference.push_back(comparison.now.back() - comparison.healthy.back());
        comparison.half_width.push_back(coverage * std::sqrt(variance(moves_at(angle)) + noise));
    }
}

void Comparer::add(Moves& sum, const Moves& here) const
{
    for (std::size_t m = 0; m < members_.size(); ++m) {
        for (std::size_t k = 0; k < unknown_count; ++k)
            sum.slopes[m][k] += here.slopes[m][k];
        sum.cycles[m] += here.cycles[m];
        sum.heated[m] += here.heated[m];
    }
    sum.load += here.load;
    sum.charge += here.charge;
    sum.between += here.between;
}

void Comparer::divide(Moves& sum, double by) const
{
    for (std::size_t m = 0; m < members_.size(); ++m) {
        for (double& slope : sum.slopes[m])
            slope /= by;
        sum.cycles[m] /= by;
        sum.heated[m] /= by;
    }
    sum.load /= by;
    sum.charge /= by;
    sum.between /= by;
}

/// Index of the grid angle nearest to an angle of any turn.
std::size_t place_of(double angle, const Comparison& comparison)
{
    const double step = comparison.angle[1] - comparison.angle[0];
    const double period = step * static_cast<double>(comparison.angle.size());
    const double from_start = angle - comparison.angle.front();
    const double within = from_start - std::floor(from_start / period) * period;
    return static_cast<std::size_t>(std::lround(within / step)) % comparison.angle.size();
}

/// The difference about an angle, smoothed so that noise does not choose the place; true where it is clear there.
bool Comparer::look_about(double angle, const Comparison& comparison, PartDifference& found) const
{
    constexpr double smoothed = 2.5, clear_place = 2.0; // degrees either way; half-widths, so four standard deviations
    const double step = comparison.angle[1] - comparison.angle[0];
    const auto reach = static_cast<std::ptrdiff_t>(smoothed / step + 1e-9);
    const auto at = static_cast<std::ptrdiff_t>(place_of(angle, comparison)), n = static_cast<std::ptrdiff_t>(comparison.angle.size());
    double place = 0.0, places = 0.0;
    for (std::ptrdiff_t beside = -reach; beside <= reach; ++beside)
        if (const double d = comparison.difference[static_cast<std::size_t>((at + beside + n) % n)]; std::isfinite(d))
            place += d, ++places;
    place /= places;
    if (std::abs(place) > std::abs(found.largest)) {
        found.largest = place;
        found.largest_at = comparison.angle[static_cast<std::size_t>(at)];
    }
    const double half_width = comparison.half_width[static_cast<std::size_t>(at)], noise = noise_variance();
    const double without_noise = std::max(0.0, half_width * half_width / (coverage * coverage) - noise);
    return std::abs(place) > clear_place * coverage * std::sqrt(without_noise + noise / places);
}

/// What is off alike at all angles of a part does not average out over it: its effects are averaged, then squared.
std::optional<PartDifference> Comparer::over_part(const Part& part, const Comparison& comparison) const
{
    constexpr double clear_mean = 1.5; // half-widths: three standard deviations
    const double step = comparison.angle[1] - comparison.angle[0];
    PartDifference found{part.part, part.from, part.to};
    Moves mean;
    mean.slopes.resize(members_.size());
    mean.cycles.resize(members_.size());
    mean.heated.resize(members_.size());
    double samples = 0.0;
    for (double angle = std::ceil(part.from / step) * step; angle <= part.to; angle += step) {
        const double difference = comparison.difference[place_of(angle, comparison)];
        if (!std::isfinite(difference))
            continue;
        ++samples;
        found.mean += difference;
        add(mean, moves_at(angle));
        if (look_about(angle, comparison, found))
            found.clear = true;
    }
    if (samples < 3.0)
        return std::nullopt;
    found.mean /= samples;
    divide(mean, samples);
    found.mean_half_width = coverage * std::sqrt(variance(mean) + noise_variance() / samples);
    found.clear = found.clear || std::abs(found.mean) > clear_mean * found.mean_half_width;
    return found;
}

void Comparer::fill_parts(Comparison& comparison) const
{
    for (const Part& part : lay_out_parts(*now().card, comparison, now().curve.period()))
        if (const auto found = over_part(part, comparison))
            comparison.parts.push_back(*found);
}

} // namespace

bool can_be_compared(const Evaluation& card)
{
    const auto misplaced = [](const Remark& remark) { return remark.code == "wrong_cylinder_or_mark"; };
    return card.trace.angle.size() > 100 && !card.trace.coarse &&
           std::none_of(card.remarks.begin(), card.remarks.end(), misplaced);
}

std::optional<Comparison> compare(const Evaluation& now, double load_percent, std::optional<double> scavenge_pressure,
                                  const std::vector<HealthyCard>& healthy)
{
    if (!can_be_compared(now))
        return std::nullopt;
    const auto chosen = choose(load_percent, healthy);
    if (chosen.empty())
        return std::nullopt;
    Comparison comparison;
    const auto doubtful = [](const Evaluation& card) {
        return !card.carried || card.method == CalibrationMethod::offset_assumed;
    };
    comparison.dead_centre_assumed = doubtful(now);
    comparison.charge_pressure_taken = scavenge_pressure && *scavenge_pressure > 0.0;
    for (const auto& [card, share] : chosen) {
        comparison.from.push_back({card->reading, card->load_percent, share});
        comparison.dead_centre_assumed = comparison.dead_centre_assumed || doubtful(*card->card);
        comparison.charge_pressure_taken = comparison.charge_pressure_taken && card->scavenge_pressure &&
                                           *card->scavenge_pressure > 0.0 && card->card->line_angle.size() > 1;
    }
    std::vector<DifferenceMember> members;
    members.emplace_back(now, 1.0);
    for (const auto& [card, share] : chosen) {
        members.emplace_back(*card->card, -share);
        if (comparison.charge_pressure_taken)
            members.back().charge_ratio = *scavenge_pressure / *card->scavenge_pressure;
        if (chosen.size() == 1 && card->load_percent > 0.0 && load_percent > 0.0)
            members.back().fuel_ratio = std::pow(load_percent / card->load_percent, combustion_over_load);
    }
    const LoadsAndCharges known = weigh_loads(comparison, load_percent);
    compare_results(comparison, members, known);
    const Comparer comparer(std::move(members), known);
    comparer.fill_curves(comparison);
    comparer.fill_parts(comparison);
    return comparison;
}

} // namespace evenstroke::indicator
