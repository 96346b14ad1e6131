// SPDX-License-Identifier: GPL-3.0-or-later
#include "storage/card_packing.h"

#include <QtEndian>

#include <bit>
#include <cmath>

namespace evenstroke::storage {
namespace {

constexpr char format = 1;
constexpr char plain_doubles = 127;
constexpr int most_decimals = 6;
constexpr double largest_whole = 9e14; // below 2^53, where a double still knows every whole number
constexpr qint64 most_samples = 10'000'000;

void put_number(QByteArray& bytes, qint64 number)
{
    quint64 rest =
        (static_cast<quint64>(number) << 1) ^ static_cast<quint64>(number >> 63); // small either way
    while (rest >= 0x80) {
        bytes.append(static_cast<char>(rest | 0x80));
        rest >>= 7;
    }
    bytes.append(static_cast<char>(rest));
}

/// The fewest decimals with which every sample is exactly a whole number of the last one.
std::optional<int> decimals_of(const std::vector<double>& column)
{
    int decimals = 0;
    for (const double sample : column) {
        for (;; ++decimals) {
            if (decimals > most_decimals || !std::isfinite(sample) || (sample == 0.0 && std::signbit(sample)))
                return std::nullopt;
            const double scale = std::pow(10.0, decimals);
            const double whole = std::round(sample * scale);
            if (std::abs(whole) < largest_whole && whole / scale == sample)
                break;
        }
    }
    return decimals;
}

void put_column(QByteArray& bytes, const std::vector<double>& column)
{
    // A sample may fit fewer decimals and not more, as far as rounding goes: ask again with the final number.
    const auto decimals = decimals_of(column);
    const double scale = decimals ? std::pow(10.0, *decimals) : 1.0;
    bool exact = decimals.has_value();
    for (const double sample : column)
        exact = exact && std::round(sample * scale) / scale == sample;
    bytes.append(exact ? static_cast<char>(*decimals) : plain_doubles);
    qint64 last = 0, last_step = 0;
    for (const double sample : column) {
        if (!exact) {
            const quint64 bits = qToLittleEndian(std::bit_cast<quint64>(sample));
            bytes.append(reinterpret_cast<const char*>(&bits), sizeof bits);
            continue;
        }
        const qint64 whole = static_cast<qint64>(std::round(sample * scale));
        put_number(bytes, whole - last - last_step);
        last_step = whole - last;
        last = whole;
    }
}

/// Reads what `put_number` and `put_column` wrote; stops at the first byte that is not there.
class Unpacking
{
public:
    explicit Unpacking(const QByteArray& bytes) : bytes_(bytes) {}
    bool sound() const { return sound_; }
    char byte()
    {
        sound_ = sound_ && at_ < bytes_.size();
        return sound_ ? bytes_[at_++] : '\0';
    }
    qint64 number()
    {
        quint64 result = 0;
        for (int shift = 0; shift < 64; shift += 7) {
            const auto part = static_cast<unsigned char>(byte());
            result |= static_cast<quint64>(part & 0x7f) << shift;
            if ((part & 0x80) == 0)
                return static_cast<qint64>(result >> 1) ^ -static_cast<qint64>(result & 1);
        }
        sound_ = false;
        return 0;
    }
    double plain()
    {
        quint64 bits = 0;
        for (int shift = 0; shift < 64; shift += 8)
            bits |= static_cast<quint64>(static_cast<unsigned char>(byte())) << shift;
        return std::bit_cast<double>(bits);
    }
    std::vector<double> column(qint64 samples)
    {
        std::vector<double> column;
        const char decimals = byte();
        if (decimals != plain_doubles && (decimals < 0 || decimals > most_decimals))
            sound_ = false;
        const double scale = decimals == plain_doubles ? 1.0 : std::pow(10.0, decimals);
        quint64 last = 0, last_step = 0; // unsigned: bytes that are no trace must not overflow
        for (qint64 i = 0; i < samples && sound_; ++i) {
            if (decimals == plain_doubles) {
                column.push_back(plain());
                continue;
            }
            last_step += static_cast<quint64>(number());
            last += last_step;
            column.push_back(static_cast<double>(static_cast<qint64>(last)) / scale);
        }
        return column;
    }

private:
    const QByteArray& bytes_;
    qsizetype at_ = 0;
    bool sound_ = true;
};

} // namespace

QByteArray pack_card(const CardTrace& trace)
{
    QByteArray bytes;
    bytes.append(format);
    bytes.append(static_cast<char>((trace.gauge ? 1 : 0) | (trace.cycle.empty() ? 0 : 2)));
    put_number(bytes, static_cast<qint64>(trace.crank_angle_deg.size()));
    int last_cycle = 0;
    for (const int cycle : trace.cycle) {
        put_number(bytes, cycle - last_cycle);
        last_cycle = cycle;
    }
    put_column(bytes, trace.crank_angle_deg);
    put_column(bytes, trace.pressure_bar);
    return qCompress(bytes, 9);
}

std::optional<CardTrace> unpack_card(const QByteArray& packed)
{
    const QByteArray bytes = qUncompress(packed);
    Unpacking from(bytes);
    if (from.byte() != format)
        return std::nullopt;
    CardTrace trace;
    const char flags = from.byte();
    trace.gauge = (flags & 1) != 0;
    const qint64 samples = from.number();
    if (!from.sound() || samples < 0 || samples > most_samples)
        return std::nullopt;
    qint64 cycle = 0;
    for (qint64 i = 0; (flags & 2) != 0 && i < samples && from.sound(); ++i) {
        cycle += from.number();
        trace.cycle.push_back(static_cast<int>(cycle));
    }
    trace.crank_angle_deg = from.column(samples);
    trace.pressure_bar = from.column(samples);
    if (!from.sound())
        return std::nullopt;
    return trace;
}

} // namespace evenstroke::storage
