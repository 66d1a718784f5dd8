#!/usr/bin/env bash
# Installs the Debian packages that a purpose needs and that are missing: packages.sh run|test|fuzz
# run:  build and use the program, its window and its page.   test: run, and every test.   fuzz: the fuzzers.
set -euo pipefail

run_packages=(g++ cmake ninja-build ccache pkg-config nlohmann-json3-dev libeigen3-dev libcli11-dev libimgui-dev
  libstb-dev libglfw3-dev libgl-dev libgl1-mesa-dri fonts-dejavu-core googletest libgtest-dev emscripten node-acorn
  ca-certificates git)
test_packages=(librapidcheck-dev librdkit-dev libopenbabel-dev libboost-dev xvfb xauth x11-utils xdotool xclip chromium
  poppler-utils clang-format parallel python3)
fuzz_packages=(clang libclang-rt-14-dev)

wanted=("${run_packages[@]}")
case "${1:-run}" in
  run) ;;
  test) wanted+=("${test_packages[@]}") ;;
  fuzz) wanted+=("${fuzz_packages[@]}") ;;
  *) echo "usage: packages.sh run|test|fuzz" >&2; exit 2 ;;
esac
# Any node and npm will do; Debian's are taken only where there are none.
command -v node >/dev/null || wanted+=(nodejs)
command -v npm >/dev/null || { [ "${1:-run}" = run ] || wanted+=(npm); }

missing=()
for package in "${wanted[@]}"; do
  dpkg-query -W -f='${Status}' "$package" 2>/dev/null | grep -q 'install ok installed' || missing+=("$package")
done
if [ ${#missing[@]} -eq 0 ]; then
  echo "   all Debian packages are there"
  exit 0
fi
echo "   installing from Debian: ${missing[*]}"
as_root=()
if [ "$(id -u)" -ne 0 ]; then
  command -v sudo >/dev/null || { echo "   run this as root once, or install these packages: ${missing[*]}" >&2; exit 1; }
  as_root=(sudo)
fi
export DEBIAN_FRONTEND=noninteractive
"${as_root[@]}" apt-get update -qq
"${as_root[@]}" apt-get install -y -qq --no-install-recommends "${missing[@]}" >/dev/null
