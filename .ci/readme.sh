#!/usr/bin/env bash
# The README's first command, and its table against what a run prints.
set -euo pipefail
cd "$(dirname "$0")/.."
status=0
sh examples/quickstart.sh >/tmp/carlin-quickstart.txt || status=$?
[ "$status" -le 1 ] || { tail -n 20 /tmp/carlin-quickstart.txt; echo "quickstart ended with $status"; exit 1; }
# Every line of the README's block marked "a real run" must be printed by the run.
awk '/<!-- a real run -->/{take=1; next} /<!-- end -->/{take=0} take && !/^```/' README.md |
  while IFS= read -r line; do
    [ -z "$line" ] && continue
    [ "$line" = "..." ] && continue
    grep -qxF -- "$line" /tmp/carlin-quickstart.txt || { echo "README shows, but the run does not print: $line"; exit 1; }
  done
