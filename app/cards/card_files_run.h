// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "app/desk/worker_run.h"
#include "core/card/evaluation.h"
#include "core/reading/reading.h"
#include "storage/card_store.h"
#include "storage/trace_layout.h"

#include <QByteArray>
#include <QString>

#include <memory>
#include <optional>
#include <vector>

namespace evenstroke {

/// A file that was chosen, with what the engineer said of its cylinder.
struct CardFile
{
    QString path;
    std::optional<int> cylinder; ///< of a file with one pressure column; empty: guessed
};

/// One trace out of a file, or why there is none.
struct FileTrace
{
    std::size_t file = 0;
    int column = 0; ///< 0: the file could not be read
    std::optional<int> cylinder;
    std::shared_ptr<const storage::CardTrace> trace;
    int missing = 0;
    std::shared_ptr<const indicator::Evaluation> card;
    std::optional<Problem> problem; ///< with `trace`: it can be kept and not be evaluated
    std::optional<WrittenUnit> header_unit; ///< of its own header, where that contradicts the layout
    QByteArray packed; ///< the samples as a history keeps them
    std::vector<storage::CardEntry> same; ///< stored cards of the engine with exactly these samples, as the page found them
};

/// Everything that reading and evaluating files needs, apart from the window.
struct CardFilesTask
{
    std::vector<CardFile> files;
    storage::TraceLayout layout;
    Engine engine;
    Reading reading; ///< for speed, charge pressure and temperature
};

/// Whether a header speaks of another unit than the layout, or counts from elsewhere; both name one.
bool contradicts(const WrittenUnit& header, const storage::TraceLayout& layout);

/// Reads the files of a task and evaluates their cards, a few at a time.
class CardFilesRun : public WorkerRun
{
    Q_OBJECT

public:
    using WorkerRun::WorkerRun;
    void start(const CardFilesTask& task);

signals:
    void finished(const std::vector<evenstroke::FileTrace>& traces);
};

} // namespace evenstroke
