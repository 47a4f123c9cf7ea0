#!/bin/sh
# SPDX-License-Identifier: MIT
# Killed with unsaved work: the next start brings it back and says so; saving
# takes the kept copy away.  recovery.sh KERFHAND PLAN, through in-x.sh.
kerfhand=$1
plan=$TEST_FOLDER/plan.mazeplan
kept=$XDG_STATE_HOME/kerfhand/recovery
cp "$2" "$plan" && chmod u+w "$plan" || exit 1

fail() { echo "recovery.sh: $1" >&2; [ -n "$pid" ] && kill -9 "$pid" 2>/dev/null; exit 1; }
count() { find "$kept" -name '*.mazeplan' 2>/dev/null | wc -l; }
title() { xdotool getwindowname "$window"; }
is_unsaved() { case $(title) in *'not saved'*) ;; *) return 1 ;; esac; }
is_saved() { ! is_unsaved; }
keeps() { [ "$(count)" = "$1" ]; }
# within ten seconds, or it fails with the words
within() {
  words=$1; shift
  for i in 1 2 3 4 5 6 7 8 9 10 11 12 13 14 15 16 17 18 19 20; do "$@" && return; sleep 0.5; done
  fail "$words: $(title), $(count) copies kept"
}
start() {
  "$kerfhand" "$@" & pid=$!
  window=$(timeout 30 xdotool search --sync --onlyvisible --class kerfhand | tail -n 1)
  [ -n "$window" ] || fail 'no window'
  sleep 1
  xdotool windowfocus --sync "$window"
}

before=$(cksum <"$plan")
start "$plan"
# one wall toggled with the lattice cursor
for key in w Right Up Right Return; do xdotool key "$key"; sleep 0.1; done
within 'the edit is not in the title' is_unsaved
within 'unsaved work is not kept' keeps 1
sleep 0.5
kill -9 "$pid"; wait "$pid" 2>/dev/null
[ "$before" = "$(cksum <"$plan")" ] || fail 'the file was written'

start
within 'not recovered' is_unsaved
within 'recovered, and not kept once' keeps 1
xdotool key ctrl+s
within 'not saved' is_saved
[ "$before" != "$(cksum <"$plan")" ] || fail 'the recovered edit is not in the file'
within 'saved, and still kept' keeps 0

# ended by a signal at once after an edit: kept, too
xdotool key ctrl+z
within 'undo is not in the title' is_unsaved
kill -TERM "$pid"; wait "$pid" 2>/dev/null
keeps 1 || fail 'ended by a signal, and not kept'
start
within 'not recovered after a signal' is_unsaved
kill -TERM "$pid"; wait "$pid" 2>/dev/null
exit 0
