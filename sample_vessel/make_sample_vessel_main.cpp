// SPDX-License-Identifier: GPL-3.0-or-later
#include "sample_vessel/sample_vessel.h"

#include <filesystem>
#include <fstream>
#include <iostream>
#include <string>

/// Writes the demonstration vessel: make_sample_vessel FOLDER [SEED]. Exit 0 done, 2 wrong use, 3 the disk
/// refused.
namespace {

namespace sample = evenstroke::sample;

bool write_file(const std::filesystem::path& folder, const sample::SampleFile& file)
{
    const std::filesystem::path path = folder / file.relative_path;
    std::error_code refused;
    std::filesystem::create_directories(path.parent_path(), refused);
    std::ofstream out(path, std::ios::binary);
    out << file.content;
    out.close();
    return !refused && out.good();
}

bool is_number(const std::string& text)
{
    return !text.empty() && text.size() < 19 && text.find_first_not_of("0123456789") == std::string::npos;
}

} // namespace

int main(int argument_count, char** arguments)
{
    if (argument_count < 2 || argument_count > 3 || (argument_count == 3 && !is_number(arguments[2]))) {
        std::cerr << "Name the folder to write to, and after it a seed if another vessel than the kept one "
                     "is wanted: "
                     "make_sample_vessel FOLDER [SEED]\n";
        return 2;
    }
    const std::uint64_t seed = argument_count == 3 ? std::stoull(arguments[2]) : sample::default_seed;
    for (const sample::SampleFile& file : sample::make_sample_vessel(seed)) {
        if (!write_file(arguments[1], file)) {
            std::cerr << "The file " << file.relative_path
                      << " could not be written. Choose a folder you may write to, with room on the disk.\n";
            return 3;
        }
        std::cout << file.relative_path << ' ' << file.content.size() << " bytes\n";
    }
    return 0;
}
