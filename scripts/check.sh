#!/usr/bin/env bash
# What must be clean before a change goes in. Usage: scripts/check.sh [--base REV] [--no-asan]
#   format, layer arrows, map of files, data files, clang-tidy on changed sources, sanitizer build of the tests.
set -euo pipefail
cd "$(dirname "$0")/.."
base=HEAD
asan=1
while [ "$#" -gt 0 ]; do
  case "$1" in
    --base) base="${2:?--base needs a revision}"; shift ;;
    --no-asan) asan=0 ;;
    *) echo "usage: scripts/check.sh [--base REV] [--no-asan]" >&2; exit 2 ;;
  esac
  shift
done
scripts/setup.sh check
echo "== format"
mapfile -t sources < <(git ls-files '*.hpp' '*.cpp')
clang-format --dry-run --Werror "${sources[@]}"
echo "== layers"
scripts/check_layers.sh
echo "== map"
scripts/check_map.sh
echo "== data"
/usr/bin/python3 scripts/check_params.py
echo "== clang-tidy on files changed since $base"
cmake --preset clang --log-level=WARNING
mapfile -t changed < <(git diff --name-only --diff-filter=d "$base" -- 'params/*.cpp' 'models/*.cpp' 'engine/*.cpp' 'reports/*.cpp')
if [ "${#changed[@]}" -gt 0 ]; then
  printf '%s\n' "${changed[@]}" | xargs -P "$(nproc)" -n 4 clang-tidy -p build/clang --quiet
fi
if [ "$asan" -eq 1 ]; then
  echo "== sanitizers"
  scripts/build.sh asan
  ctest --preset asan
fi
echo "clean"
