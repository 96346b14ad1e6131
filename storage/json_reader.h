// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "storage/engine_json.h"

#include <QJsonArray>
#include <QJsonObject>
#include <QJsonValue>

#include <set>

namespace evenstroke::storage {

/// Takes keys out of a JSON object, says what is the matter with them, and knows which were left.
class JsonReader
{
public:
    /// @param where  path of the object in sentences: "", "reference.", "baseline[2]."
    JsonReader(QJsonObject object, std::string where, std::vector<DocumentProblem>& problems)
        : object_(std::move(object)), where_(std::move(where)), problems_(problems)
    {
    }

    bool has(const char* key) const;
    /// Undefined where the key is not there or null.
    QJsonValue take(const char* key);
    std::string text(const char* key);
    std::optional<double> number(const char* key);
    std::optional<double> positive(const char* key);
    std::optional<int> whole(const char* key, int low, int high);
    std::optional<bool> truth(const char* key);
    std::vector<std::string> left_keys() const; ///< with their path
    /// A key of an object below this one that nobody reads, path and all: among the left ones from now on.
    void keep_aside(std::string key) { aside_.push_back(std::move(key)); }

    void refuse(const char* key, const QJsonValue& value, const std::string& reason,
                const std::string& expected);
    std::string path(const char* key) const { return where_ + key; }
    const QJsonObject& object() const { return object_; }
    std::vector<DocumentProblem>& problems() { return problems_; }

private:
    QJsonObject object_;
    std::string where_;
    std::vector<DocumentProblem>& problems_;
    std::set<std::string> taken_;
    std::vector<std::string> aside_;
};

/// A JSON value as a sentence shows it, shortened.
std::string json_text(const QJsonValue& value);

} // namespace evenstroke::storage
