// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/desk/sentence_bar.h"

#include "app/desk/flow_layout.h"
#include "app/desk/sentence_choices.h"
#include "app/desk/theme.h"
#include "app/desk/workplace.h"

#include <QLabel>
#include <QPainter>
#include <QRegularExpression>

namespace evenstroke {

namespace {

constexpr int line_height = 26, letter_gap = 1;

QFont sentence_font()
{
    QFont font = type(TypeSize::body);
    font.setPointSizeF(11.5);
    return font;
}
QFont letter_font()
{
    QFont font = type(TypeSize::label);
    font.setPointSizeF(7.0);
    return font;
}

} // namespace

SentenceButton::SentenceButton(SentencePart part, QChar letter, QWidget* parent)
    : QAbstractButton(parent), part_(part), letter_(letter)
{
    setFocusPolicy(Qt::TabFocus);
    setCursor(Qt::PointingHandCursor);
    setAttribute(Qt::WA_Hover);
    setFont(sentence_font());
}

void SentenceButton::set_part_text(const QString& text)
{
    setText(text);
    setAccessibleName(text);
    setAccessibleDescription(tr("Choose another; key %1").arg(letter_));
    setToolTip(tr("Choose another: key %1").arg(letter_));
    updateGeometry();
    update();
}

QSize SentenceButton::sizeHint() const
{
    return {QFontMetrics(sentence_font()).horizontalAdvance(text()) + letter_gap
                + QFontMetrics(letter_font()).horizontalAdvance(letter_),
            line_height};
}

void SentenceButton::paintEvent(QPaintEvent*)
{
    const Theme& t = theme();
    QPainter painter(this);
    if (hasFocus() || underMouse())
        painter.fillRect(rect(), hasFocus() ? t.band : t.sheet);
    painter.setFont(sentence_font());
    const QFontMetrics metrics(painter.font());
    const int words = metrics.horizontalAdvance(text());
    const int baseline = (height() + metrics.ascent() - metrics.descent()) / 2;
    painter.setPen(t.ink);
    painter.drawText(0, baseline, text());
    painter.drawLine(0, baseline + 3, words - 1, baseline + 3);
    painter.setFont(letter_font());
    painter.setPen(t.muted);
    painter.drawText(words + letter_gap, baseline - metrics.xHeight() / 2 - 1, QString(letter_));
}

SentenceBar::SentenceBar(Workplace& workplace, QWidget* parent)
    : QWidget(parent), workplace_(workplace), layout_(new FlowLayout(this))
{
    layout_->setContentsMargins(24, 16, 24, 12);
    QSizePolicy policy(QSizePolicy::Preferred, QSizePolicy::Fixed);
    policy.setHeightForWidth(true);
    setSizePolicy(policy);
    setMinimumHeight(56);
    setAccessibleName(tr("What is looked at"));
}

void SentenceBar::build(const QString& sentence_template)
{
    for (const Piece& piece : pieces_)
        delete piece.button;
    qDeleteAll(findChildren<QLabel*>());
    pieces_.clear();
    template_ = sentence_template;
    static const QRegularExpression token(QStringLiteral("\\{(\\w+)\\}|[^{ ]+ ?| "));
    auto match = token.globalMatch(sentence_template);
    while (match.hasNext()) {
        const auto found = match.next();
        Piece piece;
        if (const auto part = find_sentence_part(found.captured(1))) {
            piece.button = new SentenceButton(*part, sentence_letter(*part), this);
            piece.starts_sentence = pieces_.empty();
            connect(piece.button, &QAbstractButton::clicked, this, [this, b = piece.button] { open_chooser(b); });
            layout_->addWidget(piece.button);
        } else {
            piece.words = found.captured(0);
            auto* label = new QLabel(piece.words, this);
            label->setFont(sentence_font());
            label->setFixedHeight(line_height);
            label->setTextFormat(Qt::PlainText);
            layout_->addWidget(label);
        }
        pieces_.push_back(piece);
    }
    for (const Piece& piece : pieces_)
        if (piece.button)
            piece.button->show();
    for (QLabel* label : findChildren<QLabel*>())
        label->show();
}

void SentenceBar::show_sentence(const QString& sentence_template)
{
    if (sentence_template != template_)
        build(sentence_template);
    for (const Piece& piece : pieces_)
        if (piece.button)
            piece.button->set_part_text(sentence_text(piece.button->part(), workplace_, piece.starts_sentence));
    layout_->invalidate();
    updateGeometry();
}

QString SentenceBar::text() const
{
    QString text;
    for (const Piece& piece : pieces_)
        text += piece.button ? piece.button->text() : piece.words;
    return text;
}

bool SentenceBar::open_by_letter(QChar letter)
{
    for (const Piece& piece : pieces_)
        if (piece.button && sentence_letter(piece.button->part()) == letter) {
            open_chooser(piece.button);
            return true;
        }
    return false;
}

void SentenceBar::open_chooser(SentenceButton* button)
{
    const SentencePart part = button->part();
    const std::vector<Choice> choices = sentence_choices(part, workplace_);
    if (choices.empty())
        return;
    auto* chooser = new Chooser(choices, [this, part](const QVariant& value) {
        workplace_.select(with_choice(part, workplace_, value));
    }, this);
    chooser->open_below(button);
}

void SentenceBar::paintEvent(QPaintEvent*)
{
    QPainter painter(this);
    painter.fillRect(rect(), theme().page);
    painter.setPen(theme().rule);
    painter.drawLine(0, height() - 1, width(), height() - 1);
}

} // namespace evenstroke
