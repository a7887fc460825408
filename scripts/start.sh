#!/usr/bin/env bash
# Starts the whole of Yardbell: database, server, worker and, without SMTP_URL, a mail catcher. Ctrl-C stops all of it.
# `scripts/start.sh --check` starts, says so, and stops again.
began="${EPOCHREALTIME/[.,]/}"
. "$(dirname "${BASH_SOURCE[0]}")/lib.sh"

export PORT="${PORT:-4180}" HOST="${HOST:-127.0.0.1}" NODE_ENV="${NODE_ENV:-development}"
export PUBLIC_URL="${PUBLIC_URL:-http://localhost:$PORT}" DIST_DIR="${DIST_DIR:-$project/dist}"
mail_port="${MAIL_PORT:-4181}" mail_web_port="${MAIL_WEB_PORT:-4182}"
# set when something else on this machine or elsewhere is to send the mail
own_mail=$([ -n "${SMTP_URL:-}" ] || echo yes)
logs=.data/logs
declare -A names=()
step_pid=

stop_all() {
  local code=$? pid
  trap '' INT TERM HUP
  trap - EXIT
  for pid in $step_pid ${follower:-} "${!names[@]}"; do kill -TERM "$pid" 2>/dev/null || true; done
  for _ in $(seq 100); do
    for pid in "${!names[@]}"; do kill -0 "$pid" 2>/dev/null && sleep 0.1 && continue 2; done
    break
  done
  for pid in "${!names[@]}"; do kill -KILL "$pid" 2>/dev/null || true; done
  if [ -n "${we_started_postgres:-}" ]; then bash scripts/pg.sh stop || true; fi
  exit "$code"
}
trap stop_all EXIT
trap 'exit 130' INT
trap 'exit 143' TERM HUP
follow_npm

# launch name command...: runs behind, its words go to a log of its own
launch() {
  local name="$1"
  shift
  "$@" >"$logs/$name.log" 2>&1 </dev/null &
  names[$!]="$name"
  # the shell need not announce how it ended: we do
  disown $!
}

show_log() {
  echo "yardbell: the $1 stopped. The last lines of $logs/$1.log:" >&2
  tail -15 "$logs/$1.log" >&2
}

check_children() {
  local pid
  for pid in "${!names[@]}"; do
    if ! kill -0 "$pid" 2>/dev/null; then
      show_log "${names[$pid]}"
      unset "names[$pid]"
      exit 1
    fi
  done
}

check_port() {
  if port_taken "$1"; then
    fail "port $1 ($2) is in use by another program, perhaps a Yardbell that is already running. Stop it, or choose another: $3=$(($1 + 10)) npm start"
  fi
}

healthy() { node scripts/system/waitFor.mjs "http://127.0.0.1:$PORT/api/health" 250 2>/dev/null; }

ensure_node
check_port "$PORT" server PORT
if [ "$own_mail" ]; then
  check_port "$mail_port" "mail catcher" MAIL_PORT
  check_port "$mail_web_port" "mail catcher's page" MAIL_WEB_PORT
  export SMTP_URL="smtp://127.0.0.1:$mail_port?ignoreTLS=true"
fi
ensure_node_modules
mkdir -p "$logs" .data/mail
ensure_postgres
step node scripts/build.mjs --if-changed || fail "the build did not work"

if [ "$NODE_ENV" != production ] && [ "${YARDBELL_SEED:-demo}" != none ]; then
  if [ "$(node scripts/system/countPeople.mjs)" = 0 ]; then
    say "filling the database with demo data"
    step node --enable-source-maps build/server/seeds/run.js >"$logs/seed.log" 2>&1 || { show_log seed && exit 1; }
  fi
  demo=yes
fi

if [ "$own_mail" ]; then
  launch mail node node_modules/maildev/bin/maildev --smtp "$mail_port" --web "$mail_web_port" --ip 127.0.0.1 --web-ip 127.0.0.1 \
    --mail-directory .data/mail --silent
fi
launch server node --enable-source-maps build/server/index.js
until healthy; do check_children; done
# after the server, which brings the schema up to date
launch worker node --enable-source-maps build/jobs/index.js

echo
echo "  Yardbell    $PUBLIC_URL"
[ -z "$own_mail" ] || echo "  Mail        http://localhost:$mail_web_port (messages are caught here, none leaves this machine)"
[ -z "${demo:-}" ] || node build/scripts/system/printSignIns.js || true
ended="${EPOCHREALTIME/[.,]/}"
echo "  Started in $(((ended - began) / 1000000)).$(((ended - began) / 100000 % 10)) s. Ctrl-C stops everything."
echo

if [ "${1:-}" = --check ]; then
  sleep 1
  check_children
  exit 0
fi
# not `wait -n`: it misses a child that ended before it was called
while true; do
  check_children
  step sleep 1
done
