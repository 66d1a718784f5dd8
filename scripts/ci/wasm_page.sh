#!/usr/bin/env bash
# Builds the single-file browser page: build/wasm/wasm/heatledger.html
set -euo pipefail
cd "$(dirname "$0")/../.."
export NODE_PATH="${NODE_PATH:-/usr/share/nodejs:/usr/lib/nodejs}"  # the optimiser of emscripten needs acorn
cmake --preset wasm >/dev/null
cmake --build --preset wasm --target heatledger_page
