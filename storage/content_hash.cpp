// SPDX-License-Identifier: GPL-3.0-or-later
#include "storage/content_hash.h"

#include <QCryptographicHash>

#include <bit>
#include <charconv>

namespace evenstroke::storage {

ContentHash& ContentHash::add(std::string_view field)
{
    char length[24];
    const auto end = std::to_chars(length, length + sizeof length, field.size()).ptr;
    content_.append(length, end);
    content_ += ':';
    content_ += field;
    content_ += ',';
    return *this;
}

ContentHash& ContentHash::add(qint64 number)
{
    char digits[24];
    const auto end = std::to_chars(digits, digits + sizeof digits, number).ptr;
    content_.append(digits, end);
    content_ += ';';
    return *this;
}

ContentHash& ContentHash::add(const std::optional<double>& number)
{
    if (!number) {
        content_ += "-;";
        return *this;
    }
    char digits[24];
    const double stored = *number + 0.0; // the file does not keep the sign of a zero
    const auto end = std::to_chars(digits, digits + sizeof digits, std::bit_cast<quint64>(stored), 16).ptr;
    content_.append(digits, end);
    content_ += ';';
    return *this;
}

std::string ContentHash::hex() const
{
    const QByteArray digest =
        QCryptographicHash::hash(
            QByteArray::fromRawData(content_.data(), static_cast<qsizetype>(content_.size())),
            QCryptographicHash::Sha256)
            .toHex();
    return std::string(digest.constData(), static_cast<std::size_t>(digest.size()));
}

} // namespace evenstroke::storage
