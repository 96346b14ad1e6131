// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "app/desk/selection.h"
#include "core/trend/judgement.h"

#include <QString>
#include <QStringList>

#include <optional>
#include <vector>

/// What the trend page draws and says of one quantity at one place, as plain data.
namespace evenstroke {

/// One reading of the line in question.
struct PicturePoint
{
    double time = 0.0;  ///< seconds since 1970, UTC
    double value = 0.0; ///< in the view that is shown
    std::size_t reading = 0;
    bool unsteady = false, doubtful = false;
    bool with_care = false; ///< usable with care: drawn hollow like an unsteady one
    bool starts_stretch = false; ///< not joined to the point before: work was done between them
    std::optional<double> band_low, band_high;
    std::optional<double> half_width; ///< 95 %; of everything but the value as read, which holds its instrument's only
    std::optional<double> load_percent;
    QString spoken; ///< "14 Mar 2031, 76 % load: −5.9 ± 1.2 bar, not steady"
};

/// A line that the one in question is compared with.
struct PictureLine
{
    QString name;
    std::vector<double> times, values; ///< NaN where the line is interrupted
};

struct PictureEvent
{
    double time = 0.0;
    QString word;   ///< "overhaul"
    QString spoken; ///< "12 Nov 2030, cylinder 4: overhaul. Rings renewed."
};

struct PictureFlag
{
    double time = 0.0, value = 0.0;
    Level severity = Level::watch;
    bool standing = false;
    std::optional<double> raised_time, raised_value; ///< where it rose to the level it has now
    Level level_now = Level::watch;
    QString words; ///< "watch since 12 Nov 2030: Has fallen ..."
};

struct TrendPicture
{
    QuantityId quantity = 0;
    Place place;
    ValueView view = ValueView::apart; ///< what is shown: apart falls back to deviation, deviation to corrected, ...
    QString place_name, unit_symbol, axis_title;
    int decimals = 1;
    bool difference = true; ///< numbers carry their sign
    std::vector<PicturePoint> points;
    std::vector<PictureLine> others;
    QString view_words; ///< "deviation from the baseline"
    QString band_name; ///< "usual range of this engine", "expected at this load"; empty: no band
    std::vector<PictureEvent> events;
    std::vector<PictureFlag> flags;
    std::vector<double> evidence_times, evidence; ///< NaN where nothing could be said
    QString evidence_of; ///< "cylinder 4", "the engine"
    std::optional<double> threshold;
    QString threshold_words; ///< "watch from here,\nact since 11 May 2031"
    PictureLine fixed_low, fixed_high; ///< where the customary distance from the others begins; only where apart is shown
    QStringList second_opinions;       ///< what well-known rules would have said, a sentence each
    double first_time = 0.0, last_time = 0.0; ///< of the axis
    // Words
    QString headline, second_line, level_words;
    Level level = Level::no_data;
    QString limit_figure, limit_words; ///< "3 to 11 months", what the limit is
    QString fits;                      ///< pattern in words
    std::optional<std::size_t> flag_index; ///< the standing flag that leads the words, in Judgement::flags
    QString note_words;                ///< what was said of it
    QStringList moved;                 ///< "maximum pressure −0.5 bar a month"
    QString next_check;
    struct CautionWords
    {
        QString title, text;
        bool emergency = false;
    };
    std::vector<CautionWords> cautions; ///< most urgent first
};

TrendPicture make_trend_picture(const Judgement& judgement, const Selection& selection);

/// Views that have something to show for this quantity and place.
std::vector<ValueView> possible_views(const Trend& trend);

/// Everything of one reading of the trend in a line: as read, corrected, expected, deviation, apart.
QString point_words(const Judgement& judgement, const Trend& trend, std::size_t reading);

} // namespace evenstroke
