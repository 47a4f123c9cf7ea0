#!/bin/sh
# SPDX-License-Identifier: MIT
# Killed with unsaved work: the next start brings it back and says so; saving
# takes the kept copy away.  recovery.sh KERFHAND PLAN, through in-x.sh.
kerfhand=$1
plan=$TEST_FOLDER/plan.mazeplan
kept=$XDG_STATE_HOME/kerfhand/recovery
cp "$2" "$plan" && chmod u+w "$plan" || exit 1

fail() { echo "recovery.sh: $1" >&2; [ -n "$pid" ] && kill -9 "$pid" 2>/dev/null; exit 1; }
start() {
  "$kerfhand" "$@" & pid=$!
  window=$(timeout 15 xdotool search --sync --onlyvisible --class kerfhand | tail -n 1)
  [ -n "$window" ] || fail 'no window'
  sleep 1
  xdotool windowfocus --sync "$window"
}
count() { find "$kept" -name '*.mazeplan' 2>/dev/null | wc -l; }
title() { xdotool getwindowname "$window"; }

before=$(cksum <"$plan")
start "$plan"
# one wall toggled with the lattice cursor
xdotool key w Right Up; sleep 0.2; xdotool key Right; xdotool key Return; sleep 2
case $(title) in *'not saved'*) ;; *) fail "the edit is not in the title: $(title)" ;; esac
[ "$(count)" = 1 ] || fail "after two seconds $(count) copies are kept"
kill -9 "$pid"; wait "$pid" 2>/dev/null
[ "$before" = "$(cksum <"$plan")" ] || fail 'the file was written'

start
case $(title) in *'not saved'*) ;; *) fail "not recovered: $(title)" ;; esac
[ "$(count)" = 1 ] || fail "recovered, and $(count) copies are kept"
xdotool key ctrl+s; sleep 1
case $(title) in *'not saved'*) fail "not saved: $(title)" ;; esac
[ "$before" != "$(cksum <"$plan")" ] || fail 'the recovered edit is not in the file'
[ "$(count)" = 0 ] || fail "saved, and $(count) copies are kept"

# ended by a signal at once after an edit: kept, too
xdotool key ctrl+z; sleep 0.2
kill -TERM "$pid"; wait "$pid" 2>/dev/null
[ "$(count)" = 1 ] || fail "ended by a signal, $(count) copies are kept"
start
case $(title) in *'not saved'*) ;; *) fail "not recovered after a signal: $(title)" ;; esac
kill -TERM "$pid"; wait "$pid" 2>/dev/null
exit 0
