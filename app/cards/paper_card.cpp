// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/cards/paper_card.h"

#include "app/desk/number_text.h"
#include "core/engine/planimeter.h"
#include "core/plain_text.h"

#include <QComboBox>
#include <QCoreApplication>
#include <QGridLayout>
#include <QLabel>
#include <QLineEdit>
#include <QPushButton>
#include <QRegularExpression>
#include <QSignalBlocker>

#include <vector>

namespace evenstroke {
namespace {

constexpr double millimetres_an_inch = 25.4; // exact: international yard and pound agreement of 1959

Result<double> read(const QString& text, const char* what)
{
    if (text.trimmed().isEmpty())
        return Problem{Problem::Kind::not_found, std::string(what) + " is not entered yet.", "Write it."};
    const auto number = parse_number(to_std(text));
    if (!number)
        return Problem{number.error().kind, std::string(what) + ": " + number.error().what_happened,
                       number.error().what_to_do};
    return number;
}

Result<IndicatorSpring> read_spring(const PaperCardText& text)
{
    const auto number = read(text.spring, "The spring scale");
    if (!number)
        return number.error();
    if (!(number.value() > 0.0))
        return invalid_input("A spring scale of " + evenstroke::number_text(number.value()) + " cannot be.",
                             "Write the number stamped on the spring.");
    switch (text.spring_in) {
    case 0:
        return spring_of_millimetres_per_bar(number.value());
    case 1:
        return spring_of_bar_per_millimetre(number.value());
    default:
        return spring_of_psi_per_inch(number.value());
    }
}

/// Of one millimetre of height, for the workings.
QString spring_words(IndicatorSpring spring)
{
    const double bar = in_bar(PressureDifference(spring * millimetres(1.0)));
    return PaperCard::tr("%1 bar/mm").arg(to_qstring(short_number_text(bar)));
}

Result<PaperCardResult> from_heights(const PaperCardText& text, IndicatorSpring spring)
{
    const double scale = text.inches ? millimetres_an_inch : 1.0;
    std::vector<Length> heights;
    double sum = 0.0;
    static const QRegularExpression between(QStringLiteral("[\\s;]+"));
    for (const QString& one : text.heights.split(between, Qt::SkipEmptyParts)) {
        const auto height = read(one, "A height");
        if (!height)
            return height.error();
        heights.push_back(millimetres(height.value() * scale));
        sum += height.value() * scale;
    }
    const auto pressure = mid_ordinate_pressure(heights, spring);
    if (!pressure)
        return pressure.error();
    const double mean = sum / static_cast<double>(heights.size()), bar = in_bar(pressure.value());
    return PaperCardResult{
        bar, PaperCard::tr("mean of %1 heights %2 mm · %3 = %4 bar")
                 .arg(heights.size())
                 .arg(to_qstring(short_number_text(mean)), spring_words(spring), number_text(bar, 2))};
}

Result<PaperCardResult> from_area(const PaperCardText& text, IndicatorSpring spring)
{
    const auto area = read(text.area, "The area");
    if (!area)
        return area.error();
    const auto length = read(text.length, "The length of the card");
    if (!length)
        return length.error();
    const double scale = text.inches ? millimetres_an_inch : 1.0;
    const double wide = length.value() * scale, covered = area.value() * scale * scale;
    const auto pressure =
        planimeter_pressure(Area(covered * millimetres(1.0) * millimetres(1.0)), millimetres(wide), spring);
    if (!pressure)
        return pressure.error();
    const double bar = in_bar(pressure.value());
    return PaperCardResult{bar, PaperCard::tr("%1 mm² / %2 mm · %3 = %4 bar")
                                    .arg(to_qstring(short_number_text(covered)),
                                         to_qstring(short_number_text(wide)), spring_words(spring),
                                         number_text(bar, 2))};
}

} // namespace

Result<PaperCardResult> work_out(const PaperCardText& text)
{
    const auto spring = read_spring(text);
    if (!spring)
        return spring.error();
    return text.heights.trimmed().isEmpty() ? from_area(text, spring.value())
                                            : from_heights(text, spring.value());
}

PaperCard::PaperCard(QWidget* parent)
    : QWidget(parent), cylinder_(new QComboBox(this)), length_unit_(new QComboBox(this)),
      way_(new QComboBox(this)), area_(new QLineEdit(this)), length_(new QLineEdit(this)),
      heights_(new QLineEdit(this)), spring_(new QLineEdit(this)), spring_unit_(new QComboBox(this)),
      answer_(new QLabel(this)), put_(new QPushButton(tr("put into the reading"), this))
{
    way_->addItems({tr("area"), tr("ten heights")});
    length_unit_->addItems({tr("mm², mm"), tr("in², in")});
    spring_unit_->addItems({tr("mm a bar"), tr("bar a mm"), tr("lb/in² an inch")});
    heights_->setPlaceholderText(tr("divided by blanks"));
    put_->setProperty("worded", true);
    answer_->setWordWrap(true);
    auto* grid = new QGridLayout(this);
    grid->setContentsMargins(0, 0, 0, 0);
    grid->setHorizontalSpacing(8);
    grid->setVerticalSpacing(4);
    const auto add = [&](int row, int column, const QString& title, QWidget* box, int wide = 1) {
        auto* label = new QLabel(title, this);
        label->setProperty("muted", true);
        label->setProperty("small", true);
        label->setBuddy(box);
        box->setAccessibleName(title);
        grid->addWidget(label, 2 * row, column);
        grid->addWidget(box, 2 * row + 1, column, 1, wide);
    };
    add(0, 0, tr("Cylinder"), cylinder_);
    add(0, 1, tr("Measured"), way_);
    add(0, 2, tr("In"), length_unit_);
    add(1, 0, tr("Area"), area_);
    add(1, 0, tr("Heights"), heights_, 2);
    add(1, 1, tr("Length"), length_);
    add(2, 0, tr("Spring"), spring_);
    add(2, 1, tr("Stamped in"), spring_unit_);
    grid->addWidget(answer_, 6, 0, 1, 3);
    grid->addWidget(put_, 7, 0, 1, 3, Qt::AlignLeft);
    for (QComboBox* box : {cylinder_, way_, length_unit_, spring_unit_})
        connect(box, &QComboBox::currentIndexChanged, this, &PaperCard::take_input);
    for (QLineEdit* box : {area_, length_, heights_, spring_})
        connect(box, &QLineEdit::textChanged, this, &PaperCard::take_input);
    connect(put_, &QPushButton::clicked, this, &PaperCard::put);
    show_answer();
}

void PaperCard::set_engine(const Engine& engine)
{
    const QSignalBlocker quiet(cylinder_); // nobody chose anything
    const int before = cylinder_->currentIndex();
    cylinder_->clear();
    for (int number = 1; number <= engine.cylinders; ++number)
        cylinder_->addItem(to_qstring(engine.cylinder_name(number)));
    cylinder_->setCurrentIndex(before >= 0 && before < engine.cylinders ? before : 0);
}

void PaperCard::set_can_put(bool can)
{
    can_put_ = can;
    show_answer();
}

void PaperCard::set_usual(FindUsual find)
{
    find_usual_ = std::move(find);
    asked_ = false;
    show_answer();
}

void PaperCard::take_input()
{
    asked_ = false;
    show_answer();
    emit changed();
}

void PaperCard::put()
{
    if (!bar_ || cylinder_->currentIndex() < 0)
        return;
    if (!asked_ && !question().isEmpty()) {
        asked_ = true;
        show_answer();
        return;
    }
    emit put_into_reading(cylinder_->currentIndex() + 1, *bar_);
}

/// Empty where the result is one that this engine has, or where that is not known.
QString PaperCard::question() const
{
    const auto usual = bar_ && find_usual_ && cylinder_->currentIndex() >= 0
                           ? find_usual_(cylinder_->currentIndex() + 1)
                           : std::nullopt;
    if (!usual || !far_from(*usual, *bar_))
        return {};
    const QString words =
        usual->of_baseline ? tr("The baseline of this engine has %1 bar at this load. Are spring, area and "
                                "length written as they are?")
                           : tr("The other cylinders of this reading have about %1 bar. Are spring, area and "
                                "length written as they are?");
    return words.arg(number_text(usual->bar, 1));
}

PaperCardText PaperCard::text() const
{
    PaperCardText text{area_->text(),
                       length_->text(),
                       {},
                       spring_->text(),
                       length_unit_->currentIndex() == 1,
                       spring_unit_->currentIndex()};
    if (way_->currentIndex() == 1)
        text.heights = heights_->text();
    return text;
}

void PaperCard::set_text(const PaperCardText& text)
{
    way_->setCurrentIndex(text.heights.isEmpty() ? 0 : 1);
    length_unit_->setCurrentIndex(text.inches ? 1 : 0);
    spring_unit_->setCurrentIndex(text.spring_in);
    area_->setText(text.area);
    length_->setText(text.length);
    heights_->setText(text.heights);
    spring_->setText(text.spring);
}

QString PaperCard::answer() const
{
    return answer_->text();
}

void PaperCard::show_answer()
{
    const bool heights = way_->currentIndex() == 1;
    heights_->setVisible(heights);
    area_->setVisible(!heights);
    length_->setVisible(!heights);
    for (QLabel* label : findChildren<QLabel*>())
        if (label->buddy() == heights_ || label->buddy() == area_ || label->buddy() == length_)
            label->setVisible(heights == (label->buddy() == heights_));
    bar_.reset();
    const bool begun = !spring_->text().isEmpty() && !(heights ? heights_ : area_)->text().isEmpty() &&
                       (heights || !length_->text().isEmpty());
    const auto worked = begun ? work_out(text()) : Result<PaperCardResult>(Problem{});
    if (worked)
        bar_ = worked.value().bar;
    QStringList lines;
    if (begun)
        lines << (worked ? worked.value().workings : to_qstring(worked.error().text()));
    if (const QString doubt = question(); !doubt.isEmpty())
        lines << doubt;
    answer_->setText(lines.join(QLatin1Char('\n')));
    put_->setText(asked_ ? tr("it is right: put it into the reading") : tr("put into the reading"));
    answer_->setVisible(begun);
    put_->setEnabled(bar_.has_value() && can_put_);
}

} // namespace evenstroke
