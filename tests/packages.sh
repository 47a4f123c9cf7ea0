# SPDX-License-Identifier: MIT
# install_missing PACKAGE…: Debian packages that are not there yet are installed, and said before.
install_missing() {
  missing=''
  for package in "$@"; do
    dpkg-query -W -f='${Status}' "$package" 2>/dev/null | grep -q 'install ok installed' || missing="$missing $package"
  done
  [ -n "$missing" ] || return 0
  if ! command -v apt-get >/dev/null; then
    echo "These Debian packages are needed and apt-get is not here to install them:$missing" >&2
    echo "Install what they bring in your system's own way, then run this again." >&2
    return 1
  fi
  if [ "$(id -u)" -eq 0 ]; then as_root=''; else as_root=sudo; fi
  if [ -n "$as_root" ] && ! command -v sudo >/dev/null; then
    echo "These packages are missing and need root to install:$missing" >&2
    echo "As root: apt-get install$missing" >&2
    return 1
  fi
  echo "Installing from Debian:$missing"
  $as_root apt-get update -q >/dev/null || echo "apt-get update failed; going on with the lists there are" >&2
  $as_root env DEBIAN_FRONTEND=noninteractive apt-get install -y -q --no-install-recommends $missing >/dev/null || {
    echo "apt-get could not install:$missing" >&2
    echo "Is the network there? Try: ${as_root:+sudo }apt-get install$missing" >&2
    return 1
  }
}
