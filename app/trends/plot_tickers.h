// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <qcustomplot.h>

namespace evenstroke {

/// Ticks at the starts of months, few and on round numbers of months; labels as "Mar 2031" and "Sep".
class MonthTicker : public QCPAxisTicker
{
public:
    explicit MonthTicker(int labels_at_most = 8) : labels_at_most_(labels_at_most) {}

protected:
    QVector<double> createTickVector(double step, const QCPRange& range) override;
    double getTickStep(const QCPRange& range) override;
    int getSubTickCount(double) override { return 0; }
    QString getTickLabel(double tick, const QLocale& locale, QChar format, int precision) override;

private:
    int labels_at_most_;
    double first_ = 0.0;
};

/// Round numbers with a true minus sign, signed where they are differences.
class NumberTicker : public QCPAxisTicker
{
public:
    explicit NumberTicker(bool is_signed) : signed_(is_signed) { setTickCount(6); }

protected:
    int getSubTickCount(double) override { return 0; }
    double getTickStep(const QCPRange& range) override;
    QString getTickLabel(double tick, const QLocale& locale, QChar format, int precision) override;

private:
    bool signed_;
    int decimals_ = 0;
};

} // namespace evenstroke
