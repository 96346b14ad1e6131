// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/desk/number_text.h"
#include "app/reading/side_views.h"
#include "core/card/card_wall.h"
#include "core/card/reading_conditions.h"
#include "core/heat/hottest_point.h"
#include "core/heat/wall_chain.h"
#include "core/trend/conditions.h"

#include <QCoreApplication>

#include <algorithm>
#include <cmath>

namespace evenstroke {

namespace {

constexpr double other_load_percent = 5.0; // of load: further off the description's load is named
constexpr double gas_width = 1.0, wall_width = 2.2, layer_width = 0.6, coolant_width = 1.2; // of the drawing, no scale
constexpr double above_hottest = 60.0, below_coolant = 25.0; // K shown beyond the metal

QString tr_(const char* text) { return QCoreApplication::translate("evenstroke", text); }
QString degrees(double celsius_value) { return with_unit(number_text(celsius_value, 0), u"°C"); }

WallSlab slab(double mm, double lambda) { return {millimetres(mm), conductivity(lambda)}; }

/// What the reading says of the coolant.
struct CoolantNow
{
    std::optional<double> celsius_value, pressure; ///< °C, bar absolute
};

CoolantNow coolant_of(const Judgement& judgement, std::size_t reading)
{
    const Reading& taken = judgement.record->readings[reading];
    const Conditions conditions = find_conditions(judgement.record->engine, taken);
    CoolantNow now;
    now.celsius_value = engine_mean(taken, "jacket_outlet_temperature", conditions);
    if (const auto gauge = engine_mean(taken, "jacket_inlet_pressure", conditions))
        now.pressure = *gauge + conditions.barometer_or_one_bar();
    return now;
}

WallChain described(const WallDescription& wall)
{
    WallChain chain;
    chain.gas = wall.gas;
    chain.gas_film = wall.gas_film;
    chain.wall = WallSlab{wall.thickness, wall.conductivity};
    chain.coolant_film = wall.coolant_film;
    chain.coolant = wall.coolant;
    return chain;
}

WallChain with_trial(WallChain chain, const CoolantNow& now, const WallTrial& trial)
{
    if (const auto coolant = trial.coolant ? trial.coolant : now.celsius_value)
        chain.coolant = celsius(*coolant);
    if (trial.deposit && *trial.deposit > 0.0)
        chain.deposit = slab(*trial.deposit, trial.deposit_conductivity.value_or(usual_deposit_conductivity));
    if (trial.scale && *trial.scale > 0.0)
        chain.scale = slab(*trial.scale, trial.scale_conductivity.value_or(usual_scale_conductivity));
    return chain;
}

/// Draws both cross-sections over the same layers.
class Section
{
public:
    Section(const WallChain& before, const WallChain& after, const WallChange& change)
        : before_(before), after_(after), change_(change)
    {
    }

    Figure drawn()
    {
        const double hottest = std::max(in_celsius(change_.before.deposit_surface), in_celsius(change_.after.deposit_surface));
        figure_.y_high = std::min(std::ceil((hottest + above_hottest) / 20.0) * 20.0, in_celsius(*after_.gas));
        figure_.y_low = std::floor((std::min(in_celsius(*before_.coolant), in_celsius(*after_.coolant)) - below_coolant) / 20.0) * 20.0;
        const double deposit = after_.deposit ? layer_width : 0.0, scale = after_.scale ? layer_width : 0.0;
        edges_ = {0.0, gas_width, gas_width + deposit, gas_width + deposit + wall_width, gas_width + deposit + wall_width + scale,
                  gas_width + deposit + wall_width + scale + coolant_width};
        add_layers();
        figure_.x_low = 0.0;
        figure_.x_high = edges_.back();
        figure_.x_numbers = false;
        figure_.curves.push_back(profile(change_.before, before_, FigureRole::other, tr_("described")));
        figure_.curves.push_back(profile(change_.after, after_, FigureRole::in_hand, tr_("now")));
        set_apart();
        figure_.dots.push_back({edges_[2], in_celsius(change_.after.inner_wall), FigureRole::in_hand, {},
                                degrees(in_celsius(change_.after.inner_wall)), false, 0.0, {}});
        finish();
        return figure_;
    }

    /// Against the equivalent thickness of iron all layers hinder the heat alike: one straight line.
    Figure as_iron(const std::vector<EquivalentIron>& before, const std::vector<EquivalentIron>& after)
    {
        add_straight(before, before_, FigureRole::other, tr_("described"));
        double at = 0.0;
        for (const EquivalentIron& part : after) {
            const double width = 1000.0 * part.thickness.value();
            figure_.layers.push_back({at, at + width, QString(), part.part == "wall"});
            at += width;
        }
        add_straight(after, after_, FigureRole::in_hand, tr_("now"));
        figure_.x_low = 0.0;
        figure_.x_high = std::max(figure_.curves.front().x.back(), at);
        figure_.x_title = tr_("mm of cast iron that hinder the heat as much");
        figure_.y_low = 0.0;
        figure_.y_high = std::ceil(in_celsius(*after_.gas) / 100.0) * 100.0;
        finish();
        return figure_;
    }

private:
    void finish()
    {
        figure_.name = tr_("Temperature from the gas to the coolant");
        figure_.y_title = tr_("°C");
    }
    void add_layers()
    {
        figure_.layers.push_back({edges_[0], edges_[1], tr_("gas film"), false});
        if (after_.deposit)
            figure_.layers.push_back({edges_[1], edges_[2], tr_("deposit"), false});
        figure_.layers.push_back({edges_[2], edges_[3], tr_("wall, %1 mm").arg(number_text(1000.0 * after_.wall->thickness.value(), 0)), true});
        if (after_.scale)
            figure_.layers.push_back({edges_[3], edges_[4], tr_("scale"), false});
        figure_.layers.push_back({edges_[4], edges_[5], tr_("coolant film"), false});
    }
    FigureCurve profile(const WallTemperatures& t, const WallChain& chain, FigureRole role, const QString& label) const
    {
        FigureCurve curve;
        curve.role = role;
        curve.label = label;
        const double gas = in_celsius(*chain.gas), surface = in_celsius(t.deposit_surface);
        // The gas lies far above the plot: its line comes in at the top edge.
        const double share = gas > figure_.y_high ? (gas - figure_.y_high) / (gas - surface) : 0.0;
        curve.x = {edges_[0] + share * (edges_[1] - edges_[0]), edges_[1], edges_[2], edges_[3], edges_[4], edges_[5]};
        curve.y = {std::min(gas, figure_.y_high), surface, in_celsius(t.inner_wall), in_celsius(t.outer_wall),
                   in_celsius(t.wetted_surface), in_celsius(*chain.coolant)};
        return curve;
    }
    /// Two words at nearly one height: the one that is not in hand goes.
    void set_apart()
    {
        if (std::abs(figure_.curves[0].y.back() - figure_.curves[1].y.back()) < 0.07 * (figure_.y_high - figure_.y_low))
            figure_.curves[0].label.clear();
    }
    void add_straight(const std::vector<EquivalentIron>& parts, const WallChain& chain, FigureRole role, const QString& label)
    {
        double total = 0.0;
        for (const EquivalentIron& part : parts)
            total += 1000.0 * part.thickness.value();
        figure_.curves.push_back({{0.0, total}, {in_celsius(*chain.gas), in_celsius(*chain.coolant)}, role,
                                  role == FigureRole::in_hand ? label : QString(), false, false});
    }

    const WallChain &before_, &after_;
    const WallChange& change_;
    std::vector<double> edges_;
    Figure figure_;
};

FigureTable wall_table(const WallChain& before, const WallChain& after, const WallChange& change)
{
    FigureTable table{{tr_("Where"), tr_("Described, °C"), tr_("Now, °C"), tr_("Change, K")}, {}};
    const auto add = [&](const QString& words, Temperature was, Temperature is) {
        table.rows.push_back({words, number_text(in_celsius(was), 1), number_text(in_celsius(is), 1),
                              signed_text(is.value() - was.value(), 1)});
    };
    add(tr_("Gas, mean"), *before.gas, *after.gas);
    if (after.deposit)
        add(tr_("Surface of the deposit"), change.before.deposit_surface, change.after.deposit_surface);
    add(tr_("Wall, gas side"), change.before.inner_wall, change.after.inner_wall);
    add(tr_("Wall, coolant side"), change.before.outer_wall, change.after.outer_wall);
    if (after.scale)
        add(tr_("Wetted surface"), change.before.wetted_surface, change.after.wetted_surface);
    add(tr_("Coolant"), *before.coolant, *after.coolant);
    table.rows.push_back({tr_("Heat flux, kW/m²"), number_text(change.before.flux.value() / 1000.0, 0),
                          number_text(change.after.flux.value() / 1000.0, 0),
                          tr_("%1 times").arg(number_text(change.flux_ratio, 3))});
    return table;
}

void add_iron_rows(FigureTable& table, const std::vector<EquivalentIron>& parts)
{
    double total = 0.0;
    for (const EquivalentIron& part : parts) {
        total += 1000.0 * part.thickness.value();
        table.rows.push_back({tr_("%1 as iron, mm").arg(to_qstring(part.part)), QString(),
                              number_text(1000.0 * part.thickness.value(), 1), QString()});
    }
    table.rows.push_back({tr_("all as iron, mm"), QString(), number_text(total, 1), QString()});
}

/// Whether the reading was taken at another load than the wall was described at.
bool is_other_load(const std::optional<double>& load, const WallDescription& wall)
{
    return load && std::abs(*load - wall.load_percent) > other_load_percent;
}

QString result_words(const WallDescription& wall, const WallChange& change, const std::optional<double>& load)
{
    if (is_other_load(load, wall)) // the gas is another one there, and nobody has said how
        return tr_("Hottest point of the %1: not known at %2 % load, since it is described at %3 %. What this reading's coolant would make "
                   "of it at %3 %: %4, %5 K against its description.")
            .arg(to_qstring(wall.part), number_text(*load, 0), number_text(wall.load_percent, 0), degrees(in_celsius(change.after.inner_wall)),
                 signed_text(change.inner_wall.value(), 0));
    HottestPoint point;
    point.wall = change.after.inner_wall;
    point.flux_ratio = change.flux_ratio;
    WallLimits limits;
    if (wall.highest)
        limits.highest = wall.highest;
    limits.lowest = wall.lowest;
    QStringList words{tr_("Hottest point of the %1: %2, %3 K against its description; heat flux %4 times.")
                          .arg(to_qstring(wall.part), degrees(in_celsius(change.after.inner_wall)),
                               signed_text(change.inner_wall.value(), 0), number_text(change.flux_ratio, 2))};
    words.append(to_qstring(judge_wall(point, limits).sentence));
    if (change.after.boiling) {
        QString boiling = to_qstring(boiling_text(*change.after.boiling));
        boiling[0] = boiling[0].toUpper();
        words.append(tr_("%1 (coolant saturates at %2).").arg(boiling, degrees(in_celsius(*change.after.saturation))));
    } else {
        words.append(tr_("Boiling is not judged: the pressure of the coolant was not read."));
    }
    return words.join(u' ');
}

indicator::Trace absolute_trace(const storage::CardTrace& card, const Conditions& conditions)
{
    indicator::Trace trace{card.cycle, card.crank_angle_deg, card.pressure_bar};
    if (card.gauge)
        for (double& pressure : trace.pressure)
            pressure += conditions.barometer_or_one_bar();
    return trace;
}

/// Moves the gas side as the two cards say; what was done, or why not, in words.
QString follow_cards(const Judgement& judgement, std::size_t reading, const std::optional<CardPair>& cards, WallChain& after)
{
    if (!cards)
        return tr_("The gas side is that of the description: no two cards of this cylinder at this load are stored.");
    const Engine& engine = judgement.record->engine;
    const auto side = [&](const storage::CardTrace& card, std::size_t of, indicator::Trace& trace) {
        const Reading& taken = judgement.record->readings[of];
        trace = absolute_trace(card, find_conditions(engine, taken));
        return indicator::CardAtReading{trace, indicator::conditions_at(engine, taken)};
    };
    indicator::Trace now, healthy;
    const auto change = indicator::gas_side_change(engine, side(cards->now, reading, now),
                                                   side(cards->healthy, cards->healthy_reading, healthy));
    if (!change)
        return tr_("The gas side is that of the description: %1").arg(to_qstring(change.error().what_happened));
    after.gas_film = HeatTransferCoefficient::from_value(after.gas_film->value() * change.value().film_ratio);
    after.gas = Temperature::from_value(after.gas->value() * change.value().gas_ratio);
    return tr_("Gas side moved as the cards of cylinder %1 moved since %2: film %3 times, mean gas temperature %4 times (Woschni, "
               "closed part of the cycle).")
        .arg(to_qstring(engine.cylinder_name(cards->cylinder)),
             day_text(judgement.record->readings[cards->healthy_reading].taken_at.utc), number_text(change.value().film_ratio, 3),
             number_text(change.value().gas_ratio, 3));
}

QString assumption_words(const Judgement& judgement, std::size_t reading, const WallDescription& wall, const CoolantNow& now,
                         const WallTrial& trial)
{
    QStringList words{tr_("Relative to the description, no claim of its own.")};
    const auto& load = judgement.readings[reading].load_percent;
    if (is_other_load(load, wall))
        words.append(tr_("It was described at %1 % load; this reading was taken at %2 %.")
                         .arg(number_text(wall.load_percent, 0), number_text(*load, 0)));
    if (trial.coolant)
        words.append(tr_("Coolant as tried, %1.").arg(degrees(*trial.coolant)));
    else if (now.celsius_value)
        words.append(tr_("Coolant %1: jacket water out, mean.").arg(degrees(*now.celsius_value)));
    else
        words.append(tr_("No jacket water temperature was read: the coolant is that of the description."));
    if ((trial.deposit && !trial.deposit_conductivity) || (trial.scale && !trial.scale_conductivity))
        words.append(tr_("Deposit %1 and scale %2 W/(m K) where none is typed: common practice, no source.")
                         .arg(number_text(usual_deposit_conductivity, 1), number_text(usual_scale_conductivity, 1)));
    if (!wall.source.empty())
        words.append(tr_("Source: %1.").arg(to_qstring(wall.source)));
    return words.join(u' ');
}

} // namespace

SideView wall_view(const Judgement& judgement, std::size_t reading, std::size_t number, const WallTrial& trial,
                   const std::optional<CardPair>& cards)
{
    SideView view;
    const std::vector<WallDescription>& walls = judgement.record->engine.walls;
    if (walls.empty()) {
        view.empty = tr_("No spot of the wall is described for this engine. Missing in its description (engine.json): walls, a list "
                         "of {part, load_percent, gas_c, gas_film_w_m2k, thickness_mm, conductivity_w_mk, coolant_film_w_m2k, "
                         "coolant_c, source} as the maker or a calculation gives them. Then take the folder in on the page "
                         "History (key H).");
        return view;
    }
    const WallDescription& wall = walls[std::min(number, walls.size() - 1)];
    const CoolantNow now = coolant_of(judgement, reading);
    WallChain before = described(wall), after = with_trial(before, now, trial);
    if (now.pressure)
        before.coolant_pressure = after.coolant_pressure = bar_absolute(*now.pressure);
    const QString gas_words = follow_cards(judgement, reading, cards, after);
    const auto change = wall_change(before, after);
    if (!change) {
        view.empty = to_qstring(change.error().text());
        return view;
    }
    view.sentence = result_words(wall, change.value(), judgement.readings[reading].load_percent);
    view.second_sentence = assumption_words(judgement, reading, wall, now, trial) + u' ' + gas_words;
    view.table = wall_table(before, after, change.value());
    const auto iron_before = equivalent_iron(before), iron_after = equivalent_iron(after);
    if (iron_after)
        add_iron_rows(view.table, iron_after.value());
    Section section(before, after, change.value());
    view.figures.push_back(trial.as_iron && iron_before && iron_after ? section.as_iron(iron_before.value(), iron_after.value())
                                                                      : section.drawn());
    return view;
}

} // namespace evenstroke
