#!/usr/bin/env bash
# Configures and builds one preset. Usage: scripts/build.sh [preset] [target ...]
set -euo pipefail
cd "$(dirname "$0")/.."
preset="${1:-release}"
shift || true
extra=()
for target in "$@"; do
  extra+=(--target "$target")
done
cmake --preset "$preset" --log-level=WARNING
cmake --build --preset "$preset" -j "$(nproc)" "${extra[@]}"
