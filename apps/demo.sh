#!/bin/bash
# Installs what Pilotis needs from Debian 12, builds it in build/ and runs the study of the invented demo building.
set -euo pipefail
cd "$(dirname "${BASH_SOURCE[0]}")/.."
source apps/packages.sh

install_packages "${build_packages[@]}"
build build -DCMAKE_BUILD_TYPE=Release -DPILOTIS_TESTS=OFF

results=build/demo.h5
status=0
build/apps/pilotis run data-demo/study.toml --output "$results" || status=$?
# 0: every limit holds; 1: the runs are done and a limit is exceeded. Both are results.
if [ "$status" -gt 1 ]; then
  echo "pilotis run ended with status $status" >&2
  exit "$status"
fi

cat <<END

The results are in $results, an HDF5 file. To look at them:
  build/apps/pilotis verdict $results           the limits against the responses
  build/apps/pilotis export $results --peaks    the numbers as CSV
  build/apps/pilotis --help                     the other commands
END
