// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/engine/engine.h"
#include "storage/common.h"

#include <QString>

#include <optional>
#include <string>
#include <string_view>
#include <vector>

/// engine.json: what is known of an engine, as people write and send it.
namespace evenstroke::storage {

struct EngineDocument
{
    Vessel vessel;
    Engine engine;
    std::vector<std::string> unknown_keys; ///< kept in the text, read by nobody: "reference.humidity"
    std::vector<std::string> remarks;      ///< names of quantities that are not known, with what may be meant
    std::string text;                      ///< the document as it stood
};

/// What is the matter at one place of a document.
struct DocumentProblem
{
    std::string key; ///< "baseline[2].load_percent"; empty: the document as a whole
    qint64 line = 0; ///< counts from 1; 0 where it is not known
    std::string value, reason, expected;
};

/// Reads a document and names everything that is the matter with it; with problems there is no document.
/// What only matters for taking an engine in (names, sizes, keys that stand twice, `find_problem`) is asked
/// by `find_document_problems`, so that a card can be evaluated with less.
std::optional<EngineDocument> read_engine_document(std::string_view text,
                                                   std::vector<DocumentProblem>& problems);
std::vector<DocumentProblem> find_document_problems(const EngineDocument& document);

/// The same for one caller with one document. @par Problems invalid_input: the first of the problems
Result<EngineDocument> read_engine_document(std::string_view text, const std::string& file_name);
/// @par Problems not_found, storage, invalid_input
Result<EngineDocument> read_engine_file(const QString& path);

/// The former document with what has changed in vessel and engine written over it. All other keys, and
/// numbers that mean what they meant, stay as they were typed. @param former may be empty
std::string write_engine_document(const Vessel& vessel, const Engine& engine, const std::string& former);

/// Whether two texts hold the same, however they are laid out.
bool same_document(const std::string& a, const std::string& b);
/// The keys of the outermost braces that differ: "baseline", "bore_mm".
std::vector<std::string> changed_keys(const std::string& before, const std::string& now);

} // namespace evenstroke::storage
