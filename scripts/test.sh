#!/usr/bin/env bash
# Every test: unit, API, worker and component tests, then the browser tests against the built page and server.
# The last line is "N passed, N failed". `npm test -- tests/api/today.test.ts` runs only the vitest files that match.
. "$(dirname "${BASH_SOURCE[0]}")/lib.sh"
step_pid=
stop() {
  local code=$?
  kill -TERM $step_pid ${follower:-} 2>/dev/null || true
  exit "$code"
}
trap stop EXIT
trap 'exit 130' INT
trap 'exit 143' TERM HUP
follow_npm

ensure_node
ensure_node_modules
ensure_postgres
mkdir -p tests/out
rm -f tests/out/vitest.json tests/out/browser.json
code=0
step vitest run --reporter=default --reporter=json --outputFile.json=tests/out/vitest.json "$@" || code=1

if [ $# = 0 ]; then
  ensure_chromium
  if step node scripts/build.mjs --if-changed; then step tsx tests/browser/run.ts || code=1; else code=1; fi
fi
node scripts/system/total.mjs tests/out/vitest.json $([ $# != 0 ] || echo tests/out/browser.json) || code=1
exit "$code"
