// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/card/usual_mean_indicated.h"

#include <QWidget>

#include <functional>
#include <optional>

class QComboBox;
class QLabel;
class QLineEdit;
class QPushButton;

namespace evenstroke {

/// What is typed of a card drawn on paper. Area and length in the units chosen, or ten heights instead of the
/// area.
struct PaperCardText
{
    QString area, length, heights, spring;
    bool inches = false; ///< areas in in², lengths and heights in in; else mm², mm
    int spring_in = 0;   ///< 0: mm a bar, 1: bar a mm, 2: lb/in² an inch
};
struct PaperCardResult
{
    double bar = 0.0;
    QString workings; ///< "850 mm² / 70 mm · 1.667 bar/mm = 20.24 bar"
};
/// @par Problems invalid_input, not_found: what is not typed, or cannot be
Result<PaperCardResult> work_out(const PaperCardText& text);

/// A card drawn by a pencil: area by the planimeter or ten heights, length and spring, to the mean indicated
/// pressure.
class PaperCard : public QWidget
{
    Q_OBJECT

public:
    explicit PaperCard(QWidget* parent = nullptr);
    void set_engine(const Engine& engine);
    void set_can_put(bool can);
    using FindUsual = std::function<std::optional<indicator::UsualMeanIndicated>(int cylinder)>;
    /// A result far from the usual one is put into the reading only when asked for twice.
    void set_usual(FindUsual find);
    PaperCardText text() const;
    void set_text(const PaperCardText& text); ///< for tests
    QString answer() const;

signals:
    void changed(); ///< by a person: another card than the one before
    void put_into_reading(int cylinder, double mean_indicated_bar);

private:
    void show_answer();
    void take_input();
    void put();
    QString question() const;

    QComboBox* cylinder_;
    QComboBox* length_unit_;
    QComboBox* way_;
    QLineEdit* area_;
    QLineEdit* length_;
    QLineEdit* heights_;
    QLineEdit* spring_;
    QComboBox* spring_unit_;
    QLabel* answer_;
    QPushButton* put_;
    std::optional<double> bar_;
    bool can_put_ = false;
    FindUsual find_usual_;
    bool asked_ = false; ///< the question was seen, and the button pressed once
};

} // namespace evenstroke
