#!/bin/bash
# SPDX-License-Identifier: GPL-2.0-or-later
# desktop.sh BUILD OUT: starts a real QGIS on a virtual screen with a private profile in OUT, the plugin and the
# headless package of BUILD enabled, and runs desktop.py in it. Screenshots and log stay in OUT.
set -euo pipefail
build="$1" out="$2" here="$( cd "$( dirname "${BASH_SOURCE[0]}" )" && pwd )"
rm -rf "$out"
mkdir -p "$out/config/profiles/default/QGIS" "$out/run"
chmod 700 "$out/run"
cat > "$out/config/profiles/default/QGIS/QGIS3.ini" <<EOF_INI
[app]
news_feed\\disabled=true
[qgis]
checkVersion=false
$( qgis --version 2>/dev/null | sed -n 's/^QGIS 3\.\([0-9]*\).*/showTips3\1=false/p' )
[plugins]
searchPathsForPlugins=$build/plugins
[Plugins]
libstillheadplugin=true
[PythonPlugins]
processing=true
stillhead_headless=true
EOF_INI

status=0
env -u QT_QPA_PLATFORM QGIS_CUSTOM_CONFIG_PATH="$out/config" XDG_RUNTIME_DIR="$out/run" LC_ALL=C.UTF-8 \
  QGIS_PLUGINPATH="$build/headless" STILLHEAD_TEST_OUT="$out" STILLHEAD_TEST_FOLDER="$here" PYTHONDONTWRITEBYTECODE=1 \
  xvfb-run -a -s "-screen 0 1400x900x24" timeout 240 qgis --nologo --code "$here/desktop.py" > "$out/qgis.log" 2>&1 \
  || status=$?
cat "$out/qgis.log"
echo "QGIS ended with $status; verdict:"
cat "$out/verdict.txt"
[ "$( cat "$out/verdict.txt" )" = passed ] && [ $status -eq 0 ]
