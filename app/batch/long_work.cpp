// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/batch/long_work.h"

#include <csignal>

namespace evenstroke::batch {
namespace {

volatile std::sig_atomic_t stop_signals = 0;

extern "C" void ask_for_stop(int) { stop_signals = 1; }

} // namespace

void listen_for_stop()
{
    std::signal(SIGINT, ask_for_stop);
    std::signal(SIGTERM, ask_for_stop);
}

bool stop_asked() { return stop_signals != 0; }

storage::Progress progress_line(Streams& streams, const QString& what)
{
    int shown = -1;
    return [&streams, what, shown](qint64 finished, qint64 total) mutable {
        if (streams.err_is_terminal && total > 0) {
            const int percent = static_cast<int>(100 * finished / total);
            if (percent != shown) {
                streams.err << "\r" << what << " " << percent << " %" << (finished >= total ? "\n" : "");
                streams.err.flush();
                shown = percent;
            }
        }
        return !stop_asked();
    };
}

} // namespace evenstroke::batch
