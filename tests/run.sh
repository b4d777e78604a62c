#!/usr/bin/env bash
# Installs what is missing, builds everything and runs the tests. Arguments go to ctest (e.g. -R "torsion").
set -eu
here=$(cd "$(dirname "$0")/.." && pwd)
bash "$here/cli/setup.sh" catch2 clang-format libxml2-utils chromium
mkdir -p "$here/build"
cmake -S "$here" -B "$here/build" -DCMAKE_BUILD_TYPE=Release -DFOCALFRAME_TESTS=ON > "$here/build/setup.log" 2>&1 ||
  { cat "$here/build/setup.log"; exit 1; }
echo "Building program and tests (a quarter of an hour on two cores the first time) ..."
cmake --build "$here/build" --parallel "$(nproc)" > "$here/build/build.log" 2>&1 ||
  { grep -E "error|Error" -A4 "$here/build/build.log" | head -60; exit 1; }
ctest --test-dir "$here/build" --output-on-failure --parallel "$(nproc)" "$@"
