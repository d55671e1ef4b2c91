#!/bin/bash
# SPDX-License-Identifier: GPL-2.0-or-later
# Refuses C++ that clang-format would change, and shell scripts that do not parse.
set -euo pipefail
cd "$( dirname "${BASH_SOURCE[0]}" )/../.."
git -c safe.directory="$PWD" ls-files -z '*.cpp' '*.h' | xargs -0 clang-format --dry-run -Werror
git -c safe.directory="$PWD" ls-files -z '*.sh' .ci/run | xargs -0 -n 1 bash -n
