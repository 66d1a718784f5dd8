#!/usr/bin/env bash
# Set up and test, on a bare Debian 12: installs what is missing and runs every check that CI runs.
# Ends with all results added up: "N passed, N failed".
set -uo pipefail
cd "$(dirname "$0")/.."

passed=0
failed=0
say() { printf '\n== %s\n' "$*"; }

# step "what it does" command...: one step counts as one check.
step() {
  say "$1"
  local start=$SECONDS
  if "${@:2}"; then
    passed=$((passed + 1))
  else
    failed=$((failed + 1))
    echo "   FAILED: $1"
  fi
  echo "   took $((SECONDS - start)) s"
}

# suite "what it does" preset: configure, build and run ctest; each test counts.
suite() {
  say "$1"
  local start=$SECONDS log="build/$2-ctest.txt"
  mkdir -p build
  if cmake --preset "$2" >"build/$2-configure.txt" 2>&1 && cmake --build --preset "$2" >"build/$2-build.txt" 2>&1; then
    echo "   built in $((SECONDS - start)) s"
    ctest --preset "$2" -j2 >"$log" 2>&1
    grep -vE '^ *(Start +[0-9]+:|[0-9]+/[0-9]+ Test .* Passed )' "$log"
    local total bad
    total=$(sed -nE 's/^.* ([0-9]+) tests failed out of ([0-9]+).*$/\2/p' "$log" | tail -n 1)
    bad=$(sed -nE 's/^.* ([0-9]+) tests failed out of ([0-9]+).*$/\1/p' "$log" | tail -n 1)
    if [ -z "$total" ] || [ "$total" -eq 0 ]; then
      echo "   FAILED: no test ran"
      failed=$((failed + 1))
    else
      passed=$((passed + total - bad))
      failed=$((failed + bad))
    fi
  else
    echo "   FAILED: does not build"
    tail -n 60 "build/$2-configure.txt" "build/$2-build.txt" 2>/dev/null
    failed=$((failed + 1))
  fi
  echo "   took $((SECONDS - start)) s"
}

say "Packages"
scripts/ci/packages.sh test || exit 1
step "Tools of the page tests (npm)" scripts/ci/npm.sh
step "Formatting" scripts/ci/format.sh
step "Includes point one way" scripts/ci/layers.sh
step "No machine paths, no leftovers" scripts/ci/words.sh
suite "Native build and tests" dev
suite "Unit suites under address and undefined-behaviour sanitizers" asan
export NODE_PATH="${NODE_PATH:-/usr/share/nodejs:/usr/lib/nodejs}"
suite "WebAssembly build, the same suites under node, and the page in Chromium" wasm

say "Result"
echo "$passed passed, $failed failed"
[ "$failed" -eq 0 ]
