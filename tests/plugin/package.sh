#!/bin/bash
# SPDX-License-Identifier: GPL-2.0-or-later
# package.sh BUILD OUT: makes the Debian package of BUILD in OUT, checks that it declares what it needs, unpacks
# it there, and checks that plugin and headless package find the provider's library in the installed tree.
set -euo pipefail
build="$1" out="$2" here="$( cd "$( dirname "${BASH_SOURCE[0]}" )" && pwd )"
rm -rf "$out"
mkdir -p "$out"
cpack --config "$build/CPackConfig.cmake" -B "$out" > "$out/cpack.log" 2>&1 || { cat "$out/cpack.log"; exit 1; }
deb="$( ls "$out"/*.deb )"
depends="$( dpkg-deb -f "$deb" Depends )"
echo "Depends: $depends"
for package in qgis qgis-providers python3-qgis libqgis-core libqgis-gui libqt5core5a libc6; do
  [[ ", $depends" == *", $package"* ]] || { echo "The package does not declare $package"; exit 1; }
done

dpkg-deb -x "$deb" "$out/root"
plugin="$( find "$out/root" -path '*/qgis/plugins/libstillheadplugin.so' )"
missing="$( ldd "$plugin" | grep 'not found' || true )"
[ -z "$missing" ] || { echo "$plugin: $missing"; exit 1; }
ldd "$plugin" | grep -F "$out/root" | grep -q libstillhead_processing
"$here/../processing/headless.sh" "$out/root/usr/share/qgis/python/plugins"
