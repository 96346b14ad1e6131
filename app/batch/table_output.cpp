// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/batch/table_output.h"

#include <QJsonDocument>
#include <QJsonObject>

#include <charconv>
#include <cmath>

namespace evenstroke::batch {
namespace {

std::string csv_text(const std::string& text)
{
    if (text.find_first_of(",\"\r\n") == std::string::npos)
        return text;
    std::string quoted = "\"";
    for (char c : text)
        quoted += c == '"' ? std::string("\"\"") : std::string(1, c);
    return quoted + "\"";
}

std::string cell_text(const TableOutput::Cell& cell)
{
    if (const auto* text = std::get_if<std::string>(&cell))
        return csv_text(*text);
    if (const auto* value = std::get_if<double>(&cell))
        return exact_number(*value);
    return {};
}

} // namespace

std::string exact_number(double value)
{
    if (!std::isfinite(value))
        return {};
    char buffer[64];
    const auto end = std::to_chars(buffer, buffer + sizeof buffer, value).ptr;
    return {buffer, end};
}

std::optional<TableOutput::Format> TableOutput::read_format(const QCommandLineParser& parser, Streams& streams)
{
    const QString text = parser.value(QStringLiteral("format"));
    if (text.isEmpty() || text == QStringLiteral("csv"))
        return Format::csv;
    if (text == QStringLiteral("json"))
        return Format::json;
    streams.err << "\"" << text << "\" is no format. Use --format csv or --format json.\n";
    return std::nullopt;
}

TableOutput::TableOutput(Streams& streams, Format format, std::vector<std::string> header)
    : streams_(streams), format_(format), header_(std::move(header))
{
}

void TableOutput::begin()
{
    if (begun_)
        return;
    begun_ = true;
    if (format_ == Format::json)
        streams_.out << "[";
    else
        csv_row({header_.begin(), header_.end()});
}

void TableOutput::row(const std::vector<Cell>& cells)
{
    begin();
    if (format_ == Format::csv)
        csv_row(cells);
    else
        json_row(cells);
    first_ = false;
}

void TableOutput::finish()
{
    begin();
    if (format_ == Format::json)
        streams_.out << (first_ ? "]\n" : "\n]\n");
    streams_.out.flush();
}

void TableOutput::csv_row(const std::vector<Cell>& cells)
{
    std::string line;
    for (std::size_t i = 0; i < cells.size(); ++i)
        line += (i == 0 ? "" : ",") + cell_text(cells[i]);
    streams_.out << QString::fromStdString(line) << "\n";
}

void TableOutput::json_row(const std::vector<Cell>& cells)
{
    QJsonObject object;
    for (std::size_t i = 0; i < cells.size() && i < header_.size(); ++i) {
        QJsonValue value;
        if (const auto* text = std::get_if<std::string>(&cells[i]))
            value = QString::fromStdString(*text);
        else if (const auto* number = std::get_if<double>(&cells[i]); number && std::isfinite(*number))
            value = *number;
        object.insert(QString::fromStdString(header_[i]), value);
    }
    streams_.out << (first_ ? "\n" : ",\n")
                 << QString::fromUtf8(QJsonDocument(object).toJson(QJsonDocument::Compact));
}

} // namespace evenstroke::batch
