#!/bin/bash
# SPDX-License-Identifier: GPL-2.0-or-later
# The demo park in one command: installs what is missing, builds, makes the park, runs the main job headless, and writes
# demo_project/out/: result.gpkg (spans nodes stretches extremes findings), surface.tif, map.png; and proposal.gpkg, the
# regulators proposed with the pipe as it would be with them. `run.sh --desktop` then opens the same project in QGIS with the
# native plugin loaded. Works as root or with sudo; quick when run again.
# STILLHEAD_BUILD names another build folder than build/.
set -euo pipefail
here="$( cd "$( dirname "${BASH_SOURCE[0]}" )" && pwd )"
top="$( dirname "$here" )"
build="${STILLHEAD_BUILD:-$top/build}"
out="$here/out"
park="$here/park"
session="$out/.session"

case "${1:-}" in
  "" | --desktop) ;;
  *)
    echo "Usage: demo_project/run.sh [--desktop]" >&2
    exit 2
    ;;
esac
desktop="${1:-}"
if [ -n "$desktop" ] && [ -z "${DISPLAY:-}${WAYLAND_DISPLAY:-}" ]; then
  echo "There is no screen to open QGIS on: set DISPLAY, or run demo_project/run.sh without --desktop." >&2
  exit 1
fi

# step TEXT COMMAND...: says what is done; shows the command's own words only if it fails.
step()
{
  local text="$1" log="$session/step.log"
  shift
  echo "$text"
  if ! "$@" > "$log" 2>&1; then
    cat "$log" >&2
    echo "Failed: $text" >&2
    exit 1
  fi
}

configure_and_build()
{
  local launcher=()
  if command -v ccache > /dev/null; then
    launcher=( -DCMAKE_CXX_COMPILER_LAUNCHER=ccache )
  fi
  if [ ! -f "$build/build.ninja" ]; then
    cmake -S "$top" -B "$build" -G Ninja "${launcher[@]}"
  fi
  cmake --build "$build" --target stillhead_processing stillhead_plugin
}

# What a script makes is made again when the script is newer, but a drawing that somebody has worked on stays.
make_park()
{
  if [ ! -f "$park/terrain.tif" ] || [ "$here/make_terrain.py" -nt "$park/terrain.tif" ]; then
    "$here/make_terrain.py" "$park/terrain.tif"
  fi
  if [ ! -f "$park/basemap.gpkg" ] || [ "$park/terrain.tif" -nt "$park/basemap.gpkg" ] \
    || [ "$here/make_basemap.py" -nt "$park/basemap.gpkg" ]; then
    "$here/make_basemap.py" "$park/terrain.tif" "$park/basemap.gpkg"
  fi
  if [ ! -f "$park/planning.gpkg" ]; then
    "$here/make_layers.py" "$park/planning.gpkg"
  fi
}

# Debian's wrapper qgis_process passes on an option that the program does not know.
qgis_process_program()
{
  command -v qgis_process.bin || command -v qgis_process
}

# It calls enabling an enabled package a failure.
enable_package()
{
  "$( qgis_process_program )" plugins enable stillhead_headless || true
}

# sink TABLE [FILE]
sink()
{
  echo "ogr:dbname='out/${2:-result.gpkg}' table=\"$1\" (geom)"
}

# Paths are relative, so that what the results say of their making holds on any machine.
run_on_park()
{
  local algorithm="$1"
  shift
  cd "$here"
  "$( qgis_process_program )" --json run "stillhead:$algorithm" \
    --MAINS="park/planning.gpkg|layername=mainlines" --LATERALS="park/planning.gpkg|layername=laterals" \
    --TERRAIN=park/terrain.tif \
    --SOURCE="320040,110380 [EPSG:32631]" --SOURCE_KIND=0 --SOURCE_VALUE=71 --SOURCE_LOW=62 --GAUGE_HEIGHT=2.5 \
    --SOURCE_NOTE="Lamp Row meter, gauge on the test cock behind it: 71 psi on 13 January 2026, 5 am, 62 psi on 14 July 2026, 7 pm" \
    --LEAST=30 --MOST=80 --BANDS=30,45,60,80,100 --TERRAIN_RMSE=0.3 --READING_ERROR=1 "$@"
}

main_job()
{
  run_on_park staticpressure \
    --SPANS="$( sink spans )" --NODES="$( sink nodes )" --STRETCHES="$( sink stretches )" \
    --EXTREMES="$( sink extremes )" --FINDINGS="$( sink findings )" --SURFACE=out/surface.tif > "$out/run.json"
}

proposal_job()
{
  run_on_park proposeregulators --SETTING_STEP=1 \
    --REGULATORS="$( sink regulators proposal.gpkg )" --SPANS="$( sink spans proposal.gpkg )" \
    --STRETCHES="$( sink stretches proposal.gpkg )" --EXTREMES="$( sink extremes proposal.gpkg )" \
    --FINDINGS="$( sink findings proposal.gpkg )" > "$out/proposal.json"
}

# A profile of its own: nothing of the user's is read or changed.
write_desktop_profile()
{
  local folder="$session/desktop/profiles/default/QGIS"
  mkdir -p "$folder"
  if ! grep -qsF "searchPathsForPlugins=$build/plugins" "$folder/QGIS3.ini"; then
    cat > "$folder/QGIS3.ini" << INI
[app]
news_feed\\disabled=true
[qgis]
checkVersion=false
[plugins]
searchPathsForPlugins=$build/plugins
[Plugins]
libstillheadplugin=true
[PythonPlugins]
processing=true
INI
  fi
}

. "$top/tests/ci/packages.sh"
ensure_packages $stillheadBuildPackages $stillheadRunPackages python3-gdal python3-numpy

mkdir -p "$out" "$park" "$session/config" "$session/run"
chmod 700 "$session/run"
export XDG_RUNTIME_DIR="$session/run" QGIS_PLUGINPATH="$build/headless" LC_ALL=C.UTF-8

step "Building Stillhead (some minutes the first time) ..." configure_and_build
step "Making the park ..." make_park
headless=( env QT_QPA_PLATFORM=offscreen QGIS_CUSTOM_CONFIG_PATH="$session/config" )
export -f qgis_process_program enable_package run_on_park main_job proposal_job sink
export here out
if [ ! -f "$session/enabled" ]; then
  step "Setting up a private QGIS profile ..." "${headless[@]}" bash -c enable_package
  touch "$session/enabled"
fi
step "Computing static pressure ..." "${headless[@]}" bash -c main_job
step "Proposing regulators ..." "${headless[@]}" bash -c proposal_job
step "Drawing the map ..." "${headless[@]}" PYTHONDONTWRITEBYTECODE=1 "$here/render_map.py" "$out/map.png"
step "Drawing the proposal ..." "${headless[@]}" PYTHONDONTWRITEBYTECODE=1 "$here/render_map.py" "$out/proposal.png" --proposal
echo
"$here/show_summary.py" "$out/run.json"

if [ -n "$desktop" ]; then
  write_desktop_profile
  unset XDG_RUNTIME_DIR QGIS_PLUGINPATH
  exec env QGIS_CUSTOM_CONFIG_PATH="$session/desktop" qgis --nologo "$here/sallowmere.qgs"
fi
