#!/bin/sh
# SPDX-License-Identifier: GPL-3.0-or-later
# Installs what is missing, builds with the address and undefined-behaviour sanitizers, runs all tests.
#   sh tests/run.sh           all of it
#   sh tests/run.sh install   only the packages
#   sh tests/run.sh NAME...   only the suites whose names match (ctest -R)
set -eu
source_dir=$(cd "$(dirname "$0")/.." && pwd)
build_dir=${EVENSTROKE_TEST_BUILD_DIR:-${XDG_CACHE_HOME:-$HOME/.cache}/evenstroke/build-tests}
. "$source_dir/resources/packages/install.sh"

echo "1 of 3: packages"
install_packages "$source_dir/resources/packages/build.txt" "$source_dir/resources/packages/tests.txt"
[ "${1:-}" != install ] || exit 0

echo "2 of 3: building in $build_dir"
cmake -G Ninja -C "$source_dir/tests/presets/debug_sanitized.cmake" -S "$source_dir" -B "$build_dir" >/dev/null
cmake --build "$build_dir" -j "$(build_jobs)"

echo "3 of 3: tests"
export QT_QPA_PLATFORM=offscreen
# Looking for leaks needs rights that some containers withhold; whether they do is tried on a program that leaks nothing.
leaks=1
if ! ASAN_OPTIONS=detect_leaks=1 "$build_dir/bin/core_tests" --gtest_list_tests >/dev/null 2>&1; then
    leaks=0
    echo "Leaks of memory are not looked for: this machine does not let a program look at itself."
fi
export ASAN_OPTIONS="detect_leaks=$leaks${ASAN_OPTIONS:+:$ASAN_OPTIONS}"
[ $# -eq 0 ] || set -- -R "$(IFS='|'; echo "$*")"
ctest --test-dir "$build_dir" --output-on-failure -j "$(build_jobs)" "$@"
