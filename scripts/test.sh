#!/usr/bin/env bash
# Installs what is missing, builds, runs the tests. Usage: scripts/test.sh [--full] [--preset NAME]
#   quick (default): at most 8 minutes on 2 cores.   --full: the wide property tests too.
set -euo pipefail
cd "$(dirname "$0")/.."
preset=release
while [ "$#" -gt 0 ]; do
  case "$1" in
    --full) export STILLSHED_FULL=1 ;;
    --preset) preset="${2:?--preset needs a name}"; shift ;;
    *) echo "usage: scripts/test.sh [--full] [--preset NAME]" >&2; exit 2 ;;
  esac
  shift
done
scripts/setup.sh test
scripts/build.sh "$preset"
ctest --preset "$preset" --output-on-failure
