#!/bin/sh
# SPDX-License-Identifier: MIT
# The check of include directions must be able to fail: each thing it looks for is put before it.
source=$1
work=$(mktemp -d) || exit 99
trap 'rm -rf "$work"' EXIT
try() { # FILE, LINE, WHAT IT SAYS
  rm -rf "$work/src"; mkdir -p "$work/src/$(dirname "$1")"
  printf '/* SPDX-License-Identifier: MIT */\n%s\n' "$2" >"$work/src/$1"
  python3 "$source/.ci/includes.py" "$work" >"$work/said" && { echo "passed: $1: $2"; exit 1; }
  grep -q "$3" "$work/said" || { echo "$1: $2: said"; cat "$work/said"; exit 1; }
}
try layout/a.c '#include "robot/run.h"' 'layout may not include robot/run.h'
try plan/a.c '#include "layout/layout.h"' 'plan may not include'
try draw/a.c '#include <gtk/gtk.h>' 'may not include GTK'
try draw/a.c '#include "files/store.h"' 'may not include files/store.h'
try files/a.h '#include <cjson/cJSON.h>' 'no header of files shows'
try app/a.c '#include <cjson/cJSON.h>' 'may not include cJSON'
try robot/a.c 'double x = sin (1);' 'take it from base/elementary'
try cli/a.c 'int x = atoi (s);' 'is not used here'
printf 'int x;\n' >"$work/src/cli/a.c"
python3 "$source/.ci/includes.py" "$work" | grep -q 'no SPDX line' || { echo "a missing SPDX line passed"; exit 1; }
echo "each fault is found"
