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
  yelp-check validate "$source/help/C" && yelp-check links "$source/help/C" || exit 1
  # yelp-check only lists states of writing: what it lists must be final, and be every page.
  yelp-check status "$source/help/C" >"$work/states" || exit 1
  if grep -v ': final$' "$work/states"; then echo "not final"; exit 1; fi
  [ "$(wc -l <"$work/states")" -eq "$(ls "$source"/help/C/*.page | wc -l)" ] || { echo "a page has no state:"; cat "$work/states"; exit 1; } ;;
manual)
  need groff
  for page in kerfhand kerfhand-cli; do
    groff -man -ww -Tutf8 "$source/data/$page.1" >/dev/null 2>"$work/words" || exit 1
    if [ -s "$work/words" ]; then cat "$work/words"; exit 1; fi
  done ;;
completion)
  need bash
  # The completion itself is run: what it offers at the last of the words given.
  offers() {
    bash -c '. "$1"; shift; COMP_WORDS=("$@"); COMP_CWORD=$(($# - 1)); _kerfhand_cli; printf "%s\n" "${COMPREPLY[@]}"' \
      offers "$source/data/completion/kerfhand-cli" "$@"
  }
  offers kerfhand-cli '' | grep -v '^-' | sort >"$work/said"
  "$cli" --help | sed -n '/^Commands:/,/^$/s/^  \([a-z]*\) .*/\1/p' | sort >"$work/real"
  diff "$work/real" "$work/said" || { echo "commands of the completion differ from --help"; exit 1; }
  commands=$(cat "$work/real")
  [ -n "$commands" ] || { echo "--help names no command"; exit 1; }
  first="$source/data/examples/first-maze.mazeplan"
  for what in $(offers kerfhand-cli draw --what '') none; do
    "$cli" draw --what="$what" --output="$work/$what.svg" "$first" >/dev/null 2>&1; status=$?
    [ $status -eq "$([ "$what" = none ] && echo 2 || echo 0)" ] || { echo "draw --what=$what: status $status"; exit 1; }
  done
  for hand in $(offers kerfhand-cli follow --hand '') none; do
    "$cli" follow --hand="$hand" "$first" >/dev/null 2>&1; status=$?
    [ $hand = none ] && wanted='^2$' || wanted='^[01]$'
    echo $status | grep -q "$wanted" || { echo "follow --hand=$hand: status $status"; exit 1; }
  done
  for command in $commands; do
    "$cli" $command --help | grep -oE -- '--[a-z-]+' | grep -vE '^--help' | sort -u >"$work/real"
    offers kerfhand-cli "$command" -- | grep -vE '^--help' | sort -u >"$work/said"
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
  # No path of the machine it was written on. (Brackets, so that this line does not find itself.)
  if git ls-files >/dev/null 2>&1; then
    git grep -InE '(^|[^A-Za-z0-9_.])/(work|home|root|tmp/k)[/]|[.][.]/shared[/]' && { echo "a path of somebody's machine"; bad=1; }
  else
    echo "no git here: paths not looked for"
  fi
  exit $bad ;;
install)
  need meson
  DESTDIR="$work" meson install -C "$build" --no-rebuild >"$work/log" 2>&1 || { cat "$work/log"; exit 1; }
  prefix=$(find "$work" -type d -path '*/share/kerfhand' | sed 's,/share/kerfhand$,,')
  # All of it, and nothing else.
  {
    for name in kerfhand kerfhand-cli; do echo "bin/$name"; echo "share/man/man1/$name.1"; done
    for file in "applications/$id.desktop" "metainfo/$id.metainfo.xml" "mime/packages/$id.xml" "glib-2.0/schemas/$id.gschema.xml" \
      "icons/hicolor/scalable/apps/$id.svg" "icons/hicolor/symbolic/apps/$id-symbolic.svg" licenses/kerfhand/COPYING \
      bash-completion/completions/kerfhand-cli; do echo "share/$file"; done
    for file in "$source"/data/examples/*.mazeplan; do echo "share/kerfhand/examples/${file##*/}"; done
    for file in "$source"/help/C/*; do echo "share/help/C/kerfhand/${file##*/}"; done
    for language in $(grep -v '^#' "$source/po/LINGUAS"); do echo "share/locale/$language/LC_MESSAGES/kerfhand.mo"; done
  } | sort >"$work/wanted"
  (cd "$prefix" && find . -type f -size +0 | sed 's,^[.]/,,' | sort) >"$work/there"
  diff "$work/wanted" "$work/there" || { echo "not installed (<), or not expected (>)"; exit 1; }
  KERFHAND_LOCALE_DIR="$prefix/share/locale" LC_ALL=C.UTF-8 LANGUAGE=es "$prefix/bin/kerfhand-cli" --version ;;
*) exit 99 ;;
esac
