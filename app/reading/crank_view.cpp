// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/desk/number_text.h"
#include "app/reading/side_views.h"
#include "core/engine/crank_forces.h"
#include "core/engine/shaft_moment.h"
#include "core/trend/conditions.h"

#include <QCoreApplication>

#include <algorithm>
#include <cmath>
#include <limits>

namespace evenstroke {

namespace {

constexpr double pascals_a_bar = 1e5, newtons_a_kilonewton = 1e3;
constexpr double whole_cycle_reach = 1e-6; // degrees; a card that already repeats its first point

QString tr_(const char* text) { return QCoreApplication::translate("evenstroke", text); }

/// One cycle of a card, closed: degrees, bar as written.
struct Cycle
{
    std::vector<double> degrees, bar;
};

/// The mean over the cycles where they have the same samples, else the first cycle.
Cycle one_cycle(const storage::CardTrace& trace)
{
    Cycle cycle;
    std::size_t length = trace.crank_angle_deg.size();
    if (!trace.cycle.empty())
        length = static_cast<std::size_t>(std::find_if(trace.cycle.begin(), trace.cycle.end(), [&](int number) {
                                              return number != trace.cycle.front();
                                          }) - trace.cycle.begin());
    cycle.degrees.assign(trace.crank_angle_deg.begin(), trace.crank_angle_deg.begin() + static_cast<std::ptrdiff_t>(length));
    cycle.bar.assign(trace.pressure_bar.begin(), trace.pressure_bar.begin() + static_cast<std::ptrdiff_t>(length));
    const std::size_t count = length > 0 ? trace.pressure_bar.size() / length : 0;
    bool alike = count > 1 && count * length == trace.pressure_bar.size();
    for (std::size_t i = length; alike && i < trace.crank_angle_deg.size(); ++i)
        alike = std::abs(trace.crank_angle_deg[i] - cycle.degrees[i % length]) < whole_cycle_reach;
    if (!alike)
        return cycle;
    for (std::size_t i = length; i < trace.pressure_bar.size(); ++i)
        cycle.bar[i % length] += trace.pressure_bar[i];
    for (double& pressure : cycle.bar)
        pressure /= static_cast<double>(count);
    return cycle;
}

void close_cycle(Cycle& cycle, double whole)
{
    if (cycle.degrees.empty() || cycle.degrees.back() - cycle.degrees.front() >= whole - whole_cycle_reach)
        return;
    cycle.degrees.push_back(cycle.degrees.front() + whole);
    cycle.bar.push_back(cycle.bar.front());
}

/// The forces of all cylinders that have a card.
class Gear
{
public:
    Gear(const Judgement& judgement, std::size_t reading, const Cards& cards)
        : engine_(judgement.record->engine), taken_(judgement.record->readings[reading]),
          conditions_(find_conditions(engine_, taken_)), cards_(cards), whole_(engine_.two_stroke() ? 360.0 : 720.0)
    {
        load_.moving_mass = engine_.moving_mass;
        if (const auto speed = engine_mean(taken_, "speed", conditions_))
            load_.speed = per_minute(*speed);
        if (!engine_.two_stroke()) // the crankcase breathes to the engine room
            load_.below_piston = bar_absolute(conditions_.barometer_or_one_bar());
        else if (const auto scavenge = engine_mean(taken_, "scavenge_pressure", conditions_))
            load_.below_piston = bar_absolute(*scavenge + conditions_.barometer_or_one_bar());
    }

    Result<CrankForceCurve> forces(int cylinder, Cycle& cycle) const
    {
        const auto gear = SliderCrank::make(engine_.bore, engine_.stroke, engine_.rod_length);
        if (!gear)
            return gear.error();
        const storage::CardTrace& trace = cards_.at(cylinder);
        cycle = one_cycle(trace);
        close_cycle(cycle, whole_);
        std::vector<double> angle, pressure;
        for (const double degrees : cycle.degrees)
            angle.push_back(crank_degrees(degrees).value());
        const double above = trace.gauge ? conditions_.barometer_or_one_bar() : 0.0;
        for (const double bar : cycle.bar)
            pressure.push_back((bar + above) * pascals_a_bar);
        return crank_forces(gear.value(), angle, pressure, load_);
    }

    Result<ShaftMoment> sum() const
    {
        const auto fires = even_firing_angles(engine_.firing_order, engine_.cylinders, cycle_angle(engine_.two_stroke()));
        if (!fires)
            return fires.error();
        std::vector<CylinderMoment> moments;
        for (int cylinder = 1; cylinder <= engine_.cylinders; ++cylinder) {
            CylinderMoment moment;
            moment.cylinder = engine_.cylinder_name(cylinder);
            moment.fires_at = fires.value()[static_cast<std::size_t>(cylinder - 1)];
            if (cards_.contains(cylinder)) {
                Cycle cycle;
                auto curve = forces(cylinder, cycle);
                if (!curve)
                    return curve.error();
                for (const double degrees : cycle.degrees)
                    moment.angle.push_back(crank_degrees(degrees).value());
                moment.moment = std::move(curve.value().turning_moment);
            }
            moments.push_back(std::move(moment));
        }
        return shaft_moment(moments, cycle_angle(engine_.two_stroke()));
    }

    double whole() const { return whole_; }
    bool gauge_without_barometer(int cylinder) const { return cards_.at(cylinder).gauge && !conditions_.barometer; }

private:
    const Engine& engine_;
    const Reading& taken_;
    Conditions conditions_;
    const Cards& cards_;
    double whole_;
    CrankLoad load_;
};

void add_curve(Figure& figure, const std::vector<double>& x, const std::vector<double>& newtons, FigureRole role, const QString& label)
{
    FigureCurve curve;
    curve.x = x;
    curve.role = role;
    curve.label = label;
    for (const double value : newtons)
        curve.y.push_back(value / newtons_a_kilonewton);
    figure.curves.push_back(std::move(curve));
}

void set_ranges(Figure& figure, double step)
{
    double low = std::numeric_limits<double>::max(), high = std::numeric_limits<double>::lowest();
    for (const FigureCurve& curve : figure.curves)
        for (const double y : curve.y) {
            low = std::min(low, y);
            high = std::max(high, y);
        }
    figure.x_low = figure.curves.front().x.front();
    figure.x_high = figure.curves.front().x.back();
    const double span = std::max(high - low, 1e-6);
    figure.y_low = low - 0.06 * span;
    figure.y_high = high + 0.08 * span;
    figure.x_step = step;
    figure.marks.push_back({0.0, false, FigureRole::guide, QString()});
}

FigureTable force_table(const Cycle& cycle, const CrankForceCurve& forces)
{
    FigureTable table{{tr_("Crank angle, °"), tr_("Piston force, kN"), tr_("Guide force, kN"), tr_("Turning moment, kNm")}, {}};
    for (std::size_t i = 0; i < cycle.degrees.size(); ++i)
        table.rows.push_back({number_text(cycle.degrees[i], 1), number_text(forces.piston[i] / newtons_a_kilonewton, 1),
                              number_text(forces.guide[i] / newtons_a_kilonewton, 1),
                              number_text(forces.turning_moment[i] / newtons_a_kilonewton, 2)});
    return table;
}

QString cylinder_words(const Engine& engine, int cylinder, const CrankForceCurve& forces)
{
    const auto highest = [](const std::vector<double>& values) {
        double most = 0.0;
        for (const double value : values)
            most = std::max(most, std::abs(value));
        return whole_text(most / newtons_a_kilonewton);
    };
    const double low = *std::min_element(forces.turning_moment.begin(), forces.turning_moment.end());
    const double high = *std::max_element(forces.turning_moment.begin(), forces.turning_moment.end());
    const QString words = tr_("%1: piston force up to %2 kN, guide force up to %3 kN, turning moment %4 to %5 kNm%6.")
                              .arg(place_title(engine, Place::cylinder(cylinder)), highest(forces.piston), highest(forces.guide),
                                   whole_text(low / newtons_a_kilonewton), whole_text(high / newtons_a_kilonewton));
    return words.arg(forces.gas_force_only ? tr_(" (gas force only: no moving mass is entered)") : QString());
}

void add_moment(SideView& view, const Gear& gear, const ShaftMoment& sum)
{
    Figure figure;
    figure.name = tr_("Turning moment of all cylinders over the firing order");
    figure.y_title = tr_("kNm, all cylinders on the shaft");
    figure.x_title = tr_("° of the shaft, from the first to fire");
    std::vector<double> degrees;
    for (const double angle : sum.angle)
        degrees.push_back(in_degrees(angle * si::radians));
    add_curve(figure, degrees, sum.moment, FigureRole::in_hand, QString());
    set_ranges(figure, gear.whole() / 4.0);
    figure.x_high = gear.whole();
    figure.marks.push_back({sum.mean.value() / newtons_a_kilonewton, false, FigureRole::other,
                            tr_("mean %1").arg(whole_text(sum.mean.value() / newtons_a_kilonewton))});
    view.figures.push_back(figure);
    const auto kilo = [](Torque torque) { return whole_text(torque.value() / newtons_a_kilonewton); };
    view.second_sentence = sum.variation ? tr_("All cylinders together turn the shaft with %1 to %2 kNm around a mean of %3 kNm: it swings "
                                               "by %4 % of the mean. Rigid shaft, no friction.")
                                               .arg(kilo(sum.lowest), kilo(sum.highest), kilo(sum.mean), number_text(100.0 * *sum.variation, 0))
                                         : tr_("The mean turning moment is not above zero: how far it swings is not said.");
}

} // namespace

SideView crank_view(const Judgement& judgement, std::size_t reading, const Cards& cards, int cylinder)
{
    SideView view;
    const Engine& engine = judgement.record->engine;
    if (cards.empty()) {
        view.empty = tr_("No indicator cards are stored with this reading. Key X brings in the files of the indicator; or put them as "
                         "cards/READING/CYLINDER.csv into the engine's folder and take it in on the page History (key H).");
        return view;
    }
    const int shown = cards.contains(cylinder) ? cylinder : cards.begin()->first;
    const Gear gear(judgement, reading, cards);
    Cycle cycle;
    const auto forces = gear.forces(shown, cycle);
    if (!forces) {
        view.empty = to_qstring(forces.error().text());
        return view;
    }
    Figure figure;
    figure.name = tr_("Forces of one cylinder over its crank angle");
    figure.y_title = (engine.two_stroke() ? tr_("kN, %1: piston force, dashed: guide force") : tr_("kN, %1: piston force, dashed: force on the liner"))
                         .arg(place_title(engine, Place::cylinder(shown), false));
    figure.x_title = tr_("° after firing dead centre");
    add_curve(figure, cycle.degrees, forces.value().piston, FigureRole::in_hand, QString());
    add_curve(figure, cycle.degrees, forces.value().guide, FigureRole::other, QString());
    figure.curves[1].dashed = true;
    set_ranges(figure, gear.whole() / 4.0);
    view.figures.push_back(figure);
    view.table = force_table(cycle, forces.value());
    view.sentence = cylinder_words(engine, shown, forces.value());
    if (shown != cylinder)
        view.sentence += u' ' + tr_("%1 has no card.").arg(place_title(engine, Place::cylinder(cylinder)));
    if (gear.gauge_without_barometer(shown))
        view.sentence += u' ' + tr_("No barometer was read: 1 bar is taken.");
    if (const auto sum = gear.sum())
        add_moment(view, gear, sum.value());
    else
        view.second_sentence = tr_("The moment of all cylinders: %1").arg(to_qstring(sum.error().text()));
    return view;
}

} // namespace evenstroke
