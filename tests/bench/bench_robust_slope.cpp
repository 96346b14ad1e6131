// SPDX-License-Identifier: GPL-3.0-or-later
// Theil and Sen's slope with its interval on 120 points, beside scipy doing the same in the same run.
#include "core/trend/robust_slope.h"
#include "tests/bench/processor_time.h"

#include <cstdio>
#include <random>
#include <string>
#include <vector>

namespace {

constexpr int points = 120, repeats = 2000;

/// Milliseconds a call as scipy's own process measures them; nothing where scipy is not installed.
double scipy_milliseconds()
{
    double milliseconds = 0.0;
    if (FILE* run = popen("/usr/bin/python3 -c \"\n"
                          "import time, numpy\n"
                          "from scipy.stats import theilslopes\n"
                          "r = numpy.random.default_rng(1)\n"
                          "t = numpy.arange(120.0)\n"
                          "y = 0.1 * t + r.normal(size=120)\n"
                          "theilslopes(y, t)\n"
                          "b = time.process_time()\n"
                          "for i in range(200): theilslopes(y, t)\n"
                          "print(1000 * (time.process_time() - b) / 200)\n"
                          "\" 2>/dev/null",
                          "r")) {
        if (std::fscanf(run, "%lf", &milliseconds) != 1)
            milliseconds = 0.0;
        pclose(run);
    }
    return milliseconds;
}

} // namespace

int main()
{
    std::mt19937_64 random(1);
    std::normal_distribution<double> noise;
    std::vector<double> times, values;
    for (int i = 0; i < points; ++i) {
        times.push_back(i);
        values.push_back(0.1 * i + noise(random));
    }
    double sum = 0.0;
    const double begin = evenstroke::processor_ms();
    for (int i = 0; i < repeats; ++i) {
        values[static_cast<std::size_t>(i % points)] += 1e-9; // another series each time
        sum += evenstroke::drift::theil_sen(times, values)->slope;
    }
    const double own = (evenstroke::processor_ms() - begin) / repeats;
    std::printf("Theil and Sen, %d points: %.4f ms (slope %.4f)\n", points, own, sum / repeats);
    if (const double other = scipy_milliseconds(); other > 0.0)
        std::printf("scipy.stats.theilslopes: %.4f ms; ratio %.0f (wanted: at least 20)\n", other, other / own);
    else
        std::printf("scipy was not measured: it is not installed (Debian: python3-scipy)\n");
    return 0;
}
