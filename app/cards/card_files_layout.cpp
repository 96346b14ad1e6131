// SPDX-License-Identifier: GPL-3.0-or-later
// How the page comes to a layout: the engine's own of the last time, or what the first file looks like.
#include "app/cards/card_files_page.h"

#include "app/desk/number_text.h"
#include "app/desk/workplace.h"
#include "core/trend/conditions.h"
#include "ui_card_files_page.h"

#include <algorithm>
#include <cmath>
#include <limits>

namespace evenstroke {
namespace {

constexpr int lines_shown_from = 60;

/// The beginning of a text, so many lines.
std::string first_lines(const std::string& text, int lines)
{
    std::size_t end = 0;
    for (int line = 0; line < lines && end < text.size(); ++line) {
        const std::size_t next = text.find('\n', end);
        end = next == std::string::npos ? text.size() : next + 1;
    }
    return text.substr(0, end);
}

} // namespace

/// What the first file says by itself. False: it cannot be read, and `problem_` says why.
bool CardFilesPage::read_first_file()
{
    problem_.reset();
    remembered_ = false;
    first_lines_.clear();
    const auto lines = storage::first_lines_of(files_.front().path, std::numeric_limits<int>::max());
    if (!lines) {
        problem_ = lines.error();
        return false;
    }
    first_lines_ = first_lines(lines.value(), lines_shown_from);
    const bool four_stroke = engine() && !engine()->two_stroke();
    proposed_ = storage::guess_layout(lines.value(), four_stroke ? 720.0 : 360.0);
    return true;
}

/// The layout of the engine's last files, else what the first file looks like.
void CardFilesPage::begin_layout()
{
    if (!read_first_file())
        return;
    propose_layout();
    if (workplace().history()) {
        const auto kept =
            storage::load_trace_layout(*workplace().history(), to_std(workplace().selection().engine));
        if (kept && kept.value()) {
            layout_ = *kept.value();
            layout_.speed = proposed_speed_ > 0.0 ? proposed_speed_ : layout_.speed; // of another day
            remembered_ = true;
        }
    }
    ui_->boxes->show_layout(layout_);
    show_first_lines();
}

/// As the file looks, with nothing kept from before: neither columns nor unit.
void CardFilesPage::propose_layout()
{
    layout_ = proposed_.layout;
    proposed_speed_ = speed_to_propose();
    layout_.speed = proposed_speed_;
    if (!engine() || layout_.pressures.size() < 2)
        return;
    for (storage::PressureColumn& column : layout_.pressures)
        if (const auto index = static_cast<std::size_t>(column.column - 1); index < proposed_.titles.size())
            column.cylinder = storage::guess_cylinder(proposed_.titles[index], *engine());
}

void CardFilesPage::look_anew()
{
    if (files_.empty())
        return;
    say({});
    traces_.clear();
    if (read_first_file()) {
        propose_layout();
        ui_->boxes->show_layout(layout_);
        show_first_lines();
        preview_soon();
    }
    show_all();
}

/// Speed at the reading in r/min, else the rated one; 0 where neither is known.
double CardFilesPage::speed_to_propose() const
{
    if (!engine())
        return 0.0;
    if (const Reading* const reading = reading_in_hand_here())
        if (const auto speed = engine_mean(*reading, "speed", find_conditions(*engine(), *reading)))
            return *speed;
    constexpr double seconds_a_minute = 60.0;
    return std::round(100.0 * seconds_a_minute * engine()->rated_speed.value()) / 100.0;
}

/// Another reading: what was said of the one before is done with, and its speed is another.
void CardFilesPage::follow_choice()
{
    const Reading* const reading = reading_in_hand_here();
    if (!reading || reading->id == shown_reading_)
        return;
    shown_reading_ = reading->id;
    all_the_same_ = false;
    say({});
    const double speed = speed_to_propose();
    if (layout_.speed == proposed_speed_) {
        layout_.speed = speed;
        ui_->boxes->show_layout(layout_);
    }
    proposed_speed_ = speed;
}

/// What stands in the way of reading the files.
QString CardFilesPage::problem_words() const
{
    if (files_.empty())
        return {};
    const bool unread = !traces_.empty() && std::none_of(traces_.begin(), traces_.end(),
                                                         [](const FileTrace& trace) { return trace.trace; });
    if (remembered_ && (problem_ || unread))
        return tr("The layout kept from this engine's last files does not fit this file. Look at the file "
                  "anew (Ctrl+L).");
    return problem_ ? to_qstring(problem_->text()) : QString();
}

} // namespace evenstroke
