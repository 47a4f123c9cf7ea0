#!/bin/sh
# SPDX-License-Identifier: MIT
# run-cases.sh CLI CASES PLANS EXAMPLES: runs a file of one-line cases.
#
# A case:  STATUS :: shell words, $k is kerfhand-cli :: what the output must hold (extended
# regular expression, over standard output and error together; empty: there must be no output)
# Each runs in a folder of its own that holds copies of the plans and examples.
set -u
k=$(realpath "$1") cases=$2 plans=$3 examples=$4
export k
work=$(mktemp -d) || exit 99
trap 'chmod -R u+w "$work"; rm -rf "$work"' EXIT
passed=0 failed=0
while IFS= read -r line; do
  case $line in ''|'#'*) continue ;; esac
  status=${line%% :: *}
  rest=${line#* :: }
  words=${rest%% :: *}
  pattern=${rest#* :: }
  folder=$work/case
  rm -rf "$folder" && mkdir "$folder" && cp "$plans"/* "$examples"/*.mazeplan "$folder" && chmod u+w "$folder"/*
  (cd "$folder" && timeout 60 sh -c "$words") >"$work/out" 2>&1 </dev/null
  got=$?
  if [ "$got" -ne "$status" ]; then
    echo "FAIL: $words: status $got instead of $status"; head -20 "$work/out"; failed=$((failed + 1))
  elif [ -z "$pattern" ] && [ -s "$work/out" ]; then
    echo "FAIL: $words: said something where nothing was asked for"; head -20 "$work/out"; failed=$((failed + 1))
  elif [ -n "$pattern" ] && ! tr '\n' ' ' <"$work/out" | grep -qE -- "$pattern"; then
    echo "FAIL: $words: the output does not hold /$pattern/"; head -20 "$work/out"; failed=$((failed + 1))
  else
    passed=$((passed + 1))
  fi
done <"$cases"
echo "$passed passed, $failed failed"
[ "$failed" -eq 0 ] && [ "$passed" -gt 0 ]
