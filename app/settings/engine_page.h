// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "app/desk/page.h"
#include "app/settings/baseline_model.h"
#include "app/settings/engine_draft.h"
#include "app/settings/engine_table.h"
#include "core/engine/shop_trial.h"

#include <map>
#include <memory>
#include <vector>

class QComboBox;
class QLineEdit;
class QTableView;

class QPushButton;

namespace Ui {
class EnginePage;
}

namespace evenstroke {

/// The engine as it is described: particulars, baseline, coefficients, limits, instruments, load diagram and walls,
/// each with its source.
/// Also where a new ship or engine is made. Changes are kept until they are saved as a revision.
class EnginePage : public Page
{
    Q_OBJECT

public:
    explicit EnginePage(Workplace& workplace, QWidget* parent = nullptr);
    ~EnginePage() override;
    QString name() const override { return QStringLiteral("engine"); }
    QString title() const override { return tr("Engine"); }
    QString sentence() const override;
    void refresh() override;
    QString foot_text() const override;
    QString draft_text() const override;
    bool may_leave() override;
    QWidget* first_focus() override;

    EngineDraft& draft() { return draft_; }
    const BaselineModel& baseline() const { return baseline_; }
    /// Reads a pasted table and shows what was understood; nothing is changed before `take_trial`.
    bool show_trial(const QString& text);
    void take_trial();
    bool save();
    void begin_new(bool new_ship);

private:
    void make_fields();
    void connect_sections();
    void connect_baseline();
    void set_up_table(QTableView& view, EngineTable& model, QPushButton& remove);
    void connect_saving();
    void open_section(int index);
    std::vector<QPushButton*> section_buttons() const;
    void take_field(std::size_t index, const QString& text);
    void show_state();
    void show_plot();
    void show_revision();
    void paste();
    void drop_trial();
    void say(const QString& words);

    struct Box
    {
        QLineEdit* line = nullptr;
        QComboBox* choice = nullptr;
    };

    std::unique_ptr<Ui::EnginePage> ui_;
    EngineDraft draft_;
    BaselineModel baseline_;
    EngineTable coefficients_, limits_, instruments_, load_limits_, walls_;
    std::vector<Box> boxes_;
    std::optional<ShopTrial> trial_;
    QString shown_engine_, plotted_ = {};
    bool warned_ = false; ///< leaving with unsaved changes was asked once
};

} // namespace evenstroke
