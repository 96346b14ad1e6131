// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/cards/card_files_run.h"

#include "app/desk/number_text.h"
#include "core/card/card_values.h"
#include "core/card/reading_conditions.h"
#include "core/trend/conditions.h"
#include "storage/card_packing.h"

#include <QFileInfo>
#include <QtConcurrentMap>

#include <algorithm>
#include <atomic>

namespace evenstroke {
namespace {

void evaluate_trace(const CardFilesTask& task, FileTrace& found)
{
    indicator::Trace trace{found.trace->cycle, found.trace->crank_angle_deg, found.trace->pressure_bar};
    indicator::Conditions conditions = indicator::conditions_at(task.engine, task.reading);
    const auto barometer = find_conditions(task.engine, task.reading).barometer;
    // Of the card: that the scavenge pressure was read over an unknown barometer is no matter of its own
    // zero.
    conditions.barometer_assumed = found.trace->gauge && !barometer;
    if (found.trace->gauge)
        for (double& pressure : trace.pressure)
            pressure += barometer.value_or(indicator::usual_barometer);
    auto card = indicator::evaluate(task.engine, conditions, trace);
    if (card)
        found.card = std::make_shared<indicator::Evaluation>(std::move(card.value()));
    else
        found.problem = card.error();
}

std::optional<int> cylinder_of(const CardFilesTask& task, std::size_t file, const storage::ReadTrace& read)
{
    if (task.layout.pressures.size() > 1)
        return read.cylinder;
    const CardFile& from = task.files[file];
    return from.cylinder
               ? from.cylinder
               : storage::guess_cylinder(to_std(QFileInfo(from.path).completeBaseName()), task.engine);
}

/// One layout holds for all files; a header that speaks of another unit, or counts from elsewhere, is asked about.
std::optional<WrittenUnit> contradicting_unit(const CardFilesTask& task, const QString& path)
{
    constexpr int some = 40;
    const auto lines = storage::first_lines_of(path, some);
    const auto unit = lines && task.layout.unit && !task.layout.calibration ? storage::guess_layout(lines.value()).unit : std::nullopt;
    return unit && contradicts(*unit, task.layout) ? unit : std::nullopt;
}

std::vector<FileTrace> read_file(const CardFilesTask& task, std::size_t file)
{
    auto read = storage::read_traces(task.files[file].path, task.layout, task.engine);
    std::vector<FileTrace> found;
    if (!read) {
        FileTrace none;
        none.file = file;
        none.problem = read.error();
        none.cylinder = task.files[file].cylinder;
        return {none};
    }
    const auto header_unit = contradicting_unit(task, task.files[file].path);
    for (storage::ReadTrace& one : read.value()) {
        FileTrace trace;
        trace.header_unit = header_unit;
        trace.file = file;
        trace.column = one.column;
        trace.cylinder = cylinder_of(task, file, one);
        trace.missing = one.missing;
        trace.trace = std::make_shared<storage::CardTrace>(std::move(one.trace));
        trace.packed = storage::pack_card(*trace.trace);
        evaluate_trace(task, trace);
        found.push_back(std::move(trace));
    }
    return found;
}

} // namespace

bool contradicts(const WrittenUnit& header, const storage::TraceLayout& layout)
{
    const PressureKind other = layout.gauge ? PressureKind::absolute : PressureKind::gauge;
    return header.id != layout.unit.value() || header.kind == other;
}

void CardFilesRun::start(const CardFilesTask& task)
{
    begin([this, task](const Told& tell) -> Delivery {
        const int count = static_cast<int>(task.files.size());
        std::atomic<int> done{0};
        std::atomic<bool> wanted{tell(0, count)};
        QList<int> files;
        for (int i = 0; i < count; ++i)
            files << i;
        const auto of_files =
            QtConcurrent::blockingMapped<QList<std::vector<FileTrace>>>(files, [&](int file) {
                std::vector<FileTrace> found;
                if (wanted)
                    found = read_file(task, static_cast<std::size_t>(file));
                if (!tell(++done, count))
                    wanted = false;
                return found;
            });
        std::vector<FileTrace> traces;
        for (const std::vector<FileTrace>& of_file : of_files)
            traces.insert(traces.end(), of_file.begin(), of_file.end());
        return [this, traces, complete = wanted.load()] {
            if (complete)
                emit finished(traces);
            else
                emit progressed();
        };
    });
}

} // namespace evenstroke
