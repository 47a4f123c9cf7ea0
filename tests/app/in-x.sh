#!/bin/sh
# SPDX-License-Identifier: MIT
# Runs a program of the window in an X server of its own, on a bus of its own
# where only the accessibility bus can be started (portals would cost time and
# warnings), with all its folders in a temporary one.
for tool in xvfb-run xdotool dbus-run-session; do
  command -v "$tool" >/dev/null 2>&1 || { echo "$tool is missing: skipped"; exit 77; }
done
folder=$(mktemp -d) || exit 1
trap 'rm -rf "$folder"' EXIT
mkdir -p "$folder/services" "$folder/runtime" "$folder/config" "$folder/data" "$folder/state" "$folder/cache"
chmod 700 "$folder/runtime"
for service in /usr/share/dbus-1/services/org.a11y.Bus.service; do
  [ -f "$service" ] && cp "$service" "$folder/services/"
done
cat >"$folder/session.conf" <<END
<!DOCTYPE busconfig PUBLIC "-//freedesktop//DTD D-Bus Bus Configuration 1.0//EN"
 "http://www.freedesktop.org/standards/dbus/1.0/busconfig.dtd">
<busconfig>
  <type>session</type>
  <listen>unix:dir=$folder/runtime</listen>
  <auth>EXTERNAL</auth>
  <servicedir>$folder/services</servicedir>
  <policy context="default">
    <allow send_destination="*" eavesdrop="true"/>
    <allow eavesdrop="true"/>
    <allow own="*"/>
  </policy>
</busconfig>
END
export XDG_RUNTIME_DIR="$folder/runtime" XDG_CONFIG_HOME="$folder/config" XDG_DATA_HOME="$folder/data"
export XDG_STATE_HOME="$folder/state" XDG_CACHE_HOME="$folder/cache" TEST_FOLDER="$folder"
export GDK_BACKEND=x11 GSK_RENDERER=cairo GDK_DEBUG=gl-disable GSETTINGS_BACKEND=memory
export GTK_A11Y="${GTK_A11Y:-none}" G_DEBUG="${G_DEBUG:-fatal-criticals}" LC_ALL=C.UTF-8
unset WAYLAND_DISPLAY DBUS_SESSION_BUS_ADDRESS
xvfb-run -a -s "-screen 0 1400x900x24 +render -noreset" \
  dbus-run-session --config-file="$folder/session.conf" -- "$@"
