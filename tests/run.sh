#!/usr/bin/env bash
# Installs what is missing, builds everything and runs the tests. Arguments go to ctest (e.g. -R "torsion").
set -eu
here=$(cd "$(dirname "$0")/.." && pwd)
bash "$here/cli/setup.sh" catch2 clang-format libxml2-utils
cmake -S "$here" -B "$here/build-tests" -DCMAKE_BUILD_TYPE=Release -DCMAKE_CXX_FLAGS_RELEASE="-O1"  > /dev/null
echo "Building the tests (some minutes the first time) ..."
cmake --build "$here/build-tests" --parallel "$(nproc)" > "$here/build-tests/build.log" 2>&1 ||
  { grep -E "error|Error" -A4 "$here/build-tests/build.log" | head -60; exit 1; }
ctest --test-dir "$here/build-tests" --output-on-failure --parallel "$(nproc)" "$@"
