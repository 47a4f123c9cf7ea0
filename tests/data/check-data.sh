#!/bin/sh
# SPDX-License-Identifier: MIT
# check-data.sh WHAT SOURCE BUILD CLI: one validator each; 77 where it is missing.
set -u
what=$1 source=$2 build=$3 cli=$(realpath "$4")
id=org.kerfhand.Kerfhand
work=$(mktemp -d) || exit 99
trap 'rm -rf "$work"' EXIT
need() { command -v "$1" >/dev/null || { echo "$1 is missing: left out"; exit 77; }; }
case $what in
desktop)
  need desktop-file-validate
  desktop-file-validate "$build/data/$id.desktop" && grep -q '^Comment\[es\]=' "$build/data/$id.desktop" ;;
metainfo)
  need appstreamcli
  appstreamcli validate --no-net --explain "$build/data/$id.metainfo.xml" ;;
mime)
  need update-mime-database; need gio
  mkdir -p "$work/mime/packages" && cp "$source/data/$id.mime.xml" "$work/mime/packages/$id.xml"
  xmllint --noout "$work/mime/packages/$id.xml" || exit 1
  # The system's types are needed beside ours.
  update-mime-database "$work/mime" || exit 1
  export XDG_DATA_HOME="$work" XDG_DATA_DIRS=/usr/local/share:/usr/share
  printf '{"x": 1}\n' >"$work/by-name.mazeplan"
  cp "$source/data/examples/first-maze.mazeplan" "$work/by-content"
  for file in by-name.mazeplan by-content; do
    gio info -a standard::content-type "$work/$file" | grep -q 'application/vnd.kerfhand.mazeplan+json' || {
      echo "$file is not known:"; gio info -a standard::content-type "$work/$file"; exit 1; }
  done ;;
schema)
  need glib-compile-schemas
  glib-compile-schemas --strict --dry-run "$source/data" || exit 1
  # Every key the window asks for is there.
  grep -rhoE 'kh_settings_(get|set|dup)[a-z_]* \("[a-z-]+"' "$source/src/app" | sed 's/.*"\(.*\)"/\1/' | sort -u | while read -r key; do
    grep -q "<key name=\"$key\"" "$source/data/$id.gschema.xml" || { echo "no key $key"; exit 1; }
  done ;;
icons)
  need rsvg-convert
  for size in 16 24 32 48 64 128 256 512; do
    rsvg-convert -w $size -h $size "$source/data/icons/hicolor/scalable/apps/$id.svg" -o "$work/$size.png" || exit 1
    [ "$(wc -c <"$work/$size.png")" -gt 200 ] || { echo "nothing drawn at $size"; exit 1; }
  done
  rsvg-convert -w 16 -h 16 "$source/data/icons/hicolor/symbolic/apps/$id-symbolic.svg" -o "$work/s.png" ;;
help)
  need yelp-check
  yelp-check validate "$source/help/C" && yelp-check links "$source/help/C" && yelp-check status --only none "$source/help/C" ;;
manual)
  need groff
  for page in kerfhand kerfhand-cli; do
    groff -man -ww -Tutf8 "$source/data/$page.1" >/dev/null 2>"$work/words" || exit 1
    if [ -s "$work/words" ]; then cat "$work/words"; exit 1; fi
  done ;;
completion)
  need bash
  for command in check follow cutlist saw draw example; do
    "$cli" $command --help | grep -oE -- '--[a-z-]+' | grep -vE '^--help' | sort -u >"$work/real"
    grep -E "^ *$command\)" "$source/data/completion/kerfhand-cli" | grep -oE -- '--[a-z-]+' | grep -vE '^--help' | sort -u >"$work/said"
    diff "$work/real" "$work/said" || { echo "completion of $command differs from its --help"; exit 1; }
    for option in $(cat "$work/real"); do
      sed 's/\\-/-/g' "$source/data/kerfhand-cli.1" | grep -q -- "$option" || { echo "the manual does not name $command $option"; exit 1; }
    done
  done ;;
sources)
  cd "$source" || exit 1
  files=$(git ls-files 2>/dev/null || find . -type f -not -path './build*' -not -path './.git/*')
  bad=0
  for file in $files; do
    case $file in *.c|*.h|*meson.build|*.sh|*.py) head -3 "$file" | grep -q 'SPDX-License-Identifier: MIT' || { echo "$file: no SPDX line"; bad=1; } ;; esac
  done
  exit $bad ;;
install)
  need meson
  DESTDIR="$work" meson install -C "$build" --no-rebuild >"$work/log" 2>&1 || { cat "$work/log"; exit 1; }
  prefix=$(find "$work" -type d -path '*/share/kerfhand' | sed 's,/share/kerfhand$,,')
  for file in bin/kerfhand bin/kerfhand-cli "share/applications/$id.desktop" "share/metainfo/$id.metainfo.xml" "share/mime/packages/$id.xml" \
    "share/glib-2.0/schemas/$id.gschema.xml" "share/icons/hicolor/scalable/apps/$id.svg" share/kerfhand/examples/first-maze.mazeplan \
    share/locale/es/LC_MESSAGES/kerfhand.mo share/help/C/kerfhand/index.page share/man/man1/kerfhand-cli.1 share/licenses/kerfhand/COPYING \
    share/bash-completion/completions/kerfhand-cli; do
    [ -s "$prefix/$file" ] || { echo "not installed: $file"; find "$prefix" -type f | head -60; exit 1; }
  done
  KERFHAND_LOCALE_DIR="$prefix/share/locale" LC_ALL=C.UTF-8 LANGUAGE=es "$prefix/bin/kerfhand-cli" --version ;;
*) exit 99 ;;
esac
