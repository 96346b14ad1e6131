// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <cstdint>
#include <string>
#include <vector>

/// The demonstration vessel: an invented ship with three invented engines and four years of monthly
/// readings, written in the public file formats. Nothing in it was measured anywhere.
///
/// Everything follows from the seed: the same seed gives the same bytes on every platform, because the
/// generator is our own and every value is rounded to what its instrument shows.
namespace evenstroke::sample {

/// The seed of the files that are kept with the sources.
inline constexpr std::uint64_t default_seed = 20223158;

struct SampleFile
{
    std::string relative_path; ///< "main_engine/readings.csv"; folders are separated by '/'
    std::string content;       ///< UTF-8, lines end in "\n"
};

/// A developing fault that was put into the readings.
struct SampleFault
{
    std::string vessel, engine;
    int cylinder = 0;
    std::string cause; ///< "ring_blow_by", "nozzle_wear"
    std::string onset; ///< date, "2025-12-20": the last sound day
};

/// A slip of the pen that was put into the readings.
struct SampleTypingError
{
    std::string vessel, engine, reading;
    std::string quantity; ///< empty where all quantities are affected
    std::string cylinder; ///< empty: of the engine, or all cylinders; two exchanged: two entries
    std::string verdict;  ///< the word `evenstroke-batch doubts` has for it
};

/// A reading whose quick lines lie far apart and whose values scatter.
struct SampleUnsteady
{
    std::string vessel, engine, reading;
};

/// What is hidden in the files, for tests to compare with. The files themselves do not say it.
struct SampleTruth
{
    std::vector<SampleFault> faults;
    std::vector<SampleTypingError> typing_errors;
    std::vector<SampleUnsteady> unsteady;
};

/// All files of the vessel, in the order of their paths.
std::vector<SampleFile> make_sample_vessel(std::uint64_t seed = default_seed);
/// What was put into them; it does not depend on the seed.
SampleTruth sample_truth();

} // namespace evenstroke::sample
