#!/usr/bin/env bash
# Installs the Debian packages that building needs, only those that are missing. Extra packages may be named.
set -eu
packages="g++ cmake make libeigen3-dev libspectra-dev libtinyxml2-dev libcli11-dev nlohmann-json3-dev libjs-three $*"
missing=""
for p in $packages; do
  dpkg-query -W -f='${Status}' "$p" 2>/dev/null | grep -q "install ok installed" || missing="$missing $p"
done
[ -n "$missing" ] || exit 0
as_root=""
[ "$(id -u)" -eq 0 ] || as_root="sudo"
echo "Installing:$missing"
$as_root apt-get update -qq
DEBIAN_FRONTEND=noninteractive $as_root apt-get install -y -qq --no-install-recommends $missing > /dev/null
