#!/bin/sh
# SPDX-License-Identifier: GPL-3.0-or-later
# Installs what is missing, builds, makes the sample vessel's history if there is none, opens the window.
# Run it again at any time; what is done already is not done again. Words after it go to the program.
set -eu
source_dir=$(cd "$(dirname "$0")/.." && pwd)
build_dir=${EVENSTROKE_BUILD_DIR:-${XDG_CACHE_HOME:-$HOME/.cache}/evenstroke/build}
data_dir=${XDG_DATA_HOME:-$HOME/.local/share}/evenstroke
history=$data_dir/sample_vessel.evenstroke
. "$source_dir/resources/packages/install.sh"

echo "1 of 4: packages"
install_packages "$source_dir/resources/packages/build.txt"

echo "2 of 4: building in $build_dir"
mkdir -p "$(dirname "$build_dir")"
cmake -G Ninja -C "$source_dir/tests/presets/release.cmake" -DEVENSTROKE_TESTS=OFF -DEVENSTROKE_WARNINGS_AS_ERRORS=OFF \
    -S "$source_dir" -B "$build_dir" >"$build_dir.log" 2>&1 || { cat "$build_dir.log" >&2; exit 1; }
cmake --build "$build_dir" -j "$(build_jobs)"

echo "3 of 4: the sample vessel (an invented scenario) in $history"
mkdir -p "$data_dir"
if [ -e "$history" ]; then
    echo "It is there."
else
    "$build_dir/bin/evenstroke-batch" take "$source_dir/sample_vessel/files" --history "$history"
fi

echo "4 of 4: opening the window"
if [ -z "${DISPLAY:-}${WAYLAND_DISPLAY:-}${QT_QPA_PLATFORM:-}" ]; then
    echo "There is no screen here to open a window on. Run this on a desktop, or set QT_QPA_PLATFORM." >&2
    exit 1
fi
exec "$build_dir/bin/evenstroke" "$history" "$@"
