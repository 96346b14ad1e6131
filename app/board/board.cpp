// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/board/board.h"

#include "app/desk/flag_words.h"
#include "app/desk/number_text.h"
#include "app/desk/theme.h"
#include "core/explanation/work_outcome.h"

#include <QCoreApplication>

#include <algorithm>
#include <cmath>

namespace evenstroke {

namespace {

constexpr double overscan = 1.6;      // how far a quiet strip reaches beyond its band
constexpr auto three_years = std::chrono::hours(24 * 1096);

QString tr_(const char* text, int n = -1) { return QCoreApplication::translate("evenstroke", text, nullptr, n); }

TimePoint time_of(const Judgement& judgement, std::size_t reading)
{
    return judgement.record->readings.at(reading).taken_at.utc;
}

/// What a strip is made of: apart for cylinders, else the deviation; without a baseline what was read. One strip holds
/// one of them: a reading that could not be corrected has none of the first two, and its value as read lies far off.
enum class Shown { apart, deviation, as_read };

Shown shown_of(const Trend& trend)
{
    const auto any = [&](auto member) {
        return std::any_of(trend.points.begin(), trend.points.end(), [&](const TrendPoint& point) { return (point.*member).has_value(); });
    };
    if (trend.place.kind == Place::Kind::cylinder && any(&TrendPoint::apart))
        return Shown::apart;
    return any(&TrendPoint::deviation) ? Shown::deviation : Shown::as_read;
}

std::optional<double> value_of(Shown shown, const TrendPoint& point)
{
    switch (shown) {
    case Shown::apart: return point.apart;
    case Shown::deviation: return point.deviation;
    case Shown::as_read: break;
    }
    return point.corrected.value_or(point.raw);
}

/// The newest point that the strip can show; there is one, since `shown_of` found it.
const TrendPoint& newest_shown(const Trend& trend, Shown shown)
{
    return *std::find_if(trend.points.rbegin(), trend.points.rend(),
                         [&](const TrendPoint& point) { return value_of(shown, point).has_value(); });
}

struct Window
{
    TimePoint first, last;
    double place(TimePoint time) const
    {
        const double span = std::chrono::duration<double>(last - first).count();
        return span > 0.0 ? std::chrono::duration<double>(time - first).count() / span : 1.0;
    }
};

/// First point that counts: of the present stretch, or all.
std::size_t first_point(const Trend& trend, TimeRange range)
{
    if (range != TimeRange::since_overhaul || trend.points.empty())
        return 0;
    std::size_t first = trend.points.size() - 1;
    while (first > 0 && trend.points[first - 1].stretch == trend.points.back().stretch)
        --first;
    return first;
}

Window make_window(const Judgement& judgement, TimeRange range)
{
    Window window{time_of(judgement, judgement.readings.front().reading),
                  time_of(judgement, judgement.readings.back().reading)};
    if (range == TimeRange::all)
        return window;
    TimePoint first = window.last;
    if (range == TimeRange::since_overhaul)
        for (const Trend& trend : judgement.trends)
            if (!trend.points.empty() && trend.place.kind == Place::Kind::cylinder)
                first = std::min(first, time_of(judgement, trend.points[first_point(trend, range)].reading));
    window.first = std::max(window.first, window.last - three_years);
    if (range == TimeRange::since_overhaul)
        window.first = std::max(window.first, std::min(first, window.last - std::chrono::hours(24 * 180)));
    return window;
}

void add_points(BoardCell& cell, const Trend& trend, Shown shown, const Judgement& judgement, TimeRange range, const Window& window)
{
    for (std::size_t i = first_point(trend, range); i < trend.points.size(); ++i) {
        const TrendPoint& point = trend.points[i];
        const double x = window.place(time_of(judgement, point.reading));
        const auto value = value_of(shown, point);
        if (x < 0.0 || point.doubtful || !value)
            continue;
        cell.points.emplace_back(x, *value);
        cell.unsteady.push_back(point.unsteady ? 1 : 0);
    }
}

void choose_scale(BoardCell& cell, double typical_half)
{
    double half = typical_half;
    if (cell.usual_low && cell.usual_high) {
        cell.middle = 0.5 * (*cell.usual_low + *cell.usual_high);
        half = 0.5 * (*cell.usual_high - *cell.usual_low);
    } else if (!cell.points.empty()) {
        double sum = 0.0;
        for (const QPointF& point : cell.points)
            sum += point.y();
        cell.middle = sum / static_cast<double>(cell.points.size());
    }
    cell.half = overscan * (half > 0.0 ? half : 1.0);
    for (const QPointF& point : cell.points)
        cell.half = std::max(cell.half, 1.05 * std::abs(point.y() - cell.middle));
}

QString cell_word(const Trend& trend, const TrendPoint& newest, const BoardCell& cell, const Judgement& judgement)
{
    if (has_mark(trend.level))
        return level_text(trend.level);
    if (cell.old_value)
        return day_text(time_of(judgement, newest.reading));
    if (trend.level == Level::learning)
        return tr_("learning, %1 of %2").arg(trend.learned).arg(trend.needed);
    return {};
}

BoardCell make_cell(const Judgement& judgement, const Trend& trend, TimeRange range, const Window& window)
{
    BoardCell cell;
    cell.quantity = trend.quantity;
    cell.place = trend.place;
    cell.level = trend.level;
    if (trend.points.empty())
        return cell;
    cell.present = true;
    const Shown shown = shown_of(trend);
    const TrendPoint& newest = newest_shown(trend, shown);
    const bool difference = shown != Shown::as_read;
    add_points(cell, trend, shown, judgement, range, window);
    if (difference) { // the usual range is one of differences
        cell.usual_low = trend.usual_low;
        cell.usual_high = trend.usual_high;
    }
    const int decimals = decimals_of(trend.quantity);
    const double value = *value_of(shown, newest);
    cell.number = difference ? signed_text(value, decimals) : number_text(value, decimals);
    cell.old_value = newest.reading != judgement.readings.back().reading;
    cell.word = cell_word(trend, newest, cell, judgement);
    if (trend.level == Level::learning && !cell.old_value)
        cell.short_word = tr_("learning %1/%2").arg(trend.learned).arg(trend.needed);
    const bool not_compared = newest.reading != trend.points.back().reading;
    const QString what = shown == Shown::as_read ? tr_("as read")
                         : not_compared          ? tr_("the newest that can be compared; what was read later could not be corrected")
                         : shown == Shown::apart ? tr_("apart from the others")
                                                 : tr_("from the baseline");
    cell.spoken = tr_("%1, %2: %3 %4, %5")
                      .arg(place_title(judgement.record->engine, trend.place), quantity_title(trend.quantity),
                           with_unit(cell.number, unit_text(trend.quantity)), what,
                           cell.word.isEmpty() ? level_text(trend.level) : cell.word);
    return cell;
}

double typical_half(const std::vector<BoardCell>& cells)
{
    std::vector<double> halves;
    for (const BoardCell& cell : cells)
        if (cell.usual_low && cell.usual_high)
            halves.push_back(0.5 * (*cell.usual_high - *cell.usual_low));
    if (halves.empty())
        return 0.0;
    std::nth_element(halves.begin(), halves.begin() + static_cast<std::ptrdiff_t>(halves.size() / 2), halves.end());
    return halves[halves.size() / 2];
}

/// Conditions and counters have trends too, but nothing to say on this page.
bool belongs_on_board(const Trend& trend)
{
    const std::string& group = quantity(trend.quantity).group;
    if (trend.points.empty() || group == "heading" || group == "ship_weather")
        return false;
    return shown_of(trend) != Shown::as_read || trend.usual_low || has_mark(trend.level);
}

void add_rows(Board& board, const Judgement& judgement, TimeRange range, const Window& window)
{
    const std::size_t cylinders = board.cylinders.size();
    for (const Trend& trend : judgement.trends) {
        if (!belongs_on_board(trend))
            continue;
        if (trend.place.kind != Place::Kind::cylinder) {
            BoardCell cell = make_cell(judgement, trend, range, window);
            const QString unit_symbol = unit_text(trend.quantity);
            cell.title = quantity_title(trend.quantity);
            if (trend.place.kind != Place::Kind::engine && trend.place.number > 0)
                cell.title += QStringLiteral(" %1").arg(trend.place.number);
            if (!unit_symbol.isEmpty())
                cell.title += QStringLiteral(", ") + unit_symbol;
            board.engine.push_back(std::move(cell));
            continue;
        }
        if (board.rows.empty() || board.rows.back().cells.front().quantity != trend.quantity) {
            BoardRow row;
            row.title = quantity_title(trend.quantity);
            row.subtitle = unit_text(trend.quantity).isEmpty()
                               ? tr_("apart from the others")
                               : tr_("apart from the others, %1").arg(unit_text(trend.quantity));
            row.cells.resize(cylinders);
            for (std::size_t i = 0; i < cylinders; ++i) {
                row.cells[i].quantity = trend.quantity;
                row.cells[i].place = Place::cylinder(static_cast<int>(i) + 1);
            }
            board.rows.push_back(std::move(row));
        }
        const auto index = static_cast<std::size_t>(trend.place.number - 1);
        if (index < cylinders)
            board.rows.back().cells[index] = make_cell(judgement, trend, range, window);
    }
    for (BoardRow& row : board.rows) {
        const double half = typical_half(row.cells);
        for (BoardCell& cell : row.cells)
            choose_scale(cell, half);
    }
    for (BoardCell& cell : board.engine)
        choose_scale(cell, 0.0);
}

void add_headings(Board& board, const Judgement& judgement)
{
    const Engine& engine = judgement.record->engine;
    const auto hours = find_quantity("cylinder_running_hours", Place::Kind::cylinder);
    for (int number = 1; number <= engine.cylinders; ++number) {
        BoardHeading heading;
        heading.title = place_title(engine, Place::cylinder(number));
        heading.short_title = to_qstring(engine.cylinder_name(number));
        heading.level = judgement.level_of(Place::cylinder(number));
        if (hours && !judgement.record->readings.empty())
            if (const Value* value = judgement.record->readings.back().find(*hours, Place::cylinder(number));
                value && value->value_si)
                heading.hours = with_unit(whole_text(unit(quantity(*hours).unit).from_si(*value->value_si)), u"h");
        board.cylinders.push_back(std::move(heading));
    }
}

void add_quiet_words(Board& board, const Judgement& judgement)
{
    std::size_t notes = 0;
    for (const Trend& trend : judgement.trends)
        notes += trend.level == Level::note ? 1U : 0U;
    if (notes > 0) {
        board.headline = tr_("%n value(s) to look at again at the next reading; nothing else stands out.",
                             static_cast<int>(notes));
        board.level_words = level_text(Level::note);
        return;
    }
    const bool learning = board.level == Level::learning;
    board.headline = learning ? tr_("Still learning what is usual for this engine.")
                              : tr_("Nothing stands out since the last reading.");
    board.second_line = learning ? tr_("It takes eight usable readings since the last work on a place.") : QString();
}

void add_words(Board& board, const Judgement& judgement)
{
    board.level = judgement.level;
    board.last_reading = last_reading_text(judgement);
    const QString not_read_yet = to_qstring(work_not_read_yet(judgement)), without_effect = to_qstring(work_without_effect(judgement));
    const std::vector<const Flag*> flags = judgement.standing_flags();
    if (flags.empty()) {
        add_quiet_words(board, judgement);
        if (!without_effect.isEmpty()) {
            const bool nothing_else = board.level_words.isEmpty() && board.level != Level::learning;
            board.second_line = nothing_else ? tr_("Nothing else stands out.") : board.headline;
            board.headline = without_effect;
            board.level = std::max(board.level, Level::note);
            board.level_words = level_text(board.level);
        }
        if (!not_read_yet.isEmpty())
            board.second_line = QStringList{not_read_yet, board.second_line}.join(u' ').trimmed();
        return;
    }
    const Flag& worst = *flags.front();
    board.worst_quantity = worst.quantity;
    board.worst_place = worst.subject;
    board.level = worst.level_now;
    board.headline = to_qstring(worst.sentence);
    board.level_words = standing_words(judgement, worst);
    QStringList second{not_read_yet, without_effect};
    second.append(to_qstring(worst.chance_sentence));
    if (!worst.pattern_words.empty())
        second.append(tr_("Fits: %1.").arg(to_qstring(worst.pattern_words)));
    if (!worst.next_check.empty())
        second.append(tr_("Next: %1").arg(to_qstring(worst.next_check)));
    if (flags.size() > 1)
        second.append(tr_("%n more below.", static_cast<int>(flags.size()) - 1));
    second.removeAll(QString());
    board.second_line = second.join(u' ');
}

} // namespace

QString last_reading_text(const Judgement& judgement)
{
    if (judgement.readings.empty())
        return {};
    const ReadingJudgement& last = judgement.readings.back();
    QStringList words{tr_("last reading %1").arg(day_text(time_of(judgement, last.reading)))};
    if (last.steadiness != Steadiness::not_judged)
        words.append(to_qstring(steadiness_word(last.steadiness)));
    if (last.load_percent)
        words.append(tr_("%1 load").arg(with_unit(number_text(*last.load_percent, 0), u"%")));
    return words.join(QStringLiteral(", "));
}

Board make_board(const Judgement& judgement, TimeRange range)
{
    Board board;
    if (!judgement.record || judgement.readings.empty())
        return board;
    add_headings(board, judgement);
    add_rows(board, judgement, range, make_window(judgement, range));
    add_words(board, judgement);
    return board;
}

} // namespace evenstroke
