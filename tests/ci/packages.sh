# SPDX-License-Identifier: GPL-2.0-or-later
# To be sourced. Names the distribution packages that building, running and testing need, and installs what is
# missing, as root or through sudo. Says what it installs; when nothing is missing it asks nothing of the network.

stillheadBuildPackages="g++ cmake ninja-build libqgis-dev libgdal-dev libproj-dev libboost-dev libeigen3-dev
  qtbase5-dev qttools5-dev libqt5svg5-dev"
stillheadRunPackages="qgis qgis-providers python3-qgis gdal-bin proj-bin proj-data fonts-dejavu-core"
stillheadTestPackages="xvfb xauth dpkg-dev file"
stillheadCheckPackages="clang-format git ccache"

# ensure_packages name... : installs those of the named packages that are not installed.
ensure_packages()
{
  local missing=() package asRoot=()
  for package in "$@"; do
    dpkg-query -W -f='${db:Status-Status}\n' "$package" 2>/dev/null | grep -qx installed || missing+=( "$package" )
  done
  if [ ${#missing[@]} -eq 0 ]; then
    return 0
  fi
  if [ "$(id -u)" -ne 0 ]; then
    if ! command -v sudo >/dev/null; then
      echo "Missing packages: ${missing[*]}. Install them as root, or install sudo, then run this again." >&2
      return 1
    fi
    asRoot=( sudo )
  fi
  echo "Installing (some minutes on a fresh machine): ${missing[*]}"
  "${asRoot[@]}" apt-get -o DPkg::Lock::Timeout=600 -qq update
  "${asRoot[@]}" env DEBIAN_FRONTEND=noninteractive \
    apt-get -o DPkg::Lock::Timeout=600 -o Dpkg::Use-Pty=0 -qq install -y --no-install-recommends "${missing[@]}" > /dev/null
}
