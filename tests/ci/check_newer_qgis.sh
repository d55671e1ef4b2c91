#!/bin/bash
# SPDX-License-Identifier: GPL-2.0-or-later
# Compiles and links the provider and the plugin against the QGIS of the next Debian release, without installing
# it: headers and libraries are fetched from the machine's own mirror and unpacked beside the build. It fails
# with a plain message where that is not possible; it never passes without having linked.
set -euo pipefail
cd "$( dirname "${BASH_SOURCE[0]}" )/../.."
release=trixie
work="$PWD/build-newer"
root="$work/root"

give_up()
{
  echo "The check against a newer QGIS could not be made: $1" >&2
  exit 1
}

# fetch: unpacks the newer headers and libraries into $root.
fetch()
{
  local mirror keyring=/usr/share/keyrings/debian-archive-keyring.gpg apt="$work/apt" version deb
  mirror="$( cat /etc/apt/sources.list.d/debian.sources /etc/apt/sources.list 2>/dev/null \
    | awk '/^URIs:/ { print $2 } /^deb / { for ( i = 2; i <= NF; ++i ) if ( $i ~ /:\/\// ) { print $i; break } }' \
    | grep -v security | head -n 1 || true )"
  [ -n "$mirror" ] || give_up "no Debian mirror is configured in /etc/apt"
  [ -r "$keyring" ] || give_up "the package debian-archive-keyring is not installed"
  rm -rf "$work"
  mkdir -p "$apt/lists/partial" "$apt/cache/archives/partial" "$work/debs" "$root"
  echo "deb [signed-by=$keyring] $mirror $release main" > "$apt/sources.list"
  local options=( -o "Dir::Etc::sourcelist=$apt/sources.list" -o Dir::Etc::sourceparts=/dev/null
    -o Dir::Etc::preferencesparts=/dev/null -o "Dir::State::lists=$apt/lists" -o "Dir::Cache=$apt/cache"
    -o Dir::State::status=/dev/null -o APT::Sandbox::User=root -o Acquire::Languages=none )
  apt-get "${options[@]}" -qq update || give_up "the package list of $release could not be read"
  version="$( apt-cache "${options[@]}" show libqgis-dev | sed -n 's/.*libqgis-core\([0-9.]*\) .*/\1/p' | head -n 1 )"
  [ -n "$version" ] || give_up "$release offers no libqgis-dev"
  ( cd "$work/debs" && apt-get "${options[@]}" -qq download libqgis-dev nlohmann-json3-dev \
    "libqgis-core$version" "libqgis-gui$version" "libqgis-analysis$version" ) || give_up "the packages could not be fetched"
  for deb in "$work"/debs/*.deb; do
    dpkg -x "$deb" "$root"
  done
  rm -rf "$work/debs" "$apt"
  echo "$version" > "$work/version"
}

[ -s "$work/version" ] || fetch
echo "Building against QGIS $( cat "$work/version" )"
launcher=()
if command -v ccache >/dev/null; then
  launcher=( -DCMAKE_CXX_COMPILER_LAUNCHER=ccache )
fi
# The newer libraries ask for newer system libraries than this machine has: that is allowed here; undefined names
# of our own never are.
link="-Wl,--allow-shlib-undefined"
cmake -S . -B "$work/build" -G Ninja "${launcher[@]}" -DSTILLHEAD_WERROR=ON -DBUILD_TESTING=OFF \
  -DQGIS_INCLUDE_DIR="$root/usr/include/qgis" -DQGIS_UI_INCLUDE_DIR="$root/usr/include/qgis" \
  -DQGIS_CORE_LIBRARY="$root/usr/lib/libqgis_core.so" -DQGIS_GUI_LIBRARY="$root/usr/lib/libqgis_gui.so" \
  -DQGIS_ANALYSIS_LIBRARY="$root/usr/lib/libqgis_analysis.so" -DCMAKE_CXX_FLAGS="-isystem $root/usr/include" \
  -DCMAKE_SHARED_LINKER_FLAGS="$link" -DCMAKE_MODULE_LINKER_FLAGS="$link"
cmake --build "$work/build" --target stillhead_processing stillhead_plugin
