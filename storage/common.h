// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/problem.h"
#include "core/reading/reading.h"

#include <QtGlobal>

#include <functional>
#include <string>

/// The few words that all of storage shares.
namespace evenstroke::storage {

/// Done, or the Problem that stood in its way.
using Done = Result<void>;
inline Done done()
{
    return BOOST_OUTCOME_V2_NAMESPACE::success();
}

/// Called now and then during long work. Answer false to stop: then nothing is changed.
using Progress = std::function<bool(qint64 done, qint64 total)>;

/// The time of day. Given by the caller, so that a test knows what will be written.
using Clock = std::function<TimePoint()>;
TimePoint system_time();

/// Who changed something, and why. Both go into the audit trail; `why` may be empty where nothing is
/// corrected.
struct Signature
{
    std::string who; ///< a person's name as he signs it
    std::string why;
};

} // namespace evenstroke::storage
