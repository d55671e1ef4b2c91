#!/bin/bash
# SPDX-License-Identifier: GPL-2.0-or-later
# translations.sh OUT [--update]: checks that the file for translators holds every text of plugin and provider, or brings
# it up to date. A text in no class of its own would be missed at run time, so each must have a context.
set -euo pipefail
cd "$( dirname "${BASH_SOURCE[0]}" )/../.."
shipped=plugin/translations/stillhead.ts found="$1/found.ts"
collect() { lupdate -silent -I . -locations none -no-obsolete plugin processing -ts "$1"; }
if [ "${2:-}" = --update ]; then
  collect "$shipped"
  exit
fi
rm -f "$found"
said="$( collect "$found" 2>&1 )"
[ -z "$said" ] || { echo "$said"; exit 1; }
texts() { sed -n 's/^ *<\(name\|source\)>/&/p' "$1" | sort; }
diff <( texts "$shipped" ) <( texts "$found" ) || { echo "Run tests/plugin/translations.sh . --update"; exit 1; }
