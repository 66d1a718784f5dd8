#!/usr/bin/env bash
# Fails on absolute paths of a developer's machine, registry addresses in lock files and work left undone.
set -euo pipefail
cd "$(dirname "$0")/../.."
bad=0
if git grep -nIE '(^|[^A-Za-z0-9_./-])/(home|Users|work)/[a-z]' -- . ':!scripts/ci/words.sh'; then bad=1; fi
if git grep -nIE '"resolved": *"https?:' -- '*package-lock.json'; then bad=1; fi
if git grep -nIwE 'TODO|FIXME|XXX|HACK' -- core wasm desktop scripts tests ':!scripts/ci/words.sh'; then bad=1; fi
exit $bad
