#!/bin/bash
# Installs what the tests need from Debian 12, builds, runs every test. With the argument "sanitize" it builds the
# libraries with AddressSanitizer and UndefinedBehaviorSanitizer instead, and runs those of their tests that are not about
# numbers alone. The last line is "N passed, N failed"; the exit status is not 0 when anything failed.
set -uo pipefail
cd "$(dirname "${BASH_SOURCE[0]}")/.."
source apps/packages.sh

passed=0
failed=0

# count PATTERN REPORT: how many lines of a JUnit report begin so.
count() { grep -cE "^\s*$1" "$2" || true; }

# check FOLDER OPTIONS...: builds and runs all tests there, and adds to the counts.
check() {
  local folder=$1 report=$1/tests.xml
  shift
  if ! build "$folder" -DPILOTIS_TESTS=ON "$@"; then
    echo "The build in $folder failed."
    failed=$((failed + 1))
    return
  fi
  rm -f "$report"
  local status=0
  ctest --test-dir "$folder" --parallel "$(nproc)" --output-on-failure --no-tests=error \
    --output-junit tests.xml || status=$?
  if [ ! -f "$report" ]; then
    echo "ctest left no report in $folder."
    failed=$((failed + 1))
    return
  fi
  # Whatever neither passed nor skipped itself failed: a program that is gone is "notrun" to ctest, not "fail".
  local good skipped lost
  good=$(count '<testcase .* status="run"' "$report")
  skipped=$(count '<skipped message="SKIP_' "$report")
  lost=$(($(count '<testcase ' "$report") - good - skipped))
  if [ "$status" -ne 0 ] && [ "$lost" -eq 0 ]; then lost=1; fi
  passed=$((passed + good))
  failed=$((failed + lost))
  echo "$folder: $good passed, $lost failed, $skipped skipped"
}

if ! install_packages "${build_packages[@]}" "${test_packages[@]}"; then
  failed=1
elif [ "${1:-}" = sanitize ]; then
  # Debug keeps the assertions of Eigen and of the standard library's callers awake.
  check build-sanitize -DCMAKE_BUILD_TYPE=Debug -DPILOTIS_SANITIZE=ON -DPILOTIS_PROGRAM=OFF
else
  check build -DCMAKE_BUILD_TYPE=Release
fi
echo "$passed passed, $failed failed"
[ "$failed" -eq 0 ]
