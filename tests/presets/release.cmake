# SPDX-License-Identifier: GPL-3.0-or-later
# Use: cmake -C tests/presets/release.cmake -S . -B build-release
set(CMAKE_BUILD_TYPE Release CACHE STRING "")
set(EVENSTROKE_WARNINGS_AS_ERRORS ON CACHE BOOL "")
