#!/usr/bin/env bash
# Types, lint (import rules and lengths among it), format, import cycles. Runs everything, then names what is wrong.
. "$(dirname "${BASH_SOURCE[0]}")/lib.sh"
ensure_node
ensure_node_modules

wrong=()
check() {
  local name="$1" from=$SECONDS
  shift
  if step "$@"; then say "$name: ok ($((SECONDS - from)) s)"; else
    say "$name: WRONG"
    wrong+=("$name")
  fi
}
shell_syntax() { local f; for f in scripts/*.sh .ci/run; do bash -n "$f" || return 1; done; }

# the typed routes are made from the files in app/, and tsc needs them
expo customize tsconfig.json >/dev/null
check 'types' tsc -p tsconfig.json --noEmit
check 'types of server and worker' tsc -p tsconfig.server.json --noEmit
check 'lint, import rules, lengths' eslint --max-warnings 0 .
check 'format' prettier --check --log-level warn .
check 'import cycles' node scripts/cycles.mjs
check 'shell scripts' shell_syntax

[ ${#wrong[@]} = 0 ] || fail "wrong: $(IFS=,; echo "${wrong[*]}")"
say 'all is well'
