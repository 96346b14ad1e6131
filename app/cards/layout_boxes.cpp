// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/cards/layout_boxes.h"

#include "app/desk/number_text.h"
#include "core/plain_text.h"

#include <QCheckBox>
#include <QComboBox>
#include <QGridLayout>
#include <QLabel>
#include <QLineEdit>
#include <QSpinBox>

#include <array>

namespace evenstroke {
namespace {

using storage::AngleFrom;

constexpr int across = 4;                                       // titled boxes side by side
constexpr std::array<double, 3> time_units = {1.0, 1e-3, 1e-6}; // seconds

QString plain(double number)
{
    return to_qstring(evenstroke::number_text(number));
}

/// @param into  unchanged where the box is no number
std::optional<Problem> read_box(const QLineEdit& box, double& into)
{
    const auto number = parse_number(to_std(box.text()));
    if (!number)
        return Problem{number.error().kind,
                       to_std(box.accessibleName()) + ": " + number.error().what_happened,
                       number.error().what_to_do};
    into = number.value();
    return std::nullopt;
}

} // namespace

LayoutBoxes::LayoutBoxes(QWidget* parent) : QWidget(parent), grid_(new QGridLayout(this))
{
    grid_->setContentsMargins(0, 0, 0, 0);
    grid_->setHorizontalSpacing(12);
    grid_->setVerticalSpacing(2);
    for (int column = 0; column < across; ++column)
        grid_->setColumnStretch(column, 1);
    separator_ = add_choice(0, 0, tr("Columns are divided by"),
                            {tr("find out"), tr("comma"), tr("semicolon"), tr("tab"), tr("blanks")});
    decimal_sign_ = add_choice(0, 1, tr("Decimal sign"), {tr("point"), tr("comma")});
    header_lines_ = new QSpinBox(this);
    header_lines_->setRange(0, 1000);
    header_lines_->setButtonSymbols(QAbstractSpinBox::NoButtons);
    connect(header_lines_, &QSpinBox::valueChanged, this, [this] {
        if (!showing_)
            emit changed();
    });
    add_titled(0, 2, tr("Lines above the numbers"), header_lines_);
    missing_ = add_line(0, 3, tr("Missing is written"), tr("nan, -"));

    QStringList units{tr("choose the unit")};
    for (const Unit& unit : all_units())
        if (unit.dimension == Dimension::pressure)
            units << to_qstring(unit.symbol);
    unit_ = add_choice(1, 0, tr("Pressure in"), units);
    kind_ = add_choice(1, 1, tr("Counted from"), {tr("vacuum (absolute)"), tr("open air (gauge)")});
    dead_centre_ = add_line(1, 2, tr("Firing dead centre at, °"));
    direction_ = add_choice(1, 3, tr("Running ahead, angles"), {tr("rise"), tr("fall")});
    counts_ = add_line(2, 0, tr("Samples a revolution"));
    time_unit_ = add_choice(2, 0, tr("Times in"), {tr("seconds"), tr("milliseconds"), tr("microseconds")});
    speed_ = add_line(2, 1, tr("Speed, r/min"));
    first_angle_ = add_line(2, 2, tr("Angle of the first sample, °"));
    make_signal_boxes();
    show_layout({});
}

void LayoutBoxes::make_signal_boxes()
{
    signal_ = new QCheckBox(tr("volts or counts"), this);
    grid_->addWidget(signal_, 5, 3);
    points_ = new QWidget(this);
    auto* line = new QHBoxLayout(points_);
    line->setContentsMargins(0, 0, 0, 0);
    line->setSpacing(6);
    const QString words[] = {tr("signal"), tr("is pressure"), tr("and signal"), tr("is pressure")};
    for (int i = 0; i < 4; ++i) {
        point_[i] = new QLineEdit(points_);
        point_[i]->setAccessibleName(words[i]);
        point_[i]->setMaximumWidth(60);
        auto* label = new QLabel(words[i], points_);
        label->setProperty("muted", true);
        line->addWidget(label);
        line->addWidget(point_[i]);
        connect(point_[i], &QLineEdit::editingFinished, this, [this] {
            if (!showing_)
                emit changed();
        });
    }
    line->addStretch(1);
    grid_->addWidget(points_, 6, 0, 1, across);
    connect(signal_, &QCheckBox::toggled, this, [this](bool on) {
        points_->setVisible(on);
        if (!showing_)
            emit changed();
    });
}

void LayoutBoxes::add_titled(int row, int column, const QString& title, QWidget* box)
{
    auto* label = new QLabel(title, this);
    label->setProperty("muted", true);
    label->setProperty("small", true);
    label->setBuddy(box);
    box->setAccessibleName(title);
    box->setMinimumWidth(80);
    grid_->addWidget(label, 2 * row, column);
    grid_->addWidget(box, 2 * row + 1, column);
}

QComboBox* LayoutBoxes::add_choice(int row, int column, const QString& title, const QStringList& words)
{
    auto* box = new QComboBox(this);
    box->addItems(words);
    box->setSizeAdjustPolicy(QComboBox::AdjustToMinimumContentsLengthWithIcon);
    box->setMinimumContentsLength(8);
    connect(box, &QComboBox::activated, this, [this] { emit changed(); });
    add_titled(row, column, title, box);
    return box;
}

QLineEdit* LayoutBoxes::add_line(int row, int column, const QString& title, const QString& hint)
{
    auto* box = new QLineEdit(this);
    box->setPlaceholderText(hint);
    connect(box, &QLineEdit::editingFinished, this, [this] {
        if (!showing_)
            emit changed();
    });
    add_titled(row, column, title, box);
    return box;
}

/// A box and the title above it.
void LayoutBoxes::set_shown(QWidget* box, bool shown)
{
    box->setVisible(shown);
    for (QLabel* label : findChildren<QLabel*>())
        if (label->buddy() == box)
            label->setVisible(shown);
}

/// Only what the way to the angle asks for.
void LayoutBoxes::show_needed(AngleFrom from)
{
    set_shown(counts_, from == AngleFrom::sample_number);
    set_shown(time_unit_, from == AngleFrom::time);
    set_shown(speed_, from == AngleFrom::time);
    set_shown(first_angle_, from != AngleFrom::column);
    set_shown(direction_, from == AngleFrom::column);
    set_shown(dead_centre_, from == AngleFrom::column);
}

void LayoutBoxes::show_layout(const storage::TraceLayout& layout)
{
    showing_ = true;
    separator_->setCurrentIndex(static_cast<int>(layout.separator));
    decimal_sign_->setCurrentIndex(layout.decimal_sign == ',' ? 1 : 0);
    header_lines_->setValue(layout.header_lines);
    QStringList words;
    for (const std::string& word : layout.missing_words)
        words << to_qstring(word);
    missing_->setText(words.join(QStringLiteral(", ")));
    unit_->setCurrentIndex(layout.unit ? unit_->findText(to_qstring(unit(*layout.unit).symbol)) : 0);
    kind_->setCurrentIndex(layout.gauge ? 1 : 0);
    dead_centre_->setText(plain(layout.dead_centre_at));
    direction_->setCurrentIndex(layout.backwards ? 1 : 0);
    counts_->setText(plain(layout.counts_per_revolution));
    first_angle_->setText(plain(layout.first_angle));
    for (std::size_t i = 0; i < time_units.size(); ++i)
        if (layout.seconds_per_count == time_units[i])
            time_unit_->setCurrentIndex(static_cast<int>(i));
    speed_->setText(plain(layout.speed));
    const storage::TwoPointCalibration two = layout.calibration.value_or(storage::TwoPointCalibration());
    const double points[] = {two.signal_1, two.pressure_1, two.signal_2, two.pressure_2};
    for (int i = 0; i < 4; ++i)
        point_[i]->setText(plain(points[i]));
    signal_->setChecked(layout.calibration.has_value());
    points_->setVisible(layout.calibration.has_value());
    show_needed(layout.angle_from);
    showing_ = false;
}

void LayoutBoxes::choose_unit(WrittenUnit chosen)
{
    unit_->setCurrentIndex(unit_->findText(to_qstring(unit(chosen.id).symbol)));
    if (chosen.kind == PressureKind::gauge || chosen.kind == PressureKind::absolute)
        kind_->setCurrentIndex(chosen.kind == PressureKind::gauge ? 1 : 0);
    emit changed();
}

std::optional<Problem> LayoutBoxes::read_into(storage::TraceLayout& layout) const
{
    layout.separator = static_cast<storage::ColumnSeparator>(separator_->currentIndex());
    layout.decimal_sign = decimal_sign_->currentIndex() == 1 ? ',' : '.';
    layout.header_lines = header_lines_->value();
    layout.missing_words.clear();
    for (const QString& word : missing_->text().split(QLatin1Char(','), Qt::SkipEmptyParts))
        layout.missing_words.push_back(to_std(word.trimmed()));
    layout.unit.reset();
    if (const auto chosen = find_unit(to_std(unit_->currentText())); chosen && unit_->currentIndex() > 0)
        layout.unit = chosen.value().id;
    layout.gauge = kind_->currentIndex() == 1;
    layout.backwards = direction_->currentIndex() == 1;
    layout.seconds_per_count = time_units[static_cast<std::size_t>(time_unit_->currentIndex())];
    std::optional<Problem> problem;
    const auto read = [&](const QLineEdit& box, double& into) {
        if (auto misread = read_box(box, into); misread && !problem && !box.isHidden())
            problem = misread;
    };
    read(*dead_centre_, layout.dead_centre_at);
    read(*counts_, layout.counts_per_revolution);
    read(*first_angle_, layout.first_angle);
    read(*speed_, layout.speed);
    layout.calibration.reset();
    if (signal_->isChecked()) {
        storage::TwoPointCalibration two;
        double* const points[] = {&two.signal_1, &two.pressure_1, &two.signal_2, &two.pressure_2};
        for (int i = 0; i < 4; ++i)
            read(*point_[i], *points[i]);
        layout.calibration = two;
    }
    return problem;
}

} // namespace evenstroke
