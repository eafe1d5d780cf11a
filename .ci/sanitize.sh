#!/usr/bin/env bash
# Unit, verification and fuzz tests under the address and undefined-behaviour sanitizers.
set -euo pipefail
cd "$(dirname "$0")/.."
cmake --preset sanitize >/dev/null
cmake --build --preset sanitize -- --quiet
ASAN_OPTIONS=detect_leaks=0 ctest --preset sanitize 2>&1 | tail -n 15
