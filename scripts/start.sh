#!/usr/bin/env bash
# Set up and run, on a bare Debian 12: installs what is missing, builds, and does the main job once with an example
# worksheet: its ledger in the terminal, its report, the single-file browser page, and the window if there is a display.
set -euo pipefail
cd "$(dirname "$0")/.."
sheet=worksheets/nitro-hydrogenation.heatledger.json
out=build/out

say() { printf '\n== %s\n' "$*"; }

say "Packages"
scripts/ci/packages.sh run

say "Building the command line and the window (some minutes the first time)"
cmake --preset release >/dev/null
cmake --build --preset release --target heatledger heatledger-window

say "Building the browser page"
scripts/ci/wasm_page.sh

mkdir -p "$out"
say "The ledger of $sheet"
build/release/desktop/cli/heatledger work "$sheet"
build/release/desktop/cli/heatledger work "$sheet" --html "$out/nitro-hydrogenation.html"

cp build/wasm/wasm/heatledger.html "$out/heatledger.html"
say "Ready"
echo "report (print or send it):      $out/nitro-hydrogenation.html"
echo "browser page (works offline):   $out/heatledger.html   open it with a double click, or: xdg-open $out/heatledger.html"
echo "command line:                   build/release/desktop/cli/heatledger tally \"CH4(g) + 2 O2(g) -> CO2(g) + 2 H2O(l)\""
if [ -n "${DISPLAY:-}${WAYLAND_DISPLAY:-}" ]; then
  echo "window:                         opening $sheet"
  exec build/release/desktop/window/heatledger-window "$sheet"
fi
echo "window:                         build/release/desktop/window/heatledger-window $sheet   (no display here)"
