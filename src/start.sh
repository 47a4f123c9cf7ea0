#!/bin/sh
# SPDX-License-Identifier: MIT
# sh src/start.sh [PLAN]: installs what is missing, builds, and runs the main job: the window with a
# drawn example where there is a display, the command line with it where there is none.
set -eu
top=$(cd "$(dirname "$0")/.." && pwd)
build=$top/build
packages='gcc meson ninja-build pkg-config gettext libglib2.0-dev libglib2.0-bin libcjson-dev libcairo2-dev libpango1.0-dev libgtk-4-dev desktop-file-utils appstream adwaita-icon-theme fonts-dejavu-core'
. "$top/tests/packages.sh"

install_missing $packages
[ -f "$build/build.ninja" ] || meson setup "$build" "$top" --buildtype=debugoptimized
ninja -C "$build"
cli=$build/src/cli/kerfhand-cli
window=$build/src/app/kerfhand
plan=${1:-$top/data/examples/boat-house.mazeplan}

if [ -n "${DISPLAY:-}${WAYLAND_DISPLAY:-}" ] && [ -x "$window" ]; then
  # A copy, made once: the example stays as it was drawn, and what was saved stays too.
  if [ $# -eq 0 ]; then
    mkdir -p "$build/start"
    [ -f "$build/start/boat-house.mazeplan" ] || cp "$plan" "$build/start/boat-house.mazeplan"
    plan=$build/start/boat-house.mazeplan
  fi
  # Settings are remembered without an installation too.
  glib-compile-schemas --targetdir="$build/start" "$top/data" 2>/dev/null || true
  export GSETTINGS_SCHEMA_DIR="$build/start" KERFHAND_LOCALE_DIR="$build/po"
  exec "$window" "$plan"
fi

# No display: the same job at the command line.  A plan that breaks is told with status 1, which is no failure here.
out=$build/start
mkdir -p "$out"
said() { "$@" || [ $? -eq 1 ]; }
echo; echo "There is no display here, so this is the command line at work on $plan"
echo; echo "--- findings ---";  said "$cli" check "$plan" | tee "$out/findings.txt"
echo; echo "--- run ---";       said "$cli" follow --exact --track "$out/run.csv" "$plan" | tee "$out/run.txt"
echo; echo "--- cut list ---";  said "$cli" cutlist "$plan" | tee "$out/cutlist.txt"
said "$cli" cutlist --csv "$plan" >"$out/cutlist.csv"
"$cli" draw --output "$out/plan.pdf" "$plan"
said "$cli" draw --what assembly --output "$out/assembly.pdf" "$plan"
said "$cli" draw --what run --output "$out/run.svg" "$plan"
echo; echo "Written to $out:"
ls "$out"
