// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/desk/theme.h"

#include "app/desk/box_colour.h"

#include <QApplication>
#include <QFontDatabase>
#include <QPalette>
#include <QPushButton>

#include <array>

namespace evenstroke {

namespace {

Theme make_day()
{
    Theme t;
    t.kind = ThemeKind::day;
    t.page = QColor(0xF6F3EA), t.sheet = QColor(0xFFFDF8);
    t.ink = QColor(0x1F2A33), t.muted = QColor(0x57616B);
    t.rule = QColor(0xDDD6C6);
    t.line = QColor(0x1D4E79), t.others = QColor(0xB4AFA3), t.band = QColor(0xDDE7EE);
    t.note = QColor(0x57616B), t.watch = QColor(0x96600F), t.act = QColor(0x8A2B5C), t.ask = QColor(0x1B6670);
    return t;
}

Theme make_night()
{
    Theme t;
    t.kind = ThemeKind::night;
    t.page = QColor(0x14171A), t.sheet = QColor(0x1B2024);
    t.ink = QColor(0xD9D3C5), t.muted = QColor(0xA09A8E);
    t.rule = QColor(0x2C3339);
    t.line = QColor(0x8DB7DA), t.others = QColor(0x565C61), t.band = QColor(0x25323D);
    t.note = QColor(0xA09A8E), t.watch = QColor(0xE0A94A), t.act = QColor(0xDB7FAE), t.ask = QColor(0x68B9C2);
    return t;
}

Theme make_print()
{
    Theme t;
    t.kind = ThemeKind::print;
    t.page = t.sheet = Qt::white;
    t.ink = t.line = t.note = t.watch = t.act = t.ask = Qt::black;
    t.muted = t.others = QColor(0x666666); // 60 % grey
    t.rule = QColor(0xC8C8C8);
    t.band = QColor(0xE6E6E6);
    return t;
}

ThemeKind current = ThemeKind::day;

QPalette palette_of(const Theme& t)
{
    QPalette p;
    p.setColor(QPalette::Window, t.page);
    p.setColor(QPalette::Base, t.sheet);
    p.setColor(QPalette::AlternateBase, t.page);
    p.setColor(QPalette::Button, t.page);
    p.setColor(QPalette::ToolTipBase, t.sheet);
    for (const QPalette::ColorRole role : {QPalette::WindowText, QPalette::Text, QPalette::ButtonText,
                                           QPalette::ToolTipText})
        p.setColor(role, t.ink);
    p.setColor(QPalette::PlaceholderText, t.muted);
    p.setColor(QPalette::Highlight, t.line);
    p.setColor(QPalette::HighlightedText, t.kind == ThemeKind::night ? t.page : t.sheet);
    p.setColor(QPalette::Link, t.line);
    p.setColor(QPalette::Mid, t.rule);
    p.setColor(QPalette::Midlight, t.rule);
    p.setColor(QPalette::Dark, t.muted);
    for (const QPalette::ColorRole role : {QPalette::WindowText, QPalette::Text, QPalette::ButtonText})
        p.setColor(QPalette::Disabled, role, t.muted);
    return p;
}

} // namespace

QColor Theme::level_colour(Level level) const
{
    switch (level) {
    case Level::note: return note;
    case Level::ask: return ask;
    case Level::watch: return watch;
    case Level::act: return act;
    default: return muted;
    }
}

QBrush Theme::band_brush() const
{
    return print() ? QBrush(QColor(0xA0A0A0), Qt::BDiagPattern) : QBrush(band);
}

QColor Theme::others_level(int index) const
{
    // Towards the page, at most five steps: enough to follow one line with the eye, too few to compete.
    const double share = 0.12 * std::clamp(index, 0, 4);
    const auto mix = [share](int from, int to) { return static_cast<int>(from + share * (to - from)); };
    return {mix(others.red(), page.red()), mix(others.green(), page.green()), mix(others.blue(), page.blue())};
}

QPen Theme::pen(const QColor& colour, int style_index) const
{
    static constexpr std::array styles{Qt::SolidLine, Qt::DashLine, Qt::DotLine, Qt::DashDotLine,
                                       Qt::DashDotDotLine};
    return {QBrush(colour), 1.0, print() ? styles[static_cast<std::size_t>(style_index) % styles.size()]
                                         : Qt::SolidLine};
}

QColor mixed(const QColor& from, const QColor& to, double share)
{
    const auto mix = [share](int a, int b) { return static_cast<int>(a + share * (b - a)); };
    return {mix(from.red(), to.red()), mix(from.green(), to.green()), mix(from.blue(), to.blue())};
}

const Theme& theme_of(ThemeKind kind)
{
    static const Theme day = make_day(), night = make_night(), print = make_print();
    return kind == ThemeKind::day ? day : kind == ThemeKind::night ? night : print;
}

const Theme& theme() { return theme_of(current); }

void set_theme(ThemeKind kind)
{
    current = kind;
    QApplication::setStyle(QStringLiteral("Fusion"));
    QApplication::setFont(type(TypeSize::body));
    QApplication::setPalette(palette_of(theme()));
    qApp->setStyleSheet(style_sheet(theme()));
}

QFont type(TypeSize size, bool bold)
{
    static const double points[] = {9.0, 10.5, 14.0, 20.0};
    QFont font(QStringLiteral("DejaVu Sans"));
    font.setPointSizeF(points[static_cast<int>(size)]);
    font.setBold(bold);
    return font;
}

void keep_room_for_bold(QWidget& within)
{
    const QFontMetrics bold(type(TypeSize::body, true));
    for (QPushButton* button : within.findChildren<QPushButton*>())
        if (button->isCheckable() && button->property("worded").toBool())
            button->setMinimumWidth(bold.horizontalAdvance(button->text()) + 2);
}

QColor box_colour(ThemeKind kind)
{
    return kind == ThemeKind::night ? QColor(0x6E757B) : kind == ThemeKind::day ? QColor(0x8C8778) : QColor(0xC8C8C8);
}

QString style_sheet(const Theme& t)
{
    QString sheet = QStringLiteral(R"(
* { font-family: "DejaVu Sans"; }
QWidget { color: %ink; }
QToolTip { background: %sheet; color: %ink; border: 1px solid %rule; padding: 4px; }
QLabel[muted="true"] { color: %muted; }
QLabel[small="true"] { font-size: 9pt; }
QLabel[title="true"] { font-size: 14pt; }
QLabel[figure="true"] { font-size: 20pt; font-weight: bold; }
QLabel[caution="true"] { color: %act; }
QLabel[cautionhead="true"] { color: %act; font-weight: bold; }
QLabel[sidefigure="true"] { font-size: 14pt; font-weight: bold; }
QFrame[ruled="true"] { background: %rule; }
QPushButton { background: %sheet; border: 1px solid %muted; padding: 4px 12px; min-height: 20px; }
QPushButton:hover, QPushButton:focus { border-color: %line; outline: none; }
QPushButton:focus { background: %band; }
QPushButton:disabled { color: %muted; border-color: %rule; }
QPushButton[worded="true"] { background: transparent; border: none; border-bottom: 1px solid transparent;
    padding: 1px 0px; min-height: 16px; color: %muted; text-align: left; }
QPushButton[worded="true"]:hover { border-bottom-color: %muted; color: %ink; }
QPushButton[worded="true"]:focus { border-bottom-color: %line; color: %ink; background: %band; }
QPushButton[worded="true"]:checked { color: %ink; font-weight: bold; border-bottom-color: %ink; }
QLineEdit, QPlainTextEdit, QTextEdit, QComboBox, QDateEdit, QDateTimeEdit, QSpinBox {
    background: %sheet; border: 1px solid %box; padding: 2px 4px; min-height: 18px;
    selection-background-color: %line; selection-color: %online; }
QLineEdit:focus, QPlainTextEdit:focus, QTextEdit:focus, QComboBox:focus, QDateEdit:focus,
QDateTimeEdit:focus, QSpinBox:focus { border-color: %line; }
QTextEdit[sheetlike="true"] { background: %page; border: none; padding: 0px; }
QComboBox::drop-down { border: none; width: 20px; }
QComboBox::down-arrow { image: url(:/pictures/choose.xpm); }
QAbstractItemView { background: %page; border: none; gridline-color: %rule; outline: none;
    selection-background-color: %band; selection-color: %ink; }
QAbstractItemView::item:hover { background: %sheet; }
QAbstractItemView::item:focus { border: 1px solid %line; }
QHeaderView::section { background: %page; color: %muted; border: none; border-bottom: 1px solid %rule;
    padding: 4px; font-size: 9pt; font-weight: normal; }
QTableCornerButton::section { background: %page; border: none; }
QMenu { background: %sheet; border: 1px solid %rule; padding: 4px 0px; }
QMenu::item { padding: 4px 24px 4px 16px; }
QMenu::item:selected { background: %band; color: %ink; }
QMenu::separator { height: 1px; background: %rule; margin: 4px 0px; }
QScrollArea { border: none; background: %page; }
QScrollBar { background: %page; border: none; }
QScrollBar:vertical { width: 12px; } QScrollBar:horizontal { height: 12px; }
QScrollBar::handle { background: %rule; border: 2px solid %page; }
QScrollBar::handle:hover { background: %muted; }
QScrollBar::handle:vertical { min-height: 32px; } QScrollBar::handle:horizontal { min-width: 32px; }
QScrollBar::add-line, QScrollBar::sub-line { width: 0px; height: 0px; }
QProgressBar { background: %sheet; border: 1px solid %rule; height: 8px; text-align: center; }
QProgressBar::chunk { background: %line; }
QSplitter::handle { background: %rule; }
)");
    const std::pair<const char*, QColor> colours[] = {
        {"%online", t.kind == ThemeKind::night ? t.page : t.sheet}, {"%ink", t.ink}, {"%muted", t.muted},
        {"%sheet", t.sheet}, {"%rule", t.rule}, {"%line", t.line}, {"%band", t.band}, {"%act", t.act},
        {"%page", t.page}, {"%box", box_colour(t.kind)}};
    for (const auto& [name, colour] : colours)
        sheet.replace(QLatin1String(name), colour.name());
    return sheet;
}

} // namespace evenstroke
