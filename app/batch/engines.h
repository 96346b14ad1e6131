// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "app/batch/command.h"
#include "core/trend/judgement.h"
#include "storage/history.h"
#include "storage/vessel_store.h"

#include <functional>
#include <memory>
#include <vector>

namespace evenstroke::batch {

/// Opens the history named by `--history`, for reading unless said.
Result<std::unique_ptr<storage::History>> open_history(const QCommandLineParser& parser,
                                                       storage::OpenMode mode = storage::OpenMode::read_only);

/// The engines meant by `--vessel` and `--engine`; all of them where neither is given.
/// @par Problems not_found: no such vessel or engine, with those there are
Result<std::vector<storage::EngineEntry>> chosen_engines(storage::History& history, const QCommandLineParser& parser);

/// The one engine meant by `--engine` and `--vessel`.
/// @par Problems not_found: there is none, with those there are; invalid_input: several, with their vessels
Result<storage::EngineEntry> chosen_engine(storage::History& history, const QCommandLineParser& parser);

/// Judges engine after engine and hands each judgement on. Answers the first problem.
Result<void> for_each_judgement(storage::History& history, const std::vector<storage::EngineEntry>& engines,
                                Streams& streams, const std::function<void(const Judgement&)>& use);

/// The place as the files write it: "3", "A3", "tc1", "cooler2", empty for the engine.
std::string place_cell(const Engine& engine, const Place& place);

} // namespace evenstroke::batch
