// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/desk/box_colour.h"
#include "app/desk/theme.h"
#include "app/desk/trail.h"
#include "tests/app/pictures.h"

#include <gtest/gtest.h>

#include <QLabel>
#include <QPainter>

#include <cmath>

namespace evenstroke {
namespace {

const QChar minus(0x2212);

TEST(NumberText, UsesATrueMinusSignAndNeverWritesMinusZero)
{
    EXPECT_EQ(number_text(-5.64, 1), minus + QStringLiteral("5.6"));
    EXPECT_EQ(number_text(-0.04, 1), QStringLiteral("0.0"));
    EXPECT_EQ(signed_text(0.04, 1), QStringLiteral("0.0"));
    EXPECT_EQ(signed_text(1.66, 1), QStringLiteral("+1.7"));
}

TEST(NumberText, GroupsLongWholeNumbersOnly)
{
    const QString narrow(QChar(0x202F));
    EXPECT_EQ(whole_text(9880), QStringLiteral("9880"));
    EXPECT_EQ(whole_text(11400), QStringLiteral("11") + narrow + QStringLiteral("400"));
    EXPECT_EQ(whole_text(-1234567), minus + QStringLiteral("1") + narrow + QStringLiteral("234") + narrow + QStringLiteral("567"));
}

TEST(NumberText, ShowsNoMoreDigitsThanTheUncertaintyDeserves)
{
    const auto plain = [](QString text) { return text.replace(QChar(0x00A0), u' '); };
    EXPECT_EQ(plain(with_uncertainty(384.62, 4.2, 2)), QStringLiteral("384.6 ± 4.2"));
    EXPECT_EQ(plain(with_uncertainty(384.62, 12.0, 2)), QStringLiteral("385 ± 12"));
    EXPECT_EQ(with_uncertainty(384.62, std::nullopt, 1), QStringLiteral("384.6"));
}

TEST(DayText, WritesDatesOneWay)
{
    const TimePoint day = std::chrono::sys_days{std::chrono::year{2031} / 3 / 14};
    EXPECT_EQ(day_text(day), QStringLiteral("14 Mar 2031"));
    EXPECT_EQ(month_text(day), QStringLiteral("Mar 2031"));
    EXPECT_EQ(age_text(day, day + std::chrono::hours(5)), QStringLiteral("today"));
    EXPECT_TRUE(age_text(day, day + std::chrono::days(20)).startsWith(QStringLiteral("20 day")));
    EXPECT_TRUE(age_text(day, day + std::chrono::days(62)).startsWith(QStringLiteral("2 month")));
}

/// Relative luminance and contrast as the Web Content Accessibility Guidelines 2.1 define them (from memory).
double luminance(const QColor& colour)
{
    const auto linear = [](double channel) {
        return channel <= 0.03928 ? channel / 12.92 : std::pow((channel + 0.055) / 1.055, 2.4);
    };
    return 0.2126 * linear(colour.redF()) + 0.7152 * linear(colour.greenF()) + 0.0722 * linear(colour.blueF());
}
double contrast(const QColor& a, const QColor& b)
{
    const double x = luminance(a), y = luminance(b);
    return (std::max(x, y) + 0.05) / (std::min(x, y) + 0.05);
}

TEST(Theme, KeepsTextReadableOnPageAndSheet)
{
    for (const ThemeKind kind : {ThemeKind::day, ThemeKind::night, ThemeKind::print}) {
        const Theme& t = theme_of(kind);
        for (const QColor& ground : {t.page, t.sheet})
            for (const QColor& text : {t.ink, t.muted, t.line, t.note, t.watch, t.act, t.ask})
                EXPECT_GE(contrast(text, ground), 4.5) << static_cast<int>(kind) << ' ' << text.name().toStdString();
    }
}

TEST(Theme, AnEmptyBoxIsSeenOnTheScreen)
{
    // 3:1: Web Content Accessibility Guidelines 2.1, criterion 1.4.11, non-text contrast (from memory).
    for (const ThemeKind kind : {ThemeKind::day, ThemeKind::night})
        for (const QColor& ground : {theme_of(kind).page, theme_of(kind).sheet})
            EXPECT_GE(contrast(box_colour(kind), ground), 3.0) << static_cast<int>(kind);
}

TEST(Theme, PrintNeedsNoColour)
{
    const Theme& t = theme_of(ThemeKind::print);
    for (const QColor& colour : {t.ink, t.muted, t.rule, t.line, t.others, t.band, t.watch, t.act, t.ask})
        EXPECT_EQ(colour.hsvSaturation(), 0) << colour.name().toStdString();
    EXPECT_NE(t.pen(t.line, 0).style(), t.pen(t.line, 1).style());
}

TEST(Theme, EveryMarkHasItsOwnShape)
{
    const Theme& t = theme_of(ThemeKind::print); // one colour: only the shape can tell
    std::vector<QImage> pictures;
    for (const Level level : {Level::note, Level::watch, Level::act, Level::ask})
        pictures.push_back(mark_pixmap(level, 24, 1.0, t).toImage());
    for (std::size_t i = 0; i < pictures.size(); ++i) {
        EXPECT_TRUE(shows_something(pictures[i]));
        for (std::size_t j = i + 1; j < pictures.size(); ++j)
            EXPECT_NE(pictures[i], pictures[j]) << i << ' ' << j;
    }
    EXPECT_FALSE(has_mark(Level::quiet));
    EXPECT_FALSE(shows_something(mark_pixmap(Level::quiet, 24, 1.0, t).toImage()));
}

TEST(Theme, ChangesWhatIsOnTheScreen)
{
    set_theme(ThemeKind::night);
    QLabel label(QStringLiteral("ink"));
    label.resize(80, 30);
    const QImage night = label.grab().toImage();
    set_theme(ThemeKind::day);
    const QImage day = label.grab().toImage();
    EXPECT_LT(luminance(night.pixelColor(1, 1)), luminance(day.pixelColor(1, 1)));
}

TEST(Trail, GoesBackAndForwardAndForgetsWhatWasAhead)
{
    Trail trail;
    Selection selection;
    trail.go({QStringLiteral("fleet"), selection});
    EXPECT_FALSE(trail.can_go_back());
    trail.go({QStringLiteral("board"), selection});
    selection.place = Place::cylinder(4);
    trail.step({QStringLiteral("board"), selection});
    trail.go({QStringLiteral("trend"), selection});
    trail.go_back();
    EXPECT_EQ(trail.here().page, QStringLiteral("board"));
    EXPECT_EQ(trail.here().selection.place, Place::cylinder(4)) << "a step is kept in place of where it began";
    trail.go_forward();
    EXPECT_EQ(trail.here().page, QStringLiteral("trend"));
    trail.go_back();
    trail.go({QStringLiteral("events"), selection});
    EXPECT_FALSE(trail.can_go_forward());
}

TEST(Trail, IsRememberedForEachHistory)
{
    Trail trail;
    Selection selection;
    selection.vessel = QStringLiteral("v");
    selection.engine = QStringLiteral("e");
    selection.quantity = find_quantity("exhaust_temperature");
    selection.place = Place::cylinder(3);
    selection.range = TimeRange::three_years;
    selection.view = ValueView::deviation;
    trail.go({QStringLiteral("trend"), selection});
    trail.remember(QStringLiteral("/somewhere/one.evenstroke"));
    Trail other;
    other.recall(QStringLiteral("/somewhere/one.evenstroke"));
    EXPECT_EQ(other.here(), trail.here());
    other.recall(QStringLiteral("/somewhere/two.evenstroke"));
    EXPECT_TRUE(other.here().page.isEmpty());
}

} // namespace
} // namespace evenstroke
