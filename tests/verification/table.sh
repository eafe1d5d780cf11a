#!/usr/bin/env bash
# Makes tests/verification/README.md from a run of the verification programs, or with --check compares
# it with what a run prints (to the digits shown).   bash tests/verification/table.sh [--check] [BUILD]
set -euo pipefail
export LC_ALL=C
cd "$(dirname "$0")/../.."
check=no
[ "${1:-}" = --check ] && { check=yes; shift; }
build=${1:-build/dev}
rows=$(mktemp) table=$(mktemp)
trap 'rm -f "$rows" "$table"' EXIT
for program in element_beams element_folded element_frames element_patches element_plates element_shells \
    element_stress warping; do
  CARLIN_VERIFICATION_CSV="$rows" "$build/tests/${program}_test" >/dev/null
done
{
  echo "# What Carlin was checked against"
  echo
  echo "Made by \`bash tests/verification/table.sh\` from a run: do not edit. Every row is a test with its"
  echo "tolerance; round-off: the element contains the solution; printing: half a unit of the last printed"
  echo "digit; discretisation: the error expected at the mesh named. Rows of the chain (mounts, floating"
  echo "hull, joints) stand in their own tests beside this table."
  echo
  echo "| case | source | quantity | published | computed | error | class |"
  echo "| --- | --- | --- | --- | --- | --- | --- |"
  sort "$rows" | python3 -c '
import csv, sys
for row in csv.reader(sys.stdin):
    case, source, quantity, published, computed, error, kind = row
    published, computed, error = float(published), float(computed), float(error)
    shown = "%.1e" % error if kind != "discretisation" else "%+.2f %%" % (100 * error)
    if kind != "discretisation" and abs(error) < 1e-9:
        shown = "< 1e-9"
    cells = [case, source, quantity, "%.6g" % published, "%.6g" % computed, shown, kind]
    print("| " + " | ".join(c.replace("|", "/") for c in cells) + " |")
'
} >"$table"
if [ $check = yes ]; then
  diff -u tests/verification/README.md "$table"
else
  cp "$table" tests/verification/README.md
fi
