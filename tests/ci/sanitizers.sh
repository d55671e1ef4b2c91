#!/bin/bash
# SPDX-License-Identifier: GPL-2.0-or-later
# Builds core alone, without QGIS, as Debug with address and undefined-behaviour sanitizers, and runs its tests.
set -euo pipefail
cd "$( dirname "${BASH_SOURCE[0]}" )/../.."
launcher=()
if command -v ccache >/dev/null; then
  launcher=( -DCMAKE_CXX_COMPILER_LAUNCHER=ccache )
fi
cmake -S . -B build-sanitize -G Ninja "${launcher[@]}" -DCMAKE_BUILD_TYPE=Debug \
  -DSTILLHEAD_CORE_ONLY=ON -DSTILLHEAD_SANITIZE=ON -DSTILLHEAD_WERROR=ON
cmake --build build-sanitize
ctest --test-dir build-sanitize --output-on-failure --no-tests=error -j "$( nproc )"
