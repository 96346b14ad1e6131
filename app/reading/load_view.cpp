// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/desk/number_text.h"
#include "app/desk/reading_in_hand.h"
#include "app/reading/side_views.h"
#include "core/trend/conditions.h"

#include <QCoreApplication>

#include <algorithm>
#include <cmath>

namespace evenstroke {

namespace {

constexpr double first_speed = 0.4, last_speed = 1.15, highest_shown = 1.2; // of the rating: where an engine runs
constexpr double speed_step = 0.005;

QString tr_(const char* text) { return QCoreApplication::translate("evenstroke", text); }

struct State
{
    double power = 0.0, speed = 0.0; ///< kW, revolutions a minute
};

std::optional<State> state_of(const Judgement& judgement, std::size_t reading)
{
    const Engine& engine = judgement.record->engine;
    const Reading& taken = judgement.record->readings[reading];
    const auto speed = engine_mean(taken, "speed", find_conditions(engine, taken));
    const auto& load = judgement.readings[reading].load_percent;
    if (!speed || !load)
        return std::nullopt;
    return State{*load / 100.0 * engine.rated_power.value() / 1000.0, *speed};
}

template <typename Line>
FigureCurve curve_of(const Line& line, FigureRole role, const QString& label)
{
    FigureCurve curve;
    curve.role = role;
    curve.label = label;
    for (double x = first_speed; x <= last_speed; x += speed_step)
        if (const std::optional<double> y = line(x); y && *y <= highest_shown) {
            curve.x.push_back(100.0 * x);
            curve.y.push_back(100.0 * *y);
        }
    return curve;
}

void add_lines(Figure& figure, const LoadDiagram& diagram)
{
    const LoadLimits& limits = diagram.limits();
    if (!limits.constant_speed) {
        figure.curves.push_back(curve_of([](double x) { return std::optional(LoadDiagram::propeller_curve(x)); },
                                         FigureRole::other, tr_("propeller")));
        FigureCurve light = curve_of([&](double x) { return diagram.light_curve(x); }, FigureRole::other, QString());
        light.dashed = true;
        if (!light.x.empty())
            figure.curves.push_back(light);
    }
    figure.curves.push_back(curve_of([&](double x) { return diagram.highest_power(x); }, FigureRole::limit, tr_("limit")));
    if (limits.highest_speed)
        figure.marks.push_back({100.0 * *limits.highest_speed, true, FigureRole::limit, QString()});
    if (limits.overload) {
        FigureCurve over;
        over.role = FigureRole::limit;
        over.dashed = true;
        over.x = {100.0 * first_speed + 50.0, 100.0 * limits.highest_speed.value_or(1.0)};
        over.y = {100.0 * *limits.overload, 100.0 * *limits.overload};
        figure.curves.push_back(over);
    }
}

QString missing_words(const Engine& engine)
{
    QStringList missing;
    if (!(engine.rated_power.value() > 0.0))
        missing.append(QStringLiteral("rated_power_kw"));
    if (!(engine.rated_speed.value() > 0.0))
        missing.append(QStringLiteral("rated_speed_rpm"));
    if (!engine.load_limits)
        missing.append(QStringLiteral("load_limits"));
    return missing.isEmpty() ? QString()
                             : tr_("The load diagram needs the limits of this engine. Missing in its description (engine.json): "
                                   "%1. Copy them from the maker's load diagram and take the folder in on the page History "
                                   "(key H). No numbers are taken for granted here.")
                                   .arg(missing.join(QStringLiteral(", ")));
}

void add_readings(SideView& view, Figure& figure, const Judgement& judgement, std::size_t in_hand)
{
    const double rated_power = judgement.record->engine.rated_power.value() / 1000.0;
    const double rated_speed = 60.0 * judgement.record->engine.rated_speed.value();
    view.table.heading = {tr_("Reading"), tr_("Speed, 1/min"), tr_("Power, kW"), tr_("Speed, %"), tr_("Power, %")};
    const std::size_t count = judgement.readings.size();
    for (std::size_t i = 0; i < count; ++i) {
        const auto state = state_of(judgement, i);
        if (!state)
            continue;
        FigureDot dot{100.0 * state->speed / rated_speed, 100.0 * state->power / rated_power, FigureRole::other, {}, {}, false, 0.0, i};
        view.table.rows.insert(view.table.rows.begin(),
                               {reading_title(judgement, i), number_text(state->speed, 1), whole_text(state->power),
                                number_text(dot.x, 1), number_text(dot.y, 1)});
        if (i == in_hand) {
            dot.role = FigureRole::in_hand;
            dot.label = tr_("%1 kW at %2 1/min").arg(whole_text(state->power), number_text(state->speed, 1));
        } else {
            dot.age = static_cast<double>(count - i) / static_cast<double>(count);
        }
        figure.dots.push_back(dot);
    }
    // The one in hand lies over the others.
    std::stable_partition(figure.dots.begin(), figure.dots.end(), [](const FigureDot& dot) { return dot.role == FigureRole::other; });
}

void set_ranges(Figure& figure, bool constant_speed)
{
    figure.x_low = constant_speed ? 90.0 : 100.0 * first_speed + 10.0;
    figure.x_high = 110.0;
    figure.y_low = 0.0;
    figure.y_high = 100.0 * highest_shown;
    for (const FigureDot& dot : figure.dots) {
        figure.x_low = std::min(figure.x_low, 5.0 * std::floor(dot.x / 5.0));
        figure.x_high = std::max(figure.x_high, dot.x + 2.0);
        figure.y_high = std::max(figure.y_high, dot.y + 5.0);
    }
    for (FigureCurve& curve : figure.curves) { // lines stop at the edges
        const auto outside = [&](std::size_t i) { return curve.x[i] < figure.x_low || curve.x[i] > figure.x_high; };
        for (std::size_t i = curve.x.size(); i-- > 0;)
            if (outside(i)) {
                curve.x.erase(curve.x.begin() + static_cast<std::ptrdiff_t>(i));
                curve.y.erase(curve.y.begin() + static_cast<std::ptrdiff_t>(i));
            }
    }
}

} // namespace

SideView load_view(const Judgement& judgement, std::size_t reading)
{
    SideView view;
    const Engine& engine = judgement.record->engine;
    view.empty = missing_words(engine);
    if (!view.empty.isEmpty())
        return view;
    const auto diagram = LoadDiagram::make(engine.rated_power, engine.rated_speed, *engine.load_limits);
    if (!diagram) {
        view.empty = to_qstring(diagram.error().text());
        return view;
    }
    const auto state = state_of(judgement, reading);
    const auto located = diagram.value().locate(state ? std::optional(kilowatts(state->power)) : std::nullopt,
                                                state ? std::optional(per_minute(state->speed)) : std::nullopt);
    view.sentence = located ? to_qstring(located.value().sentence) : to_qstring(located.error().text());
    Figure figure;
    figure.name = tr_("Load diagram");
    figure.x_title = tr_("speed, % of rated");
    figure.y_title = tr_("power, % of rated · from the typed load");
    add_lines(figure, diagram.value());
    add_readings(view, figure, judgement, reading);
    set_ranges(figure, engine.load_limits->constant_speed);
    view.figures.push_back(figure);
    view.second_sentence = tr_("Dashed: light running, overload. ");
    view.second_sentence += engine.load_limits->source.empty()
                               ? tr_("The limits carry no source. The maker's own diagram prevails.")
                               : tr_("Limits: %1. The maker's own diagram prevails.").arg(to_qstring(engine.load_limits->source));
    return view;
}

} // namespace evenstroke
