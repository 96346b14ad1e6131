// SPDX-License-Identifier: GPL-3.0-or-later
#include "storage/engine_json.h"

#include "core/plain_text.h"
#include "storage/engine_json_checks.h"
#include "storage/named_file.h"
#include "storage/sql.h"

#include <QFile>
#include <QFileInfo>
#include <QJsonDocument>

#include <algorithm>

namespace evenstroke::storage {

EngineDocument read_document_object(const QJsonObject& object, std::vector<DocumentProblem>& problems);

namespace {

constexpr qint64 largest_document = 4 << 20; // bytes; a baseline of a hundred points has 40 kB

std::string_view without_bom(std::string_view text)
{
    return text.starts_with("\xEF\xBB\xBF") ? text.substr(3) : text;
}

qint64 line_at(std::string_view text, std::size_t offset)
{
    return 1 + std::count(text.begin(),
                          text.begin() + static_cast<std::ptrdiff_t>(std::min(offset, text.size())), '\n');
}

/// The line on which a key first stands; its last part is enough to lead somebody there. A key that is missing from
/// an object leads to the object.
qint64 line_of(std::string_view text, const std::string& key)
{
    const std::size_t dot = key.rfind('.');
    std::string name = dot == std::string::npos ? key : key.substr(dot + 1);
    name.erase(std::min(name.find('['), name.size())); // "walls[1]" stands under "walls"
    const std::size_t at = name.empty() ? std::string_view::npos : text.find("\"" + name + "\"");
    if (at != std::string_view::npos)
        return line_at(text, at);
    return dot == std::string::npos ? 0 : line_of(text, key.substr(0, dot));
}

std::string structure_words(QJsonParseError::ParseError what)
{
    switch (what) {
    case QJsonParseError::DeepNesting:
        return "the braces and brackets are nested too deeply";
    case QJsonParseError::IllegalUTF8String:
        return "there are bytes that are not UTF-8";
    case QJsonParseError::UnterminatedObject:
        return "a closing brace is missing";
    case QJsonParseError::UnterminatedArray:
        return "a closing bracket is missing";
    case QJsonParseError::UnterminatedString:
        return "a closing quotation mark is missing";
    case QJsonParseError::MissingNameSeparator:
        return "a colon is missing after a key";
    case QJsonParseError::MissingValueSeparator:
        return "a comma is missing between two values";
    case QJsonParseError::GarbageAtEnd:
        return "something follows after the last brace";
    case QJsonParseError::IllegalNumber:
        return "a number cannot be read";
    default:
        return "a value cannot be read";
    }
}

/// The sizes without which an engine cannot be judged. What was written wrong was refused when it was read,
/// so nought means that the key is not there.
void add_missing_sizes(std::vector<DocumentProblem>& problems, const EngineDocument& document)
{
    const Engine& engine = document.engine;
    const struct
    {
        const char* key;
        double value;
    } sizes[] = {{"bore_mm", engine.bore.value()},
                 {"stroke_mm", engine.stroke.value()},
                 {"rod_length_mm", engine.rod_length.value()},
                 {"rated_power_kw", engine.rated_power.value()},
                 {"rated_speed_rpm", engine.rated_speed.value()}};
    for (const auto& size : sizes)
        if (size.value == 0.0)
            problems.push_back({size.key, 0, "", std::string(size.key) + " is not given.",
                                std::string("Write \"") + size.key + "\" with a number above zero."});
}

void add(std::vector<DocumentProblem>& problems, std::string reason, std::string expected)
{
    problems.push_back({"", 0, "", std::move(reason), std::move(expected)});
}

} // namespace

std::optional<EngineDocument> read_engine_document(std::string_view whole,
                                                   std::vector<DocumentProblem>& problems)
{
    const std::string_view text = without_bom(whole);
    if (static_cast<qint64>(text.size()) > largest_document) {
        add(problems, "The document is larger than 4 MB.",
            "Write one engine's particulars and nothing else.");
        return std::nullopt;
    }
    QJsonParseError said;
    const QJsonDocument json = QJsonDocument::fromJson(
        QByteArray::fromRawData(text.data(), static_cast<qsizetype>(text.size())), &said);
    if (said.error != QJsonParseError::NoError) {
        const bool empty = trimmed(text).empty();
        problems.push_back({"", line_at(text, static_cast<std::size_t>(said.offset)), "",
                            empty
                                ? "The document is empty."
                                : "The document cannot be read as JSON: " + structure_words(said.error) + ".",
                            "Write a JSON object with the engine's particulars."});
        return std::nullopt;
    }
    if (!json.isObject()) {
        add(problems, "The document is a list, not an object.", "Write one engine in braces: {…}.");
        return std::nullopt;
    }
    const std::size_t before = problems.size();
    EngineDocument document = read_document_object(json.object(), problems);
    for (std::size_t i = before; i < problems.size(); ++i)
        problems[i].line = line_of(text, problems[i].key);
    if (problems.size() > before)
        return std::nullopt;
    document.text = std::string(text);
    return document;
}

std::vector<DocumentProblem> find_document_problems(const EngineDocument& document)
{
    std::vector<DocumentProblem> problems;
    const auto lacks = [&](const char* key, const char* what) {
        problems.push_back({key, line_of(document.text, key), "",
                            std::string("The document names no ") + what + ".",
                            std::string("Write \"") + key + "\" with a name."});
    };
    if (document.vessel.name.empty())
        lacks("vessel", "vessel");
    if (document.engine.name.empty())
        lacks("engine", "engine");
    add_missing_sizes(problems, document);
    for (const RepeatedKey& twice : find_repeated_keys(document.text))
        problems.push_back({twice.key, line_at(document.text, twice.offset), "",
                            "The key " + evenstroke::quoted(twice.key) +
                                " stands twice in the same braces, and only one of the two can count.",
                            "Leave one of the two out."});
    if (!problems.empty())
        return problems;
    if (const auto problem = find_problem(document.engine))
        problems.push_back({"", 0, "", problem->what_happened, problem->what_to_do});
    return problems;
}

Result<EngineDocument> read_engine_document(std::string_view text, const std::string& file_name)
{
    std::vector<DocumentProblem> problems;
    auto document = read_engine_document(text, problems);
    if (document)
        return std::move(*document);
    const DocumentProblem& first = problems.front();
    const std::string line = first.line > 0 ? ", line " + std::to_string(first.line) : "";
    return invalid_input(file_name + line + ": " + first.reason, first.expected);
}

Result<EngineDocument> read_engine_file(const QString& path)
{
    QFile file(path);
    const std::string name = from_qt(QFileInfo(path).fileName());
    if (const auto problem = open_named(file))
        return *problem;
    const QByteArray content = file.read(largest_document + 1);
    return read_engine_document(
        std::string_view(content.constData(), static_cast<std::size_t>(content.size())), name);
}

bool same_document(const std::string& a, const std::string& b)
{
    if (a == b)
        return true;
    const auto parsed = [](const std::string& text) {
        return QJsonDocument::fromJson(QByteArray::fromStdString(text));
    };
    return !parsed(a).isNull() && parsed(a) == parsed(b);
}

std::vector<std::string> changed_keys(const std::string& before, const std::string& now)
{
    const QJsonObject first = QJsonDocument::fromJson(QByteArray::fromStdString(before)).object();
    const QJsonObject second = QJsonDocument::fromJson(QByteArray::fromStdString(now)).object();
    std::vector<std::string> keys;
    for (const QString& key : second.keys())
        if (first.value(key) != second.value(key))
            keys.push_back(from_qt(key));
    for (const QString& key : first.keys())
        if (!second.contains(key))
            keys.push_back(from_qt(key));
    return keys;
}

} // namespace evenstroke::storage
