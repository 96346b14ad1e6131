# SPDX-License-Identifier: GPL-3.0-or-later
# Use: cmake -C tests/presets/debug_sanitized.cmake -S . -B build-debug
set(CMAKE_BUILD_TYPE Debug CACHE STRING "")
set(CMAKE_CXX_FLAGS_DEBUG "-O1 -g1" CACHE STRING "")
set(EVENSTROKE_SANITIZE ON CACHE BOOL "")
set(EVENSTROKE_WARNINGS_AS_ERRORS ON CACHE BOOL "")
