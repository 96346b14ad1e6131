// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "app/survey/report_layout.h"
#include "core/problem.h"

#include <QObject>
#include <QThreadPool>

#include <memory>
#include <optional>

namespace evenstroke {

/// What a report is wanted of.
struct ReportWish
{
    QString history_path, engine_id;
    ReportPeriod period;
    ReportDetails details; ///< hashes and corrections are filled in
};

/// Makes reports on a worker thread with a connection of its own: reads the history, judges it up to the end of
/// the period, sets the pages. Only the newest wish is answered.
class ReportMaker : public QObject
{
    Q_OBJECT

public:
    explicit ReportMaker(QObject* parent = nullptr);
    ~ReportMaker() override;

    void make(const ReportWish& wish);
    void forget(); ///< what is being made is no longer wanted
    bool busy() const { return delivered_ != asked_; }
    std::shared_ptr<const ReportLayout> layout() const { return layout_; }
    const std::optional<Problem>& problem() const { return problem_; }

signals:
    void ready(); ///< a layout, or the problem that stood in its way

private:
    int asked_ = 0, delivered_ = 0;
    std::shared_ptr<const ReportLayout> layout_;
    std::optional<Problem> problem_;
    QThreadPool pool_;
};

} // namespace evenstroke
