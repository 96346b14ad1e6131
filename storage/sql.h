// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "storage/common.h"

#include <QByteArray>
#include <QSqlDatabase>
#include <QSqlError>
#include <QSqlQuery>
#include <QString>
#include <QVariant>

#include <optional>
#include <string>
#include <string_view>

/// A thin hand on QtSql for the stores of this layer: text as UTF-8, refusals in words.
namespace evenstroke::storage {

/// What the database said, in words the user can act on.
/// @param undone  what did not happen: "the reading was not saved"
Problem storage_problem(const QSqlError& said, const std::string& undone);

inline QString to_qt(std::string_view text)
{
    return text.empty() ? QString(QLatin1String("")) // a null string would be bound as NULL
                        : QString::fromUtf8(text.data(), static_cast<qsizetype>(text.size()));
}
std::string from_qt(const QString& text);

inline QVariant to_variant(const std::string& text)
{
    return to_qt(text);
}
inline QVariant to_variant(std::string_view text)
{
    return to_qt(text);
}
inline QVariant to_variant(const char* text)
{
    return to_qt(text);
}
inline QVariant to_variant(const QByteArray& bytes)
{
    return bytes;
}
inline QVariant to_variant(double number)
{
    return number;
}
inline QVariant to_variant(int number)
{
    return number;
}
inline QVariant to_variant(qint64 number)
{
    return QVariant::fromValue(number);
}
inline QVariant to_variant(bool) = delete; // say 0 or 1
inline QVariant to_variant(std::nullopt_t)
{
    return {};
}
template <typename T> QVariant to_variant(const std::optional<T>& value)
{
    return value ? to_variant(*value) : QVariant();
}
inline qint64 seconds_of(TimePoint time)
{
    return time.time_since_epoch().count();
}
inline TimePoint time_of(qint64 seconds)
{
    return TimePoint(std::chrono::seconds(seconds));
}

/// One prepared statement. What goes wrong on the way is kept until asked for.
class Query
{
public:
    /// @param undone  what did not happen if the statement does not run
    Query(const QSqlDatabase& database, const QString& statement, std::string undone);
    Query(const QSqlDatabase& database, const char* statement, std::string undone)
        : Query(database, QString::fromUtf8(statement), std::move(undone))
    {
    }

    template <typename... Values> Done run(const Values&... values)
    {
        int index = 0;
        (query_.bindValue(index++, to_variant(values)), ...);
        return execute();
    }
    Done execute();
    void bind(int index, const QVariant& value) { query_.bindValue(index, value); }

    bool next() { return query_.next(); }
    /// After the last row: whether it really was the last.
    Done finished() const;
    Problem problem() const { return storage_problem(query_.lastError(), undone_); }

    std::string text(int column) const { return from_qt(query_.value(column).toString()); }
    qint64 integer(int column) const { return query_.value(column).toLongLong(); }
    int small(int column) const { return query_.value(column).toInt(); }
    bool is_null(int column) const { return query_.isNull(column); }
    std::optional<double> real(int column) const;
    QByteArray bytes(int column) const { return query_.value(column).toByteArray(); }
    QVariant raw(int column) const { return query_.value(column); }
    qint64 inserted_key() const { return query_.lastInsertId().toLongLong(); }
    int changed_rows() const { return query_.numRowsAffected(); }

private:
    QSqlQuery query_;
    std::string undone_;
    bool prepared_ = false;
};

/// Runs one statement without values. QtSql takes one statement at a time.
Done run_statement(const QSqlDatabase& database, const QString& statement, const std::string& undone);
/// The one number a statement answers, such as a pragma's.
Result<qint64> ask_number(const QSqlDatabase& database, const QString& statement, const std::string& undone);

} // namespace evenstroke::storage
