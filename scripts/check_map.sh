#!/usr/bin/env bash
# The map of files in DEVELOPERS.md must match the tree: every file it names exists, every header is named.
set -euo pipefail
cd "$(dirname "$0")/.."
bad=0
while read -r file; do
  [ -e "$file" ] || { echo "DEVELOPERS.md names $file, which does not exist"; bad=1; }
done < <(grep -oE '`(params|models|engine|reports|tests|scripts)/[A-Za-z0-9_./-]+`' DEVELOPERS.md | tr -d '`' | sort -u)
for header in params/*.hpp models/*.hpp engine/*.hpp reports/*.hpp; do
  grep -qF "\`$header\`" DEVELOPERS.md || { echo "DEVELOPERS.md does not name $header"; bad=1; }
done
exit "$bad"
