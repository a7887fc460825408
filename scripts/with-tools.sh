#!/usr/bin/env bash
# Runs a command with the packages, the database, the browser and a fresh build at hand: scripts/with-tools.sh tsx scripts/bench.ts
. "$(dirname "${BASH_SOURCE[0]}")/lib.sh"
ensure_node
ensure_node_modules
ensure_postgres
ensure_chromium
step node scripts/build.mjs --if-changed
exec "$@"
