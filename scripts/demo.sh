#!/usr/bin/env bash
# From a bare Debian 12 to a report: installs what is missing, builds, runs the main job on the demo stream.
set -euo pipefail
cd "$(dirname "$0")/.."
scripts/setup.sh build
cmake --preset release -DSTILLSHED_TESTS=OFF -B build/demo --log-level=WARNING
cmake --build build/demo -j "$(nproc)" --target stillshed
out="${1:-build/demo-report}"
mkdir -p "$out"
status=0
build/demo/reports/stillshed report scripts/demo/wash_solvent.json --out "$out" || status=$?
# Exit 3 means: written, but some part is incomplete or NO CALL; the report says where.
if [ "$status" -ne 0 ] && [ "$status" -ne 3 ]; then
  exit "$status"
fi
echo
echo "The report is here: $(realpath "$out")"
ls -1 "$out"
