#!/bin/sh
# SPDX-License-Identifier: MIT
# check-po.sh SOURCE-ROOT: POTFILES names each source with words; each catalogue is complete for today's sources.
cd "$1" || exit 99
command -v xgettext >/dev/null || { echo "gettext is missing: left out"; exit 77; }
work=$(mktemp -d) || exit 99
trap 'rm -rf "$work"' EXIT
failed=0
{ find src -name '*.c' -o -name '*.ui'; } | sort | while read -r file; do
  if grep -qE '\b_ ?\(|\bC_ ?\(|\bN_ ?\(|ngettext|translatable="yes"' "$file"; then echo "$file"; fi
done >"$work/wanted"
ls data/*.desktop.in data/*.metainfo.xml.in >>"$work/wanted" 2>/dev/null
sort -o "$work/wanted" "$work/wanted"
sort po/POTFILES >"$work/listed"
if ! diff "$work/listed" "$work/wanted" >"$work/diff"; then
  echo "po/POTFILES differs from the sources with words (< listed, > wanted):"; cat "$work/diff"; failed=1
fi
xgettext --files-from="$work/wanted" -o "$work/today.pot" --keyword=_ --keyword=N_ --keyword=C_:1c,2 --keyword=ngettext:1,2 \
  --from-code=UTF-8 2>"$work/words" || failed=1
if [ -s "$work/words" ]; then cat "$work/words"; fi
while read -r language; do
  case $language in ''|'#'*) continue ;; esac
  msgfmt --check --check-accelerators=_ -o /dev/null "po/$language.po" || failed=1
  msgmerge -q -N -o "$work/$language.po" "po/$language.po" "$work/today.pot" || failed=1
  msgattrib --untranslated --no-obsolete "$work/$language.po" | grep -A4 '^msgid "' | sed -n '4,$p' >"$work/left"
  msgattrib --only-fuzzy --no-obsolete "po/$language.po" >>"$work/left"
  if [ -s "$work/left" ]; then
    echo "po/$language.po does not have:"; head -60 "$work/left"; failed=1
  fi
done <po/LINGUAS
[ $failed -eq 0 ] && echo "all listed, all translated"
exit $failed
