#!/usr/bin/env bash
# Installs the Debian packages that are missing. Usage: scripts/setup.sh [build|test|check]
# `build` is what the program needs, `test` adds what the tests need, `check` adds the checking tools.
set -euo pipefail
level="${1:-build}"
packages=(g++ cmake ninja-build libeigen3-dev libceres-dev nlohmann-json3-dev libcli11-dev libfmt-dev libtbb-dev
          libboost-dev libssl-dev)
if [ "$level" != build ]; then
  packages+=(libgtest-dev libgmock-dev libbenchmark-dev libmpfi-dev libmpfr-dev libudunits2-dev
             python3 python3-numpy python3-scipy python3-jsonschema)
fi
if [ "$level" = check ]; then
  packages+=(clang clang-tidy clang-format git)
fi
missing=()
for package in "${packages[@]}"; do
  if [ "$(dpkg-query -W -f='${db:Status-Status}' "$package" 2>/dev/null || true)" != installed ]; then
    missing+=("$package")
  fi
done
if [ "${#missing[@]}" -eq 0 ]; then
  exit 0
fi
echo "Installing: ${missing[*]}"
run=()
if [ "$(id -u)" -ne 0 ]; then
  command -v sudo >/dev/null || { echo "These packages are missing and neither root nor sudo is at hand: ${missing[*]}" >&2; exit 1; }
  run=(sudo)
fi
"${run[@]}" apt-get update -q
"${run[@]}" env DEBIAN_FRONTEND=noninteractive apt-get install -y -q --no-install-recommends "${missing[@]}"
