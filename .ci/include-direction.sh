#!/usr/bin/env bash
# Link lists do not stop a header from being included; this does. Also refuses third-party headers in
# public headers, and files over 500 lines.
set -u
cd "$(dirname "$0")/.."
status=0
declare -A may=(
  [core]=""
  [description]="core"
  [lattice]="core description"
  [section]="core"
  [element]="core section"
  [structure]="core description lattice section element"
  [loads]="core description lattice section element structure"
  [solution]="core description lattice section element structure"
  [mounts]="core description section"
  [recovery]="core description lattice section element structure loads solution mounts"
  [checks]="core description lattice section element structure loads solution mounts recovery"
  [output]="core description lattice section element structure loads solution mounts recovery checks"
  [job]="core description lattice section element structure loads solution mounts recovery checks output"
)
for module in "${!may[@]}"; do
  for used in $(grep -rhoP '#include "carlin/\K\w+(?=/)' "include/carlin/$module" "src/$module" 2>/dev/null | sort -u); do
    [[ "$used" == "$module" || " ${may[$module]} " == *" $used "* ]] ||
      { echo "$module must not include $used"; status=1; }
  done
done
if grep -rnE '#include <(yaml-cpp|CLI|fmt|vtk|cholmod|udunits2)' include; then
  echo "public headers: Eigen and the standard library only"; status=1
fi
while read -r lines file; do
  [[ "$file" == total || "$lines" -le 500 ]] || { echo "$file has $lines lines; 500 is the most"; status=1; }
done < <(git ls-files -z '*.cpp' '*.hpp' | xargs -0 -r wc -l)
exit $status
