#!/bin/bash
# SPDX-License-Identifier: GPL-2.0-or-later
# headless.sh FOLDER: enables the headless package that lies in FOLDER in the profile that the environment names
# and checks that the command-line tool lists the provider, exactly once and as active.
set -euo pipefail
export QGIS_PLUGINPATH="$1"
# What an earlier run of this test enabled would be refused as enabled already.
rm -rf "${QGIS_CUSTOM_CONFIG_PATH:?}"
# Some distributions wrap the tool in a script that passes options it does not know.
tool="$( command -v qgis_process.bin || command -v qgis_process )"
"$tool" plugins enable stillhead_headless
"$tool" --json list | python3 -c '
import json, sys
provider = json.load(sys.stdin)["providers"].get("stillhead")
assert provider, "the provider is not listed"
assert provider["name"] == "Stillhead" and provider["is_active"], provider
'
[ "$( "$tool" list 2>/dev/null | grep -cx Stillhead )" = 1 ]
