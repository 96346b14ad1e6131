#!/bin/sh
# SPDX-License-Identifier: GPL-3.0-or-later
# Installs what is missing, builds with the address and undefined-behaviour sanitizers, runs all tests.
#   sh tests/run.sh           all of it
#   sh tests/run.sh install   only the packages
#   sh tests/run.sh NAME...   only the tests whose names match (ctest -R)
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
# Leaks are not looked for yet: the desktop libraries hold memory until the end, and which of it is theirs has to be
# sorted out first. Everything else that the sanitizers find fails the run.
export ASAN_OPTIONS="detect_leaks=0${ASAN_OPTIONS:+:$ASAN_OPTIONS}"
[ $# -eq 0 ] || set -- -R "$(IFS='|'; echo "$*")"
ctest --test-dir "$build_dir" --output-on-failure -j "$(build_jobs)" "$@"
