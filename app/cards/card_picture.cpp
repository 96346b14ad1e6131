// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/cards/card_picture.h"

#include "app/cards/card_words.h"
#include "app/desk/number_text.h"
#include "core/card/true_curve.h"
#include "core/engine/slider_crank.h"

#include <QCoreApplication>

#include <algorithm>
#include <array>
#include <cmath>
#include <limits>

namespace evenstroke {

namespace {

using indicator::CardResult;
using indicator::Evaluation;
using indicator::ReviewedCard;

constexpr double around_from = -40.0, around_to = 60.0; // degrees shown around dead centre
constexpr double room_above = 0.10, room_below = 0.05;  // of the span of values
constexpr double litres = 1000.0, kilojoules = 1e-3;

QString tr_(const char* text) { return QCoreApplication::translate("evenstroke", text); }

double at(const std::vector<double>& x, const std::vector<double>& y, double where)
{
    if (x.empty())
        return std::numeric_limits<double>::quiet_NaN();
    const auto above = std::lower_bound(x.begin(), x.end(), where);
    if (above == x.begin())
        return y.front();
    if (above == x.end())
        return y.back();
    const auto i = static_cast<std::size_t>(above - x.begin());
    return y[i - 1] + (y[i] - y[i - 1]) * (where - x[i - 1]) / (x[i] - x[i - 1]);
}

/// Fills a picture from one card and what it is compared with.
class Maker
{
public:
    Maker(const CardsInHand& cards, const ReviewedCard& card) : cards_(cards), card_(card), evaluation_(*card.card)
    {
        envelope_ = cards.envelopes.at(card.cylinder);
    }

    CardPicture make(CardView view)
    {
        picture_.view = view;
        picture_.name = tr_("%1 of %2; the same as a table with key A")
                            .arg(card_view_name(view), place_title(cards_.engine(), Place::cylinder(card_.cylinder), false));
        degrees_across();
        switch (view) {
        case CardView::difference: difference(); break;
        case CardView::pressure: pressure(); break;
        case CardView::dead_centre: dead_centre(); break;
        case CardView::volume: volume(false); break;
        case CardView::logarithms: volume(true); break;
        case CardView::heat: heat(); break;
        case CardView::temperature: temperature(); break;
        }
        return std::move(picture_);
    }

private:
    void degrees_across()
    {
        picture_.x_title = tr_("° after firing dead centre");
        picture_.x_unit = QStringLiteral("°");
        const double half = cards_.engine().two_stroke() ? 180.0 : 360.0;
        picture_.x_low = -half;
        picture_.x_high = half;
    }

    CardLine& add(const std::vector<double>& x, const std::vector<double>& y, FigureRole role, const QString& name, int decimals = 1)
    {
        CardLine line;
        line.x = x;
        line.y = y;
        line.role = role;
        line.name = name;
        line.decimals = decimals;
        picture_.lines.push_back(std::move(line));
        return picture_.lines.back();
    }

    /// The range of what is drawn within the range of angles, with room for the words at the top.
    void fit_values()
    {
        double low = std::numeric_limits<double>::max(), high = std::numeric_limits<double>::lowest();
        const auto take = [&](double x, double y) {
            if (x >= picture_.x_low && x <= picture_.x_high && std::isfinite(y)) {
                low = std::min(low, y);
                high = std::max(high, y);
            }
        };
        for (const CardLine& line : picture_.lines)
            for (std::size_t i = 0; i < line.x.size(); ++i)
                take(line.x[i], line.y[i]);
        if (picture_.band)
            for (std::size_t i = 0; i < picture_.band->x.size(); ++i) {
                take(picture_.band->x[i], picture_.band->low[i]);
                take(picture_.band->x[i], picture_.band->high[i]);
            }
        if (low > high)
            return;
        const double span = std::max(high - low, 0.5);
        picture_.y_low = low - room_below * span;
        picture_.y_high = high + room_above * span;
    }

    void difference()
    {
        if (!card_.comparison) {
            picture_.empty = no_healthy_words(cards_);
            return;
        }
        const indicator::Comparison& with = *card_.comparison;
        picture_.is_signed = true;
        picture_.y_title = tr_("bar: this card minus the healthy one; shaded: what the uncertainty explains");
        CardBand band{with.angle, {}, {}};
        for (const double half : with.half_width) {
            band.low.push_back(-half);
            band.high.push_back(half);
        }
        picture_.band = std::move(band);
        add(with.angle, with.difference, FigureRole::in_hand, tr_("difference, bar"));
        add(with.angle, with.half_width, FigureRole::limit, tr_("±")); // told by the cursor; the band draws it
        for (const indicator::PartDifference& part : with.parts)
            picture_.parts.push_back({part.from, part.to, part_name(part.part), part.clear});
        picture_.beyond = beyond(with);
        fit_values();
        const double most = std::max(std::abs(picture_.y_low), std::abs(picture_.y_high));
        picture_.y_low = std::min(picture_.y_low, -0.25 * most);
        picture_.y_high = std::max(picture_.y_high, 0.35 * most);
        picture_.sentence = difference_sentence(cards_, card_);
    }

    /// What the uncertainty does not explain.
    static CardBand beyond(const indicator::Comparison& with)
    {
        CardBand area{with.angle, {}, {}};
        for (std::size_t i = 0; i < with.angle.size(); ++i) {
            const double difference = with.difference[i], edge = std::copysign(with.half_width[i], difference);
            const bool outside = std::abs(difference) > with.half_width[i];
            area.low.push_back(outside ? std::min(difference, edge) : edge);
            area.high.push_back(outside ? std::max(difference, edge) : edge);
        }
        return area;
    }

    void add_healthy()
    {
        if (card_.comparison)
            add(card_.comparison->angle, card_.comparison->healthy, FigureRole::other, tr_("healthy, bar")).dashed = true;
    }

    void pressure()
    {
        picture_.y_title = card_.comparison ? tr_("bar abs: this cylinder; dashed: its healthy card; thin: the others")
                                            : tr_("bar abs: this cylinder; thin: the others");
        for (const auto& [cylinder, envelope] : cards_.envelopes)
            if (cylinder != card_.cylinder)
                picture_.others.push_back(envelope);
        picture_.cycles = envelope_;
        add_healthy();
        const indicator::TrueSamples cycle = indicator::true_samples(evaluation_);
        add(cycle.angle, cycle.pressure, FigureRole::in_hand, tr_("this card, bar"));
        add_spots(cycle);
        fit_values();
        picture_.sentence = spread_sentence(evaluation_);
    }

    void add_spots(const indicator::TrueSamples& cycle)
    {
        int number = 0;
        for (const indicator::Remark& remark : card_.remarks) {
            ++number;
            if (remark.angle && *remark.angle >= picture_.x_low && *remark.angle <= picture_.x_high)
                picture_.spots.push_back({*remark.angle, at(cycle.angle, cycle.pressure, *remark.angle), number});
        }
    }

    void dead_centre()
    {
        picture_.x_low = around_from;
        picture_.x_high = around_to;
        picture_.y_title = tr_("bar abs; dashed: as without combustion; light: where it was fitted");
        if (evaluation_.window_to > evaluation_.window_from)
            picture_.parts.push_back({std::max(evaluation_.window_from, around_from), evaluation_.window_to, QString(), true});
        picture_.cycles = envelope_;
        add(evaluation_.line_angle, evaluation_.line_pressure, FigureRole::other, tr_("without combustion, bar")).dashed = true;
        const indicator::TrueSamples cycle = indicator::true_samples(evaluation_);
        add(cycle.angle, cycle.pressure, FigureRole::in_hand, tr_("this card, bar"));
        add_spots(cycle);
        fit_values();
        picture_.marks.push_back({0.0, true, FigureRole::guide, tr_("dead centre")});
        if (const auto& start = evaluation_[CardResult::start_of_combustion])
            picture_.marks.push_back({start->value, true, FigureRole::other, tr_("start of combustion")});
        picture_.sentence = fit_sentence(evaluation_);
    }

    std::vector<double> volumes(const std::vector<double>& angle) const
    {
        std::vector<double> all;
        const Engine& engine = cards_.engine();
        const auto gear = SliderCrank::make(engine.bore, engine.stroke, engine.rod_length);
        if (!gear || !engine.compression_ratio)
            return all;
        const auto clearance = gear.value().clearance_volume(*engine.compression_ratio);
        if (!clearance)
            return all;
        for (const double degrees : angle)
            all.push_back(litres * gear.value().volume(crank_degrees(degrees).value(), clearance.value().value()));
        return all;
    }

    void add_over_volume(const std::vector<double>& angle, const std::vector<double>& pressure, FigureRole role, const QString& name)
    {
        std::vector<double> x = volumes(angle), y = pressure;
        if (picture_.logarithmic)
            for (std::size_t i = 0; i < x.size(); ++i) {
                x[i] = std::log10(x[i]);
                y[i] = std::log10(std::max(y[i], 0.1));
            }
        if (!x.empty()) {
            x.push_back(x.front()); // one closed cycle
            y.push_back(y.front());
        }
        add(x, y, role, name).dashed = role == FigureRole::other;
    }

    void volume(bool logarithmic)
    {
        picture_.logarithmic = logarithmic;
        picture_.x_unit = tr_("l");
        picture_.x_title = logarithmic ? tr_("volume, l, logarithmic") : tr_("volume, l");
        picture_.y_title = logarithmic ? tr_("bar abs, logarithmic: this card; dashed: the healthy one")
                                       : tr_("bar abs: this card; dashed: the healthy one");
        if (!cards_.engine().compression_ratio) {
            picture_.empty = tr_("The volume needs the compression ratio. Enter it on the page Engine (key G).");
            return;
        }
        if (card_.comparison)
            add_over_volume(card_.comparison->angle, card_.comparison->healthy, FigureRole::other, QString());
        const indicator::TrueSamples cycle = indicator::true_samples(evaluation_);
        add_over_volume(cycle.angle, cycle.pressure, FigureRole::in_hand, QString());
        const auto& x = picture_.lines.back().x;
        const auto [low, high] = std::minmax_element(x.begin(), x.end());
        const double room = 0.03 * (*high - *low);
        picture_.x_low = *low - room;
        picture_.x_high = *high + room;
        fit_values();
        picture_.sentence = exponent_sentence(evaluation_);
    }

    void heat()
    {
        if (!evaluation_.heat) {
            picture_.empty = tr_("The heat is not known: it needs the compression ratio, the angles at which the cylinder closes and opens, "
                                 "the speed and a dead centre.");
            return;
        }
        const indicator::HeatRelease& found = *evaluation_.heat;
        picture_.y_title = tr_("kJ a cycle: heat released; dashed: what the gas took up");
        std::vector<double> gross, net;
        for (std::size_t i = 0; i < found.angle.size(); ++i) {
            gross.push_back(kilojoules * found.gross[i]);
            net.push_back(kilojoules * found.net[i]);
        }
        add(found.angle, net, FigureRole::other, tr_("gas, kJ")).dashed = true;
        add(found.angle, gross, FigureRole::in_hand, tr_("released, kJ"));
        picture_.x_low = -30.0;
        picture_.x_high = found.angle.empty() ? 120.0 : found.angle.back();
        fit_values();
        for (const auto& [angle, name] : {std::pair(found.ca10, tr_("10 %")), std::pair(found.ca50, tr_("50 %")), std::pair(found.ca90, tr_("90 %"))})
            if (angle)
                picture_.marks.push_back({*angle, true, FigureRole::guide, name});
        picture_.sentence = heat_sentence(evaluation_);
    }

    void temperature()
    {
        if (!evaluation_.heat) {
            picture_.empty = tr_("The gas temperature is not known: it needs the compression ratio, the angles at which the cylinder closes "
                                 "and opens, the speed and the charge temperature.");
            return;
        }
        picture_.y_title = tr_("K, mean over the cylinder, while it is closed");
        add(evaluation_.heat->angle, evaluation_.heat->kelvin, FigureRole::in_hand, tr_("gas, K"), 0);
        picture_.x_low = evaluation_.heat->angle.empty() ? -120.0 : evaluation_.heat->angle.front();
        picture_.x_high = evaluation_.heat->angle.empty() ? 120.0 : evaluation_.heat->angle.back();
        fit_values();
        picture_.sentence = temperature_sentence(evaluation_);
    }

    const CardsInHand& cards_;
    const ReviewedCard& card_;
    const Evaluation& evaluation_;
    std::shared_ptr<const CycleEnvelope> envelope_;
    CardPicture picture_;
};

} // namespace

QString card_view_name(CardView view)
{
    switch (view) {
    case CardView::difference: return tr_("difference");
    case CardView::pressure: return tr_("pressure");
    case CardView::dead_centre: return tr_("dead centre");
    case CardView::volume: return tr_("p–V");
    case CardView::logarithms: return tr_("log p–V");
    case CardView::heat: return tr_("heat");
    case CardView::temperature: break;
    }
    return tr_("gas");
}

CardPicture make_card_picture(const CardsInHand& cards, int cylinder, CardView view)
{
    const ReviewedCard* card = cards.find(cylinder);
    if (card && card->card)
        return Maker(cards, *card).make(view);
    CardPicture picture;
    picture.view = view;
    picture.empty = card && card->problem ? to_qstring(card->problem->text())
                                          : tr_("%1 has no card with this reading.").arg(place_title(cards.engine(), Place::cylinder(cylinder)));
    return picture;
}

FigureTable card_table(const CardsInHand& cards, int cylinder)
{
    FigureTable table;
    const ReviewedCard* card = cards.find(cylinder);
    if (!card || !card->card)
        return table;
    const indicator::TrueSamples cycle = indicator::true_samples(*card->card);
    const auto& heat = card->card->heat;
    table.heading = {tr_("Crank angle, °"), tr_("Pressure, bar abs")};
    if (card->comparison)
        table.heading << tr_("Healthy, bar abs") << tr_("Difference, bar") << tr_("±, bar");
    if (heat)
        table.heading << tr_("Heat released, kJ") << tr_("Gas, K");
    if (cycle.angle.empty())
        return table;
    for (double angle = std::ceil(cycle.angle.front()); angle <= cycle.angle.back(); angle += 1.0) {
        // Beside the healthy card the pressure of the compared curve, so that the difference is that of the two columns.
        const double pressure = card->comparison ? at(card->comparison->angle, card->comparison->now, angle) : at(cycle.angle, cycle.pressure, angle);
        QStringList row{number_text(angle, 0), number_text(pressure, 2)};
        const auto known = [](double value, const QString& words) { return std::isfinite(value) ? words : QString(); };
        if (card->comparison) {
            const indicator::Comparison& with = *card->comparison;
            const double healthy = at(with.angle, with.healthy, angle), difference = at(with.angle, with.difference, angle),
                         half = at(with.angle, with.half_width, angle);
            row << known(healthy, number_text(healthy, 2)) << known(difference, signed_text(difference, 2)) << known(half, number_text(half, 2));
        }
        if (heat) {
            const bool closed = !heat->angle.empty() && angle >= heat->angle.front() && angle <= heat->angle.back();
            row << (closed ? number_text(kilojoules * at(heat->angle, heat->gross, angle), 2) : QString())
                << (closed ? number_text(at(heat->angle, heat->kelvin, angle), 0) : QString());
        }
        table.rows.push_back(row);
    }
    return table;
}

} // namespace evenstroke
