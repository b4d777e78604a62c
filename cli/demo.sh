#!/usr/bin/env bash
# Builds focalframe and checks a design with it: the demo row, or the design named as first argument.
# Needs Debian 12 (packages are installed as root or with sudo) and about 150 MB for packages and build.
set -eu
here=$(cd "$(dirname "$0")/.." && pwd)
design=$(realpath "${1:-$here/models/examples/quillbrook.xml}")

bash "$here/cli/setup.sh"
mkdir -p "$here/build"
cmake -S "$here" -B "$here/build" -DCMAKE_BUILD_TYPE=Release > "$here/build/setup.log" 2>&1 ||
  { cat "$here/build/setup.log"; exit 1; }
echo "Building focalframe (a few minutes the first time) ..."
cmake --build "$here/build" --parallel "$(nproc)" --target focalframe > "$here/build/build.log" 2>&1 ||
  { tail -n 40 "$here/build/build.log"; exit 1; }

program="$here/build/cli/focalframe"
report="$here/build/$(basename "$design" .xml).json"
echo
set +e
"$program" check "$design" --json "$report"
code=$?
set -e
[ $code -le 1 ] || exit $code

cat <<EOF

The report lies in     $report
The program lies in    $program
Your own design:       $program draft trough my-row.xml
                       $program check my-row.xml
Install for one user:  cmake --install $here/build --prefix ~/.local
EOF
