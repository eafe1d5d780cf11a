#!/bin/sh
# From nothing to checks: installs what is needed, builds, and runs the main job on the demo launch.
# Exit status is the job's: 0 all checks met, 1 some not met, 2 input wrong, 3 could not finish.
set -eu
cd "$(dirname "$0")/.."
sh examples/setup.sh run
[ -f build/run/build.ninja ] || cmake --preset run >/dev/null
cmake --build --preset run -- --quiet
exec build/run/src/cli/carlin check models/survey-launch.yaml --into results/survey-launch
