// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "app/desk/page.h"

#include <QAbstractButton>

#include <vector>

namespace evenstroke {

class FlowLayout;

/// An underlined part of the sentence.
class SentenceButton : public QAbstractButton
{
    Q_OBJECT

public:
    SentenceButton(SentencePart part, QChar letter, QWidget* parent = nullptr);
    SentencePart part() const { return part_; }
    void set_part_text(const QString& text);
    QSize sizeHint() const override;

protected:
    void paintEvent(QPaintEvent* event) override;

private:
    SentencePart part_;
    QChar letter_;
};

/// The only selection there is: a sentence whose underlined parts can be chosen by click or by their letter.
class SentenceBar : public QWidget
{
    Q_OBJECT

public:
    explicit SentenceBar(Workplace& workplace, QWidget* parent = nullptr);
    /// The page's template, "{engine} of {vessel}, {range}". The same template again only brings the words up to date.
    void show_sentence(const QString& sentence_template);
    /// Whether a part with this letter stands in the sentence; then its chooser opens.
    bool open_by_letter(QChar letter);
    /// The sentence in plain words.
    QString text() const;

protected:
    void paintEvent(QPaintEvent* event) override;

private:
    void build(const QString& sentence_template);
    void open_chooser(SentenceButton* button);

    Workplace& workplace_;
    FlowLayout* layout_;
    QString template_;
    struct Piece
    {
        QString words; ///< between the parts
        SentenceButton* button = nullptr;
        bool starts_sentence = false;
    };
    std::vector<Piece> pieces_;
};

} // namespace evenstroke
