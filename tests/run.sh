#!/bin/sh
# SPDX-License-Identifier: MIT
# sh tests/run.sh [quick]: installs what the tests need, builds, and runs all of them.
# quick: one compiler, no sanitizers.  Ends in a line "N passed, N failed, N skipped".
set -u
top=$(cd "$(dirname "$0")/.." && pwd)
packages='gcc g++ clang llvm libclang-rt-14-dev meson ninja-build pkg-config gettext python3 libglib2.0-dev libglib2.0-bin libcjson-dev libcairo2-dev
 libpango1.0-dev libgtk-4-dev libcmocka-dev libgeos-dev libgsl-dev xvfb xauth xdotool dbus at-spi2-core libatspi2.0-dev imagemagick x11-utils poppler-utils
 librsvg2-bin desktop-file-utils appstream shared-mime-info libxml2-utils yelp-tools groff-base adwaita-icon-theme gsettings-desktop-schemas fonts-noto-core fonts-dejavu-core'
. "$top/tests/packages.sh"
install_missing $packages || exit 1
export LC_ALL=C.UTF-8
passed=0 failed=0 skipped=0

# count LOG: adds up what meson says of each test in its log (one JSON object a line).
count() {
  set -- $(python3 - "$1" <<'PY'
import json, sys
results = [json.loads(line)["result"] for line in open(sys.argv[1])]
good = sum(r in ("OK", "EXPECTEDFAIL") for r in results)
skip = sum(r == "SKIP" for r in results)
print(good, len(results) - good - skip, skip)
PY
)
  passed=$((passed + $1)) failed=$((failed + $2)) skipped=$((skipped + $3))
}

# suite BUILD-FOLDER WORDS MESON-OPTIONS… -- TEST-OPTIONS…
suite() {
  folder=$top/$1 words=$2; shift 2
  options=''
  while [ $# -gt 0 ] && [ "$1" != -- ]; do options="$options $1"; shift; done
  [ $# -eq 0 ] || shift
  echo "=== $words"
  if [ ! -f "$folder/build.ninja" ]; then
    meson setup "$folder" "$top" $options || { failed=$((failed + 1)); return; }
  fi
  ninja -C "$folder" || { echo "$words: does not build"; failed=$((failed + 1)); return; }
  meson test -C "$folder" --no-rebuild --print-errorlogs "$@"
  count "$folder/meson-logs/testlog.json"
}

suite build-tests 'gcc, all suites' --buildtype=debugoptimized -Dwerror=true --
if [ "${1:-}" != quick ]; then
  export CC=clang ASAN_OPTIONS=detect_leaks=1 LSAN_OPTIONS=suppressions=$top/tests/lsan.supp:print_suppressions=0 UBSAN_OPTIONS=halt_on_error=1:print_stacktrace=1
  suite build-sanitized 'clang, address and undefined-behaviour sanitizers' --buildtype=debugoptimized -Dwerror=true \
    -Db_sanitize=address,undefined -Db_lundef=false -- --timeout-multiplier 8 --no-suite app --no-suite data
  # The toolkit's libraries keep no frame pointers: what leaks there is told apart by slower stacks.
  ASAN_OPTIONS=$ASAN_OPTIONS:fast_unwind_on_malloc=0
  suite build-sanitized 'the window under the sanitizers' -- --timeout-multiplier 8 --suite app
fi
echo
echo "$passed passed, $failed failed, $skipped skipped"
[ "$failed" -eq 0 ] && [ "$passed" -gt 0 ]
