#!/bin/bash
# SPDX-License-Identifier: GPL-2.0-or-later
# Installs what is missing, builds in build/, and runs every test under ctest. Works as root or with sudo and is
# quick when run again. STILLHEAD_CMAKE_ARGS adds arguments to the configuration.
set -euo pipefail
top="$( cd "$( dirname "${BASH_SOURCE[0]}" )/.." && pwd )"
cd "$top"
. tests/ci/packages.sh
ensure_packages $stillheadBuildPackages $stillheadRunPackages $stillheadTestPackages

launcher=()
if command -v ccache >/dev/null; then
  launcher=( -DCMAKE_CXX_COMPILER_LAUNCHER=ccache )
fi
read -r -a extra <<< "${STILLHEAD_CMAKE_ARGS:-}"
cmake -S . -B build -G Ninja "${launcher[@]}" "${extra[@]}"
cmake --build build

# The closing lines are kept apart, so that a caller can show them last.
status=0
ctest --test-dir build --output-on-failure --no-tests=error -j "$( nproc )" 2>&1 | tee build/ctest.log || status=$?
sed -n '/tests passed/,$p' build/ctest.log > build/ctest-closing.txt
exit $status
