#!/usr/bin/env bash
# Installs Carlin into a fresh folder and builds a program of somebody else's against carlin::carlin.
set -euo pipefail
cd "$(dirname "$0")/.."
place=$(mktemp -d)
trap 'rm -rf "$place"' EXIT
cmake --install build/dev --prefix "$place/installed" >/dev/null
cmake -S tests/consumer -B "$place/build" -G Ninja -DCMAKE_PREFIX_PATH="$place/installed" >/dev/null
cmake --build "$place/build" -- --quiet
"$place/build/consumer" models/starter.yaml
"$place/installed/bin/carlin" --version
