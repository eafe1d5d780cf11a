#!/bin/sh
# Installs what is needed, builds and runs all tests.
set -eu
cd "$(dirname "$0")/.."
sh examples/setup.sh test
[ -f build/dev/build.ninja ] || cmake --preset dev >/dev/null
cmake --build --preset dev -- --quiet
if [ -z "${DISPLAY:-}" ] && command -v xvfb-run >/dev/null 2>&1; then
  exec xvfb-run -a ctest --preset dev "$@"
fi
exec ctest --preset dev "$@"
