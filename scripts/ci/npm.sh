#!/usr/bin/env bash
# Installs the browser driver and the type checker that the page tests use, exactly as locked.
set -euo pipefail
cd "$(dirname "$0")/../../tests/page"
npm ci --no-audit --no-fund --loglevel=error
