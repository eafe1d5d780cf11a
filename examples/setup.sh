#!/bin/sh
# Installs the Debian 12 packages that Carlin needs and that are missing. Usage: sh examples/setup.sh run|test
# Those who may not install packages can hand the printed list to whoever may.
set -eu
run="g++ cmake ninja-build pkg-config libeigen3-dev libspectra-dev libyaml-cpp-dev libvtk9-dev
libcli11-dev libudunits2-dev libfmt-dev libsuitesparse-dev libopenblas0-pthread"
test="catch2 python3 libbenchmark-dev libx11-dev xvfb xauth clang-format"
case "${1:-run}" in
  run) wanted="$run" ;;
  test) wanted="$run $test" ;;
  *) echo "setup.sh: '$1' is not known; use run or test" >&2; exit 2 ;;
esac
missing=""
for package in $wanted; do
  state=$(dpkg-query -W -f='${Status}' "$package" 2>/dev/null || true)
  case "$state" in *"ok installed"*) ;; *) missing="$missing $package" ;; esac
done
[ -z "$missing" ] && exit 0
echo "installing:$missing"
as_root=""
if [ "$(id -u)" -ne 0 ]; then
  if command -v sudo >/dev/null 2>&1; then as_root="sudo"; else
    echo "setup.sh: not root and no sudo; ask for these Debian packages:$missing" >&2
    exit 2
  fi
fi
export DEBIAN_FRONTEND=noninteractive
$as_root apt-get update -qq
# shellcheck disable=SC2086
$as_root apt-get install -y -qq --no-install-recommends $missing >/dev/null
