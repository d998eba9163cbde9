#!/usr/bin/env bash
# The arrows go one way: params -> models -> engine -> reports. Also: JSON only in params/ and reports/,
# nothing below reports/ prints or exits, command-line parsing in one file, every source has a test.
set -euo pipefail
cd "$(dirname "$0")/.."
bad=0
fail() { echo "$1"; bad=1; }
forbid() {  # forbid <folder> <regex> <why>
  local hits
  hits=$(grep -nE "$2" -r "$1" --include='*.hpp' --include='*.cpp' || true)
  if [ -n "$hits" ]; then
    fail "$3:"$'\n'"$hits"
  fi
}
forbid params '#include "(models|engine|reports)/' "params/ may not include what builds on it"
forbid models '#include "(engine|reports)/' "models/ may not include what builds on it"
forbid engine '#include "reports/' "engine/ may not include reports/"
for folder in models engine; do
  forbid "$folder" 'nlohmann|<iostream>|std::(cout|cerr)|std::exit\(|[^n]printf\(' "$folder/ neither reads JSON nor prints"
  forbid "$folder" '<thread>|<future>|tbb/' "$folder/ starts no threads of its own"
done
hits=$(grep -lE 'CLI/CLI.hpp|CLI11' -r params models engine reports --include='*.hpp' --include='*.cpp' || true)
if [ "$(printf '%s\n' "$hits" | grep -c .)" -gt 1 ]; then
  fail "CLI11 belongs in one file:"$'\n'"$hits"
fi
for source in params/*.cpp models/*.cpp models/*.hpp engine/*.cpp reports/*.cpp; do
  stem=$(basename "$source")
  stem=${stem%.*}
  layer=${source%%/*}
  if [ ! -e "tests/$layer/${stem}_test.cpp" ]; then
    fail "no test of its name: $source (expected tests/$layer/${stem}_test.cpp)"
  fi
done
exit "$bad"
