# Functions shared by the scripts. Source it: . "$(dirname "$0")/lib.sh"
set -euo pipefail
project="$(cd "$(dirname "${BASH_SOURCE[0]}")/.." && pwd -P)"
cd "$project"
export EXPO_NO_TELEMETRY=1 EXPO_OFFLINE=1
if [ ! -t 1 ]; then export NO_COLOR=1 FORCE_COLOR=0; fi
# Node warns when both are set, and npm sets the one for its children
if [ -n "${FORCE_COLOR:-}" ] && [ "${FORCE_COLOR}" != 0 ]; then unset NO_COLOR; fi

say() { echo "yardbell: $*"; }
fail() {
  echo "yardbell: $*" >&2
  exit 1
}

# A shell waits for the command in front before it hears a signal: long commands run behind, and the shell waits for them.
step() {
  "$@" &
  step_pid=$!
  local code=0
  wait "$step_pid" || code=$?
  step_pid=
  return "$code"
}

# npm hands a SIGTERM to the shell between it and us, and that one goes without a word: notice that it has gone.
follow_npm() {
  if [ -z "${npm_lifecycle_event:-}" ]; then return; fi
  (
    trap - EXIT INT TERM HUP
    while kill -0 "$PPID" 2>/dev/null && kill -0 $$ 2>/dev/null; do sleep 1; done
    kill -TERM $$ 2>/dev/null
  ) </dev/null >/dev/null 2>&1 &
  follower=$!
}

ensure_node() {
  command -v node >/dev/null || fail "Node.js is not installed. Yardbell needs Node.js 20.19.4 or newer (https://nodejs.org)."
  node -e 'const [a, b, c] = process.versions.node.split(".").map(Number);
    process.exit((a === 20 && (b > 19 || (b === 19 && c >= 4))) || a > 22 || (a === 22 && b >= 13) ? 0 : 1)' ||
    fail "This is Node.js $(node --version). Yardbell needs 20.19.4 or newer of 20, or 22.13 or newer."
}

# ensure_debian_packages package...
ensure_debian_packages() {
  local sudo=
  if [ "$(id -u)" != 0 ]; then
    if command -v sudo >/dev/null && { [ -t 0 ] || sudo -n true 2>/dev/null; }; then sudo=sudo; else
      fail "missing: $*. Run this as root, then start again: apt-get update && apt-get install -y $*"
    fi
  fi
  command -v apt-get >/dev/null || fail "missing: $*. This is not Debian: install them with the system's own tools."
  say "installing $* (Debian packages)"
  local install=($sudo env DEBIAN_FRONTEND=noninteractive apt-get install -y -qq --no-install-recommends "$@")
  if ! "${install[@]}" >/dev/null 2>&1; then
    $sudo apt-get update -qq || fail "apt-get update did not work: is there a network?"
    "${install[@]}" >/dev/null || fail "could not install: $*"
  fi
}

ensure_node_modules() {
  local stamp=node_modules/.yardbell-lock now=none
  [ ! -f package-lock.json ] || now="$(sha256sum package-lock.json | cut -d' ' -f1)"
  if [ -f "$stamp" ] && [ "$(cat "$stamp")" = "$now" ]; then return; fi
  # somebody ran npm by hand after the lock file last changed
  if [ -f node_modules/.package-lock.json ] && [ node_modules/.package-lock.json -nt package-lock.json ]; then
    echo "$now" >"$stamp" && return
  fi
  say "installing the packages from npm (a minute or two the first time)"
  # the build tools are development packages, so they are needed with NODE_ENV=production as well
  if [ "$now" = none ]; then step npm install --include=dev --loglevel=error; else step npm ci --include=dev --loglevel=error; fi ||
    fail "npm could not install the packages"
  now="$(sha256sum package-lock.json | cut -d' ' -f1)"
  echo "$now" >"$stamp"
}

# Starts the project's database unless DATABASE_URL names one; sets DATABASE_URL, and we_started_postgres when it was down.
ensure_postgres() {
  we_started_postgres=
  if [ -n "${DATABASE_URL:-}" ]; then return; fi
  if ! ls /usr/lib/postgresql/*/bin/initdb >/dev/null 2>&1 && ! command -v initdb >/dev/null; then ensure_debian_packages postgresql; fi
  bash scripts/pg.sh status >/dev/null 2>&1 || we_started_postgres=yes
  DATABASE_URL="$(bash scripts/pg.sh start | tail -1)"
  export DATABASE_URL
}

# CHROMIUM names the browser; any Chromium or Chrome on the path will do
ensure_chromium() {
  local c
  for c in "${CHROMIUM:-}" chromium chromium-browser google-chrome; do
    if [ -n "$c" ] && command -v "$c" >/dev/null; then export CHROMIUM="$(command -v "$c")" && return; fi
  done
  ensure_debian_packages chromium
  export CHROMIUM=/usr/bin/chromium
}

port_taken() { (exec 3<>"/dev/tcp/127.0.0.1/$1") 2>/dev/null; }

export PATH="$project/node_modules/.bin:$PATH"
