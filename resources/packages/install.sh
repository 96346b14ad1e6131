# SPDX-License-Identifier: GPL-3.0-or-later
# Sourced by app/start.sh and tests/run.sh: installs what is missing from a list of Debian packages.

# usage: install_packages LIST...   (files with one package a line, # begins a remark)
install_packages() {
    if ! command -v dpkg-query >/dev/null 2>&1; then
        echo "This system has no Debian packages. Install by hand what these files name: $*" >&2
        return 1
    fi
    missing=""
    for package in $(cat "$@" | sed 's/#.*//'); do
        state=$(dpkg-query -W -f '${db:Status-Status}' "$package" 2>/dev/null || true)
        [ "$state" = installed ] || missing="$missing $package"
    done
    if [ -z "$missing" ]; then
        echo "All packages are there."
        return 0
    fi
    echo "Installing from Debian:$missing"
    if [ "$(id -u)" = 0 ]; then
        as_root=""
    elif command -v sudo >/dev/null 2>&1; then
        as_root="sudo"
    else
        echo "These packages are missing, and neither root nor sudo is at hand to install them." >&2
        echo "Ask the administrator for: apt-get install$missing" >&2
        return 1
    fi
    # A fresh system has no package lists yet; the words of the package tools go to the terminal.
    $as_root env DEBIAN_FRONTEND=noninteractive apt-get update -q &&
        $as_root env DEBIAN_FRONTEND=noninteractive apt-get install -q -y --no-install-recommends $missing
}

# How many compilers may run side by side: one a core, and 1.5 GB of memory each.
build_jobs() {
    cores=$(nproc 2>/dev/null || echo 1)
    memory=$(awk '/MemAvailable/ {print int($2 / 1500000)}' /proc/meminfo 2>/dev/null || echo 1)
    [ "${memory:-1}" -ge 1 ] || memory=1
    [ "$cores" -le "$memory" ] && echo "$cores" || echo "$memory"
}
