#!/bin/sh
# Makes a picture of the displaced hull, before and after, also where there is no display.
# Usage: sh viz/make-picture.sh RESULTS --case NAME --stage NAME --into FILE.png [--seen-from below]
# CARLIN_PICTURE names the program; if not set, the newest build's is taken.
set -eu
here=$(cd "$(dirname "$0")/.." && pwd)
program=${CARLIN_PICTURE:-$(ls -t "$here"/build/*/viz/carlin-picture 2>/dev/null | head -n 1)}
if [ -z "$program" ] || [ ! -x "$program" ]; then
  echo "make-picture.sh: carlin-picture is not built; run: cmake --preset release && cmake --build --preset release --target carlin-picture" >&2
  exit 3
fi
if [ -n "${DISPLAY:-}" ]; then
  exec "$program" "$@"
fi
if ! command -v xvfb-run >/dev/null 2>&1; then
  echo "make-picture.sh: there is no display and xvfb-run is not installed; run: apt-get install xvfb xauth" >&2
  exit 3
fi
exec xvfb-run --auto-servernum --server-args="-screen 0 1280x1024x24 -noreset" "$program" "$@"
